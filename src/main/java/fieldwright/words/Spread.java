package fieldwright.words;

import fieldwright.field.Accuracy;
import fieldwright.formula.Coordinates;
import fieldwright.formula.Formula;
import fieldwright.geometry.Chart;
import fieldwright.geometry.Region;
import fieldwright.integral.Estimate;
import fieldwright.integral.RegionIntegral;
import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Dimensions;
import fieldwright.quantity.Standing;
import fieldwright.quantity.Units;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.Locale;
import java.util.Map;
import java.util.Set;
import javax.measure.Dimension;

/**
 * A formula over a region: bound, its free names the coordinates and the region's own parameters, its dimension known.
 *
 * @param dimension what the formula measures; null for a bare 0, which fits any unit
 */
record Spread(Formula formula, Region region, Dimension dimension) {

    /** Checks the region's limits as well. */
    static Spread of(String what, Object given, Shape shape) {
        Region region = shape.region();
        Map<String, Dimension> known = new LinkedHashMap<>(Coordinates.DIMENSIONS);
        Set<String> own = new LinkedHashSet<>();
        for (Region.PlacedChart part : region.charts()) {
            Chart chart = part.chart();
            for (String name : chart.coordinates()) {
                if (!Coordinates.is(name)) {
                    known.put(name, chart.coordinateDimension(name));
                    own.add(name);
                }
            }
        }
        Formula formula = Given.formula(what, given, own);
        for (String name : own) {
            if (formula.variables().contains(name) && Desk.current().scope().names().contains(name)) {
                throw new AuthorException(what + " " + formula.text() + " uses '" + name + "', a name of the sheet and a parameter of this region too."
                        + " Rename the sheet's.");
            }
        }
        boolean bare = formula.variables().isEmpty() && formula.fitsAnyUnit();
        return new Spread(formula, region, bare ? null : formula.dimension(known));
    }

    /** The integral with the region's measure, true length, area or volume. */
    Amount integral(Accuracy accuracy) {
        Dimension measure = Dimensions.of(Units.LENGTH).pow(region.dimension());
        Dimension unit = Dimensions.of(dimension == null ? Units.NONE : dimension).multiply(measure);
        Estimate e = RegionIntegral.over(region, formula, accuracy.relative(), accuracy.absoluteFloor(), accuracy.maxEvaluations());
        if (e.status() == Estimate.Status.NOT_A_NUMBER) {
            return Amount.si(Double.NaN, Double.POSITIVE_INFINITY, unit,
                    Standing.notConverged("integral of " + formula.text() + ": the integrand is not a number somewhere in the region"));
        }
        double allowed = Math.max(accuracy.absoluteFloor(), accuracy.relative() * Math.abs(e.value()));
        Standing standing = e.isConverged() || e.errorEstimate() <= allowed ? Standing.CONVERGED : Standing.notConverged(String.format(Locale.ROOT,
                "integral of %s: %d evaluations, estimated error %.2g > tolerance %.2g. Split the region where the integrand bends, or loosen the accuracy",
                formula.text(), e.evaluations(), e.errorEstimate(), allowed));
        return Amount.si(e.value(), e.errorEstimate(), unit, standing);
    }
}
