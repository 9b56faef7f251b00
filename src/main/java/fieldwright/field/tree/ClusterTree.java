package fieldwright.field.tree;

import java.util.ArrayList;
import java.util.List;

/**
 * Elements in boxes within boxes, each with its multipole moments. A box is cut at the middle of its longer sides until few charges are
 * left; memory grows as the number of elements.
 */
final class ClusterTree {
    /** Charges of a box that is not cut further. */
    static final int LEAF = 250;
    /** Moments of so many charges cost as much as moving the moments of one child; measured. */
    private static final int WORTH_MOVING = 600;
    /** Boxes in boxes; coincident charges are not cut for ever. */
    private static final int DEEPEST = 60;

    final Charges charges;
    final int degree;
    final double[] moments;
    /** Bounds of each degree, see {@link Moments#norms}. */
    final double[] norms;
    final List<Cluster> clusters = new ArrayList<>();

    /** Elements [from, to); lengths in m. {@code radius} reaches the farthest charge, {@code middle} the farthest middle of an element. */
    static final class Cluster {
        final int number;
        final int from;
        final int to;
        Cluster parent;
        Cluster[] children = {};
        double x;
        double y;
        double z;
        double radius;
        /** Σ|q|. */
        double charge;
        /** Σ|q|(s/radius)^{degree+1}. */
        double beyond;
        /** Longest half-length of a side in it. */
        double longest;

        Cluster(int number, int from, int to) {
            this.number = number;
            this.from = from;
            this.to = to;
        }
    }

    private final double[] mx;
    private final double[] my;
    private final double[] mz;
    private final int[] order;

    private ClusterTree(Charges given, int degree, Workers workers) {
        this.degree = degree;
        order = new int[given.count];
        mx = new double[given.count];
        my = new double[given.count];
        mz = new double[given.count];
        for (int e = 0; e < given.count; e++) {
            order[e] = e;
            mx[e] = given.middle(given.x, e);
            my[e] = given.middle(given.y, e);
            mz[e] = given.middle(given.z, e);
        }
        if (given.count > 0) {
            divide(0, given.count, Math.max(1, LEAF / given.each), 0);
        }
        charges = given.inOrder(order);
        moments = new double[clusters.size() * Moments.length(degree)];
        norms = new double[clusters.size() * (degree + 1)];
        workers.each(clusters.size(), Moments.Scratch::new, (scratch, i) -> measure(clusters.get(i), scratch));
        for (int i = clusters.size() - 1; i >= 0; i--) {
            if (!isDirect(clusters.get(i))) {
                gather(clusters.get(i));
            }
        }
    }

    /** @param degree odd: the bound beyond it takes an even power */
    static ClusterTree of(Charges charges, int degree, Workers workers) {
        return new ClusterTree(charges, degree, workers);
    }

    private Cluster divide(int from, int to, int leaf, int depth) {
        Cluster c = new Cluster(clusters.size(), from, to);
        clusters.add(c);
        if (to - from > leaf && depth < DEEPEST) {
            fieldwright.quantity.Stop.check();
            int[] cuts = cuts(from, to);
            if (cuts.length > 2) {
                Cluster[] children = new Cluster[cuts.length - 1];
                for (int k = 0; k < children.length; k++) {
                    children[k] = divide(cuts[k], cuts[k + 1], leaf, depth + 1);
                    children[k].parent = c;
                }
                c.children = children;
            }
        }
        return c;
    }

    /** Borders of the children, both ends among them; sorts the elements between. */
    private int[] cuts(int from, int to) {
        double[][] middle = {mx, my, mz};
        double[] low = new double[3];
        double[] high = new double[3];
        double longest = 0;
        for (int k = 0; k < 3; k++) {
            low[k] = Double.POSITIVE_INFINITY;
            high[k] = Double.NEGATIVE_INFINITY;
            for (int e = from; e < to; e++) {
                low[k] = Math.min(low[k], middle[k][e]);
                high[k] = Math.max(high[k], middle[k][e]);
            }
            longest = Math.max(longest, high[k] - low[k]);
        }
        int[] borders = {from, to};
        for (int k = 0; k < 3; k++) {
            if (high[k] - low[k] > 0.6 * longest && longest > 0) {
                borders = cutEach(borders, middle[k], 0.5 * (low[k] + high[k]));
            }
        }
        return borders;
    }

    private int[] cutEach(int[] borders, double[] coordinate, double at) {
        int[] more = new int[2 * borders.length - 1];
        int n = 0;
        for (int k = 0; k + 1 < borders.length; k++) {
            more[n++] = borders[k];
            int cut = partition(borders[k], borders[k + 1], coordinate, at);
            if (cut > borders[k] && cut < borders[k + 1]) {
                more[n++] = cut;
            }
        }
        more[n++] = borders[borders.length - 1];
        return java.util.Arrays.copyOf(more, n);
    }

    private int partition(int from, int to, double[] coordinate, double at) {
        int i = from;
        int j = to - 1;
        while (true) {
            while (i <= j && coordinate[i] < at) {
                i++;
            }
            while (i <= j && !(coordinate[j] < at)) {
                j--;
            }
            if (i >= j) {
                return i;
            }
            swap(mx, i, j);
            swap(my, i, j);
            swap(mz, i, j);
            int o = order[i];
            order[i] = order[j];
            order[j] = o;
        }
    }

    private static void swap(double[] a, int i, int j) {
        double t = a[i];
        a[i] = a[j];
        a[j] = t;
    }

    /** Centre, radius and absolute sums; the moments of a box of few charges. */
    private void measure(Cluster c, Moments.Scratch scratch) {
        int from = c.from * charges.each;
        int to = c.to * charges.each;
        double[][] p = {charges.x, charges.y, charges.z};
        double[] centre = new double[3];
        for (int k = 0; k < 3; k++) {
            double low = Double.POSITIVE_INFINITY;
            double high = Double.NEGATIVE_INFINITY;
            for (int i = from; i < to; i++) {
                low = Math.min(low, p[k][i]);
                high = Math.max(high, p[k][i]);
            }
            centre[k] = 0.5 * low + 0.5 * high;
        }
        c.x = centre[0];
        c.y = centre[1];
        c.z = centre[2];
        double farthest = 0;
        double sum = 0;
        double powers = 0;
        for (int i = from; i < to; i++) {
            double dx = p[0][i] - c.x;
            double dy = p[1][i] - c.y;
            double dz = p[2][i] - c.z;
            farthest = Math.max(farthest, dx * dx + dy * dy + dz * dz);
        }
        double unit = farthest > 0 ? 1 / farthest : 0;
        for (int i = from; i < to; i++) {
            double dx = p[0][i] - c.x;
            double dy = p[1][i] - c.y;
            double dz = p[2][i] - c.z;
            double q = Math.abs(charges.q[i]);
            sum += q;
            powers += q * power((dx * dx + dy * dy + dz * dz) * unit, (degree + 1) / 2);
        }
        c.charge = sum;
        c.beyond = powers;
        c.radius = Math.sqrt(farthest);
        if (charges.sides != null) {
            for (int e = c.from; e < c.to; e++) {
                c.longest = Math.max(c.longest, charges.half(e));
            }
        }
        if (c.radius > 0 && isDirect(c)) {
            double[] own = new double[Moments.length(degree)];
            Moments.add(charges.x, charges.y, charges.z, charges.q, from, to, c.x, c.y, c.z, c.radius, degree, own, scratch);
            store(c, own);
        }
    }

    private static double power(double base, int exponent) {
        double result = 1;
        double square = base;
        for (int e = exponent; e > 0; e >>= 1) {
            result *= (e & 1) == 1 ? square : 1;
            square *= square;
        }
        return result;
    }

    private boolean isDirect(Cluster c) {
        return c.children.length == 0 || (c.to - c.from) * charges.each < WORTH_MOVING * c.children.length;
    }

    private void gather(Cluster c) {
        double[] own = new double[Moments.length(degree)];
        double[] child = new double[own.length];
        for (Cluster k : c.children) {
            if (k.radius > 0) {
                System.arraycopy(moments, k.number * own.length, child, 0, own.length);
                Moments.addMoved(child, k.radius / c.radius, (k.x - c.x) / c.radius, (k.y - c.y) / c.radius, (k.z - c.z) / c.radius, degree, own);
            } else {
                Moments.add(charges.x, charges.y, charges.z, charges.q, k.from * charges.each, k.to * charges.each, c.x, c.y, c.z, c.radius,
                    degree, own, new Moments.Scratch());
            }
        }
        store(c, own);
    }

    private void store(Cluster c, double[] own) {
        System.arraycopy(own, 0, moments, c.number * own.length, own.length);
        Moments.norms(own, degree, norms, c.number * (degree + 1));
    }
}
