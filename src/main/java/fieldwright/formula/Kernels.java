package fieldwright.formula;

import fieldwright.formula.Program.Kernel;
import fieldwright.quantity.Stop;

/**
 * The block operations. Each is one short loop in a method of its own, so that the compiler of the JVM vectorises it.
 * Conditions are 1 and 0; NaN where a side is not a number, so that it reaches the result.
 */
final class Kernels {
    static final Kernel NEGATE = (r, s, o, n) -> negate(r[s[0]], o, n);
    static final Kernel PLUS = (r, s, o, n) -> plus(r[s[0]], r[s[1]], o, n);
    static final Kernel MINUS = (r, s, o, n) -> minus(r[s[0]], r[s[1]], o, n);
    static final Kernel TIMES = (r, s, o, n) -> times(r[s[0]], r[s[1]], o, n);
    static final Kernel OVER = (r, s, o, n) -> over(r[s[0]], r[s[1]], o, n);
    static final Kernel POWER = (r, s, o, n) -> power(r[s[0]], r[s[1]], o, n);
    static final Kernel LESS = (r, s, o, n) -> less(r[s[0]], r[s[1]], o, n);
    static final Kernel LESS_OR_EQUAL = (r, s, o, n) -> lessOrEqual(r[s[0]], r[s[1]], o, n);
    static final Kernel CHOOSE = (r, s, o, n) -> choose(r[s[0]], r[s[1]], r[s[2]], o, n);
    private static final Kernel SQRT = (r, s, o, n) -> sqrt(r[s[0]], o, n);
    private static final Kernel ABS = (r, s, o, n) -> abs(r[s[0]], o, n);
    private static final Kernel EXP = (r, s, o, n) -> exp(r[s[0]], o, n);
    private static final Kernel LN = (r, s, o, n) -> ln(r[s[0]], o, n);
    private static final Kernel SIN = (r, s, o, n) -> BlockTrig.sin(r[s[0]], o, n);
    private static final Kernel COS = (r, s, o, n) -> BlockTrig.cos(r[s[0]], o, n);
    private static final Kernel MIN = (r, s, o, n) -> min(r[s[0]], r[s[1]], o, n);
    private static final Kernel MAX = (r, s, o, n) -> max(r[s[0]], r[s[1]], o, n);

    private Kernels() {
    }

    static Kernel of(Function f) {
        return switch (f) {
            case SQRT -> SQRT;
            case ABS -> ABS;
            case EXP -> EXP;
            case LN -> LN;
            case SIN -> SIN;
            case COS -> COS;
            case MIN -> MIN;
            case MAX -> MAX;
            default -> any(f);
        };
    }

    private static Kernel any(Function f) {
        return (r, s, o, n) -> {
            double[] a = new double[s.length];
            for (int i = 0; i < n; i++) {
                for (int k = 0; k < a.length; k++) {
                    a[k] = r[s[k]][i];
                }
                o[i] = f.value(a);
            }
        };
    }

    /** A kernel that must not be worked while compiling and must not write over its operands. */
    static Kernel notFolded(Kernel k) {
        return new Kernel() {
            @Override
            public void run(double[][] registers, int[] operands, double[] out, int n) {
                k.run(registers, operands, out, n);
            }

            @Override
            public boolean elementwise() {
                return false;
            }
        };
    }

    /** Operands: the condition, then all arguments. Each program sees only its own nodes. */
    static Kernel chooseWhereNeeded(Program yes, Program no) {
        return notFolded((r, s, o, n) -> {
            part(yes, 1, r, s, o, n);
            part(no, 0, r, s, o, n);
            for (int i = 0; i < n; i++) {
                if (Double.isNaN(r[s[0]][i])) {
                    o[i] = Double.NaN;
                }
            }
        });
    }

    private static void part(Program f, double answer, double[][] r, int[] s, double[] o, int n) {
        int[] nodes = new int[n];
        int count = 0;
        for (int i = 0; i < n; i++) {
            if (r[s[0]][i] == answer) {
                nodes[count++] = i;
            }
        }
        if (count == 0) {
            return;
        }
        double[][] packed = new double[s.length - 1][count];
        for (int a = 0; a < packed.length; a++) {
            for (int k = 0; k < count; k++) {
                packed[a][k] = r[s[a + 1]][nodes[k]];
            }
        }
        double[] values = new double[count];
        f.evaluate(packed, count, values);
        for (int k = 0; k < count; k++) {
            o[nodes[k]] = values[k];
        }
    }

    /** Operands: the outer variables. NaN where it did not converge, so that whoever uses it sees that. */
    static Kernel integral(IntegralCode code, Integrator integrator) {
        return notFolded((r, s, o, n) -> {
            double[] outer = new double[s.length];
            for (int i = 0; i < n; i++) {
                if (i > 0 && s.length == 0) {   // the same for all nodes
                    o[i] = o[0];
                    continue;
                }
                Stop.check();
                for (int k = 0; k < outer.length; k++) {
                    outer[k] = r[s[k]][i];
                }
                Integrator.Estimate e = integrator.integrate(code.at(outer));
                o[i] = e.standing().isConverged() ? e.value() : Double.NaN;
            }
        });
    }

    private static void negate(double[] a, double[] o, int n) {
        for (int i = 0; i < n; i++) {
            o[i] = -a[i];
        }
    }

    private static void plus(double[] a, double[] b, double[] o, int n) {
        for (int i = 0; i < n; i++) {
            o[i] = a[i] + b[i];
        }
    }

    private static void minus(double[] a, double[] b, double[] o, int n) {
        for (int i = 0; i < n; i++) {
            o[i] = a[i] - b[i];
        }
    }

    private static void times(double[] a, double[] b, double[] o, int n) {
        for (int i = 0; i < n; i++) {
            o[i] = a[i] * b[i];
        }
    }

    private static void over(double[] a, double[] b, double[] o, int n) {
        for (int i = 0; i < n; i++) {
            o[i] = a[i] / b[i];
        }
    }

    private static void power(double[] a, double[] b, double[] o, int n) {
        for (int i = 0; i < n; i++) {
            o[i] = Math.pow(a[i], b[i]);
        }
    }

    private static void less(double[] a, double[] b, double[] o, int n) {
        for (int i = 0; i < n; i++) {
            o[i] = a[i] < b[i] ? 1 : a[i] >= b[i] ? 0 : Double.NaN;
        }
    }

    private static void lessOrEqual(double[] a, double[] b, double[] o, int n) {
        for (int i = 0; i < n; i++) {
            o[i] = a[i] <= b[i] ? 1 : a[i] > b[i] ? 0 : Double.NaN;
        }
    }

    private static void choose(double[] c, double[] yes, double[] no, double[] o, int n) {
        for (int i = 0; i < n; i++) {
            o[i] = c[i] == 1 ? yes[i] : c[i] == 0 ? no[i] : Double.NaN;
        }
    }

    private static void sqrt(double[] a, double[] o, int n) {
        for (int i = 0; i < n; i++) {
            o[i] = Math.sqrt(a[i]);
        }
    }

    private static void abs(double[] a, double[] o, int n) {
        for (int i = 0; i < n; i++) {
            o[i] = Math.abs(a[i]);
        }
    }

    private static void exp(double[] a, double[] o, int n) {
        for (int i = 0; i < n; i++) {
            o[i] = Math.exp(a[i]);
        }
    }

    private static void ln(double[] a, double[] o, int n) {
        for (int i = 0; i < n; i++) {
            o[i] = Math.log(a[i]);
        }
    }

    private static void min(double[] a, double[] b, double[] o, int n) {
        for (int i = 0; i < n; i++) {
            o[i] = Math.min(a[i], b[i]);
        }
    }

    private static void max(double[] a, double[] b, double[] o, int n) {
        for (int i = 0; i < n; i++) {
            o[i] = Math.max(a[i], b[i]);
        }
    }
}
