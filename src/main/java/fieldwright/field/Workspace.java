package fieldwright.field;

import fieldwright.geometry.Nodes;

/** Scratch arrays of one question; one thread. */
final class Workspace {
    static final int BLOCK = Nodes.BLOCK;
    static final double[] ZEROS = new double[BLOCK];

    final Nodes nodes = new Nodes();
    final fieldwright.integral.Cubature.Scratch cubature = new fieldwright.integral.Cubature.Scratch();
    final double[][] horner = new double[3][BLOCK];
    final double[][] du = new double[3][BLOCK];
    final double[][] full = new double[3][];
    final double[][] d = new double[3][BLOCK];
    final double[] jacobian = new double[BLOCK];
    final NodeSet set = NodeSet.scratch(nodes);
    final double[] density = new double[BLOCK];
    final double[] v = new double[BLOCK];
    final double[][] ray = new double[3][BLOCK];
    final double[] sum = new double[BLOCK];
    final double[][] edge = new double[3][BLOCK];
    final double[][] along = new double[3][BLOCK];
    final double[] radialA = new double[fieldwright.formula.Polynomial.MOST + 3];
    final double[] radialB = new double[fieldwright.formula.Polynomial.MOST + 3];
}
