package fieldwright.words;

import fieldwright.charge.Source;
import fieldwright.charge.Surroundings;
import fieldwright.field.Accuracy;
import fieldwright.field.ClosedForms;
import fieldwright.field.FieldSolver;
import fieldwright.field.Flux;
import fieldwright.field.Interaction;
import fieldwright.field.ManyPlaces;
import fieldwright.field.Moments;
import fieldwright.field.search.DecayExponent;
import fieldwright.field.search.FieldLine;
import fieldwright.field.search.Peak;
import fieldwright.field.tree.Workers;
import fieldwright.output.Output;
import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Place;
import fieldwright.quantity.Units;
import fieldwright.quantity.Vector;
import java.util.List;
import java.util.function.BiFunction;
import java.util.function.Function;

/**
 * Charge, and once stated what stands around it; then it can be asked. Every question puts the surroundings among the
 * cell's assumptions. Immutable.
 */
public final class Distribution {
    private final String kind;
    private final Source source;
    private final String assumption;
    private final Place zero;
    private final Asked asked;

    /** What is asked of numbers here; null stands for what the sheet asks. */
    private record Asked(Double relative, ClosedForms closedForms) {
        static final Asked AS_THE_SHEET = new Asked(null, null);

        Accuracy of(Accuracy sheet) {
            Accuracy a = relative == null ? sheet : sheet.withRelative(relative);
            return closedForms == null ? a : a.with(closedForms);
        }
    }

    private Distribution(String kind, Source source, String assumption, Place zero, Asked asked) {
        this.kind = kind;
        this.source = source;
        this.assumption = assumption;
        this.zero = zero;
        this.asked = asked;
    }

    static Distribution of(String kind, Source source) {
        return new Distribution(kind, source, null, null, Asked.AS_THE_SHEET);
    }

    /** Several together; surroundings are theirs when all have them, and then one and the same. */
    static Distribution together(List<Distribution> parts) {
        if (parts.isEmpty()) {
            throw new AuthorException("sources(): nothing to add. Name the charges, for example sources(cloud, film).");
        }
        Source all = new fieldwright.charge.Sources(parts.stream().map(p -> p.source).toList());
        boolean stated = parts.stream().allMatch(p -> p.assumption != null);
        return new Distribution("charge of sources(…)", all, stated ? parts.get(0).assumption : null, null, Asked.AS_THE_SHEET);
    }

    // Surroundings

    /** Nothing near: a statement, printed among the assumptions. */
    public Distribution inFreeSpace() {
        return in(Surroundings.FREE_SPACE, "free space: no conductor or dielectric near");
    }

    /** A uniform medium everywhere. */
    public Distribution inMedium(Object relativePermittivity) {
        double permittivity = Given.plain("inMedium, relative permittivity", relativePermittivity);
        return in(new Surroundings.Medium(permittivity),
                "uniform medium everywhere, relative permittivity " + described(relativePermittivity, permittivity));
    }

    /** Above an earthed plane: the charge and the field lie on the side of growing z. */
    public Distribution above(GroundPlane plane) {
        return over("above", plane, 1);
    }

    /** Below an earthed plane, such as a roof: the charge and the field lie on the side of falling z. */
    public Distribution under(GroundPlane plane) {
        return over("under", plane, -1);
    }

    /**
     * Beside an upright earthed plane.
     *
     * @param side on which the charge and the field lie, by a direction along the plane's axis: {@code "+x"}, {@code "-y"}
     */
    public Distribution beside(GroundPlane plane, String side) {
        String text = side.strip().replace('\u2212', '-');
        if (plane.axis().equals("z") || !text.matches("[+-]" + plane.axis())) {
            throw new AuthorException("beside(ground plane " + plane.text() + ", \"" + side + "\"): " + (plane.axis().equals("z")
                    ? "a plane across z lies flat. Use .above(…) or .under(…)."
                    : "name the side the charge is on: \"+" + plane.axis() + "\" or \"-" + plane.axis() + "\"."));
        }
        return grounded(plane, text.startsWith("-") ? -1 : 1);
    }

    private Distribution over(String word, GroundPlane plane, int side) {
        if (!plane.axis().equals("z")) {
            throw new AuthorException(word + "(ground plane " + plane.text() + "): a plane across " + plane.axis()
                    + " stands upright. Use .beside(groundPlane(…), \"+" + plane.axis() + "\").");
        }
        return grounded(plane, side);
    }

    private Distribution grounded(GroundPlane plane, int side) {
        return in(new Surroundings.GroundPlane(plane.axis(), plane.offset(), side), "ground plane " + plane.text() + ", field region "
                + plane.axis() + (side > 0 ? " > " : " < ") + plane.offsetText() + "; no other conductor or dielectric near");
    }

    /** In front of a dielectric that fills the other side of a plane. */
    public Distribution facing(DielectricHalfSpace wall) {
        return in(new Surroundings.DielectricHalfSpace(wall.axis(), wall.offset(), -wall.filled(), 1, wall.behind()),
                wall.text() + ", charge before it in air; no conductor near");
    }

    /**
     * In the corner of two earthed planes at right angles.
     *
     * @param firstSide of the first plane on which the charge and the field lie: {@code "+z"}
     * @param secondSide the same for the second
     */
    public Distribution inCorner(GroundPlane first, String firstSide, GroundPlane second, String secondSide) {
        Surroundings corner = new Surroundings.GroundedCorner(faced(first, firstSide), faced(second, secondSide));
        return in(corner, "ground planes " + first.text() + " and " + second.text() + " at right angles, field region " + region(first, firstSide)
                + " and " + region(second, secondSide) + "; no other conductor or dielectric near");
    }

    private static Surroundings.GroundPlane faced(GroundPlane plane, String side) {
        String text = side.strip().replace('\u2212', '-');
        if (!text.matches("[+-]" + plane.axis())) {
            throw new AuthorException("inCorner, ground plane " + plane.text() + ", side \"" + side + "\": name the side the charge is on, \"+"
                    + plane.axis() + "\" or \"-" + plane.axis() + "\".");
        }
        return new Surroundings.GroundPlane(plane.axis(), plane.offset(), text.startsWith("-") ? -1 : 1);
    }

    private static String region(GroundPlane plane, String side) {
        return plane.axis() + (side.strip().startsWith("+") ? " > " : " < ") + plane.offsetText();
    }

    /** Between two earthed parallel planes without end. */
    public Distribution between(GroundPlanes planes) {
        return in(planes.around(), planes.text() + ", field region between them; the planes are taken as endless");
    }

    /** Outside a conducting sphere. */
    public Distribution outside(ConductingSphere sphere) {
        return in(sphere.outside(), sphere.text() + ", field region outside it; no other conductor or dielectric near");
    }

    /** Inside a conducting spherical shell. */
    public Distribution inside(ConductingSphere sphere) {
        return in(sphere.inside(), sphere.text() + ", thin shell, charge inside it");
    }

    /** Inside earthed walls; the potential is zero on them. */
    public Distribution inside(Enclosure walls) {
        return in(walls.around(), walls.text() + ", field region inside it");
    }

    /**
     * With a uniform field applied from far away, in V/m, stated after the surroundings: {@code .above(groundPlane("z", "0"))
     * .inUniformField("0", "0", "-E_0")}. The potential is counted from the conductor, or from the plane through the centre of an
     * insulated sphere; elsewhere {@link #zeroAt} must say.
     */
    public Distribution inUniformField(Object x, Object y, Object z) {
        double ex = Given.si("inUniformField, x", x, Units.FIELD);
        double ey = Given.si("inUniformField, y", y, Units.FIELD);
        double ez = Given.si("inUniformField, z", z, Units.FIELD);
        if (assumption == null) {
            throw new AuthorException(kind + ": inUniformField adds to surroundings, which are not stated. Write .inFreeSpace(), .inMedium(eps_r), "
                    + ".above(groundPlane(\"z\", \"0\")) or .outside(floatingSphere(centre, radius)) before it.");
        }
        String text = assumption + "; uniform field (" + Given.text(x) + ", " + Given.text(y) + ", " + Given.text(z) + ") applied from far away";
        return new Distribution(kind, source.with(new Surroundings.Applied(source.around(), ex, ey, ez)), text, zero, asked);
    }

    private Distribution in(Surroundings around, String text) {
        if (assumption != null) {
            throw new AuthorException(kind + ": its surroundings are stated twice, '" + assumption + "' and '" + text + "'. Keep one.");
        }
        return new Distribution(kind, source.with(around), text, zero, asked);
    }

    private static String described(Object given, double value) {
        String text = Given.text(given);
        return text.matches("[0-9.eE+-]+") ? text : text + " = " + Amount.of(value);
    }

    // Questions

    /** Potential is counted from this place on; endless charge has no other zero. */
    public Distribution zeroAt(Place place) {
        if (place == null) {
            throw new AuthorException("zeroAt: its place is missing (null). Give one, for example at(\"0\", \"0\", \"1 m\").");
        }
        return new Distribution(kind, source, assumption, place, asked);
    }

    /** For the questions after it: another relative tolerance than the sheet's, for example {@code toAccuracy(1e-6)} where 1e-9 takes long. */
    public Distribution toAccuracy(Object relative) {
        double tolerance = Given.plain("toAccuracy, relative tolerance", relative);
        if (!(tolerance >= 1e-14 && tolerance <= 0.1)) {
            throw new AuthorException("toAccuracy(" + Given.text(relative) + "): a relative tolerance lies between 1e-14 and 0.1, such as 1e-6.");
        }
        return new Distribution(kind, source, assumption, zero, new Asked(tolerance, asked.closedForms));
    }

    /**
     * For the questions after it: {@code "auto"} takes closed forms where there are any and panels elsewhere, {@code "off"} panels alone,
     * {@code "only"} closed forms alone. Asked both ways, one answer checks the other.
     */
    public Distribution closedForms(String use) {
        return new Distribution(kind, source, assumption, zero, new Asked(asked.relative, ClosedForms.named(use)));
    }

    /** Total charge on the region, in C; charge induced on conductors is not counted. */
    public Amount totalCharge() {
        return ask(solver -> solver.totalCharge());
    }

    /** Electric field strength in V/m. On a charged surface or a conductor a pair of one-sided values. */
    public Vector electricField(Place place) {
        return ask(solver -> solver.electricField(place));
    }

    /** Electric flux density D in C/m². */
    public Vector fluxDensity(Place place) {
        return ask(solver -> solver.fluxDensity(place));
    }

    /** Potential in V; zero at infinity, on the grounded conductor, or where {@link #zeroAt} says. */
    public Amount potential(Place place) {
        return ask(solver -> potential(solver, place));
    }

    /** Charge per area on a conductor, C/m², at a place of its surface; negative before positive charge. */
    public Amount inducedDensity(Place place) {
        return ask(solver -> solver.inducedDensity(place));
    }

    /** The largest field strength over a line, surface or volume. */
    public FieldPeak peakField(Shape region) {
        return ask(solver -> new FieldPeak(Peak.over(region.region(), solver, Peak.WITHIN)), searching());
    }

    /** How fast the field falls along a path, -d ln|E| / d ln s: the mean between its ends. 1 for a line, 2 for a point, 3 for a dipole. */
    public Amount decayExponent(Path path) {
        return ask(solver -> DecayExponent.mean(solver, path::place, path.from(), path.to()));
    }

    /** The same at one place of the path, given by the coordinate or distance that runs. */
    public Amount decayExponent(Path path, Object at) {
        double s = Given.length("decayExponent, at", at);
        return ask(solver -> DecayExponent.at(solver, path::place, s, path.from(), path.to()));
    }

    // Questions about the whole

    /**
     * Flux of D in C: through a surface towards its normal, or out of a volume through its boundary. The normal points where
     * the coordinate that is held fixed grows; that of a parametric surface or a polygon is right-handed about its parameters or
     * corners in the order written. The surface may cut the charge; for one that lies on charge or a conductor name the side.
     */
    public Amount fluxThrough(Shape surface) {
        return askWhole((charge, accuracy) -> Flux.of(charge, accuracy).through(surface.region(), null));
    }

    /** @param side whose D is meant where the surface lies on charge or a conductor: {@code "+z"}, {@code "-r"} */
    public Amount fluxThrough(Shape surface, String side) {
        return askWhole((charge, accuracy) -> Flux.of(charge, accuracy).through(surface.region(), side));
    }

    /** Integral of E along a line from its beginning to its end, in V: the potential there less the potential here. */
    public Amount voltageAlong(Shape line) {
        return askWhole((charge, accuracy) -> Flux.of(charge, accuracy).along(line.region()));
    }

    /**
     * Work to bring this charge together, in J; with its factor 1/2 for charge itself and for what it induces, so that its fall along a
     * way is the force. Unbounded for lines and points: ask {@link #energyWith} or {@link #energyBySurroundings}.
     */
    public Amount energy() {
        return askWhole((charge, accuracy) -> Interaction.of(charge, accuracy).energy());
    }

    /** Work to bring another charge near, in J, beyond what each takes alone. */
    public Amount energyWith(Distribution other) {
        return askWhole((charge, accuracy) -> Interaction.of(charge, accuracy).energyWith(other.source));
    }

    /** The share of the surroundings in the energy, in J: of induced charge, with its factor 1/2, and of an applied field. */
    public Amount energyBySurroundings() {
        return askWhole((charge, accuracy) -> Interaction.of(charge, accuracy).energyBySurroundings());
    }

    /**
     * Force in N of this charge and what it induces on another charge in the same surroundings; on itself, the force of what it
     * induces and of an applied field.
     */
    public Vector forceOn(Distribution other) {
        return askWhole((charge, accuracy) -> Interaction.of(charge, accuracy).forceOn(other.source));
    }

    /** Torque in N m about a place, of the forces of {@link #forceOn}. */
    public Vector torqueOn(Distribution other, Place about) {
        return askWhole((charge, accuracy) -> Interaction.of(charge, accuracy).torqueOn(other.source, about));
    }

    /** Dipole moment in C m of charge whose total is zero; what it induces is not counted. */
    public Vector dipoleMoment() {
        return askWhole((charge, accuracy) -> Moments.dipole(charge, null, accuracy));
    }

    /** Dipole moment about a place, in C m. */
    public Vector dipoleMoment(Place about) {
        return askWhole((charge, accuracy) -> Moments.dipole(charge, about, accuracy));
    }

    /** Quadrupole moment, the integral of density times (3 x_i x_j - r^2 delta_ij) about a place, in C m^2: its {@code xx() … yz()}. */
    public Moments.Quadrupole quadrupoleMoment(Place about) {
        return askWhole((charge, accuracy) -> Moments.quadrupole(charge, about, accuracy));
    }

    private <T> T askWhole(BiFunction<Source, Accuracy, T> question) {
        state();
        return question.apply(source, asked.of(Desk.current().accuracy()));
    }

    List<Vector> electricFields(List<Place> places) {
        return fieldSampling(false).apply(places);
    }

    List<Vector> fluxDensities(List<Place> places) {
        return fieldSampling(true).apply(places);
    }

    List<Amount> potentials(List<Place> places) {
        return potentialSampling().apply(places);
    }

    /** E, or D, at one place or many, for pictures; many on all processors. */
    Function<List<Place>, List<Vector>> fieldSampling(boolean displacement) {
        return ask(solver -> places -> places.size() == 1
                ? List.of(displacement ? solver.fluxDensity(places.get(0)) : solver.electricField(places.get(0)))
                : displacement ? many().fluxDensities(places) : many().electricFields(places), drawing());
    }

    /** V likewise. */
    Function<List<Place>, List<Amount>> potentialSampling() {
        return ask(solver -> places -> places.size() == 1 ? List.of(potential(solver, places.get(0))) : many().potentials(places, zero), drawing());
    }

    List<FieldLine> fieldLines(List<Place> starts, double reach) {
        return ask(solver -> starts.stream().map(start -> FieldLine.through(start, solver, reach)).toList(), searching());
    }

    private ManyPlaces many() {
        return ManyPlaces.of(source, drawing(), Workers.all());
    }

    private Amount potential(FieldSolver solver, Place place) {
        return zero == null ? solver.potential(place) : solver.potential(place, zero);
    }

    private <T> T ask(Function<FieldSolver, T> question) {
        return ask(question, asked.of(Desk.current().accuracy()));
    }

    /** For pictures, which show six digits at most. */
    private Accuracy drawing() {
        return atMost(1e-6);
    }

    /** For searches, which ask a thousand times. */
    private Accuracy searching() {
        return atMost(1e-8);
    }

    private Accuracy atMost(double relative) {
        Accuracy accuracy = asked.of(Desk.current().accuracy());
        return accuracy.withRelative(Math.max(accuracy.relative(), relative));
    }

    private <T> T ask(Function<FieldSolver, T> question, Accuracy accuracy) {
        state();
        return question.apply(FieldSolver.of(source, accuracy));
    }

    private void state() {
        if (assumption == null) {
            throw new AuthorException(kind + ": its surroundings are not stated, so it answers nothing. Write .inFreeSpace(), .inMedium(eps_r),"
                    + " or .under(groundPlane(\"z\", \"H\")) (.above, .beside) after it. Leaving out an earthed wall errs to the unsafe side.");
        }
        Desk.current().sayOnce(new Output.Assumption(assumption));
    }

    /** The charge as the engine takes it. */
    Source source() {
        return source;
    }
}
