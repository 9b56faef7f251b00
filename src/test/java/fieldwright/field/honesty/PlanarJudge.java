package fieldwright.field.honesty;

import java.util.Arrays;

/**
 * Field and potential of charge on part of the plane z = 0 by slices x = const, each a strip seen from the place. Across a
 * slice y = s sinh v, s² = X² + h² (then the distance is s cosh v), from slice to slice X = D sinh w; both by tanh–sinh.
 * X and Y are counted from the foot point, h is the height of the place.
 */
final class PlanarJudge {
    /** Outline, counted from the foot point. */
    interface Outline {
        /** X at which slices change their form, ascending, first and last included. */
        double[] breaks();

        /** Pairs of Y of one slice; k is the piece of {@link #breaks}, the distances are from its two ends. */
        int spans(double x, int k, double fromBreak, double toBreak, double[] out);
    }

    private final Outline outline;
    private final SmoothDensity density;
    private final double[] foot;
    private final double height;
    private final double scale;
    private final DoubleExponential across;
    private final DoubleExponential along;
    private final double[] spans = new double[8];
    private final double[] inner = new double[4];
    private final double[] innerMagnitude = new double[4];
    private int piece;
    private double wFrom;
    private double wTo;
    private double x;
    private double s;

    private PlanarJudge(Outline outline, SmoothDensity density, double[] foot, double height, double distance,
            DoubleExponential.Setting setting) {
        this.outline = outline;
        this.density = density;
        this.foot = foot;
        this.height = height;
        scale = Math.max(distance, Charged.LEAST);
        along = DoubleExponential.outer(setting);
        across = new DoubleExponential(setting);
    }

    /** Distance (rough) is that of the place from the charged part. */
    static Answer judge(Outline outline, SmoothDensity density, double[] foot, double height, double distance,
            DoubleExponential.Setting setting) {
        return new PlanarJudge(outline, density, foot, height, distance, setting).work();
    }

    private Answer work() {
        double[] value = new double[4];
        double[] magnitude = new double[4];
        double[] breaks = outline.breaks();
        for (piece = 0; piece + 1 < breaks.length; piece++) {
            wFrom = asinh(breaks[piece] / scale);
            wTo = asinh(breaks[piece + 1] / scale);
            along.add(this::slice, wFrom, wTo, value, magnitude);
        }
        return new Answer(value, magnitude, along.evaluations() + across.evaluations());
    }

    private void slice(double w, double fromA, double toB, double[] out) {
        x = scale * Math.sinh(w);
        double fromBreak = 2 * scale * Math.cosh((w + wFrom) / 2) * Math.sinh(fromA / 2);
        double toBreak = 2 * scale * Math.cosh((w + wTo) / 2) * Math.sinh(toB / 2);
        s = Math.sqrt(x * x + height * height);
        int n = outline.spans(x, piece, fromBreak, toBreak, spans);
        Arrays.fill(inner, 0);
        Arrays.fill(innerMagnitude, 0);
        for (int k = 0; k < n; k += 2) {
            double from = asinh(spans[k] / s);
            double to = asinh(spans[k + 1] / s);
            if (from < 0 && to > 0) {
                across.add(this::point, from, 0, inner, innerMagnitude);
                across.add(this::point, 0, to, inner, innerMagnitude);
            } else {
                across.add(this::point, from, to, inner, innerMagnitude);
            }
        }
        double stretch = scale * Math.cosh(w);
        for (int c = 0; c < 4; c++) {
            out[c] = inner[c] * stretch;
        }
    }

    private void point(double v, double fromA, double toB, double[] out) {
        double y = s * Math.sinh(v);
        double r = s * Math.cosh(v);
        double q = density.at(foot[0] + x, foot[1] + y, 0);
        double each = q / (r * r);
        out[0] = -each * x;
        out[1] = -each * y;
        out[2] = each * height;
        out[3] = q;
    }

    static double asinh(double t) {
        double m = Math.abs(t);
        double value = m < 1e9 ? Math.log1p(m + m * m / (1 + Math.sqrt(1 + m * m))) : Math.log(m) + Math.log(2);
        return Math.copySign(value, t);
    }
}
