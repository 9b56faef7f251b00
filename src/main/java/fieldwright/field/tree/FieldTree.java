package fieldwright.field.tree;

import java.util.ArrayList;
import java.util.List;

/**
 * Field or potential of very many charges at many targets, to a relative accuracy, with a bound of the error that is true.
 *
 * <p>Clusters of charges by their multipole moments, for boxes of targets by local expansions, what is near charge by charge (Barnes and
 * Hut, Nature 324, 446, 1986; Greengard and Rokhlin, J. Comput. Phys. 73, 325, 1987; with degrees chosen for each pair as by Dehnen
 * 2014). A first look at each block of targets says how large the field is there and how much cancels. Then boxes of targets, the
 * largest first, take in what is far from them; the rest is left to their halves, and at last to the blocks, for which each cluster
 * takes the lowest degree whose error bound fits its share, or is taken apart.
 * The bound is rigorous: what is left out of the moments up to the stored degree is bounded by their norms, what lies beyond by
 * Σ|q| s^k, what a local expansion leaves out by Σ|q| and the distances.
 * Relative accuracy is asked of the length of the field; where charges cancel to less than a thousandth, of that thousandth.
 * Work grows as n log n at most, memory as n. Immutable; the same numbers on any number of threads.
 */
public final class FieldTree {
    private static final int BLOCK = PointKernel.BLOCK;
    private static final double EPS = Math.ulp(1.0);
    private static final double CANCELLED = 1e-3;
    /** Accuracy of the first look, relative to the sizes. */
    private static final double LOOK = 0.03;
    /** Radius over distance from which on moments are of no use. */
    private static final double OPEN = 0.6;
    /** Highest degree of a local expansion. */
    private static final int LOCAL = 14;
    /** An expansion of degree p costs as much as the moments seen by (p+1)²/WORTH blocks one by one; measured. */
    private static final double WORTH = 34;
    /** Clusters are cut for a box of targets while they are larger than this part of it. */
    private static final double EVEN = 0.7;
    /** Smaller boxes, of fewer blocks, leave clusters whole: a block may take them by their moments. */
    private static final int CUTTING = 8;
    /** Charges summed before they are added to the whole: bounds the rounding of long sums. */
    private static final int CHUNK = 256;
    private static final int NEAR = -2;

    private final ClusterTree tree;
    private final double relative;
    private final int localDegree;

    private FieldTree(ClusterTree tree, double relative) {
        this.tree = tree;
        this.relative = relative;
        localDegree = Math.min(LOCAL, tree.degree);
    }

    /** @param relative accuracy asked, at least 1e-13 */
    public static FieldTree of(Charges charges, double relative, Workers workers) {
        double asked = Math.max(relative, 1e-13);
        return new FieldTree(ClusterTree.of(charges, degree(asked), workers), asked);
    }

    /** Stored degree, odd: high enough that clusters may be taken at about two and a half radii. */
    private static int degree(double relative) {
        return Math.max(5, (int) Math.ceil(-2.4 * Math.log10(relative)) + 1 | 1);
    }

    public Answers field(double[] x, double[] y, double[] z, Workers workers) {
        return new Run(false, x, y, z).answers(workers);
    }

    public Answers potential(double[] x, double[] y, double[] z, Workers workers) {
        return new Run(true, x, y, z).answers(workers);
    }

    /** A box about blocks [first, first + count), what it has taken in, and what is left to be seen by its halves. */
    private static final class Box {
        final int first;
        final int count;
        final double[] centre = new double[3];
        double radius;
        double share = Double.POSITIVE_INFINITY;
        double[] local;
        double error;
        List<ClusterTree.Cluster> left;

        Box(int first, int count) {
            this.first = first;
            this.count = count;
        }
    }

    /** One question at all its targets. */
    private final class Run {
        final boolean potential;
        final TargetBlocks blocks;
        final Answers all;
        final double[] share;
        final double[] farError;

        Run(boolean potential, double[] x, double[] y, double[] z) {
            this.potential = potential;
            blocks = TargetBlocks.of(x, y, z);
            all = Answers.of(potential ? 1 : 3, x.length);
            share = new double[blocks.count()];
            farError = new double[blocks.count()];
        }

        Answers answers(Workers workers) {
            if (tree.clusters.isEmpty() || blocks.count() == 0) {
                return all;
            }
            workers.part(0, 0.3).each(blocks.count(), () -> new Block(this), Block::look);
            Box root = new Box(0, blocks.count());
            root.local = new double[Moments.length(localDegree)];
            root.left = List.of(tree.clusters.get(0));
            measure(root);
            List<Box> level = List.of(root);
            Workers rest = workers.part(0.3, 1);
            int done = 0;
            while (!level.isEmpty()) {
                List<Box> now = level;
                Box[] halves = new Box[2 * now.size()];
                long single = now.stream().filter(b -> b.count == 1).count();
                rest.part((double) done / blocks.count(), (double) (done + single) / blocks.count())
                    .each(now.size(), () -> new Block(this), (block, i) -> block.descend(now.get(i), halves, 2 * i));
                done += (int) single;
                level = java.util.Arrays.stream(halves).filter(java.util.Objects::nonNull).toList();
            }
            return all;
        }

        /** Centre and radius of a box, and the least share of its blocks. */
        void measure(Box box) {
            double[] low = new double[3];
            double[] high = new double[3];
            blocks.bounds(box.first, box.count, low, high);
            double square = 0;
            double extent = 0;
            for (int k = 0; k < 3; k++) {
                box.centre[k] = 0.5 * low[k] + 0.5 * high[k];
                square += (high[k] - low[k]) * (high[k] - low[k]);
                extent += Math.abs(box.centre[k]);
            }
            box.radius = 0.5 * Math.sqrt(square) + 8 * EPS * extent + 1e-290;
            for (int b = box.first; b < box.first + box.count; b++) {
                box.share = Math.min(box.share, share[b]);
            }
        }
    }

    /** One block of targets at a time; the scratch space of one thread. */
    private final class Block {
        private final Run run;
        private final boolean potential;
        private final int rows;
        private final FarField far = new FarField(tree.degree);
        private LocalField locals;
        private final double[] x = new double[BLOCK];
        private final double[] y = new double[BLOCK];
        private final double[] z = new double[BLOCK];
        /** Sums over the block, and over the charges at hand. */
        private final double[][] total;
        private final double[][] part;
        /** Σ|q|/R of a potential, Σ|q|/R² of a field. */
        private final double[] sizes = new double[BLOCK];
        /** The same with one power of R more. */
        private final double[] slopes = new double[BLOCK];
        private final double[] sideError = new double[BLOCK];
        private final boolean[] onSide = new boolean[BLOCK];
        private final double[] low = new double[3];
        private final double[] high = new double[3];
        private final double[] side = new double[6];
        private ClusterTree.Cluster[] stack = new ClusterTree.Cluster[1024];
        /** Whether a cluster above this one, or it itself, is open no more: then nothing of it was summed in the first look. */
        private boolean[] fresh = new boolean[stack.length];
        private double bound;
        private double farError;
        private double farSize;
        private int additions;
        private int size;

        Block(Run run) {
            this.run = run;
            potential = run.potential;
            rows = potential ? 1 : 3;
            total = new double[rows][BLOCK];
            part = new double[rows][BLOCK];
        }

        private void begin(int number) {
            size = run.blocks.size(number);
            run.blocks.copy(number, x, y, z);
            run.blocks.bounds(number, 1, low, high);
            clear(total);
            java.util.Arrays.fill(sideError, 0);
            farError = 0;
            additions = 0;
        }

        // ---- the first look

        /** Sums what is near for good, and finds from the rest, roughly, what the far clusters may leave out. */
        void look(int number) {
            begin(number);
            java.util.Arrays.fill(sizes, 0);
            java.util.Arrays.fill(slopes, 0);
            java.util.Arrays.fill(onSide, false);
            farSize = 0;
            List<ClusterTree.Cluster> closed = new ArrayList<>();
            List<ClusterTree.Cluster> opened = new ArrayList<>();
            int top = push(0, tree.clusters.get(0), false);
            while (top > 0) {
                ClusterTree.Cluster c = stack[--top];
                if (isOpen(c)) {
                    if (c.children.length == 0) {
                        opened.add(c);
                        near(c, true);
                    }
                    for (int k = c.children.length - 1; k >= 0; k--) {
                        top = push(top, c.children[k], false);
                    }
                } else {
                    closed.add(c);
                }
            }
            for (int i = 0; i < size; i++) {
                keep(i, number, opened);
            }
            for (ClusterTree.Cluster c : closed) {
                roughly(c);
            }
            for (int i = 0; i < size; i++) {
                run.all.size()[target(number, i)] = sizes[i];
                // the place's own rounding moves V by Σ|q|/R² and E by twice Σ|q|/R³ at most
                double place = (potential ? 2 : 4) * EPS * extent(i) * slopes[i];
                run.all.error()[target(number, i)] = sideError[i] + (60 + 0.5 * additions) * EPS * sizes[i] + place;
            }
            run.share[number] = share();
        }

        private int target(int number, int i) {
            return run.blocks.order[number * BLOCK + i];
        }

        private double extent(int i) {
            ClusterTree.Cluster root = tree.clusters.get(0);
            return Math.abs(x[i]) + Math.abs(y[i]) + Math.abs(z[i]) + Math.abs(root.x) + Math.abs(root.y) + Math.abs(root.z) + root.radius;
        }

        private void keep(int i, int number, List<ClusterTree.Cluster> opened) {
            int target = target(number, i);
            for (int k = 0; k < rows; k++) {
                run.all.value()[k][target] = total[k][i];
            }
            double least = 4 * EPS * extent(i);
            boolean close = !(slopes[i] * least < 0.1 * sizes[i]) && slopes[i] != 0;
            run.all.touching()[target] = onSide[i] || close && !(nearest(i, opened) > least);
            run.farError[number] = farError;
        }

        /** Distance of the nearest charge; looked for only where slope over size says that one may be very close. */
        private double nearest(int i, List<ClusterTree.Cluster> opened) {
            Charges s = tree.charges;
            double least = Double.POSITIVE_INFINITY;
            for (ClusterTree.Cluster c : opened) {
                for (int j = c.from * s.each; j < c.to * s.each; j++) {
                    double dx = x[i] - s.x[j];
                    double dy = y[i] - s.y[j];
                    double dz = z[i] - s.z[j];
                    least = Math.min(least, dx * dx + dy * dy + dz * dz);
                }
            }
            return Math.sqrt(least);
        }

        private void roughly(ClusterTree.Cluster c) {
            double distance = boxDistance(c.x, c.y, c.z);
            size(c.x, c.y, c.z, c.charge);
            farSize += c.charge * unit(distance);
            int degree = degree(c, distance, distance, LOOK);
            far(c, degree == NEAR ? tree.degree : degree);
        }

        /** What each cluster may leave out of its Σ|q|/R², so that all together leave every target of the block its accuracy. */
        private double share() {
            double allowed = Double.POSITIVE_INFINITY;
            for (int i = 0; i < size; i++) {
                double sum = sizes[i];
                double square = 0;
                for (int k = 0; k < rows; k++) {
                    square += total[k][i] * total[k][i];
                }
                double value = Math.sqrt(square) - farError;
                if (sum < Double.POSITIVE_INFINITY && !Double.isNaN(value)) {
                    allowed = Math.min(allowed, relative * Math.max(CANCELLED * sum, value));
                }
            }
            return farSize > 0 ? Math.min(LOOK, allowed / farSize) : LOOK;
        }

        // ---- boxes of targets

        /** Takes in what is far from a box; its halves see the rest, a block is worked to its end. */
        void descend(Box box, Box[] halves, int at) {
            locals = locals == null ? new LocalField(localDegree) : locals;
            takeIn(box);
            if (box.count == 1) {
                finish(box);
                return;
            }
            int half = box.count / 2;
            halves[at] = child(box, box.first, half);
            halves[at + 1] = child(box, box.first + half, box.count - half);
        }

        private Box child(Box box, int first, int count) {
            Box child = new Box(first, count);
            run.measure(child);
            child.left = box.left;
            child.error = box.error;
            child.local = locals.moved(box.local, (child.centre[0] - box.centre[0]) / box.radius, (child.centre[1] - box.centre[1]) / box.radius,
                (child.centre[2] - box.centre[2]) / box.radius, child.radius / box.radius);
            return child;
        }

        private void takeIn(Box box) {
            int most = (int) Math.min(localDegree, Math.sqrt(WORTH * box.count) - 1);
            List<List<ClusterTree.Cluster>> taken = new ArrayList<>();
            for (int p = 0; p <= most; p++) {
                taken.add(new ArrayList<>());
            }
            List<ClusterTree.Cluster> left = new ArrayList<>();
            for (ClusterTree.Cluster first : box.left) {
                int top = push(0, first, false);
                while (top > 0) {
                    ClusterTree.Cluster c = stack[--top];
                    int degree = localDegree(c, box, most);
                    if (degree != NEAR) {
                        box.error += bound + ruleErrorOf(c, box);
                        taken.get(degree).add(c);
                    } else if (box.count >= CUTTING && c.children.length > 0 && c.radius > EVEN * box.radius) {
                        for (int k = c.children.length - 1; k >= 0; k--) {
                            top = push(top, c.children[k], false);
                        }
                    } else {
                        left.add(c);
                    }
                }
            }
            box.left = left;
            convert(taken, box);
        }

        /** Of sides as their Gauss charges. */
        private double ruleErrorOf(ClusterTree.Cluster c, Box box) {
            double dx = c.x - box.centre[0];
            double dy = c.y - box.centre[1];
            double dz = c.z - box.centre[2];
            double distance = Math.sqrt(dx * dx + dy * dy + dz * dz) - box.radius - c.radius;
            return tree.charges.sides == null ? 0 : Sides.RULE_ERROR * c.charge * unit(distance);
        }

        /** Lowest degrees last, so that only the last few clusters go in a block that is not full. */
        private void convert(List<List<ClusterTree.Cluster>> taken, Box box) {
            List<ClusterTree.Cluster> batch = new ArrayList<>();
            int degree = 0;
            for (int p = taken.size() - 1; p >= 0; p--) {
                for (ClusterTree.Cluster c : taken.get(p)) {
                    degree = batch.isEmpty() ? p : degree;
                    batch.add(c);
                    if (batch.size() == BLOCK) {
                        locals.add(batch, tree, degree, box.centre[0], box.centre[1], box.centre[2], box.radius, box.local);
                        batch.clear();
                    }
                }
            }
            if (!batch.isEmpty()) {
                locals.add(batch, tree, degree, box.centre[0], box.centre[1], box.centre[2], box.radius, box.local);
            }
        }

        /** Lowest degree of moments and expansion that leaves no more than the share of the box; its error in {@link #bound}. */
        private int localDegree(ClusterTree.Cluster c, Box box, int most) {
            double dx = c.x - box.centre[0];
            double dy = c.y - box.centre[1];
            double dz = c.z - box.centre[2];
            double distance = Math.sqrt(dx * dx + dy * dy + dz * dz);
            double inner = distance - box.radius;
            double gap = distance - c.radius;
            if (!(inner > 0) || isOpen(c, inner) || !(box.radius < OPEN * gap)) {
                return NEAR;
            }
            int p = degree(c, inner, distance + box.radius, 0.5 * box.share);
            if (p == NEAR || p > most) {
                return NEAR;
            }
            double ofMoments = bound;
            double allowed = 0.5 * box.share * c.charge * unit(distance + box.radius);
            double t = box.radius / gap;
            double left = 1 / (1 - t);
            double power = Math.pow(t, Math.max(1, p));
            for (p = Math.max(1, p); p <= most; p++) {
                double error = c.charge * unit(gap) * (potential ? power * t * left : power * left * (p + 1 + t * left));
                if (error <= allowed) {
                    bound = ofMoments + error;
                    return p;
                }
                power *= t;
            }
            return NEAR;
        }

        // ---- a block

        private void finish(Box box) {
            int number = box.first;
            begin(number);
            farError = box.error + run.farError[number];
            if (potential) {
                far.localPotential(box.local, localDegree, box.centre[0], box.centre[1], box.centre[2], box.radius, x, y, z, total[0]);
            } else {
                far.localField(box.local, localDegree, box.centre[0], box.centre[1], box.centre[2], box.radius, x, y, z, total[0], total[1],
                    total[2]);
            }
            for (ClusterTree.Cluster c : box.left) {
                rest(c, number);
            }
            for (int i = 0; i < size; i++) {
                int target = target(number, i);
                run.all.error()[target] += farError + sideError[i] + 0.5 * (CHUNK + additions) * EPS * run.all.size()[target];
                for (int k = 0; k < rows; k++) {
                    run.all.value()[k][target] += total[k][i];
                }
            }
        }

        private boolean isBelowClosed(ClusterTree.Cluster c) {
            for (ClusterTree.Cluster p = c.parent; p != null; p = p.parent) {
                if (!isOpen(p)) {
                    return true;
                }
            }
            return false;
        }

        private void rest(ClusterTree.Cluster first, int number) {
            int top = push(0, first, isBelowClosed(first));
            while (top > 0) {
                ClusterTree.Cluster c = stack[--top];
                boolean closed = !isOpen(c);
                boolean isFresh = fresh[top] || closed;
                double distance = boxDistance(c.x, c.y, c.z);
                int degree = closed ? degree(c, distance, distance, run.share[number]) : NEAR;
                if (degree != NEAR && cost(degree) < (c.to - c.from) * tree.charges.each) {
                    far(c, degree);
                } else if (degree == NEAR && c.children.length > 0) {
                    for (int k = c.children.length - 1; k >= 0; k--) {
                        top = push(top, c.children[k], isFresh);
                    }
                } else if (isFresh) {
                    near(c, false);
                }
            }
        }

        /** Of moments up to this degree, in pairs of the near kernel; measured. */
        private static int cost(int degree) {
            return 10 + (degree + 2) * (degree + 3) * 2 / 3;
        }

        private int push(int top, ClusterTree.Cluster c, boolean isFresh) {
            if (top == stack.length) {
                stack = java.util.Arrays.copyOf(stack, 2 * top);
                fresh = java.util.Arrays.copyOf(fresh, 2 * top);
            }
            stack[top] = c;
            fresh[top] = isFresh;
            return top + 1;
        }

        /** Whether a cluster is too near, or its sides too long, for its moments. */
        private boolean isOpen(ClusterTree.Cluster c) {
            return isOpen(c, boxDistance(c.x, c.y, c.z));
        }

        private static boolean isOpen(ClusterTree.Cluster c, double distance) {
            return !(c.radius < OPEN * distance) || !(distance - c.radius >= Sides.NEAR * c.longest) || c.radius == 0;
        }

        private double unit(double distance) {
            return potential ? 1 / distance : 1 / (distance * distance);
        }

        /**
         * Lowest degree at which targets from {@code inner} away on lose no more than the share of Σ|q|/R² at {@code outer}, its error in
         * {@link #bound}; NEAR when there is none.
         */
        private int degree(ClusterTree.Cluster c, double inner, double outer, double share) {
            double t = c.radius / inner;
            int p = tree.degree;
            double unit = unit(inner);
            double allowed = share * c.charge * unit(outer);
            double power = Math.pow(t, p + 1);
            double left = 1 / (1 - t);
            double error = c.beyond * power * unit * (potential ? left : left * (p + 2 + t * left));
            bound = error;
            if (!(error <= allowed)) {
                return NEAR;
            }
            int at = c.number * (p + 1);
            while (p >= 0) {
                power /= t;
                double more = error + tree.norms[at + p] * power * unit * (potential ? 1 : p + 1);
                if (!(more <= allowed)) {
                    break;
                }
                error = more;
                p--;
            }
            bound = error;
            return p;
        }

        private void far(ClusterTree.Cluster c, int degree) {
            farError += bound;
            if (tree.charges.sides != null) {
                ruleError(c.charge, boxDistance(c.x, c.y, c.z) - c.radius);
            }
            if (degree >= 0) {
                clear(part);
                int at = c.number * Moments.length(tree.degree);
                if (potential) {
                    far.potential(tree.moments, at, degree, c.x, c.y, c.z, c.radius, x, y, z, part[0]);
                } else {
                    far.field(tree.moments, at, degree, c.x, c.y, c.z, c.radius, x, y, z, part[0], part[1], part[2]);
                }
                flush();
            }
        }

        /** Charge by charge. */
        private void near(ClusterTree.Cluster c, boolean look) {
            Charges s = tree.charges;
            int start = c.from;
            for (int e = c.from; s.sides != null && e < c.to; e++) {
                double middle = boxDistance(s.middle(s.x, e), s.middle(s.y, e), s.middle(s.z, e));
                if (middle < Sides.NEAR * s.half(e)) {
                    nodes(start * s.each, e * s.each, look);
                    side(e, look);
                    start = e + 1;
                } else {
                    for (int k = s.each * e; k < s.each * (e + 1); k++) {
                        ruleError(Math.abs(s.q[k]), middle);
                    }
                }
            }
            nodes(start * s.each, c.to * s.each, look);
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

        private void nodes(int from, int to, boolean look) {
            Charges s = tree.charges;
            for (int start = from; start < to; start += CHUNK) {
                int end = Math.min(to, start + CHUNK);
                clear(part);
                if (potential) {
                    PointKernel.potential(s.x, s.y, s.z, s.q, start, end, x, y, z, part[0]);
                } else {
                    PointKernel.field(s.x, s.y, s.z, s.q, start, end, x, y, z, part[0], part[1], part[2]);
                }
                flush();
                for (int j = start; look && j < end; j++) {
                    size(s.x[j], s.y[j], s.z[j], Math.abs(s.q[j]));
                }
            }
        }

        private void size(double cx, double cy, double cz, double charge) {
            if (potential) {
                PointKernel.potentialSize(cx, cy, cz, charge, x, y, z, sizes, slopes);
            } else {
                PointKernel.fieldSize(cx, cy, cz, charge, x, y, z, sizes, slopes);
            }
        }

        private void side(int e, boolean look) {
            additions++;
            for (int i = 0; i < size; i++) {
                tree.charges.sides.closed(e, x[i], y[i], z[i], side);
                if (Double.isInfinite(side[4])) {
                    onSide[i] = true;
                    continue;
                }
                for (int k = 0; k < rows; k++) {
                    total[k][i] += side[potential ? 3 : k];
                }
                sideError[i] += side[potential ? 5 : 4];
                if (look) {
                    sizes[i] += potential ? Math.abs(side[3]) : Math.sqrt(side[0] * side[0] + side[1] * side[1] + side[2] * side[2]);
                }
            }
        }

        private void flush() {
            additions++;
            for (int k = 0; k < rows; k++) {
                add(part[k], total[k]);
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
