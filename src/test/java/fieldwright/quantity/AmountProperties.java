package fieldwright.quantity;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.math.MathContext;
import java.math.RoundingMode;
import java.util.List;
import net.jqwik.api.Assume;
import net.jqwik.api.Example;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.DoubleRange;
import net.jqwik.api.constraints.IntRange;
import net.jqwik.api.constraints.Scale;

/** The carried error is true: exact values anywhere within the errors of the operands stay within the error of the result. */
class AmountProperties {
    private static final MathContext DIGITS = new MathContext(400);

    /** A value, its error, and where in its error the truth lies. */
    private record Fuzzy(Amount amount, BigDecimal truth) {
        static Fuzzy of(double value, double relative, double where) {
            double error = Math.abs(value) * relative;
            return new Fuzzy(Amount.si(value, error, Units.NONE), new BigDecimal(value).add(new BigDecimal(error).multiply(new BigDecimal(where))));
        }
    }

    @Property(seed = "20260311", tries = 3000)
    void arithmetic(@ForAll @Scale(20) @DoubleRange(min = -1e12, max = 1e12) double a, @ForAll @Scale(20) @DoubleRange(min = -1e6, max = 1e6) double b,
                    @ForAll @Scale(20) @DoubleRange(min = 0, max = 1e-3) double ea, @ForAll @Scale(20) @DoubleRange(min = 0, max = 1e-9) double eb,
                    @ForAll @Scale(20) @DoubleRange(min = -1, max = 1) double wa, @ForAll @Scale(20) @DoubleRange(min = -1, max = 1) double wb) {
        Fuzzy x = Fuzzy.of(a, ea, wa);
        Fuzzy y = Fuzzy.of(b, eb, wb);
        assertHolds(x.truth().add(y.truth()), x.amount().plus(y.amount()));
        assertHolds(x.truth().subtract(y.truth()), x.amount().minus(y.amount()));
        assertHolds(x.truth().multiply(y.truth()), x.amount().times(y.amount()));
        assertHolds(x.truth().max(y.truth()), x.amount().max(y.amount()));
        assertHolds(x.truth().min(y.truth()), x.amount().min(y.amount()));
        assertHolds(x.truth().abs(), x.amount().abs());
        Assume.that(Math.abs(b) > 1e-200);
        assertHolds(x.truth().divide(y.truth(), DIGITS), x.amount().dividedBy(y.amount()));
    }

    @Property(seed = "20260312", tries = 1500)
    void powersAndRoots(@ForAll @Scale(20) @DoubleRange(min = 1e-6, max = 1e6) double a, @ForAll @Scale(20) @DoubleRange(min = 0, max = 0.3) double ea,
                        @ForAll @Scale(20) @DoubleRange(min = -1, max = 1) double wa, @ForAll @IntRange(min = -6, max = 6) int n) {
        Fuzzy x = Fuzzy.of(a, ea, wa);
        assertHolds(x.truth().pow(n, DIGITS), x.amount().power(n));
        assertHolds(x.truth().sqrt(DIGITS), x.amount().sqrt());
    }

    /** A bound that is far too wide would be useless: doubling of exact doubles is exact, and one rounding costs one rounding. */
    @Property(seed = "20260313", tries = 500)
    void boundsAreTight(@ForAll @Scale(20) @DoubleRange(min = 1e-3, max = 1e3) double a, @ForAll @Scale(20) @DoubleRange(min = 1e-3, max = 1e3) double b) {
        assertEquals(0, Amount.of(a).times(2).error());
        assertTrue(Amount.of(a).times(b).error() <= Math.ulp(a * b));
        assertTrue(Amount.of(a).plus(b).error() <= Math.ulp(a + b));
        assertTrue(Amount.of(a).dividedBy(b).error() <= 2 * Math.ulp(a / b));
        Amount inexact = Amount.si(a, a * 1e-9, Units.NONE);
        assertEquals(2e-9, inexact.times(inexact).error() / (a * a), 1e-15);
        assertEquals(0.5e-9, inexact.sqrt().error() / Math.sqrt(a), 1e-12);
    }

    @Property(seed = "20260314", tries = 1000)
    void functions(@ForAll @Scale(20) @DoubleRange(min = -20, max = 20) double a, @ForAll @Scale(20) @DoubleRange(min = 0, max = 0.5) double e,
                   @ForAll @Scale(20) @DoubleRange(min = -1, max = 1) double where) {
        Amount x = Amount.si(a, e, Units.NONE);
        double truth = a + where * e;
        double slack = 4e-16;   // the truth itself is worked in doubles here
        assertEquals(Math.sin(truth), x.sin().si(), x.sin().error() + slack);
        assertEquals(Math.cos(truth), x.cos().si(), x.cos().error() + slack);
        assertEquals(Math.exp(truth), x.exp().si(), x.exp().error() + slack * Math.exp(truth));
        Assume.that(a > 0 && truth > 0);
        assertEquals(Math.log(truth), x.ln().si(), x.ln().error() + slack * (1 + Math.abs(Math.log(truth))));
    }

    private static void assertHolds(BigDecimal truth, Amount found) {
        if (Double.isInfinite(found.error())) {
            return;
        }
        BigDecimal miss = new BigDecimal(found.si()).subtract(truth).abs();
        assertTrue(miss.compareTo(new BigDecimal(found.error())) <= 0,
            found.si() + " misses by " + miss.round(new MathContext(5, RoundingMode.UP)) + ", error " + found.error());
    }

    @Example
    void standingAndUnknownErrorStick() {
        Amount bad = Amount.si(1, 0.5, Units.LENGTH, Standing.notConverged("20000 evaluations"));
        Amount none = Amount.si(1, Double.NaN, Units.LENGTH);
        for (Amount a : List.of(bad.plus(none), none.plus(bad), bad.times(none), none.dividedBy(bad), bad.max(none))) {
            assertEquals("20000 evaluations", a.standing().reason());
            assertTrue(Double.isNaN(a.error()));
        }
        Amount endless = new Amount(Double.POSITIVE_INFINITY, 0, Units.LENGTH, null, Standing.unbounded("on the line"));
        assertEquals(Standing.Kind.UNBOUNDED, bad.plus(endless).standing().kind());
        assertEquals("on the line", endless.times(2).standing().reason());
    }

    @Example
    void unitsAreChecked() {
        Amount length = Amount.of(2, "m");
        Amount charge = Amount.of(3, "nC");
        for (Runnable wrong : List.<Runnable>of(() -> length.plus(charge), () -> length.minus(charge), () -> length.max(charge), () -> length.sin(),
            () -> length.exp(), () -> length.in("V"), () -> length.lessThan(charge), () -> length.dividedBy(0), () -> length.negated().sqrt(),
            () -> Amount.of(0).ln(), () -> Amount.of(Double.NaN))) {
            assertThrows(AuthorException.class, wrong::run);
        }
        assertEquals(Units.LINE_DENSITY, charge.dividedBy(length).dimension());
        assertEquals("1.5e-09 C/m", charge.dividedBy(length).toString().replace("1.50000", "1.5"));
        assertEquals("mm", length.in("mm").times(2).shown());
        assertEquals(2000, length.value("mm"));
    }
}
