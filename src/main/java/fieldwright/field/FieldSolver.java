package fieldwright.field;

import java.util.ArrayList;
import java.util.List;

import javax.measure.Dimension;

import fieldwright.charge.Charge;
import fieldwright.charge.PointCharge;
import fieldwright.charge.Source;
import fieldwright.charge.Surroundings;
import fieldwright.formula.Constants;
import fieldwright.formula.Formula;
import fieldwright.geometry.Chart;
import fieldwright.geometry.Nodes;
import fieldwright.integral.Cubature;
import fieldwright.integral.Estimate;
import fieldwright.integral.RegionIntegral;
import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Place;
import fieldwright.quantity.Standing;
import fieldwright.quantity.Units;
import fieldwright.quantity.Vector;

/**
 * Answers for one source: total charge (C), E (V/m), D (C/m²), V (V, zero at infinity or on the grounded conductor).
 *
 * <p>Any place is allowed. On a charged surface, a conductor or an interface the field is a pair of one-sided values; on an
 * edge, a line or a point charge it is unbounded; inside a conductor it is zero. What was not reached within the accuracy says
 * so in its standing, with value and error. Each answer depends on its own question only.
 * Errors: AuthorException when the surroundings were not stated, for anything wrong in the region or the density, for charge behind
 * or in a conductor, and for a potential that does not exist.
 * Immutable but for scratch space: one thread at a time.
 */
public final class FieldSolver {
    /** Relative rounding of long chains of maps, measured on places 1e2 sizes away: 1.5e-14. */
    private static final double ROUNDING = 120 * Sampler.EPS;

    private static final Standing LOST_DIGITS = Standing.notConverged("closed forms alone: one of them lost more digits at this place than the accuracy"
        + " allows. Write closedForms(\"auto\"), so that panels help out");

    private final Source source;
    private final Accuracy accuracy;
    private final Compiled compiled;
    private final Workspace space = new Workspace();
    private boolean checked;
    private boolean lostDigits;
    /** What series of the surroundings leave out for point charges, in units of the kernel. */
    private double leftOut;
    private int evaluations;

    private FieldSolver(Source source, Accuracy accuracy, Compiled compiled) {
        this.source = source;
        this.accuracy = accuracy;
        this.compiled = compiled;
    }

    /** Compiles the source once for many questions. */
    public static FieldSolver of(Source source, Accuracy accuracy) {
        return new FieldSolver(source, accuracy, Compiled.of(source, accuracy.closedForms()));
    }

    /** With the sets of very many charges as they were prepared for the places to come. */
    static FieldSolver of(Source source, Accuracy accuracy, List<Crowd> crowds) {
        return new FieldSolver(source, accuracy, Compiled.of(source, accuracy.closedForms(), crowds));
    }

    public static Vector electricField(Source source, Place at, Accuracy accuracy) {
        return of(source, accuracy).electricField(at);
    }

    public static Vector fluxDensity(Source source, Place at, Accuracy accuracy) {
        return of(source, accuracy).fluxDensity(at);
    }

    public static Amount potential(Source source, Place at, Accuracy accuracy) {
        return of(source, accuracy).potential(at);
    }

    public static Amount totalCharge(Source source, Accuracy accuracy) {
        return of(source, accuracy).totalCharge();
    }

    /** Kernel evaluations of the last answer. */
    public int evaluations() {
        return evaluations;
    }

    // ---- total charge

    /** Sum of all charge; needs no surroundings. Errors: AuthorException for endless uniform charge, which has no total. */
    public Amount totalCharge() {
        if (compiled.hasEndlessKernel()) {
            throw new AuthorException("totalCharge of endless charge: it has no finite total. Give the region finite limits, or multiply the density by a length.");
        }
        Amount sum = Amount.si(0, 0, Units.CHARGE);
        evaluations = 0;
        for (Charge charge : compiled.charges) {
            double floor = accuracy.absoluteFloor();
            Estimate e = RegionIntegral.over(charge.region(), charge.density(), Math.max(1e-15, accuracy.relative() * 1e-4), floor, 200_000);
            evaluations += e.evaluations();
            double allowed = Math.max(floor, accuracy.relative() * Math.abs(e.value()));
            if (e.status() == Estimate.Status.EVALUATION_LIMIT && e.errorEstimate() > allowed && accuracy.maxEvaluations() > 200_000) {
                e = RegionIntegral.over(charge.region(), charge.density(), accuracy.relative(), floor, accuracy.maxEvaluations());
                evaluations += e.evaluations();
            }
            Standing standing = Standing.CONVERGED;
            if (e.status() == Estimate.Status.NOT_A_NUMBER) {
                standing = Standing.notConverged("total charge: the density is not a number, or has no finite total, somewhere in the region");
                e = new Estimate(Double.NaN, Double.POSITIVE_INFINITY, e.evaluations(), e.status());
            } else if (!e.isConverged() && e.errorEstimate() > Math.max(allowed, 1e-13 * Math.abs(e.value()))
                && !(e.errorEstimate() <= 1e-3 * accuracy.relative() * cancelling(charge))) {
                standing = notConverged("total charge", e.evaluations(), e.errorEstimate(), allowed, "C");
            }
            sum = sum.plus(Amount.si(e.value(), e.errorEstimate(), Units.CHARGE, standing));
        }
        for (PointCharge point : compiled.points) {
            sum = sum.plus(point.charge());
        }
        for (Crowd crowd : compiled.crowds) {
            sum = sum.plus(crowd.total());
        }
        return sum;
    }

    /** How much charge of both signs there is, about: the root of ∫σ² times the measure of the region; C. A total of zero is judged by it. */
    private double cancelling(Charge charge) {
        Estimate squares = RegionIntegral.over(charge.region(), charge.density().times(charge.density()), 1e-2, 0, 20_000);
        Estimate measure = RegionIntegral.over(charge.region(), Formula.constant(1), 1e-2, 0, 20_000);
        evaluations += squares.evaluations() + measure.evaluations();
        return Math.sqrt(squares.value() * measure.value());
    }

    // ---- field

    /** E in V/m. */
    public Vector electricField(Place at) {
        return field(at, false);
    }

    /** D in C/m². */
    public Vector fluxDensity(Place at) {
        return field(at, true);
    }

    private Vector field(Place at, boolean flux) {
        return field(at, Images.question(source.around(), at), flux);
    }

    private Vector field(Place at, Question q, boolean flux) {
        checkSurroundings();
        evaluations = 0;
        if (q.side() == null) {
            return vector(at, q, q.here(), q.permittivityBehind(), flux);
        }
        Vector plus = vector(at, q, q.here(), q.permittivity(), flux);
        Vector minus = vector(at, q, q.behind(), q.permittivityBehind(), flux);
        if (plus.isSided() || minus.isSided()) {
            plus = plus.isSided() ? plus.onSide(q.side()[0], q.side()[1], q.side()[2]) : plus;
            minus = minus.isSided() ? minus.onSide(-q.side()[0], -q.side()[1], -q.side()[2]) : minus;
        }
        if (plus.standing().kind() == Standing.Kind.UNBOUNDED) {
            return plus;
        }
        return Vector.sided(at, q.side(), plus, minus);
    }

    /** From kernel units: 1/(4π eps0 eps_r), for D times the permittivity at the place. */
    private static double scale(Question q, boolean flux, double local) {
        return flux ? local / (4 * Math.PI * q.permittivity()) : 1 / (4 * Math.PI * Constants.EPS0 * q.permittivity());
    }

    private static Vector zero(Place at, Dimension unit) {
        Amount nothing = Amount.si(0, 0, unit);
        return Vector.of(at, nothing, nothing, nothing);
    }

    private Vector vector(Place at, Question q, View view, double local, boolean flux) {
        Dimension unit = flux ? Units.SURFACE_DENSITY : Units.FIELD;
        if (view.isConductor()) {
            return zero(at, unit);
        }
        double scale = scale(q, flux, local);
        Paver paver = new Paver(false, space, accuracy.relative());
        double[] placeError = new double[3];
        see(view, Images.coordinates(at), paver, placeError);
        Vector own = vector(at, paver, placeError, scale, unit);
        if (!view.hasSteadyField() || own.standing().kind() == Standing.Kind.UNBOUNDED) {
            return own;
        }
        double factor = flux ? Constants.EPS0 * local : 1;
        Amount[] steady = new Amount[3];
        for (int k = 0; k < 3; k++) {
            double e = factor * view.field()[k];
            steady[k] = Amount.si(e, 8 * Sampler.EPS * factor * norm(view.field()), unit);
        }
        return own.plus(Vector.of(at, steady[0], steady[1], steady[2]));
    }

    /** All of the source, through the probes and smooth parts of a view. */
    private void see(View view, double[] at, Paver paver, double[] error) {
        leftOut = 0;
        for (PointCharge point : compiled.points) {
            if (point.charge().si() == 0) {
                continue;
            }
            boolean far = isFar(view, at, Images.coordinates(point.at()), 0);
            for (Probe probe : far ? List.<Probe>of() : view.probes()) {
                if (paver.isPotential()) {
                    potentialOf(point, probe, paver, error);
                } else {
                    fieldOf(point, probe, paver, error);
                }
            }
            smooth(point, far ? view.far() : view.green(), paver, error);
        }
        ClosedSum closed = new ClosedSum(paver, accuracy, error);
        for (SpreadBody body : compiled.bodies) {
            boolean far = view.far() != null && compiled.isFar(body, space, ball -> isFar(view, at, ball.centre(), ball.radius()));
            if (!far && view.round() != null && compiled.isRound(body, view.round().cylinder(), space)) {
                seeRound(body, view.round(), paver, closed, error);
                continue;
            }
            for (Probe probe : far ? List.<Probe>of() : view.probes()) {
                closed.see(body, probe);
            }
            body.patches().forEach(patch -> smooth(patch, far ? view.far() : view.green(), paver, error));
        }
        closed.finish();
        evaluations += closed.evaluations();
        lostDigits = closed.hasLostDigits();
        for (Crowd crowd : compiled.crowds) {
            see(crowd, view, at, paver, error);
        }
    }

    /** A body that is the same all round the axis of the cylinder it is in. */
    private void seeRound(SpreadBody body, View.Round round, Paver paver, ClosedSum closed, double[] error) {
        List<Patch> patches = body.patches();
        for (int i = 0; i < patches.size(); i++) {
            RingGreen.Parts parts = round.parts().apply(compiled.ball(body.first() + i, space));
            if (i == 0) {
                parts.probes().forEach(probe -> closed.see(body, probe));
            }
            smooth(patches.get(i), parts.green(), paver, error);
            GreenPiece.add(patches.get(i), parts.wall(), paver, space, error, Turn.of(patches.get(i), round.cylinder()));
        }
    }

    private void see(Crowd crowd, View view, double[] at, Paver paver, double[] error) {
        boolean far = view.far() != null && isFar(view, at, crowd.centre(), crowd.radius());
        for (Probe probe : far ? List.<Probe>of() : view.probes()) {
            crowd.see(probe, paver, error);
            evaluations += crowd.size();
        }
        crowd.smooth(far ? view.far() : view.green(), paver, error);
    }

    private static boolean isFar(View view, double[] at, double[] centre, double radius) {
        return view.far() != null
            && norm(new double[] {at[0] - centre[0], at[1] - centre[1], at[2] - centre[2]}) - radius > Math.max(view.farBeyond(), 0.3 * radius);
    }

    private void smooth(PointCharge point, Green green, Paver paver, double[] error) {
        if (green == null) {
            return;
        }
        double[] at = Images.coordinates(point.at());
        double[][] s = {{at[0]}, {at[1]}, {at[2]}};
        double[][] out = new double[3][1];
        double q = point.charge().si();
        double[] doubt = new double[1];
        if (paver.isPotential()) {
            green.potential(s, 1, out[0], doubt);
        } else {
            green.field(s, 1, out, doubt);
        }
        double size = norm(new double[] {out[0][0], out[1][0], out[2][0]});
        double relative = point.charge().error() / Math.abs(q) + 4 * Sampler.EPS;
        leftOut += Math.abs(q) * doubt[0];
        for (int a = 0; a < paver.start.length; a++) {
            paver.start[a] += q * out[a][0];
            error[a] += Math.abs(q) * (doubt[0] + relative * size);
        }
    }

    private void smooth(Patch patch, Green green, Paver paver, double[] error) {
        if (green != null) {
            GreenPiece.add(patch, patch.kernel().isEndless() ? green.endless(patch) : green.forPatch(), paver, space, error);
        }
    }

    private Vector vector(Place at, Paver paver, double[] placeError, double scale, Dimension unit) {
        Contact contact = paver.contact;
        if (contact.unboundedReason() != null) {
            return Vector.unbounded(at, unit, contact.unboundedDirection(), contact.unboundedReason());
        }
        Cubature.Result r = integrate(paver, 3, true, scale);
        double[] error = new double[3];
        double size = 0;
        double errorSize = 0;
        for (int a = 0; a < 3; a++) {
            size += r.value()[a] * r.value()[a];
        }
        size = Math.sqrt(size);
        for (int a = 0; a < 3; a++) {
            error[a] = r.error()[a] + placeError[a] + paver.rimError() + paver.roughness() * size + ROUNDING * Math.abs(r.value()[a]);
            errorSize += error[a] * error[a];
        }
        Standing standing = standing("field", r, Math.sqrt(errorSize), Math.max(size, 0.5 * norm(contact.jump())), norm(r.magnitude()),
            Math.max(paver.roughness(), paver.offsetRounding()), scale,
            unit.equals(Units.FIELD) ? "V/m" : "C/m^2");
        if (contact.isFolded()) {
            standing = Standing.notConverged("two charged surfaces meet or cross here: the field has more than two values at this place");
        }
        double[] v = r.value();
        if (!contact.isSided()) {
            return make(at, v, error, null, 0, scale, unit, standing);
        }
        return Vector.sided(at, contact.normal(), make(at, v, error, contact.jump(), 0.5, scale, unit, standing),
            make(at, v, error, contact.jump(), -0.5, scale, unit, standing));
    }

    private static double norm(double[] v) {
        return Math.sqrt(v[0] * v[0] + v[1] * v[1] + v[2] * v[2]);
    }

    private static Vector make(Place at, double[] v, double[] error, double[] jump, double part, double scale, Dimension unit, Standing standing) {
        Amount[] c = new Amount[3];
        for (int a = 0; a < 3; a++) {
            double step = jump == null ? 0 : part * jump[a];
            double value = scale * (v[a] + step);
            double e = scale * (error[a] + 4 * Sampler.EPS * Math.abs(step)) + 4 * Sampler.EPS * Math.abs(value);
            c[a] = Amount.si(value, Double.isNaN(e) ? Double.POSITIVE_INFINITY : e, unit, standing);
        }
        return Vector.of(at, c[0], c[1], c[2]);
    }

    private static void fieldOf(PointCharge point, Probe probe, Paver paver, double[] placeError) {
        double q = point.charge().si();
        double[] at = Images.coordinates(point.at());
        double[] d = new double[3];
        double size = 0;
        for (int a = 0; a < 3; a++) {
            d[a] = at[a] - probe.place()[a];
            size += Math.abs(at[a]) + Math.abs(probe.place()[a]);
        }
        double distance = norm(d);
        if (!(distance > 4 * Sampler.EPS * size)) {
            paver.contact.unbounded("on a point charge: the field grows without bound as 1 over the distance squared", null);
            return;
        }
        double unit = q / distance / distance;
        double relative = 8 * Sampler.EPS + 2 * Sampler.EPS * size / distance + point.charge().error() / Math.abs(q);
        for (int a = 0; a < 3; a++) {
            double sum = 0;
            for (int k = 0; k < 3; k++) {
                sum -= probe.a()[3 * a + k] * (d[k] / distance) * unit;
            }
            double own = Math.abs(sum);
            if (probe.b() != null) {
                double v = probe.b()[a] * q / distance;
                sum += v;
                own += Math.abs(v);
            }
            paver.start[a] += sum;
            placeError[a] += relative * (own + Math.abs(unit) * 0.5);
        }
    }

    // ---- potential

    /**
     * V, zero at infinity or on the grounded conductor.
     * Errors: AuthorException when the charge is endless and has no such potential: use {@link #potential(Place, Place)}.
     */
    public Amount potential(Place at) {
        Question q = Images.question(source.around(), at);
        checkSurroundings();
        if (source.around() instanceof Surroundings.Applied applied && !applied.hasZero()) {
            throw new AuthorException("potential in an applied uniform field: it falls without end, so it has no zero of its own. "
                + "Name the place where it is zero: .potential(place) with zeroAt(place).");
        }
        return potential(q, at);
    }

    private Amount potential(Question q, Place at) {
        evaluations = 0;
        View view = q.forPotential();
        if (hasEndless() && !isSettled(view) && (compiled.hasEndlessKernel() || !tailsConverge(view))) {
            throw endlessPotential();
        }
        return potential(view, Images.coordinates(at), scale(q, false, 1));
    }

    private boolean hasEndless() {
        return compiled.hasEndlessKernel() || compiled.hasEndlessChart();
    }

    /** Whether an endless source has a potential there. */
    private static boolean isSettled(View view) {
        return view.isConductor() && view.probes().isEmpty() || view.isBalanced() || view.round() != null;
    }

    private static AuthorException endlessPotential() {
        return new AuthorException("potential of endless charge: it is not zero at infinity, so it has no value of its own. "
            + "Name the place where it is zero: .potential(place) with zeroAt(place).");
    }

    /** V(at) − V(zero), for charge of any extent. */
    public Amount potential(Place at, Place zero) {
        Question here = Images.question(source.around(), at);
        Question there = Images.question(source.around(), zero);
        checkSurroundings();
        View a = here.forPotential();
        View b = there.forPotential();
        if (!hasEndless() || isSettled(a) && isSettled(b)) {
            return potential(here, at).minus(potential(there, zero));
        }
        evaluations = 0;
        if (!compiled.hasEndlessChart() && a.green() == null && b.green() == null) {
            List<Probe> all = new ArrayList<>(a.probes());
            b.probes().forEach(p -> all.add(p.times(-1)));
            return potential(View.of(all).plus(new double[3], a.potential() - b.potential()), Images.coordinates(at), scale(here, false, 1));
        }
        return alongPath(at, zero);
    }

    /** −∫ E·dl on the straight way from {@code zero}. */
    private Amount alongPath(Place at, Place zero) {
        double[] step = {at.x() - zero.x(), at.y() - zero.y(), at.z() - zero.z()};
        int[] count = {0};
        double[] worst = {0};
        fieldwright.integral.Integrand f = new fieldwright.integral.Integrand() {
            @Override
            public int dimension() {
                return 1;
            }

            @Override
            public int components() {
                return 1;
            }

            @Override
            public void evaluate(double[][] u, int n, double[][] out, double[] noise) {
                for (int i = 0; i < n; i++) {
                    double t = u[0][i];
                    Vector e = electricField(new Place(zero.x() + t * step[0], zero.y() + t * step[1], zero.z() + t * step[2]));
                    e = e.isSided() ? e.mean() : e;
                    count[0] += evaluations;
                    out[0][i] = -(e.x().si() * step[0] + e.y().si() * step[1] + e.z().si() * step[2]);
                    noise[i] = Math.abs(e.x().error() * step[0]) + Math.abs(e.y().error() * step[1]) + Math.abs(e.z().error() * step[2]);
                    worst[0] = e.standing().isConverged() ? worst[0] : 1;
                }
            }
        };
        Cubature.Result r = Cubature.integrate(List.of(Cubature.Piece.whole(f, 12)), 1, false,
            new Cubature.Goal(accuracy.relative(), 1e-3, accuracy.absoluteFloor(), 3000), null);
        evaluations = count[0];
        Standing standing = r.isConverged() && worst[0] == 0 ? Standing.CONVERGED
            : notConverged("potential difference", evaluations, r.error()[0], accuracy.relative() * Math.abs(r.value()[0]), "V");
        return Amount.si(r.value()[0], r.error()[0], Units.POTENTIAL, standing);
    }

    private static void potentialOf(PointCharge point, Probe probe, Paver paver, double[] error) {
        double[] at = Images.coordinates(point.at());
        double[] d = new double[3];
        double size = 0;
        for (int a = 0; a < 3; a++) {
            d[a] = at[a] - probe.place()[a];
            size += Math.abs(at[a]) + Math.abs(probe.place()[a]);
        }
        double q = point.charge().si();
        if (!(norm(d) > 4 * Sampler.EPS * size)) {
            paver.contact.unbounded("on a point charge: the potential grows without bound", null);
        } else {
            double v = probe.c() * q / norm(d);
            paver.start[0] += v;
            error[0] += Math.abs(v) * (4 * Sampler.EPS + Sampler.EPS * size / norm(d) + point.charge().error() / Math.abs(q));
        }
    }

    private Amount potential(View view, double[] at, double scale) {
        Paver paver = new Paver(true, space, accuracy.relative());
        double[] pointError = new double[1];
        see(view, at, paver, pointError);
        if (paver.contact.isUnboundedLine()) {
            return Amount.si(Double.NaN, Double.POSITIVE_INFINITY, Units.POTENTIAL,
                Standing.unbounded(paver.contact.unboundedReason().replace("field", "potential").replace(" as 1 over the distance", "")));
        }
        Cubature.Result r = integrate(paver, 1, false, scale);
        double value = r.value()[0];
        double error = r.error()[0] + pointError[0] + ROUNDING * Math.abs(value) + paver.roughness() * Math.abs(value);
        Standing standing = standing("potential", r, error, Math.abs(value), r.magnitude()[0], Math.max(paver.roughness(), paver.offsetRounding()), scale, "V");
        double stated = scale * error + 8 * Sampler.EPS * Math.abs(view.potential());
        return Amount.si(scale * value + view.potential(), Double.isNaN(stated) ? Double.POSITIVE_INFINITY : stated, Units.POTENTIAL, standing);
    }

    // ---- what the surroundings add

    /**
     * E (V/m) of the charge induced in the surroundings alone: the field less that of the source itself, as it would be with the
     * medium of the charge everywhere. Any place, within the charge too, where it is smooth: ∫ρ·E_reaction is the force on the
     * charge. Zero in free space. On a conductor or an interface a pair of one-sided values.
     */
    public Vector reactionField(Place at) {
        return field(at, Images.question(source.around(), at).reaction(at), false);
    }

    /**
     * V (V) of the charge induced in the surroundings alone, see {@link #reactionField}; ½∫ρ·V_reaction is the work done by bringing the
     * charge here from far away. Errors: AuthorException for endless charge.
     */
    public Amount reactionPotential(Place at) {
        Question q = Images.question(source.around(), at).reaction(at);
        checkSurroundings();
        evaluations = 0;
        return potential(q, at);
    }

    /**
     * Charge per area on a conductor at a place of its surface (C/m²), eps times the field's normal component there: all that stands on
     * it, induced, applied or its own, with its sign: negative where the field runs into the conductor, as before positive charge. On a
     * thin shell both faces together; zero on an edge between two walls. The place may be off by 1e-9 of its size.
     * Errors: AuthorException when there is no conductor, or the place is not on one.
     */
    public Amount inducedDensity(Place at) {
        Question asked = Images.question(source.around(), at);
        Place on = asked.side() == null ? Images.foot(source.around(), at) : at;
        double off = Images.distance(on, at);
        double size = norm(Images.coordinates(on)) + norm(Images.coordinates(at));
        if (off > 1e-9 * size || Images.clearance(source.around(), Images.coordinates(on)) != 0) {
            throw new AuthorException("charge on a conductor at " + text(at) + ": the place is " + digits(off) + " m from the surface of the "
                + source.around().title() + ". The nearest place on it is " + text(on) + ".");
        }
        Question q = Images.question(source.around(), on);
        if (q.side() == null) {
            return Amount.si(0, 0, Units.SURFACE_DENSITY);
        }
        double[] n = q.side();
        Vector d = field(on, q, true);
        Amount[] plus = components(d.onSide(n[0], n[1], n[2]));
        Amount[] minus = components(d.onSide(-n[0], -n[1], -n[2]));
        Amount sum = Amount.si(0, 0, Units.SURFACE_DENSITY);
        for (int k = 0; k < 3; k++) {
            sum = sum.plus(plus[k].minus(minus[k]).times(n[k]));
        }
        return sum;
    }

    private static String text(Place p) {
        return "(" + digits(p.x()) + ", " + digits(p.y()) + ", " + digits(p.z()) + ") m";
    }

    private static String digits(double v) {
        return new java.math.BigDecimal(v).round(new java.math.MathContext(9)).stripTrailingZeros().toString();
    }

    private static Amount[] components(Vector v) {
        return new Amount[] {v.x(), v.y(), v.z()};
    }

    /** Whether the potential integral of mapped endless charge settles, from few evaluations. */
    private boolean tailsConverge(View view) {
        Paver paver = new Paver(true, space, accuracy.relative());
        for (Probe probe : view.probes()) {
            for (Patch patch : compiled.patches) {
                paver.pave(patch, probe);
            }
        }
        Cubature.Result r = Cubature.integrate(paver.pieces, 1, false, new Cubature.Goal(1e-6, 0, 0, 150_000), paver.start);
        return r.isConverged();
    }

    // ---- common

    private Cubature.Result integrate(Paver paver, int components, boolean grouped, double scale) {
        double relative = Math.max(0.5 * accuracy.relative(), 0.5 * paver.roughness());
        Cubature.Goal goal = new Cubature.Goal(relative, 1e-3, accuracy.absoluteFloor() / Math.abs(scale), accuracy.maxEvaluations());
        Cubature.Result r = Cubature.integrate(paver.pieces, components, grouped, goal, paver.start, space.cubature);
        evaluations += r.evaluations();
        return r;
    }

    private Standing standing(String what, Cubature.Result r, double error, double size, double magnitude, double roughness, double scale,
        String unit) {
        if (r.status() == Estimate.Status.NOT_A_NUMBER) {
            return Standing.notConverged(what + ": a number came out that is none; the integral has no finite value here, or the density is infinite near by");
        }
        if (lostDigits) {
            return LOST_DIGITS;
        }
        double relative = Math.max(accuracy.relative(), 4 * roughness);
        double allowed = Math.max(accuracy.absoluteFloor() / Math.abs(scale), relative * Math.max(size, 1e-3 * magnitude));
        if (leftOut > allowed) {
            return Standing.notConverged(String.format(java.util.Locale.ROOT, "%s: the series of the wall is cut off with %.2g %s left out, tolerance "
                + "%.2g %s: place and charge are both close to the round wall. Move one of them off, or take the wall as a plane there", what,
                scale * leftOut, unit, scale * allowed, unit));
        }
        if (r.isConverged() || error <= allowed) {
            return Standing.CONVERGED;
        }
        return notConverged(what, r.evaluations(), scale * error, scale * allowed, unit);
    }

    private Standing notConverged(String what, int evaluations, double error, double allowed, String unit) {
        String remedy = hasEndless() ? "The charge is endless: unless its density falls off fast enough, there is no value to find"
            : "Loosen the accuracy, or split the region where the density bends";
        return Standing.notConverged(String.format(java.util.Locale.ROOT,
            "%s: %d evaluations, estimated error %.2g %s > tolerance %.2g %s. %s", what, evaluations, error, unit, allowed, unit, remedy));
    }

    /** Charge must be on the right side of a conductor or interface; looked at on a grid of each part. */
    void checkSurroundings() {
        Surroundings around = source.around();
        if (around instanceof Surroundings.Applied applied) {
            around = applied.around();
        }
        if (checked || around instanceof Surroundings.FreeSpace || around instanceof Surroundings.Medium) {
            return;
        }
        checked = true;
        for (PointCharge point : compiled.points) {
            if (point.charge().si() == 0) {
                continue;
            }
            double s = Images.clearance(around, Images.coordinates(point.at()));
            if (!(s > 0)) {
                throw wrongSide(around, "a point charge", Images.coordinates(point.at()));
            }
        }
        for (Patch patch : compiled.patches) {
            check(around, patch);
        }
        for (Crowd crowd : compiled.crowds) {
            double[] wrong = crowd.behind(around);
            if (wrong != null) {
                throw wrongSide(around, "charge", wrong);
            }
        }
    }

    private void check(Surroundings around, Patch patch) {
        Chart chart = patch.chart();
        int d = chart.dimension();
        int side = d == 1 ? 65 : d == 2 ? 15 : 6;
        int total = (int) Math.round(Math.pow(side, d));
        double[] middle = new double[d];
        java.util.Arrays.fill(middle, 0.5);
        Chart.Anchor anchor = chart.anchor(middle);
        Nodes nodes = space.nodes;
        double[][] du = new double[3][1];
        double most = Double.NEGATIVE_INFINITY;
        for (int i = 0; i < total; i++) {
            int rest = i;
            for (int k = 0; k < d; k++) {
                double u = (double) (rest % side) / (side - 1);
                rest /= side;
                u = chart.isEndless(k) ? Math.min(0.999, Math.max(0.001, u)) : u;
                du[k][0] = u - 0.5;
            }
            if (patch.triangle() && du[0][0] + du[1][0] > 1e-9) {
                continue;
            }
            chart.evaluate(anchor, du, 1, nodes);
            double[] own = new double[3];
            for (int a = 0; a < 3; a++) {
                own[a] = anchor.position()[a] + nodes.offset[a][0];
            }
            double[] p = patch.frame().toSheet(own);
            double s = Images.clearance(around, p);
            if (s < 0) {
                throw wrongSide(around, "charge", p);
            }
            most = Math.max(most, s);
        }
        if (patch.kernel().isEndless() && across(around, patch)) {
            throw new AuthorException("endless charge runs through the " + around.title() + ". Keep the charge on one side of it.");
        }
        if (!(most > 0)) {
            throw new AuthorException("charge lies in the face of the " + around.title()
                + ": its image cancels it. Move it off the face, or leave it out.");
        }
    }

    /** Whether endless charge meets a wall. */
    private static boolean across(Surroundings around, Patch patch) {
        if (around instanceof Surroundings.GroundedCorner c) {
            return across(c.first(), patch) || across(c.second(), patch);
        }
        double[] direction = patch.frame().directionToSheet(unit(patch.kernel().axis));
        String axis = around instanceof Surroundings.GroundPlane g ? g.axis() : around instanceof Surroundings.DielectricHalfSpace h ? h.axis()
            : around instanceof Surroundings.GroundedPair p ? p.axis() : null;
        if (around instanceof Surroundings.GroundedTube tube) {
            return patch.kernel().kind != Kernel.Kind.LINE || Math.abs(direction["xyz".indexOf(tube.axis())]) < 1 - 1e-12;
        }
        if (patch.kernel().kind == Kernel.Kind.PLANE) {
            return axis == null || around instanceof Surroundings.DielectricHalfSpace || Math.abs(direction["xyz".indexOf(axis)]) < 1 - 1e-12;
        }
        if (axis == null) {
            return around instanceof Surroundings.GroundedBox || around instanceof Surroundings.GroundedDrum;
        }
        return (patch.kernel().kind == Kernel.Kind.LINE || around instanceof Surroundings.GroundedPair)
            && Math.abs(direction["xyz".indexOf(axis)]) > 1e-12;
    }

    private static double[] unit(int axis) {
        double[] v = new double[3];
        v[axis] = 1;
        return v;
    }

    private static AuthorException wrongSide(Surroundings around, String what, double[] p) {
        return new AuthorException(String.format(java.util.Locale.ROOT,
            "%s at (%.6g, %.6g, %.6g) m is behind or on the face of the %s. Move the charge to its own side, or turn the side round.",
            what, p[0], p[1], p[2], around.title()));
    }
}
