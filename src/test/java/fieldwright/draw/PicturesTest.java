package fieldwright.draw;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.output.Axis;
import fieldwright.output.Output;
import fieldwright.output.Series;
import java.awt.image.BufferedImage;
import java.util.Arrays;
import java.util.List;
import java.util.function.DoubleUnaryOperator;
import java.util.stream.IntStream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import org.junit.jupiter.params.provider.ValueSource;

class PicturesTest {
    private static Series curve(String label, int n, double to, DoubleUnaryOperator f) {
        double[] x = IntStream.range(0, n).mapToDouble(i -> to * i / (n - 1)).toArray();
        return new Series(label, x, Arrays.stream(x).map(f).toArray(), null);
    }

    private static Output.Plot plot(String yUnit, Series... series) {
        return new Output.Plot("", new Axis("height on the axis, z", "m"), new Axis("|E|", yUnit), List.of(series), List.of());
    }

    static List<Output.Plot> plots() {
        return List.of(
                plot("V/m", curve("", 60, 4, z -> 2e4 * z * z)),
                plot("V/m", curve("centre", 9, 4e-3, z -> -1e5 / (1 + 900 * z)), curve("edge", 60, 4e-3, z -> 1e4 * z)),
                plot("C", curve("pico", 30, 1e-9, z -> 1e-1 * z)),
                plot("V/m", curve("narrow", 30, 1, z -> 276969 + 1e-3 * z)),
                plot("V/m", curve("constant", 30, 1, z -> 7)),
                plot("V/m", curve("zero", 30, 1, z -> 0)),
                plot("V/m", curve("wire", 30, 1, z -> 1 / z)),
                plot("V/m", curve("gap", 30, 1, z -> z > 0.4 && z < 0.6 ? Double.NaN : z)),
                plot("V/m", curve("no number", 5, 1, z -> Double.NaN)),
                plot("V/m", curve("same", 5, 1, z -> z), curve("same", 5, 1, z -> 2 * z)),
                plot("m^3", curve("huge", 5, 1, z -> 1e300 * z)),
                plot("", new Series("one point", new double[] {2}, new double[] {3}, new double[] {0.5})),
                plot("V/m"));
    }

    @ParameterizedTest
    @MethodSource("plots")
    void everyPlotIsPainted(Output.Plot plot) {
        assertTrue(inked(new Curves(plot, 460, 230).image(1)) > 400, () -> "ink of " + plot);
    }

    @Test
    void headingsNameThePrefixAndThePointsFollowIt() {
        Curves curves = new Curves(plot("V/m", curve("", 5, 4, z -> 5e4 * z)), 460, 230);
        assertEquals("height on the axis, z / m", curves.xHeading());
        assertEquals("|E| / (kV/m)", curves.yHeading());
        assertEquals(200.0, curves.drawn().get(0).y()[4], 1e-12);
        Curves pico = new Curves(plot("C", curve("", 5, 4, z -> 3e-12 * z)), 460, 230);
        assertEquals("|E| / pC", pico.yHeading());
        assertEquals(12.0, pico.drawn().get(0).y()[4], 1e-12);
    }

    @Test
    void whereNoPrefixFitsThePowerOfTenStandsInTheHeading() {
        Curves curves = new Curves(plot("m^3", curve("", 5, 1, z -> 4e-12 * z)), 460, 230);
        assertEquals("|E| / (10⁻¹² m³)", curves.yHeading());
        assertEquals(4.0, curves.drawn().get(0).y()[4], 1e-12);
    }

    @Test
    void aSmallSpreadOnALargeValueIsDrawnFromAnOffsetThatIsNamed() {
        Curves curves = new Curves(plot("V/m", curve("", 5, 1, z -> 276969 + 0.5 * z)), 460, 230);
        assertEquals("(|E| − 276.969\u00a0kV/m) / (mV/m)", curves.yHeading());
        assertEquals(500.0, curves.drawn().get(0).y()[4], 1e-6);
    }

    @Test
    void infinitePointsAreLeftOutAndTheRemarkSaysWhich() {
        Curves curves = new Curves(plot("V/m", curve("wire", 5, 1, z -> 1 / z)), 460, 230);
        assertEquals(List.of("wire: left out, infinite: at height on the axis, z = 0 m."), curves.remarks());
        assertTrue(Double.isNaN(curves.drawn().get(0).y()[0]));
        assertEquals(4.0, curves.drawn().get(0).y()[1], 1e-12);
    }

    @Test
    void gapsThatThePlotDoesNotExplainAreCounted() {
        Curves curves = new Curves(plot("V/m", curve("g", 5, 1, z -> z == 0.5 ? Double.NaN : z)), 460, 230);
        assertEquals(List.of("gaps: 1 points have no number."), curves.remarks());
    }

    @Test
    void curvesDifferWithoutTheirColours() {
        BufferedImage image = new Curves(plot("V/m", curve("a", 60, 1, z -> 1), curve("b", 60, 1, z -> 2)), 460, 230).image(1);
        assertTrue(longestRun(image, Ink.ACCENT) > 300, "the first curve is drawn through");
        assertTrue(longestRun(image, Ink.BAD) > 5 && longestRun(image, Ink.BAD) < 30, "the second is dashed");
    }

    /** Most pixels of a colour side by side in one row. */
    private static int longestRun(BufferedImage image, java.awt.Color colour) {
        int longest = 0;
        for (int y = 0; y < image.getHeight(); y++) {
            int run = 0;
            for (int x = 0; x < image.getWidth(); x++) {
                java.awt.Color c = new java.awt.Color(image.getRGB(x, y));
                int off = Math.abs(c.getRed() - colour.getRed()) + Math.abs(c.getGreen() - colour.getGreen())
                        + Math.abs(c.getBlue() - colour.getBlue());
                run = off < 90 ? run + 1 : 0;
                longest = Math.max(longest, run);
            }
        }
        return longest;
    }

    @Test
    void theLegendStandsWhereThereIsMoreThanOneCurve() {
        Series a = curve("a", 5, 1, z -> z);
        assertTrue(longestRun(lowest(new Curves(plot("V/m", a), 460, 230)), Ink.ACCENT) < 10);
        assertTrue(longestRun(lowest(new Curves(plot("V/m", a, curve("b", 5, 1, z -> 2 * z)), 460, 230)), Ink.ACCENT) >= 25);
        Series[] many = IntStream.range(0, 12).mapToObj(i -> curve("curve with a long name " + i, 5, 1, z -> i * z)).toArray(Series[]::new);
        assertTrue(inked(new Curves(plot("V/m", many), 300, 260).image(1)) > 400, "a legend of many lines leaves room for the chart");
    }

    private static BufferedImage lowest(Curves curves) {
        BufferedImage image = curves.image(1);
        return image.getSubimage(0, image.getHeight() - 20, image.getWidth(), 20);
    }

    @ParameterizedTest
    @ValueSource(strings = {"R_{s}", "\\rho_{0}\\,\\left(1-k\\,\\left(\\frac{\\rho}{R_{s}}\\right)^{2}\\right)",
        "Q=\\int_{0}^{H}\\int_{0}^{R_{s}}\\rho\\,\\mathrm{d}\\rho\\,\\mathrm{d}z",
        "f=\\begin{cases}a & \\rho<a\\\\ b & \\text{otherwise}\\end{cases}", "E_{\\mathrm{roof}}=276.97\\ \\mathrm{kV/m}"})
    void everyFormulaIsPainted(String latex) {
        Mathematics formula = Mathematics.of(latex, latex, 18, 500);
        assertTrue(formula.readable());
        assertTrue(inked(formula.image(2)) > 60);
        assertTrue(formula.baseline() > 0 && formula.baseline() <= formula.height());
    }

    @Test
    void aFormulaWiderThanItsColumnIsBrokenBeforeItsRelations() {
        String latex = "Q = \\int_{0}^{H} \\left(1 - k\\right) \\mathrm{d}z = \\pi R^{2} H \\left(1 - \\frac{k}{2}\\right) = abcdefgh";
        Mathematics wide = Mathematics.of(latex, latex, 18, 1000);
        Mathematics narrow = Mathematics.of(latex, latex, 18, 220);
        assertEquals(1, wide.lineCount());
        assertEquals(3, narrow.lineCount());
        assertTrue(narrow.width() <= 220 && narrow.height() > 2 * wide.height());
    }

    @Test
    void aSumIsBrokenOnlyOutsideItsBrackets() {
        List<Breaks.Part> parts = Breaks.parts("a=-b+\\left(c-d\\right)-\\frac{e+f}{g}+h(i+j)");
        assertEquals(List.of("a", "=-b", "+\\left(c-d\\right)", "-\\frac{e+f}{g}", "+h(i+j)"), parts.stream().map(Breaks.Part::latex).toList());
    }

    @Test
    void whatCannotBeBrokenIsScaledDown() {
        String latex = "\\frac{abcdefghijklmnopqrstuvwxyz}{abcdefghijklmnopqrstuvwxyz}";
        double natural = Mathematics.of(latex, latex, 18, 1e6).width();
        assertEquals(0.7 * natural, Mathematics.of(latex, latex, 18, 0.7 * natural).width(), 0.01);
    }

    @Test
    void whatIsNotLatexStandsAsItsPlainText() {
        Mathematics broken = Mathematics.of("\\frac{a", "a/b", 18, 500);
        assertFalse(broken.readable());
        assertTrue(inked(broken.image(2)) > 20);
        assertFalse(Mathematics.of("\\nosuchcommand{a}", "a", 18, 500).readable());
    }

    private static int inked(BufferedImage image) {
        int n = 0;
        for (int y = 0; y < image.getHeight(); y++) {
            for (int x = 0; x < image.getWidth(); x++) {
                n += (image.getRGB(x, y) & 0xffffff) != 0xffffff ? 1 : 0;
            }
        }
        return n;
    }
}
