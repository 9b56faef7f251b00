package fieldwright.field;

import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Set;

import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

import fieldwright.charge.Source;
import fieldwright.charge.Sources;
import fieldwright.formula.Constants;
import fieldwright.geometry.Region;
import fieldwright.quantity.Amount;
import fieldwright.quantity.Place;
import fieldwright.quantity.Vector;

/**
 * All of cases.json (see the README beside it): right within the stated error and to relative 1e-9, all converged.
 */
class ReferenceCasesTest {
    static List<ReferenceCases.Case> cases() {
        return ReferenceCases.read(Set.of("1", "2", "3", "4", "5", "9"));
    }

    @ParameterizedTest
    @MethodSource("cases")
    void rightWithinStatedError(ReferenceCases.Case c) {
        Amount found = ask(c);
        double error = Math.abs(found.si() - c.value());
        String detail = c.id() + ": found " + found.si() + " ± " + found.error() + ", reference " + c.value() + ", off by " + error + " " + found.standing();
        assertTrue(found.isConverged(), detail);
        assertTrue(error <= 1e-9 * c.scale(), detail);
        // the reference is a double here: half a unit in its last place
        assertTrue(error <= found.error() + Math.ulp(c.value()), detail);
    }

    static List<ReferenceCases.Case> wholes() {
        return ReferenceCases.read(Set.of("6", "7", "8"));
    }

    /** Groups 6 to 8: fluxes of E, energy, forces, moments. */
    @ParameterizedTest
    @MethodSource("wholes")
    void questionsAboutWholes(ReferenceCases.Case c) {
        Amount found = askWhole(c);
        double error = Math.abs(found.si() - c.value());
        String detail = c.id() + ": found " + found.si() + " ± " + found.error() + ", reference " + c.value() + ", off by " + error + " " + found.standing();
        assertTrue(found.isConverged(), detail);
        assertTrue(error <= 1e-9 * c.scale(), detail);
        assertTrue(error <= found.error() + Math.ulp(c.value()), detail);
    }

    private static Amount askWhole(ReferenceCases.Case c) {
        Place origin = new Place(0, 0, 0);
        String q = c.quantity();
        if (q.equals("flux")) {
            return Flux.of(c.source(), Accuracy.DEFAULT).through(surface(c.id()), null).dividedBy(Constants.EPS0);
        }
        if (q.equals("U")) {
            return Interaction.of(c.source(), Accuracy.DEFAULT).energy();
        }
        if (q.startsWith("F")) {
            List<Source> two = ((Sources) c.source()).parts();
            return component(Interaction.of(two.get(0), Accuracy.DEFAULT).forceOn(two.get(1)), q);
        }
        if (q.startsWith("p")) {
            return component(Moments.dipole(c.source(), origin, Accuracy.DEFAULT), q);
        }
        Moments.Quadrupole m = Moments.quadrupole(c.source(), origin, Accuracy.DEFAULT);
        return switch (q) {
            case "Qxx" -> m.xx();
            case "Qyy" -> m.yy();
            case "Qzz" -> m.zz();
            case "Qxy" -> m.xy();
            case "Qxz" -> m.xz();
            default -> m.yz();
        };
    }

    private static Amount component(Vector v, String quantity) {
        return quantity.endsWith("x") ? v.x() : quantity.endsWith("y") ? v.y() : v.z();
    }

    private static Region surface(String id) {
        return switch (id) {
            case "F02-flux" -> Charges.disc(0.5);
            case "F07-flux" -> Charges.rectangle(2, 1);
            case "F11-flux" -> Charges.ball(0.35).movedBy(0.3, 0.1, 0.35);
            default -> throw new IllegalArgumentException("no surface for " + id);
        };
    }

    static Amount ask(ReferenceCases.Case c) {
        return ask(c, FieldSolver.of(c.source(), Accuracy.PANELS));
    }

    static Amount ask(ReferenceCases.Case c, FieldSolver solver) {
        String q = c.quantity();
        if (q.equals("Q")) {
            return solver.totalCharge();
        }
        if (q.equals("V")) {
            return solver.potential(c.place());
        }
        if (q.equals("sigma_ind")) {
            return solver.fluxDensity(c.place()).onSide("+z").z();
        }
        Vector e = solver.electricField(c.place());
        if (q.contains("above")) {
            e = e.onSide("+z");
        } else if (q.contains("below")) {
            e = e.onSide("-z");
        } else if (q.contains("outside")) {
            e = e.onSide("+r");
        } else if (q.contains("inside")) {
            e = e.onSide("-r");
        } else if (e.isSided()) {
            e = e.mean();
        }
        return switch (q.substring(0, 2)) {
            case "Ex" -> e.x();
            case "Ey" -> e.y();
            case "Ez" -> e.z();
            default -> q.startsWith("Er") ? e.r() : e.theta();
        };
    }

    /** Prints every case: for looking at. */
    public static void main(String[] args) {
        System.out.println("eps0 " + Constants.EPS0);
        for (ReferenceCases.Case c : cases()) {
            try {
                FieldSolver solver = FieldSolver.of(c.source(), Accuracy.PANELS);
                Amount a = null;
                long best = Long.MAX_VALUE;
                int runs = args.length > 0 ? Integer.parseInt(args[0]) : 1;
                for (int i = 0; i < runs; i++) {
                    long t = System.nanoTime();
                    a = ask(c, solver);
                    best = Math.min(best, System.nanoTime() - t);
                }
                double error = Math.abs(a.si() - c.value());
                System.out.printf("%-14s %s %-22s true %8.1e stated %8.1e (rel) evals %8d  %8.3f ms %s %s%n", c.id(),
                    error <= 1e-9 * c.scale() ? "ok  " : "BAD ", a.si(), error / c.scale(), a.error() / c.scale(), solver.evaluations(), best / 1e6,
                    error <= a.error() + Math.ulp(c.value()) ? "" : "EXCEEDS", a.isConverged() ? "" : a.standing().toString());
            } catch (RuntimeException e) {
                System.out.printf("%-14s EXC %s%n", c.id(), e);
                if (!(e instanceof fieldwright.quantity.AuthorException)) {
                    e.printStackTrace(System.out);
                }
            }
        }
    }
}
