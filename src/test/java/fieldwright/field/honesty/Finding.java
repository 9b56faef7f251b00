package fieldwright.field.honesty;

import fieldwright.field.Accuracy;
import fieldwright.field.FieldSolver;
import fieldwright.quantity.Amount;
import fieldwright.quantity.Place;
import fieldwright.quantity.Standing;
import fieldwright.quantity.Vector;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;

/**
 * One answer of the engine held against the judge. {@code excess}: largest true over stated error of a component, the judge's own
 * error taken off; true and stated are norms; allowed is the tolerance asked, in the answer's unit.
 */
record Finding(Problem problem, String quantity, Outcome outcome, double excess, double trueError, double judgeError, double statedError,
        double allowed, int evaluations, String detail) {
    enum Outcome { CONVERGED, NOT_CONVERGED, UNBOUNDED, FAILED }

    private static final double EPS = Math.ulp(1.0);

    /** Field and potential of one problem; judged may be null where no finite value exists. */
    static List<Finding> of(Problem p, List<Judged> judged) {
        List<Finding> found = new ArrayList<>();
        Place at = new Place(p.at()[0], p.at()[1], p.at()[2]);
        FieldSolver solver;
        try {
            solver = FieldSolver.of(p.charge(), Accuracy.PANELS);
        } catch (RuntimeException e) {
            found.add(failed(p, "E", e));
            return found;
        }
        try {
            found.add(field(p, judged, solver.electricField(at), solver));
        } catch (RuntimeException e) {
            found.add(failed(p, "E", e));
        }
        try {
            found.add(potential(p, judged, solver.potential(at), solver));
        } catch (RuntimeException e) {
            found.add(failed(p, "V", e));
        }
        return found;
    }

    private static Finding failed(Problem p, String quantity, RuntimeException e) {
        return new Finding(p, quantity, Outcome.FAILED, 0, 0, 0, 0, 0, 0, e + " at " + e.getStackTrace()[0]);
    }

    private static Outcome outcome(Standing s) {
        return switch (s.kind()) {
            case CONVERGED -> Outcome.CONVERGED;
            case NOT_CONVERGED -> Outcome.NOT_CONVERGED;
            case UNBOUNDED -> Outcome.UNBOUNDED;
        };
    }

    private static Finding field(Problem p, List<Judged> judged, Vector e, FieldSolver solver) {
        if (p.fieldUnbounded() || e.standing().kind() == Standing.Kind.UNBOUNDED) {
            return new Finding(p, "E", outcome(e.standing()), 0, 0, 0, 0, 0, solver.evaluations(), e.standing().reason());
        }
        if (!p.sided()) {
            if (e.isSided()) {
                return new Finding(p, "E", Outcome.FAILED, 0, 0, 0, 0, 0, solver.evaluations(), "two values where there is one: " + e);
            }
            return compare(p, judged.get(0), e, solver);
        }
        Judged plus = judged.get(0);
        Judged minus = judged.get(1);
        double[] n = p.normal();
        if (!e.isSided()) {
            // The place is beside the surface by rounding alone: either side will do.
            Finding a = compare(p, plus, e, solver);
            Finding b = compare(p, minus, e, solver);
            return a.trueError < b.trueError ? a : b;
        }
        Finding a = compare(p, plus, e.onSide(n[0], n[1], n[2]), solver);
        Finding b = compare(p, minus, e.onSide(-n[0], -n[1], -n[2]), solver);
        return a.excess > b.excess ? a : b;
    }

    private static Finding compare(Problem p, Judged j, Vector e, FieldSolver solver) {
        Amount[] found = {e.x(), e.y(), e.z()};
        double excess = 0;
        double square = 0;
        double stated = 0;
        for (int c = 0; c < 3; c++) {
            double off = Math.abs(found[c].si() - j.value()[c]);
            excess = Math.max(excess, excess(off, j.fieldError(), found[c].error()));
            square += off * off;
            stated += found[c].error() * found[c].error();
        }
        double allowed = relative(p) * Math.max(j.field(), 1e-3 * j.fieldMagnitude());
        String detail = String.format(Locale.ROOT, "found (%.16g, %.16g, %.16g) ± (%.1e, %.1e, %.1e), judge (%.16g, %.16g, %.16g) ± %.1e %s",
                found[0].si(), found[1].si(), found[2].si(), found[0].error(), found[1].error(), found[2].error(), j.value()[0], j.value()[1],
                j.value()[2], j.fieldError(), e.standing().reason());
        return new Finding(p, "E", outcome(e.standing()), excess, Math.sqrt(square), j.fieldError(), Math.sqrt(stated), allowed,
                solver.evaluations(), detail);
    }

    private static double excess(double off, double judgeError, double stated) {
        if (Double.isNaN(off)) {
            return Double.POSITIVE_INFINITY;
        }
        return off <= judgeError ? 0 : (off - judgeError) / stated;
    }

    /** Tolerance asked; near a line the rounding of the place itself allows no better than eps·size/gap. */
    private static double relative(Problem p) {
        double far = 0;
        for (double c : p.at()) {
            far = Math.max(far, Math.abs(c));
        }
        return p.gap() == 0 || p.dimension() == 3 ? 1e-9 : Math.max(1e-9, 8 * EPS * Math.max(far, p.size()) / p.gap());
    }

    private static Finding potential(Problem p, List<Judged> judged, Amount v, FieldSolver solver) {
        if (p.potentialUnbounded() || v.standing().kind() == Standing.Kind.UNBOUNDED) {
            return new Finding(p, "V", outcome(v.standing()), 0, 0, 0, 0, 0, solver.evaluations(), v.standing().reason());
        }
        Judged j = judged.get(0);
        double off = Math.abs(v.si() - j.value()[3]);
        String detail = String.format(Locale.ROOT, "found %.16g ± %.1e, judge %.16g ± %.1e %s", v.si(), v.error(), j.value()[3],
                j.potentialError(), v.standing().reason());
        return new Finding(p, "V", outcome(v.standing()), excess(off, j.potentialError(), v.error()), off, j.potentialError(), v.error(),
                relative(p) * Math.max(Math.abs(j.value()[3]), 1e-3 * j.potentialMagnitude()), solver.evaluations(), detail);
    }

    boolean expectedUnbounded() {
        return quantity.equals("E") ? problem.fieldUnbounded() : problem.potentialUnbounded();
    }

    /** Nowhere on or in the charge. */
    boolean outside() {
        return switch (problem.where()) {
            case FAR, MID, NEAR, NEAR_RIM -> true;
            default -> false;
        };
    }

    boolean isConverged() {
        return outcome == Outcome.CONVERGED;
    }

    /** A converged number that the judge can tell the true error of: its own is below the stated one. */
    boolean isJudged() {
        return isConverged() && !expectedUnbounded() && judgeError <= statedError;
    }

    boolean isUnjudged() {
        return isConverged() && !expectedUnbounded() && !isJudged();
    }

    /** A number where there is none, or none at all. */
    boolean isWrongKind() {
        return outcome == Outcome.FAILED || expectedUnbounded() && outcome == Outcome.CONVERGED
                || !expectedUnbounded() && outcome == Outcome.UNBOUNDED;
    }

    boolean isDishonest(double factor) {
        return isJudged() && excess > factor;
    }

    boolean exceedsTolerance() {
        return isJudged() && trueError - judgeError > allowed;
    }

    /** Stated over true error; where the true one is below what the judge can see, over the judge's. */
    double looseness() {
        return statedError / Math.max(trueError, judgeError);
    }

    @Override
    public String toString() {
        return String.format(Locale.ROOT, "%s %s, true/stated %.2g, true %.2g (judge %.2g), stated %.2g, allowed %.2g, %d evaluations%n    %s%n    %s",
                quantity, outcome, excess, trueError, judgeError, statedError, allowed, evaluations, problem, detail);
    }
}
