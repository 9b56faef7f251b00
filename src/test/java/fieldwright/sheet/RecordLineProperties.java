package fieldwright.sheet;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.output.Display;
import fieldwright.output.Output;
import fieldwright.output.Point;
import fieldwright.output.Status;
import fieldwright.output.Value;
import net.jqwik.api.Arbitraries;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.Combinators;
import net.jqwik.api.EdgeCasesMode;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;

/** Whatever a run may give reads back exactly, on one line. */
class RecordLineProperties {

    @Property(tries = 600, edgeCases = EdgeCasesMode.NONE, seed = "815")
    void resultsReadBack(@ForAll("names") String name, @ForAll("values") Value value) {
        readsBack(new Output.Result(name, "", value));
    }

    @Property(tries = 200, edgeCases = EdgeCasesMode.NONE, seed = "816")
    void checksReadBack(@ForAll("texts") String label, @ForAll boolean passed, @ForAll("texts") String detail,
                        @ForAll double measured, @ForAll("measures") double allowed, @ForAll("units") String unit) {
        readsBack(new Output.Check("l" + label, passed, detail, measured, allowed, unit));
    }

    @Property(tries = 200, edgeCases = EdgeCasesMode.NONE, seed = "817")
    void assessmentsReadBack(@ForAll("texts") String label, @ForAll boolean passed, @ForAll("scalars") Value.Scalar value,
                             @ForAll("scalars") Value.Scalar threshold, @ForAll("measures") double margin,
                             @ForAll("texts") String caution, @ForAll boolean withWorst) {
        readsBack(new Output.Assessment("l" + label, passed, value, withWorst ? value.withTolerance(null) : null, threshold, 3, margin,
                "s" + label, "c" + caution));
    }

    private static void readsBack(Output output) {
        RecordLine written = RecordLine.of(output);
        assertEquals(1, written.text().lines().count(), written.text());
        RecordLine read = RecordLine.read(written.text());
        assertTrue(read.isReadable(), () -> written.text() + "\n" + read.trouble());
        assertEquals(output, read.content());
        assertTrue(read.matches(output));
    }

    @Provide
    Arbitrary<String> names() {
        return Arbitraries.oneOf(Arbitraries.of("Q", "E_roof", "ρ_0", "check", "assess", "unbounded", "num", "_a1"),
                Arbitraries.strings().withChars("ab \"|\\[=,\n").ofMinLength(1).ofMaxLength(6).filter(text -> !text.isBlank()));
    }

    @Provide
    Arbitrary<String> texts() {
        return Arbitraries.strings().withChars("ab \"|\\[](),=\n\r\t\u0001é").ofMaxLength(12);
    }

    @Provide
    Arbitrary<String> units() {
        return Arbitraries.of("", "V/m", "C", "C·m^2", "kg*m/s^2", "1/m", "odd unit", "a|b", "?");
    }

    @Provide
    Arbitrary<Double> measures() {
        return Arbitraries.oneOf(numbers(), Arbitraries.of(Double.NaN, Double.POSITIVE_INFINITY, Double.NEGATIVE_INFINITY));
    }

    private static Arbitrary<Double> numbers() {
        Arbitrary<Double> anyBits = Arbitraries.longs().map(Double::longBitsToDouble).filter(Double::isFinite);
        return Arbitraries.oneOf(anyBits, Arbitraries.doubles().between(-1e6, 1e6),
                Arbitraries.of(0.0, -0.0, Double.MIN_VALUE, Double.MAX_VALUE, -Double.MIN_NORMAL, 0.1, 1e21, 1e-7, 2.0e-3));
    }

    @Provide
    Arbitrary<Value.Scalar> scalars() {
        return Combinators.combine(units(), displays()).flatAs(RecordLineProperties::scalars);
    }

    private static Arbitrary<Display> displays() {
        return Arbitraries.of(Display.si("V/m"), new Display("kV/m", 1e3), new Display("%", 0.01), new Display("e", 1.602176634e-19),
                new Display("", 2), new Display("odd unit", 1));
    }

    private static Arbitrary<Value.Scalar> scalars(String unit, Display shown) {
        Arbitrary<Double> bounds = numbers().map(Math::abs).injectNull(0.3);
        Arbitrary<String> reasons = Arbitraries.of("2000000 evaluations, estimate 3e-4 > 1e-6. \"Split\" at the rim.", "on the line | charge");
        return Combinators.combine(Arbitraries.of(Status.class), numbers(), bounds, bounds, reasons, Arbitraries.integers().between(0, 2))
                .as((status, number, error, tolerance, reason, pick) -> {
                    double value = switch (status) {
                        case CONVERGED -> number;
                        case NOT_CONVERGED -> pick == 0 ? Double.NaN : number;
                        case UNBOUNDED -> new double[] {Double.NaN, Double.POSITIVE_INFINITY, Double.NEGATIVE_INFINITY}[pick];
                    };
                    return new Value.Scalar(value, error, tolerance, unit, shown, status, status == Status.CONVERGED ? "" : reason);
                });
    }

    @Provide
    Arbitrary<Value> values() {
        Arbitrary<Point> places = Combinators.combine(numbers(), numbers(), numbers()).as(Point::new).injectNull(0.3);
        return Combinators.combine(units(), displays(), places).flatAs((unit, shown, place) -> {
            Arbitrary<Value.Scalar> scalar = scalars(unit, shown);
            Arbitrary<Value.Triple> triple = Combinators.combine(scalar, scalar, scalar).as((x, y, z) -> new Value.Triple(x, y, z, place));
            Arbitrary<String> sides = Arbitraries.of("+z", "+rho", "outside", "towards (1, 0, 1)");
            Arbitrary<Value.Sides> pair = Combinators.combine(sides, triple, triple)
                    .as((side, plus, minus) -> new Value.Sides(side, plus, "-" + side, minus));
            return Arbitraries.oneOf(scalar, triple, pair);
        });
    }
}
