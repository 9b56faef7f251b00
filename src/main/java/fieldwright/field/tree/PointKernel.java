package fieldwright.field.tree;

/**
 * Coulomb's law, bare: field q d/|d|³ and potential q/|d|, d from the charge to the target, summed over charges at a block of targets.
 * One short loop of constant count over the targets for one charge: the form the compiler turns into vector instructions
 * (a sum over charges at one target it does not). Lengths in m, no 1/(4π eps0).
 */
public final class PointKernel {
    /** Targets in a block; at 64 the loops reach three fifths of the speed, measured. */
    public static final int BLOCK = 128;

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

    /** Adds |q|/|d| to size and |q|/|d|² to slope: of a potential. */
    static void potentialSize(double sx, double sy, double sz, double q, double[] x, double[] y, double[] z, double[] size, double[] slope) {
        for (int i = 0; i < BLOCK; i++) {
            double dx = x[i] - sx;
            double dy = y[i] - sy;
            double dz = z[i] - sz;
            double inverse = 1 / Math.sqrt(dx * dx + dy * dy + dz * dz);
            double u = q * inverse;
            size[i] += u;
            slope[i] += u * inverse;
        }
    }

    /** Adds |q|/|d|² to size and |q|/|d|³ to slope: of a field. */
    static void fieldSize(double sx, double sy, double sz, double q, double[] x, double[] y, double[] z, double[] size, double[] slope) {
        for (int i = 0; i < BLOCK; i++) {
            double dx = x[i] - sx;
            double dy = y[i] - sy;
            double dz = z[i] - sz;
            double inverse = 1 / Math.sqrt(dx * dx + dy * dy + dz * dz);
            double u = q * inverse * inverse;
            size[i] += u;
            slope[i] += u * inverse;
        }
    }
}
