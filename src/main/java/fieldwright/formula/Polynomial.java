package fieldwright.formula;

import java.util.OptionalInt;
import java.util.Set;

/**
 * A polynomial in x, y, z about a centre: coefficients of ξ^i η^j ζ^k with ξ = x − centre and so on, densely up to a total degree.
 * rho and r may stand in a formula as long as only their even powers are left. Numbers in SI. Immutable.
 */
public final class Polynomial {
    /** Total degree a formula may have. */
    public static final int MOST = 12;

    private static final int[][][] INDEX = new int[MOST + 1][MOST + 1][MOST + 1];
    private static final int[][] EXPONENTS = new int[count(MOST)][3];

    static {
        int n = 0;
        for (int d = 0; d <= MOST; d++) {
            for (int i = d; i >= 0; i--) {
                for (int j = d - i; j >= 0; j--) {
                    INDEX[i][j][d - i - j] = n;
                    EXPONENTS[n++] = new int[] {i, j, d - i - j};
                }
            }
        }
    }

    private final int degree;
    private final double[] coefficients;
    private final double[] centre;

    private Polynomial(int degree, double[] coefficients, double[] centre) {
        this.degree = degree;
        this.coefficients = coefficients;
        this.centre = centre;
    }

    /** Number of coefficients up to a total degree. */
    public static int count(int degree) {
        return (degree + 1) * (degree + 2) * (degree + 3) / 6;
    }

    /** Place of the coefficient of ξ^i η^j ζ^k. */
    public static int index(int i, int j, int k) {
        return INDEX[i][j][k];
    }

    public int degree() {
        return degree;
    }

    public double coefficient(int index) {
        return coefficients[index];
    }

    /** The formula about a centre, or null when it is no polynomial in x, y, z of total degree {@link #MOST} or less. */
    public static Polynomial of(Formula f, double[] centre) {
        Set<String> names = f.variables();
        String radical = null;
        for (String name : names) {
            switch (name) {
                case "x", "y", "z" -> { }
                case "rho", "r" -> {
                    if (radical != null) {
                        return null;
                    }
                    radical = name;
                }
                default -> {
                    return null;
                }
            }
        }
        int degree = 0;
        for (String name : names) {
            OptionalInt d = f.degree(name);
            if (d.isEmpty()) {
                return null;
            }
            degree += d.getAsInt();
        }
        if (degree > MOST) {
            return null;
        }
        Expansion expansion = new Expansion(degree, centre, radical);
        double[][] value = expansion.of(f.tree());
        if (value == null || value[1] != null) {
            return null;
        }
        double[] c = value[0];
        return new Polynomial(degree, c, centre.clone());
    }

    /**
     * Coefficients about another point: f(p + d) as a polynomial in d, written to {@code out} (at least {@link #count} long).
     */
    public void about(double[] p, double[] out) {
        System.arraycopy(coefficients, 0, out, 0, coefficients.length);
        for (int axis = 0; axis < 3; axis++) {
            double step = p[axis] - centre[axis];
            if (step != 0) {
                shift(axis, step, out);
            }
        }
    }

    /** Horner's rule along one variable, for all powers of the others. */
    private void shift(int axis, double step, double[] c) {
        int[] e = new int[3];
        int one = (axis + 1) % 3;
        int two = (axis + 2) % 3;
        for (int p = 0; p <= degree; p++) {
            for (int q = 0; p + q <= degree; q++) {
                e[one] = p;
                e[two] = q;
                int top = degree - p - q;
                for (int low = 0; low < top; low++) {
                    for (int k = top - 1; k >= low; k--) {
                        e[axis] = k;
                        int here = INDEX[e[0]][e[1]][e[2]];
                        e[axis] = k + 1;
                        c[here] += step * c[INDEX[e[0]][e[1]][e[2]]];
                    }
                }
            }
        }
    }

    /** Value at a place. */
    public double at(double x, double y, double z) {
        double[] d = {x - centre[0], y - centre[1], z - centre[2]};
        double sum = 0;
        for (int n = coefficients.length - 1; n >= 0; n--) {
            if (coefficients[n] != 0) {
                int[] e = EXPONENTS[n];
                sum += coefficients[n] * power(d[0], e[0]) * power(d[1], e[1]) * power(d[2], e[2]);
            }
        }
        return sum;
    }

    private static double power(double x, int n) {
        double p = 1;
        for (int i = 0; i < n; i++) {
            p *= x;
        }
        return p;
    }

    /** Values P + s·Q of nodes, s = rho or r with s² a polynomial; a null part is zero. */
    private record Expansion(int degree, double[] centre, String radical) {
        double[][] of(Node n) {
            if (n instanceof Node.Name name) {
                return name(name.name());
            } else if (n instanceof Node.Negate m) {
                double[][] a = of(m.of());
                return a == null ? null : scaled(a, -1);
            } else if (n instanceof Node.Binary b) {
                return binary(b);
            } else if (n instanceof Node.Inlined f && f.condition() == null) {
                return of(f.body());
            }
            return Trees.free(n).isEmpty() ? constant(n) : null;
        }

        private double[][] constant(Node n) {
            double[] c = new double[count(degree)];
            c[0] = n instanceof Node.Known k ? k.amount().si() : n instanceof Node.Literal l ? l.value()
                : n instanceof Node.Measure m ? m.amount().si() : Compiler.compile(n, java.util.List.of(), "", null).at();
            return new double[][] {c, null};
        }

        private double[][] name(String name) {
            double[] c = new double[count(degree)];
            if (name.equals(radical)) {
                c[0] = 1;
                return new double[][] {null, c};
            }
            int axis = "xyz".indexOf(name);
            c[0] = centre[axis];
            c[1 + axis] = 1;
            return new double[][] {c, null};
        }

        private double[][] binary(Node.Binary b) {
            double[][] left = of(b.left());
            if (left == null) {
                return null;
            }
            if (b.operator() == Node.Operator.POWER) {
                return power(left, b.right());
            }
            double[][] right = of(b.right());
            if (right == null) {
                return null;
            }
            return switch (b.operator()) {
                case PLUS -> new double[][] {sum(left[0], right[0], 1), sum(left[1], right[1], 1)};
                case MINUS -> new double[][] {sum(left[0], right[0], -1), sum(left[1], right[1], -1)};
                case TIMES -> product(left, right);
                default -> isConstant(right) ? scaled(left, 1 / right[0][0]) : null;
            };
        }

        private static boolean isConstant(double[][] a) {
            if (a[1] != null || a[0] == null) {
                return false;
            }
            for (int i = 1; i < a[0].length; i++) {
                if (a[0][i] != 0) {
                    return false;
                }
            }
            return true;
        }

        private double[][] power(double[][] base, Node exponent) {
            if (!Trees.free(exponent).isEmpty()) {
                return null;
            }
            double p = constant(exponent)[0][0];
            if (p < 0 || p != Math.rint(p) || p > MOST) {
                return isConstant(base) ? new double[][] {scaledOne(Math.pow(base[0][0], p)), null} : null;
            }
            double[][] result = {scaledOne(1), null};
            for (int i = 0; i < p && result != null; i++) {
                result = product(result, base);
            }
            return result;
        }

        private double[] scaledOne(double value) {
            double[] c = new double[count(degree)];
            c[0] = value;
            return c;
        }

        private double[][] product(double[][] a, double[][] b) {
            double[] plain = times(a[0], b[0]);
            if (a[1] != null && b[1] != null) {
                plain = sum(plain, times(times(a[1], b[1]), square()), 1);
            }
            return new double[][] {plain, sum(times(a[0], b[1]), times(a[1], b[0]), 1)};
        }

        /** rho² or r². */
        private double[] square() {
            double[] total = null;
            for (int axis = 0; axis < (radical.equals("rho") ? 2 : 3); axis++) {
                double[] one = name("xyz".substring(axis, axis + 1))[0];
                total = sum(total, times(one, one), 1);
            }
            return total;
        }

        private static double[][] scaled(double[][] a, double factor) {
            double[][] out = new double[2][];
            for (int p = 0; p < 2; p++) {
                if (a[p] != null) {
                    out[p] = a[p].clone();
                    for (int i = 0; i < out[p].length; i++) {
                        out[p][i] *= factor;
                    }
                }
            }
            return out;
        }

        private static double[] sum(double[] a, double[] b, double sign) {
            if (b == null) {
                return a;
            }
            double[] out = a == null ? new double[b.length] : a.clone();
            for (int i = 0; i < out.length; i++) {
                out[i] += sign * b[i];
            }
            return out;
        }

        private double[] times(double[] a, double[] b) {
            if (a == null || b == null) {
                return null;
            }
            double[] out = new double[a.length];
            for (int m = 0; m < a.length; m++) {
                if (a[m] == 0) {
                    continue;
                }
                int[] e = EXPONENTS[m];
                int left = degree - e[0] - e[1] - e[2];
                for (int n = 0; n < count(left); n++) {
                    if (b[n] != 0) {
                        int[] g = EXPONENTS[n];
                        out[INDEX[e[0] + g[0]][e[1] + g[1]][e[2] + g[2]]] += a[m] * b[n];
                    }
                }
            }
            return out;
        }
    }
}
