package fieldwright.field.tree;

/**
 * Coulomb's law, bare: field q d/|d|³ and potential q/|d|, d from the charge to the target, summed over charges at a block of targets.
 * One short loop of constant count over the targets for one charge: the form the compiler turns into vector instructions
 * (a sum over charges at one target it does not). Lengths in m, no 1/(4π eps0).
 */
public final class PointKernel {
    /** Targets in a block. */
    public static final int BLOCK = 64;

    private PointKernel() {
    }

    /** Adds the field of charges [from, to) at BLOCK targets; a target on a charge comes out as not a number. */
    public static void field(double[] sx, double[] sy, double[] sz, double[] q, int from, int to, double[] x, double[] y, double[] z,
        double[] ex, double[] ey, double[] ez) {
        for (int j = from; j < to; j++) {
            field(sx[j], sy[j], sz[j], q[j], x, y, z, ex, ey, ez);
        }
    }

    private static void field(double sx, double sy, double sz, double q, double[] x, double[] y, double[] z, double[] ex, double[] ey,
        double[] ez) {
        for (int i = 0; i < BLOCK; i++) {
            double dx = x[i] - sx;
            double dy = y[i] - sy;
            double dz = z[i] - sz;
            double square = dx * dx + dy * dy + dz * dz;
            double w = q / (square * Math.sqrt(square));
            ex[i] += w * dx;
            ey[i] += w * dy;
            ez[i] += w * dz;
        }
    }

    /** Adds the potential of charges [from, to) at BLOCK targets. */
    public static void potential(double[] sx, double[] sy, double[] sz, double[] q, int from, int to, double[] x, double[] y, double[] z,
        double[] v) {
        for (int j = from; j < to; j++) {
            potential(sx[j], sy[j], sz[j], q[j], x, y, z, v);
        }
    }

    private static void potential(double sx, double sy, double sz, double q, double[] x, double[] y, double[] z, double[] v) {
        for (int i = 0; i < BLOCK; i++) {
            double dx = x[i] - sx;
            double dy = y[i] - sy;
            double dz = z[i] - sz;
            v[i] += q / Math.sqrt(dx * dx + dy * dy + dz * dz);
        }
    }

    /** Adds |q|/|d|^k for k = 1, 2, 3 and lowers {@code nearest} to the least |d|². */
    static void sizes(double sx, double sy, double sz, double q, double[] x, double[] y, double[] z, double[][] size, double[] nearest) {
        sizes(sx, sy, sz, Math.abs(q), x, y, z, size[0], size[1], size[2]);
        nearest(sx, sy, sz, x, y, z, nearest);
    }

    private static void sizes(double sx, double sy, double sz, double q, double[] x, double[] y, double[] z, double[] first, double[] second,
        double[] third) {
        for (int i = 0; i < BLOCK; i++) {
            double dx = x[i] - sx;
            double dy = y[i] - sy;
            double dz = z[i] - sz;
            double inverse = 1 / Math.sqrt(dx * dx + dy * dy + dz * dz);
            double u = q * inverse;
            first[i] += u;
            u *= inverse;
            second[i] += u;
            third[i] += u * inverse;
        }
    }

    private static void nearest(double sx, double sy, double sz, double[] x, double[] y, double[] z, double[] nearest) {
        for (int i = 0; i < BLOCK; i++) {
            double dx = x[i] - sx;
            double dy = y[i] - sy;
            double dz = z[i] - sz;
            nearest[i] = Math.min(nearest[i], dx * dx + dy * dy + dz * dz);
        }
    }
}
