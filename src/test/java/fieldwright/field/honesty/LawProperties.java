package fieldwright.field.honesty;

import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.charge.Charge;
import fieldwright.charge.Source;
import fieldwright.charge.Sources;
import fieldwright.charge.Surroundings;
import fieldwright.field.Accuracy;
import fieldwright.field.FieldSolver;
import fieldwright.quantity.Amount;
import fieldwright.quantity.Place;
import fieldwright.quantity.Vector;
import java.util.List;
import java.util.Random;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.ShrinkingMode;
import net.jqwik.api.constraints.IntRange;

/** Laws of the electrostatic field, asked of the engine's answers for random charge; tolerances are its own stated errors and the rule's. */
class LawProperties {
    private static final String SEED = "20261201";
    private static final long PROBLEMS = 4;
    private static final Accuracy ACCURACY = Accuracy.PANELS;

    private static Problem problem(int number, int dimension) {
        for (int k = number; ; k += 100_000) {
            Problem p = Problem.of(PROBLEMS, k);
            if ((dimension == 0 || p.dimension() == dimension) && p.parts().size() == 1) {
                return p;
            }
        }
    }

    private static double[] field(FieldSolver solver, double[] at) {
        Vector e = solver.electricField(new Place(at[0], at[1], at[2]));
        assertTrue(e.standing().isConverged(), () -> e.standing().reason());
        return new double[] {e.x().si(), e.y().si(), e.z().si(), e.x().error() + e.y().error() + e.z().error()};
    }

    private static double potential(FieldSolver solver, double[] at) {
        Amount v = solver.potential(new Place(at[0], at[1], at[2]));
        assertTrue(v.isConverged(), () -> v.standing().reason());
        return v.si();
    }

    private static double length(double[] e) {
        return Math.sqrt(e[0] * e[0] + e[1] * e[1] + e[2] * e[2]);
    }

    private static double[] direction(Random random) {
        double c = 2 * random.nextDouble() - 1;
        double p = 2 * Math.PI * random.nextDouble();
        double s = Math.sqrt(1 - c * c);
        return new double[] {s * Math.cos(p), s * Math.sin(p), c};
    }

    private static double[] plus(double[] a, double f, double[] b) {
        return new double[] {a[0] + f * b[0], a[1] + f * b[1], a[2] + f * b[2]};
    }

    /** Some point about the middle of the charge, on the sheet. */
    private static double[] middle(Problem p) {
        return p.placing().sheet(new double[3]);
    }

    // ---- Gauss

    private interface Density {
        double at(double[] place);
    }

    /** Flux of E through a sphere: Clenshaw and Curtis in the polar cosine, equal steps in azimuth. */
    private static double flux(FieldSolver solver, double[] centre, double radius, int polar, int azimuth) {
        return overSphere(n -> {
            double[] e = field(solver, plus(centre, radius, n));
            return e[0] * n[0] + e[1] * n[1] + e[2] * n[2];
        }, polar, azimuth) * radius * radius;
    }

    private static double overSphere(Density f, int polar, int azimuth) {
        double[][] rule = RayJudge.clenshawCurtis(polar);
        double sum = 0;
        for (int i = 0; i < polar; i++) {
            double c = rule[0][i];
            double s = Math.sqrt(Math.max(0, 1 - c * c));
            for (int j = 0; j < azimuth; j++) {
                double p = 2 * Math.PI * (j + 0.5) / azimuth;
                sum += rule[1][i] * 2 * Math.PI / azimuth * f.at(new double[] {s * Math.cos(p), s * Math.sin(p), c});
            }
        }
        return sum;
    }

    @Property(tries = 6, seed = SEED, shrinking = ShrinkingMode.OFF)
    void fluxThroughSphereAroundIsTheCharge(@ForAll @IntRange(max = 50_000) int number) {
        Problem p = problem(number, 0);
        FieldSolver solver = FieldSolver.of(p.charge(), ACCURACY);
        double q = solver.totalCharge().si();
        double radius = 3 * p.size();
        double flux = flux(solver, middle(p), radius, 17, 20);
        // multipoles up to order 16 are integrated exactly; the body reaches at most a third of the way out
        double scale = Math.abs(q) / Judged.EPS0 + 4 * Math.PI * radius * radius * length(field(solver, plus(middle(p), radius, new double[] {0, 0, 1})));
        assertTrue(Math.abs(flux - q / Judged.EPS0) <= 1e-6 * scale, () -> flux * Judged.EPS0 + " C of flux, " + q + " C of charge: " + p);
    }

    @Property(tries = 4, seed = SEED, shrinking = ShrinkingMode.OFF)
    void noFluxThroughAnEmptySphere(@ForAll @IntRange(max = 50_000) int number) {
        Problem p = problem(number, 0);
        FieldSolver solver = FieldSolver.of(p.charge(), ACCURACY);
        double[] centre = plus(middle(p), 3 * p.size(), direction(new Random(number)));
        double radius = p.size();
        double flux = flux(solver, centre, radius, 15, 16);
        double scale = 4 * Math.PI * radius * radius * length(field(solver, plus(centre, radius, new double[] {1, 0, 0})));
        assertTrue(Math.abs(flux) <= 1e-5 * scale, () -> flux / scale + " of the field's size: " + p);
    }

    /**
     * A sphere about a point inside a body, which it cuts. Charge within: along each ray exactly. Both integrands bend where the
     * sphere leaves the body, so the rule is good to some 1e-3 only.
     */
    @Property(tries = 3, seed = SEED, shrinking = ShrinkingMode.OFF)
    void fluxThroughSphereThatCutsABody(@ForAll @IntRange(max = 50_000) int number) {
        Random random = new Random(number);
        double[] low = {-0.5, -0.4, -0.3};
        double[] high = {0.5, 0.5, 0.6};
        double[] centre = {0.1 * random.nextDouble(), 0.2 * random.nextDouble(), 0.3 * random.nextDouble()};
        double radius = 0.45 + 0.3 * random.nextDouble();
        RegionSpec spec = RegionSpec.of("cartesian", RegionSpec.between("x", "(-0.5 m)", "0.5 m"), RegionSpec.between("y", "(-0.4 m)", "0.5 m"),
                RegionSpec.between("z", "(-0.3 m)", "0.6 m"));
        FieldSolver solver = FieldSolver.of(spec.charge("1 (nC/m^3)*(2+x/(1 m)+(y/(1 m))^2)", Exact.Placing.NONE), ACCURACY);
        double flux = flux(solver, centre, radius, 21, 40);
        RayBody body = RayBody.box(centre, low, high);
        double[] ends = new double[8];
        double[][] rule = RayJudge.clenshawCurtis(7);
        double charge = overSphere(n -> {
            double s = Math.sqrt(n[0] * n[0] + n[1] * n[1]);
            int k = body.crossings(s, n[2], s == 0 ? 1 : n[0] / s, s == 0 ? 0 : n[1] / s, ends);
            double far = k == 0 ? 0 : Math.min(radius, ends[1]);
            double sum = 0;
            for (int i = 0; i < 7; i++) {
                double r = far / 2 * (1 + rule[0][i]);
                double[] at = plus(centre, r, n);
                sum += far / 2 * rule[1][i] * r * r * 1e-9 * (2 + at[0] + at[1] * at[1]);
            }
            return sum;
        }, 401, 800);
        assertTrue(Math.abs(flux * Judged.EPS0 - charge) <= 2e-3 * charge, () -> flux * Judged.EPS0 + " C of flux, " + charge + " C within");
    }

    /** The same for a closed box of faces around everything, Clenshaw and Curtis on each face. */
    @Property(tries = 2, seed = SEED, shrinking = ShrinkingMode.OFF)
    void fluxThroughBoxAroundIsTheCharge(@ForAll @IntRange(max = 50_000) int number) {
        Problem p = problem(number, 0);
        FieldSolver solver = FieldSolver.of(p.charge(), ACCURACY);
        double[] centre = middle(p);
        double half = 2.5 * p.size();
        double[][] rule = RayJudge.clenshawCurtis(11);
        double flux = 0;
        double size = 0;
        for (int axis = 0; axis < 3; axis++) {
            for (int side = -1; side <= 1; side += 2) {
                for (int i = 0; i < 11; i++) {
                    for (int j = 0; j < 11; j++) {
                        double[] at = centre.clone();
                        at[axis] += side * half;
                        at[(axis + 1) % 3] += half * rule[0][i];
                        at[(axis + 2) % 3] += half * rule[0][j];
                        double[] e = field(solver, at);
                        flux += side * e[axis] * rule[1][i] * rule[1][j] * half * half;
                        size += length(e) * rule[1][i] * rule[1][j] * half * half;
                    }
                }
            }
        }
        double through = flux;
        double scale = size;
        double q = solver.totalCharge().si();
        assertTrue(Math.abs(flux - q / Judged.EPS0) <= 1e-4 * scale, () -> through * Judged.EPS0 + " C of flux, " + q + " C of charge: " + p);
    }

    // ---- no curl, gradient

    @Property(tries = 12, seed = SEED, shrinking = ShrinkingMode.OFF)
    void circulationIsZero(@ForAll @IntRange(max = 50_000) int number) {
        Problem p = problem(number, 0);
        FieldSolver solver = FieldSolver.of(p.charge(), ACCURACY);
        Random random = new Random(number);
        double[] axis = direction(random);
        double[][] corner = new double[3][];
        for (int k = 0; k < 3; k++) {
            double[] n = plus(axis, 0.6, direction(random));
            corner[k] = plus(middle(p), 2.5 * p.size() / length(n), n);
        }
        double[][] rule = RayJudge.clenshawCurtis(15);
        double sum = 0;
        double size = 0;
        for (int k = 0; k < 3; k++) {
            double[] from = corner[k];
            double[] to = corner[(k + 1) % 3];
            double[] step = plus(to, -1, from);
            for (int i = 0; i < 15; i++) {
                double[] e = field(solver, plus(from, 0.5 + 0.5 * rule[0][i], step));
                sum += 0.5 * rule[1][i] * (e[0] * step[0] + e[1] * step[1] + e[2] * step[2]);
                size += 0.5 * rule[1][i] * length(e) * length(step);
            }
        }
        double round = sum;
        double scale = size;
        assertTrue(Math.abs(sum) <= 1e-7 * size, () -> round + " V round the loop, " + scale + " V of field times length: " + p);
    }

    @Property(tries = 15, seed = SEED, shrinking = ShrinkingMode.OFF)
    void fieldIsMinusTheGradientOfThePotential(@ForAll @IntRange(max = 50_000) int number) {
        Problem p = problem(number, 0);
        FieldSolver solver = FieldSolver.of(p.charge(), ACCURACY);
        double[] at = plus(middle(p), p.size() * (1.3 + new Random(number).nextDouble()), direction(new Random(number)));
        double[] e = field(solver, at);
        double h = 0.02 * p.size();
        for (int c = 0; c < 3; c++) {
            double slope = 0;
            double[] weight = {-1.0 / 60, 3.0 / 20, -3.0 / 4, 0, 3.0 / 4, -3.0 / 20, 1.0 / 60};
            double size = 0;
            for (int k = -3; k <= 3; k++) {
                if (k != 0) {
                    double[] there = at.clone();
                    there[c] += k * h;
                    double v = potential(solver, there);
                    slope -= weight[k + 3] * v / h;
                    size = Math.max(size, Math.abs(v) / h);
                }
            }
            double found = slope;
            double field = e[c];
            assertTrue(Math.abs(e[c] - slope) <= 1e-6 * length(e) + 2e-9 * size, () -> field + " V/m of field, " + found + " V/m of slope: " + p);
        }
    }

    // ---- superposition, rotation, scale, far away, ground

    @Property(tries = 15, seed = SEED, shrinking = ShrinkingMode.OFF)
    void fieldsAdd(@ForAll @IntRange(max = 50_000) int a, @ForAll @IntRange(max = 50_000) int b) {
        Problem p = problem(a, 0);
        Problem q = problem(b, 0);
        double[] at = plus(middle(p), 2 * (p.size() + q.size()), direction(new Random(a + b)));
        double[] first = field(FieldSolver.of(p.charge(), ACCURACY), at);
        double[] second = field(FieldSolver.of(q.charge(), ACCURACY), at);
        double[] both = field(FieldSolver.of(new Sources(List.of(p.charge(), q.charge())), ACCURACY), at);
        for (int c = 0; c < 3; c++) {
            double off = Math.abs(both[c] - first[c] - second[c]);
            assertTrue(off <= first[3] + second[3] + both[3], () -> off + " V/m: " + p + " and " + q);
        }
    }

    @Property(tries = 15, seed = SEED, shrinking = ShrinkingMode.OFF)
    void turningTheChargeTurnsTheField(@ForAll @IntRange(max = 50_000) int number, @ForAll @IntRange(max = 2) int axis,
            @ForAll @IntRange(min = -31, max = 31) int tenths) {
        Problem p = problem(number, 0);
        Exact.Placing placing = new Exact.Placing(axis, tenths * 0.1, new double[] {p.size(), -0.5 * p.size(), 0.25 * p.size()});
        double[] local = plus(new double[3], 1.7 * p.size(), direction(new Random(number)));
        double[] own = field(FieldSolver.of(p.spec().charge(p.density(), Exact.Placing.NONE), ACCURACY), local);
        double[] turned = placing.turned(new double[] {own[0], own[1], own[2]});
        double[] found = field(FieldSolver.of(p.spec().charge(p.density(), placing), ACCURACY), placing.sheet(local));
        double off = length(plus(turned, -1, found));
        assertTrue(off <= own[3] + found[3] + 1e-14 * length(own), () -> off + " V/m of " + length(own) + " V/m: " + p);
    }

    /** Twice the size at the same density: E of a body twice, of a surface the same, of a line half. */
    @Property(tries = 12, seed = SEED, shrinking = ShrinkingMode.OFF)
    void scale(@ForAll @IntRange(max = 50_000) int number) {
        Random random = new Random(number);
        int dimension = 1 + random.nextInt(3);
        double r = 0.2 + random.nextDouble();
        double[] at = plus(new double[3], 0.3 + random.nextDouble(), direction(random));
        double[] small = field(FieldSolver.of(rounded(dimension, r), ACCURACY), at);
        double[] large = field(FieldSolver.of(rounded(dimension, 2 * r), ACCURACY), plus(new double[3], 2, at));
        double factor = Math.pow(2, dimension - 2);
        for (int c = 0; c < 3; c++) {
            double off = Math.abs(large[c] - factor * small[c]);
            assertTrue(off <= large[3] + factor * small[3], () -> off + " V/m, dimension " + dimension + ", r = " + r);
        }
    }

    private static Source rounded(int dimension, double r) {
        String m = RegionSpec.m(r);
        String density = dimension == 1 ? "1 (nC/m)*(1+cos(phi))" : dimension == 2 ? "1 (nC/m^2)*(1+rho/(" + m + "))" : "1 (nC/m^3)*(1+x*z/(" + m + ")^2)";
        RegionSpec spec = switch (dimension) {
            case 1 -> RegionSpec.of("cylindrical", RegionSpec.fixed("rho", m), RegionSpec.between("phi", "0", "2*pi"), RegionSpec.fixed("z", "0 m"));
            case 2 -> RegionSpec.of("cylindrical", RegionSpec.between("rho", "0 m", m), RegionSpec.between("phi", "0", "2*pi"), RegionSpec.fixed("z", "0 m"));
            default -> RegionSpec.of("cylindrical", RegionSpec.between("rho", "0 m", m), RegionSpec.between("phi", "0", "2*pi"),
                    RegionSpec.between("z", "0 m", m + "/2"));
        };
        return spec.charge(density, Exact.Placing.NONE);
    }

    @Property(tries = 20, seed = SEED, shrinking = ShrinkingMode.OFF)
    void farAwayIsAPointCharge(@ForAll @IntRange(max = 50_000) int number) {
        Problem p = problem(number, 0);
        FieldSolver solver = FieldSolver.of(p.charge(), ACCURACY);
        double[] n = direction(new Random(number));
        double r = 1e7 * p.size();
        double[] e = field(solver, plus(middle(p), r, n));
        double q = solver.totalCharge().si();
        double coulomb = q / (4 * Math.PI * Judged.EPS0 * r * r);
        double off = length(plus(new double[] {e[0], e[1], e[2]}, -coulomb, n));
        // what is left is the dipole: at most some charge of the density's size times size over distance
        double bound = 40 * absoluteCharge(p) / (4 * Math.PI * Judged.EPS0 * r * r) * 1e-7;
        assertTrue(off <= bound + e[3], () -> off + " V/m of " + coulomb + " V/m: " + p);
    }

    /** No more than the size to the region's power times 100 times the density's unit. */
    private static double absoluteCharge(Problem p) {
        return 1e-9 * 100 * Math.pow(p.size(), p.dimension());
    }

    /** Just above a ground plane: V grows from zero with the field, which stands at right angles. */
    @Property(tries = 8, seed = SEED, shrinking = ShrinkingMode.OFF)
    void potentialIsZeroOnTheGroundPlane(@ForAll @IntRange(max = 50_000) int number) {
        Problem p = problem(number, 0);
        double ground = -3 * p.size();
        Charge charge = p.spec().charge(p.density(), Exact.Placing.NONE);
        FieldSolver solver = FieldSolver.of(charge.with(new Surroundings.GroundPlane("z", ground, 1)), ACCURACY);
        Random random = new Random(number);
        double[] on = {p.size() * random.nextDouble(), p.size() * random.nextDouble(), ground};
        double up = 1e-3 * p.size();
        double[] above = {on[0], on[1], ground + up};
        double[] below = {on[0], on[1], ground - up};
        double v = potential(solver, above);
        double[] e = field(solver, above);
        double free = length(field(FieldSolver.of(charge, ACCURACY), above));
        assertTrue(Math.abs(v + e[2] * up) <= 1e-2 * free * up, () -> v + " V at " + up + " m, E " + e[2] + " V/m: " + p);
        assertTrue(Math.hypot(e[0], e[1]) <= 1e-2 * free, () -> "E along the plane " + e[0] + ", " + e[1] + " V/m: " + p);
        assertTrue(potential(solver, on) == 0 && potential(solver, below) == 0, "on and behind the conductor");
        Vector pair = solver.electricField(new Place(on[0], on[1], on[2]));
        assertTrue(pair.isSided(), "one-sided values on a conductor");
        assertTrue(Math.hypot(pair.onSide("+z").x().si(), pair.onSide("+z").y().si()) <= 1e-8 * free, () -> "E along the plane: " + pair);
        assertTrue(pair.onSide("-z").magnitude().si() == 0, "no field in the conductor");
    }

    /** A wall, a point of it and the direction away from it, where the charge is. */
    private record Wall(Surroundings around, double[] on, double[] inward) {
        static Wall of(int kind, double a, Random random) {
            double s = a * (random.nextDouble() - 0.5);
            double t = a * (random.nextDouble() - 0.5);
            double[] n = direction(random);
            return switch (kind) {
                case 0 -> new Wall(new Surroundings.GroundedSphere(0, 0, 0, a, false), plus(new double[3], a, n), plus(new double[3], -1, n));
                case 1 -> new Wall(new Surroundings.GroundedSphere(0, 0, -2.5 * a, a, true), plus(new double[] {0, 0, -2.5 * a}, a, n), n);
                case 2 -> new Wall(new Surroundings.GroundedCorner(new Surroundings.GroundPlane("x", -a, 1), new Surroundings.GroundPlane("z", -a, 1)),
                        new double[] {-a, s, t}, new double[] {1, 0, 0});
                case 3 -> new Wall(new Surroundings.GroundedPair("z", -a, a), new double[] {s, t, a}, new double[] {0, 0, -1});
                default -> new Wall(new Surroundings.GroundedBox(-a, a, -a, a, -a, a), new double[] {s, a, t}, new double[] {0, -1, 0});
            };
        }
    }

    /** Off a grounded wall V grows as E times the distance, so that 2 V(d) − V(2d) is V on the wall but for what is of second order. */
    @Property(tries = 10, seed = SEED, shrinking = ShrinkingMode.OFF)
    void potentialIsZeroOnGroundedWalls(@ForAll @IntRange(max = 50_000) int number, @ForAll @IntRange(max = 4) int kind) {
        Problem p = problem(number, 0);
        Charge charge = p.spec().charge(p.density(), Exact.Placing.NONE);
        Wall wall = Wall.of(kind, 3 * p.size(), new Random(number));
        FieldSolver solver = FieldSolver.of(charge.with(wall.around), ACCURACY);
        double d = 1e-3 * p.size();
        double[] near = plus(wall.on, d, wall.inward);
        double onWall = 2 * potential(solver, near) - potential(solver, plus(wall.on, 2 * d, wall.inward));
        double[] e = field(solver, near);
        double[] free = field(FieldSolver.of(charge, ACCURACY), near);
        assertTrue(Math.abs(onWall) <= 1e-2 * length(free) * d, () -> onWall + " V on " + wall.around + ", " + length(free) + " V/m without: " + p);
        double normal = e[0] * wall.inward[0] + e[1] * wall.inward[1] + e[2] * wall.inward[2];
        double along = length(plus(e, -normal, wall.inward));
        assertTrue(along <= 1e-2 * length(free), () -> along + " V/m along " + wall.around + ", " + length(free) + " V/m without: " + p);
    }

    @Property(tries = 10, seed = SEED, shrinking = ShrinkingMode.OFF)
    void fluxDensityAcrossAndFieldAlongADielectricFaceAreContinuous(@ForAll @IntRange(max = 50_000) int number) {
        Problem p = problem(number, 0);
        Random random = new Random(number);
        double face = -3 * p.size();
        double here = 1 + 3 * random.nextDouble();
        double behind = 1 + 9 * random.nextDouble();
        Charge charge = p.spec().charge(p.density(), Exact.Placing.NONE);
        FieldSolver solver = FieldSolver.of(charge.with(new Surroundings.DielectricHalfSpace("z", face, 1, here, behind)), ACCURACY);
        double h = 1e-7 * p.size();
        double[] on = {p.size() * random.nextDouble(), p.size() * random.nextDouble(), face};
        double[] up = field(solver, plus(on, h, new double[] {0, 0, 1}));
        double[] down = field(solver, plus(on, -h, new double[] {0, 0, 1}));
        double size = length(up) + length(down);
        assertTrue(Math.abs(up[0] - down[0]) + Math.abs(up[1] - down[1]) <= 1e-6 * size, () -> "E along the face: " + p);
        assertTrue(Math.abs(here * up[2] - behind * down[2]) <= 1e-6 * behind * size, () -> "D across the face: " + p);
        Vector d = solver.fluxDensity(new Place(on[0], on[1], on[2]));
        assertTrue(Math.abs(d.onSide("+z").z().si() - d.onSide("-z").z().si()) <= d.onSide("+z").z().error() + d.onSide("-z").z().error(),
                () -> "D across the face, on it: " + d);
        assertTrue(Math.abs(d.onSide("+z").z().si() - Judged.EPS0 * here * up[2]) <= 1e-6 * Judged.EPS0 * here * size, () -> "D is eps E: " + d);
        double step = potential(solver, plus(on, h, new double[] {0, 0, 1})) - potential(solver, plus(on, -h, new double[] {0, 0, 1}));
        double bound = 2 * h * size + 2e-9 * Math.abs(potential(solver, on));
        assertTrue(Math.abs(step) <= bound, () -> step + " V from side to side: " + p);
    }
}
