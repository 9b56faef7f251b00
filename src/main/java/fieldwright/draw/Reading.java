package fieldwright.draw;

import fieldwright.output.Display;
import fieldwright.output.Status;
import fieldwright.output.Value;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.stream.Stream;

/**
 * One number of a value as a reader sees it.
 *
 * @param part   which part of the value it is: {@code x}, {@code on side +z, x}; empty for a number that is the whole
 * @param figure digits and unit, {@code 59.9 µC}; {@code unbounded} when there is none
 * @param doubt  tolerance and numerical error; empty when unbounded
 * @param status whether it may be relied on
 * @param reason why not; empty when it may
 */
public record Reading(String part, String figure, String doubt, Status status, String reason) {

    /**
     * All numbers of a value. The parts of a vector share one unit, and none shows more decimals than the largest. Where
     * no part has a number, and all for one reason, that is said once.
     */
    public static List<Reading> of(Value value) {
        if (value.status() == Status.UNBOUNDED && isAlike(value)) {
            return List.of(new Reading("", "unbounded", "", Status.UNBOUNDED, value.reason()));
        }
        Scale scale = scale(value);
        int decimals = numbers(value).filter(s -> Double.isFinite(s.value())).max(Comparator.comparingDouble(s -> Math.abs(s.value())))
                .map(s -> Figures.decimals(s.value(), s.tolerance(), s.numericalError(), scale)).orElse(0);
        List<Reading> readings = new ArrayList<>();
        collect(value, "", new Rule(scale, decimals), readings);
        return List.copyOf(readings);
    }

    /** True when all numbers have one status and one reason, and none a direction of its own to tell. */
    private static boolean isAlike(Value value) {
        return !(value instanceof Value.Scalar) && numbers(value).map(s -> List.of(s.status(), s.reason()))
                .distinct().count() == 1 && numbers(value).noneMatch(s -> Double.isInfinite(s.value()));
    }

    /** How the numbers of one value are shown: their unit, and the most decimals. */
    private record Rule(Scale scale, int decimals) { }

    /** One number in the unit chosen on the sheet, or in SI with a fitting prefix. */
    public static Reading of(Value.Scalar value) {
        return of((Value) value).get(0);
    }

    /**
     * A number at its worst: three digits, rounded away from zero, so that what is shown is never milder than what was
     * found. Without its doubt.
     */
    public static String worst(Value.Scalar value) {
        if (!Double.isFinite(value.value())) {
            return of(value).figure();
        }
        Scale scale = scale(value);
        return Figures.withUnit(Figures.roundedUp(scale.shown(value.value()), 3), scale.printed());
    }

    /**
     * Bounds on the doubts of all numbers of a vector or a pair: no part has a larger tolerance or numerical error. Empty
     * when no part has a number.
     */
    public static String widestDoubt(Value value) {
        List<Value.Scalar> parts = numbers(value).filter(s -> Double.isFinite(s.value())).toList();
        if (parts.isEmpty()) {
            return "";
        }
        Double tolerance = parts.stream().allMatch(s -> s.tolerance() != null)
                ? (Double) parts.stream().mapToDouble(Value.Scalar::tolerance).max().getAsDouble() : null;
        Double error = parts.stream().allMatch(s -> s.numericalError() != null)
                ? (Double) parts.stream().mapToDouble(Value.Scalar::numericalError).max().getAsDouble() : null;
        return Figures.doubt(tolerance, error, scale(value), value.unit());
    }

    private static void collect(Value value, String part, Rule rule, List<Reading> readings) {
        if (value instanceof Value.Scalar scalar) {
            readings.add(read(part, scalar, rule));
        } else if (value instanceof Value.Triple triple) {
            String before = part.isEmpty() ? "" : part + ", ";
            readings.add(read(before + "x", triple.x(), rule));
            readings.add(read(before + "y", triple.y(), rule));
            readings.add(read(before + "z", triple.z(), rule));
        } else if (value instanceof Value.Sides sides) {
            collect(sides.plus(), "side " + minus(sides.plusSide()), rule, readings);
            collect(sides.minus(), "side " + minus(sides.minusSide()), rule, readings);
        } else {
            throw new IllegalArgumentException("a value of kind " + value.getClass().getSimpleName() + " cannot be shown.");
        }
    }

    private static String minus(String side) {
        return side.replace('-', '−');
    }

    private static Reading read(String part, Value.Scalar s, Rule rule) {
        Scale scale = rule.scale;
        if (s.status() == Status.UNBOUNDED) {
            String sign = s.value() < 0 ? "unbounded, towards −∞" : "unbounded";
            return new Reading(part, sign, "", s.status(), s.reason());
        }
        if (Double.isNaN(s.value())) {
            return new Reading(part, "no number", "", s.status(), s.reason());
        }
        return new Reading(part, Figures.value(s.value(), s.tolerance(), s.numericalError(), scale, rule.decimals),
                Figures.doubt(s.tolerance(), s.numericalError(), scale, s.unit()), s.status(), s.reason());
    }

    /** The unit chosen on the sheet; where SI stands, SI with the prefix that fits the largest part. */
    private static Scale scale(Value value) {
        Display shown = value.shown();
        boolean si = shown.factor() == 1 && shown.unit().equals(value.unit());
        return si ? Scale.fitting(largest(value), value.unit()) : new Scale(shown.unit(), shown.factor());
    }

    private static double largest(Value value) {
        return numbers(value).map(Value.Scalar::value).filter(Double::isFinite).mapToDouble(Math::abs).max().orElse(0);
    }

    private static Stream<Value.Scalar> numbers(Value value) {
        if (value instanceof Value.Scalar scalar) {
            return Stream.of(scalar);
        }
        if (value instanceof Value.Triple triple) {
            return Stream.of(triple.x(), triple.y(), triple.z());
        }
        Value.Sides sides = (Value.Sides) value;
        return Stream.concat(numbers(sides.plus()), numbers(sides.minus()));
    }
}
