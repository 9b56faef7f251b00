package fieldwright.field.tree;

import fieldwright.field.closed.Closed;
import fieldwright.field.closed.Rod;

/** Straight charged sides from a to b (m), density linear from {@code atStart} to {@code atEnd} (C/m). */
record Sides(double[][] a, double[][] b, double[] atStart, double[] atEnd) {
    /** Nearer than this many half-lengths to its middle a side is worked in closed form, farther off as its Gauss charges. */
    static final double NEAR = 25;
    /** Of a side's Gauss charges beyond {@link #NEAR}: 34^−8 would be the size of it, measured below this at all angles. */
    static final double RULE_ERROR = 2e-12;
    static final int NODES = 4;

    /** Roots and weights of the Legendre polynomial of degree 4 (Abramowitz and Stegun 25.4.30). */
    private static final double[] ROOT = {-0.861136311594052575, -0.339981043584856265, 0.339981043584856265, 0.861136311594052575};
    private static final double[] WEIGHT = {0.347854845137453857, 0.652145154862546143, 0.652145154862546143, 0.347854845137453857};

    double halfLength(int e) {
        double dx = b[0][e] - a[0][e];
        double dy = b[1][e] - a[1][e];
        double dz = b[2][e] - a[2][e];
        return 0.5 * Math.sqrt(dx * dx + dy * dy + dz * dz);
    }

    /** The Gauss charges of side e at [4 e, 4 e + 4). */
    void nodes(int e, double[] x, double[] y, double[] z, double[] q) {
        double half = halfLength(e);
        for (int k = 0; k < NODES; k++) {
            double right = 0.5 * (1 + ROOT[k]);
            double left = 0.5 * (1 - ROOT[k]);
            int i = NODES * e + k;
            x[i] = left * a[0][e] + right * b[0][e];
            y[i] = left * a[1][e] + right * b[1][e];
            z[i] = left * a[2][e] + right * b[2][e];
            q[i] = half * WEIGHT[k] * (left * atStart[e] + right * atEnd[e]);
        }
    }

    /** out = E_x, E_y, E_z, V, error of E, error of V; errors are infinite on the side. */
    void closed(int e, double x, double y, double z, double[] out) {
        double half = halfLength(e);
        double[] axis = new double[3];
        double[] d = new double[3];
        double[] place = {x, y, z};
        double along = 0;
        double size = 0;
        for (int k = 0; k < 3; k++) {
            axis[k] = (b[k][e] - a[k][e]) / (2 * half);
            d[k] = 0.5 * ((place[k] - a[k][e]) + (place[k] - b[k][e]));
            along += d[k] * axis[k];
            size = Math.max(size, Math.max(Math.abs(place[k]), Math.max(Math.abs(a[k][e]), Math.abs(b[k][e]))));
        }
        double across = 0;
        for (int k = 0; k < 3; k++) {
            d[k] -= along * axis[k];
            across += d[k] * d[k];
        }
        across = Math.sqrt(across);
        Rod rod = new Rod(-half, half, 0.5 * (atStart[e] + atEnd[e]), (atEnd[e] - atStart[e]) / (2 * half));
        Closed c = rod.at(across, 0, along, 4 * Math.ulp(1.0) * (size + Math.abs(along)));
        double outward = across > 0 ? c.ex() / across : 0;
        for (int k = 0; k < 3; k++) {
            out[k] = outward * d[k] + c.ez() * axis[k];
        }
        out[3] = c.v();
        out[4] = c.errE() + 8 * Math.ulp(1.0) * Math.sqrt(out[0] * out[0] + out[1] * out[1] + out[2] * out[2]);
        out[5] = c.errV();
    }
}
