package fieldwright.output;

import java.io.Serializable;
import java.util.Arrays;
import java.util.Objects;

/**
 * One line of a plot. The numbers are in the units of the axes; a NaN is a gap, whose cause stands in the plot's remarks.
 *
 * @param error numerical error of each y; null when not carried
 */
public record Series(String label, double[] x, double[] y, double[] error) implements Serializable {

    public Series {
        Objects.requireNonNull(label, "label");
        x = x.clone();
        y = y.clone();
        error = error == null ? null : error.clone();
        if (x.length != y.length || error != null && error.length != x.length) {
            throw new IllegalArgumentException("series '" + label + "': " + x.length + " x, " + y.length
                    + " y: every point needs both.");
        }
    }

    @Override
    public double[] x() {
        return x.clone();
    }

    @Override
    public double[] y() {
        return y.clone();
    }

    @Override
    public double[] error() {
        return error == null ? null : error.clone();
    }

    public int size() {
        return x.length;
    }

    @Override
    public boolean equals(Object other) {
        return other instanceof Series that && label.equals(that.label) && Arrays.equals(x, that.x)
                && Arrays.equals(y, that.y) && Arrays.equals(error, that.error);
    }

    @Override
    public int hashCode() {
        return Objects.hash(label, Arrays.hashCode(x), Arrays.hashCode(y), Arrays.hashCode(error));
    }

    @Override
    public String toString() {
        return "Series[" + label + ", " + x.length + " points]";
    }
}
