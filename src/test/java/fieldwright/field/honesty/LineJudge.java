package fieldwright.field.honesty;

import java.math.BigDecimal;

/**
 * Field and potential of charge on a curve: the parameter is p₀ + L sinh w about the nearest point p₀, by tanh–sinh. The
 * offset of the place from that point is worked out to forty digits, differences along the curve in closed form.
 */
final class LineJudge {
    /** A curve with exact differences. */
    interface Curve {
        double speed(double p);

        BigDecimal[] exact(double p);

        /** Position at p + dp less position at p. */
        void step(double p, double dp, double[] out);
    }

    private final Curve curve;
    private final SmoothDensity density;
    private final double nearest;
    private final double scale;
    private final double[] start = new double[3];
    private final double[] off = new double[3];
    private final double[] step = new double[3];

    private LineJudge(Curve curve, SmoothDensity density, Exact.Position place, double nearest, double distance) {
        this.curve = curve;
        this.density = density;
        this.nearest = nearest;
        scale = Math.max(distance, Charged.LEAST) / curve.speed(nearest);
        BigDecimal[] exact = curve.exact(nearest);
        BigDecimal[] at = {place.x(), place.y(), place.z()};
        for (int c = 0; c < 3; c++) {
            start[c] = exact[c].doubleValue();
            off[c] = at[c].subtract(exact[c]).doubleValue();
        }
    }

    /** Pairs: limits of the parameter counted from {@code nearest}. */
    static Answer judge(Curve curve, SmoothDensity density, double[] pairs, Exact.Position place, double nearest, double distance,
            DoubleExponential.Setting setting) {
        LineJudge judge = new LineJudge(curve, density, place, nearest, distance);
        DoubleExponential rule = new DoubleExponential(setting);
        double[] value = new double[4];
        double[] magnitude = new double[4];
        for (int k = 0; k < pairs.length; k += 2) {
            double low = PlanarJudge.asinh(pairs[k] / judge.scale);
            double high = PlanarJudge.asinh(pairs[k + 1] / judge.scale);
            if (low < 0 && high > 0) {
                rule.add(judge::point, low, 0, value, magnitude);
                rule.add(judge::point, 0, high, value, magnitude);
            } else {
                rule.add(judge::point, low, high, value, magnitude);
            }
        }
        return new Answer(value, magnitude, rule.evaluations());
    }

    private void point(double w, double fromA, double toB, double[] out) {
        double dp = scale * Math.sinh(w);
        curve.step(nearest, dp, step);
        double dx = off[0] - step[0];
        double dy = off[1] - step[1];
        double dz = off[2] - step[2];
        double square = dx * dx + dy * dy + dz * dz;
        double r = Math.sqrt(square);
        double q = density.at(start[0] + step[0], start[1] + step[1], start[2] + step[2]) * curve.speed(nearest + dp) * scale
                * Math.cosh(w);
        double each = q / (square * r);
        out[0] = each * dx;
        out[1] = each * dy;
        out[2] = each * dz;
        out[3] = q / r;
    }
}
