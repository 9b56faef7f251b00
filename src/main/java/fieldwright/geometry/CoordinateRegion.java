package fieldwright.geometry;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;

import fieldwright.formula.Formula;
import fieldwright.quantity.AuthorException;

/**
 * Each coordinate of a system held fixed or between limits. As many coordinates with limits, so many dimensions.
 * Formulas are bound already: the only free names are coordinates of the same system. Lengths in m, angles in rad.
 */
public record CoordinateRegion(CoordinateSystem system, Map<String, Extent> extents) implements Region {
    public CoordinateRegion {
        extents = java.util.Collections.unmodifiableMap(new LinkedHashMap<>(extents));
    }

    public static CoordinateRegion in(CoordinateSystem system) {
        return new CoordinateRegion(system, Map.of());
    }

    /** Between two limits; each may depend on other coordinates, and may be -inf or inf. */
    public CoordinateRegion limits(String coordinate, Formula from, Formula to) {
        return with(coordinate, new Extent.Limits(from, to));
    }

    /** Held fixed; the value may depend on other coordinates: z = rho^2 is a bowl. */
    public CoordinateRegion fixed(String coordinate, Formula at) {
        return with(coordinate, new Extent.Fixed(at));
    }

    private CoordinateRegion with(String coordinate, Extent extent) {
        if (!system.names().contains(coordinate)) {
            throw new AuthorException(system.title() + " coordinates are " + String.join(", ", system.names()) + ": there is no '"
                + coordinate + "'.");
        }
        if (extents.containsKey(coordinate)) {
            throw new AuthorException("coordinate " + coordinate + " is given twice: keep one of the two.");
        }
        Map<String, Extent> all = new LinkedHashMap<>(extents);
        all.put(coordinate, extent);
        return new CoordinateRegion(system, all);
    }

    @Override
    public int dimension() {
        int n = 0;
        for (Extent e : extents.values()) {
            n += e instanceof Extent.Limits ? 1 : 0;
        }
        return n;
    }

    @Override
    public List<PlacedChart> charts() {
        for (String name : system.names()) {
            if (!extents.containsKey(name)) {
                throw new AuthorException("region in " + system.title() + " coordinates: " + name
                    + " is neither fixed nor given limits. Add ." + name + "(value) or ." + name + "(from, to).");
            }
        }
        Nest nest = Nest.of(system.names(), extents, "region in " + system.title() + " coordinates");
        List<PlacedChart> all = new ArrayList<>();
        all.add(new PlacedChart(Chart.of(nest, Embedding.of(system), system), Frame.OWN));
        return all;
    }

    /** Coordinates with limits, outermost integral first. */
    public List<String> order() {
        return Nest.of(system.names(), extents, "region in " + system.title() + " coordinates").order();
    }
}
