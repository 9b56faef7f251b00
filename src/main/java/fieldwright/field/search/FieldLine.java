package fieldwright.field.search;

import fieldwright.field.FieldSolver;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Place;
import fieldwright.quantity.Standing;
import fieldwright.quantity.Stop;
import fieldwright.quantity.Vector;
import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import org.apache.commons.math3.exception.MathIllegalStateException;
import org.apache.commons.math3.exception.NumberIsTooSmallException;
import org.apache.commons.math3.ode.FirstOrderDifferentialEquations;
import org.apache.commons.math3.ode.nonstiff.DormandPrince853Integrator;

/**
 * A line that runs along the field, through one place, in both directions: in order of the field, from its tail to its head.
 *
 * @param places corners; between them the line was integrated finer
 * @param tail   where it comes from, against the field
 * @param head   where it goes to
 * @param within tolerance of the integration at each corner (m): places off the line add up to a few times it
 */
public record FieldLine(List<Place> places, End tail, End head, double within) {
    /** How a line ends. */
    public enum End {
        CHARGE("on charge"), CONDUCTOR("on a conductor"), FAR("beyond the reach"), NULL("where the field is zero"),
        UNFINISHED("not followed to its end: too many steps"), CLOSED_IN("where the field did not converge");

        private final String words;

        End(String words) {
            this.words = words;
        }

        public String words() {
            return words;
        }
    }

    /** Integration tolerance and the least distance to charge or wall, of the reach. */
    private static final double TOLERANCE = 1e-9;
    private static final double CLOSE = 1e-7;
    private static final int CORNERS = 2000;
    /** A field that is none, of the strongest met along the line. */
    private static final double WEAK = 1e-4;
    /** Turn of the direction between two corners, rad. */
    private static final double TURN = 0.08;

    /** Where a step cannot go on. */
    private static final class Obstacle extends RuntimeException {
        private static final long serialVersionUID = 1L;
        private final transient End end;

        Obstacle(End end) {
            super(end.words(), null, false, false);
            this.end = end;
        }
    }

    /**
     * The line through a place, followed until it is {@code reach} away from there, ends on charge or a conductor, or comes to a zero of
     * the field. A place on a charged surface starts on both of its sides.
     * Errors: AuthorException when the field at the start is unbounded or zero.
     */
    public static FieldLine through(Place start, FieldSolver solver, double reach) {
        if (!(reach > 0) || Double.isInfinite(reach)) {
            throw new AuthorException("field line with a reach of " + reach + " m: must be finite and > 0.");
        }
        Vector e = solver.electricField(start);
        if (e.standing().kind() == Standing.Kind.UNBOUNDED) {
            throw new AuthorException("field line from " + start + ": the field is unbounded there (" + e.standing().reason()
                + "). Start a little way off.");
        }
        Tracer tracer = new Tracer(solver, start, reach);
        List<Place> back = new ArrayList<>();
        End tail = tracer.follow(-1, back);
        List<Place> forth = new ArrayList<>();
        End head = tracer.follow(1, forth);
        Collections.reverse(back);
        back.add(start);
        back.addAll(forth);
        return new FieldLine(List.copyOf(back), tail, head, TOLERANCE * reach);
    }

    private static final class Tracer implements FirstOrderDifferentialEquations {
        private final FieldSolver solver;
        private final double[] start;
        private final double reach;
        private double sign;
        /** Field where the direction was asked last, and the strongest at a corner. */
        private double strength;
        private double strongest;

        Tracer(FieldSolver solver, Place start, double reach) {
            this.solver = solver;
            this.start = new double[] {start.x(), start.y(), start.z()};
            this.reach = reach;
        }

        End follow(int direction, List<Place> corners) {
            sign = direction;
            double[] at = start.clone();
            double[] way;
            double step = 0.02 * reach;
            try {
                way = direction(at, null);
                strongest = strength;
            } catch (Obstacle o) {
                return o.end;
            }
            for (int n = 0; n < CORNERS;) {
                Stop.check();
                End obstacle;
                double[] next = at.clone();
                try {
                    DormandPrince853Integrator integrator = new DormandPrince853Integrator(0.02 * step, step, TOLERANCE * reach, 0);
                    integrator.setInitialStepSize(step);    // its own first guess may lie behind a wall
                    integrator.integrate(this, 0, at, step, next);
                    double[] there = direction(next, way);
                    double cosine = way[0] * there[0] + way[1] * there[1] + way[2] * there[2];
                    double turn = Math.acos(Math.max(-1, Math.min(1, cosine)));
                    if (turn < 2 * TURN || step < CLOSE * reach && turn < 1.5) {
                        at = next;
                        way = there;
                        strongest = Math.max(strongest, strength);
                        corners.add(new Place(at[0], at[1], at[2]));
                        n++;
                        if (distance(at) >= reach) {
                            return End.FAR;
                        }
                        step *= turn < 0.5 * TURN ? 1.8 : turn > TURN ? 0.7 : 1;
                        step = Math.min(step, 0.05 * reach);
                        continue;
                    }
                    obstacle = End.CHARGE;
                } catch (Obstacle o) {
                    obstacle = o.end;
                } catch (NumberIsTooSmallException | MathIllegalStateException tooFine) {
                    obstacle = End.CHARGE;
                }
                step *= 0.4;
                if (step < CLOSE * reach) {
                    return obstacle == End.CHARGE && isWeak(at) ? End.NULL : obstacle;
                }
            }
            return End.UNFINISHED;
        }

        /** Where the direction turns round: at a zero of the field it has all but vanished, on charge it has not. */
        private boolean isWeak(double[] at) {
            Vector e = solver.electricField(new Place(at[0], at[1], at[2]));
            return !e.isSided() && e.magnitude().si() < WEAK * strongest;
        }

        private double distance(double[] at) {
            double dx = at[0] - start[0];
            double dy = at[1] - start[1];
            double dz = at[2] - start[2];
            return Math.sqrt(dx * dx + dy * dy + dz * dz);
        }

        @Override
        public int getDimension() {
            return 3;
        }

        @Override
        public void computeDerivatives(double t, double[] at, double[] out) {
            System.arraycopy(direction(at, null), 0, out, 0, 3);
        }

        /** Unit vector of the way at a place; on a charged surface that of the side the line is on, coming along {@code way}. */
        private double[] direction(double[] at, double[] way) {
            Vector e = solver.electricField(new Place(at[0], at[1], at[2]));
            if (e.standing().kind() == Standing.Kind.UNBOUNDED) {
                throw new Obstacle(End.CHARGE);
            }
            if (e.standing().kind() == Standing.Kind.NOT_CONVERGED) {
                throw new Obstacle(End.CLOSED_IN);
            }
            Vector one = e.isSided() ? side(e, way) : e;
            double[] v = {sign * one.x().si(), sign * one.y().si(), sign * one.z().si()};
            double size = Math.sqrt(v[0] * v[0] + v[1] * v[1] + v[2] * v[2]);
            double error = Math.sqrt(square(one.x().error()) + square(one.y().error()) + square(one.z().error()));
            if (size == 0 && error == 0) {
                throw new Obstacle(End.CONDUCTOR);
            }
            if (!(size > error)) {
                throw new Obstacle(End.NULL);
            }
            strength = size;
            return new double[] {v[0] / size, v[1] / size, v[2] / size};
        }

        /** The side the line leaves into; where both sides send it back, it ends there. */
        private Vector side(Vector e, double[] way) {
            double[] n = e.normal();
            Vector plus = e.plusSide();
            Vector minus = e.minusSide();
            double up = sign * (plus.x().si() * n[0] + plus.y().si() * n[1] + plus.z().si() * n[2]);
            double down = -sign * (minus.x().si() * n[0] + minus.y().si() * n[1] + minus.z().si() * n[2]);
            boolean upwards = up > 0;
            boolean downwards = down > 0;
            if (!upwards && !downwards) {
                throw new Obstacle(isNothing(plus) || isNothing(minus) ? End.CONDUCTOR : End.CHARGE);
            }
            if (upwards && downwards && way != null) {
                double along = way[0] * n[0] + way[1] * n[1] + way[2] * n[2];
                return along > 0 ? plus : minus;
            }
            return upwards ? plus : minus;
        }

        private static boolean isNothing(Vector e) {
            return e.x().si() == 0 && e.y().si() == 0 && e.z().si() == 0;
        }

        private static double square(double v) {
            return v * v;
        }
    }
}
