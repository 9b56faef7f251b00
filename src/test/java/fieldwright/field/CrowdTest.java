package fieldwright.field;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.charge.Charge;
import fieldwright.charge.ChargedPolyline;
import fieldwright.charge.PointCharge;
import fieldwright.charge.PointCloud;
import fieldwright.charge.Source;
import fieldwright.charge.Sources;
import fieldwright.charge.Surroundings;
import fieldwright.field.tree.Workers;
import fieldwright.formula.Formula;
import fieldwright.geometry.Bodies;
import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Place;
import fieldwright.quantity.Standing;
import fieldwright.quantity.Units;
import fieldwright.quantity.Vector;
import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import java.util.stream.IntStream;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/** Point clouds and polylines of numbers, each beside the same charge in the words the engine had before. */
class CrowdTest {
    private static final Workers ONE = new Workers(1, part -> { });
    private static final Place HERE = new Place(0.31, 0.42, 0.77);

    static Stream<Surroundings> surroundings() {
        return Stream.of(Surroundings.FREE_SPACE, new Surroundings.Medium(2.5), new Surroundings.GroundPlane("z", 0, 1),
            new Surroundings.DielectricHalfSpace("z", 0, 1, 1, 3), new Surroundings.GroundedSphere(0.5, 0.5, 0.5, 3, false),
            new Surroundings.GroundedSphere(-3, 0, 0, 1, true), new Surroundings.FloatingSphere(-3, 0, 0, 1, true, 1e-9),
            new Surroundings.GroundedPair("z", 0, 3), new Surroundings.GroundedBox(-1, 2, -1, 2, 0, 2),
            new Surroundings.Applied(new Surroundings.GroundPlane("z", 0, 1), 0, 0, 5));
    }

    private static double[][] numbers(int n) {
        Random r = new Random(n);
        double[][] s = new double[4][n];
        for (int i = 0; i < n; i++) {
            s[0][i] = r.nextDouble();
            s[1][i] = r.nextDouble();
            s[2][i] = 0.2 + r.nextDouble();
            s[3][i] = 1e-10 * r.nextGaussian();
        }
        return s;
    }

    private static PointCloud cloud(double[][] s) {
        return PointCloud.of(s[0], s[1], s[2], s[3]);
    }

    private static Source oneByOne(double[][] s) {
        return new Sources(IntStream.range(0, s[0].length).mapToObj(i -> (Source) new PointCharge(new Place(s[0][i], s[1][i], s[2][i]),
            Amount.si(s[3][i], 0, Units.CHARGE), null)).toList());
    }

    private static void same(Vector expected, Vector found) {
        assertEquals(expected.isSided(), found.isSided());
        if (expected.isSided()) {
            same(expected.plusSide(), found.plusSide());
            same(expected.minusSide(), found.minusSide());
            return;
        }
        same(expected.x(), found.x());
        same(expected.y(), found.y());
        same(expected.z(), found.z());
    }

    private static void same(Amount expected, Amount found) {
        assertTrue(found.isConverged(), () -> found.standing().reason());
        assertEquals(expected.si(), found.si(), expected.error() + found.error());
    }

    @ParameterizedTest
    @MethodSource("surroundings")
    void aCloudIsItsPoints(Surroundings around) {
        double[][] s = numbers(300);
        FieldSolver crowd = FieldSolver.of(cloud(s).with(around), Accuracy.DEFAULT);
        FieldSolver single = FieldSolver.of(oneByOne(s).with(around), Accuracy.DEFAULT);
        for (Place place : List.of(HERE, new Place(0.4, 0.6, 0), new Place(s[0][7] + 1e-7, s[1][7], s[2][7]))) {
            same(single.electricField(place), crowd.electricField(place));
            same(single.fluxDensity(place), crowd.fluxDensity(place));
            if (!(around instanceof Surroundings.Applied)) {
                same(single.potential(place), crowd.potential(place));
            }
        }
        same(single.totalCharge(), crowd.totalCharge());
        assertTrue(crowd.electricField(HERE).magnitude().error() <= 1e-9 * crowd.electricField(HERE).magnitude().si());
    }

    @ParameterizedTest
    @MethodSource("surroundings")
    void manyPlacesAgreeWithSingleOnes(Surroundings around) {
        Source source = cloud(numbers(1000)).with(around);
        boolean applied = around instanceof Surroundings.Applied;
        if (around instanceof Surroundings.GroundedPair || around instanceof Surroundings.GroundedBox) {
            source = cloud(numbers(20)).with(around);
        }
        List<Place> places = new ArrayList<>();
        Random r = new Random(3);
        for (int i = 0; i < 310; i++) {
            places.add(new Place(r.nextDouble(), r.nextDouble(), i % 10 == 0 ? 0 : 0.01 + r.nextDouble()));
        }
        Accuracy accuracy = Accuracy.relative(1e-6);
        ManyPlaces many = ManyPlaces.of(source, accuracy, ONE);
        ManyPlaces shared = ManyPlaces.of(source, accuracy, new Workers(3, part -> { }));
        List<Vector> fields = many.electricFields(places);
        List<Vector> again = shared.electricFields(places);
        List<Amount> potentials = applied ? null : many.potentials(places, null);
        FieldSolver one = FieldSolver.of(source, accuracy);
        for (int i = 0; i < places.size(); i += 5) {
            same(one.electricField(places.get(i)), fields.get(i));
            assertEquals(fields.get(i).mean().x(), again.get(i).mean().x());
            if (potentials != null) {
                same(one.potential(places.get(i)), potentials.get(i));
            }
        }
    }

    private static Formula perMetre(double density) {
        return Formula.constant(Amount.si(density, 0, Units.LINE_DENSITY));
    }

    @Test
    void aPolylineIsItsRods() {
        double[] x = {0, 1, 1.5, 1.5};
        double[] y = {0, 0.2, 0.1, 0.5};
        double[] z = {0.1, 0.2, 0.3, 0.9};
        double[] density = {1e-9, 3e-9, -2e-9, 0.5e-9};
        for (Surroundings around : List.of(Surroundings.FREE_SPACE, new Surroundings.GroundPlane("z", 0, 1))) {
            FieldSolver found = FieldSolver.of(ChargedPolyline.of(x, y, z, density).with(around), Accuracy.DEFAULT);
            List<Source> rods = new ArrayList<>();
            for (int i = 0; i < 3; i++) {
                Formula linear = perMetre(density[i]).plus(perMetre(density[i + 1] - density[i]).times(Formula.variable("u")));
                rods.add(Charge.of(Bodies.rod(new Place(x[i], y[i], z[i]), new Place(x[i + 1], y[i + 1], z[i + 1])), linear));
            }
            FieldSolver expected = FieldSolver.of(new Sources(rods).with(around), Accuracy.DEFAULT);
            for (Place p : List.of(HERE, new Place(1.001, 0.2, 0.2), new Place(0.5, 0.1, 0.15 + 1e-6), new Place(40, 30, 20), new Place(1.5, 0.3, 0))) {
                same(expected.electricField(p), found.electricField(p));
                same(expected.potential(p), found.potential(p));
            }
            same(expected.totalCharge(), found.totalCharge());
            assertEquals(Standing.Kind.UNBOUNDED, found.electricField(new Place(1, 0.2, 0.2)).standing().kind());
            assertEquals(Standing.Kind.UNBOUNDED, found.potential(new Place(0.5, 0.1, 0.15)).standing().kind());
        }
    }

    @Test
    void aClosePointCountsAndOneOnAChargeIsUnbounded() {
        double[][] s = numbers(5000);
        FieldSolver solver = FieldSolver.of(cloud(s).with(Surroundings.FREE_SPACE), Accuracy.DEFAULT);
        double gap = Math.ulp(1.0) * 64;
        Vector close = solver.electricField(new Place(s[0][9] + gap, s[1][9], s[2][9]));
        double exactGap = s[0][9] + gap - s[0][9];
        double expected = s[3][9] / (4 * Math.PI * fieldwright.formula.Constants.EPS0 * exactGap * exactGap);
        assertEquals(expected, close.x().si(), close.x().error());
        assertTrue(close.x().error() < 0.5 * Math.abs(expected) && close.x().error() > 1e-3 * Math.abs(expected), "the rounding of the place is in the error");
        Place on = new Place(s[0][9], s[1][9], s[2][9]);
        assertEquals(Standing.Kind.UNBOUNDED, solver.electricField(on).standing().kind());
        assertEquals(Standing.Kind.UNBOUNDED, solver.potential(on).standing().kind());
        List<Place> places = new ArrayList<>(java.util.Collections.nCopies(400, HERE));
        places.set(3, on);
        List<Vector> fields = ManyPlaces.of(cloud(s).with(Surroundings.FREE_SPACE), Accuracy.relative(1e-6), ONE).electricFields(places);
        assertEquals(Standing.Kind.UNBOUNDED, fields.get(3).standing().kind());
        assertTrue(fields.get(2).standing().isConverged());
    }

    @Test
    void chargeBehindAWallAndBadNumbersAreNamed() {
        double[][] s = numbers(10);
        s[2][4] = -0.3;
        AuthorException wall = assertThrows(AuthorException.class,
            () -> FieldSolver.electricField(cloud(s).with(new Surroundings.GroundPlane("z", 0, 1)), HERE, Accuracy.DEFAULT));
        assertTrue(wall.getMessage().contains("-0.3"), wall.getMessage());
        s[3][2] = Double.NaN;
        assertTrue(assertThrows(AuthorException.class, () -> cloud(s)).getMessage().contains("point 3"));
        double[] line = {0, 1, 1};
        AuthorException twice = assertThrows(AuthorException.class, () -> ChargedPolyline.of(line, new double[3], new double[3], line));
        assertTrue(twice.getMessage().contains("side 2"), twice.getMessage());
        ChargedPolyline down = ChargedPolyline.of(new double[] {0, 0}, new double[2], new double[] {0, 1}, new double[] {1e-9, 1e-9});
        assertTrue(FieldSolver.potential(down.with(new Surroundings.GroundPlane("z", 0, 1)), HERE, Accuracy.DEFAULT).isConverged(),
            "a line may end on the ground");
        Source boxed = down.with(new Surroundings.GroundedBox(-1, 2, -1, 2, -1, 2));
        assertTrue(assertThrows(AuthorException.class, () -> FieldSolver.potential(boxed, HERE, Accuracy.DEFAULT)).getMessage().contains("lineCharge"));
    }
}
