package fieldwright.words;

import fieldwright.judge.Assessment;
import fieldwright.judge.Check;
import fieldwright.output.Display;
import fieldwright.output.Output;
import fieldwright.output.Point;
import fieldwright.output.Status;
import fieldwright.output.Value;
import fieldwright.quantity.Amount;
import fieldwright.quantity.Place;
import fieldwright.quantity.Standing;
import fieldwright.quantity.TradeUnit;
import fieldwright.quantity.Units;
import fieldwright.quantity.Vector;
import fieldwright.study.Assessed;
import fieldwright.study.Combined;
import fieldwright.study.Reading;
import fieldwright.study.WorstCase;
import java.util.List;

/** Amounts, vectors and verdicts as the plain data of {@code output}, and as what {@code study} reads. SI throughout. */
public final class Outputs {
    private Outputs() { }

    /** An amount or a vector. */
    public static Value value(Object amountOrVector) {
        return amountOrVector instanceof Vector vector ? value(vector) : scalar((Amount) amountOrVector);
    }

    public static Value.Scalar scalar(Amount amount) {
        Status status = status(amount.standing());
        String unit = Units.preferred(amount.dimension());
        TradeUnit shown = Units.parse(amount.unitText());
        double value = status == Status.NOT_CONVERGED && Double.isInfinite(amount.si()) ? Double.NaN
                : status == Status.UNBOUNDED && Double.isFinite(amount.si()) ? Double.NaN : amount.si();
        boolean carried = Double.isFinite(amount.error()) && status != Status.UNBOUNDED;
        return new Value.Scalar(value, carried ? amount.error() : null, null, unit, new Display(shown.text(), shown.factor()), status,
                amount.standing().reason());
    }

    public static Value value(Vector vector) {
        if (!vector.isSided()) {
            return triple(vector);
        }
        String plus = side(vector.normal(), 1);
        String minus = side(vector.normal(), -1);
        return new Value.Sides(plus, triple(vector.plusSide()), minus, triple(vector.minusSide()));
    }

    private static Value.Triple triple(Vector vector) {
        Place place = vector.place();
        return new Value.Triple(scalar(vector.x()), scalar(vector.y()), scalar(vector.z()), new Point(place.x(), place.y(), place.z()));
    }

    /** {@code +z} for a normal along an axis, else the direction itself. */
    private static String side(double[] normal, int sign) {
        String axes = "xyz";
        for (int i = 0; i < 3; i++) {
            if (Math.abs(Math.abs(normal[i]) - 1) < 1e-9) {
                return (normal[i] * sign > 0 ? "+" : "-") + axes.charAt(i);
            }
        }
        return String.format(java.util.Locale.ROOT, "(%.4f, %.4f, %.4f)", sign * normal[0] + 0.0, sign * normal[1] + 0.0, sign * normal[2] + 0.0);
    }

    private static Status status(Standing standing) {
        return switch (standing.kind()) {
            case CONVERGED -> Status.CONVERGED;
            case NOT_CONVERGED -> Status.NOT_CONVERGED;
            case UNBOUNDED -> Status.UNBOUNDED;
        };
    }

    public static Output.Check check(Check check) {
        return new Output.Check(check.label(), check.passed(), check.detail(), check.measured(), check.allowed(), check.unit());
    }

    public static Output.Assessment assessment(Assessment a) {
        return new Output.Assessment(a.label(), a.passed(), scalar(a.value()), a.worstCase() == null ? null : scalar(a.worstCase()),
                scalar(a.threshold().value()), a.margin(), a.marginFound(), a.threshold().source(), a.threshold().caution());
    }

    /** An assessment as the study reads it in a replay. */
    public static Assessed assessed(Output.Assessment shown) {
        Value.Scalar value = shown.value();
        Value.Scalar threshold = shown.threshold();
        double limit = threshold.value() - orZero(threshold.numericalError());
        boolean usable = value.status() == Status.CONVERGED && value.numericalError() != null;
        return new Assessed(value.value(), orZero(value.numericalError()), limit / shown.marginAsked(), usable);
    }

    /**
     * The assessment with the worst case of the inputs' tolerances, judged again. When there is no worst case because a
     * rerun failed or did not converge, it fails.
     */
    public static Output.Assessment withWorstCase(Output.Assessment shown, WorstCase found) {
        Value.Scalar value = shown.value();
        if (!found.isEstablished()) {
            Value.Scalar none = new Value.Scalar(Double.NaN, null, null, value.unit(), value.shown(), Status.NOT_CONVERGED,
                    "worst case of the inputs: " + found.reason());
            return new Output.Assessment(shown.label(), false, value, none, shown.threshold(), shown.marginAsked(), Double.NaN,
                    shown.source(), shown.caution());
        }
        Assessed worst = found.worst();
        Value.Scalar scalar = new Value.Scalar(worst.value(), worst.error(), null, value.unit(), value.shown(), Status.CONVERGED, "");
        double margin = shown.marginAsked() / worst.used();
        return new Output.Assessment(shown.label(), shown.passed() && margin >= shown.marginAsked(), value, scalar, shown.threshold(),
                shown.marginAsked(), Math.min(margin, shown.marginFound()), shown.source(), shown.caution());
    }

    /** A result with its tolerances, one for each number of {@link #reading}; absent where not established. */
    public static Value withTolerance(Value value, List<Combined> tolerances) {
        if (value instanceof Value.Scalar scalar) {
            return scalar.withTolerance(tolerances.get(0).expanded());
        }
        if (value instanceof Value.Triple triple) {
            return withTolerance(triple, tolerances);
        }
        Value.Sides sides = (Value.Sides) value;
        return new Value.Sides(sides.plusSide(), withTolerance(sides.plus(), tolerances.subList(0, 3)), sides.minusSide(),
                withTolerance(sides.minus(), tolerances.subList(3, 6)));
    }

    private static Value.Triple withTolerance(Value.Triple t, List<Combined> each) {
        return new Value.Triple(t.x().withTolerance(each.get(0).expanded()), t.y().withTolerance(each.get(1).expanded()),
                t.z().withTolerance(each.get(2).expanded()), t.place());
    }

    /** A result as the study reads it in a replay. */
    public static Reading reading(Value value) {
        Value.Scalar[] parts = parts(value);
        double[] values = new double[parts.length];
        double[] errors = new double[parts.length];
        for (int i = 0; i < parts.length; i++) {
            values[i] = parts[i].value();
            errors[i] = parts[i].numericalError() == null ? Double.NaN : parts[i].numericalError();
        }
        return new Reading(values, errors, value.status() == Status.CONVERGED);
    }

    private static Value.Scalar[] parts(Value value) {
        if (value instanceof Value.Scalar scalar) {
            return new Value.Scalar[] {scalar};
        }
        if (value instanceof Value.Triple t) {
            return new Value.Scalar[] {t.x(), t.y(), t.z()};
        }
        Value.Sides s = (Value.Sides) value;
        return new Value.Scalar[] {s.plus().x(), s.plus().y(), s.plus().z(), s.minus().x(), s.minus().y(), s.minus().z()};
    }

    private static double orZero(Double number) {
        return number == null ? 0 : number;
    }
}
