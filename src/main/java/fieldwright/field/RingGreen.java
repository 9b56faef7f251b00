package fieldwright.field;

import java.util.ArrayList;
import java.util.List;

/**
 * What the round wall of a grounded cylinder adds for charge that is the same all round its axis: the term m = 0 of
 * {@link RoundGreen} alone, so that rows of rings close to the wall, and on it, are within reach.
 *
 * <p>Near the wall the place's image, at 2R − ρ with strength −f, f = √((2R − ρ)/ρ), is seen as one more probe. It cancels the leading part
 * of I_0(kρ) I_0(kρ') K_0(k)/I_0(k) for large k (DLMF 10.40); what is left grows but as ln of the distance, in the field, and is summed up
 * to k = min(34/(2 − ρ − ρ'), {@value #MOST} terms). The part left out beyond is the doubt; it counts within 1e-4 R of the wall only.
 */
final class RingGreen implements Green {
    private static final double NEGLIGIBLE = 34;
    private static final int MOST = 60_000;
    private static final int FRESH = 32;

    private final RoundGreen.Cylinder cylinder;
    private final boolean endless;
    private final double rho;
    private final double cosine;
    private final double sine;
    private final double z;
    private final double step;
    private final double unit;
    private final double f;
    private final double fSlope;
    /** Per k: e^k (I_0 K_0/I_0 − f K_0) and its derivative by ρ; sine and cosine of kz in a drum. */
    private final List<double[]> rows = new ArrayList<>();
    private final double[] v = new double[3];
    private double missing;

    /** Everything for one place: probes, a smooth part, and the wall's part for charge that is the same all round. */
    record Parts(List<Probe> probes, Green green, Green wall) { }

    private RingGreen(RoundGreen.Cylinder c, double rho, double cosine, double sine, double z, double f, double fSlope, double period) {
        cylinder = c;
        endless = c.isTube();
        this.rho = rho;
        this.cosine = cosine;
        this.sine = sine;
        this.z = z;
        this.f = f;
        this.fSlope = fSlope;
        step = endless ? 2 * Math.PI / period : Math.PI / c.height();
        unit = endless ? -2 / Math.PI * step : -4 / c.height();
    }

    static Parts parts(RoundGreen.Cylinder c, double[] place, boolean onWall, Ball source) {
        int first = (c.axis() + 1) % 3;
        int second = (c.axis() + 2) % 3;
        double a = (place[first] - c.centre()[first]) / c.radius();
        double b = (place[second] - c.centre()[second]) / c.radius();
        double r = Math.sqrt(a * a + b * b);
        double cosine = r > 0 ? a / r : 1;
        double sine = r > 0 ? b / r : 0;
        double rho = onWall ? 1 : r;
        double z = (place[c.axis()] - (c.isTube() ? 0 : c.from())) / c.radius();
        double f = rho > 0.5 ? Math.sqrt((2 - rho) / rho) : 0;
        double slope = rho > 0.5 ? -1 / (rho * rho * f) : 0;
        double period = 17 + (Math.abs(place[c.axis()] - source.centre()[c.axis()]) + source.radius()) / c.radius();
        List<Probe> probes = new ArrayList<>(List.of(Probe.direct(place[0], place[1], place[2])));
        Green green = others(c, place, period);
        if (f > 0) {
            Probe image = image(c, place, rho, cosine, sine, f, slope);
            probes.add(image);
            green = new Sum(green, new Through(others(c, image.place(), period), image));
        }
        if (!c.isTube()) {
            boolean upper = place[c.axis()] - c.from() > (c.to() - c.from()) / 2;
            for (Probe probe : List.copyOf(probes)) {
                probes.add(mirrored(probe, c.axis(), upper ? c.to() : c.from()));
            }
        }
        return new Parts(probes, green, new RingGreen(c, rho, cosine, sine, z, f, slope, period));
    }

    /** Images along the axis without the nearest: in the ends, or those a sum over k stands for. */
    private static Green others(RoundGreen.Cylinder c, double[] place, double period) {
        if (c.isTube()) {
            return new AlternateGreen(place, c.axis(), period * c.radius());
        }
        double[] low = new double[3];
        double[] length = {Double.POSITIVE_INFINITY, Double.POSITIVE_INFINITY, Double.POSITIVE_INFINITY};
        low[c.axis()] = c.from();
        length[c.axis()] = c.to() - c.from();
        return new WalledGreen(place, low, length, false);
    }

    /** V = −f V₀(p*), p* mirrored in the wall along the radius. */
    private static Probe image(RoundGreen.Cylinder c, double[] place, double rho, double cosine, double sine, double f, double slope) {
        int[] across = {(c.axis() + 1) % 3, (c.axis() + 2) % 3};
        double[] radial = new double[3];
        radial[across[0]] = cosine;
        radial[across[1]] = sine;
        double[] q = place.clone();
        if (rho < 1) {
            for (int k : across) {
                q[k] = c.centre()[k] + c.radius() * (2 - rho) * radial[k];
            }
        }
        double round = (2 - rho) / rho;
        double[] a = new double[9];
        double[] b = new double[3];
        for (int i = 0; i < 3; i++) {
            for (int j = 0; j < 3; j++) {
                double alike = i == j ? 1 : 0;
                double axial = i == c.axis() && j == c.axis() ? 1 : 0;
                a[3 * i + j] = -f * (axial + round * (alike - axial - radial[i] * radial[j]) - radial[i] * radial[j]);
            }
            b[i] = slope / c.radius() * radial[i];
        }
        return new Probe(q, a, b, -f);
    }

    /** The same seen from the place mirrored in an end. */
    private static Probe mirrored(Probe probe, int axis, double end) {
        double[] q = probe.place().clone();
        q[axis] = q[axis] == end ? end : 2 * end - q[axis];
        double[] a = probe.a().clone();
        double[] b = probe.b() == null ? null : probe.b().clone();
        for (int i = 0; i < 3; i++) {
            for (int j = 0; j < 3; j++) {
                // V = −V₁(M p), E = −M E₁(M p)
                a[3 * i + j] *= j == axis ? 1 : -1;
            }
            if (b != null) {
                b[i] = -b[i];
            }
        }
        return new Probe(q, a, b, -probe.c());
    }

    @Override
    public boolean isSmooth() {
        return rho < 0.9;
    }

    @Override
    public void potential(double[][] s, int n, double[] out, double[] doubt) {
        for (int i = 0; i < n; i++) {
            at(s, i, false);
            out[i] = v[0] / cylinder.radius();
            doubt[i] = (missing + 1e-14) / cylinder.radius();
        }
    }

    @Override
    public void field(double[][] s, int n, double[][] out, double[] doubt) {
        double scale = 1 / (cylinder.radius() * cylinder.radius());
        for (int i = 0; i < n; i++) {
            at(s, i, true);
            out[(cylinder.axis() + 1) % 3][i] = -scale * v[1] * cosine;
            out[(cylinder.axis() + 2) % 3][i] = -scale * v[1] * sine;
            out[cylinder.axis()][i] = -scale * v[2];
            doubt[i] = scale * (missing + 1e-14 + 1e-13 * (Math.abs(v[1]) + Math.abs(v[2])));
        }
    }

    /** Fills v: the sum and its derivatives by ρ and z. */
    private void at(double[][] s, int i, boolean slopes) {
        double ringRho = Math.min(1, cylinder.distance(new double[] {s[0][i], s[1][i], s[2][i]}) / cylinder.radius());
        double ringZ = (s[cylinder.axis()][i] - (endless ? 0 : cylinder.from())) / cylinder.radius();
        double gap = 2 - rho - ringRho;
        int terms = (int) Math.min(MOST, NEGLIGIBLE / gap / step + 2);
        double value = 0;
        double radial = 0;
        double axial = 0;
        double angle = step * (endless ? z - ringZ : ringZ);
        double fall = Math.exp(-step * (1 - ringRho));
        double turnC = Math.cos(angle);
        double turnS = Math.sin(angle);
        double decay = 0;
        double c = 0;
        double w = 0;
        for (int j = 0; j < terms; j++) {
            double k = k(j);
            double[] row = row(j);
            if (j % FRESH == 0) {
                double phase = (endless ? j + 0.5 : j + 1) * angle;
                decay = Math.exp(-k * (1 - ringRho));
                c = Math.cos(phase);
                w = Math.sin(phase);
            }
            double b = decay * ScaledBessel.i0(k * ringRho);
            double shape = endless ? c : row[2] * w;
            value += b * shape * row[0];
            if (slopes) {
                radial += b * shape * row[1];
                axial += b * k * row[0] * (endless ? -w : row[3] * w);
            }
            decay *= fall;
            double next = c * turnC - w * turnS;
            w = w * turnC + c * turnS;
            c = next;
        }
        v[0] = unit * value;
        v[1] = unit * radial;
        v[2] = unit * axial;
        double last = k(terms);
        double left = Math.exp(-last * gap);
        missing = f > 0 ? left * (slopes ? Math.log1p(1 / (last * gap)) : 1 / last) : left * (slopes ? 1 : 1 / last) / gap;
    }

    private double k(int j) {
        return (endless ? j + 0.5 : j + 1) * step;
    }

    private double[] row(int j) {
        while (rows.size() <= j) {
            double k = k(rows.size());
            double decay = Math.exp(-k * (1 - rho));
            double ratio = ScaledBessel.k0(k) / ScaledBessel.i0(k);
            double image = f > 0 ? ScaledBessel.k0(k * (2 - rho)) : 0;
            double slope = f > 0 ? k * ScaledBessel.k1(k * (2 - rho)) : 0;
            rows.add(new double[] {decay * (ScaledBessel.i0(k * rho) * ratio - f * image),
                decay * (k * ScaledBessel.i1(k * rho) * ratio - fSlope * image - f * slope), Math.sin(k * z), Math.cos(k * z)});
        }
        return rows.get(j);
    }

    /** One Green function through the matrix of a probe at whose place it is taken. */
    private record Through(Green green, Probe probe) implements Green {
        @Override
        public void potential(double[][] s, int n, double[] out, double[] doubt) {
            green.potential(s, n, out, doubt);
            for (int i = 0; i < n; i++) {
                out[i] *= probe.c();
                doubt[i] *= Math.abs(probe.c());
            }
        }

        @Override
        public void field(double[][] s, int n, double[][] out, double[] doubt) {
            double[] v = new double[n];
            double[] more = new double[n];
            green.potential(s, n, v, more);
            green.field(s, n, out, doubt);
            double size = 0;
            for (double a : probe.a()) {
                size = Math.max(size, Math.abs(a));
            }
            double push = Math.abs(probe.b()[0]) + Math.abs(probe.b()[1]) + Math.abs(probe.b()[2]);
            for (int i = 0; i < n; i++) {
                double x = out[0][i];
                double y = out[1][i];
                double z = out[2][i];
                for (int k = 0; k < 3; k++) {
                    out[k][i] = probe.a()[3 * k] * x + probe.a()[3 * k + 1] * y + probe.a()[3 * k + 2] * z + probe.b()[k] * v[i];
                }
                doubt[i] = 2 * size * doubt[i] + push * more[i];
            }
        }
    }

    private record Sum(Green first, Green second) implements Green {
        @Override
        public void potential(double[][] s, int n, double[] out, double[] doubt) {
            double[] other = new double[n];
            double[] more = new double[n];
            first.potential(s, n, out, doubt);
            second.potential(s, n, other, more);
            for (int i = 0; i < n; i++) {
                out[i] += other[i];
                doubt[i] += more[i];
            }
        }

        @Override
        public void field(double[][] s, int n, double[][] out, double[] doubt) {
            double[][] other = new double[3][n];
            double[] more = new double[n];
            first.field(s, n, out, doubt);
            second.field(s, n, other, more);
            for (int i = 0; i < n; i++) {
                for (int k = 0; k < 3; k++) {
                    out[k][i] += other[k][i];
                }
                doubt[i] += more[i];
            }
        }
    }

    /** Charges of alternate sign at ± one, two, … periods along an axis. */
    private record AlternateGreen(double[] place, int axis, double period) implements Green {
        @Override
        public void potential(double[][] s, int n, double[] out, double[] doubt) {
            for (int i = 0; i < n; i++) {
                out[i] = at(s, i, null);
                doubt[i] = 1e-15 / period;
            }
        }

        @Override
        public void field(double[][] s, int n, double[][] out, double[] doubt) {
            double[] e = new double[3];
            for (int i = 0; i < n; i++) {
                at(s, i, e);
                for (int k = 0; k < 3; k++) {
                    out[k][i] = e[k];
                }
                doubt[i] = 1e-15 / (period * period);
            }
        }

        private double at(double[][] s, int i, double[] e) {
            double sum = 0;
            double[] d = {place[0] - s[0][i], place[1] - s[1][i], place[2] - s[2][i]};
            double along = d[axis];
            if (e != null) {
                java.util.Arrays.fill(e, 0);
            }
            for (int j = 0; j < RoundGreen.ALTERNATE.length; j++) {
                for (int side = -1; side <= 1; side += 2) {
                    d[axis] = along + side * (j + 1) * period;
                    double inverse = 1 / Math.sqrt(d[0] * d[0] + d[1] * d[1] + d[2] * d[2]);
                    double w = -RoundGreen.ALTERNATE[j] * inverse;
                    sum += w;
                    for (int k = 0; e != null && k < 3; k++) {
                        e[k] += w * inverse * inverse * d[k];
                    }
                }
            }
            return sum;
        }
    }
}
