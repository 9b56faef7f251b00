package fieldwright.formula;

import fieldwright.quantity.Dimensions;
import javax.measure.Dimension;

/** An argument of a formula: its name and what it measures. */
public record Parameter(String name, Dimension dimension) {
    public Parameter {
        dimension = Dimensions.of(dimension);
    }
}
