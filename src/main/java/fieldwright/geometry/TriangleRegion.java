package fieldwright.geometry;

import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;

import fieldwright.formula.Formula;
import fieldwright.quantity.Amount;
import fieldwright.quantity.Units;

/**
 * A flat triangle with corners a, b, c (m). Parameters u and v with u, v ≥ 0 and u + v ≤ 1: the place is a + u (b − a) + v (c − a).
 */
public record TriangleRegion(List<Double> a, List<Double> b, List<Double> c) implements Region {
    static TriangleRegion of(double[] a, double[] b, double[] c) {
        return new TriangleRegion(List.of(a[0], a[1], a[2]), List.of(b[0], b[1], b[2]), List.of(c[0], c[1], c[2]));
    }

    @Override
    public int dimension() {
        return 2;
    }

    @Override
    public List<PlacedChart> charts() {
        return parametric(Formula.constant(1).minus(Formula.variable("u"))).charts();
    }

    /** The parallelogram with sides b − a and c − a, of which the triangle is the half u + v ≤ 1; offsets are exact in it. */
    public List<PlacedChart> parallelogram() {
        return parametric(Formula.constant(1)).charts();
    }

    private ParametricRegion parametric(Formula upperV) {
        Formula[] position = new Formula[3];
        for (int k = 0; k < 3; k++) {
            position[k] = length(a.get(k)).plus(length(b.get(k) - a.get(k)).times(Formula.variable("u")))
                .plus(length(c.get(k) - a.get(k)).times(Formula.variable("v")));
        }
        Map<String, Extent> over = new LinkedHashMap<>();
        over.put("u", new Extent.Limits(Formula.constant(0), Formula.constant(1)));
        over.put("v", new Extent.Limits(Formula.constant(0), upperV));
        return new ParametricRegion(position[0], position[1], position[2], over);
    }

    private static Formula length(double si) {
        return Formula.constant(Amount.si(si, 0, Units.LENGTH));
    }
}
