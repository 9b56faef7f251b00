package fieldwright.field;

import fieldwright.geometry.Chart;
import fieldwright.geometry.Nodes;

/** A ball about a patch (m, sheet frame), from a grid of its places and somewhat larger: good for choices, not for bounds. */
record Ball(double[] centre, double radius) {
    private static final int[] SIDE = {1, 33, 9, 6};

    static Ball of(Patch patch, Workspace space) {
        Chart chart = patch.chart();
        int d = chart.dimension();
        double[] middle = new double[d];
        java.util.Arrays.fill(middle, 0.5);
        Chart.Anchor anchor = chart.anchor(middle);
        double[] centre = patch.frame().toSheet(anchor.position());
        Nodes nodes = space.nodes;
        double[][] du = new double[3][1];
        int total = (int) Math.round(Math.pow(SIDE[d], d));
        double reach = 0;
        for (int i = 0; i < total; i++) {
            int rest = i;
            for (int k = 0; k < d; k++) {
                du[k][0] = (double) (rest % SIDE[d]) / (SIDE[d] - 1) - 0.5;
                rest /= SIDE[d];
            }
            chart.evaluate(anchor, du, 1, nodes);
            double square = 0;
            for (int a = 0; a < 3; a++) {
                square += nodes.offset[a][0] * nodes.offset[a][0];
            }
            reach = Math.max(reach, Math.sqrt(square));
        }
        return new Ball(centre, 1.2 * reach);
    }
}
