package fieldwright.field.tree;

import java.util.List;

/**
 * The field of far clusters about the centre of a box of targets: V = Σ conj(Υ_k^l(x)) L_k^l, x in units of the box's radius. From
 * moments L_k^l = (−1)^k Σ conj(M_n^m) Θ_{n+k}^{m+l} (Greengard and Rokhlin, J. Comput. Phys. 73, 325, 1987, in the harmonics of
 * {@link Moments}), for a block of clusters at once. Scratch space; one thread.
 */
final class LocalField {
    private static final int LANES = PointKernel.BLOCK;

    private final int degree;
    private final double[][] momentRe;
    private final double[][] momentIm;
    private final double[][] thetaRe;
    private final double[][] thetaIm;
    private final double[] x = new double[LANES];
    private final double[] y = new double[LANES];
    private final double[] z = new double[LANES];
    private final double[] one = new double[LANES];
    private final double[] fall = new double[LANES];
    private final double[] weight = new double[LANES];
    private final double[] sumRe = new double[LANES];
    private final double[] sumIm = new double[LANES];

    /** @param degree the highest of any expansion */
    LocalField(int degree) {
        this.degree = degree;
        momentRe = new double[Moments.length(degree) / 2][LANES];
        momentIm = new double[Moments.length(degree) / 2][LANES];
        thetaRe = new double[Moments.length(2 * degree) / 2][LANES];
        thetaIm = new double[Moments.length(2 * degree) / 2][LANES];
        java.util.Arrays.fill(one, 1);
    }

    /** Adds up to LANES clusters, by their moments up to a degree, to the expansion about (cx, cy, cz) with radius b. */
    void add(List<ClusterTree.Cluster> clusters, ClusterTree tree, int p, double cx, double cy, double cz, double b, double[] local) {
        int stride = Moments.length(tree.degree);
        for (int i = 0; i < LANES; i++) {
            ClusterTree.Cluster c = clusters.get(Math.min(i, clusters.size() - 1));
            double dx = cx - c.x;
            double dy = cy - c.y;
            double dz = cz - c.z;
            double distance = Math.sqrt(dx * dx + dy * dy + dz * dz);
            x[i] = dx / distance;
            y[i] = dy / distance;
            z[i] = dz / distance;
            fall[i] = -b / distance;
            weight[i] = i < clusters.size() ? 1 / distance : 0;
            double scale = 1;
            for (int n = 0; n <= p; n++) {
                for (int m = 0; m <= n; m++) {
                    int k = Moments.index(n, m);
                    momentRe[k][i] = scale * tree.moments[c.number * stride + 2 * k];
                    momentIm[k][i] = scale * tree.moments[c.number * stride + 2 * k + 1];
                }
                scale *= c.radius / distance;
            }
        }
        irregular(2 * p);
        for (int k = 0; k <= p; k++) {
            for (int l = 0; l <= k; l++) {
                sum(p, k, l);
                int at = 2 * Moments.index(k, l);
                for (int i = 0; i < LANES; i++) {
                    local[at] += weight[i] * sumRe[i];
                    local[at + 1] += weight[i] * sumIm[i];
                }
            }
            for (int i = 0; i < LANES; i++) {
                weight[i] *= fall[i];
            }
        }
    }

    /** Θ at unit distance. */
    private void irregular(int top) {
        java.util.Arrays.fill(thetaRe[0], 1);
        java.util.Arrays.fill(thetaIm[0], 0);
        for (int m = 0; m <= top; m++) {
            int d = Moments.index(m, m);
            if (m > 0) {
                int before = Moments.index(m - 1, m - 1);
                System.arraycopy(thetaRe[before], 0, thetaRe[d], 0, LANES);
                System.arraycopy(thetaIm[before], 0, thetaIm[d], 0, LANES);
                FarField.turn(2 * m - 1, x, y, thetaRe[d], thetaIm[d]);
            }
            for (int n = m + 1; n <= top; n++) {
                int k1 = Moments.index(n - 1, m);
                int k0 = n == m + 1 ? k1 : Moments.index(n - 2, m);
                int k = Moments.index(n, m);
                double factor = n == m + 1 ? 0 : (double) (n - 1) * (n - 1) - (double) m * m;
                FarField.recur(2 * n - 1, factor, z, one, thetaRe[k1], thetaIm[k1], thetaRe[k0], thetaIm[k0], thetaRe[k], thetaIm[k]);
            }
        }
    }

    private void sum(int p, int k, int l) {
        java.util.Arrays.fill(sumRe, 0);
        java.util.Arrays.fill(sumIm, 0);
        for (int n = 0; n <= p; n++) {
            for (int m = -n; m <= n; m++) {
                int order = m + l;
                double ofM = m < 0 && (m & 1) != 0 ? -1 : 1;
                double ofTheta = order < 0 && (order & 1) != 0 ? -1 : 1;
                double both = ofM * ofTheta;
                double im = m < 0 ? -both : both;
                double iv = order < 0 ? -both : both;
                double imv = m < 0 ? -iv : iv;
                int a = Moments.index(n, Math.abs(m));
                int t = Moments.index(n + k, Math.abs(order));
                product(both, imv, iv, -im, momentRe[a], momentIm[a], thetaRe[t], thetaIm[t], sumRe, sumIm);
            }
        }
    }

    private static void product(double c1, double c2, double c3, double c4, double[] a, double[] b, double[] u, double[] v, double[] re,
        double[] im) {
        for (int i = 0; i < LANES; i++) {
            re[i] += c1 * a[i] * u[i] + c2 * b[i] * v[i];
            im[i] += c3 * a[i] * v[i] + c4 * b[i] * u[i];
        }
    }

    /**
     * The same expansion about a centre (dx, dy, dz) away, in units of a radius {@code ratio} (both in units of the old radius):
     * L_k^l = Σ conj(Υ_{n−k}^{m−l}(d)) L_n^m. Exact.
     */
    double[] moved(double[] local, double dx, double dy, double dz, double ratio) {
        double[] shift = new double[Moments.length(degree)];
        Moments.regular(dx, dy, dz, degree, shift);
        double[] d = Moments.full(shift, 1, degree);
        double[] from = Moments.full(local, 1, degree);
        double[] to = new double[local.length];
        double scale = 1;
        for (int k = 0; k <= degree; k++) {
            for (int l = 0; l <= k; l++) {
                double re = 0;
                double im = 0;
                for (int n = k; n <= degree; n++) {
                    int j = n - k;
                    int first = Math.max(-n, l - j);
                    int last = Math.min(n, l + j);
                    for (int m = first; m <= last; m++) {
                        int a = 2 * (j * j + j + m - l);
                        int f = 2 * (n * n + n + m);
                        re += d[a] * from[f] + d[a + 1] * from[f + 1];
                        im += d[a] * from[f + 1] - d[a + 1] * from[f];
                    }
                }
                int at = 2 * Moments.index(k, l);
                to[at] = scale * re;
                to[at + 1] = scale * im;
            }
            scale *= ratio;
        }
        return to;
    }
}
