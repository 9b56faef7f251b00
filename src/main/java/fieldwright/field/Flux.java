package fieldwright.field;

import java.util.ArrayList;
import java.util.List;

import fieldwright.charge.PointCharge;
import fieldwright.charge.Source;
import fieldwright.charge.Sources;
import fieldwright.charge.Surroundings;
import fieldwright.formula.Constants;
import fieldwright.geometry.Region;
import fieldwright.integral.Cubature;
import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Place;
import fieldwright.quantity.Standing;
import fieldwright.quantity.Units;
import fieldwright.quantity.Vector;

/**
 * Flux of D through a surface (C) and voltage along a path (V).
 *
 * <p>Through a surface D of charged surfaces and volumes is summed over the surface, which is cut where it crosses them; that of lines and
 * points, unbounded on them, is summed over the charge instead: charge times the solid angle it sees the surface under. What is induced
 * in the surroundings is summed over the surface.
 * Errors: the sums' own and those of the field integrated along; AuthorException when the surface lies on charged surfaces or a conductor
 * and no side was named, or touches a line or point charge.
 */
public final class Flux {
    private static final double INNER = 0.1;
    private static final int EVALUATIONS_PER_PLACE = 50;
    private static final double NEAR = 0.2;

    private final Source source;
    private final Accuracy accuracy;
    private int places;
    /** Whether a field did not converge somewhere. */
    private boolean doubtful;

    private Flux(Source source, Accuracy accuracy) {
        Images.question(source.around(), new Place(0, 0, 0));
        this.source = source;
        this.accuracy = accuracy;
    }

    /** Errors: AuthorException when the surroundings were not stated. */
    public static Flux of(Source source, Accuracy accuracy) {
        return new Flux(source, accuracy);
    }

    /** Places at which the field, or a solid angle, was worked for the last answer. */
    public int places() {
        return places;
    }

    // ---- flux

    /**
     * Through a surface towards its normal, or out of a volume through its boundary. The normal of a surface points where its fixed coordinate
     * grows (x, y, z, rho, phi, r, theta); that of a parametric surface or polygon is right-handed about its parameters or corners as stated.
     *
     * @param side for a surface that lies on charge or a conductor, the side whose D is meant: "+z", "-r", …; null otherwise
     */
    public Amount through(Region surface, String side) {
        if (surface.dimension() < 2) {
            throw new AuthorException("fluxThrough: the region is a " + (surface.dimension() == 0 ? "point" : "line")
                + ". Give a surface, two coordinates with limits, or a volume for the flux out of its boundary.");
        }
        FieldSolver.of(source, accuracy).checkSurroundings();
        places = 0;
        doubtful = false;
        Tally sum = new Tally(accuracy, 1);
        List<Source> thin = new ArrayList<>();
        List<Source> spread = new ArrayList<>();
        for (Source part : Elements.of(source)) {
            (Elements.dimension(part) < 2 && !Elements.isEndless(part) ? thin : spread).add(part);
        }
        List<Domain> area = Domain.area(surface);
        if (!thin.isEmpty()) {
            seen(thin, surface, area, sum);
        }
        Surroundings around = source.around();
        if (!spread.isEmpty() || !isPlain(around)) {
            Source direct = spread.isEmpty() ? new PointCharge(new Place(0, 0, 0), Amount.si(0, 0, Units.CHARGE), around) : new Sources(spread);
            add(area, density(direct, thin, side), spread, around, sum);
        }
        return sum.amount("flux", Units.CHARGE, "C");
    }

    private static boolean isPlain(Surroundings around) {
        return around instanceof Surroundings.FreeSpace || around instanceof Surroundings.Medium;
    }

    /** Flux of points and lines in the medium around them, by solid angles. */
    private void seen(List<Source> thin, Region surface, List<Domain> area, Tally sum) {
        Aperture aperture = new Aperture(area);
        Sweep.Asked asked = (place, element, value) -> {
            double[] angle = aperture.seenFrom(place);
            value[0] = element[0] * angle[0] / (4 * Math.PI);
            return Math.abs(element[0]) * angle[1] / (4 * Math.PI);
        };
        for (Source part : thin) {
            if (Elements.dimension(part) == 0) {
                places += Sweep.overPoints(part, asked, 1, sum);
            } else {
                Sweep.Result r = Sweep.over(Domain.charge(part, false), asked, 1, Crossings.of(surface), true, goal());
                places += r.places();
                sum.add(1, r);
            }
        }
    }

    /** D of {@code direct} in all its surroundings, and of what {@code thin} induces there. */
    private Sweep.Asked density(Source direct, List<Source> thin, String side) {
        FieldSolver whole = FieldSolver.of(direct, inner());
        boolean induced = !thin.isEmpty() && !isPlain(source.around());
        Source thinSource = induced ? new Sources(thin) : null;
        FieldSolver reaction = induced ? FieldSolver.of(thinSource, inner()) : null;
        double here = source.around().permittivity();
        FieldSolver own = induced ? FieldSolver.of(thinSource.with(here == 1 ? Surroundings.FREE_SPACE : new Surroundings.Medium(here)), inner()) : null;
        return (place, element, value) -> {
            Place at = new Place(place[0], place[1], place[2]);
            value[0] = 0;
            double error = add(whole.fluxDensity(at), element, side, 1, value);
            if (induced) {
                double there = Images.question(source.around(), at).permittivityBehind();
                error += add(reaction.reactionField(at), element, side, there * Constants.EPS0, value);
                if (there != here) {
                    error += add(own.electricField(at), element, side, (there - here) * Constants.EPS0, value);
                }
            }
            return error;
        };
    }

    private double add(Vector v, double[] element, String side, double factor, double[] value) {
        Vector d = one(v, element, side);
        doubtful |= !d.standing().isConverged();
        if (d.standing().kind() == Standing.Kind.UNBOUNDED) {
            throw new Unbounded(d.standing());
        }
        value[0] += factor * (d.x().si() * element[0] + d.y().si() * element[1] + d.z().si() * element[2]);
        return Math.abs(factor) * (d.x().error() * Math.abs(element[0]) + d.y().error() * Math.abs(element[1]) + d.z().error() * Math.abs(element[2]));
    }

    private static Vector one(Vector v, double[] element, String side) {
        if (!v.isSided()) {
            return v;
        }
        double[] n = v.normal();
        boolean lies = Math.abs(Vectors.dot(n, element)) > (1 - 1e-9) * Vectors.norm(element);
        if (!lies) {
            return v.mean();
        }
        if (side == null) {
            throw new AuthorException(String.format(java.util.Locale.ROOT, "fluxThrough: the surface lies on a charged surface or a conductor at "
                + "(%.6g, %.6g, %.6g) m, where D has one value on each side. Name the side that is meant, for example fluxThrough(surface, \"+z\").",
                v.place().x(), v.place().y(), v.place().z()));
        }
        return v.onSide(side);
    }

    // ---- voltage

    /**
     * ∫E·dl along a line in the direction of its growing parameter: the potential where it begins less that where it ends. The line
     * may cross charged surfaces and volumes; through a line or point charge the voltage is unbounded or does not converge.
     */
    public Amount along(Region path) {
        if (path.dimension() != 1) {
            throw new AuthorException("voltageAlong: the region has " + path.dimension() + " coordinates with limits. Give a line, which has one, "
                + "for example rod(at(…), at(…)).");
        }
        places = 0;
        doubtful = false;
        FieldSolver solver = FieldSolver.of(source, inner());
        Sweep.Asked asked = (place, element, value) -> {
            Vector e = solver.electricField(new Place(place[0], place[1], place[2]));
            value[0] = 0;
            return add(e.isSided() ? e.mean() : e, element, null, 1, value);
        };
        Tally sum = new Tally(accuracy, 1);
        add(Domain.path(path), asked, Elements.of(source), source.around(), sum);
        return sum.amount("voltage", Units.POTENTIAL, "V");
    }

    // ---- common

    private void add(List<Domain> domains, Sweep.Asked asked, List<Source> bends, Surroundings around, Tally sum) {
        try {
            boolean near = Domain.isNear(domains, bends, isPlain(around) ? null : around, NEAR);
            Crossings crossings = near ? Crossings.of(bends, around) : Crossings.none();
            Sweep.Result r = Sweep.over(domains, asked, 1, crossings, near, goal());
            places += r.places();
            sum.add(1, r);
        } catch (Unbounded e) {
            sum.fail(e.standing());
        }
        if (doubtful) {
            sum.doubt();
        }
    }

    private Accuracy inner() {
        return new Accuracy(INNER * accuracy.relative(), 0, accuracy.maxEvaluations(), accuracy.closedForms());
    }

    private Cubature.Goal goal() {
        return new Cubature.Goal(0.25 * accuracy.relative(), 1e-3, accuracy.absoluteFloor(), Math.max(2000, accuracy.maxEvaluations() / EVALUATIONS_PER_PLACE));
    }
}
