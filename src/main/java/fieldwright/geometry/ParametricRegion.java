package fieldwright.geometry;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;

import fieldwright.formula.Formula;
import fieldwright.quantity.AuthorException;

/** Any shape: x, y, z (m) as formulas of one to three parameters, each parameter between limits. */
public record ParametricRegion(Formula x, Formula y, Formula z, Map<String, Extent> parameters) implements Region {
    public ParametricRegion {
        parameters = java.util.Collections.unmodifiableMap(new LinkedHashMap<>(parameters));
    }

    public static ParametricRegion of(Formula x, Formula y, Formula z) {
        return new ParametricRegion(x, y, z, Map.of());
    }

    /** One more parameter with its limits; limits may depend on other parameters. */
    public ParametricRegion over(String name, Formula from, Formula to) {
        if (parameters.containsKey(name)) {
            throw new AuthorException("parameter " + name + " is given twice: keep one of the two.");
        }
        if (parameters.size() == 3) {
            throw new AuthorException("parameter " + name + " is the fourth: a region has at most three.");
        }
        Map<String, Extent> all = new LinkedHashMap<>(parameters);
        all.put(name, new Extent.Limits(from, to));
        return new ParametricRegion(x, y, z, all);
    }

    /**
     * A chart of bare variables, for integrals without measure: names in the order of their limits, at most three.
     * Errors: AuthorException as for regions.
     */
    public static Chart variables(Map<String, Extent> limits) {
        Nest nest = Nest.of(List.copyOf(limits.keySet()), limits, "integral");
        return Chart.of(nest, Embedding.of(CoordinateSystem.CARTESIAN), null);
    }

    @Override
    public int dimension() {
        return parameters.size();
    }

    @Override
    public List<PlacedChart> charts() {
        Nest nest = Nest.of(List.copyOf(parameters.keySet()), parameters, "parametric region");
        Nest.requireKnown("position", x, parameters.keySet(), "parametric region");
        Nest.requireKnown("position", y, parameters.keySet(), "parametric region");
        Nest.requireKnown("position", z, parameters.keySet(), "parametric region");
        List<PlacedChart> all = new ArrayList<>();
        all.add(new PlacedChart(Chart.of(nest, Embedding.of(nest, x, y, z), null), Frame.OWN));
        return all;
    }
}
