package fieldwright.field.tree;

/** Targets in blocks of neighbours: halved along the longer side until a block is left. The last block is filled up with its first target. */
final class TargetBlocks {
    private static final int BLOCK = PointKernel.BLOCK;

    private final double[][] place;
    /** Number of the target at each place of the sorted order. */
    final int[] order;

    private TargetBlocks(double[][] place, int[] order) {
        this.place = place;
        this.order = order;
    }

    static TargetBlocks of(double[] x, double[] y, double[] z) {
        int[] order = new int[x.length];
        for (int i = 0; i < order.length; i++) {
            order[i] = i;
        }
        TargetBlocks blocks = new TargetBlocks(new double[][] {x.clone(), y.clone(), z.clone()}, order);
        blocks.divide(0, order.length);
        return blocks;
    }

    int count() {
        return (order.length + BLOCK - 1) / BLOCK;
    }

    /** How many targets are in a block. */
    int size(int block) {
        return Math.min(BLOCK, order.length - block * BLOCK);
    }

    void copy(int block, double[] x, double[] y, double[] z) {
        double[][] to = {x, y, z};
        int n = size(block);
        for (int k = 0; k < 3; k++) {
            System.arraycopy(place[k], block * BLOCK, to[k], 0, n);
            java.util.Arrays.fill(to[k], n, BLOCK, to[k][0]);
        }
    }

    /** Box about blocks [first, first + count). */
    void bounds(int first, int count, double[] low, double[] high) {
        int end = Math.min(order.length, (first + count) * BLOCK);
        for (int k = 0; k < 3; k++) {
            low[k] = Double.POSITIVE_INFINITY;
            high[k] = Double.NEGATIVE_INFINITY;
            for (int i = first * BLOCK; i < end; i++) {
                low[k] = Math.min(low[k], place[k][i]);
                high[k] = Math.max(high[k], place[k][i]);
            }
        }
    }

    private void divide(int from, int to) {
        int blocks = (to - from + BLOCK - 1) / BLOCK;
        if (blocks < 2) {
            return;
        }
        int cut = from + blocks / 2 * BLOCK;
        select(longest(from, to), from, to - 1, cut);
        divide(from, cut);
        divide(cut, to);
    }

    private double[] longest(int from, int to) {
        double best = -1;
        double[] axis = place[0];
        for (double[] p : place) {
            double low = Double.POSITIVE_INFINITY;
            double high = Double.NEGATIVE_INFINITY;
            for (int i = from; i < to; i++) {
                low = Math.min(low, p[i]);
                high = Math.max(high, p[i]);
            }
            if (high - low > best) {
                best = high - low;
                axis = p;
            }
        }
        return axis;
    }

    /** Hoare's selection: what is at {@code k} afterwards is not less than all before it and not more than all behind it. */
    private void select(double[] axis, int first, int last, int k) {
        int from = first;
        int to = last;
        while (from < to) {
            double pivot = axis[from + (to - from) / 2];
            int i = from;
            int j = to;
            while (i <= j) {
                while (axis[i] < pivot) {
                    i++;
                }
                while (axis[j] > pivot) {
                    j--;
                }
                if (i <= j) {
                    swap(i++, j--);
                }
            }
            if (k <= j) {
                to = j;
            } else if (k >= i) {
                from = i;
            } else {
                return;
            }
        }
    }

    private void swap(int i, int j) {
        for (double[] p : place) {
            double t = p[i];
            p[i] = p[j];
            p[j] = t;
        }
        int o = order[i];
        order[i] = order[j];
        order[j] = o;
    }
}
