package fieldwright.field;

import java.util.ArrayList;
import java.util.List;
import java.util.function.Function;

import fieldwright.charge.PointCharge;
import fieldwright.charge.Source;
import fieldwright.charge.Sources;
import fieldwright.charge.Surroundings;
import fieldwright.integral.Cubature;
import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Place;
import fieldwright.quantity.Standing;
import fieldwright.quantity.Units;
import fieldwright.quantity.Vector;

/**
 * Energy (J), force (N) and torque (N m) of a source, alone and with another one in the same surroundings.
 *
 * <p>All are sums of charge times potential or field over one of the two bodies, the one of fewer dimensions, so that the other's field
 * stays weakly singular; in the medium around the charges the choice is free (reciprocity; action and reaction). What induced charge
 * adds is summed over the body acted on. Errors: the sum's own, and the errors of the potential or field integrated along.
 * AuthorException as for {@link FieldSolver}, and for endless charge where the whole has no finite value.
 * Accuracy: as asked, else the result says that it did not converge; measured in InteractionTest.
 * Immutable but for scratch space: one thread at a time.
 */
public final class Interaction {
    /** Of the accuracy asked, what each place is worked to. */
    private static final double INNER = 0.1;
    private static final int EVALUATIONS_PER_PLACE = 50;
    /** Distance, in sizes of the body summed over, within which nodes are graded towards its ends. */
    private static final double NEAR = 0.2;

    private final Source source;
    private final Surroundings around;
    private final Accuracy accuracy;
    /** Gives the field of what the whole source induces; null where nothing is. */
    private final FieldSolver induced;
    /** Gives the field that is there without the source; null where there is none. */
    private final FieldSolver withoutSource;
    private int places;
    /** Whether a field did not converge somewhere. */
    private boolean doubtful;

    private Interaction(Source source, Accuracy accuracy) {
        Images.question(source.around(), new Place(0, 0, 0));
        this.source = source;
        this.accuracy = accuracy;
        around = source.around();
        induced = isPlain(around) ? null : FieldSolver.of(source, inner());
        PointCharge nothing = new PointCharge(new Place(0, 0, 0), Amount.si(0, 0, Units.CHARGE), around);
        withoutSource = hasField(around) ? FieldSolver.of(nothing, inner()) : null;
    }

    /** Errors: AuthorException when the surroundings were not stated. */
    public static Interaction of(Source source, Accuracy accuracy) {
        return new Interaction(source, accuracy);
    }

    /** Places at which a field or potential was worked for the last answer. */
    public int places() {
        return places;
    }

    // ---- energy

    /**
     * Work to bring the charge together from far away, ½∫ρV, in J; what it induces in its surroundings takes part, with the same
     * factor ½. Unbounded for lines and points, which is said: ask {@link #energyWith} for two of them.
     */
    public Amount energy() {
        List<Source> parts = bySize(Elements.of(source));
        for (Source part : parts) {
            if (Elements.dimension(part) < 2) {
                return Amount.si(Double.POSITIVE_INFINITY, Double.POSITIVE_INFINITY, Units.ENERGY, Standing.unbounded("self-energy of a "
                    + (Elements.dimension(part) == 0 ? "point" : "line") + " charge: it grows without bound as the charge is thinned to it. Give it a radius, "
                    + "or ask for .energyWith(other) or .energyBySurroundings()"));
            }
        }
        Tally sum = start(1);
        for (int i = 0; i < parts.size(); i++) {
            Source part = parts.get(i);
            Elements.refuseEndless("energy", part);
            List<Source> inner = parts.subList(i, parts.size());
            List<Term> terms = bySurroundings();
            terms.add(new Term(own(List.of(part))::potential, 0.5));
            if (inner.size() > 1) {
                terms.add(new Term(own(inner.subList(1, inner.size()))::potential, 1));
            }
            sum(part, potential(terms), inner, axis(part, inner) != null, 1, sum);
        }
        return sum.amount("energy", Units.ENERGY, "J");
    }

    /**
     * The part of the energy that the surroundings have a share in, in J: ½∫ρV of what the charge induces, and ∫ρV of what is there without
     * it (an applied field, the net charge or potential of a sphere). Finite for points and lines too; zero in free space.
     */
    public Amount energyBySurroundings() {
        Tally sum = start(1);
        for (Source part : Elements.of(source)) {
            Elements.refuseEndless("energy", part);
            List<Term> terms = bySurroundings();
            if (!terms.isEmpty()) {
                sum(part, potential(terms), List.of(), axis(part, List.of()) != null, 1, sum);
            }
        }
        return sum.amount("energy by surroundings", Units.ENERGY, "J");
    }

    private List<Term> bySurroundings() {
        List<Term> terms = new ArrayList<>();
        if (induced != null) {
            terms.add(new Term(induced::reactionPotential, 0.5));
        }
        if (withoutSource != null) {
            terms.add(new Term(withoutSource::potential, 1));
        }
        return terms;
    }

    /** Work to bring {@code other} from far away to its place near this source, beyond what each takes alone: ∫ρV, in J. */
    public Amount energyWith(Source other) {
        Source there = inSameSurroundings("energy", other);
        Tally sum = start(1);
        for (Pair pair : pairs(there)) {
            pair.refuseEndless("energy");
            pair.inner.forEach(p -> Elements.refuseEndless("energy", p));
            List<Term> terms = new ArrayList<>();
            if (!pair.inner.isEmpty()) {
                terms.add(new Term(own(pair.inner)::potential, 1));
            }
            if (!pair.swapped && induced != null) {
                terms.add(new Term(induced::reactionPotential, 1));
            }
            sum(pair.outer, potential(terms), pair.inner, axis(pair.outer, pair.inner) != null, 1, sum);
        }
        return sum.amount("energy", Units.ENERGY, "J");
    }

    /** A potential and the part of it that counts. */
    private record Term(Function<Place, Amount> potential, double factor) { }

    private Sweep.Asked potential(List<Term> terms) {
        return (place, element, value) -> {
            Place at = new Place(place[0], place[1], place[2]);
            double v = 0;
            double error = 0;
            for (Term term : terms) {
                Amount a = bounded(term.potential.apply(at));
                v += term.factor * a.si();
                error += term.factor * a.error();
            }
            value[0] = element[0] * v;
            return Math.abs(element[0]) * error;
        };
    }

    // ---- force and torque

    /**
     * Force of this source, and of what it induces, on {@code other}, in N. On itself: the force of what it induces and of what its
     * surroundings hold without it (an applied field, a charged sphere), since its own field moves no body as a whole. On a charged surface within it acts the mean field of both sides.
     */
    public Vector forceOn(Source other) {
        return mechanical("force", other, null).vector("force", new Place(0, 0, 0), Units.FORCE, "N");
    }

    /** Torque about a place (N m), of the same forces. */
    public Vector torqueOn(Source other, Place about) {
        return mechanical("torque", other, about).vector("torque", about, Units.ENERGY, "N m");
    }

    private Tally mechanical(String question, Source other, Place about) {
        Source there = inSameSurroundings(question, other);
        Tally sum = start(3);
        boolean itself = other.equals(source) || there.equals(source);
        for (Pair pair : itself ? alone(there) : pairs(there)) {
            pair.refuseEndless(question);
            List<Function<Place, Vector>> fields = new ArrayList<>();
            if (!pair.inner.isEmpty()) {
                fields.add(own(pair.inner)::electricField);
            }
            if (!pair.swapped && induced != null) {
                fields.add(induced::reactionField);
            }
            if (itself && withoutSource != null) {
                fields.add(withoutSource::electricField);
            }
            if (!fields.isEmpty()) {
                Axis common = axis(pair.outer, pair.inner);
                Axis axis = common == null || about == null || common.contains(Images.coordinates(about)) ? common : null;
                sum(pair.outer, force(fields, about, axis), pair.inner, axis != null, pair.swapped ? -1 : 1, sum);
            }
        }
        return sum;
    }

    private Sweep.Asked force(List<Function<Place, Vector>> fields, Place about, Axis axis) {
        return (place, element, value) -> {
            Place at = new Place(place[0], place[1], place[2]);
            double[] e = new double[3];
            double error = 0;
            for (Function<Place, Vector> field : fields) {
                error += add(bounded(field.apply(at)), e);
            }
            double arm = 1;
            if (about != null) {
                double[] d = {place[0] - about.x(), place[1] - about.y(), place[2] - about.z()};
                e = Vectors.cross(d, e);
                arm = Vectors.norm(d);
            }
            e = axis == null ? e : axis.projected(e);
            for (int a = 0; a < 3; a++) {
                value[a] = element[0] * e[a];
            }
            return Math.abs(element[0]) * arm * error;
        };
    }

    private static double add(Vector v, double[] e) {
        Vector one = v.mean();
        e[0] += one.x().si();
        e[1] += one.y().si();
        e[2] += one.z().si();
        return Vectors.norm(new double[] {one.x().error(), one.y().error(), one.z().error()});
    }

    // ---- who acts on whom

    /** Charge acted on and what acts on it; swapped: the outer one is of this source, the inner of the other. */
    private record Pair(Source outer, List<Source> inner, boolean swapped) {
        /** Endless charge has no sum over it. */
        void refuseEndless(String question) {
            Elements.refuseEndless(question, outer);
        }
    }

    private List<Pair> alone(Source there) {
        return Elements.of(there).stream().map(p -> new Pair(p, List.of(), false)).toList();
    }

    /** Every part of the one with every part of the other, once; sums run over the finite one of fewer dimensions. */
    private List<Pair> pairs(Source there) {
        List<Source> here = Elements.of(source);
        List<Source> parts = Elements.of(there);
        List<Pair> all = new ArrayList<>();
        for (Source part : parts) {
            List<Source> inner = here.stream().filter(p -> !isOuter(p, part) && !p.equals(part)).toList();
            if (!inner.isEmpty() || induced != null) {
                all.add(new Pair(part, inner, false));
            }
        }
        for (Source part : here) {
            List<Source> inner = parts.stream().filter(p -> isOuter(part, p)).toList();
            if (!inner.isEmpty()) {
                all.add(new Pair(part, inner, true));
            }
        }
        return all;
    }

    private static boolean isOuter(Source here, Source there) {
        boolean endlessHere = Elements.isEndless(here);
        boolean endlessThere = Elements.isEndless(there);
        return endlessHere == endlessThere ? Elements.dimension(here) < Elements.dimension(there) : endlessThere;
    }

    private Source inSameSurroundings(String question, Source other) {
        if (other.around() != null && !other.around().equals(around)) {
            throw new AuthorException(question + " between charges in different surroundings, " + around.title() + " and " + other.around().title()
                + ": both stand in the same ones. State the same for both.");
        }
        Source there = other.with(around);
        FieldSolver.of(there, accuracy).checkSurroundings();
        FieldSolver.of(source, accuracy).checkSurroundings();
        return there;
    }

    private static List<Source> bySize(List<Source> parts) {
        List<Source> sorted = new ArrayList<>(parts);
        sorted.sort((a, b) -> Integer.compare(Elements.dimension(a), Elements.dimension(b)));
        return sorted;
    }

    // ---- sums

    private Accuracy inner() {
        return new Accuracy(INNER * accuracy.relative(), 0, accuracy.maxEvaluations(), accuracy.closedForms());
    }

    private Surroundings medium() {
        return around.permittivity() == 1 ? Surroundings.FREE_SPACE : new Surroundings.Medium(around.permittivity());
    }

    /** Field of charge alone, in the medium it stands in. */
    private FieldSolver own(List<Source> parts) {
        return FieldSolver.of(new Sources(parts).with(medium()), inner());
    }

    private static boolean isPlain(Surroundings around) {
        return around instanceof Surroundings.FreeSpace || around instanceof Surroundings.Medium
            || around instanceof Surroundings.Applied a && isPlain(a.around());
    }

    private static boolean hasField(Surroundings around) {
        return around instanceof Surroundings.Applied || around instanceof Surroundings.FloatingSphere f && f.charge() != 0
            || around instanceof Surroundings.HeldSphere h && h.potential() != 0;
    }

    private Amount bounded(Amount v) {
        doubtful |= !v.isConverged();
        if (v.standing().kind() == Standing.Kind.UNBOUNDED) {
            throw new Unbounded(v.standing());
        }
        return v;
    }

    private Vector bounded(Vector v) {
        doubtful |= !v.standing().isConverged();
        if (v.standing().kind() == Standing.Kind.UNBOUNDED) {
            throw new Unbounded(v.standing());
        }
        return v;
    }

    private Tally start(int components) {
        places = 0;
        doubtful = false;
        return new Tally(accuracy, components);
    }

    /** Adds charge of {@code outer} times what is asked of the fields of {@code inner}. */
    private void sum(Source outer, Sweep.Asked asked, List<Source> inner, boolean turned, double sign, Tally sum) {
        try {
            if (Elements.dimension(outer) == 0) {
                places += Sweep.overPoints(outer, asked, sign, sum);
            } else {
                int most = Math.max(2000, accuracy.maxEvaluations() / EVALUATIONS_PER_PLACE);
                Cubature.Goal goal = new Cubature.Goal(0.25 * accuracy.relative(), 1e-3, accuracy.absoluteFloor(), most);
                List<Domain> domains = Domain.charge(outer, turned);
                List<Source> others = inner.stream().filter(p -> !p.equals(outer)).toList();
                boolean near = inner.contains(outer) || Domain.isNear(domains, others, induced == null ? null : around, NEAR);
                Crossings crossings = near ? Crossings.of(others, Surroundings.FREE_SPACE) : Crossings.none();
                Sweep.Result r = Sweep.over(domains, asked, sum.size(), crossings, near, goal);
                sum.add(sign, r);
                places += r.places();
            }
        } catch (Unbounded e) {
            sum.fail(e.standing());
        }
        if (doubtful) {
            sum.doubt();
        }
    }

    /** Whether what is summed is the same all round the axis of the outer charge. */
    private Axis axis(Source outer, List<Source> inner) {
        Axis axis = Axis.of(outer);
        return axis != null && inner.stream().allMatch(axis::fits) && axis.fits(around) && (induced == null || axis.fits(source)) ? axis : null;
    }
}
