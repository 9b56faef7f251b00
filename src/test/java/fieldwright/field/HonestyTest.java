package fieldwright.field;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;

import org.junit.jupiter.api.Test;

import fieldwright.field.closed.Closed;
import fieldwright.formula.Constants;
import fieldwright.quantity.Standing;
import fieldwright.quantity.Vector;

/**
 * Random bodies, aspect ratios to 1e4, places from 1e3 sizes away down to gaps of 1e-8 sizes, on and inside; judged by closed forms,
 * which share neither mapping nor rule with the engine. No true error may exceed the stated one by more than the closed form's own
 * bound; at most 2 in 100 may say that they did not converge.
 */
class HonestyTest {
    private static final int COUNT = 400;
    private static final long SEED = 20261201;

    @Test
    void statedErrorsHold() {
        RandomProblems problems = new RandomProblems(SEED);
        double k = 4 * Math.PI * Constants.EPS0;
        List<String> broken = new ArrayList<>();
        int notConverged = 0;
        for (int i = 0; i < COUNT; i++) {
            RandomProblems.Problem p = problems.next();
            Vector e = FieldSolver.electricField(p.source(), p.place(), new Accuracy(1e-9, 0, 300_000, ClosedForms.OFF));
            Closed c = p.truth();
            if (e.standing().kind() == Standing.Kind.UNBOUNDED) {
                assertEquals(Closed.Status.UNBOUNDED, c.status(), p.text());
                continue;
            }
            if (!e.standing().isConverged()) {
                notConverged++;
                continue;
            }
            if (c.status() == Closed.Status.UNBOUNDED) {
                broken.add("a number where there is none: " + p.text());
                continue;
            }
            Vector v = HonestyLook.closest(e, c, k);
            double off = norm(k * v.x().si() - c.ex(), k * v.y().si() - c.ey(), k * v.z().si() - c.ez());
            double stated = k * norm(v.x().error(), v.y().error(), v.z().error());
            if (off > stated + c.errE()) {
                broken.add("off " + off + " stated " + stated + " closed form's bound " + c.errE() + ": " + p.text());
            }
        }
        assertTrue(broken.isEmpty(), () -> "seed " + SEED + ": " + String.join("\n", broken));
        assertTrue(notConverged <= COUNT / 50, "not converged: " + notConverged + " of " + COUNT);
    }

    private static double norm(double x, double y, double z) {
        return Math.sqrt(x * x + y * y + z * z);
    }
}
