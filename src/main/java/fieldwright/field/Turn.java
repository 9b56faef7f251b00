package fieldwright.field;

import fieldwright.geometry.Chart;
import fieldwright.geometry.Nodes;

/** Whether charge is the same all round an axis, and along which parameter it goes round. */
final class Turn {
    private static final double ALIKE = 1e-12;
    private static final double[] TURNS = {0.061, 0.23, 0.37, 0.58, 0.79, 0.94};

    private Turn() {
    }

    /**
     * The parameter of a patch along which it goes once round the axis of a cylinder and nothing else changes, or −1. A coordinate phi with
     * limits a full turn apart, and distance from the axis, height, density and measure the same at several angles of several places.
     */
    static int of(Patch patch, RoundGreen.Cylinder cylinder) {
        Chart chart = patch.chart();
        if (patch.kernel() != Kernel.POINT || patch.triangle() || chart.isEndless()) {
            return -1;
        }
        for (int k = 0; k < chart.dimension(); k++) {
            if (chart.coordinates().get(chart.coordinateOf(k)).equals("phi") && chart.hasConstantLimits(k)
                && Math.abs(Math.abs(chart.upper(k) - chart.lower(k)) - 2 * Math.PI) < 1e-14 && isAlike(patch, k, cylinder)) {
                return k;
            }
        }
        return -1;
    }

    private static boolean isAlike(Patch patch, int turn, RoundGreen.Cylinder cylinder) {
        Chart chart = patch.chart();
        java.util.Random random = new java.util.Random(3);
        for (int trial = 0; trial < 6; trial++) {
            double[] u = new double[chart.dimension()];
            for (int k = 0; k < u.length; k++) {
                u[k] = random.nextDouble();
            }
            double[] first = null;
            for (double t : TURNS) {
                u[turn] = t;
                double[] here = look(patch, u, cylinder);
                first = first == null ? here : first;
                for (int i = 0; i < here.length; i++) {
                    double size = i < 2 ? cylinder.radius() + Math.abs(first[1]) : Math.abs(first[i]);
                    if (!(Math.abs(here[i] - first[i]) <= ALIKE * size)) {
                        return false;
                    }
                }
            }
        }
        return true;
    }

    /** Distance from the axis, height, density, measure. */
    private static double[] look(Patch patch, double[] u, RoundGreen.Cylinder cylinder) {
        Chart.Anchor anchor = patch.chart().anchor(u);
        Nodes nodes = new Nodes();
        patch.chart().evaluate(anchor, new double[3][1], 1, nodes);
        double[] density = new double[1];
        patch.weight().evaluate(nodes, anchor.position(), 1, density);
        double[] p = patch.frame().toSheet(anchor.position());
        return new double[] {cylinder.distance(p), p[cylinder.axis()], density[0], nodes.measure[0]};
    }
}
