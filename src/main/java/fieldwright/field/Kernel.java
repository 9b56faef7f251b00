package fieldwright.field;

/**
 * Field and potential at the origin of d of a unit source at d, without 1/(4π eps0): d is source minus target (m).
 * Endless sources that are uniform along an axis are integrated along it in closed form: a whole line, half a line
 * (from {@code end} on), or a plane.
 */
final class Kernel {
    enum Kind { POINT, LINE, HALF_LINE, PLANE }

    static final Kernel POINT = new Kernel(Kind.POINT, -1, 0, 0);

    final Kind kind;
    /** LINE, HALF_LINE: the axis it runs along; PLANE: the axis it stands across. */
    final int axis;
    final double end;
    final int sign;

    private Kernel(Kind kind, int axis, double end, int sign) {
        this.kind = kind;
        this.axis = axis;
        this.end = end;
        this.sign = sign;
    }

    static Kernel line(int axis) {
        return new Kernel(Kind.LINE, axis, 0, 0);
    }

    static Kernel halfLine(int axis, double end, int sign) {
        return new Kernel(Kind.HALF_LINE, axis, end, sign);
    }

    static Kernel plane(int normal) {
        return new Kernel(Kind.PLANE, normal, 0, 0);
    }

    boolean isEndless() {
        return kind != Kind.POINT;
    }

    /** The component of d that does not count as distance, or −1. */
    int alongAxis() {
        return kind == Kind.LINE || kind == Kind.HALF_LINE ? axis : -1;
    }

    /** out[0..2] = field of weights w at displacements d. */
    void field(double[][] d, double[] w, double[] target, int n, double[][] out) {
        switch (kind) {
            case POINT -> pointField(d[0], d[1], d[2], w, n, out[0], out[1], out[2]);
            case PLANE -> {
                for (int i = 0; i < n; i++) {
                    for (int a = 0; a < 3; a++) {
                        out[a][i] = 0;
                    }
                    out[axis][i] = -2 * Math.PI * Math.signum(d[axis][i]) * w[i];
                }
            }
            default -> lineField(d, w, target, n, out);
        }
    }

    private static void pointField(double[] x, double[] y, double[] z, double[] w, int n, double[] ex, double[] ey, double[] ez) {
        for (int i = 0; i < n; i++) {
            double square = x[i] * x[i] + y[i] * y[i] + z[i] * z[i];
            double f = -w[i] / (square * Math.sqrt(square));
            ex[i] = f * x[i];
            ey[i] = f * y[i];
            ez[i] = f * z[i];
        }
    }

    private void lineField(double[][] d, double[] w, double[] target, int n, double[][] out) {
        double[] p = d[(axis + 1) % 3];
        double[] q = d[(axis + 2) % 3];
        double zeta = sign * (end - (target == null ? 0 : target[axis]));
        for (int i = 0; i < n; i++) {
            double square = p[i] * p[i] + q[i] * q[i];
            double f;
            double along = 0;
            if (kind == Kind.LINE) {
                f = -2 * w[i] / square;
            } else {
                double root = Math.sqrt(square + zeta * zeta);
                f = zeta > 0 ? -w[i] / (root * (root + zeta)) : -w[i] / square * (1 - zeta / root);
                along = -sign * w[i] / root;
            }
            out[(axis + 1) % 3][i] = f * p[i];
            out[(axis + 2) % 3][i] = f * q[i];
            out[axis][i] = along;
        }
    }

    /** out = potential; for endless kernels up to a constant, which drops out of differences. */
    void potential(double[][] d, double[] w, double[] target, int n, double[] out) {
        switch (kind) {
            case POINT -> {
                for (int i = 0; i < n; i++) {
                    out[i] = w[i] / Math.sqrt(d[0][i] * d[0][i] + d[1][i] * d[1][i] + d[2][i] * d[2][i]);
                }
            }
            case PLANE -> {
                for (int i = 0; i < n; i++) {
                    out[i] = -2 * Math.PI * Math.abs(d[axis][i]) * w[i];
                }
            }
            default -> {
                double[] p = d[(axis + 1) % 3];
                double[] q = d[(axis + 2) % 3];
                double zeta = sign * (end - target[axis]);
                for (int i = 0; i < n; i++) {
                    double square = p[i] * p[i] + q[i] * q[i];
                    if (kind == Kind.LINE) {
                        out[i] = -w[i] * Math.log(square);
                    } else {
                        double root = Math.sqrt(square + zeta * zeta);
                        out[i] = -w[i] * (zeta >= 0 ? Math.log(root + zeta) : Math.log(square) - Math.log(root - zeta));
                    }
                }
            }
        }
    }
}
