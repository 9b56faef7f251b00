package fieldwright.charge;

import fieldwright.quantity.AuthorException;

/**
 * A charged line of very many straight sides, numbers alone: corners x, y, z in m; on each side the charge per length (C/m) runs
 * linearly from its start to its end. The arrays are copied in and out.
 */
public final class ChargedPolyline implements Source {
    private final double[][] corners;
    private final double[] atStart;
    private final double[] atEnd;
    private final Surroundings around;

    private ChargedPolyline(double[][] corners, double[] atStart, double[] atEnd, Surroundings around) {
        this.corners = corners;
        this.atStart = atStart;
        this.atEnd = atEnd;
        this.around = around;
    }

    /** Density given at the corners, one for each. Errors: AuthorException as for {@link #ofSides}. */
    public static ChargedPolyline of(double[] x, double[] y, double[] z, double[] density) {
        if (density.length != x.length || x.length < 2) {
            throw new AuthorException("polyline: " + x.length + " corners and " + density.length
                + " densities: give one density for each of at least two corners.");
        }
        int n = x.length - 1;
        return ofSides(x, y, z, java.util.Arrays.copyOf(density, n), java.util.Arrays.copyOfRange(density, 1, n + 1));
    }

    /**
     * Density given for each side, at its start and at its end.
     * Errors: AuthorException when the lists do not fit, hold what is not finite, or two neighbouring corners are the same.
     */
    public static ChargedPolyline ofSides(double[] x, double[] y, double[] z, double[] atStart, double[] atEnd) {
        if (x.length < 2 || y.length != x.length || z.length != x.length || atStart.length != x.length - 1 || atEnd.length != x.length - 1) {
            throw new AuthorException("polyline: " + x.length + " x, " + y.length + " y, " + z.length + " z, " + atStart.length + " and "
                + atEnd.length + " densities: n corners need n of each coordinate and n - 1 densities, n at least 2.");
        }
        for (int e = 0; e + 1 < x.length; e++) {
            double sum = x[e] + y[e] + z[e] + x[e + 1] + y[e + 1] + z[e + 1] + atStart[e] + atEnd[e];
            if (!Double.isFinite(sum)) {
                throw new AuthorException("polyline, side " + (e + 1) + ": its corners and densities must be finite. Correct the numbers.");
            }
            if (x[e] == x[e + 1] && y[e] == y[e + 1] && z[e] == z[e + 1]) {
                throw new AuthorException("polyline, side " + (e + 1) + ": its two corners are the same, (" + x[e] + ", " + y[e] + ", " + z[e]
                    + ") m. Leave one of them out.");
            }
        }
        return new ChargedPolyline(new double[][] {x.clone(), y.clone(), z.clone()}, atStart.clone(), atEnd.clone(), null);
    }

    /** x, y, z of the corners, m. */
    public double[][] corners() {
        return new double[][] {corners[0].clone(), corners[1].clone(), corners[2].clone()};
    }

    public double[] atStart() {
        return atStart.clone();
    }

    public double[] atEnd() {
        return atEnd.clone();
    }

    @Override
    public Surroundings around() {
        return around;
    }

    @Override
    public ChargedPolyline with(Surroundings surroundings) {
        return new ChargedPolyline(corners, atStart, atEnd, surroundings);
    }
}
