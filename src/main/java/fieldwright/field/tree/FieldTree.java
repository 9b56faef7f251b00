package fieldwright.field.tree;

/**
 * Field or potential of very many charges at many targets, to a relative accuracy, with a bound of the error that is true.
 *
 * <p>A treecode: far clusters by their multipole moments, near ones charge by charge, for blocks of neighbouring targets at once
 * (Barnes and Hut, Nature 324, 446, 1986, with moments of any degree). A first look at each block with few moments says how large the
 * field is there and how much cancels; then each cluster takes the lowest degree whose error bound fits the block's share. The bound
 * is rigorous: what is left out up to the stored degree is bounded by the norms of its moments, what lies beyond by Σ|q| s^k.
 * Relative accuracy is asked of the length of the field; where charges cancel to less than a thousandth, of that thousandth.
 * Work grows as n log n, memory as n. Immutable; the same numbers on any number of threads.
 */
public final class FieldTree {
    private static final int BLOCK = PointKernel.BLOCK;
    private static final double EPS = Math.ulp(1.0);
    private static final double CANCELLED = 1e-3;
    /** Accuracy of the first look, relative to the sizes. */
    private static final double LOOK = 0.03;
    /** Charges summed before they are added to the whole: bounds the rounding of long sums. */
    private static final int CHUNK = 256;

    private final ClusterTree tree;
    private final double relative;

    private FieldTree(ClusterTree tree, double relative) {
        this.tree = tree;
        this.relative = relative;
    }

    /** @param relative accuracy asked, at least 1e-13 */
    public static FieldTree of(Charges charges, double relative, Workers workers) {
        double asked = Math.max(relative, 1e-13);
        return new FieldTree(ClusterTree.of(charges, degree(asked), workers), asked);
    }

    /** Stored degree: high enough that clusters may be taken at two radii. */
    private static int degree(double relative) {
        int n = (int) Math.ceil(-2.4 * Math.log10(relative)) + 1;
        return Math.max(5, n | 1);
    }

    public Answers field(double[] x, double[] y, double[] z, Workers workers) {
        return answers(false, x, y, z, workers);
    }

    public Answers potential(double[] x, double[] y, double[] z, Workers workers) {
        return answers(true, x, y, z, workers);
    }

    private Answers answers(boolean potential, double[] x, double[] y, double[] z, Workers workers) {
        Answers all = Answers.of(potential ? 1 : 3, x.length);
        if (tree.clusters.isEmpty()) {
            return all;
        }
        TargetBlocks blocks = TargetBlocks.of(x, y, z);
        workers.each(blocks.count(), () -> new Block(potential), (block, i) -> block.work(blocks, i, all));
        return all;
    }

    /** One block of targets at a time; the scratch space of one thread. */
    private final class Block {
        private static final int NEAR = -2;

        private final boolean potential;
        private final int rows;
        private final FarField far = new FarField(tree.degree);
        private final double[] x = new double[BLOCK];
        private final double[] y = new double[BLOCK];
        private final double[] z = new double[BLOCK];
        /** Sums over what is near already in the first look, over all else, and over the charges at hand. */
        private final double[][] close;
        private final double[][] rest;
        private final double[][] part;
        /** Σ|q|/R^k. */
        private final double[][] sizes = new double[3][BLOCK];
        private final double[] nearest = new double[BLOCK];
        private final double[] sideError = new double[BLOCK];
        private final boolean[] onSide = new boolean[BLOCK];
        private final double[] low = new double[3];
        private final double[] high = new double[3];
        private final double[] side = new double[6];
        private final ClusterTree.Cluster[] stack = new ClusterTree.Cluster[8 * 64];
        /** Whether the first look took a cluster above this one as far: then nothing of it is summed yet. */
        private final boolean[] seenFar = new boolean[stack.length];
        private double inner;
        private double bound;
        private int degree;
        private double farError;
        private double farSize;
        private int additions;
        private int size;

        Block(boolean potential) {
            this.potential = potential;
            rows = potential ? 1 : 3;
            close = new double[rows][BLOCK];
            rest = new double[rows][BLOCK];
            part = new double[rows][BLOCK];
        }

        void work(TargetBlocks blocks, int number, Answers all) {
            size = blocks.size(number);
            blocks.copy(number, x, y, z);
            bounds();
            look();
            double share = share();
            clear(rest);
            farError = 0;
            run(share, false);
            for (int i = 0; i < size; i++) {
                put(i, blocks.order[number * BLOCK + i], all);
            }
        }

        private void put(int i, int target, Answers all) {
            double sum = sizes[potential ? 0 : 1][i];
            double extent = Math.abs(x[i]) + Math.abs(y[i]) + Math.abs(z[i]) + reach();
            double place = 2 * EPS * extent * (potential ? sizes[1][i] : 2 * sizes[2][i]);
            all.error()[target] = farError + sideError[i] + (0.5 * (CHUNK + additions) + 60) * EPS * sum + place;
            all.size()[target] = sum;
            all.touching()[target] = onSide[i] || !(Math.sqrt(nearest[i]) > 4 * EPS * extent);
            for (int k = 0; k < rows; k++) {
                all.value()[k][target] = close[k][i] + rest[k][i];
            }
        }

        private double reach() {
            ClusterTree.Cluster root = tree.clusters.get(0);
            return Math.abs(root.x) + Math.abs(root.y) + Math.abs(root.z) + root.radius;
        }

        private void bounds() {
            double[][] p = {x, y, z};
            for (int k = 0; k < 3; k++) {
                low[k] = Double.POSITIVE_INFINITY;
                high[k] = Double.NEGATIVE_INFINITY;
                for (int i = 0; i < size; i++) {
                    low[k] = Math.min(low[k], p[k][i]);
                    high[k] = Math.max(high[k], p[k][i]);
                }
            }
        }

        private void look() {
            clear(close);
            clear(rest);
            clear(sizes);
            java.util.Arrays.fill(nearest, Double.POSITIVE_INFINITY);
            java.util.Arrays.fill(sideError, 0);
            java.util.Arrays.fill(onSide, false);
            farError = 0;
            farSize = 0;
            additions = 0;
            run(LOOK, true);
        }

        /** What each cluster may leave out of its Σ|q|/R², so that all together leave every target of the block its accuracy. */
        private double share() {
            double allowed = Double.POSITIVE_INFINITY;
            for (int i = 0; i < size; i++) {
                double sum = sizes[potential ? 0 : 1][i];
                double square = 0;
                for (int k = 0; k < rows; k++) {
                    double v = close[k][i] + rest[k][i];
                    square += v * v;
                }
                double value = Math.sqrt(square) - farError;
                if (sum < Double.POSITIVE_INFINITY && !Double.isNaN(value)) {
                    allowed = Math.min(allowed, relative * Math.max(CANCELLED * sum, value));
                }
            }
            return farSize > 0 ? Math.min(LOOK, allowed / farSize) : LOOK;
        }

        /** All clusters, far or near; near ones of the first look are summed then and stay. */
        private void run(double share, boolean look) {
            int top = 0;
            seenFar[top] = look;
            stack[top++] = tree.clusters.get(0);
            while (top > 0) {
                ClusterTree.Cluster c = stack[--top];
                boolean fresh = look || seenFar[top];
                if (!fresh) {
                    boolean wasNear = isNear(c, LOOK);
                    if (wasNear && !isCut(c)) {
                        continue;
                    }
                    fresh = !wasNear;
                }
                if (!isNear(c, share)) {
                    far(c, look);
                } else if (isCut(c)) {
                    for (int k = c.children.length - 1; k >= 0; k--) {
                        seenFar[top] = fresh;
                        stack[top++] = c.children[k];
                    }
                } else {
                    near(c, look ? close : rest, look);
                }
            }
        }

        /** Whether the cluster must be cut, or its charges taken one by one because that costs less; leaves its degree. */
        private boolean isNear(ClusterTree.Cluster c, double share) {
            degree = degree(c, share);
            return degree == NEAR || cost(degree) >= (c.to - c.from) * tree.charges.each;
        }

        /** Of a near cluster: its children are looked at in its place. */
        private boolean isCut(ClusterTree.Cluster c) {
            return degree == NEAR && c.children.length > 0;
        }

        /** Of moments up to this degree, in pairs of the near kernel; measured. */
        private static int cost(int degree) {
            return 10 + (degree + 2) * (degree + 3) * 2 / 3;
        }

        /** Lowest degree that leaves no more than the share, its error in {@link #bound}; NEAR when the cluster is too near. */
        private int degree(ClusterTree.Cluster c, double share) {
            double distance = boxDistance(c.x, c.y, c.z);
            double t = c.radius / distance;
            if (!(t < 0.9) || !(distance - c.radius >= Sides.NEAR * c.longest) || c.radius == 0) {
                return NEAR;
            }
            int p = tree.degree;
            inner = potential ? 1 / distance : 1 / (distance * distance);
            double allowed = share * c.charge * inner;
            double power = Math.pow(t, p + 1);
            double left = 1 / (1 - t);
            double error = c.beyond * power * inner * (potential ? left : left * (p + 2 + t * left));
            if (!(error <= allowed)) {
                return NEAR;
            }
            int at = c.number * (p + 1);
            while (p >= 0) {
                power /= t;
                double more = error + tree.norms[at + p] * power * inner * (potential ? 1 : p + 1);
                if (!(more <= allowed)) {
                    break;
                }
                error = more;
                p--;
            }
            bound = error;
            return p;
        }

        private void far(ClusterTree.Cluster c, boolean look) {
            farError += bound;
            farSize += look ? c.charge * inner : 0;
            if (tree.charges.sides != null) {
                ruleError(c.charge, boxDistance(c.x, c.y, c.z) - c.radius);
            }
            if (look) {
                PointKernel.sizes(c.x, c.y, c.z, c.charge, x, y, z, sizes, part[0]);
            }
            if (degree >= 0) {
                clear(part);
                int at = c.number * Moments.length(tree.degree);
                if (potential) {
                    far.potential(tree.moments, at, degree, c.x, c.y, c.z, c.radius, x, y, z, part[0]);
                } else {
                    far.field(tree.moments, at, degree, c.x, c.y, c.z, c.radius, x, y, z, part[0], part[1], part[2]);
                }
                flush(rest);
            }
        }

        /** Charge by charge. What only sizes are wanted of, and is not very near, counts as if it stood at its centre. */
        private void near(ClusterTree.Cluster c, double[][] to, boolean first) {
            Charges s = tree.charges;
            boolean look = first && !(c.radius < 0.7 * boxDistance(c.x, c.y, c.z));
            if (first && !look) {
                PointKernel.sizes(c.x, c.y, c.z, c.charge, x, y, z, sizes, part[0]);
            }
            int start = c.from;
            for (int e = c.from; s.sides != null && e < c.to; e++) {
                double middle = boxDistance(s.middle(s.x, e), s.middle(s.y, e), s.middle(s.z, e));
                if (middle < Sides.NEAR * s.half(e)) {
                    nodes(start * s.each, e * s.each, to, look);
                    side(e, to, look);
                    start = e + 1;
                } else {
                    for (int k = s.each * e; k < s.each * (e + 1); k++) {
                        ruleError(Math.abs(s.q[k]), middle);
                    }
                }
            }
            nodes(start * s.each, c.to * s.each, to, look);
        }

        private void ruleError(double charge, double distance) {
            farError += Sides.RULE_ERROR * charge / (potential ? distance : distance * distance);
        }

        private double boxDistance(double cx, double cy, double cz) {
            double dx = Math.max(0, Math.max(low[0] - cx, cx - high[0]));
            double dy = Math.max(0, Math.max(low[1] - cy, cy - high[1]));
            double dz = Math.max(0, Math.max(low[2] - cz, cz - high[2]));
            return Math.sqrt(dx * dx + dy * dy + dz * dz);
        }

        private void nodes(int from, int to, double[][] sum, boolean look) {
            Charges s = tree.charges;
            for (int start = from; start < to; start += CHUNK) {
                int end = Math.min(to, start + CHUNK);
                clear(part);
                if (potential) {
                    PointKernel.potential(s.x, s.y, s.z, s.q, start, end, x, y, z, part[0]);
                } else {
                    PointKernel.field(s.x, s.y, s.z, s.q, start, end, x, y, z, part[0], part[1], part[2]);
                }
                flush(sum);
                for (int j = start; look && j < end; j++) {
                    PointKernel.sizes(s.x[j], s.y[j], s.z[j], s.q[j], x, y, z, sizes, nearest);
                }
            }
        }

        private void side(int e, double[][] sum, boolean look) {
            additions++;
            for (int i = 0; i < size; i++) {
                tree.charges.sides.closed(e, x[i], y[i], z[i], side);
                if (Double.isInfinite(side[4])) {
                    onSide[i] = true;
                    continue;
                }
                for (int k = 0; k < rows; k++) {
                    sum[k][i] += side[potential ? 3 : k];
                }
                sideError[i] += side[potential ? 5 : 4];
                if (look) {
                    sizes[0][i] += Math.abs(side[3]);
                    sizes[1][i] += Math.sqrt(side[0] * side[0] + side[1] * side[1] + side[2] * side[2]);
                }
            }
        }

        private void flush(double[][] sum) {
            additions++;
            for (int k = 0; k < rows; k++) {
                add(part[k], sum[k]);
            }
        }

        private static void clear(double[][] rows) {
            for (double[] row : rows) {
                java.util.Arrays.fill(row, 0);
            }
        }

        private static void add(double[] from, double[] to) {
            for (int i = 0; i < BLOCK; i++) {
                to[i] += from[i];
            }
        }
    }
}
