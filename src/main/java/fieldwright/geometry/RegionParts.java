package fieldwright.geometry;

import java.util.ArrayList;
import java.util.List;

import fieldwright.quantity.AuthorException;

/** Several regions of one dimension taken as one: sides of a polyline, triangles of a polygon, faces of a shell. */
public record RegionParts(List<Region> parts) implements Region {
    public RegionParts {
        parts = List.copyOf(parts);
        if (parts.isEmpty()) {
            throw new AuthorException("region of no parts: give at least one part.");
        }
        for (Region part : parts) {
            if (part.dimension() != parts.get(0).dimension()) {
                throw new AuthorException("parts of different kinds, a " + Region.kind(parts.get(0).dimension()) + " and a "
                    + Region.kind(part.dimension()) + ": make one charge of each.");
            }
        }
    }

    @Override
    public int dimension() {
        return parts.get(0).dimension();
    }

    @Override
    public List<PlacedChart> charts() {
        List<PlacedChart> all = new ArrayList<>();
        for (Region part : parts) {
            all.addAll(part.charts());
        }
        return all;
    }
}
