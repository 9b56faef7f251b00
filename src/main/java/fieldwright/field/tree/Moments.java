package fieldwright.field.tree;

/**
 * Multipole moments of charges about a centre, in units of a radius: M_n^m = Σ q Υ_n^m(s/a), and what follows from them.
 *
 * <p>Scaled solid harmonics of Dehnen (Computational Astrophysics and Cosmology 1:1, 2014, appendix A; from memory, and checked against
 * direct sums): regular Υ_m^m = (x+iy)^m/(2^m m!), (n²−m²) Υ_n^m = (2n−1) z Υ_{n−1}^m − r² Υ_{n−2}^m; irregular
 * Θ_m^m = (2m−1)!! (x+iy)^m/r^{2m+1}, r² Θ_n^m = (2n−1) z Θ_{n−1}^m − ((n−1)²−m²) Θ_{n−2}^m; for negative m the conjugate times (−1)^m.
 * 1/|R−s| = Σ conj(Υ_n^m(s)) Θ_n^m(R); ∂_z Θ_n^m = −Θ_{n+1}^m, (∂_x + i∂_y) Θ_n^m = −Θ_{n+1}^{m+1}.
 * Stored for m ≥ 0, real and imaginary parts in turn.
 */
final class Moments {
    private static final int CHUNK = 256;

    private Moments() {
    }

    /** Place of (n, m), m ≥ 0, among complex numbers. */
    static int index(int n, int m) {
        return n * (n + 1) / 2 + m;
    }

    static int length(int degree) {
        return (degree + 1) * (degree + 2);
    }

    /** Scratch of {@link #add}; one thread. */
    static final class Scratch {
        final double[] x = new double[CHUNK];
        final double[] y = new double[CHUNK];
        final double[] z = new double[CHUNK];
        final double[] square = new double[CHUNK];
        final double[][] re = new double[4][CHUNK];
        final double[][] im = new double[4][CHUNK];
        final double[] fold = new double[64];
    }

    /** Adds the moments of charges [from, to) about (cx, cy, cz) in units of a. */
    static void add(double[] sx, double[] sy, double[] sz, double[] q, int from, int to, double cx, double cy, double cz, double a, int degree,
        double[] moments, Scratch s) {
        for (int first = from; first < to; first += CHUNK) {
            int n = Math.min(CHUNK, to - first);
            double[] re = s.re[0];
            double[] im = s.im[0];
            java.util.Arrays.fill(im, 0);
            for (int i = 0; i < CHUNK; i++) {
                boolean own = i < n;
                s.x[i] = own ? (sx[first + i] - cx) / a : 0;
                s.y[i] = own ? (sy[first + i] - cy) / a : 0;
                s.z[i] = own ? (sz[first + i] - cz) / a : 0;
                re[i] = own ? q[first + i] : 0;
            }
            squares(s.x, s.y, s.z, s.square);
            chunk(degree, moments, s);
        }
    }

    private static void squares(double[] x, double[] y, double[] z, double[] square) {
        for (int i = 0; i < CHUNK; i++) {
            square[i] = x[i] * x[i] + y[i] * y[i] + z[i] * z[i];
        }
    }

    /** Columns of equal m, upwards in n; slot 0 holds Υ_m^m, slots 1 to 3 turn about. */
    private static void chunk(int degree, double[] moments, Scratch s) {
        for (int m = 0; m <= degree; m++) {
            if (m > 0) {
                diagonal(0.5 / m, s.x, s.y, s.re[0], s.im[0]);
            }
            sum(moments, m, m, s.re[0], s.im[0], s.fold);
            int below = 0;
            int last = 0;
            for (int n = m + 1; n <= degree; n++) {
                int next = 1 + n % 3;
                double c = 1.0 / ((double) n * n - (double) m * m);
                if (n == m + 1) {
                    recur((2 * n - 1) * c, 0, s.z, s.square, s.re[last], s.im[last], s.re[last], s.im[last], s.re[next], s.im[next]);
                } else {
                    recur((2 * n - 1) * c, c, s.z, s.square, s.re[last], s.im[last], s.re[below], s.im[below], s.re[next], s.im[next]);
                }
                sum(moments, n, m, s.re[next], s.im[next], s.fold);
                below = last;
                last = next;
            }
        }
    }

    private static void diagonal(double c, double[] x, double[] y, double[] re, double[] im) {
        for (int i = 0; i < CHUNK; i++) {
            double u = c * (x[i] * re[i] - y[i] * im[i]);
            im[i] = c * (x[i] * im[i] + y[i] * re[i]);
            re[i] = u;
        }
    }

    private static void recur(double a, double b, double[] z, double[] square, double[] re1, double[] im1, double[] re0, double[] im0,
        double[] re, double[] im) {
        for (int i = 0; i < CHUNK; i++) {
            double s = a * z[i];
            double t = b * square[i];
            re[i] = s * re1[i] - t * re0[i];
            im[i] = s * im1[i] - t * im0[i];
        }
    }

    private static void sum(double[] moments, int n, int m, double[] re, double[] im, double[] fold) {
        int k = 2 * index(n, m);
        moments[k] += total(re, fold);
        if (m > 0) {
            moments[k + 1] += total(im, fold);
        }
    }

    private static double total(double[] a, double[] fold) {
        for (int i = 0; i < 64; i++) {
            fold[i] = a[i] + a[i + 64] + (a[i + 128] + a[i + 192]);
        }
        for (int i = 0; i < 16; i++) {
            fold[i] = fold[i] + fold[i + 16] + (fold[i + 32] + fold[i + 48]);
        }
        double sum = 0;
        for (int i = 0; i < 16; i++) {
            sum += fold[i];
        }
        return sum;
    }

    /**
     * Adds moments counted from a centre that lies (dx, dy, dz) away, in units of its radius {@code ratio} (both in units of the new radius):
     * Υ_n^m(s + d) = Σ Υ_k^l(d) Υ_{n−k}^{m−l}(s). Exact.
     */
    static void addMoved(double[] from, double ratio, double dx, double dy, double dz, int degree, double[] to) {
        double[] shift = new double[length(degree)];
        regular(dx, dy, dz, degree, shift);
        double[] a = full(shift, 1, degree);
        double[] b = full(from, ratio, degree);
        for (int n = 0; n <= degree; n++) {
            int out = 2 * index(n, 0);
            for (int k = 0; k <= n; k++) {
                int j = n - k;
                for (int l = -k; l <= k; l++) {
                    int ia = 2 * (k * k + k + l);
                    double u = a[ia];
                    double v = a[ia + 1];
                    int start = Math.max(0, l - j);
                    int end = Math.min(n, l + j);
                    int ib = 2 * (j * j + j - l);
                    for (int m = start; m <= end; m++) {
                        double p = b[ib + 2 * m];
                        double q = b[ib + 2 * m + 1];
                        to[out + 2 * m] += u * p - v * q;
                        to[out + 2 * m + 1] += u * q + v * p;
                    }
                }
            }
        }
    }

    /** All orders −n … n, degree n times ratio^n. */
    static double[] full(double[] half, double ratio, int degree) {
        double[] all = new double[2 * (degree + 1) * (degree + 1)];
        double scale = 1;
        for (int n = 0; n <= degree; n++) {
            for (int m = 0; m <= n; m++) {
                double re = scale * half[2 * index(n, m)];
                double im = scale * half[2 * index(n, m) + 1];
                int plus = 2 * (n * n + n + m);
                int minus = 2 * (n * n + n - m);
                double sign = (m & 1) == 0 ? 1 : -1;
                all[minus] = sign * re;
                all[minus + 1] = -sign * im;
                all[plus] = re;
                all[plus + 1] = im;
            }
            scale *= ratio;
        }
        return all;
    }

    /** Υ_n^m of one place. */
    static void regular(double x, double y, double z, int degree, double[] out) {
        double square = x * x + y * y + z * z;
        out[0] = 1;
        for (int m = 0; m <= degree; m++) {
            int d = 2 * index(m, m);
            if (m > 0) {
                int p = 2 * index(m - 1, m - 1);
                out[d] = (x * out[p] - y * out[p + 1]) / (2 * m);
                out[d + 1] = (x * out[p + 1] + y * out[p]) / (2 * m);
            }
            for (int n = m + 1; n <= degree; n++) {
                double c = 1.0 / ((double) n * n - (double) m * m);
                int k = 2 * index(n, m);
                int k1 = 2 * index(n - 1, m);
                for (int part = 0; part < 2; part++) {
                    double below = n - 2 >= m ? out[2 * index(n - 2, m) + part] : 0;
                    out[k + part] = c * ((2 * n - 1) * z * out[k1 + part] - square * below);
                }
            }
        }
    }

    /**
     * Bounds of each degree: |V_n| ≤ S_n t^{n+1}/a and |E_n| ≤ (n+1) S_n t^{n+2}/a² at a distance a/t, by Cauchy and Schwarz:
     * S_n² = Σ_m (n−m)! (n+m)! |M_n^m|².
     */
    static void norms(double[] moments, int degree, double[] norms, int at) {
        double factorial = 1;       // (n!)², then (n−m)!(n+m)! from m to m + 1 by (n+m+1)/(n−m)
        for (int n = 0; n <= degree; n++) {
            factorial *= n == 0 ? 1 : (double) n * n;
            double weight = factorial;
            double sum = 0;
            for (int m = 0; m <= n; m++) {
                int k = 2 * index(n, m);
                sum += (m == 0 ? 1 : 2) * weight * (moments[k] * moments[k] + moments[k + 1] * moments[k + 1]);
                weight *= (n + m + 1.0) / (n - m);
            }
            norms[at + n] = Math.sqrt(sum);
        }
    }
}
