package fieldwright.geometry;

/** Scratch space for one block of nodes of a {@link Chart}; filled by {@link Chart#evaluate}. Not shared between threads. */
public final class Nodes {
    public static final int BLOCK = 64;

    /** Coordinates by the chart's names: c[m][i]; delta is the difference to the anchor's, without cancellation where limits are constant. */
    public final double[][] c = new double[3][BLOCK];
    public final double[][] delta = new double[3][BLOCK];
    /** Position minus the anchor's position (m), own frame. */
    public final double[][] offset = new double[3][BLOCK];
    /** tangent[k][a][i] = ∂(position a)/∂u_k. */
    public final double[][][] tangent = new double[3][3][BLOCK];
    /** Length, area or volume per unit of du. */
    public final double[] measure = new double[BLOCK];

    /** Times the unit roundoff: what rounding of outer coordinates moves a node by, through limits that depend on them (m). */
    public final double[] rounding = new double[BLOCK];

    /** Times the unit roundoff: relative rounding of widths and slopes that follow from such limits. */
    public final double[] relative = new double[BLOCK];

    private Algebraic.Slot[] slots = {};

    Algebraic.Slot[] slots(int count) {
        if (slots.length < count) {
            int had = slots.length;
            slots = java.util.Arrays.copyOf(slots, count);
            for (int i = had; i < count; i++) {
                slots[i] = new Algebraic.Slot();
            }
        }
        return slots;
    }

    private Nodes single;

    /** Scratch for one node beside this block. */
    Nodes single() {
        if (single == null) {
            single = new Nodes();
        }
        return single;
    }

    final double[][][] dc = new double[3][3][BLOCK];
    final double[][][] jacobian = new double[3][3][BLOCK];
    final double[] low = new double[BLOCK];
    final double[] high = new double[BLOCK];
    final double[] psi = new double[BLOCK];
    final double[] slope = new double[BLOCK];
    final double[] work = new double[BLOCK];
}
