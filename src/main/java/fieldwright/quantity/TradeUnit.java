package fieldwright.quantity;

import java.util.Objects;
import javax.measure.Dimension;

/** A unit as written: 1 {@code text} is {@code factor} in coherent SI (the nearest double to the exact factor). */
public record TradeUnit(String text, double factor, Dimension dimension) {
    public TradeUnit {
        Objects.requireNonNull(text, "text");
        dimension = Dimensions.of(dimension);
        if (!(factor > 0) || Double.isInfinite(factor)) {
            throw new IllegalArgumentException("unit factor " + factor);
        }
    }
}
