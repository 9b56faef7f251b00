package fieldwright.field;

import fieldwright.formula.Formula;
import fieldwright.formula.Polynomial;
import fieldwright.geometry.Chart;
import fieldwright.geometry.Frame;
import fieldwright.geometry.NodeFunction;

/** One part of a source ready for numbers: chart, where it stands, density along it, the kernel its points act with;
 * {@code triangle}: only the half u + v ≤ 1 of the chart's box carries charge; {@code polynomial}: the density of a flat surface or a volume
 * as one of position, or null. */
record Patch(Chart chart, Frame frame, Formula density, NodeFunction weight, Kernel kernel, SpaceFunction inSpace, double[][] breaks,
    boolean triangle, Polynomial polynomial,
    Facets facets) {
    int dimension() {
        return chart.dimension();
    }
}
