package fieldwright.words;

import fieldwright.formula.Coordinates;
import fieldwright.formula.Names;
import fieldwright.geometry.ParametricRegion;
import fieldwright.geometry.Region;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.UnknownNameException;
import java.util.ArrayList;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Set;

/** Any shape: x, y, z as formulas of one to three parameters, then {@code .over(name, from, to)} for each. Immutable. */
public final class ParametricShape extends Shape {
    private final Object[] position;
    private final List<Parameter> parameters;
    private final UnknownNameException unknown;

    private record Parameter(String name, Object from, Object to) { }

    private ParametricShape(Object[] position, List<Parameter> parameters, Region region, UnknownNameException unknown) {
        super(region);
        this.position = position;
        this.parameters = parameters;
        this.unknown = unknown;
    }

    static ParametricShape open(Object x, Object y, Object z) {
        return with(new Object[] {x, y, z}, List.of());
    }

    /** One more parameter between limits; they may depend on the other parameters. */
    public ParametricShape over(String name, Object from, Object to) {
        String folded = Names.fold(name);
        if (Coordinates.is(folded)) {
            throw new AuthorException("parameter '" + name + "' is a coordinate, and a density reads it as such. Choose another name.");
        }
        String reserved = Names.whyReserved(folded);
        if (reserved != null) {
            throw new AuthorException("parameter: " + reserved);
        }
        if (Desk.current().scope().names().contains(folded)) {
            throw new AuthorException("parameter '" + name + "' is a name of the sheet too, and a formula could mean either. Choose another name.");
        }
        List<Parameter> more = new ArrayList<>(parameters);
        more.add(new Parameter(folded, from, to));
        return with(position, List.copyOf(more));
    }

    /** Errors: {@link UnknownNameException} for a name that is neither the sheet's nor a parameter. */
    @Override
    public Region region() {
        if (unknown != null) {
            throw unknown;
        }
        return super.region();
    }

    /** A name that is not known yet may be a parameter still to come: that is an error only when the region is used. */
    private static ParametricShape with(Object[] position, List<Parameter> parameters) {
        try {
            return new ParametricShape(position, parameters, bound(position, parameters), null);
        } catch (UnknownNameException notYet) {
            return new ParametricShape(position, parameters, null, notYet);
        }
    }

    private static Region bound(Object[] position, List<Parameter> parameters) {
        Set<String> free = names(parameters);
        ParametricRegion region = ParametricRegion.of(Given.formula("x of the shape", position[0], free),
                Given.formula("y of the shape", position[1], free), Given.formula("z of the shape", position[2], free));
        for (Parameter p : parameters) {
            region = region.over(p.name(), Given.formula("lower limit of " + p.name(), p.from(), free),
                    Given.formula("upper limit of " + p.name(), p.to(), free));
        }
        return region;
    }

    private static Set<String> names(List<Parameter> parameters) {
        Set<String> names = new LinkedHashSet<>();
        parameters.forEach(p -> names.add(p.name()));
        return names;
    }
}
