package fieldwright.field;

/**
 * Green function within a grounded circular cylinder, endless or with grounded ends, all in units of its radius.
 *
 * <p>The wall's part, without the images in the ends: −(2/π) ∫₀^∞ dk cos k(z − z') Σ_m ε_m cos m(φ − φ') I_m(kρ) I_m(kρ') K_m(k)/I_m(k)
 * for the endless tube, −(4/H) Σ_n sin k_n z sin k_n z' … with k_n = nπ/H for the drum (Jackson, Classical Electrodynamics, 3rd ed.,
 * 3.11 and problem 3.17; Smythe, Static and Dynamic Electricity, 5.29). Terms fall like exp(−√(m² + k²)(2 − ρ − ρ')). The integral is a
 * sum too: the trapezoidal rule at k = (j + ½)h is exact for charges repeated with alternate sign at distances 2π/h, which for the tube
 * as a whole counts exp(−2.405·2π/h); their free fields, an alternating sum, are added. Beyond {@value DiscModes#BEYOND} radii along
 * the axis {@link DiscModes} take over.
 *
 * <p>I_m by ratios from downward recurrence, K_m I_m by the Wronskian and upward recurrence (DLMF 10.29.1, 10.28.2): no overflow.
 *
 * <p>Weak where place and source are both close to the wall: with 2 − ρ − ρ' = g the sum has 2,000/g² terms. It stops at
 * a number of terms, and what is then left out is stated as doubt.
 */
final class RoundGreen implements Green {
    /** exp(−NEGLIGIBLE) is left out; of a source under an integral exp(−SMALL). */
    private static final double NEGLIGIBLE = 38;
    private static final double SMALL = 30;
    /** Distance of the alternate charges that the sum over k stands for. */
    private static final double PERIOD = 17;
    /** A drum longer than this is a tube seen with its image in the nearer end: exp(−2.405·16) is left out. */
    static final double TALL = 16;
    static final double[] ALTERNATE = alternate(22);

    /** The cylinder: axis, foot of the axis, radius; ends along it, infinite for a tube. */
    record Cylinder(int axis, double[] centre, double radius, double from, double to) {
        double height() {
            return (to - from) / radius;
        }

        /** Of a place from the axis (m). */
        double distance(double[] p) {
            double a = p[(axis + 1) % 3] - centre[(axis + 1) % 3];
            double b = p[(axis + 2) % 3] - centre[(axis + 2) % 3];
            return Math.sqrt(a * a + b * b);
        }

        boolean isTube() {
            return to == Double.POSITIVE_INFINITY;
        }
    }

    /** Terms at most for one source: 30 ms for a point charge, 1 ms for each node of an integral. */
    private static final int LANES = 32;
    private static final int MANY = 4_000_000;
    private static final int FEW = 100_000;

    private final Cylinder cylinder;
    private final double[] place;
    private final int budget;
    private final double negligible;
    private final boolean far;
    /** A tube's part of a drum: spoken to as if it had no ends. */
    private final boolean endless;
    private final double height;
    private final double rho;
    private final double cosine;
    private final double sine;
    private final double z;
    private final double step;
    private Row[] rows = new Row[64];
    private final Green ends;
    private final double[][] modes;

    /** The sources at hand, a few at a time: ρ', z', cosine and sine of φ − φ'. */
    private final double[] rhoS = new double[LANES];
    private final double[] zS = new double[LANES];
    private final double[] c1 = new double[LANES];
    private final double[] s1 = new double[LANES];
    /** Answers: V, ∂/∂ρ, ∂/(ρ∂φ), ∂/∂z, of each source. */
    private final double[][] v = new double[4][LANES];
    private final double[] missing = new double[LANES];
    private final double[][] work = new double[14][LANES];
    private double[][] q = new double[64][LANES];

    /** Per k, orders up to the length: A P, its derivatives by ρ and φ, and 1/q; see {@link #row}. */
    private record Row(double[] value, double[] radial, double[] turning, double[] inverse, double first) { }

    /**
     * {@code far}: the whole Green function, for sources away from the place; else without the direct charge and, in a drum, its image in
     * the nearer end.
     */
    RoundGreen(Cylinder c, double[] place, boolean onWall, boolean far) {
        this(c, place, onWall, far, MANY, c.isTube());
    }

    private RoundGreen(Cylinder c, double[] place, boolean onWall, boolean far, int budget, boolean endless) {
        cylinder = c;
        this.place = place;
        this.far = far;
        this.budget = budget;
        negligible = budget == MANY ? NEGLIGIBLE : SMALL;
        this.endless = endless;
        height = endless ? Double.POSITIVE_INFINITY : c.height();
        double a = (place[(c.axis + 1) % 3] - c.centre[(c.axis + 1) % 3]) / c.radius;
        double b = (place[(c.axis + 2) % 3] - c.centre[(c.axis + 2) % 3]) / c.radius;
        double r = Math.sqrt(a * a + b * b);
        rho = onWall ? 1 : r;
        cosine = r > 0 ? a / r : 1;
        sine = r > 0 ? b / r : 0;
        z = along(place[c.axis]);
        step = endless ? 2 * Math.PI / PERIOD : Math.PI / height;
        if (endless) {
            ends = null;
        } else {
            double[] low = new double[3];
            double[] length = {Double.POSITIVE_INFINITY, Double.POSITIVE_INFINITY, Double.POSITIVE_INFINITY};
            low[c.axis] = c.from;
            length[c.axis] = c.to - c.from;
            ends = new WalledGreen(place, low, length, far);
        }
        modes = new double[4][];
    }

    /** The smooth part for a place within: for a tall drum that of the tube, with that of the image in the nearer end. */
    static Green rest(Cylinder c, double[] place, boolean onWall) {
        if (c.isTube() || c.height() <= TALL) {
            return new RoundGreen(c, place, onWall, false);
        }
        double[] image = place.clone();
        boolean upper = place[c.axis] - c.from > (c.to - c.from) / 2;
        image[c.axis] = 2 * (upper ? c.to : c.from) - place[c.axis];
        return new Mirrored(new RoundGreen(c, place, onWall, false, MANY, true), new RoundGreen(c, image, onWall, false, MANY, true), c.axis);
    }

    /** Distance between place and source from which on {@code far} is the better choice. */
    static double farBeyond(Cylinder c) {
        return c.height() < DiscModes.BEYOND ? 0.7 * (c.to - c.from) : 2.5 * c.radius;
    }

    private double along(double at) {
        return (at - (cylinder.isTube() ? 0 : cylinder.from)) / cylinder.radius;
    }

    /** The part of one place less that of its mirror image. */
    private record Mirrored(Green own, Green image, int axis) implements Green {
        @Override
        public Green forPatch() {
            return new Mirrored(own.forPatch(), image.forPatch(), axis);
        }

        @Override
        public void potential(double[][] s, int n, double[] out, double[] doubt) {
            double[] other = new double[n];
            double[] more = new double[n];
            own.potential(s, n, out, doubt);
            image.potential(s, n, other, more);
            for (int i = 0; i < n; i++) {
                out[i] -= other[i];
                doubt[i] += more[i];
            }
        }

        @Override
        public void field(double[][] s, int n, double[][] out, double[] doubt) {
            double[][] other = new double[3][n];
            double[] more = new double[n];
            own.field(s, n, out, doubt);
            image.field(s, n, other, more);
            for (int i = 0; i < n; i++) {
                for (int k = 0; k < 3; k++) {
                    out[k][i] += k == axis ? other[k][i] : -other[k][i];
                }
                doubt[i] += more[i];
            }
        }
    }

    // ---- as a Green function

    @Override
    public void potential(double[][] s, int n, double[] out, double[] doubt) {
        if (ends != null) {
            ends.potential(s, n, out, doubt);
        }
        for (int first = 0; first < n; first += LANES) {
            int lanes = Math.min(LANES, n - first);
            see(s, first, lanes, false);
            for (int l = 0; l < lanes; l++) {
                int i = first + l;
                boolean alone = ends == null || isBeyond(l);
                out[i] = (alone ? 0 : out[i]) + v[0][l] / cylinder.radius;
                doubt[i] = (alone ? 0 : doubt[i]) + doubt(l, v[0][l]) / cylinder.radius;
            }
        }
    }

    @Override
    public void field(double[][] s, int n, double[][] out, double[] doubt) {
        if (ends != null) {
            ends.field(s, n, out, doubt);
        }
        double scale = 1 / (cylinder.radius * cylinder.radius);
        double[] x = out[(cylinder.axis + 1) % 3];
        double[] y = out[(cylinder.axis + 2) % 3];
        double[] along = out[cylinder.axis];
        for (int first = 0; first < n; first += LANES) {
            int lanes = Math.min(LANES, n - first);
            see(s, first, lanes, true);
            for (int l = 0; l < lanes; l++) {
                int i = first + l;
                boolean alone = ends == null || isBeyond(l);
                double a = v[1][l] * cosine - v[2][l] * sine;
                double b = v[1][l] * sine + v[2][l] * cosine;
                x[i] = (alone ? 0 : x[i]) - scale * a;
                y[i] = (alone ? 0 : y[i]) - scale * b;
                along[i] = (alone ? 0 : along[i]) - scale * v[3][l];
                doubt[i] = (alone ? 0 : doubt[i]) + scale * doubt(l, Math.abs(a) + Math.abs(b) + Math.abs(v[3][l]));
            }
        }
    }

    @Override
    public Green forPatch() {
        return new RoundGreen(cylinder, place, rho == 1, far, FEW, endless);
    }

    @Override
    public Green endless(Patch patch) {
        return cylinder.isTube() && patch.kernel().kind == Kernel.Kind.LINE ? new LineGreen(cylinder, place) : Green.super.endless(patch);
    }

    /**
     * Endless lines along the tube, without the direct one: ln (R² − 2 p·s + p² s²/R²), p and s across the axis; the image at the inverse place
     * (Jackson, Classical Electrodynamics, 3rd ed., 2.11 and problem 2.11).
     */
    private record LineGreen(Cylinder cylinder, double[] place) implements Green {
        @Override
        public void potential(double[][] s, int n, double[] out, double[] doubt) {
            for (int i = 0; i < n; i++) {
                out[i] = Math.log(inverse(s, i, new double[2]));
                doubt[i] = 1e-15;
            }
        }

        @Override
        public void field(double[][] s, int n, double[][] out, double[] doubt) {
            double[] e = new double[2];
            for (int i = 0; i < n; i++) {
                double d = inverse(s, i, e);
                out[cylinder.axis][i] = 0;
                out[(cylinder.axis + 1) % 3][i] = e[0] / d;
                out[(cylinder.axis + 2) % 3][i] = e[1] / d;
                doubt[i] = 1e-15 * (Math.abs(e[0]) + Math.abs(e[1])) / d;
            }
        }

        /** Argument of the logarithm, and minus its gradient. */
        private double inverse(double[][] s, int i, double[] e) {
            double[] centre = cylinder.centre;
            int first = (cylinder.axis + 1) % 3;
            int second = (cylinder.axis + 2) % 3;
            double px = place[first] - centre[first];
            double py = place[second] - centre[second];
            double sx = s[first][i] - centre[first];
            double sy = s[second][i] - centre[second];
            double square = cylinder.radius * cylinder.radius;
            double ratio = (sx * sx + sy * sy) / square;
            e[0] = 2 * (sx - px * ratio);
            e[1] = 2 * (sy - py * ratio);
            double turn = px * sy - py * sx;
            double along = square - px * sx - py * sy;
            return (along * along + turn * turn) / square;
        }
    }

    private double doubt(int l, double value) {
        return missing[l] + 3e-13 * Math.abs(value) + (far ? 0 : 3e-14);
    }

    private boolean isBeyond(int l) {
        return Math.abs(z - zS[l]) >= DiscModes.BEYOND;
    }

    /** Fills {@link #v} for sources from {@code first} on. */
    private void see(double[][] s, int first, int lanes, boolean slopes) {
        double[] x = s[(cylinder.axis + 1) % 3];
        double[] y = s[(cylinder.axis + 2) % 3];
        double centreX = cylinder.centre[(cylinder.axis + 1) % 3];
        double centreY = cylinder.centre[(cylinder.axis + 2) % 3];
        boolean anyNear = false;
        for (int l = 0; l < lanes; l++) {
            double a = (x[first + l] - centreX) / cylinder.radius;
            double b = (y[first + l] - centreY) / cylinder.radius;
            double r = Math.sqrt(a * a + b * b);
            rhoS[l] = Math.min(1, r);
            c1[l] = r > 0 ? (cosine * a + sine * b) / r : cosine;
            s1[l] = r > 0 ? (sine * a - cosine * b) / r : sine;
            zS[l] = along(s[cylinder.axis][first + l]);
            missing[l] = 0;
            for (double[] answer : v) {
                answer[l] = 0;
            }
            anyNear |= !isBeyond(l);
        }
        if (anyNear) {
            wall(lanes, slopes);
        }
        for (int l = 0; l < lanes; l++) {
            if (isBeyond(l)) {
                beyond(l, slopes);
            } else if (endless) {
                alternateCharges(l, slopes);
                if (far) {
                    charge(l, z, 1, 1, slopes);
                }
            }
        }
    }

    private void beyond(int l, boolean slopes) {
        for (double[] answer : v) {
            answer[l] = 0;
        }
        missing[l] = 0;
        byModes(l, slopes);
        if (!far) {
            charge(l, z, 1, -1, slopes);
            if (!endless) {
                charge(l, z > height / 2 ? 2 * height - z : -z, -1, 1, slopes);
            }
        }
    }

    // ---- the wall

    private void wall(int lanes, boolean slopes) {
        double largest = 0;
        for (int l = 0; l < lanes; l++) {
            largest = Math.max(largest, isBeyond(l) ? 0 : rhoS[l]);
        }
        double gap = 2 - rho - largest;
        double spread = -Math.log(Math.max(1e-300, rho * largest));
        double reach = Math.min(negligible / gap, Math.sqrt(1.2 * budget * step));   // terms in a quarter circle
        double unit = endless ? -2 / Math.PI * step : -4 / height;
        double[] shape = work[0];
        double[] slope = work[1];
        double[] decay = work[2];
        for (int j = 0; ; j++) {
            double k = (endless ? j + 0.5 : j + 1) * step;
            if (k > reach) {
                break;
            }
            int most = 3 + (int) Math.min(Math.sqrt(reach * reach - k * k), negligible / spread);
            for (int l = 0; l < lanes; l++) {
                decay[l] = Math.exp(-k * (1 - rhoS[l]));
                if (endless) {
                    shape[l] = unit * Math.cos(k * (z - zS[l]));
                    slope[l] = slopes ? -unit * k * Math.sin(k * (z - zS[l])) : 0;
                } else {
                    double other = unit * Math.sin(k * zS[l]);
                    shape[l] = Math.sin(k * z) * other;
                    slope[l] = slopes ? k * Math.cos(k * z) * other : 0;
                }
            }
            terms(k, row(j, k, most), most, k * largest, lanes, slopes);
        }
        for (int l = 0; l < lanes; l++) {
            double own = 2 - rho - rhoS[l];
            missing[l] = 2 * Math.exp(-reach * own) * (slopes ? (reach + 1 / own) / own : 1 / own);
        }
    }

    /** Σ_m for one k: the sources' I_m(kρ')/I_m(k) by its ratios, times the place's. */
    private void terms(double k, Row row, int most, double largest, int lanes, boolean slopes) {
        double[] x = work[3];
        double[] square = work[4];
        double[] here = work[5];
        double[] sum = work[6];
        int start = (int) Math.sqrt(most * (double) most + 75 * largest) + 12;
        if (q.length <= most) {
            q = new double[2 * most][LANES];
        }
        for (int l = 0; l < lanes; l++) {
            x[l] = k * rhoS[l];
            square[l] = x[l] * x[l];
            here[l] = 1 / (start + 0.5 + Math.sqrt((start + 1.5) * (start + 1.5) + square[l]));
            sum[l] = 0;
        }
        for (int m = start; m > 0; m--) {
            if (m <= most) {
                System.arraycopy(here, 0, q[m], 0, lanes);
            }
            double twice = 2 * m;
            for (int l = 0; l < lanes; l++) {
                sum[l] = x[l] * here[l] * (1 + sum[l]);
                here[l] = 1 / (twice + square[l] * here[l]);
            }
        }
        System.arraycopy(here, 0, q[0], 0, lanes);
        double[] b = work[7];
        double[] value = work[8];
        double[] radial = work[9];
        double[] turning = work[10];
        double[] c = work[11];
        double[] s = work[12];
        for (int l = 0; l < lanes; l++) {
            b[l] = work[2][l] * row.first / (1 + 2 * x[l] * here[l] * (1 + sum[l]));
            value[l] = b[l] * row.value[0];
            radial[l] = b[l] * row.radial[0];
            turning[l] = 0;
            c[l] = 1;
            s[l] = 0;
        }
        for (int m = 1; m <= most; m++) {
            double[] ratio = q[m - 1];
            double inverse = row.inverse[m - 1];
            double ownValue = row.value[m];
            double ownRadial = row.radial[m];
            double ownTurning = row.turning[m];
            for (int l = 0; l < lanes; l++) {
                b[l] *= rhoS[l] * ratio[l] * inverse;
                double next = c[l] * c1[l] - s[l] * s1[l];
                double turned = s[l] * c1[l] + c[l] * s1[l];
                c[l] = next;
                s[l] = turned;
                double twice = 2 * b[l];
                value[l] += twice * next * ownValue;
                radial[l] += twice * next * ownRadial;
                turning[l] -= twice * turned * ownTurning;
            }
        }
        for (int l = 0; l < lanes; l++) {
            v[0][l] += work[0][l] * value[l];
            v[1][l] += work[0][l] * radial[l];
            v[2][l] += work[0][l] * turning[l];
            v[3][l] += work[1][l] * value[l];
        }
    }

    /**
     * For one k and orders 0 to most: with A_m = I_m(kρ)/I_m(k) and P_m = I_m(k) K_m(k) the products A P, ∂A/∂ρ P and m A/ρ P, and
     * 1/q_m(k), q_m(x) = I_{m+1}(x)/(x I_m(x)); first = 1/(e^-k I_0(k)).
     */
    private Row row(int j, double k, int most) {
        if (rows.length <= j) {
            rows = java.util.Arrays.copyOf(rows, 2 * j);
        }
        if (rows[j] == null || rows[j].value.length <= most) {
            rows[j] = newRow(k, rows[j] == null ? most : Math.max(most, 3 * most / 2));
        }
        return rows[j];
    }

    private Row newRow(double k, int most) {
        double[] wall = new double[most + 2];
        double[] own = new double[most + 2];
        double atWall = ratios(k, wall);
        double atPlace = ratios(k * rho, own);
        double[] value = new double[most + 1];
        double[] radial = new double[most + 1];
        double[] turning = new double[most + 1];
        double[] inverse = new double[most + 1];
        double kappa = ScaledBessel.k1(k) / ScaledBessel.k0(k);
        double a = Math.exp(-k * (1 - rho)) * atPlace / atWall;
        double byRho = 0;
        for (int m = 0; m <= most; m++) {
            double product = 1 / (k * (kappa + k * wall[m]));
            value[m] = a * product;
            turning[m] = m * byRho * product;
            radial[m] = k * k * rho * own[m] * value[m] + turning[m];
            inverse[m] = 1 / wall[m];
            byRho = a * own[m] * inverse[m];
            a = rho * byRho;
            kappa = 2 * (m + 1) / k + 1 / kappa;
        }
        return new Row(value, radial, turning, inverse, 1 / atWall);
    }

    /** Fills q_0 … by downward recurrence; gives e^-x I_0(x), from 1 = e^-x (I_0 + 2 I_1 + 2 I_2 + …) (DLMF 10.35.5). */
    static double ratios(double x, double[] q) {
        int most = q.length - 1;
        int start = (int) Math.sqrt(most * (double) most + 75 * x) + 12;
        double square = x * x;
        double here = 1 / (start + 0.5 + Math.sqrt((start + 1.5) * (start + 1.5) + square));
        double sum = 0;
        for (int m = start; m >= 0; m--) {
            if (m <= most) {
                q[m] = here;
            }
            sum = x * here * (1 + sum);
            here = 1 / (2 * m + square * here);
        }
        return 1 / (1 + 2 * sum);
    }

    // ---- what the sum over k repeats along the axis

    /** Free potential of the charges at ±PERIOD, ±2 PERIOD, … with alternate sign, the direct one left out. */
    private void alternateCharges(int l, boolean slopes) {
        double square = rho * rho + rhoS[l] * rhoS[l] - 2 * rho * rhoS[l] * c1[l];
        double d = z - zS[l];
        double value = 0;
        double perSquare = 0;
        double axial = 0;
        for (int j = 0; j < ALTERNATE.length; j++) {
            double up = d + (j + 1) * PERIOD;
            double down = d - (j + 1) * PERIOD;
            double a = 1 / Math.sqrt(square + up * up);
            double b = 1 / Math.sqrt(square + down * down);
            value -= ALTERNATE[j] * (a + b);
            perSquare -= ALTERNATE[j] * (a * a * a + b * b * b);
            axial -= ALTERNATE[j] * (up * a * a * a + down * b * b * b);
        }
        v[0][l] += value;
        if (slopes) {
            v[1][l] -= perSquare * (rho - rhoS[l] * c1[l]);
            v[2][l] -= perSquare * rhoS[l] * s1[l];
            v[3][l] -= axial;
        }
    }

    /** Weights c_j with Σ (−1)^j a_j ≈ Σ c_j a_j: Cohen, Rodriguez Villegas and Zagier 2000, algorithm 1. */
    private static double[] alternate(int n) {
        double d = Math.pow(3 + Math.sqrt(8), n);
        d = (d + 1 / d) / 2;
        double b = -1;
        double c = -d;
        double[] weight = new double[n];
        for (int k = 0; k < n; k++) {
            c = b - c;
            weight[k] = c / d;
            b = (k + n) * (double) (k - n) * b / ((k + 0.5) * (k + 1));
        }
        return weight;
    }

    // ---- far along the axis

    private void byModes(int l, boolean slopes) {
        if (modes[0] == null) {
            seeModes();
        }
        double low = Math.min(z, zS[l]);
        double high = Math.max(z, zS[l]);
        double d = high - low;
        double sign = z > zS[l] ? -1 : 1;
        double c = 1;
        double s = 0;
        int order = 0;
        for (int i = 0; i < DiscModes.ZERO.length; i++) {
            while (order < DiscModes.ORDER[i]) {
                double next = c * c1[l] - s * s1[l];
                s = s * c1[l] + c * s1[l];
                c = next;
                order++;
            }
            double x = DiscModes.ZERO[i];
            if ((x - DiscModes.ZERO[0]) * d > NEGLIGIBLE + 6) {
                continue;
            }
            double fall = Math.exp(-x * d) / x;
            double slope = sign * x * fall;
            if (!endless) {
                double lower = -Math.expm1(-2 * x * low);
                double upper = -Math.expm1(-2 * x * (height - high));
                double whole = -Math.expm1(-2 * x * height);
                slope *= (z > zS[l] ? lower * (2 - upper) : upper * (2 - lower)) / whole;
                fall *= lower * upper / whole;
            }
            double j = DiscModes.j(order, x * rhoS[l]);
            v[0][l] += j * fall * modes[0][i] * c;
            if (slopes) {
                v[1][l] += j * fall * modes[1][i] * c;
                v[2][l] -= j * fall * modes[2][i] * s;
                v[3][l] += j * slope * modes[0][i] * c;
            }
        }
    }

    private void seeModes() {
        int n = DiscModes.ZERO.length;
        for (int k = 0; k < 3; k++) {
            modes[k] = new double[n];
        }
        for (int i = 0; i < n; i++) {
            int m = DiscModes.ORDER[i];
            double x = DiscModes.ZERO[i];
            double here = DiscModes.j(m, x * rho);
            double next = DiscModes.j(m + 1, x * rho);
            double before = m == 0 ? -next : DiscModes.j(m - 1, x * rho);
            modes[0][i] = rho == 1 ? 0 : DiscModes.FACTOR[i] * here;
            modes[1][i] = DiscModes.FACTOR[i] * x * (before - next) / 2;
            modes[2][i] = rho == 1 ? 0 : DiscModes.FACTOR[i] * x * (before + next) / 2;   // m J_m(xρ)/ρ
        }
    }

    /** One charge as it is, the place at {@code at} along the axis, which moves with the place's z or ({@code flip} = −1) against it. */
    private void charge(int l, double at, double flip, double factor, boolean slopes) {
        double d = at - zS[l];
        double inverse = 1 / Math.sqrt(rho * rho + rhoS[l] * rhoS[l] - 2 * rho * rhoS[l] * c1[l] + d * d);
        v[0][l] += factor * inverse;
        if (slopes) {
            double cube = factor * inverse * inverse * inverse;
            v[1][l] -= cube * (rho - rhoS[l] * c1[l]);
            v[2][l] -= cube * rhoS[l] * s1[l];
            v[3][l] -= cube * flip * d;
        }
    }
}
