package fieldwright.field;

import java.util.Locale;

import javax.measure.Dimension;

import fieldwright.integral.Estimate;
import fieldwright.quantity.Amount;
import fieldwright.quantity.Place;
import fieldwright.quantity.Standing;
import fieldwright.quantity.Vector;

/** Sums several integrals and says whether the whole is as good as was asked. */
final class Tally {
    private final Accuracy accuracy;
    private final double[] value;
    private double error;
    private double carried;
    private boolean doubtful;
    private double magnitude;
    private int places;
    private Standing failed = Standing.CONVERGED;

    Tally(Accuracy accuracy, int components) {
        this.accuracy = accuracy;
        value = new double[components];
    }

    /** Whether the value is zero as far as can be told. */
    boolean isZero() {
        return failed.isConverged() && norm(value) <= error + carried + 1e-13 * magnitude;
    }

    int size() {
        return value.length;
    }

    void add(double sign, Sweep.Result r) {
        if (r.status() == Estimate.Status.NOT_A_NUMBER) {
            fail(Standing.notConverged("a number came out that is none; the integral has no finite value, or the density is infinite somewhere"));
        }
        places += r.places();
        add(sign, r.value(), r.error(), r.carried(), r.magnitude());
    }

    /** {@code e}: error of a sum; {@code of}: error carried by what was summed. */
    void add(double sign, double[] v, double e, double of, double size) {
        for (int c = 0; c < value.length; c++) {
            value[c] += sign * v[c];
        }
        error += e + 4 * Sampler.EPS * norm(v);
        carried += of;
        magnitude += Math.max(size, norm(v));
    }

    /** Something summed did not converge itself: the error it carries counts in full. */
    void doubt() {
        doubtful = true;
    }

    void fail(Standing standing) {
        failed = failed.worse(standing);
    }

    static double norm(double[] v) {
        double sum = 0;
        for (double x : v) {
            sum += x * x;
        }
        return Math.sqrt(sum);
    }

    private Standing standing(String what, String unit) {
        if (!failed.isConverged()) {
            return failed;
        }
        double allowed = Math.max(accuracy.absoluteFloor(), accuracy.relative() * Math.max(norm(value), 1e-3 * magnitude));
        double whole = error + carried;
        if (whole <= allowed || !doubtful && error <= Math.max(allowed, carried)) {
            return Standing.CONVERGED;      // where fields cancel, their own standing counts
        }
        return Standing.notConverged(String.format(Locale.ROOT, "%s: fields at %d places, estimated error %.2g %s > tolerance %.2g %s. Loosen the accuracy, "
            + "or split the regions where they cross", what, places, whole, unit, allowed, unit));
    }

    private Amount part(double v, Dimension dimension, Standing standing) {
        if (standing.kind() == Standing.Kind.UNBOUNDED || Double.isNaN(v)) {
            return Amount.si(Double.NaN, Double.POSITIVE_INFINITY, dimension, standing);
        }
        return Amount.si(v, Double.isNaN(error + carried) ? Double.POSITIVE_INFINITY : error + carried, dimension, standing);
    }

    Amount amount(String what, Dimension dimension, String unit) {
        return amounts(what, dimension, unit)[0];
    }

    Amount[] amounts(String what, Dimension dimension, String unit) {
        Standing standing = standing(what, unit);
        Amount[] all = new Amount[value.length];
        for (int c = 0; c < all.length; c++) {
            all[c] = part(value[c], dimension, standing);
        }
        return all;
    }

    Vector vector(String what, Place at, Dimension dimension, String unit) {
        Amount[] c = amounts(what, dimension, unit);
        return Vector.of(at, c[0], c[1], c[2]);
    }
}
