package fieldwright.formula;

import fieldwright.quantity.Amount;
import fieldwright.quantity.Standing;
import fieldwright.quantity.Units;
import java.util.ArrayList;
import java.util.Collections;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Objects;
import java.util.OptionalInt;
import java.util.Set;
import javax.measure.Dimension;

/**
 * A formula in ordinary notation. Immutable.
 *
 * <p>{@link #parse} reads the text; {@link #bind} gives names their values, after which only coordinates and arguments are
 * free; {@link #dimension} checks units; then {@link #compile} or {@link #amount} work numbers. Text and typeset form stay
 * those of the formula as written, before binding.
 */
public final class Formula {
    private final Node tree;
    private final Node written;
    private final String text;
    private final Integrator integrator;
    /** What was worked out from the tree before; it never changes, so that stays true. */
    private volatile Map<Object, Object> known;

    private record Compiled(List<String> variables) { }

    private record Slope(String variable) { }

    private record Degree(String variable) { }

    @SuppressWarnings("unchecked")
    private <T> T once(Object question, java.util.function.Supplier<T> work) {
        Map<Object, Object> answers = known;
        if (answers == null) {
            synchronized (this) {
                answers = known == null ? new java.util.concurrent.ConcurrentHashMap<>(8) : known;
                known = answers;
            }
        }
        Object answer = answers.get(question);
        if (answer == null) {
            answer = work.get();
            answers.put(question, answer);
        }
        return (T) answer;
    }

    private Formula(Node tree, Node written, String text, Integrator integrator) {
        this.tree = Objects.requireNonNull(tree);
        this.written = written;
        this.text = text;
        this.integrator = integrator;
    }

    /** Reads a formula or a condition. Errors: {@link FormulaException} with the place. Units are not checked here. */
    public static Formula parse(String text) {
        Node tree = new Parser(text).formula();
        return new Formula(tree, tree, text, null);
    }

    /** As {@link #parse}, and a number is required: a bare comparison is an error. */
    public static Formula parseValue(String text) {
        Formula f = parse(text);
        if (f.isCondition()) {
            throw new FormulaException(text, f.tree.at().offset(), "a comparison stands where a formula is expected. "
                + "Comparisons belong into when(condition, value, otherwise).");
        }
        return f;
    }

    /** As {@link #parse}, and a condition is required. */
    public static Formula parseCondition(String text) {
        Formula f = parse(text);
        if (!f.isCondition()) {
            throw new FormulaException(text, f.tree.at().offset(), "a condition is expected, such as z > R_s.");
        }
        return f;
    }

    public static Formula constant(Amount amount) {
        return built(new Node.Known(null, amount, Node.At.NOWHERE), null);
    }

    public static Formula constant(double value) {
        return built(Node.number(value), null);
    }

    /** A coordinate or argument by name. */
    public static Formula variable(String name) {
        return built(new Node.Name(name, Node.At.NOWHERE), null);
    }

    private static Formula built(Node tree, Integrator integrator) {
        return new Formula(tree, tree, Printer.text(tree), integrator);
    }

    /**
     * A formula of plain numbers: each coordinate that is a length enters as its number in {@code coordinateUnit}, angles
     * in radian; the result is a number of {@code resultUnit}. Names of the scope enter with their units, so a name with
     * a unit must be divided by one.
     */
    public static Formula plain(String text, String coordinateUnit, String resultUnit, Scope scope) {
        Formula bound = parseValue(text).bind(scope);
        if (!Units.parse(coordinateUnit).dimension().equals(Units.LENGTH)) {
            throw new FormulaException(text, 0, "'" + coordinateUnit + "' is no unit of length: coordinates enter in mm, cm, m, …");
        }
        Map<String, Node> numbers = new LinkedHashMap<>();
        for (String name : bound.variables()) {
            if (Units.LENGTH.equals(Coordinates.DIMENSIONS.get(name))) {
                numbers.put(name, Node.over(new Node.Name(name, Node.At.NOWHERE), unit(coordinateUnit)));
            }
        }
        Node number = Trees.substitute(bound.tree, numbers);
        Dimension d = new UnitCheck(text, Coordinates.DIMENSIONS).of(number);
        if (d != null && !d.equals(Units.NONE)) {
            throw new FormulaException(text, 0, "a formula of plain numbers came out as " + Units.describe(d)
                + ". Divide names that have a unit by one, such as R_s/(1 mm), or write an ordinary formula.");
        }
        Node result = Units.parse(resultUnit).dimension().equals(Units.NONE) && Units.parse(resultUnit).factor() == 1 ? number
            : Node.times(number, unit(resultUnit));
        return new Formula(result, bound.written, text, bound.integrator);
    }

    private static Node unit(String unit) {
        return new Node.Measure(Amount.of(1, unit), "1", Node.At.NOWHERE);
    }

    /** Names get the scope's values; coordinates stay free. Errors: unknown name, wrong number of arguments. */
    public Formula bind(Scope scope) {
        return bind(scope, Set.of());
    }

    /** As {@link #bind(Scope)}; the names in {@code free} stay free too: the arguments of this formula. */
    public Formula bind(Scope scope, Set<String> free) {
        Integrator own = scope.integrator() != null ? scope.integrator() : integrator;
        return new Formula(new Binder(scope, text).bind(tree, free), written, text, own);
    }

    /** Free names: before binding all names, after it coordinates and arguments. */
    public Set<String> variables() {
        return once("variables", () -> Collections.unmodifiableSet(Trees.free(tree)));
    }

    /** True when the formula is a bare 0 or inf, which fits any unit. */
    public boolean fitsAnyUnit() {
        return once("fits any unit", () -> new UnitCheck(text, Coordinates.DIMENSIONS).of(tree) == null);
    }

    /**
     * What the formula measures; a plain number for a bare 0 or inf. Use {@link #requireDimension} to accept those where a unit is expected.
     *
     * @param variables dimension of each free name; coordinates need not be listed
     */
    public Dimension dimension(Map<String, Dimension> variables) {
        Dimension d = new UnitCheck(text, variables).of(tree);
        return d == null ? Units.NONE : d;
    }

    /** Errors: {@link FormulaException} when the formula does not measure {@code expected}; a bare 0 and inf always do. */
    public void requireDimension(Dimension expected, String what, Map<String, Dimension> variables) {
        Dimension d = new UnitCheck(text, variables).of(tree);
        if (d != null && !d.equals(expected)) {
            throw new FormulaException(text, 0, what + " = " + text + " is " + Units.describe(d) + " and must be " + Units.describe(expected)
                + ". Check its units.");
        }
    }

    /** Code over blocks; arguments in the order of {@code variables}. Check units first. Integrals that do not converge give NaN. */
    public BlockFunction compile(List<String> variables) {
        return once(new Compiled(variables), () -> Compiler.compile(tree, variables, text, integrator));
    }

    /** Code over blocks for several formulas together; as {@link #compile}. */
    public static BlockMap compile(List<Formula> formulas, List<String> variables) {
        Integrator any = formulas.stream().map(f -> f.integrator).filter(Objects::nonNull).findFirst().orElse(null);
        String text = formulas.stream().map(f -> f.text).reduce((a, b) -> a + ", " + b).orElse("");
        return Compiler.compile(formulas.stream().map(f -> f.tree).toList(), variables, text, any);
    }

    /** The value of a formula without free names, units checked, with its numerical error. */
    public Amount amount() {
        return amount(Map.of());
    }

    /** The value at given free names, units checked, with its numerical error. */
    public Amount amount(Map<String, Amount> values) {
        Map<String, Dimension> dimensions = new LinkedHashMap<>();
        Map<String, Approx> numbers = new LinkedHashMap<>();
        values.forEach((name, a) -> {
            dimensions.put(name, a.dimension());
            numbers.put(name, Approx.of(a));
        });
        Set<String> missing = new LinkedHashSet<>(variables());
        missing.removeAll(values.keySet());
        if (!missing.isEmpty()) {
            throw new FormulaException(text, 0, "the formula '" + text + "' still depends on " + String.join(", ", missing) + ". Give it a place or arguments.");
        }
        Dimension d = dimension(dimensions);
        Approx value = new Evaluator(text, numbers, integrator).of(tree);
        String unit = tree instanceof Node.Measure m ? m.amount().shown() : tree instanceof Node.Known k ? k.amount().shown() : null;
        if (Double.isInfinite(value.value()) && value.standing().isConverged() && !fitsAnyUnit()) {
            return new Amount(value.value(), value.error(), d, unit, Standing.unbounded("the formula " + text + " has no bound here"));
        }
        Standing standing = Double.isInfinite(value.error()) && Double.isFinite(value.value()) ? value.standing().worse(Standing.NO_ERROR_BOUND)
            : value.standing();
        return new Amount(value.value(), value.error(), d, unit, standing);
    }

    /** The symbolic derivative with respect to a free name, simplified. At a kink it is that of one side. */
    public Formula derivative(String variable) {
        return once(new Slope(variable), () -> built(Simplifier.simplified(new Derivative(variable, text).of(tree)), integrator));
    }

    /** The polynomial degree in a free name, an upper bound where terms cancel; empty when the formula is no polynomial in it. */
    public OptionalInt degree(String variable) {
        return once(new Degree(variable), () -> {
            int degree = new Derivative(variable, text).degree(tree);
            return degree < 0 ? OptionalInt.empty() : OptionalInt.of(degree);
        });
    }

    /** Formulas on whose zero sets this one, or a derivative of it, jumps: from abs, sign, min, max, floor, when, … */
    public List<Formula> kinks() {
        return once("kinks", () -> Kinks.of(tree).stream().map(k -> built(k, integrator)).toList());
    }

    public Formula simplified() {
        return built(Simplifier.simplified(tree), integrator);
    }

    /** The formula as written, in LaTeX, without dollar signs. */
    public String latex() {
        return Latex.of(written);
    }

    /** The formula as written. */
    public String text() {
        return text;
    }

    /** The tree, for symbolic work. */
    public Node tree() {
        return tree;
    }

    /** A part of the tree, or another one over the same names, as a formula. */
    public Formula part(Node node) {
        return built(node, integrator);
    }

    public Integrator integrator() {
        return integrator;
    }

    public boolean isCondition() {
        return tree.isCondition();
    }

    /** True when a condition uses >> or <<: a limiting case rather than a range. */
    public boolean isLimitingCase() {
        return Trees.any(tree, n -> n instanceof Node.Compare c
            && (c.relation() == Node.Relation.MUCH_GREATER || c.relation() == Node.Relation.MUCH_LESS));
    }

    /** This formula, with an error that names {@code name} where the bound condition does not hold. */
    public Formula guarded(String name, Formula condition) {
        Node whole = new Node.Inlined(name, condition.text, List.of(), List.of(), condition.tree, tree, tree.at());
        return new Formula(whole, written, text, integrator);
    }

    /** True when a formula of the sheet stands in this one with a condition for which it holds. */
    public boolean isGuarded() {
        return Trees.any(tree, n -> n instanceof Node.Inlined f && f.condition() != null);
    }

    /** This formula without those conditions: for a caller that has seen to it that they hold. */
    public Formula unguarded() {
        return new Formula(Trees.unguarded(tree), written, text, integrator);
    }

    public Formula plus(Formula b) {
        return combined(Node.Operator.PLUS, b);
    }

    public Formula minus(Formula b) {
        return combined(Node.Operator.MINUS, b);
    }

    public Formula times(Formula b) {
        return combined(Node.Operator.TIMES, b);
    }

    public Formula over(Formula b) {
        return combined(Node.Operator.OVER, b);
    }

    public Formula pow(double exponent) {
        return combined(Node.Operator.POWER, constant(exponent));
    }

    private Formula combined(Node.Operator operator, Formula b) {
        Node whole = Node.binary(operator, tree, b.tree);
        Node source = Node.binary(operator, written, b.written);
        return new Formula(whole, source, Printer.text(source), integrator != null ? integrator : b.integrator);
    }

    /** Free names replaced by formulas; variables of integration inside are renamed where they would clash. */
    public Formula substitute(Map<String, Formula> values) {
        if (Collections.disjoint(variables(), values.keySet())) {
            return this;
        }
        Map<String, Node> trees = new LinkedHashMap<>();
        values.forEach((name, f) -> trees.put(name, f.tree));
        Integrator any = integrator;
        for (Formula f : values.values()) {
            any = any != null ? any : f.integrator;
        }
        return built(Trees.substitute(tree, trees), any);
    }

    /** Equal when they are written alike after binding. */
    @Override
    public boolean equals(Object other) {
        return other instanceof Formula f && f.tree.equals(tree);
    }

    @Override
    public int hashCode() {
        return tree.hashCode();
    }

    @Override
    public String toString() {
        return text;
    }
}
