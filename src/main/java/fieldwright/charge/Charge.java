package fieldwright.charge;

import javax.measure.Dimension;

import fieldwright.formula.Formula;
import fieldwright.geometry.Region;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Units;

/**
 * Charge spread over a region. Density (bound; free names are coordinates or the region's parameters, read in the
 * region's own frame) in C/m, C/m² or C/m³ as the region has 1, 2 or 3 dimensions.
 */
public record Charge(Region region, Formula density, Surroundings around) implements Source {
    /** Errors: AuthorException when the region is a point. */
    public Charge {
        if (region.dimension() == 0) {
            throw new AuthorException("charge spread over a point: no coordinate of the region has limits. Use pointCharge(place, charge) "
                + "or give a coordinate limits.");
        }
    }

    public static Charge of(Region region, Formula density) {
        return new Charge(region, density, null);
    }

    @Override
    public Charge with(Surroundings surroundings) {
        return new Charge(region, density, surroundings);
    }

    /** What the density's dimension must be. */
    public static Dimension densityDimension(int regionDimension) {
        return switch (regionDimension) {
            case 0 -> Units.CHARGE;
            case 1 -> Units.LINE_DENSITY;
            case 2 -> Units.SURFACE_DENSITY;
            default -> Units.VOLUME_DENSITY;
        };
    }
}
