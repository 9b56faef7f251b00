package fieldwright.charge;

import fieldwright.quantity.AuthorException;

/** Very many point charges, numbers alone: places x, y, z in m, charges in C. The arrays are copied in and out. */
public final class PointCloud implements Source {
    private final double[][] columns;
    private final Surroundings around;

    private PointCloud(double[][] columns, Surroundings around) {
        this.columns = columns;
        this.around = around;
    }

    /** Errors: AuthorException when the lists are not equally long, are empty, or hold what is not finite. */
    public static PointCloud of(double[] x, double[] y, double[] z, double[] charge) {
        double[][] columns = {x.clone(), y.clone(), z.clone(), charge.clone()};
        if (y.length != x.length || z.length != x.length || charge.length != x.length) {
            throw new AuthorException("point cloud: " + x.length + " x, " + y.length + " y, " + z.length + " z and " + charge.length
                + " charges: every point needs all four.");
        }
        if (x.length == 0) {
            throw new AuthorException("point cloud: no points in it. Give at least one.");
        }
        for (int i = 0; i < x.length; i++) {
            if (!Double.isFinite(x[i]) || !Double.isFinite(y[i]) || !Double.isFinite(z[i]) || !Double.isFinite(charge[i])) {
                throw new AuthorException("point cloud, point " + (i + 1) + ": (" + x[i] + ", " + y[i] + ", " + z[i] + ") m with " + charge[i]
                    + " C: all four must be finite. Correct or leave out the point.");
            }
        }
        return new PointCloud(columns, null);
    }

    public int size() {
        return columns[0].length;
    }

    /** x, y, z (m) and charge (C). */
    public double[][] columns() {
        return new double[][] {columns[0].clone(), columns[1].clone(), columns[2].clone(), columns[3].clone()};
    }

    @Override
    public Surroundings around() {
        return around;
    }

    @Override
    public PointCloud with(Surroundings surroundings) {
        return new PointCloud(columns, surroundings);
    }
}
