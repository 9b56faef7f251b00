package fieldwright.field.tree;

import fieldwright.quantity.Stop;

/**
 * Field and potential of very many charges at one place, charge by charge; sides near by in closed form. Sums run in 256 lanes, each
 * lane short, and are put together compensated, so that a million charges lose no more digits than a few dozen. One thread.
 */
public final class DirectField {
    private static final int LANES = 256;
    /** Charges of one lane before it is emptied. */
    private static final int DEPTH = 32;
    private static final double EPS = Math.ulp(1.0);

    /**
     * Bare values, without 1/(4π eps0), with bounds of their errors that contain the rounding of the place.
     *
     * @param touching on a charge or a charged line: no value
     */
    public record At(double[] field, double potential, double fieldError, double potentialError, boolean touching) { }

    private final Charges charges;
    /** The charges, those of near sides taken out while a place is worked. */
    private final double[] q;
    private final double[] halves;
    private final double extent;
    private final double[][] lanes = new double[7][LANES];

    public DirectField(Charges charges) {
        this.charges = charges;
        q = charges.sides == null ? charges.q : charges.q.clone();
        halves = new double[charges.sides == null ? 0 : charges.count];
        for (int e = 0; e < halves.length; e++) {
            halves[e] = charges.half(e);
        }
        double most = 0;
        for (int i = 0; i < q.length; i++) {
            most = Math.max(most, Math.abs(charges.x[i]) + Math.abs(charges.y[i]) + Math.abs(charges.z[i]));
        }
        extent = most;
    }

    public At at(double x, double y, double z) {
        Sum[] sums = new Sum[6];
        for (int k = 0; k < 6; k++) {
            sums[k] = new Sum();
        }
        double[] sideError = new double[2];
        boolean onSide = charges.sides != null && sides(x, y, z, sums, sideError);
        double nearest = nodes(x, y, z, sums);
        if (charges.sides != null) {
            System.arraycopy(charges.q, 0, q, 0, q.length);
        }
        double size = Math.abs(x) + Math.abs(y) + Math.abs(z) + extent;
        boolean touching = onSide || !(nearest > 4 * EPS * size);
        double rounding = (DEPTH + 16) * EPS + (charges.sides == null ? 0 : Sides.RULE_ERROR);
        double ofField = sums[4].value();
        double ofPotential = sums[5].value();
        double first = sums[3].value();
        return new At(new double[] {sums[0].value(), sums[1].value(), sums[2].value()}, first,
            sideError[0] + rounding * ofField + 4 * EPS * size * ofField / nearest,
            sideError[1] + rounding * ofPotential + 2 * EPS * size * ofField, touching);
    }

    /** Adds the near sides and takes their charges out; true when the place is on one. */
    private boolean sides(double x, double y, double z, Sum[] sums, double[] error) {
        boolean on = false;
        double[] side = new double[6];
        for (int e = 0; e < halves.length; e++) {
            double dx = charges.middle(charges.x, e) - x;
            double dy = charges.middle(charges.y, e) - y;
            double dz = charges.middle(charges.z, e) - z;
            double reach = Sides.NEAR * halves[e];
            if (dx * dx + dy * dy + dz * dz < reach * reach) {
                charges.sides.closed(e, x, y, z, side);
                on |= Double.isInfinite(side[4]);
                for (int k = 0; k < 4; k++) {
                    sums[k].add(side[k]);
                }
                error[0] += side[4];
                error[1] += side[5];
                java.util.Arrays.fill(q, Sides.NODES * e, Sides.NODES * (e + 1), 0);
            }
        }
        return on;
    }

    /** Adds all charges; the distance of the nearest. Sums: E_x, E_y, E_z, V, Σ|q|/R², Σ|q|/R. */
    private double nodes(double x, double y, double z, Sum[] sums) {
        int whole = q.length / LANES;
        double[] near = lanes[6];
        java.util.Arrays.fill(near, Double.POSITIVE_INFINITY);
        for (int block = 0; block < whole; block++) {
            lane(charges.x, charges.y, charges.z, q, block * LANES, x, y, z, lanes[0], lanes[1], lanes[2], lanes[3]);
            sizes(charges.x, charges.y, charges.z, q, block * LANES, x, y, z, lanes[4], lanes[5], near);
            if (block % DEPTH == DEPTH - 1 || block == whole - 1) {
                Stop.check();
                empty(sums);
            }
        }
        double least = Double.POSITIVE_INFINITY;
        for (double n : near) {
            least = Math.min(least, n);
        }
        for (int i = whole * LANES; i < q.length; i++) {
            double dx = x - charges.x[i];
            double dy = y - charges.y[i];
            double dz = z - charges.z[i];
            double square = dx * dx + dy * dy + dz * dz;
            if (q[i] != 0) {
                least = Math.min(least, square);
                double inverse = 1 / Math.sqrt(square);
                double v = q[i] * inverse;
                double w = v * inverse * inverse;
                double[] terms = {w * dx, w * dy, w * dz, v, Math.abs(v) * inverse, Math.abs(v)};
                for (int k = 0; k < 6; k++) {
                    sums[k].add(terms[k]);
                }
            }
        }
        return Math.sqrt(least);
    }

    private void empty(Sum[] sums) {
        for (int k = 0; k < 6; k++) {
            for (int i = 0; i < LANES; i++) {
                sums[k].add(lanes[k][i]);
                lanes[k][i] = 0;
            }
        }
    }

    private static void lane(double[] sx, double[] sy, double[] sz, double[] q, int from, double x, double y, double z, double[] ex, double[] ey,
        double[] ez, double[] v) {
        for (int i = 0; i < LANES; i++) {
            double dx = x - sx[from + i];
            double dy = y - sy[from + i];
            double dz = z - sz[from + i];
            double inverse = 1 / Math.sqrt(dx * dx + dy * dy + dz * dz);
            double u = q[from + i] * inverse;
            double w = u * inverse * inverse;
            v[i] += u;
            ex[i] += w * dx;
            ey[i] += w * dy;
            ez[i] += w * dz;
        }
    }

    /** Charges of 0 (sides taken out) count as far away. */
    private static void sizes(double[] sx, double[] sy, double[] sz, double[] q, int from, double x, double y, double z, double[] second,
        double[] first, double[] near) {
        for (int i = 0; i < LANES; i++) {
            double dx = x - sx[from + i];
            double dy = y - sy[from + i];
            double dz = z - sz[from + i];
            double square = dx * dx + dy * dy + dz * dz;
            double c = Math.abs(q[from + i]);
            double inverse = 1 / Math.sqrt(square);
            first[i] += c * inverse;
            second[i] += c * inverse * inverse;
            near[i] = Math.min(near[i], c > 0 ? square : Double.POSITIVE_INFINITY);
        }
    }

    /** Neumaier's compensated sum (Z. angew. Math. Mech. 54, 39, 1974). */
    static final class Sum {
        private double high;
        private double low;

        void add(double term) {
            double t = high + term;
            low += Math.abs(high) >= Math.abs(term) ? (high - t) + term : (term - t) + high;
            high = t;
        }

        double value() {
            return high + low;
        }
    }
}
