package fieldwright.words;

import static fieldwright.words.Words.along;
import static fieldwright.words.Words.at;
import static fieldwright.words.Words.cartesian;
import static fieldwright.words.Words.chargedPolyline;
import static fieldwright.words.Words.curve;
import static fieldwright.words.Words.equipotentials;
import static fieldwright.words.Words.fieldLines;
import static fieldwright.words.Words.groundPlane;
import static fieldwright.words.Words.lineCharge;
import static fieldwright.words.Words.map;
import static fieldwright.words.Words.pointCharge;
import static fieldwright.words.Words.pointCloud;
import static fieldwright.words.Words.polyline;
import static fieldwright.words.Words.profile;
import static fieldwright.words.Words.ring;
import static fieldwright.words.Words.sources;
import static fieldwright.words.Words.window;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.output.Output;
import fieldwright.output.Series;
import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import java.util.List;
import org.junit.jupiter.api.Test;

/** Searches, maps and lists of numbers in the words of a sheet; numbers against elementary closed forms. */
class MapsTest {
    private static final double EPS0 = fieldwright.formula.Constants.EPS0;

    private final TestDesk desk = new TestDesk();

    private Output.Plot plot() {
        List<Output.Plot> plots = desk.shown(Output.Plot.class);
        return plots.get(plots.size() - 1);
    }

    @Test
    void thePeakOnARingsAxis() {
        FieldPeak peak = desk.work(() -> lineCharge(ring("0.3 m"), "lambda").inFreeSpace().peakField(cartesian().x("0").y("0").z("0.01 m", "5 m")));
        double exact = 3e-9 / (2 * EPS0) * 0.3 * 2 / (3 * Math.sqrt(3) * 0.09);
        assertEquals(exact, peak.magnitude().si(), peak.magnitude().error());
        assertEquals(0.3 / Math.sqrt(2), peak.place().z(), 1e-5);
        assertTrue(peak.upTo().si() >= exact * (1 - 1e-12) && peak.upTo().si() < exact * 1.0001);
    }

    @Test
    void decayAlongAPath() {
        Amount mean = desk.work(() -> pointCharge(at("0", "0", "0"), "1 nC").inFreeSpace().decayExponent(along("r", "1 m", "20 m")));
        assertEquals(2, mean.si(), mean.error() + 1e-12);
        Amount there = desk.work(() -> pointCharge(at("0", "0", "0"), "1 nC").inFreeSpace().decayExponent(along("r", "1 m", "20 m"), "2 m"));
        assertEquals(2, there.si(), there.error());
    }

    @Test
    void equipotentialsOfAPointChargeAreCircles() {
        double level = 1e-9 / (4 * Math.PI * EPS0 * 0.2);
        desk.work(() -> {
            Distribution charge = pointCharge(at("0", "0", "0"), "1 nC").inFreeSpace();
            equipotentials("about a point", "V", window("x", "-300 mm", "300 mm", "z", "-0.3 m", "0.3 m"), charge, Amount.of(level, "V"), "1 V");
            return null;
        });
        Output.Plot plot = plot();
        assertEquals("mm", plot.x().unit());
        assertEquals(1, plot.series().size());
        Series circle = plot.series().get(0);
        for (int i = 0; i < circle.size(); i++) {
            assertEquals(0.2, Math.hypot(circle.x()[i] / 1000, circle.y()[i]), 1e-7);
        }
        assertTrue(plot.remarks().stream().anyMatch(r -> r.contains("V = 1 V is not taken")), plot.remarks().toString());
        assertTrue(plot.remarks().stream().anyMatch(r -> r.startsWith("drawn to ")), plot.remarks().toString());
        assertEquals(1, desk.shown(Output.Assumption.class).size());
    }

    @Test
    void aMapChoosesRoundLevels() {
        desk.work(() -> {
            Distribution charge = pointCharge(at("0", "0", "1 m"), "1 nC").above(groundPlane("z", "0"));
            map("field above ground", "V/m", window("rho", "0", "2 m", "z", "0", "2 m"), curve("field", charge, "|E|"));
            return null;
        });
        Output.Plot plot = plot();
        assertTrue(plot.series().size() >= 4 && plot.series().size() <= 14, plot.series().toString());
        assertTrue(plot.series().get(0).label().matches("\\|E\\| = [125]0* V/m"), plot.series().get(0).label());
        assertEquals("rho", plot.x().quantity());
    }

    @Test
    void fieldLinesSayHowTheyEnd() {
        desk.work(() -> {
            Distribution pair = sources(pointCharge(at("0", "0", "0.1 m"), "1 nC"), pointCharge(at("0", "0", "-0.1 m"), "-1 nC")).inFreeSpace();
            fieldLines("dipole", window("x", "-1 m", "1 m", "z", "-1 m", "1 m"), pair, at("0.3 m", "0", "0"), at("-0.3 m", "0", "0"));
            return null;
        });
        Output.Plot plot = plot();
        assertEquals(2, plot.series().size());
        assertEquals(List.of("2 lines from on charge to on charge"), plot.remarks());
    }

    @Test
    void listsOfNumbersAreChargesToo() {
        String rows = "# x y z q\n0, 0, 100, 2.5\n\n 50; 0; 100; -1  # second\n0 10 20 3\n";
        desk.work(() -> {
            Distribution listed = pointCloud("mm", "nC", rows).above(groundPlane("z", "0"));
            Distribution named = sources(pointCharge(at("0", "0", "0.1 m"), "2.5 nC"), pointCharge(at("0.05 m", "0", "0.1 m"), "-1 nC"),
                pointCharge(at("0", "0.01 m", "0.02 m"), "3 nC")).above(groundPlane("z", "0"));
            Amount found = listed.electricField(at("0.2 m", "0.1 m", "0.3 m")).magnitude();
            Amount expected = named.electricField(at("0.2 m", "0.1 m", "0.3 m")).magnitude();
            assertEquals(expected.si(), found.si(), 1e-14 * expected.si());
            assertEquals(4.5e-9, listed.totalCharge().si(), 1e-23);
            Distribution line = chargedPolyline("m", "nC/m", "0 0 1 3\n1 0 1 3\n1 1 1 3").inFreeSpace();
            Distribution same = lineCharge(polyline(at("0", "0", "1 m"), at("1 m", "0", "1 m"), at("1 m", "1 m", "1 m")), "lambda").inFreeSpace();
            Amount v = line.potential(at("0.2 m", "0.1 m", "0.3 m"));
            assertEquals(same.potential(at("0.2 m", "0.1 m", "0.3 m")).si(), v.si(), 1e-9 * v.si());
            profile("along", "V/m", along("x", "0", "1 m", at("0", "0", "0.5 m")), curve("line", line, "|E|"));
            return null;
        });
        assertEquals(61, plot().series().get(0).size());
    }

    @Test
    void whatIsWrongIsNamed() {
        fails("line 2", () -> pointCloud("mm", "nC", "0 0 1 1\n0 0 1"));
        fails("'a'", () -> pointCloud("mm", "nC", "0 0 1 a"));
        fails("nC", () -> pointCloud("nC", "mm", "0 0 1 1"));
        fails("rho", () -> window("rho", "-1 m", "1 m", "z", "0", "1 m"));
        fails("level", () -> {
            equipotentials("t", "V", window("x", "-1 m", "1 m", "z", "0", "1 m"), pointCharge(at("0", "0", "0"), "1 nC").inFreeSpace(), "1 m");
            return null;
        });
        fails("> 0", () -> pointCharge(at("0", "0", "0"), "1 nC").inFreeSpace().decayExponent(along("r", "0", "20 m")));
    }

    private void fails(String part, java.util.concurrent.Callable<?> work) {
        AuthorException e = assertThrows(AuthorException.class, () -> desk.work(work));
        assertTrue(e.getMessage().contains(part), e.getMessage());
    }
}
