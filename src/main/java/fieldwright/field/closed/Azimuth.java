package fieldwright.field.closed;

import java.util.function.DoubleUnaryOperator;

/**
 * Integral over the half azimuth θ from 0 to pi/2 of a function of sin²θ whose distance function kappa² + sin²θ may nearly
 * vanish at θ = 0: there sin θ = kappa sinh u, which moves the singularities to pi/2 from the axis of u (sinh transform; Johnston
 * and Elliott, Int. J. Numer. Meth. Engng 62 (2005) 564), then Gauss panels. About 1e-15 relative for a positive function with at
 * most a logarithm at θ = 0.
 */
final class Azimuth {
    private static final GaussRule RULE = GaussRule.of(24);
    private static final double PANEL = 2;
    private static final double LEAST = 1e-18; // what lies nearer than this adds nothing, even with a logarithm

    private Azimuth() {
    }

    static double integral(double kappa, DoubleUnaryOperator ofSineSquare) {
        if (!(kappa < 2)) {
            return plain(0, Math.PI / 4, ofSineSquare) + plain(Math.PI / 4, Math.PI / 2, ofSineSquare);
        }
        double k = Math.max(kappa, LEAST);
        double t = 0.5 / k;
        double end = Math.log(t + Math.sqrt(t * t + 1)); // sin θ = 1/2
        int panels = (int) Math.ceil(end / PANEL);
        double sum = plain(Math.PI / 6, Math.PI / 2, ofSineSquare);
        for (int i = 0; i < panels; i++) {
            sum += stretched(k, end * i / panels, end * (i + 1) / panels, ofSineSquare);
        }
        return sum;
    }

    private static double plain(double from, double to, DoubleUnaryOperator f) {
        double half = 0.5 * (to - from);
        double sum = 0;
        for (int i = 0; i < RULE.nodes().length; i++) {
            double sine = Math.sin(0.5 * (from + to) + half * RULE.nodes()[i]);
            sum += RULE.weights()[i] * f.applyAsDouble(sine * sine);
        }
        return half * sum;
    }

    private static double stretched(double k, double from, double to, DoubleUnaryOperator f) {
        double half = 0.5 * (to - from);
        double sum = 0;
        for (int i = 0; i < RULE.nodes().length; i++) {
            double u = 0.5 * (from + to) + half * RULE.nodes()[i];
            double sine = k * Math.sinh(u);
            double square = sine * sine;
            sum += RULE.weights()[i] * f.applyAsDouble(square) * Math.sqrt((k * k + square) / (1 - square));
        }
        return half * sum;
    }
}
