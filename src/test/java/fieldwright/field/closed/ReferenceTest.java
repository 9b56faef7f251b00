package fieldwright.field.closed;

import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.BufferedReader;
import java.io.IOException;
import java.io.InputStreamReader;
import java.nio.charset.StandardCharsets;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/**
 * Every form against high-precision values from gaps of 1e-9 to distances of 1e8 sizes. In every row the true error must
 * be at most the larger of 1e-12 and 8 eps size/gap, relative to the larger of |E| and |V|/distance scale (E vanishes in places)
 * and to the larger of |V| and |E| gap (so does V), and at most the stated bound. The gap is that to the nearest edge, rim or line; a
 * thin body has no gap wider than its thickness.
 */
class ReferenceTest {
    private static final double EPS = Math.ulp(1.0);

    private record Row(String text, double[] parameters, double[] place, double gap, double[] field, double v) {
        static Row of(String line) {
            String[] cells = line.split(",");
            double[] p = Arrays.stream(cells[0].split(" ")).mapToDouble(Double::parseDouble).toArray();
            double[] n = Arrays.stream(cells).skip(1).mapToDouble(Double::parseDouble).toArray();
            return new Row(line, p, Arrays.copyOf(n, 3), n[3], Arrays.copyOfRange(n, 4, 7), n[7]);
        }
    }

    /**
     * The second column is the widest stated bound allowed, in units of the allowed error: a bound that says nothing would
     * pass otherwise.
     */
    @ParameterizedTest(name = "{0}")
    @CsvSource({"rod, 1", "polygon, 8", "box, 16", "ring, 4", "disc, 4", "tube, 4", "cylinder, 8", "strip, 4", "halfLine, 4", "shell, 2", "ball, 2"})
    void agreesWithHighPrecision(String name, double widest) throws IOException {
        List<Row> rows = read(name);
        assertTrue(rows.size() >= 100, () -> "only " + rows.size() + " rows");
        List<String> wrong = new ArrayList<>();
        double worst = 0;
        double tightest = 0;
        double loosest = 0;
        for (Row row : rows) {
            ClosedForm form = form(name, row.parameters);
            Closed found = form.at(row.place[0], row.place[1], row.place[2]);
            double scale = Math.max(form.reach(), length(row.place));
            double allowed = Math.max(1e-12, 8 * EPS * scale / Math.min(row.gap, thickness(form)));
            boolean sided = found.status() == Closed.Status.ON_SURFACE;
            double fieldLength = Math.max(length(row.field), Math.abs(row.v) / scale);
            double[] error = {found.ex() - row.field[0], found.ey() - row.field[1], sided ? 0 : found.ez() - row.field[2]};
            double errE = length(error);
            double errV = Math.abs(found.v() - row.v);
            double vScale = Math.max(Math.abs(row.v), fieldLength * row.gap);
            boolean good = errE <= found.errE() && errV <= found.errV() && errE <= allowed * fieldLength && errV <= allowed * vScale
                    && found.errE() <= widest * allowed * fieldLength + insideMatter(form, scale) && found.errV() <= widest * allowed * vScale;
            if (!good) {
                wrong.add(String.format(Locale.ROOT, "%s%n  E error %.1e, stated %.1e, allowed %.1e; V error %.1e, stated %.1e, allowed %.1e %s",
                        row.text, errE, found.errE(), allowed * fieldLength, errV, found.errV(), allowed * vScale, found.status()));
            }
            worst = Math.max(worst, Math.max(errE / fieldLength / allowed, errV / vScale / allowed));
            tightest = Math.max(tightest, Math.max(errE / Math.max(found.errE(), Double.MIN_NORMAL), errV / found.errV()));
            loosest = Math.max(loosest, Math.max(found.errE() / fieldLength / allowed, found.errV() / vScale / allowed));
        }
        System.out.printf(Locale.ROOT, "%s: %d rows, worst error/allowed %.2g, worst error/stated %.2g, widest stated/allowed %.2g%n",
                name, rows.size(), worst, tightest, loosest);
        assertTrue(wrong.isEmpty(), () -> wrong.size() + " of " + rows.size() + " rows:\n"
                + String.join("\n", wrong.subList(0, Math.min(12, wrong.size()))));
    }

    /** On corners, edges, faces and axes, where the fields of volumes are finite: within 1e-13 and the stated bound. */
    @ParameterizedTest(name = "{0}")
    @CsvSource({"box", "cylinder"})
    void holdsOnTheBodyItself(String name) throws IOException {
        List<Row> rows = read(name + "On");
        assertTrue(rows.size() >= 16, () -> "only " + rows.size() + " rows");
        for (Row row : rows) {
            Closed found = form(name, row.parameters).at(row.place[0], row.place[1], row.place[2]);
            double errE = length(new double[] {found.ex() - row.field[0], found.ey() - row.field[1], found.ez() - row.field[2]});
            double errV = Math.abs(found.v() - row.v);
            double size = Math.max(length(row.field), Math.abs(row.v) / 2);
            assertTrue(errE <= Math.min(found.errE(), 1e-13 * size), () -> row.text + ": E error " + errE + ", stated " + found.errE());
            assertTrue(errV <= Math.min(found.errV(), 1e-13 * size), () -> row.text + ": V error " + errV + ", stated " + found.errV());
            assertTrue(found.errE() <= 1e-11 * size && found.errV() <= 1e-11 * size, () -> row.text + ": stated " + found);
        }
    }

    /**
     * Random bodies, aspect ratios to 1e4, also off the origin (the last columns of the report are measured values): the stated bound
     * holds in every row, says something (for an exact place its median is
     * at most 100 times the true error), and is good enough for a relative 1e-9, or for
     * what the rounding of the place leaves, in at least the given share of the rows. (Polygons miss it at narrow tips, where the
     * bound does not see how far the pulls of two close sides cancel.)
     */
    @ParameterizedTest(name = "{0}")
    @CsvSource({"rod, 0.99", "polygon, 0.93", "box, 0.97", "ring, 0.99", "disc, 0.99"})
    void boundHoldsForRandomBodies(String name, double share) throws IOException {
        List<Row> rows = read(name + "Random");
        List<String> wrong = new ArrayList<>();
        List<Double> looseness = new ArrayList<>();
        int useful = 0;
        for (Row row : rows) {
            ClosedForm form = form(name, row.parameters);
            Closed found = form.at(row.place[0], row.place[1], row.place[2]);
            double scale = Math.max(form.reach(), length(row.place));
            double asked = Math.max(1e-9, 8 * EPS * scale / Math.min(row.gap, thickness(form)));
            double errE = length(new double[] {found.ex() - row.field[0], found.ey() - row.field[1], found.ez() - row.field[2]});
            double errV = Math.abs(found.v() - row.v);
            boolean regular = found.status() == Closed.Status.REGULAR;
            if (regular && !(errE <= found.errE() && errV <= found.errV())) {
                wrong.add(String.format(Locale.ROOT, "%s%n  E error %.1e, stated %.1e; V error %.1e, stated %.1e", row.text, errE,
                        found.errE(), errV, found.errV()));
            }
            double size = Math.max(length(row.field), Math.abs(row.v) / scale);
            useful += found.errE() <= asked * size && found.errV() <= asked * Math.max(Math.abs(row.v), size * row.gap) ? 1 : 0;
            double errorIfPlaceIsExact = form.at(row.place[0], row.place[1], row.place[2], 0).errE();
            looseness.add(errorIfPlaceIsExact / Math.max(errE, EPS / 2 * length(row.field)));
        }
        looseness.sort(null);
        double median = looseness.get(looseness.size() / 2);
        double found = useful / (double) rows.size();
        System.out.printf(Locale.ROOT, "%s random: %d rows, stated/true median %.3g, good for 1e-9 in %.4f%n", name, rows.size(), median, found);
        assertTrue(wrong.isEmpty(), () -> wrong.size() + " of " + rows.size() + " rows:\n"
                + String.join("\n", wrong.subList(0, Math.min(12, wrong.size()))));
        assertTrue(median <= 100, () -> "stated error is " + median + " times the true one in the median");
        assertTrue(found >= share, () -> "good for 1e-9 in " + found);
    }

    /** What the rounding of the place does inside a charged volume, where E may vanish but its gradient does not. */
    private static double insideMatter(ClosedForm form, double scale) {
        return form instanceof Box b ? 16 * Math.PI * EPS * scale * Math.abs(b.density()) : 0;
    }

    private static double thickness(ClosedForm form) {
        if (form instanceof Box b) {
            return Math.min(b.x2() - b.x1(), Math.min(b.y2() - b.y1(), b.z2() - b.z1()));
        }
        if (form instanceof Cylinder c) {
            return c.z2() - c.z1();
        }
        return form instanceof Ball b ? b.outer() - b.inner() : Double.POSITIVE_INFINITY;
    }

    static ClosedForm form(String name, double[] p) {
        switch (name) {
            case "rod":
                return new Rod(p[0], p[1], p[2], p[3]);
            case "polygon":
                int n = (int) p[0];
                return new Polygon(Arrays.copyOfRange(p, 1, 1 + n), Arrays.copyOfRange(p, 1 + n, 1 + 2 * n), p[1 + 2 * n], p[2 + 2 * n],
                        p[3 + 2 * n]);
            case "box":
                return new Box(p[0], p[1], p[2], p[3], p[4], p[5], p[6], p[7], p[8], p[9]);
            case "ring":
                return new Ring(p[0], p[1]);
            case "disc":
                return new Disc(p[0], p[1]);
            case "tube":
                return new Tube(p[0], p[1], p[2], p[3]);
            case "cylinder":
                return new Cylinder(p[0], p[1], p[2], p[3]);
            case "strip":
                return new Strip(p[0], p[1], p[2]);
            case "halfLine":
                return new HalfEndlessLine(p[0]);
            case "shell":
                return new SphericalShell(p[0], p[1]);
            case "ball":
                return new Ball(p[0], p[1], p[2]);
            default:
                throw new IllegalArgumentException(name);
        }
    }

    private static List<Row> read(String name) throws IOException {
        List<Row> rows = new ArrayList<>();
        try (BufferedReader in = new BufferedReader(
                new InputStreamReader(ReferenceTest.class.getResourceAsStream(name + ".csv"), StandardCharsets.UTF_8))) {
            in.lines().filter(line -> !line.startsWith("#") && !line.startsWith("parameters")).map(Row::of).forEach(rows::add);
        }
        return rows;
    }

    private static double length(double[] v) {
        return Math.sqrt(v[0] * v[0] + v[1] * v[1] + v[2] * v[2]);
    }
}
