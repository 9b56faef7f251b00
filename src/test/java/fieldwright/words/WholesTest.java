package fieldwright.words;

import static fieldwright.words.Words.*;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.formula.Constants;
import fieldwright.output.Output;
import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Standing;
import fieldwright.quantity.Units;
import fieldwright.quantity.Vector;
import java.util.concurrent.Callable;
import org.junit.jupiter.api.Test;

/** The words that ask about a whole: flux, voltage, energy, force, torque, moments. */
class WholesTest {
    private static final double K = 1 / (4 * Math.PI * Constants.EPS0);
    private final TestDesk desk = new TestDesk();

    private String complaint(Callable<?> cell) {
        return assertThrows(AuthorException.class, () -> desk.work(cell)).getMessage();
    }

    private static void near(double expected, Amount found) {
        assertTrue(found.isConverged(), found.standing().reason());
        assertEquals(expected, found.si(), found.error() + 1e-15 * Math.abs(expected));
        assertTrue(found.error() <= 1.1e-9 * Math.abs(expected), found.si() + " states " + found.error());
    }

    @Test
    void fluxOutOfABodyIsItsCharge() {
        Amount flux = desk.work(() -> volumeCharge(ball("R_s"), "rho_0").inFreeSpace().fluxThrough(box("1 m", "1 m", "1 m")));
        near(2.1e-6, flux);
        assertEquals(Units.CHARGE, flux.dimension());
        assertEquals(1, desk.shown(Output.Assumption.class).size());
        near(1e-9 / 6, desk.work(() -> pointCharge(at(0, 0, "-0.5 m"), "1 nC").inFreeSpace().fluxThrough(rectangle("1 m", "1 m"))));
        // induced within a radius R: q(1 − d/√(R² + d²)), the method of images
        near(-1e-9 * (1 - 0.3 / 0.5), desk.work(() -> pointCharge(at(0, 0, "0.3 m"), "1 nC").above(groundPlane("z", 0)).fluxThrough(disc("0.4 m"), "+z")));
    }

    @Test
    void voltageAlongARod() {
        near(K * 1e-9 * (1 - 0.5), desk.work(() -> pointCharge(at(0, 0, 0), "1 nC").inFreeSpace().voltageAlong(rod(at("1 m", 0, 0), at("2 m", 0, 0)))));
        assertTrue(complaint(() -> pointCharge(at(0, 0, 0), "1 nC").inFreeSpace().voltageAlong(disc("1 m"))).contains("Give a line"));
    }

    @Test
    void energies() {
        near(0.6 * K * Math.pow(4 * Math.PI / 3 * 2.1e-6, 2), desk.work(() -> volumeCharge(ball("1 m"), "rho_0").inFreeSpace().energy()));
        near(K * 2e-18 / 0.5, desk.work(() -> pointCharge(at(0, 0, 0), "1 nC").inFreeSpace().energyWith(pointCharge(at("0.5 m", 0, 0), "2 nC"))));
        near(-K * 1e-18 / 4 / 0.3, desk.work(() -> pointCharge(at(0, 0, "0.3 m"), "1 nC").above(groundPlane("z", 0)).energyBySurroundings()));
        Amount self = desk.work(() -> pointCharge(at(0, 0, 0), "1 nC").inFreeSpace().energy());
        assertEquals(Standing.Kind.UNBOUNDED, self.standing().kind());
        assertEquals(Units.ENERGY, self.dimension());
    }

    @Test
    void forcesAndTorques() {
        Vector force = desk.work(() -> pointCharge(at(0, 0, 0), "1 nC").inFreeSpace().forceOn(pointCharge(at("0.5 m", 0, 0), "2 nC").inFreeSpace()));
        near(K * 2e-18 / 0.25, force.x());
        assertEquals(Units.FORCE, force.dimension());
        Vector torque = desk.work(() -> pointCharge(at(0, 0, 0), "1 nC").inFreeSpace().torqueOn(pointCharge(at("0.5 m", 0, 0), "2 nC"), at(0, "1 m", 0)));
        near(K * 2e-18 / 0.25, torque.z());
        Distribution held = desk.work(() -> pointCharge(at(0, 0, "0.3 m"), "1 nC").above(groundPlane("z", 0)));
        near(-K * 1e-18 / 4 / 0.09, desk.work(() -> held.forceOn(held)).z());
        assertTrue(complaint(() -> held.forceOn(pointCharge(at(0, 0, "1 m"), "1 nC").inFreeSpace())).contains("different surroundings"));
        assertTrue(complaint(() -> pointCharge(at(0, 0, 0), "1 nC").forceOn(held)).contains("not stated"));
    }

    @Test
    void moments() {
        Distribution pair = desk.work(() -> sources(pointCharge(at(0, 0, "1 cm"), "1 nC"), pointCharge(at(0, 0, "-1 cm"), "-1 nC")).inFreeSpace());
        near(2e-11, desk.work(pair::dipoleMoment).z());
        assertTrue(complaint(() -> pointCharge(at(0, 0, 0), "1 nC").inFreeSpace().dipoleMoment()).contains("Name it"));
        near(1e-9, desk.work(() -> pointCharge(at(0, 0, "1 m"), "1 nC").inFreeSpace().dipoleMoment(at(0, 0, 0))).z());
        near(2e-9, desk.work(() -> pointCharge(at(0, 0, "1 m"), "1 nC").inFreeSpace().quadrupoleMoment(at(0, 0, 0)).zz()));
    }
}
