package fieldwright.formula.special;

import java.util.function.ToDoubleFunction;

/**
 * Incomplete elliptic integrals of amplitude phi and parameter m, for every phi where m sin² < 1 along the way.
 * Source: DLMF 19.25.5, 19.25.9, 19.25.14; beyond a quarter period by 19.2.10.
 */
public final class IncompleteElliptic {
    private IncompleteElliptic() {
    }

    /** F(phi, m). */
    public static double firstKindOfParameter(double phi, double m) {
        return periodic(phi, m, 0, p -> {
            double s = Math.sin(p);
            double c = Math.cos(p);
            return s * Carlson.rf(c * c, delta(m, s, c), 1);
        });
    }

    /** E(phi, m). */
    public static double secondKindOfParameter(double phi, double m) {
        return periodic(phi, m, 1, p -> {
            double s = Math.sin(p);
            double c = Math.cos(p);
            double d = delta(m, s, c);
            return s * Carlson.rf(c * c, d, 1) - m / 3 * s * s * s * Carlson.rd(c * c, d, 1);
        });
    }

    /** Π(n, phi, m); NaN where 1 - n sin² is not positive along the way. */
    public static double thirdKindOfParameter(double n, double phi, double m) {
        ToDoubleFunction<Double> quarter = p -> {
            double s = Math.sin(p);
            double c = Math.cos(p);
            double d = delta(m, s, c);
            return s * Carlson.rf(c * c, d, 1) + n / 3 * s * s * s * Carlson.rj(c * c, d, 1, 1 - n * s * s);
        };
        double turns = Math.rint(phi / Math.PI);
        return turns == 0 ? quarter.applyAsDouble(phi)
            : 2 * turns * CompleteElliptic.thirdKindOfParameter(n, m) + quarter.applyAsDouble(remainder(phi, turns));
    }

    private static double periodic(double phi, double m, int kind, ToDoubleFunction<Double> quarter) {
        double turns = Math.rint(phi / Math.PI);
        if (turns == 0) {
            return quarter.applyAsDouble(phi);
        }
        double complete = kind == 0 ? CompleteElliptic.firstKindOfParameter(m) : CompleteElliptic.secondKindOfParameter(m);
        return 2 * turns * complete + quarter.applyAsDouble(remainder(phi, turns));
    }

    /** phi - turns*pi with pi in two parts. */
    private static double remainder(double phi, double turns) {
        return phi - turns * Math.PI - turns * 1.2246467991473532e-16;
    }

    /** 1 - m sin² without cancellation near m = 1. */
    private static double delta(double m, double s, double c) {
        return c * c + (1 - m) * s * s;
    }
}
