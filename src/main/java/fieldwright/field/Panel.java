package fieldwright.field;

import fieldwright.geometry.Chart;
import fieldwright.geometry.Nodes;
import fieldwright.integral.TensorRule;

/**
 * A box of a facet's parameters, with what is known of it before any place is: how long and how bent it is, its halves, and the nodes
 * of the rules used on it. Made when first needed; the same for every place, so that answers do not depend on earlier questions.
 */
final class Panel {
    private static final double[] ALONG = {0, 0.23, 0.5, 0.71, 1};
    private static final int[] STRIDE = {9, 3, 1};

    final Facet facet;
    final double[] from;
    final double[] to;
    final Chart.Anchor anchor;
    /** Offsets of sample points from the anchor, [axis][sample]: 5 along a line, 3 × 3, or 3 × 3 × 3; the last parameter runs fastest. */
    final double[][] sample;
    /** Length along each parameter, the longest of the sampled ones, and the shortest of a surface's. */
    final double[] length;
    final double[] shortest = {Double.POSITIVE_INFINITY, Double.POSITIVE_INFINITY};
    /** Which of the three sampled lines across parameter k is the shortest. */
    final int[] collapsed = {-1, -1};
    /** bend[k][j]: how much the tangent of parameter k changes along parameter j, against its own length; of a line bend[0][0]. */
    final double[][] bend;
    /** The parameter of a surface whose tangent turns in one half of its way and hardly in the other, or −1. */
    int uneven = -1;
    private final Panel[][] halves;
    private final java.util.HashMap<TensorRule, NodeSet[]> nodes = new java.util.HashMap<>();

    Panel(Facet facet, double[] from, double[] to) {
        this.facet = facet;
        this.from = from;
        this.to = to;
        int d = from.length;
        double[] middle = new double[d];
        for (int k = 0; k < d; k++) {
            middle[k] = (from[k] + to[k]) / 2;
        }
        anchor = facet.anchor(middle);
        halves = new Panel[d][];
        length = new double[d];
        bend = new double[d][d];
        int n = d == 1 ? ALONG.length : d == 2 ? 9 : 27;
        double[][] du = facet.space.du;
        for (int i = 0; i < n; i++) {
            for (int k = 0; k < d; k++) {
                double part = d == 1 ? ALONG[i] : i / STRIDE[3 - d + k] % 3 / 2.0;
                du[k][i] = (to[k] - from[k]) * (part - 0.5);
            }
        }
        Nodes placed = facet.place(anchor, du, n);
        sample = new double[3][];
        for (int a = 0; a < 3; a++) {
            sample[a] = java.util.Arrays.copyOf(placed.offset[a], n);
        }
        switch (d) {
            case 1 -> measureLine(n);
            case 2 -> measureSurface();
            default -> measureVolume();
        }
    }

    /** One half along a parameter. */
    Panel half(int direction, boolean low) {
        if (halves[direction] == null) {
            double middle = (from[direction] + to[direction]) / 2;
            double[] a = to.clone();
            double[] b = from.clone();
            a[direction] = middle;
            b[direction] = middle;
            halves[direction] = new Panel[] {new Panel(facet, from, a), new Panel(facet, b, to)};
        }
        return halves[direction][low ? 0 : 1];
    }

    /** The nodes of a rule, in blocks. */
    NodeSet[] nodes(TensorRule rule) {
        NodeSet[] known = nodes.get(rule);
        if (known != null) {
            return known;
        }
        Workspace space = facet.space;
        int blocks = (rule.size() + Workspace.BLOCK - 1) / Workspace.BLOCK;
        known = new NodeSet[blocks];
        double volume = 1;
        for (int k = 0; k < from.length; k++) {
            volume *= to[k] - from[k];
        }
        for (int m = 0; m < blocks; m++) {
            int first = m * Workspace.BLOCK;
            int n = Math.min(Workspace.BLOCK, rule.size() - first);
            for (int k = 0; k < from.length; k++) {
                double width = to[k] - from[k];
                double[] node = rule.nodes(k);
                for (int i = 0; i < n; i++) {
                    space.du[k][i] = width * (node[first + i] - 0.5);
                }
            }
            for (int i = 0; i < n; i++) {
                space.jacobian[i] = volume;
            }
            facet.place(anchor, space.du, n);
            facet.carry(anchor, space.jacobian, n, space.set);
            known[m] = space.set.kept(n, facet.vectors(), facet.chart.hasExactOffsets());
        }
        nodes.put(rule, known);
        return known;
    }

    private double step(int i, int j) {
        double x = sample[0][i] - sample[0][j];
        double y = sample[1][i] - sample[1][j];
        double z = sample[2][i] - sample[2][j];
        return Math.sqrt(x * x + y * y + z * z);
    }

    private void measureLine(int n) {
        double[][] t = facet.tangent(0);
        double largest = 0;
        double difference = 0;
        for (int i = 0; i < n; i++) {
            length[0] += i == 0 ? 0 : step(i - 1, i);
            largest = Math.max(largest, square(t, i));
            for (int j = 0; j < i; j++) {
                difference = Math.max(difference, square(t, i, j));
            }
        }
        bend[0][0] = largest > 0 ? Math.sqrt(difference / largest) : 0;
    }

    private void measureSurface() {
        for (int i = 0; i < 3; i++) {
            double l1 = step(3 * i, 3 * i + 1) + step(3 * i + 1, 3 * i + 2);
            double l0 = step(i, i + 3) + step(i + 3, i + 6);
            length[0] = Math.max(length[0], l0);
            length[1] = Math.max(length[1], l1);
            if (l1 < shortest[1]) {
                shortest[1] = l1;
                collapsed[0] = i;
            }
            if (l0 < shortest[0]) {
                shortest[0] = l0;
                collapsed[1] = i;
            }
        }
        uneven = isUneven(facet.tangent(0), 3, 1) ? 0 : isUneven(facet.tangent(1), 1, 3) ? 1 : -1;
        for (int k = 0; k < 2; k++) {
            double[][] t = facet.tangent(k);
            double largest = 0;
            for (int i = 0; i < 9; i++) {
                largest = Math.max(largest, square(t, i));
            }
            if (!(largest > 0)) {
                continue;
            }
            for (int i = 0; i < 3; i++) {
                double d0 = Math.max(square(t, i, i + 6), Math.max(square(t, i, i + 3), square(t, i + 3, i + 6)));
                double d1 = Math.max(square(t, 3 * i, 3 * i + 2), Math.max(square(t, 3 * i, 3 * i + 1), square(t, 3 * i + 1, 3 * i + 2)));
                bend[k][0] = Math.max(bend[k][0], Math.sqrt(d0 / largest));
                bend[k][1] = Math.max(bend[k][1], Math.sqrt(d1 / largest));
            }
        }
    }

    private static final double UNEVEN = 0.02;

    /** A needle's tip is so small a part of its box that no rule over the whole of it would see it. */
    private static boolean isUneven(double[][] t, int along, int across) {
        for (int j = 0; j < 3; j++) {
            double first = turned(t, j * across, j * across + along);
            double second = turned(t, j * across + along, j * across + 2 * along);
            if (Math.max(first, second) > 1 && Math.min(first, second) < UNEVEN * Math.max(first, second)) {
                return true;
            }
        }
        return false;
    }

    /** Square of the difference of two tangents' directions. */
    private static double turned(double[][] t, int i, int j) {
        double a = Math.sqrt(square(t, i));
        double b = Math.sqrt(square(t, j));
        double x = t[0][i] / a - t[0][j] / b;
        double y = t[1][i] / a - t[1][j] / b;
        double z = t[2][i] / a - t[2][j] / b;
        return x * x + y * y + z * z;
    }

    /** Of a volume bend[k][k] alone: the largest change of any tangent along k. */
    private void measureVolume() {
        for (int j = 0; j < 3; j++) {
            int s = STRIDE[j];
            for (int i = 0; i < 27; i++) {
                if (i / s % 3 == 0) {
                    length[j] = Math.max(length[j], step(i, i + s) + step(i + s, i + 2 * s));
                    for (int k = 0; k < 3; k++) {
                        double[][] t = facet.tangent(k);
                        double here = Math.max(square(t, i), Math.max(square(t, i + s), square(t, i + 2 * s)));
                        double change = Math.max(square(t, i, i + 2 * s), square(t, i, i + s));
                        if (here > 0) {
                            bend[j][j] = Math.max(bend[j][j], Math.sqrt(change / here));
                        }
                    }
                }
            }
        }
    }

    private static double square(double[][] t, int i) {
        return t[0][i] * t[0][i] + t[1][i] * t[1][i] + t[2][i] * t[2][i];
    }

    private static double square(double[][] t, int i, int j) {
        double x = t[0][i] - t[0][j];
        double y = t[1][i] - t[1][j];
        double z = t[2][i] - t[2][j];
        return x * x + y * y + z * z;
    }
}
