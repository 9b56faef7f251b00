package fieldwright.geometry;

import java.util.List;

/** A region moved or turned as a whole; its limits and density are read in its own frame and travel with it. */
public record PlacedRegion(Region inner, Frame frame) implements Region {
    @Override
    public int dimension() {
        return inner.dimension();
    }

    @Override
    public List<PlacedChart> charts() {
        return Region.placed(inner.charts(), frame);
    }
}
