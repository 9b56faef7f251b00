package fieldwright.field.tree;

/**
 * Field or potential of the moments of one cluster at a block of targets: V = Σ conj(M) Θ, and by the derivatives of Θ
 * E_z = Σ conj(M_{l−1}^m) Θ_l^m, E_x + i E_y = Σ conj(M_{l−1}^{m−1}) Θ_l^m. Scratch space; one thread.
 */
final class FarField {
    private static final int BLOCK = PointKernel.BLOCK;

    private final double[] x = new double[BLOCK];
    private final double[] y = new double[BLOCK];
    private final double[] z = new double[BLOCK];
    private final double[] inverse = new double[BLOCK];
    private final double[][] re;
    private final double[][] im;
    private final double[] diagonalRe = new double[BLOCK];
    private final double[] diagonalIm = new double[BLOCK];
    private final double[][] coefficients;

    /** @param degree the highest of any moments given */
    FarField(int degree) {
        re = new double[degree + 3][BLOCK];
        im = new double[degree + 3][BLOCK];
        coefficients = new double[3][Moments.length(degree + 1)];
    }

    /** Adds the field of moments up to a degree about (cx, cy, cz), radius a. */
    void field(double[] moments, int at, int degree, double cx, double cy, double cz, double a, double[] tx, double[] ty, double[] tz,
        double[] ex, double[] ey, double[] ez) {
        fieldCoefficients(moments, at, degree, 1 / (a * a));
        start(cx, cy, cz, a, tx, ty, tz);
        for (int m = 0; m <= degree + 1; m++) {
            column(m, degree + 1);
            add(coefficients[0], m, degree + 1, ex);
            add(coefficients[1], m, degree + 1, ey);
            add(coefficients[2], m, degree + 1, ez);
        }
    }

    /** Adds the potential likewise. */
    void potential(double[] moments, int at, int degree, double cx, double cy, double cz, double a, double[] tx, double[] ty, double[] tz,
        double[] v) {
        double[] c = coefficients[0];
        for (int n = 0; n <= degree; n++) {
            for (int m = 0; m <= n; m++) {
                int k = 2 * Moments.index(n, m);
                double twice = (m == 0 ? 1 : 2) / a;
                c[k] = twice * moments[at + k];
                c[k + 1] = twice * moments[at + k + 1];
            }
        }
        start(cx, cy, cz, a, tx, ty, tz);
        for (int m = 0; m <= degree; m++) {
            column(m, degree);
            add(c, m, degree, v);
        }
    }

    /** Adds the field of a local expansion up to a degree about (cx, cy, cz), radius b. */
    void localField(double[] local, int degree, double cx, double cy, double cz, double b, double[] tx, double[] ty, double[] tz, double[] ex,
        double[] ey, double[] ez) {
        localCoefficients(local, degree, 1 / b);
        startLocal(cx, cy, cz, b, tx, ty, tz);
        for (int m = 0; m < degree; m++) {
            localColumn(m, degree - 1);
            add(coefficients[0], m, degree - 1, ex);
            add(coefficients[1], m, degree - 1, ey);
            add(coefficients[2], m, degree - 1, ez);
        }
    }

    /** Adds its potential. */
    void localPotential(double[] local, int degree, double cx, double cy, double cz, double b, double[] tx, double[] ty, double[] tz,
        double[] v) {
        double[] c = coefficients[0];
        for (int n = 0; n <= degree; n++) {
            for (int m = 0; m <= n; m++) {
                int k = 2 * Moments.index(n, m);
                c[k] = (m == 0 ? 1 : 2) * local[k];
                c[k + 1] = (m == 0 ? 1 : 2) * local[k + 1];
            }
        }
        startLocal(cx, cy, cz, b, tx, ty, tz);
        for (int m = 0; m <= degree; m++) {
            localColumn(m, degree);
            add(c, m, degree, v);
        }
    }

    /** E_x + i E_y = −Σ conj(Υ_j^q) L_{j+1}^{q+1} and E_z = −Σ conj(Υ_j^q) L_{j+1}^q over all q, put on q ≥ 0. */
    private void localCoefficients(double[] local, int degree, double scale) {
        for (int j = 0; j < degree; j++) {
            for (int q = 0; q <= j; q++) {
                int k = 2 * Moments.index(j, q);
                int here = 2 * Moments.index(j + 1, q);
                double a = q == 0 ? 0 : local[here - 2];
                double b = q == 0 ? 0 : local[here - 1];
                double c = local[here + 2];
                double d = local[here + 3];
                coefficients[0][k] = -scale * (c - a);
                coefficients[0][k + 1] = -scale * (d - b);
                coefficients[1][k] = -scale * (d + b);
                coefficients[1][k + 1] = scale * (c + a);
                double twice = q == 0 ? scale : 2 * scale;
                coefficients[2][k] = -twice * local[here];
                coefficients[2][k + 1] = -twice * local[here + 1];
            }
        }
    }

    private void startLocal(double cx, double cy, double cz, double b, double[] tx, double[] ty, double[] tz) {
        for (int i = 0; i < BLOCK; i++) {
            double dx = (tx[i] - cx) / b;
            double dy = (ty[i] - cy) / b;
            double dz = (tz[i] - cz) / b;
            x[i] = dx;
            y[i] = dy;
            z[i] = dz;
            inverse[i] = dx * dx + dy * dy + dz * dz;
            diagonalRe[i] = 1;
            diagonalIm[i] = 0;
        }
    }

    /** Υ_n^m for n = m … top in re[n], im[n]; {@link #inverse} holds the square of the distance. */
    private void localColumn(int m, int top) {
        if (m > 0) {
            turn(0.5 / m, x, y, diagonalRe, diagonalIm);
        }
        System.arraycopy(diagonalRe, 0, re[m], 0, BLOCK);
        System.arraycopy(diagonalIm, 0, im[m], 0, BLOCK);
        for (int n = m + 1; n <= top; n++) {
            double c = 1.0 / ((double) n * n - (double) m * m);
            int below = Math.max(m, n - 2);
            recur((2 * n - 1) * c, n == m + 1 ? 0 : c, z, inverse, re[n - 1], im[n - 1], re[below], im[below], re[n], im[n]);
        }
    }

    /** With Θ = u + iv, conj(M_{m−1}) Θ − M_{m+1} conj(Θ) gives x and y, 2 Re conj(M_m) Θ gives z. */
    private void fieldCoefficients(double[] moments, int at, int degree, double scale) {
        double[] cx = coefficients[0];
        double[] cy = coefficients[1];
        double[] cz = coefficients[2];
        cx[0] = 0;
        cx[1] = 0;
        cy[0] = 0;
        cy[1] = 0;
        cz[0] = 0;
        cz[1] = 0;
        for (int l = 1; l <= degree + 1; l++) {
            for (int m = 0; m <= l; m++) {
                int k = 2 * Moments.index(l, m);
                int here = at + 2 * Moments.index(l - 1, m);
                double a = m == 0 ? 0 : moments[here - 2];
                double b = m == 0 ? 0 : moments[here - 1];
                double c = m + 1 <= l - 1 ? moments[here + 2] : 0;
                double d = m + 1 <= l - 1 ? moments[here + 3] : 0;
                cx[k] = scale * (a - c);
                cx[k + 1] = scale * (b - d);
                cy[k] = -scale * (b + d);
                cy[k + 1] = scale * (a + c);
                boolean has = m <= l - 1;
                double twice = m == 0 ? scale : 2 * scale;
                cz[k] = has ? twice * moments[here] : 0;
                cz[k + 1] = has ? twice * moments[here + 1] : 0;
            }
        }
    }

    private void start(double cx, double cy, double cz, double a, double[] tx, double[] ty, double[] tz) {
        double unit = 1 / a;
        for (int i = 0; i < BLOCK; i++) {
            double dx = (tx[i] - cx) * unit;
            double dy = (ty[i] - cy) * unit;
            double dz = (tz[i] - cz) * unit;
            double s = 1 / (dx * dx + dy * dy + dz * dz);
            x[i] = dx * s;
            y[i] = dy * s;
            z[i] = dz * s;
            inverse[i] = s;
        }
        for (int i = 0; i < BLOCK; i++) {
            diagonalRe[i] = Math.sqrt(inverse[i]);
            diagonalIm[i] = 0;
        }
    }

    /** Θ_n^m for n = m … top in re[n], im[n]. */
    private void column(int m, int top) {
        if (m > 0) {
            turn(2 * m - 1, x, y, diagonalRe, diagonalIm);
        }
        System.arraycopy(diagonalRe, 0, re[m], 0, BLOCK);
        System.arraycopy(diagonalIm, 0, im[m], 0, BLOCK);
        if (m < top) {
            recur(2 * m + 1, 0, z, inverse, re[m], im[m], re[m], im[m], re[m + 1], im[m + 1]);
        }
        for (int n = m + 2; n <= top; n++) {
            recur(2 * n - 1, (double) (n - 1) * (n - 1) - (double) m * m, z, inverse, re[n - 1], im[n - 1], re[n - 2], im[n - 2], re[n], im[n]);
        }
    }

    static void turn(double c, double[] x, double[] y, double[] re, double[] im) {
        for (int i = 0; i < BLOCK; i++) {
            double u = c * (x[i] * re[i] - y[i] * im[i]);
            im[i] = c * (x[i] * im[i] + y[i] * re[i]);
            re[i] = u;
        }
    }

    static void recur(double a, double b, double[] z, double[] inverse, double[] re1, double[] im1, double[] re0, double[] im0,
        double[] re, double[] im) {
        for (int i = 0; i < BLOCK; i++) {
            double s = a * z[i];
            double t = b * inverse[i];
            re[i] = s * re1[i] - t * re0[i];
            im[i] = s * im1[i] - t * im0[i];
        }
    }

    /** Adds Σ over the column, four terms to a loop. */
    private void add(double[] c, int m, int top, double[] out) {
        int n = m;
        for (; n + 3 <= top; n += 4) {
            int k0 = 2 * Moments.index(n, m);
            int k1 = 2 * Moments.index(n + 1, m);
            int k2 = 2 * Moments.index(n + 2, m);
            int k3 = 2 * Moments.index(n + 3, m);
            four(c[k0], c[k0 + 1], c[k1], c[k1 + 1], c[k2], c[k2 + 1], c[k3], c[k3 + 1], re[n], im[n], re[n + 1], im[n + 1], re[n + 2], im[n + 2],
                re[n + 3], im[n + 3], out);
        }
        for (; n <= top; n++) {
            int k = 2 * Moments.index(n, m);
            one(c[k], c[k + 1], re[n], im[n], out);
        }
    }

    private static void four(double c0, double d0, double c1, double d1, double c2, double d2, double c3, double d3, double[] r0, double[] i0,
        double[] r1, double[] i1, double[] r2, double[] i2, double[] r3, double[] i3, double[] out) {
        for (int i = 0; i < BLOCK; i++) {
            out[i] += c0 * r0[i] + d0 * i0[i] + c1 * r1[i] + d1 * i1[i] + c2 * r2[i] + d2 * i2[i] + c3 * r3[i] + d3 * i3[i];
        }
    }

    private static void one(double c, double d, double[] r, double[] im, double[] out) {
        for (int i = 0; i < BLOCK; i++) {
            out[i] += c * r[i] + d * im[i];
        }
    }
}
