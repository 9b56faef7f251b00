package fieldwright.field.tree;

/**
 * Very many charged elements: points, or straight sides of a polyline. Each element stands for some point charges, its nodes: itself, or
 * the Gauss charges of a side, which hold beyond {@link Sides#NEAR} half-lengths. Lengths in m, charges in C, densities in C/m.
 */
public final class Charges {
    final int count;
    /** Nodes of one element. */
    final int each;
    final double[] x;
    final double[] y;
    final double[] z;
    final double[] q;
    /** Null for points. */
    final Sides sides;

    private Charges(int count, int each, double[] x, double[] y, double[] z, double[] q, Sides sides) {
        this.count = count;
        this.each = each;
        this.x = x;
        this.y = y;
        this.z = z;
        this.q = q;
        this.sides = sides;
    }

    /** Point charges, all numbers finite; those of charge 0 are left out. */
    public static Charges points(double[] x, double[] y, double[] z, double[] q) {
        int n = 0;
        for (int i = 0; i < q.length; i++) {
            n += q[i] == 0 ? 0 : 1;
        }
        double[][] kept = new double[4][n];
        int k = 0;
        for (int i = 0; i < q.length; i++) {
            if (q[i] != 0) {
                kept[0][k] = x[i];
                kept[1][k] = y[i];
                kept[2][k] = z[i];
                kept[3][k++] = q[i];
            }
        }
        return new Charges(n, 1, kept[0], kept[1], kept[2], kept[3], null);
    }

    /** Sides between neighbouring corners that differ, each linear between its two densities. */
    public static Charges polyline(double[] x, double[] y, double[] z, double[] atStart, double[] atEnd) {
        int n = x.length - 1;
        double[][] corner = {x, y, z};
        double[][] a = new double[3][n];
        double[][] b = new double[3][n];
        for (int k = 0; k < 3; k++) {
            System.arraycopy(corner[k], 0, a[k], 0, n);
            System.arraycopy(corner[k], 1, b[k], 0, n);
        }
        return of(new Sides(a, b, atStart.clone(), atEnd.clone()));
    }

    private static Charges of(Sides sides) {
        int n = sides.atStart().length;
        double[][] node = new double[4][n * Sides.NODES];
        for (int e = 0; e < n; e++) {
            sides.nodes(e, node[0], node[1], node[2], node[3]);
        }
        return new Charges(n, Sides.NODES, node[0], node[1], node[2], node[3], sides);
    }

    public int count() {
        return count;
    }

    /** Half-length of a side, 0 of a point. */
    double half(int e) {
        return sides == null ? 0 : sides.halfLength(e);
    }

    double middle(double[] coordinate, int e) {
        return each == 1 ? coordinate[e] : 0.5 * (coordinate[each * e] + coordinate[each * e + each - 1]);
    }

    public boolean hasSides() {
        return sides != null;
    }

    /** Σq and a bound of its rounding, C. */
    public double[] total() {
        DirectField.Sum sum = new DirectField.Sum();
        double absolute = 0;
        for (double v : q) {
            sum.add(v);
            absolute += Math.abs(v);
        }
        double eps = Math.ulp(1.0);
        return new double[] {sum.value(), eps * Math.abs(sum.value()) + (sides == null ? 0 : 8 * eps * absolute) + 1e-30 * absolute};
    }

    /** Middle of the box about all charges. */
    public double[] centre() {
        return new double[] {middle(x), middle(y), middle(z)};
    }

    private static double middle(double[] a) {
        double low = Double.POSITIVE_INFINITY;
        double high = Double.NEGATIVE_INFINITY;
        for (double v : a) {
            low = Math.min(low, v);
            high = Math.max(high, v);
        }
        return a.length == 0 ? 0 : 0.5 * low + 0.5 * high;
    }

    /** From {@link #centre} to the farthest charge. */
    public double radius() {
        double[] c = centre();
        double most = 0;
        double[] p = new double[3];
        for (int i = 0; i < places(); i++) {
            place(i, p);
            double dx = p[0] - c[0];
            double dy = p[1] - c[1];
            double dz = p[2] - c[2];
            most = Math.max(most, dx * dx + dy * dy + dz * dz);
        }
        return Math.sqrt(most);
    }

    /** Charges from {@code first} on, at most {@code most}: how many were copied. */
    public int copy(int first, int most, double[][] place, double[] charge) {
        int n = Math.min(most, q.length - first);
        System.arraycopy(x, first, place[0], 0, n);
        System.arraycopy(y, first, place[1], 0, n);
        System.arraycopy(z, first, place[2], 0, n);
        System.arraycopy(q, first, charge, 0, n);
        return n;
    }

    /** How many places carry charge: all nodes, and the ends of all sides. */
    public int places() {
        return q.length + (sides == null ? 0 : 2 * count);
    }

    public void place(int i, double[] out) {
        if (i < q.length) {
            out[0] = x[i];
            out[1] = y[i];
            out[2] = z[i];
            return;
        }
        double[][] end = i - q.length < count ? sides.a() : sides.b();
        for (int k = 0; k < 3; k++) {
            out[k] = end[k][(i - q.length) % count];
        }
    }

    /** Whether place i is the end of a side, which may touch a wall. */
    public boolean isCorner(int i) {
        return i >= q.length;
    }

    /** The same elements, element order[i] at i. */
    Charges inOrder(int[] order) {
        if (sides != null) {
            double[][] a = new double[3][];
            double[][] b = new double[3][];
            for (int k = 0; k < 3; k++) {
                a[k] = pick(sides.a()[k], order);
                b[k] = pick(sides.b()[k], order);
            }
            return of(new Sides(a, b, pick(sides.atStart(), order), pick(sides.atEnd(), order)));
        }
        return new Charges(count, 1, pick(x, order), pick(y, order), pick(z, order), pick(q, order), null);
    }

    static double[] pick(double[] from, int[] order) {
        double[] to = new double[order.length];
        for (int i = 0; i < order.length; i++) {
            to[i] = from[order[i]];
        }
        return to;
    }
}
