package fieldwright.words;

import static fieldwright.words.Words.*;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNull;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.formula.Binding;
import fieldwright.formula.Constants;
import fieldwright.formula.Formula;
import fieldwright.formula.Parameter;
import fieldwright.judge.Threshold;
import fieldwright.output.Output;
import fieldwright.output.Series;
import fieldwright.output.Status;
import fieldwright.output.Value;
import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Place;
import fieldwright.quantity.Units;
import fieldwright.quantity.UnknownNameException;
import fieldwright.quantity.Vector;
import java.util.List;
import java.util.concurrent.Callable;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class WordsTest {
    private static final double EPS0 = Constants.EPS0;
    private final TestDesk desk = new TestDesk();

    private String complaint(Callable<?> cell) {
        return assertThrows(AuthorException.class, () -> desk.work(cell)).getMessage();
    }

    private static void near(double expected, Amount found) {
        assertTrue(found.isConverged(), found.standing().reason());
        assertEquals(expected, found.si(), 1e-9 * Math.abs(expected));
        assertTrue(Math.abs(expected - found.si()) <= found.error() + 4 * Math.ulp(expected), found.si() + " states " + found.error());
    }

    // Places and numbers

    @Test
    void placesTakeStringsAmountsAndBareZero() {
        assertEquals(new Place(0, 0.3, 4), desk.work(() -> at("0", Amount.of(30, "cm"), "H")));
        assertEquals(new Place(0, 0, 0), desk.work(() -> at(0, 0, 0)));
        Place turned = desk.work(() -> atCylindrical("2 m", "90 deg", "H - 1 m"));
        assertEquals(0, turned.x(), 1e-15);
        assertEquals(2, turned.y(), 1e-15);
        assertEquals(3, turned.z(), 1e-15);
    }

    @Test
    void sphericalAngleIsFromThePolarAxis() {
        Place p = desk.work(() -> atSpherical("2 m", "pi/2", "0"));
        assertEquals(2, p.x(), 1e-15);
        assertEquals(0, p.z(), 1e-15);
    }

    @Test
    void aLengthNeedsItsUnit() {
        String text = complaint(() -> at(0.3, 0, 0));
        assertTrue(text.contains("x of the place = 0.3") && text.contains("\"0.3 m\""), text);
        assertTrue(complaint(() -> at("k", 0, 0)).contains("a plain number"));
        assertTrue(complaint(() -> at("rho", 0, 0)).contains("depends on rho"));
        assertTrue(complaint(() -> at(null, 0, 0)).contains("null"));
        assertTrue(complaint(() -> at("", 0, 0)).contains("empty"));
        assertTrue(complaint(() -> atCylindrical("-1 m", 0, 0)).contains("must be >= 0"));
    }

    @Test
    void calcPutsLocalsInByName() {
        near(5 / (4 * Math.PI * EPS0 * 9), desk.work(() -> calc("Q/(4*pi*eps0*a^2)", "Q", Amount.of(5, "C"), "a", Amount.of(3, "m"))));
        near(2.1e-6 * (1 - 0.6 / 4), desk.work(() -> calc("fall", "rho", "R_s/2")));
        near(2.1e-6 * (1 - 0.6 / 4), desk.work(() -> calc("rho_v(R_s/2)")));
        near(7, desk.work(() -> calc("H + a", "a", "3 m")));
    }

    @Test
    void calcSaysWhatIsWrongWithLocals() {
        assertTrue(complaint(() -> calc("a", "a")).contains("pairs"));
        assertTrue(complaint(() -> calc("a", Amount.of(1), "a")).contains("in quotes"));
        assertTrue(complaint(() -> calc("pi", "pi", 3)).contains("reserved"));
        assertTrue(complaint(() -> calc("fall")).contains("depends on rho"));
        assertThrows(UnknownNameException.class, () -> desk.work(() -> calc("lamda")));
    }

    @Test
    void numericalErrorIsCarriedThroughLocals() {
        Amount rough = Amount.of(3, "m").withError(0.01);
        Amount square = desk.work(() -> calc("a^2", "a", rough));
        assertTrue(square.error() >= 0.06 && square.error() < 0.0602, "" + square.error());
    }

    @Test
    void plainReadsCoordinatesAsNumbers() {
        Formula fit = desk.work(() -> plain("3.2 - 0.4*x^2", "mm", "uC/m^3"));
        near(2.8e-6, desk.work(() -> calc("1*f", "f", calc2(fit, "x", "1 mm"))));
    }

    private Amount calc2(Formula f, String name, String value) {
        return Given.amount("test", f, Given.locals("test", name, value));
    }

    @Test
    void aQuantityMayBeWrittenAsOnAnInputLine() {
        near(5000, desk.work(() -> calc("5 kV/m")));
        near(2e-6, desk.work(() -> calc("2 uC/m^2")));
        desk.value("m", 2, "");
        assertTrue(complaint(() -> calc("5 kV/m")).contains("round brackets"));
        assertTrue(complaint(() -> calc("5 kV/mx")).contains("mx"));
    }

    // Regions and charge

    @Test
    void limitsMayDependOnOtherCoordinates() {
        // Cone under the heap: volume pi R^2 h/3.
        Amount q = desk.work(() -> volumeCharge(cylindrical().z("0", "H*(1 - rho/R_s)").rho("0", "R_s").phi("0", "2*pi"), "rho_0")
                .inFreeSpace().totalCharge());
        near(2.1e-6 * Math.PI * 1.8 * 1.8 * 4 / 3, q);
    }

    @Test
    void aFixedCoordinateMayDependOnOthers() {
        // Lateral surface of a cone: pi R sqrt(R^2 + H^2).
        Amount area = desk.work(() -> integral("1").over(cylindrical().rho("0", "R_s").phi("0", "2*pi").z("H*rho/R_s")));
        near(Math.PI * 1.8 * Math.hypot(1.8, 4), area);
    }

    @Test
    void parametricShapesOverParameters() {
        Amount length = desk.work(() -> integral("1").over(parametric("R_s*cos(t)", "R_s*sin(t)", "H*t/(2*pi)").over("t", "0", "2*pi")));
        near(Math.hypot(2 * Math.PI * 1.8, 4), length);
        assertTrue(complaint(() -> parametric("R_s", "0", "0").over("k", "0", "1")).contains("a name of the sheet"));
        assertTrue(complaint(() -> parametric("R_s", "0", "0").over("rho", "0", "1")).contains("coordinate"));
        assertThrows(UnknownNameException.class, () -> desk.work(() -> lineCharge(parametric("t", "0", "u").over("t", "0", "1 m"), "lambda")));
    }

    @Test
    void cyclicLimitsAndTurnedLimitsAreNamed() {
        String cycle = complaint(() -> volumeCharge(cartesian().x("0", "y").y("0", "z").z("0", "x"), "rho_0"));
        assertTrue(cycle.contains("x depends on y"), cycle);
        String turned = complaint(() -> volumeCharge(cartesian().x("H", "R_s").y("0", "H").z("0", "H"), "rho_0").inFreeSpace().totalCharge());
        assertTrue(turned.contains("4") && turned.contains("1.8"), turned);
        assertTrue(complaint(() -> cartesian().x("0", "H").x("0")).contains("twice"));
        assertTrue(complaint(() -> surfaceCharge(cartesian().x("0", "H").y("0", "H"), "sigma_0")).contains("z"));
    }

    @Test
    void regionAndDensityMustFit() {
        String flat = complaint(() -> volumeCharge(disc("R_s"), "rho_0"));
        assertTrue(flat.contains("a surface") && flat.contains("surfaceCharge"), flat);
        String unit = complaint(() -> volumeCharge(ball("R_s"), "sigma_0"));
        assertTrue(unit.contains("sigma_0") && unit.contains("C/m^2") && unit.contains("C/m^3"), unit);
        assertTrue(complaint(() -> lineCharge(cartesian().x(0).y(0).z(0), "lambda")).contains("pointCharge"));
        assertTrue(complaint(() -> pointCharge(at(0, 0, 0), "3 m")).contains("must be a charge"));
    }

    @ParameterizedTest
    @ValueSource(strings = {"moved", "turned"})
    void densityTravelsWithItsRegion(String how) {
        Amount e = desk.work(() -> {
            Shape bar = cartesian().x("0", "H").y("0").z("0");
            Shape placed = how.equals("moved") ? bar.movedBy(0, "1 m", 0) : bar.turnedAbout("z", "90 deg");
            return lineCharge(placed, "lambda*x/H").inFreeSpace().totalCharge();
        });
        near(3e-9 * 2, e);
    }

    @Test
    void bodiesHaveTheirMeasures() {
        near(4 * Math.PI / 3 * Math.pow(1.8, 3), measure(() -> ball("R_s")));
        near(4 * Math.PI * Math.pow(1.8, 2), measure(() -> shell("R_s")));
        near(2 * Math.PI * 1.8, measure(() -> ring("R_s")));
        near(1.8 * 0.5, measure(() -> arc("R_s", "0", "0.5")));
        near(Math.PI * 1.8 * 1.8, measure(() -> disc("R_s")));
        near(Math.PI * (1.8 * 1.8 - 1), measure(() -> annulus("1 m", "R_s")));
        near(1.8 * 4, measure(() -> rectangle("R_s", "H")));
        near(2 * Math.PI * 1.8 * 4, measure(() -> tube("R_s", "H")));
        near(Math.PI * 1.8 * 1.8 * 4, measure(() -> cylinder("R_s", "H")));
        near(Math.PI * 1.8 * 1.8 * 4 / 3, measure(() -> cone("R_s", "H")));
        near(1.8 * 4 * 0.5, measure(() -> box("R_s", "H", "0.5 m")));
        near(2 * Math.PI * Math.PI * 4 * 0.25, measure(() -> torus("H", "0.5 m")));
        near(5, measure(() -> rod(at(0, 0, 0), at("3 m", 0, "4 m"))));
        near(7, measure(() -> polyline(at(0, 0, 0), at("3 m", 0, 0), at("3 m", 0, "4 m"))));
        near(6, measure(() -> polygon(at(0, 0, 0), at("3 m", 0, 0), at("3 m", "4 m", 0))));
        near(2 * Math.hypot(2 * Math.PI * 1.8, 1), measure(() -> helix("R_s", "1 m", 2)));
    }

    private Amount measure(Callable<Shape> shape) {
        return desk.work(() -> integral("1").over(shape.call()));
    }

    @Test
    void aDensityMayHaveAConditionThatHoldsOverItsRegion() {
        desk.names.put("inner", new Binding.Definition(List.of(new Parameter("s", Units.LENGTH)),
                Formula.parse("rho_0*(1 - k*(s/R_s)^2)").bind(desk, java.util.Set.of("s")),
                Formula.parseCondition("s <= R_s").bind(desk, java.util.Set.of("s"))));
        Amount free = desk.work(() -> volumeCharge(cylinder("R_s", "H"), "fall").inFreeSpace().electricField(at("0.2 m", 0, "3.5 m")).z());
        Amount guarded = desk.work(() -> volumeCharge(cylinder("R_s", "H"), "inner(rho)").inFreeSpace().electricField(at("0.2 m", 0, "3.5 m")).z());
        assertEquals(free.si(), guarded.si(), 0);
        String text = complaint(() -> volumeCharge(cylinder("1.01*R_s", "H"), "inner(rho)").inFreeSpace().electricField(at(0, 0, "5 m")));
        assertTrue(text.contains("s <= R_s"), text);
        String charge = complaint(() -> volumeCharge(cylinder("1.01*R_s", "H"), "inner(rho)").inFreeSpace().totalCharge());
        assertTrue(charge.contains("s <= R_s"), charge);
    }

    // Surroundings and questions

    @Test
    void withoutSurroundingsNothingIsAnswered() {
        Distribution cloud = desk.work(() -> volumeCharge(ball("R_s"), "rho_0"));
        for (Callable<?> ask : List.<Callable<?>>of(cloud::totalCharge, () -> cloud.electricField(at(0, 0, 0)),
                () -> cloud.fluxDensity(at(0, 0, 0)), () -> cloud.potential(at(0, 0, 0)))) {
            String text = complaint(ask);
            assertTrue(text.contains("volume charge") && text.contains(".inFreeSpace()") && text.contains("groundPlane"), text);
        }
        String both = complaint(() -> sources(cloud, cloud.inFreeSpace()).totalCharge());
        assertTrue(both.contains("sources"), both);
        assertTrue(complaint(() -> cloud.inFreeSpace().inMedium(2)).contains("stated twice"));
        assertTrue(desk.outputs.isEmpty());
    }

    @Test
    void everyQuestionStatesItsSurroundingsOnce() {
        desk.work(() -> {
            Distribution q = pointCharge(at(0, 0, "1 m"), "2 nC");
            q.inFreeSpace().electricField(at(0, 0, 0));
            q.inFreeSpace().potential(at(0, 0, 0));
            q.under(groundPlane("z", "H")).totalCharge();
            return q.inMedium("1 + k").totalCharge();
        });
        List<String> said = desk.shown(Output.Assumption.class).stream().map(Output.Assumption::text).toList();
        assertEquals(3, said.size(), said.toString());
        assertEquals("free space: no conductor or dielectric near", said.get(0));
        assertTrue(said.get(1).startsWith("ground plane z = H (4 m), field region z < H (4 m)"), said.get(1));
        assertTrue(said.get(2).contains("1 + k = 1.6"), said.get(2));
    }

    @Test
    void pointChargeByCoulombsLaw() {
        Vector e = desk.work(() -> pointCharge(at(0, 0, 0), "2 nC").inFreeSpace().electricField(at(0, "3 m", "4 m")));
        near(2e-9 / (4 * Math.PI * EPS0 * 25), e.magnitude());
        near(0.8 * 2e-9 / (4 * Math.PI * EPS0 * 25), e.z());
        near(2e-9 / (4 * Math.PI * 25), desk.work(() -> pointCharge(at(0, 0, 0), "2 nC").inMedium(2.3).fluxDensity(at(0, 0, "5 m")).z()));
        near(2e-9 / (4 * Math.PI * EPS0 * 2.3 * 5), desk.work(() -> pointCharge(at(0, 0, 0), "2 nC").inMedium(2.3).potential(at(0, 0, "5 m"))));
    }

    private String said() {
        return desk.shown(Output.Assumption.class).toString();
    }

    @Test
    void surroundingsAreSaidInWordsAndPrinted() {
        Distribution corner = desk.work(() -> pointCharge(at("1 m", 0, "2 m"), "2 nC").inCorner(groundPlane("z", 0), "+z", groundPlane("x", 0), "+x"));
        near(2e-9 / (4 * Math.PI * EPS0) * (1 - 1 / 3.0 - 1 / Math.sqrt(5) + 1 / Math.sqrt(13)),
                desk.work(() -> corner.potential(at("1 m", 0, "1 m"))));
        Distribution pair = desk.work(() -> pointCharge(at(0, 0, "H/2"), "2 nC").between(groundPlanes("z", "0", "H")));
        assertEquals(0, desk.work(() -> pair.potential(at(0, 0, "H"))).si());
        assertTrue(said().contains("ground planes z = 0 and z = H (4 m)"), said());
        Distribution box = desk.work(() -> pointCharge(at("1 m", "1 m", "1 m"), "2 nC").inside(groundedBox(at(0, 0, 0), at("2 m", "2 m", "H"))));
        assertEquals(0, desk.work(() -> box.potential(at("2 m", "1 m", "1 m"))).si());
        Distribution drum = desk.work(() -> pointCharge(at(0, 0, "1 m"), "2 nC").inside(groundedDrum("z", at(0, 0, 0), "R_s", "0", "H")));
        assertEquals(0, desk.work(() -> drum.potential(at("R_s", 0, "1 m"))).si());
        assertTrue(said().contains("radius R_s (1.8 m), ends at z = 0 and z = H (4 m)"), said());
        assertTrue(desk.work(() -> drum.inducedDensity(at("R_s", 0, "1 m"))).si() < 0);
        assertTrue(complaint(() -> drum.inducedDensity(at("1 m", 0, "2 m"))).contains("0.8 m from the surface"));
        assertTrue(desk.work(() -> pointCharge(at(0, 0, "1 m"), "2 nC").inside(groundedTube("z", at(0, 0, 0), "R_s")).potential(at(0, 0, 0))).si() > 0);
        Distribution alone = desk.work(() -> noCharge().outside(floatingSphere(at(0, 0, 0), "0.5 m", "3 nC")));
        near(3e-9 / (4 * Math.PI * EPS0 * 2), desk.work(() -> alone.potential(at("2 m", 0, 0))));
        near(50, desk.work(() -> noCharge().outside(sphereHeldAt("100 V", at(0, 0, 0), "0.5 m")).potential(at("1 m", 0, 0))));
        near(3 * 2000, desk.work(() -> noCharge().outside(groundedSphere(at(0, 0, 0), "0.5 m")).inUniformField(0, 0, "2 kV/m")
                .electricField(at(0, 0, "0.5 m")).onSide("+z").z()));
        assertTrue(said().contains("uniform field (0, 0, 2 kV/m) applied"), said());
        assertTrue(complaint(() -> noCharge().inUniformField(0, 0, "2 kV/m")).contains("surroundings"));
        assertTrue(complaint(() -> noCharge().inFreeSpace().inUniformField(0, 0, "2 kV/m").potential(at(0, 0, 0))).contains("zeroAt"));
        assertTrue(complaint(() -> noCharge().inCorner(groundPlane("z", 0), "+x", groundPlane("x", 0), "+x")).contains("\"+z\""));
        assertTrue(complaint(() -> pointCharge(at(0, 0, "5 m"), "2 nC").between(groundPlanes("z", "0", "H")).potential(at(0, 0, "1 m"))).contains("planes"));
    }

    @Test
    void groundPlanesMirror() {
        double q = 2e-9;
        Vector above = desk.work(() -> pointCharge(at(0, 0, "1 m"), "2 nC").above(groundPlane("z", 0)).electricField(at(0, 0, 0)));
        near(-q / (2 * Math.PI * EPS0), above.onSide("+z").z());
        assertEquals(0, above.onSide("-z").magnitude().si(), 0);
        Vector under = desk.work(() -> pointCharge(at(0, 0, "3 m"), "2 nC").under(groundPlane("z", "H")).electricField(at(0, 0, "H")));
        near(q / (2 * Math.PI * EPS0), under.onSide("-z").z());
        Vector beside = desk.work(() -> pointCharge(at("1 m", 0, 0), "2 nC").beside(groundPlane("x", 0), "+x").electricField(at(0, 0, 0)));
        near(-q / (2 * Math.PI * EPS0), beside.onSide("+x").x());
        assertTrue(complaint(() -> pointCharge(at(0, 0, "1 m"), "2 nC").above(groundPlane("x", 0))).contains("beside"));
        assertTrue(complaint(() -> pointCharge(at(0, 0, "1 m"), "2 nC").beside(groundPlane("x", 0), "+y")).contains("\"+x\""));
        assertTrue(complaint(() -> pointCharge(at(0, 0, "5 m"), "2 nC").under(groundPlane("z", "H")).totalCharge().plus(
                pointCharge(at(0, 0, "5 m"), "2 nC").under(groundPlane("z", "H")).potential(at(0, 0, 0)))).contains("behind"));
        assertTrue(complaint(() -> groundPlane("rho", 0)).contains("axis"));
    }

    @Test
    void dielectricsAndEarthedSpheres() {
        double q = 2e-9;
        // Image charge -q (eps_r - 1)/(eps_r + 1) behind the face (common practice).
        Distribution facing = desk.work(() -> pointCharge(at(0, 0, "1 m"), "2 nC").facing(dielectricHalfSpace("-z", 0, 3)));
        near(q / (4 * Math.PI * EPS0) * (1.0 / 1 - 0.5 / 3), desk.work(() -> facing.potential(at(0, 0, "2 m"))));
        // Image charge -q a/d at a^2/d from the centre (common practice).
        Distribution outside = desk.work(() -> pointCharge(at(0, 0, "2 m"), "2 nC").outside(groundedSphere(at(0, 0, 0), "1 m")));
        near(q / (4 * Math.PI * EPS0) * (1.0 / 1 - 0.5 / 2.5), desk.work(() -> outside.potential(at(0, 0, "3 m"))));
        assertEquals(2, desk.shown(Output.Assumption.class).size());
    }

    @Test
    void sourcesAdd() {
        Amount both = desk.work(() -> sources(pointCharge(at(0, 0, 0), "2 nC"), pointCharge(at("1 m", 0, 0), "3 nC")).inFreeSpace().totalCharge());
        near(5e-9, both);
        Amount stated = desk.work(() -> sources(pointCharge(at(0, 0, 0), "2 nC").inFreeSpace(), pointCharge(at("1 m", 0, 0), "3 nC").inFreeSpace())
                .potential(at(0, 0, "2 m")));
        near((2e-9 / 2 + 3e-9 / Math.sqrt(5)) / (4 * Math.PI * EPS0), stated);
        assertTrue(complaint(() -> sources(pointCharge(at(0, 0, 0), "2 nC").inFreeSpace(), pointCharge(at("1 m", 0, 0), "3 nC").inMedium(2)))
                .contains("different surroundings"));
    }

    @Test
    void endlessChargeHasLimitsOfItsOwn() {
        near(3e-9 / (2 * Math.PI * EPS0 * 1.8), desk.work(() -> endlessLine("lambda").inFreeSpace().electricField(at("R_s", 0, "H")).x()));
        near(3e-9 / (2 * Math.PI * EPS0 * 4), desk.work(() -> endlessLine("lambda", "y", at(0, 0, "H")).inFreeSpace()
                .electricField(at(0, "9 m", 0)).z().negated()));
        near(2.5e-6, desk.work(() -> endlessPlane("sigma_0").inFreeSpace().fluxDensity(at("1 m", 0, "H")).z()));
        Vector on = desk.work(() -> endlessPlane("sigma_0", "x", "R_s").inFreeSpace().fluxDensity(at("R_s", 0, 0)));
        near(2.5e-6, on.onSide("+x").x());
        near(-2.5e-6, on.onSide("-x").x());
        near(2.1e-6 * 4 / (2 * EPS0), desk.work(() -> slab("rho_0", 0, "H").inFreeSpace().electricField(at(0, 0, "2*H")).z()));
        near(5e-6 / (Math.PI * EPS0) * Math.atan(0.9 / 4), desk.work(() -> strip("sigma_0", "R_s").inFreeSpace().electricField(at(0, 0, "H")).z()));
        near(2.1e-6 * 1.8 * 1.8 / (2 * EPS0 * 4), desk.work(() -> endlessCylinder("rho_0", "R_s").inFreeSpace().electricField(at("H", 0, 0)).x()));
    }

    @Test
    void potentialOfEndlessChargeNeedsAZero() {
        Distribution line = desk.work(() -> endlessLine("lambda").inFreeSpace());
        assertTrue(complaint(() -> line.potential(at("1 m", 0, 0))).contains("zeroAt"));
        near(3e-9 / (2 * Math.PI * EPS0) * Math.log(2), desk.work(() -> line.zeroAt(at("2 m", 0, 0)).potential(at("1 m", 0, 0))));
    }

    @Test
    void onChargeThereArePairsOrNoBound() {
        Vector on = desk.work(() -> surfaceCharge(rectangle("H", "H"), "sigma_0").inFreeSpace().electricField(at("0.3 m", "0.1 m", 0)));
        assertTrue(complaint(() -> on.z()).contains("onSide"));
        near(5e-6 / EPS0, desk.work(() -> on.jump().z()));
        Vector edge = desk.work(() -> lineCharge(ring("R_s"), "lambda").inFreeSpace().electricField(at("R_s", 0, 0)));
        assertEquals(Status.UNBOUNDED, Outputs.value(edge).status());
    }

    // Integrals

    @Test
    void integralsWithAndWithoutMeasure() {
        near(2.1e-6 * Math.PI * 1.8 * 1.8 * 4 * (1 - 0.3), desk.work(() -> integral("fall").over(cylinder("R_s", "H"))));
        near(1.8 * 1.8 * 4 / 2, desk.work(() -> integral("1").d("z", 0, "H").d("x", "0", "R_s").d("y", "0", "x").value()));
        near(9, desk.work(() -> integral("2*x").d("x", 0, Amount.of(3, "m")).value()));
        assertTrue(complaint(() -> integral("x").value()).contains("nothing to integrate over"));
        assertTrue(complaint(() -> integral("x").d("x", 0, 1).over(ball("H"))).contains("exclude each other"));
    }

    // Verdicts

    @Test
    void checksTakeFormulasPercentAndUnits() {
        desk.work(() -> {
            check("by hand", calc("H"), "4 m", 1e-12);
            check("roughly", "H", "4.1 m", "5 %");
            check("within", "H", "4.1 m", "5 cm");
            return null;
        });
        List<Output.Check> checks = desk.shown(Output.Check.class);
        assertTrue(checks.get(0).passed() && checks.get(1).passed());
        assertFalse(checks.get(2).passed());
        assertEquals("m", checks.get(2).unit());
        assertTrue(complaint(() -> {
            check("mixed", "H", pointCharge(at(0, 0, 0), "1 nC").inFreeSpace().electricField(at("1 m", 0, 0)), 1);
            return null;
        }).contains("vector stands against a number"));
    }

    @Test
    void assessmentsCarrySourceAndCaution() {
        desk.work(() -> {
            assess("roof", calc("250 (kV/m)"), airBreakdown(), 10);
            assess(calc("400 (kV/m)"), dischargeAtProjection(), 2);
            assess(calc("400 (kV/m)"), threshold("probe", "1 (MV/m)", "maker's sheet 4", "dry air only"), 2);
            return null;
        });
        List<Output.Assessment> all = desk.shown(Output.Assessment.class);
        assertTrue(all.get(0).passed());
        assertEquals("roof", all.get(0).label());
        assertEquals(12, all.get(0).marginFound(), 1e-9);
        assertFalse(all.get(1).passed());
        assertTrue(all.get(2).passed());
        assertEquals("maker's sheet 4", all.get(2).source());
        assertTrue(all.stream().noneMatch(a -> a.caution().isBlank()));
        assertTrue(complaint(() -> new Threshold("x", Amount.of(1, "V"), "", "")).contains("no source"));
    }

    // Looks

    @Test
    void profilesHaveAxesWithNamesAndUnits() {
        desk.work(() -> {
            Distribution q = pointCharge(at(0, 0, 0), "2 nC").inFreeSpace();
            profile("Field over the charge", "kV/m", along("z", "10 cm", "50 cm"), curve("charge", q, "E_z"),
                    curve("by hand", "2 nC/(4*pi*eps0*z^2)"));
            return null;
        });
        Output.Plot plot = desk.shown(Output.Plot.class).get(0);
        assertEquals("z / cm", plot.x().heading());
        assertEquals("E_z / (kV/m)", plot.y().heading());
        Series charge = plot.series().get(0);
        Series hand = plot.series().get(1);
        assertEquals(10, charge.x()[0], 1e-12);
        assertEquals(50, charge.x()[charge.size() - 1], 1e-12);
        for (int i = 0; i < charge.size(); i++) {
            assertEquals(hand.y()[i], charge.y()[i], 1e-6 * hand.y()[i]);
            assertTrue(Math.abs(hand.y()[i] - charge.y()[i]) <= charge.error()[i] + 1e-15 * hand.y()[i]);
        }
        assertTrue(plot.remarks().isEmpty());
    }

    @Test
    void aProfileJumpsAcrossACharge() {
        desk.work(() -> {
            profile("Through a charged plane", "uC/m^2", between(at(0, 0, "-1 m"), at(0, 0, "1 m")),
                    curve("plane", endlessPlane("sigma_0").inFreeSpace(), "D_z"));
            return null;
        });
        Series s = desk.shown(Output.Plot.class).get(0).series().get(0);
        int middle = 30;
        assertEquals(s.x()[middle], s.x()[middle + 1], 0);
        assertEquals(-2.5, s.y()[middle], 1e-12);
        assertEquals(2.5, s.y()[middle + 1], 1e-12);
    }

    @Test
    void aProfileLeavesGapsAndSaysWhy() {
        desk.work(() -> {
            profile("Past a charge", "V", along("x", "-1 m", "1 m"), curve("charge", pointCharge(at(0, 0, 0), "2 nC").inFreeSpace(), "V"));
            return null;
        });
        Output.Plot plot = desk.shown(Output.Plot.class).get(0);
        assertTrue(Double.isNaN(plot.series().get(0).y()[30]));
        assertTrue(plot.remarks().get(0).startsWith("charge: 1 point is left out"), plot.remarks().toString());
        desk.work(() -> {
            profile("Along the plane", "V/m", along("x", "-1 m", "1 m"),
                    curve("field", pointCharge(at(0, 0, "1 m"), "2 nC").above(groundPlane("z", 0)), "E_z"));
            return null;
        });
        assertEquals(-2e-9 / (2 * Math.PI * EPS0), desk.shown(Output.Plot.class).get(1).series().get(0).y()[30], 1e-9);
        assertTrue(complaint(() -> {
            profile("In the film", "V/m", along("x", "-1 m", "1 m"), curve("field", endlessPlane("sigma_0").inFreeSpace(), "E_z"));
            return null;
        }).contains("to one side"));
        assertTrue(complaint(() -> curve("c", pointCharge(at(0, 0, 0), "2 nC").inFreeSpace(), "E_q")).contains("E_z"));
        assertTrue(complaint(() -> along("phi", "0", "1")).contains("through which place"));
        assertTrue(complaint(() -> along("x", "1 m", "0")).contains("start must lie below"));
    }

    @Test
    void tablesAreHeadedQuantityOverUnit() {
        desk.work(() -> {
            table("Sizes", column("R", "cm", "R_s", "H/3"), column("n", "", amounts(1, 2)), column("d", "m", amounts("1 m", "2 m"), r -> r.times(2)));
            return null;
        });
        Output.Table table = desk.shown(Output.Table.class).get(0);
        assertEquals(List.of("R / cm", "n", "d / m"), table.headings());
        assertEquals(List.of(List.of("180", "1", "2"), List.of("133.333", "2", "4")), table.rows());
        assertTrue(complaint(() -> {
            table("t", column("a", "", 1), column("b", "", 1, 2));
            return null;
        }).contains("as many"));
        assertTrue(complaint(() -> column("a", "V", "H")).contains("does") || complaint(() -> column("a", "V", "H")).contains("unit 'V'"));
    }

    @Test
    void aReplayShowsNoPicturesButJudges() {
        desk.mode = Desk.Mode.REPLAY;
        desk.work(() -> {
            profile("p", "V", along("x", "1 m", "2 m"), curve("c", "H*1 (V/m)"));
            table("t", column("R", "m", "R_s"));
            show("text");
            assess("roof", calc("250 (kV/m)"), airBreakdown(), 10);
            return null;
        });
        assertEquals(1, desk.outputs.size());
        assertEquals("roof", ((Output.Assessment) desk.outputs.get(0)).label());
    }

    @Test
    void resultsGoToTheDeskInTheirUnit() {
        desk.work(() -> result("E_roof", calc("250 (kV/m)"), "MV/m"));
        assertEquals("MV/m", ((Amount) desk.results.get("E_roof")).shown());
        Value.Scalar scalar = Outputs.scalar((Amount) desk.results.get("E_roof"));
        assertEquals(250e3, scalar.value(), 0);
        assertEquals("MV/m", scalar.shown().unit());
        assertNull(scalar.tolerance());
    }

    @Test
    void accuracyAndClosedFormsAreAskedByDistribution() {
        Amount disc = desk.work(() -> surfaceCharge(disc("R_s"), "sigma_0").inFreeSpace().potential(at(0, "0.3 m", "0.7 m")));
        Amount panels = desk.work(() -> surfaceCharge(disc("R_s"), "sigma_0").inFreeSpace().closedForms("off").potential(at(0, "0.3 m", "0.7 m")));
        assertEquals(disc.si(), panels.si(), disc.error() + panels.error());
        assertTrue(disc.error() != panels.error(), "one and the same method");
        Amount loose = desk.work(() -> surfaceCharge(disc("R_s"), "sigma_0*sqrt(1 - 0.5*(rho/R_s)^2)").toAccuracy(1e-3).inFreeSpace().potential(at(0, "0.3 m", "0.7 m")));
        Amount tight = desk.work(() -> surfaceCharge(disc("R_s"), "sigma_0*sqrt(1 - 0.5*(rho/R_s)^2)").inFreeSpace().toAccuracy("1e-11").potential(at(0, "0.3 m", "0.7 m")));
        assertEquals(tight.si(), loose.si(), loose.error());
        assertTrue(tight.isConverged() && tight.error() < 1e-11 * tight.si() && loose.error() > 10 * tight.error(), tight.error() + " " + loose.error());
        assertTrue(complaint(() -> surfaceCharge(disc("R_s"), "sigma_0*rho/R_s").inFreeSpace().closedForms("only").potential(at(0, 0, "1 m")))
                .contains("not the same all over"));
        assertTrue(complaint(() -> surfaceCharge(disc("R_s"), "sigma_0").closedForms("maybe")).contains("\"only\""));
        assertTrue(complaint(() -> surfaceCharge(disc("R_s"), "sigma_0").toAccuracy(2)).contains("between 1e-14 and 0.1"));
    }

    @Test
    void aMissingPlaceIsNamed() {
        assertTrue(complaint(() -> pointCharge(null, "1 nC")).contains("place"));
        assertTrue(complaint(() -> pointCharge(at(0, 0, 0), "1 nC").inFreeSpace().electricField(null)).contains("place"));
        assertTrue(complaint(() -> pointCharge(at(0, 0, 0), "1 nC").inFreeSpace().potential(null)).contains("place"));
        assertTrue(complaint(() -> pointCharge(at(0, 0, 0), "1 nC").inFreeSpace().zeroAt(null)).contains("place"));
    }

    @Test
    void outsideACellWordsSayso() {
        assertThrows(IllegalStateException.class, () -> calc("1"));
    }
}
