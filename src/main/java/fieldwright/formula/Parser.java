package fieldwright.formula;

import fieldwright.formula.Node.At;
import fieldwright.formula.Node.Junction;
import fieldwright.formula.Node.Operator;
import fieldwright.formula.Node.Relation;
import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.UnknownNameException;
import fieldwright.quantity.Units;
import java.math.BigDecimal;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;

/**
 * Text to tree, by recursive descent. Binding, loosest first: or, and, not, comparison, + - and a leading sign, * /, a sign
 * further in, ^ (to the right).
 * Places in errors are offsets into the text as written.
 */
final class Parser {
    private static final Map<String, Relation> RELATIONS = Map.of("<", Relation.LESS, "<=", Relation.LESS_OR_EQUAL, ">", Relation.GREATER,
        ">=", Relation.GREATER_OR_EQUAL, "<<", Relation.MUCH_LESS, ">>", Relation.MUCH_GREATER);

    private static final int MOST_TOKENS = 4000;

    private final String text;
    private final List<Lexer.Token> tokens;
    private int next;
    private int depth;

    Parser(String text) {
        this.text = text;
        this.tokens = new Lexer(text).tokens();
        if (tokens.size() > MOST_TOKENS) {
            throw new FormulaException(text, tokens.get(MOST_TOKENS).from(), "a formula of " + tokens.size() + " signs and names. Name parts of it on lines "
                + "of their own.");
        }
    }

    Node formula() {
        if (peek().kind() == Lexer.Kind.END) {
            throw new FormulaException(text, 0, "the formula is empty. Write one, such as pi*R^2.");
        }
        Node whole = logic();
        if (peek().kind() != Lexer.Kind.END) {
            throw unexpected(peek());
        }
        return whole;
    }

    private Node logic() {
        deeper();
        Node left = junction(Junction.OR, "or", () -> junction(Junction.AND, "and", this::not));
        depth--;
        return left;
    }

    private void deeper() {
        if (++depth > 200) {
            throw new FormulaException(text, peek().from(), "more than 200 brackets and signs inside each other. Name parts of it on lines of their own.");
        }
    }

    private Node junction(Junction kind, String word, java.util.function.Supplier<Node> part) {
        Node first = part.get();
        if (!isWord(word)) {
            return first;
        }
        At at = here();
        List<Node> parts = new ArrayList<>(List.of(condition(first)));
        while (isWord(word)) {
            take();
            parts.add(condition(part.get()));
        }
        return new Node.Logic(kind, parts, at);
    }

    private Node not() {
        if (isWord("not")) {
            At at = here();
            take();
            return new Node.Logic(Junction.NOT, List.of(condition(not())), at);
        }
        return comparison();
    }

    /** a < b, and a < b <= c as both. */
    private Node comparison() {
        Node left = sum();
        List<Node> parts = new ArrayList<>();
        At first = here();
        while (RELATIONS.containsKey(peek().text()) && peek().kind() == Lexer.Kind.SIGN) {
            At at = here();
            Relation relation = RELATIONS.get(take().text());
            Node right = sum();
            parts.add(new Node.Compare(relation, value(left), value(right), at));
            left = right;
        }
        return parts.isEmpty() ? left : parts.size() == 1 ? parts.get(0) : new Node.Logic(Junction.AND, parts, first);
    }

    private Node sum() {
        Node left = isSign("-") ? minusProduct() : product();
        while (isSign("+") || isSign("-")) {
            At at = here();
            Operator operator = take().text().equals("+") ? Operator.PLUS : Operator.MINUS;
            left = new Node.Binary(operator, value(left), value(product()), at);
        }
        return left;
    }

    /** -a*b is -(a*b). */
    private Node minusProduct() {
        At at = here();
        take();
        deeper();
        Node of = value(isSign("-") ? minusProduct() : product());
        depth--;
        return new Node.Negate(of, at);
    }

    private Node product() {
        Node left = signed();
        while (isSign("*") || isSign("/")) {
            At at = here();
            Operator operator = take().text().equals("*") ? Operator.TIMES : Operator.OVER;
            left = new Node.Binary(operator, value(left), value(signed()), at);
        }
        return left;
    }

    private Node signed() {
        if (isSign("-") || isSign("+")) {
            deeper();
            At at = here();
            boolean minus = take().text().equals("-");
            Node of = value(signed());
            depth--;
            return minus ? new Node.Negate(of, at) : of;
        }
        return power();
    }

    private Node power() {
        Node base = primary();
        if (isSign("^")) {
            At at = here();
            take();
            deeper();
            Node exponent = value(signed());
            depth--;
            return new Node.Binary(Operator.POWER, value(base), exponent, at);
        }
        if (peek().kind() == Lexer.Kind.SUPERSCRIPT) {
            At at = here();
            Lexer.Token t = take();
            Node raised = new Node.Binary(Operator.POWER, value(base), exponent(t), at);
            if (isSign("^")) {
                throw new FormulaException(text, peek().from(), "a power of a power. Bracket the inner one: (a^2)^3.");
            }
            return raised;
        }
        return base;
    }

    private Node exponent(Lexer.Token t) {
        double value = Double.parseDouble(t.text());
        return value < 0 ? new Node.Negate(new Node.Literal(-value, t.text().substring(1), new At(t.from())), new At(t.from()))
            : new Node.Literal(value, t.text(), new At(t.from()));
    }

    private Node primary() {
        Lexer.Token t = peek();
        return switch (t.kind()) {
            case NUMBER -> number();
            case NAME -> name();
            case SIGN -> {
                if (!t.text().equals("(")) {
                    throw unexpected(t);
                }
                take();
                Node inner = logic();
                close(t);
                yield operandEnd(inner);
            }
            default -> throw unexpected(t);
        };
    }

    /** After an operand neither a name nor a bracket may follow: there is no implied multiplication. */
    private Node operandEnd(Node operand) {
        Lexer.Token t = peek();
        boolean word = t.kind() == Lexer.Kind.NAME && Names.WORDS.contains(t.text());
        if (t.kind() == Lexer.Kind.NAME && !word || t.kind() == Lexer.Kind.NUMBER || isSign("(")) {
            throw new FormulaException(text, t.from(), "'" + t.text() + "' follows without an operator. Multiplication is written out: put * before it.");
        }
        return operand;
    }

    private Node number() {
        Lexer.Token t = take();
        Lexer.Token after = peek();
        boolean percent = after.kind() == Lexer.Kind.SIGN && (after.text().equals("%") || after.text().equals("\u00b0"));
        if (percent || after.kind() == Lexer.Kind.NAME && !Names.WORDS.contains(after.text())) {
            if (!Units.isSymbol(after.written())) {
                throw new FormulaException(text, after.from(), "after the number " + t.text() + " stands '" + after.written()
                    + "', which is not a unit. Write " + t.text() + "*" + after.text() + " to multiply.");
            }
            take();
            ambiguousUnit(t, after);
            return operandEnd(measure(t, after.written(), after.from()));
        }
        if (isSign("(")) {
            return operandEnd(bracketedUnit(t));
        }
        return operandEnd(literal(t));
    }

    private Node literal(Lexer.Token t) {
        double value = Double.parseDouble(t.text());
        if (Double.isInfinite(value)) {
            throw new FormulaException(text, t.from(), "number " + t.text() + " is too large. Check the exponent.");
        }
        return new Node.Literal(value, t.text(), new At(t.from()));
    }

    private Node measure(Lexer.Token number, String unit, int unitFrom) {
        try {
            return new Node.Measure(Amount.of(new BigDecimal(number.text()), unit), number.text(), new At(number.from()));
        } catch (AuthorException e) {
            throw new FormulaException(text, unitFrom, e.getMessage());
        }
    }

    /** {@code 5 V/m} could be 5 (V/m) or (5 V)/m, {@code 2 m^2} 2 (m^2) or (2 m)^2: both are refused. */
    private void ambiguousUnit(Lexer.Token number, Lexer.Token unit) {
        Lexer.Token t = peek();
        boolean power = isSign("^") || t.kind() == Lexer.Kind.SUPERSCRIPT;
        Lexer.Token second = tokens.get(Math.min(next + 1, tokens.size() - 1));
        Lexer.Token third = tokens.get(Math.min(next + 2, tokens.size() - 1));
        boolean pure = unit.text().equals("%") || unit.text().equals("\u00b0") || unit.text().equals("deg");   // never part of a compound one
        boolean product = !pure && (isSign("/") || isSign("*")) && second.kind() == Lexer.Kind.NAME && Units.isSymbol(second.written())
            && !(third.kind() == Lexer.Kind.SIGN && third.text().equals("("));
        if (power || product) {
            String compound = power ? unit.written() + "^2" : unit.written() + t.text() + second.written();
            String rest = power ? "(" + number.text() + " " + unit.written() + ")^2"
                : "(" + number.text() + " " + unit.written() + ")" + t.text() + second.written();
            throw new FormulaException(text, unit.from(), "a compound unit stands in round brackets: " + number.text() + " (" + compound
                + "). For the other reading write " + rest + ".");
        }
    }

    /** {@code 2 (uC/m^3)}: the text between the brackets is a unit. */
    private Node bracketedUnit(Lexer.Token number) {
        Lexer.Token open = take();
        int level = 1;
        while (level > 0) {
            Lexer.Token t = take();
            if (t.kind() == Lexer.Kind.END) {
                throw new FormulaException(text, open.from(), "the bracket is not closed. Add ')'.");
            }
            level += t.kind() != Lexer.Kind.SIGN ? 0 : t.text().equals("(") ? 1 : t.text().equals(")") ? -1 : 0;
        }
        String unit = text.substring(open.from() + 1, tokens.get(next - 1).from());
        try {
            Units.parse(unit);
        } catch (AuthorException e) {
            throw new FormulaException(text, open.from(), "after a number, brackets hold a unit, and '" + unit
                + "' is none. Write " + number.text() + "*(" + unit.strip() + ") to multiply.");
        }
        return measure(number, unit, open.from());
    }

    private Node name() {
        Lexer.Token t = take();
        At at = new At(t.from());
        String name = t.text();
        if (name.equals("inf")) {
            return operandEnd(new Node.Infinity(at));
        }
        if (name.equals("when")) {
            return operandEnd(when(t));
        }
        if (name.equals("integral")) {
            return operandEnd(integral(t));
        }
        if (Names.WORDS.contains(name)) {
            throw unexpected(t);
        }
        if (isSign("(")) {
            return operandEnd(call(t));
        }
        if (Constants.is(name)) {
            return operandEnd(new Node.Constant(name, at));
        }
        if (Function.isName(name)) {
            throw new FormulaException(text, t.from(), "function '" + name + "' without arguments. Write " + Function.usage(name) + ".");
        }
        return operandEnd(new Node.Name(name, at));
    }

    private Node call(Lexer.Token t) {
        String name = t.text();
        At at = new At(t.from());
        if (Coordinates.is(name) || Constants.is(name)) {
            throw new FormulaException(text, peek().from(), "'" + name + "' is a number, not a function. Multiplication is written out: " + name + "*(…).");
        }
        Lexer.Token open = take();
        List<Node> arguments = new ArrayList<>();
        if (!isSign(")")) {
            do {
                if (!arguments.isEmpty()) {
                    take();
                }
                arguments.add(value(logic()));
            } while (isSign(","));
        }
        close(open);
        if (!Function.isName(name)) {
            return new Node.Apply(name, arguments, at);
        }
        if ((name.equals("min") || name.equals("max")) && arguments.size() > 2) {
            Function pair = Function.of(name, 2);
            return arguments.stream().reduce((a, b) -> new Node.Call(pair, List.of(a, b), at)).orElseThrow();
        }
        Function function = Function.of(name, arguments.size());
        if (function == null) {
            throw new FormulaException(text, t.from(), "function '" + name + "' with " + arguments.size() + " argument"
                + (arguments.size() == 1 ? "" : "s") + ". Write " + Function.usage(name) + ".");
        }
        return new Node.Call(function, arguments, at);
    }

    private Node when(Lexer.Token t) {
        Lexer.Token open = open(t, "when(rho < a, f, g)");
        Node condition = condition(logic());
        comma(t, "when(condition, value, otherwise)");
        Node yes = value(logic());
        comma(t, "when(condition, value, otherwise)");
        if (isWord("otherwise")) {
            take();
        }
        Node no = value(logic());
        close(open);
        return new Node.When(condition, yes, no, new At(t.from()));
    }

    private Node integral(Lexer.Token t) {
        String usage = "integral(f, rho: 0 to R)";
        Lexer.Token open = open(t, usage);
        Node body = value(logic());
        List<Node.Range> ranges = new ArrayList<>();
        while (isSign(",")) {
            take();
            Lexer.Token variable = take();
            if (variable.kind() != Lexer.Kind.NAME || Names.WORDS.contains(variable.text())) {
                throw new FormulaException(text, variable.from(), "here the variable of integration is expected. Write " + usage + ".");
            }
            if (Constants.is(variable.text()) || Function.isName(variable.text())) {
                throw new FormulaException(text, variable.from(), "'" + variable.text() + "' is reserved and cannot be a variable of integration.");
            }
            if (!isSign(":")) {
                throw new FormulaException(text, peek().from(), "after the variable '" + variable.text() + "' a colon is expected. Write " + usage + ".");
            }
            take();
            Node from = value(logic());
            if (!isWord("to")) {
                throw new FormulaException(text, peek().from(), "between the limits the word 'to' is expected. Write " + usage + ".");
            }
            take();
            ranges.add(new Node.Range(variable.text(), from, value(logic()), new At(variable.from())));
        }
        if (ranges.isEmpty()) {
            throw new FormulaException(text, t.from(), "integral without limits. Write " + usage + ".");
        }
        close(open);
        Node.Integral whole = new Node.Integral(body, ranges, new At(t.from()));
        Nesting.order(whole, text);
        return whole;
    }

    private Node value(Node n) {
        if (n.isCondition()) {
            throw new FormulaException(text, n.at().offset(), "a comparison stands where a number is expected. Comparisons belong into "
                + "when(condition, value, otherwise).");
        }
        return n;
    }

    private Node condition(Node n) {
        if (!n.isCondition()) {
            throw new FormulaException(text, n.at().offset(), "a comparison is expected here, such as rho < a.");
        }
        return n;
    }

    private Lexer.Token open(Lexer.Token word, String usage) {
        if (!isSign("(")) {
            throw new FormulaException(text, peek().from(), "'" + word.text() + "' needs brackets. Write " + usage + ".");
        }
        return take();
    }

    private void comma(Lexer.Token word, String usage) {
        if (!isSign(",")) {
            throw new FormulaException(text, peek().from(), "a comma is expected in '" + word.text() + "'. Write " + usage + ".");
        }
        take();
    }

    private void close(Lexer.Token open) {
        if (!isSign(")")) {
            if (peek().kind() == Lexer.Kind.END) {
                throw new FormulaException(text, open.from(), "the bracket is not closed. Add ')'.");
            }
            throw unexpected(peek());
        }
        take();
    }

    private FormulaException unexpected(Lexer.Token t) {
        String message;
        if (t.kind() == Lexer.Kind.END) {
            message = "the formula ends where a number, a name or a bracket is expected. Complete it or remove the last sign.";
        } else if (t.text().equals("=")) {
            message = "'=' inside a formula. Compare with <, <=, >, >=; a further step of a derivation goes on a line of its own.";
        } else if (t.text().equals(")")) {
            message = "')' without a matching '(', or something is missing before it.";
        } else if (t.kind() == Lexer.Kind.SUPERSCRIPT) {
            message = "a power without a base.";
        } else {
            message = "unexpected '" + t.text() + "'. A number, a name or an opening bracket belongs here, or an operator between two of them.";
        }
        return new FormulaException(text, t.from(), message);
    }

    private boolean isSign(String sign) {
        return peek().kind() == Lexer.Kind.SIGN && peek().text().equals(sign);
    }

    private boolean isWord(String word) {
        return peek().kind() == Lexer.Kind.NAME && peek().text().equals(word);
    }

    private At here() {
        return new At(peek().from());
    }

    private Lexer.Token peek() {
        return tokens.get(next);
    }

    private Lexer.Token take() {
        Lexer.Token t = tokens.get(next);
        if (next < tokens.size() - 1) {
            next++;
        }
        return t;
    }

    /** For a name that is not known: says so when it is a unit that lacks its brackets. */
    static UnknownNameException unknown(Node.Name n, java.util.Collection<String> names) {
        String hint = Units.isSymbol(n.name()) ? "If '" + n.name() + "' is meant as a unit: a unit follows a number, and a compound unit stands in "
            + "round brackets, as in 5 (V/m)." : "";
        return new UnknownNameException(n.name(), names, n.at().offset(), hint);
    }
}
