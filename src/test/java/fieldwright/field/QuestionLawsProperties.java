package fieldwright.field;

import static fieldwright.field.Charges.*;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Random;

import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.ShrinkingMode;
import net.jqwik.api.constraints.IntRange;

import fieldwright.charge.Source;
import fieldwright.charge.Sources;
import fieldwright.charge.Surroundings;
import fieldwright.geometry.Bodies;
import fieldwright.geometry.Region;
import fieldwright.quantity.Amount;
import fieldwright.quantity.Place;
import fieldwright.quantity.Vector;

/** Laws of the questions about wholes, for random bodies; what is allowed is what the answers state. */
class QuestionLawsProperties {
    private static final String SEED = "20261202";
    /** At most 4000 places, so that some hard cases end unconverged: their stated error is as true as that of the others. */
    private static final Accuracy ACCURACY = new Accuracy(1e-6, 0, 200_000);

    private static final Accuracy COARSE = new Accuracy(1e-4, 0, 800_000);

    private static double between(Random random, double a, double b) {
        return a + (b - a) * random.nextDouble();
    }

    /** A line, surface or volume of a size about 1 with a density that is no constant, turned about. */
    private static Region region(Random random, int kind) {
        Region own = switch (kind) {
            case 0 -> rod(0, 0, -between(random, 0.2, 0.7), 0.1, 0, between(random, 0.2, 0.7));
            case 1 -> ring(between(random, 0.2, 0.6));
            case 2 -> rectangle(between(random, 0.3, 1), between(random, 0.3, 1));
            case 3 -> disc(between(random, 0.2, 0.6));
            case 4 -> box(-0.3, between(random, 0.1, 0.4), -0.2, 0.2, -0.4, between(random, 0, 0.4));
            default -> ball(between(random, 0.2, 0.5));
        };
        return own.turnedAbout(between(random, -1, 1), between(random, -1, 1), between(random, 0.1, 1), between(random, 0, 3));
    }

    private static String density(Random random, int kind) {
        return "1e-9*(" + between(random, 0.5, 2) + " + " + between(random, -1, 1) + (kind == 1 || kind == 3 ? "*cos(phi)" : kind == 2 ? "*x" : "*z") + ")";
    }

    private static Source body(Random random, int kind, double away) {
        return charge(region(random, kind).movedBy(away * between(random, 0.9, 1.2), between(random, -0.3, 0.3), between(random, -0.3, 0.3)), density(random, kind));
    }

    private static void converged(Amount a) {
        assertTrue(a.isConverged(), () -> a + " " + a.standing());
    }

    /** Converged, or at least of use: known to a thousandth of {@code size}. */
    private static void known(Amount a, double size) {
        assertTrue(a.isConverged() || a.error() < 1e-3 * size, () -> a + " " + a.standing());
    }

    private static void same(Vector a, Vector b, double sign) {
        double size = Math.max(a.magnitude().si(), b.magnitude().si());
        known(a.x(), size);
        known(b.x(), size);
        assertEquals(a.x().si(), sign * b.x().si(), a.x().error() + b.x().error());
        assertEquals(a.y().si(), sign * b.y().si(), a.y().error() + b.y().error());
        assertEquals(a.z().si(), sign * b.z().si(), a.z().error() + b.z().error());
    }

    /** What goes out of a closed surface is what is inside: here all of a body, none of it, or a part known by another integral. */
    @Property(tries = 3, seed = SEED, shrinking = ShrinkingMode.OFF)
    void gauss(@ForAll @IntRange(min = 0, max = 5) int kind, @ForAll @IntRange(min = 0, max = 100_000) int number) {
        Random random = new Random(number);
        Source body = body(random, kind, 0);
        double cut = between(random, -0.15, 0.15);
        // a box and its neighbour, whose common face cuts the body: together they hold all of it
        Amount low = Flux.of(body, COARSE).through(box(-2, cut, -1.5, 1.5, -1.5, 1.5), null);
        Amount high = Flux.of(body, COARSE).through(box(cut, 2, -1.5, 1.5, -1.5, 1.5), null);
        Amount all = FieldSolver.totalCharge(body, COARSE);
        known(low, 2e-9);
        known(high, 2e-9);
        assertEquals(all.si(), low.si() + high.si(), low.error() + high.error() + all.error());
        Amount none = Flux.of(body, COARSE).through(ball(0.4).movedBy(3, 0, 0), null);
        converged(none);
        assertEquals(0, none.si(), none.error());
    }

    /** A box of uniform charge in a box, each cutting the other: the common part. */
    @Property(tries = 2, seed = SEED, shrinking = ShrinkingMode.OFF)
    void gaussByCommonPart(@ForAll @IntRange(min = 0, max = 100_000) int number) {
        Random random = new Random(number);
        double[] a = new double[6];
        double[] b = new double[6];
        double common = 1;
        for (int k = 0; k < 6; k += 2) {
            a[k] = between(random, -1, 0);
            a[k + 1] = between(random, 0.1, 1);
            b[k] = between(random, -1, 0);
            b[k + 1] = between(random, 0.1, 1);
            common *= Math.min(a[k + 1], b[k + 1]) - Math.max(a[k], b[k]);
        }
        Amount flux = Flux.of(charge(box(a[0], a[1], a[2], a[3], a[4], a[5]), "1"), COARSE).through(box(b[0], b[1], b[2], b[3], b[4], b[5]), null);
        known(flux, 10 * common);
        assertEquals(common, flux.si(), flux.error());
    }

    /** No voltage round a closed path, through the body too. */
    @Property(tries = 6, seed = SEED, shrinking = ShrinkingMode.OFF)
    void circulation(@ForAll @IntRange(min = 2, max = 5) int kind, @ForAll @IntRange(min = 0, max = 100_000) int number) {
        Random random = new Random(number);
        Source body = body(random, kind, 0);
        Place a = new Place(between(random, -1, -0.6), between(random, -0.2, 0.2), 0.1);
        Place b = new Place(between(random, 0.6, 1), between(random, -0.1, 0.1), 0.05);
        Place c = new Place(0.1, between(random, 0.7, 1), 0.3);
        Amount round = Flux.of(body, ACCURACY).along(Bodies.polyline(List.of(a, b, c, a)));
        Amount part = Flux.of(body, ACCURACY).along(Bodies.rod(a, b));
        converged(round);
        assertEquals(0, round.si(), round.error());
        FieldSolver solver = FieldSolver.of(body, ACCURACY);
        Amount expected = solver.potential(a).minus(solver.potential(b));
        converged(part);
        assertEquals(expected.si(), part.si(), expected.error() + part.error());
    }

    @Property(tries = 3, seed = SEED, shrinking = ShrinkingMode.OFF)
    void reciprocityActionAndReaction(@ForAll @IntRange(min = 0, max = 5) int kind, @ForAll @IntRange(min = 0, max = 5) int other,
            @ForAll @IntRange(min = 0, max = 100_000) int number) {
        Random random = new Random(number);
        Source a = body(random, kind, 0);
        Source b = body(random, other, 1.6);
        Amount one = Interaction.of(a, ACCURACY).energyWith(b);
        Amount two = Interaction.of(b, ACCURACY).energyWith(a);
        known(one, Math.abs(one.si()));
        known(two, Math.abs(one.si()));
        assertEquals(one.si(), two.si(), one.error() + two.error());
        same(Interaction.of(a, ACCURACY).forceOn(b), Interaction.of(b, ACCURACY).forceOn(a), -1);
        Place about = new Place(0.2, -0.4, 0.1);
        same(Interaction.of(a, ACCURACY).torqueOn(b, about), Interaction.of(b, ACCURACY).torqueOn(a, about), -1);
    }

    @Property(tries = 3, seed = SEED, shrinking = ShrinkingMode.OFF)
    void superposition(@ForAll @IntRange(min = 0, max = 5) int kind, @ForAll @IntRange(min = 0, max = 100_000) int number) {
        Random random = new Random(number);
        Source a = body(random, kind, 0);
        Source b = body(random, (kind + 2) % 6, -1.6);
        Source c = body(random, (kind + 3) % 6, 1.6);
        Vector whole = Interaction.of(new Sources(List.of(a, b)), ACCURACY).forceOn(c);
        same(whole, Interaction.of(a, ACCURACY).forceOn(c).plus(Interaction.of(b, ACCURACY).forceOn(c)), 1);
    }

    /** Sizes grown by s at the same total: energies fall by s, forces by s²; turned with all, a force turns. */
    @Property(tries = 3, seed = SEED, shrinking = ShrinkingMode.OFF)
    void scaleAndTurn(@ForAll @IntRange(min = 0, max = 100_000) int number) {
        double s = between(new Random(number), 0.2, 5);
        Source film = charge(rectangle(1, 0.6), "1e-9");
        Source rod = charge(rod(0.1, 0.2, 0.4, 0.3, -0.2, 0.9), "1e-9");
        Source bigFilm = charge(rectangle(s, 0.6 * s), 1e-9 / s / s + "");
        Region grown = rod(0.1 * s, 0.2 * s, 0.4 * s, 0.3 * s, -0.2 * s, 0.9 * s);
        Source bigRod = charge(grown, 1e-9 / s + "");
        Vector f = Interaction.of(film, ACCURACY).forceOn(rod);
        same(f, Interaction.of(bigFilm, ACCURACY).forceOn(bigRod).times(s * s), 1);
        Amount u = Interaction.of(film, ACCURACY).energy();
        Amount big = Interaction.of(bigFilm, ACCURACY).energy();
        assertEquals(u.si(), s * big.si(), u.error() + s * big.error());
        double angle = between(new Random(number), -3, 3);
        Vector turned = Interaction.of(charge(rectangle(1, 0.6).turnedAbout(1, 0, 0, angle), "1e-9"), ACCURACY)
            .forceOn(charge(rod(0.1, 0.2, 0.4, 0.3, -0.2, 0.9).turnedAbout(1, 0, 0, angle), "1e-9"));
        assertEquals(f.x().si(), turned.x().si(), f.x().error() + turned.x().error());
        assertEquals(Math.cos(angle) * f.y().si() - Math.sin(angle) * f.z().si(), turned.y().si(), 2 * f.y().error() + turned.y().error());
    }

    /** Beside conductors a body and what it induces: energy the same by either of two, force the fall of the energy along x. */
    @Property(tries = 4, seed = SEED, shrinking = ShrinkingMode.OFF)
    void energyGradientIsTheForce(@ForAll @IntRange(min = 0, max = 3) int kind, @ForAll @IntRange(min = 0, max = 100_000) int number) {
        Random random = new Random(number);
        Surroundings wall = number % 2 == 0 ? new Surroundings.GroundPlane("x", -1, 1) : new Surroundings.GroundedSphere(-1.2, 0.1, 0, 0.5, true);
        Source here = body(random, kind, 0).with(wall);
        Region region = ((fieldwright.charge.Charge) here).region();
        double h = 0.02;
        double[] u = new double[5];
        for (int i = -2; i <= 2; i++) {
            Source moved = new fieldwright.charge.Charge(region.movedBy(i * h, 0, 0), ((fieldwright.charge.Charge) here).density(), wall);
            Amount energy = Interaction.of(moved, ACCURACY).energyBySurroundings();
            converged(energy);
            u[i + 2] = energy.si();
        }
        double slope = (8 * (u[3] - u[1]) - (u[4] - u[0])) / (12 * h);
        Amount force = Interaction.of(here, ACCURACY).forceOn(here).x();
        converged(force);
        assertEquals(-slope, force.si(), 2e-4 * Math.abs(slope));
    }
}
