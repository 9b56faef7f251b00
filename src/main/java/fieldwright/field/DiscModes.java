package fieldwright.field;

import java.util.ArrayList;
import java.util.List;

/**
 * Modes of the grounded unit disc, J_m(x_mn ρ) cos m φ, with zeros x_mn of J_m up to {@value #HIGHEST}: what a charge in a grounded
 * cylinder shows at axial distances over {@value #BEYOND} radii, where the rest is under 1e-16 of the first
 * (Jackson, Classical Electrodynamics, 3rd ed., 3.8 and 3.11).
 */
final class DiscModes {
    static final double BEYOND = 1.5;
    private static final double HIGHEST = 27.5;
    /** Order, zero and 2/J_{m+1}(zero)² of each mode, times 2 for m > 0, ascending in the order. */
    static final int[] ORDER;
    static final double[] ZERO;
    static final double[] FACTOR;

    static {
        List<double[]> modes = new ArrayList<>();
        for (int m = 0; m < HIGHEST; m++) {
            double step = 0.2;
            for (double x = Math.max(1, m); x < HIGHEST; x += step) {
                if (j(m, x) * j(m, x + step) < 0) {
                    double zero = zero(m, x, x + step);
                    double next = j(m + 1, zero);
                    modes.add(new double[] {m, zero, (m == 0 ? 2 : 4) / (next * next)});
                }
            }
        }
        ORDER = modes.stream().mapToInt(f -> (int) f[0]).toArray();
        ZERO = modes.stream().mapToDouble(f -> f[1]).toArray();
        FACTOR = modes.stream().mapToDouble(f -> f[2]).toArray();
    }

    private DiscModes() {
    }

    private static double zero(int m, double from, double to) {
        double low = from;
        double high = to;
        double sign = j(m, low);
        for (int i = 0; i < 60; i++) {
            double middle = (low + high) / 2;
            if (j(m, middle) * sign > 0) {
                low = middle;
            } else {
                high = middle;
            }
        }
        double x = (low + high) / 2;
        return x - j(m, x) / (m / x * j(m, x) - j(m + 1, x));
    }

    /** J_m(x), 0 <= x < 30: Miller's downward recurrence, normalised by 1 = J_0 + 2 (J_2 + J_4 + …), DLMF 10.12.4. */
    static double j(int m, double x) {
        if (x < 1e-8) {
            return m == 0 ? 1 : m == 1 ? x / 2 : 0;
        }
        int start = 2 * ((int) (Math.max(m, x) + 18 + 2 * Math.sqrt(x)) / 2 + 1);
        double after = 0;
        double here = 1e-290;
        double norm = 0;
        double wanted = m == start ? here : 0;
        for (int k = start; k > 0; k--) {
            double before = 2 * k / x * here - after;
            after = here;
            here = before;
            if (Math.abs(here) > 1e200) {
                here *= 1e-200;
                after *= 1e-200;
                norm *= 1e-200;
                wanted *= 1e-200;
            }
            if (k - 1 == m) {
                wanted = here;
            }
            if ((k - 1) % 2 == 0) {
                norm += (k == 1 ? 1 : 2) * here;
            }
        }
        return wanted / norm;
    }
}
