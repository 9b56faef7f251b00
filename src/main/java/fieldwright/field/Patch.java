package fieldwright.field;

import fieldwright.formula.Formula;
import fieldwright.geometry.Chart;
import fieldwright.geometry.Frame;
import fieldwright.geometry.NodeFunction;

/** One part of a source ready for numbers: chart, where it stands, density along it, and the kernel its points act with. */
record Patch(Chart chart, Frame frame, Formula density, NodeFunction weight, Kernel kernel, SpaceFunction inSpace, double[][] breaks) {
    int dimension() {
        return chart.dimension();
    }
}
