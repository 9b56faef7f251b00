package fieldwright.judge;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Place;
import fieldwright.quantity.Standing;
import fieldwright.quantity.Units;
import fieldwright.quantity.Vector;
import org.junit.jupiter.api.Test;

class CheckTest {
    private static Amount volts(double value, double error) {
        return Amount.si(value, error, Units.POTENTIAL);
    }

    private static Amount relative(double part) {
        return Amount.of(part);
    }

    @Test
    void passesWithinARelativeTolerance() {
        Check check = Check.of("two ways", volts(100.5, 0), volts(100, 0), Amount.of(1, "%"));
        assertTrue(check.passed(), check.detail());
        assertEquals(0.005, check.measured(), 1e-15);
        assertEquals(0.01, check.allowed(), 1e-15);
        assertEquals("", check.unit());
        assertFalse(Check.of("two ways", volts(101.5, 0), volts(100, 0), Amount.of(1, "%")).passed());
    }

    @Test
    void relativeMeansOfTheSecondValue() {
        assertFalse(Check.of("x", volts(100, 0), volts(90, 0), relative(0.105)).passed());
        assertTrue(Check.of("x", volts(90, 0), volts(100, 0), relative(0.105)).passed());
    }

    @Test
    void numericalErrorsCountAgainstIt() {
        assertTrue(Check.of("x", volts(100, 0.4), volts(100, 0.5), relative(0.01)).passed());
        assertFalse(Check.of("x", volts(100, 0.6), volts(100, 0.5), relative(0.01)).passed());
    }

    @Test
    void absoluteToleranceInTheValuesOwnKind() {
        Check check = Check.of("x", volts(100, 0), volts(101, 0), Amount.of(2, "V"));
        assertTrue(check.passed());
        assertEquals(1, check.measured(), 0);
        assertEquals("V", check.unit());
        var wrong = assertThrows(AuthorException.class, () -> Check.of("ends", volts(1, 0), volts(1, 0), Amount.of(1, "m")));
        assertTrue(wrong.getMessage().contains("'ends'") && wrong.getMessage().contains("percentage"), wrong.getMessage());
    }

    @Test
    void aReferenceOfZeroNeedsAnAbsoluteTolerance() {
        Check check = Check.of("x", volts(1e-12, 0), volts(0, 0), relative(0.5));
        assertFalse(check.passed());
        assertTrue(check.detail().contains("with a unit"), check.detail());
        assertTrue(Check.of("x", volts(0, 0), volts(0, 0), relative(0)).passed());
        assertTrue(Check.of("x", volts(1e-12, 0), volts(0, 0), Amount.of(1e-9, "V")).passed());
    }

    @Test
    void neverPassesOnWhatIsNotConvergedUnboundedOrWithoutError() {
        Amount good = volts(1, 0);
        Amount wandering = Amount.si(1, 1e-9, Units.POTENTIAL, Standing.notConverged("limit of evaluations"));
        Amount endless = Amount.si(Double.POSITIVE_INFINITY, Double.POSITIVE_INFINITY, Units.POTENTIAL, Standing.unbounded("on the line"));
        Amount bare = volts(1, Double.NaN);
        for (Amount bad : new Amount[] {wandering, endless, bare}) {
            Check one = Check.of("x", bad, good, relative(1));
            Check other = Check.of("x", good, bad, relative(1));
            assertFalse(one.passed() || other.passed());
            assertTrue(Double.isNaN(one.measured()));
            assertFalse(one.detail().isBlank());
        }
    }

    @Test
    void dimensionsMustAgree() {
        var wrong = assertThrows(AuthorException.class, () -> Check.of("heap", volts(1, 0), Amount.of(1, "m"), relative(1)));
        assertTrue(wrong.getMessage().contains("a length"), wrong.getMessage());
        assertThrows(AuthorException.class, () -> Check.of("x", volts(1, 0), volts(1, 0), relative(-1)));
    }

    @Test
    void vectorsByTheLengthOfTheirDifference() {
        Place here = new Place(1, 0, 0);
        Vector a = Vector.of(here, volts(3, 0), volts(4, 0), volts(0, 0));
        Vector b = Vector.of(here, volts(3, 0), volts(4, 0), volts(0.1, 0));
        assertEquals(0.1 / Math.sqrt(25.01), Check.of("x", a, b, relative(0.02)).measured(), 1e-15);
        assertTrue(Check.of("x", a, b, relative(0.02)).passed());
        assertFalse(Check.of("x", a, a.times(-1), relative(0.02)).passed());
    }
}
