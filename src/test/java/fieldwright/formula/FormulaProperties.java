package fieldwright.formula;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import java.math.BigDecimal;
import java.math.MathContext;
import java.util.List;
import java.util.Map;
import net.jqwik.api.Assume;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.constraints.DoubleRange;

class FormulaProperties {
    private static final MathContext DIGITS = new MathContext(80);
    private static final List<String> XY = List.of("x", "y");

    @Property(seed = "20260301", tries = 3000)
    void printedTreesReadBackTheSame(@ForAll long seed) {
        Node tree = new RandomFormulas(seed).any(4);
        Node simple = normal(tree);
        assertEquals(simple, Formula.parse(Printer.text(simple)).tree(), Printer.text(simple));
    }

    /** The parser flattens "a and b and c"; a variable of integration must not be in its own limits. */
    private static Node normal(Node n) {
        return n.mapChildren(FormulaProperties::normal);
    }

    /** The true value, worked in 80 digits, lies within the carried error. */
    @Property(seed = "20260302", tries = 4000)
    void carriedErrorHoldsInFormulas(@ForAll long seed) {
        Node tree = new RandomFormulas(seed).arithmetic(5);
        BigDecimal exact = exact(tree);
        Assume.that(exact != null && exact.abs().compareTo(new BigDecimal("1e60")) < 0);
        Amount a;
        try {
            a = Formula.parse(Printer.text(tree)).amount();
        } catch (AuthorException e) {   // a divisor or a root's argument that is zero within rounding
            return;
        }
        BigDecimal miss = new BigDecimal(a.si()).subtract(exact).abs();
        assertTrue(Double.isInfinite(a.error()) || miss.compareTo(new BigDecimal(a.error())) <= 0,
            Printer.text(tree) + " = " + a.si() + " misses " + exact + " by " + miss.doubleValue() + ", error " + a.error());
    }

    private static BigDecimal exact(Node n) {
        if (n instanceof Node.Literal l) {
            return l.text() != null ? new BigDecimal(l.text()) : BigDecimal.valueOf(l.value());
        }
        if (n instanceof Node.Call c) {
            BigDecimal x = exact(c.arguments().get(0));
            return x == null || x.signum() < 0 ? null : x.sqrt(DIGITS);
        }
        Node.Binary b = (Node.Binary) n;
        BigDecimal l = exact(b.left());
        BigDecimal r = exact(b.right());
        if (l == null || r == null) {
            return null;
        }
        boolean divides = b.operator() == Node.Operator.OVER && r.signum() == 0 || b.operator() == Node.Operator.POWER && r.signum() < 0 && l.signum() == 0;
        if (divides) {
            return null;
        }
        return switch (b.operator()) {
            case PLUS -> l.add(r, DIGITS);
            case MINUS -> l.subtract(r, DIGITS);
            case TIMES -> l.multiply(r, DIGITS);
            case OVER -> l.divide(r, DIGITS);
            case POWER -> l.pow(r.intValueExact(), DIGITS);
        };
    }

    /** Central differences, whose own error is h² f'''/6 + rounding/h; compared at a size that includes neighbouring slopes. */
    @Property(seed = "20260303", tries = 2000)
    void derivativeAgainstFiniteDifferences(@ForAll long seed, @ForAll @DoubleRange(min = 0.6, max = 1.4) double x,
                                            @ForAll @DoubleRange(min = 0.6, max = 1.4) double y) {
        Formula f = Formula.parse(Printer.text(new RandomFormulas(seed).smooth(4)));
        BlockFunction value = f.compile(XY);
        double slope = f.derivative("x").compile(XY).at(x, y);
        double h = 1e-4;
        double coarse = (value.at(x + 2 * h, y) - value.at(x - 2 * h, y)) / (4 * h);
        double fine = (value.at(x + h, y) - value.at(x - h, y)) / (2 * h);
        double difference = fine + (fine - coarse) / 3;   // Richardson
        double size = Math.abs(value.at(x, y)) + Math.abs(fine);
        Assume.that(size < 1e8 && Math.abs(fine - coarse) < 1e-3 * (1 + size));
        assertEquals(difference, slope, 1e-8 * (1 + size), f.text() + " gives " + f.derivative("x").text());
    }

    @Property(seed = "20260304", tries = 2000)
    void simplifyingKeepsTheValue(@ForAll long seed, @ForAll @DoubleRange(min = 0.6, max = 1.4) double x,
                                  @ForAll @DoubleRange(min = 0.6, max = 1.4) double y) {
        Formula f = Formula.parse(Printer.text(new RandomFormulas(seed).smooth(5)));
        Formula simple = f.simplified();
        Amount a = f.amount(Map.of("x", Amount.of(x), "y", Amount.of(y)).entrySet().stream().filter(e -> f.variables().contains(e.getKey()))
            .collect(java.util.stream.Collectors.toMap(Map.Entry::getKey, Map.Entry::getValue)));
        Assume.that(Double.isFinite(a.si()));
        assertEquals(a.si(), simple.compile(XY).at(x, y), 100 * a.error() + 1e-13 * Math.abs(a.si()), f.text() + " simplified to " + simple.text());
        assertEquals(simple.text(), Formula.parse(simple.text()).simplified().text(), "simplifying again changes nothing");
    }

    @Property(seed = "20260305", tries = 500)
    void blocksDoNotDependOnTheirSize(@ForAll long seed) {
        BlockFunction f = Formula.parse(Printer.text(new RandomFormulas(seed).smooth(5))).compile(XY);
        double[][] args = new double[2][BlockFunction.BLOCK];
        for (int i = 0; i < BlockFunction.BLOCK; i++) {
            args[0][i] = 0.5 + i / 300.0;
            args[1][i] = 1.5 - i / 300.0;
        }
        double[] whole = new double[BlockFunction.BLOCK];
        f.evaluate(args, BlockFunction.BLOCK, whole);
        for (int i = 0; i < BlockFunction.BLOCK; i += 37) {
            assertEquals(whole[i], f.at(args[0][i], args[1][i]));
        }
        f.evaluate(args, BlockFunction.BLOCK, args[0]);   // out may be an argument's block
        for (int i = 0; i < BlockFunction.BLOCK; i++) {
            assertEquals(whole[i], args[0][i]);
        }
    }

    /** Two routes to one number: block code, and evaluation with error. */
    @Property(seed = "20260306", tries = 1000)
    void blockCodeAgreesWithCarefulEvaluation(@ForAll long seed, @ForAll @DoubleRange(min = 0.6, max = 1.4) double x,
                                              @ForAll @DoubleRange(min = 0.6, max = 1.4) double y) {
        Formula f = Formula.parse("0*x + 0*y + " + Printer.text(new RandomFormulas(seed).smooth(5)));
        Amount a = f.amount(Map.of("x", Amount.of(x), "y", Amount.of(y)));
        Assume.that(Double.isFinite(a.si()));
        assertEquals(a.si(), f.compile(XY).at(x, y), 3 * a.error() + 1e-15 * Math.abs(a.si()), f.text());
    }
}
