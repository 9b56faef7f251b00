package fieldwright.field;

import java.util.Locale;
import java.util.Map;
import java.util.TreeMap;

import fieldwright.field.closed.Closed;
import fieldwright.formula.Constants;
import fieldwright.quantity.Amount;
import fieldwright.quantity.Standing;
import fieldwright.quantity.Vector;

/** Prints how stated and true errors compare on random problems; arguments: count, seed. */
final class HonestyLook {
    public static void main(String[] args) {
        int count = Integer.parseInt(args[0]);
        RandomProblems problems = new RandomProblems(Long.parseLong(args[1]));
        double k = 4 * Math.PI * Constants.EPS0;
        Map<String, double[]> perKind = new TreeMap<>();
        int[] histogram = new int[30];
        for (int i = 0; i < count; i++) {
            RandomProblems.Problem p = problems.next();
            String kind = p.text().replaceAll(" [A-Z].*", "");
            double[] s = perKind.computeIfAbsent(kind, x -> new double[8]);
            FieldSolver solver = FieldSolver.of(p.source(), Accuracy.PANELS);
            s[0]++;
            try {
                long t = System.nanoTime();
                Vector e = solver.electricField(p.place());
                double ms = (System.nanoTime() - t) / 1e6;
                s[6] += ms;
                s[7] += solver.evaluations();
                Closed c = p.truth();
                if (c.status() == Closed.Status.UNBOUNDED || e.standing().kind() == Standing.Kind.UNBOUNDED) {
                    s[1]++;
                    if ((c.status() == Closed.Status.UNBOUNDED) != (e.standing().kind() == Standing.Kind.UNBOUNDED)) {
                        s[5]++;
                        System.out.println("UNBOUNDED? ours " + e.standing().kind() + " closed " + c.status() + " " + p.text());
                    }
                    continue;
                }
                Vector v = closest(e, c, k);
                if (!v.standing().isConverged()) {
                    s[2]++;
                    System.out.println("NOT CONVERGED " + v.standing().reason() + " " + p.text());
                    continue;
                }
                double off = norm(k * v.x().si() - c.ex(), k * v.y().si() - c.ey(), k * v.z().si() - c.ez());
                double stated = k * norm(v.x().error(), v.y().error(), v.z().error());
                double size = norm(c.ex(), c.ey(), c.ez());
                double allowed = Math.max(1e-9, 8 * 2.2e-16 / Math.max(p.gap(), 1e-9)) * size;
                if (off > stated + c.errE()) {
                    s[3]++;
                    System.out.printf(Locale.ROOT, "EXCEEDS off %.2e stated %.2e closed %.1e |E| %.3g %s%n", off, stated, c.errE(), size, p.text());
                }
                if (off > allowed + c.errE() && off > 1e-12 * Math.abs(c.v()) / p.size()) {
                    s[4]++;
                    System.out.printf(Locale.ROOT, "WRONG off %.2e allowed %.2e stated %.2e |E| %.3g %s%n", off, allowed, stated, size, p.text());
                }
                if (ms > 100) {
                    System.out.printf(Locale.ROOT, "SLOW %.0f ms %d %s%n", ms, solver.evaluations(), p.text());
                }
                int bin = (int) Math.round(Math.log10(stated / Math.max(off, 1e-17 * size)) + 5);
                histogram[Math.max(0, Math.min(29, bin))]++;
            } catch (RuntimeException x) {
                s[5]++;
                System.out.println("EXC " + x + " " + p.text());
                if (!(x instanceof fieldwright.quantity.AuthorException)) {
                    x.printStackTrace(System.out);
                }
            }
        }
        System.out.println("kind                n  unbounded  notconv  exceeds  wrong  exc   ms each   evals each");
        perKind.forEach((name, s) -> System.out.printf(Locale.ROOT, "%-16s %5.0f %8.0f %8.0f %8.0f %8.0f %5.0f %9.3f %9.0f%n", name, s[0], s[1], s[2],
            s[3], s[4], s[5], s[6] / s[0], s[7] / s[0]));
        for (int b = 0; b < 30; b++) {
            if (histogram[b] > 0) {
                System.out.printf("stated/true 1e%+d: %d%n", b - 5, histogram[b]);
            }
        }
    }

    /** A place that cannot be told from the surface has a pair; the closed form may have taken it for one side. */
    static Vector closest(Vector e, Closed c, double k) {
        if (!e.isSided()) {
            return e;
        }
        Vector best = e.mean();
        if (c.status() == Closed.Status.REGULAR) {
            for (Vector v : new Vector[] {e.plusSide(), e.minusSide()}) {
                best = off(v, c, k) < off(best, c, k) ? v : best;
            }
        }
        return best;
    }

    private static double off(Vector v, Closed c, double k) {
        return norm(k * v.x().si() - c.ex(), k * v.y().si() - c.ey(), k * v.z().si() - c.ez());
    }

    static double norm(double x, double y, double z) {
        return Math.sqrt(x * x + y * y + z * z);
    }
}
