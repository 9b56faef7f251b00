package fieldwright.field.search;

import fieldwright.field.FieldSolver;
import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Place;
import fieldwright.quantity.Standing;
import fieldwright.quantity.Units;
import fieldwright.quantity.Vector;
import java.util.function.DoubleFunction;

/**
 * How fast the field falls along a path: −d ln|E| / d ln s, s the path's own length or coordinate (m). 1 for a line, 2 for a point, 3
 * for a dipole from afar.
 */
public final class DecayExponent {
    /** First step in ln s, and how often it is halved. */
    private static final double STEP = 0.4;
    private static final int ROUNDS = 7;

    private DecayExponent() {
    }

    /**
     * Mean over the path from s = from to s = to: −ln(|E_to|/|E_from|)/ln(to/from).
     * Errors: AuthorException when s does not run between two numbers > 0, or the field is zero at an end.
     */
    public static Amount mean(FieldSolver solver, DoubleFunction<Place> path, double from, double to) {
        requirePositive(from);
        requirePositive(to);
        Amount near = size(solver, path, from);
        Amount far = size(solver, path, to);
        double span = Math.log(to / from);
        double value = -(Math.log(far.si()) - Math.log(near.si())) / span;
        double error = (relative(near) + relative(far) + 4e-16) / Math.abs(span) + 4e-16 * Math.abs(value);
        Standing standing = near.standing().worse(far.standing());
        return Amount.si(value, error, Units.NONE, standing);
    }

    /**
     * At one place of the path: central differences in ln s, halved and extrapolated to step 0 (Richardson; Ridders, Adv. Eng. Software 4,
     * 75, 1982). The error is the change of the last extrapolation and what the field's own errors make of it.
     *
     * @param low  least s that may be looked at
     * @param high greatest
     */
    public static Amount at(FieldSolver solver, DoubleFunction<Place> path, double s, double low, double high) {
        requirePositive(s);
        double room = Math.min(Math.log(s / Math.max(low, 1e-300)), Math.log(high / s));
        if (!(room > 1e-6)) {
            throw new AuthorException("decay exponent at s = " + s + " m: the path ends there. Ask for a place within it, or lengthen the path.");
        }
        double h = Math.min(STEP, room);
        double[][] table = new double[ROUNDS][ROUNDS];
        double best = Double.NaN;
        double bestError = Double.POSITIVE_INFINITY;
        Standing standing = Standing.CONVERGED;
        for (int i = 0; i < ROUNDS; i++) {
            Amount up = size(solver, path, s * Math.exp(h));
            Amount down = size(solver, path, s * Math.exp(-h));
            standing = standing.worse(up.standing()).worse(down.standing());
            table[0][i] = -(Math.log(up.si()) - Math.log(down.si())) / (2 * h);
            double carried = (relative(up) + relative(down) + 4e-16) / (2 * h);
            double factor = 1;
            for (int k = 1; k <= i; k++) {
                factor *= 4;
                table[k][i] = table[k - 1][i] + (table[k - 1][i] - table[k - 1][i - 1]) / (factor - 1);
                double change = Math.max(Math.abs(table[k][i] - table[k - 1][i]), Math.abs(table[k][i] - table[k - 1][i - 1]));
                double error = 2 * change + 2 * carried;
                if (error < bestError) {
                    bestError = error;
                    best = table[k][i];
                }
            }
            h /= 2;
        }
        return Amount.si(best, bestError, Units.NONE, standing);
    }

    private static void requirePositive(double s) {
        if (!(s > 0) || Double.isInfinite(s)) {
            throw new AuthorException("decay exponent along a path at s = " + s + " m: it is a slope over ln s, so s must be finite and > 0."
                + " Let the path run between two distances > 0, for example along(\"r\", \"1 m\", \"10 m\").");
        }
    }

    private static Amount size(FieldSolver solver, DoubleFunction<Place> path, double s) {
        Vector e = solver.electricField(path.apply(s));
        Amount size = e.mean().magnitude();
        if (!(size.si() > size.error())) {
            throw new AuthorException("decay exponent at s = " + s + " m: the field is zero there within its error, so it has no logarithm."
                + " Move the path.");
        }
        return size;
    }

    private static double relative(Amount a) {
        return a.error() / (a.si() - a.error());
    }
}
