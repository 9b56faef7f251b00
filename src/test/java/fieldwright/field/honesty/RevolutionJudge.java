package fieldwright.field.honesty;

import java.math.BigDecimal;
import java.util.Arrays;

/**
 * Field and potential of charge on a surface of revolution about z by rings. On a ring the angle from the place's azimuth is
 * q sinh w, q the ring's distance in units of √(ρρ₀); from ring to ring the profile's parameter is p₀ + L sinh w about the
 * nearest point p₀. Distances by (ρ₀−ρ)² + (z₀−z)² + 4ρρ₀ sin²(φ/2), differences from p₀ in closed form: a gap keeps its digits.
 */
final class RevolutionJudge {
    /** A meridian with exact differences. */
    interface Profile {
        double from();

        double to();

        /** Length of meridian per parameter. */
        double speed(double p);

        BigDecimal exactRho(double p);

        BigDecimal exactZ(double p);

        /** rho(p + dp) − rho(p). */
        double rhoStep(double p, double dp);

        double zStep(double p, double dp);
    }

    private final Profile profile;
    private final SmoothDensity density;
    private final double[] arc;
    private final double nearest;
    private final double scale;
    private final double rho0;
    private final double azimuth0;
    private final double offRho;
    private final double offZ;
    private final double nearestRho;
    private final double nearestZ;
    private final DoubleExponential meridian;
    private final DoubleExponential ring;
    private final double[] inner = new double[4];
    private final double[] innerMagnitude = new double[4];
    private double rho;
    private double z;
    private double gapRho;
    private double gapZ;
    private double grade;

    private RevolutionJudge(Profile profile, SmoothDensity density, double[] arc, Exact.Position place, double[] off,
            double nearest, double distance, DoubleExponential.Setting setting) {
        this.profile = profile;
        this.density = density;
        this.nearest = nearest;
        rho0 = Exact.hypot(place.x(), place.y()).doubleValue();
        azimuth0 = Math.atan2(place.y().doubleValue(), place.x().doubleValue());
        offRho = off[0];
        offZ = off[1];
        nearestRho = profile.exactRho(nearest).doubleValue();
        nearestZ = profile.exactZ(nearest).doubleValue();
        scale = Math.max(distance, Charged.LEAST) / profile.speed(nearest);
        this.arc = arc == null ? new double[] {-Math.PI, 0, 0, Math.PI} : relative(arc, azimuth0);
        meridian = DoubleExponential.outer(setting);
        ring = new DoubleExponential(setting);
    }

    /**
     * Arc: limits of phi, null for the full circle. Off: the place's rho and z less those of the profile at {@code nearest}, a
     * point about nearest, with all digits. Distance: rough.
     */
    static Answer judge(Profile profile, SmoothDensity density, double[] arc, Exact.Position place, double[] off,
            double nearest, double distance, DoubleExponential.Setting setting) {
        return new RevolutionJudge(profile, density, arc, place, off, nearest, distance, setting).work();
    }

    /** An arc as pairs of angles from the place's azimuth within (−π, π], cut at 0. */
    static double[] relative(double[] arc, double azimuth0) {
        double[] pairs = new double[0];
        for (int turn = -2; turn <= 2; turn++) {
            double from = arc[0] - azimuth0 + turn * 2 * Math.PI;
            double to = arc[1] - azimuth0 + turn * 2 * Math.PI;
            for (int half = -1; half <= 0; half++) {
                double low = Math.max(from, half * Math.PI);
                double high = Math.min(to, (half + 1) * Math.PI);
                if (high > low) {
                    pairs = Arrays.copyOf(pairs, pairs.length + 2);
                    pairs[pairs.length - 2] = low;
                    pairs[pairs.length - 1] = high;
                }
            }
        }
        return pairs;
    }

    private Answer work() {
        double[] value = new double[4];
        double[] magnitude = new double[4];
        double low = PlanarJudge.asinh((profile.from() - nearest) / scale);
        double high = PlanarJudge.asinh((profile.to() - nearest) / scale);
        if (low < 0 && high > 0) {
            meridian.add(this::ring, low, 0, value, magnitude);
            meridian.add(this::ring, 0, high, value, magnitude);
        } else {
            meridian.add(this::ring, low, high, value, magnitude);
        }
        double cos = Math.cos(azimuth0);
        double sin = Math.sin(azimuth0);
        double[] turned = {cos * value[0] - sin * value[1], sin * value[0] + cos * value[1], value[2], value[3]};
        double size = Math.max(magnitude[0], Math.max(magnitude[1], magnitude[2]));
        return new Answer(turned, new double[] {size, size, size, magnitude[3]}, meridian.evaluations() + ring.evaluations());
    }

    private void ring(double w, double fromA, double toB, double[] out) {
        double step = scale * Math.sinh(w);
        double rhoStep = profile.rhoStep(nearest, step);
        double zStep = profile.zStep(nearest, step);
        rho = nearestRho + rhoStep;
        z = nearestZ + zStep;
        gapRho = offRho - rhoStep;
        gapZ = offZ - zStep;
        grade = rho * rho0 == 0 ? 3 : Math.min(3, Math.sqrt((gapRho * gapRho + gapZ * gapZ) / (rho * rho0)));
        Arrays.fill(inner, 0);
        Arrays.fill(innerMagnitude, 0);
        for (int k = 0; k < arc.length; k += 2) {
            ring.add(this::point, PlanarJudge.asinh(arc[k] / grade), PlanarJudge.asinh(arc[k + 1] / grade), inner, innerMagnitude);
        }
        double stretch = scale * Math.cosh(w) * profile.speed(nearest + step) * rho;
        for (int c = 0; c < 4; c++) {
            out[c] = inner[c] * stretch;
        }
    }

    private void point(double w, double fromA, double toB, double[] out) {
        double phi = grade * Math.sinh(w);
        double half = Math.sin(phi / 2);
        double square = gapRho * gapRho + gapZ * gapZ + 4 * rho * rho0 * half * half;
        double r = Math.sqrt(square);
        double q = density.at(rho * Math.cos(azimuth0 + phi), rho * Math.sin(azimuth0 + phi), z) * grade * Math.cosh(w);
        double each = q / (square * r);
        out[0] = each * (gapRho + 2 * rho * half * half);
        out[1] = -each * rho * Math.sin(phi);
        out[2] = each * gapZ;
        out[3] = q / r;
    }
}
