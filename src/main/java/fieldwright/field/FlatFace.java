package fieldwright.field;

import fieldwright.formula.Polynomial;

/**
 * A flat charged surface, or a flat face of a charged volume, seen from a place off its plane. The density is a polynomial, so along
 * rays in the plane from the foot of the place the integrals of t^k/(t² + h²)^{3/2} and t^k/(t² + h²)^{1/2} are closed, and what is
 * left of the surface integral runs once round its edge.
 */
final class FlatFace {
    /** Unit normal and two unit vectors in the plane, right-handed. */
    final double[] normal;
    final double[] e1;
    final double[] e2;
    /** Plane over place along the normal, m. */
    final double height;
    final int degree;
    /** Density in the plane about the foot: coefficient of u^(m−j) v^j at m(m+1)/2 + j; for field and for potential. */
    final double[] forField;
    final double[] forPotential;
    /** A length of the size of the face, m. */
    private final double size;

    final boolean isSurface;

    private FlatFace(boolean isSurface, double[] normal, double height, int degree, double[] forField, double[] forPotential, double[][] plane, double size) {
        this.isSurface = isSurface;
        this.size = size;
        this.normal = normal;
        e1 = plane[0];
        e2 = plane[1];
        this.height = height;
        this.degree = degree;
        this.forField = forField;
        this.forPotential = forPotential;
    }

    /** Of a charged surface; {@code height} is the plane's over the place, along {@code normal}. */
    static FlatFace surface(Polynomial density, double[] place, double[] normal, double height, double size) {
        double[] about = new double[Polynomial.count(density.degree())];
        density.about(place, about);
        double[][] plane = plane(normal);
        double[] q = inPlane(about, density.degree(), normal, plane, height);
        return new FlatFace(true, normal, height, density.degree(), q, q, plane, size);
    }

    /**
     * Of a charged volume, {@code normal} outward: with the integral along rays from the place done first,
     * E = −∮ dA (n·d) d/|d|³ ∫₀¹ ρ(place + t d) dt and V = ∮ dA (n·d)/|d| ∫₀¹ ρ t dt.
     */
    static FlatFace ofVolume(Polynomial density, double[] place, double[] normal, double height, double size) {
        int degree = density.degree();
        double[] about = new double[Polynomial.count(degree)];
        double[][] plane = plane(normal);
        double[][] q = new double[2][];
        for (int t = 0; t < 2; t++) {
            density.about(place, about);
            for (int m = 0; m <= degree; m++) {
                for (int n = m == 0 ? 0 : Polynomial.count(m - 1); n < Polynomial.count(m); n++) {
                    about[n] *= height / (m + 1 + t);
                }
            }
            q[t] = inPlane(about, degree, normal, plane, height);
        }
        return new FlatFace(false, normal, height, degree, q[0], q[1], plane, size);
    }

    private static double[][] plane(double[] n) {
        for (int a = 0; a < 3; a++) {
            if (Math.abs(n[a]) == 1) {
                double[] e1 = new double[3];
                double[] e2 = new double[3];
                e1[(a + 1) % 3] = 1;
                e2[(a + 2) % 3] = n[a];
                return new double[][] {e1, e2};
            }
        }
        int least = Math.abs(n[0]) <= Math.abs(n[1]) && Math.abs(n[0]) <= Math.abs(n[2]) ? 0 : Math.abs(n[1]) <= Math.abs(n[2]) ? 1 : 2;
        double[] axis = new double[3];
        axis[least] = 1;
        double[] e1 = cross(axis, n);
        double size = Math.sqrt(e1[0] * e1[0] + e1[1] * e1[1] + e1[2] * e1[2]);
        for (int a = 0; a < 3; a++) {
            e1[a] /= size;
        }
        return new double[][] {e1, cross(n, e1)};
    }

    private static double[] cross(double[] a, double[] b) {
        return new double[] {a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]};
    }

    /** A polynomial in d, on the plane d = h n + u e1 + v e2, by its homogeneous parts in u and v. */
    private static double[] inPlane(double[] c, int degree, double[] n, double[][] plane, double h) {
        int size = (degree + 1) * (degree + 2) / 2;
        double[] out = new double[size];
        for (int a = 0; a < 3; a++) {
            if (Math.abs(n[a]) == 1) {
                acrossAxis(c, degree, a, n[a], h, out);
                return out;
            }
        }
        double[][][] powers = new double[3][degree + 1][];
        for (int a = 0; a < 3; a++) {
            powers[a][0] = new double[] {1};
            for (int p = 1; p <= degree; p++) {
                powers[a][p] = times(powers[a][p - 1], p - 1, new double[] {h * n[a], plane[0][a], plane[1][a]}, 1);
            }
        }
        for (int i = 0; i <= degree; i++) {
            for (int j = 0; i + j <= degree; j++) {
                double[] xy = null;
                for (int k = 0; i + j + k <= degree; k++) {
                    double f = c[Polynomial.index(i, j, k)];
                    if (f == 0) {
                        continue;
                    }
                    xy = xy == null ? times(powers[0][i], i, powers[1][j], j) : xy;
                    double[] all = k == 0 ? xy : times(xy, i + j, powers[2][k], k);
                    for (int m = 0; m < all.length; m++) {
                        out[m] += f * all[m];
                    }
                }
            }
        }
        return out;
    }

    /** As above for a plane across axis a: u is the next coordinate, v the one after it, turned with the normal. */
    private static void acrossAxis(double[] c, int degree, int a, double sign, double h, double[] out) {
        int[] e = new int[3];
        for (int i = 0; i <= degree; i++) {
            for (int j = 0; i + j <= degree; j++) {
                e[(a + 1) % 3] = i;
                e[(a + 2) % 3] = j;
                double sum = 0;
                for (int k = degree - i - j; k >= 0; k--) {
                    e[a] = k;
                    sum = sum * (h * sign) + c[Polynomial.index(e[0], e[1], e[2])];
                }
                out[(i + j) * (i + j + 1) / 2 + j] = j % 2 == 0 ? sum : sum * sign;
            }
        }
    }

    /** Product of two polynomials in u and v, of given total degrees. */
    private static double[] times(double[] a, int p, double[] b, int q) {
        double[] out = new double[(p + q + 1) * (p + q + 2) / 2];
        for (int m = 0; m <= p; m++) {
            for (int j = 0; j <= m; j++) {
                double f = a[m * (m + 1) / 2 + j];
                if (f == 0) {
                    continue;
                }
                for (int k = 0; k <= q; k++) {
                    for (int l = 0; l <= k; l++) {
                        out[(m + k) * (m + k + 1) / 2 + j + l] += f * b[k * (k + 1) / 2 + l];
                    }
                }
            }
        }
        return out;
    }

    /** {@link #radial(double, int, double[], double[])} at R; in the plane itself the finite part, which is all that counts off the edge. */
    void radial(double r, double[] a, double[] b) {
        int top = degree + 2;
        if (height != 0) {
            radial(r / Math.abs(height), top, a, b);
            return;
        }
        for (int k = 1; k <= top; k++) {
            b[k] = 1.0 / k;
        }
        if (a != null) {
            a[1] = 0;
            a[2] = r > 0 ? Math.log(r / size) : 0;
            for (int k = 3; k <= top; k++) {
                a[k] = 1.0 / (k - 2);
            }
        }
    }

    /**
     * Radial integrals over R from the foot, for x = R/|h|: {@code a[k]} = A_k/R^{k−2} with A_k = ∫₀ᴿ t^k (t² + h²)^{−3/2} dt,
     * k = 1 … top, or {@code b[k]} = B_k/R^k with B_k = ∫₀ᴿ t^k (t² + h²)^{−1/2} dt, k = 0 … top. Recurrences upward where x is
     * large enough, the binomial series below.
     */
    static void radial(double x, int top, double[] a, double[] b) {
        double square = x * x;
        if (x < (top > 5 ? 0.7 : 0.35)) {
            series(x, square, top, a, b);
            return;
        }
        double root = Math.sqrt(square + 1);
        double inverse = 1 / square;
        double slope = root / x;
        b[0] = Math.log(x + root);
        b[1] = x / (root + 1);
        for (int k = 2; k <= top; k++) {
            b[k] = (slope - (k - 1) * inverse * b[k - 2]) / k;
        }
        if (a != null) {
            a[1] = x * square / (root * (root + 1));
            a[2] = b[0] - x / root;
            for (int k = 3; k <= top; k++) {
                a[k] = b[k - 2] - inverse * a[k - 2];
            }
        }
    }

    private static void series(double x, double square, int top, double[] a, double[] b) {
        for (int k = 0; k <= top; k++) {
            double term = x;
            double sum = 0;
            for (int j = 0; j < 80; j++) {
                sum += term / (k + 1 + 2 * j);
                if (Math.abs(term) < 1e-18 * x) {
                    break;
                }
                term *= -(j + 0.5) / (j + 1) * square;
            }
            b[k] = sum;
            if (a != null && k > 0) {
                term = x * square;
                sum = 0;
                for (int j = 0; j < 80; j++) {
                    sum += term / (k + 1 + 2 * j);
                    if (Math.abs(term) < 1e-18 * x * square) {
                        break;
                    }
                    term *= -(j + 1.5) / (j + 1) * square;
                }
                a[k] = sum;
            }
        }
    }
}
