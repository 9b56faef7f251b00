package fieldwright.output;

import java.io.Serializable;
import java.util.Objects;

/** What a name holds after the run: a number, a vector, or the two one-sided vectors on a charged surface. In SI. */
public sealed interface Value extends Serializable {

    /** SI unit; empty for a plain number. */
    String unit();

    /** The unit a reader sees. */
    Display shown();

    /** The worst status of all parts. */
    Status status();

    /** Why the status is not {@link Status#CONVERGED}; empty when it is. */
    String reason();

    /**
     * One number.
     *
     * @param value          in SI. Finite when converged. When not converged NaN says that there is no number at all;
     *                       when unbounded it is +∞ or −∞, or NaN where the sign is not known
     * @param numericalError absolute, SI, &ge; 0; null when it was not carried
     * @param tolerance      expanded uncertainty k = 2 from the inputs' tolerances, SI, &ge; 0; null when not established
     * @param unit           SI unit, empty for a plain number
     * @param shown          the unit a reader sees; null means the SI unit
     * @param reason         why it is not converged, or where it is unbounded; empty otherwise
     */
    record Scalar(double value, Double numericalError, Double tolerance, String unit, Display shown,
                  Status status, String reason) implements Value {

        public Scalar {
            Objects.requireNonNull(status, "status");
            unit = unit == null ? "" : unit;
            shown = shown == null ? Display.si(unit) : shown;
            reason = reason == null ? "" : reason;
            requireFitting(value, status);
            requireBound("numerical error", numericalError);
            requireBound("tolerance", tolerance);
        }

        /** A converged number, shown in SI, its tolerance not established; a numerical error of null was not carried. */
        public static Scalar of(double value, Double numericalError, String unit) {
            return new Scalar(value, numericalError, null, unit, null, Status.CONVERGED, "");
        }

        public Scalar withTolerance(Double newTolerance) {
            return new Scalar(value, numericalError, newTolerance, unit, shown, status, reason);
        }

        public Scalar withDisplay(Display newShown) {
            return new Scalar(value, numericalError, tolerance, unit, newShown, status, reason);
        }

        private static void requireFitting(double value, Status status) {
            boolean fits = switch (status) {
                case CONVERGED -> Double.isFinite(value);
                case NOT_CONVERGED -> !Double.isInfinite(value);
                case UNBOUNDED -> !Double.isFinite(value);
            };
            if (!fits) {
                throw new IllegalArgumentException("value " + value + " cannot be " + status.word()
                        + ". A converged value is finite, an unbounded one is not.");
            }
        }

        private static void requireBound(String what, Double bound) {
            if (bound != null && !(bound >= 0 && bound < Double.POSITIVE_INFINITY)) {
                throw new IllegalArgumentException(what + " = " + bound + ": must be finite and >= 0, or null for none.");
            }
        }
    }

    /**
     * A vector by its Cartesian components, all shown in the unit of the first.
     *
     * @param place where it was asked for; null when it belongs to no place (a dipole moment, a force)
     */
    record Triple(Scalar x, Scalar y, Scalar z, Point place) implements Value {

        public Triple {
            if (!x.unit().equals(y.unit()) || !x.unit().equals(z.unit())) {
                throw new IllegalArgumentException("components in " + x.unit() + ", " + y.unit() + ", " + z.unit()
                        + ": a vector has one unit.");
            }
            y = y.withDisplay(x.shown());
            z = z.withDisplay(x.shown());
        }

        @Override
        public String unit() {
            return x.unit();
        }

        @Override
        public Display shown() {
            return x.shown();
        }

        @Override
        public Status status() {
            return x.status().and(y.status()).and(z.status());
        }

        @Override
        public String reason() {
            return firstReason(x, y, z);
        }

        public Triple withDisplay(Display shown) {
            return new Triple(x.withDisplay(shown), y.withDisplay(shown), z.withDisplay(shown), place);
        }
    }

    /**
     * The two values on a charged surface or a conductor, where the field jumps.
     *
     * @param plusSide  name of the side the normal points to, for instance {@code +z}
     * @param minusSide name of the other side, for instance {@code -z}
     */
    record Sides(String plusSide, Triple plus, String minusSide, Triple minus) implements Value {

        public Sides {
            if (plusSide.isBlank() || minusSide.isBlank() || plusSide.equals(minusSide)) {
                throw new IllegalArgumentException("sides '" + plusSide + "' and '" + minusSide + "': each needs a name of its own.");
            }
            if (!plus.unit().equals(minus.unit())) {
                throw new IllegalArgumentException("sides in " + plus.unit() + " and " + minus.unit() + ": a pair has one unit.");
            }
            if (!Objects.equals(plus.place(), minus.place())) {
                throw new IllegalArgumentException("sides at " + plus.place() + " and " + minus.place() + ": a pair has one place.");
            }
            minus = minus.withDisplay(plus.shown());
        }

        @Override
        public String unit() {
            return plus.unit();
        }

        @Override
        public Display shown() {
            return plus.shown();
        }

        @Override
        public Status status() {
            return plus.status().and(minus.status());
        }

        @Override
        public String reason() {
            return firstReason(plus, minus);
        }

        public Sides withDisplay(Display shown) {
            return new Sides(plusSide, plus.withDisplay(shown), minusSide, minus.withDisplay(shown));
        }
    }

    /** The reason of the first part that has the worst status. */
    private static String firstReason(Value... parts) {
        Value worst = parts[0];
        for (Value part : parts) {
            if (part.status().compareTo(worst.status()) > 0) {
                worst = part;
            }
        }
        return worst.reason();
    }
}
