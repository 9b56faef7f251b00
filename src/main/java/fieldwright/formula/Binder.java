package fieldwright.formula;

import fieldwright.quantity.UnknownNameException;
import java.util.ArrayList;
import java.util.Collection;
import java.util.HashSet;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;

/** Gives names their meaning. Coordinates, arguments and variables of integration stay as they are. */
final class Binder {
    private final Scope scope;
    private final String text;

    Binder(Scope scope, String text) {
        this.scope = scope;
        this.text = text;
    }

    Node bind(Node n, Set<String> free) {
        if (n instanceof Node.Name v) {
            return Coordinates.is(v.name()) || free.contains(v.name()) ? v : name(v);
        }
        if (n instanceof Node.Apply a) {
            return apply(a, free);
        }
        if (n instanceof Node.Integral i) {
            Set<String> inner = new HashSet<>(free);
            inner.addAll(Nesting.variables(i));
            return i.mapChildren(c -> bind(c, inner));
        }
        return n.mapChildren(c -> bind(c, free));
    }

    private Node name(Node.Name v) {
        Binding b = scope.lookup(v.name());
        if (b instanceof Binding.Value value) {
            return new Node.Known(v.name(), value.amount(), v.at());
        }
        if (b instanceof Binding.Definition d) {
            if (!d.parameters().isEmpty()) {
                throw new FormulaException(text, v.at().offset(), "'" + v.name() + "' is a formula of its arguments. Write " + usage(v.name(), d) + ".");
            }
            return inline(v.name(), d, List.of(), v.at());
        }
        if (b instanceof Binding.Unfit u) {
            throw new FormulaException(text, v.at().offset(), "'" + v.name() + "' is " + u.what() + ", not a number. " + u.remedy());
        }
        throw Parser.unknown(v, scope.names());
    }

    private Node apply(Node.Apply a, Set<String> free) {
        Binding b = free.contains(a.name()) ? null : scope.lookup(a.name());
        if (b instanceof Binding.Definition d) {
            if (d.parameters().size() != a.arguments().size()) {
                throw new FormulaException(text, a.at().offset(), "'" + a.name() + "' takes " + d.parameters().size() + " argument"
                    + (d.parameters().size() == 1 ? "" : "s") + ", not " + a.arguments().size() + ". Write " + usage(a.name(), d) + ".");
            }
            List<Node> arguments = new ArrayList<>();
            a.arguments().forEach(x -> arguments.add(bind(x, free)));
            return inline(a.name(), d, arguments, a.at());
        }
        if (b == null && !free.contains(a.name())) {
            Collection<String> known = new HashSet<>(scope.names());
            known.addAll(Function.names());
            throw new UnknownNameException(a.name(), known, a.at().offset(), "");
        }
        throw new FormulaException(text, a.at().offset(), "'" + a.name() + "' is not a formula with arguments. Multiplication is written out: "
            + a.name() + "*(…).");
    }

    private Node inline(String name, Binding.Definition d, List<Node> arguments, Node.At at) {
        Set<String> parameters = new HashSet<>();
        Map<String, Node> values = new LinkedHashMap<>();
        for (int i = 0; i < arguments.size(); i++) {
            parameters.add(d.parameters().get(i).name());
            values.put(d.parameters().get(i).name(), arguments.get(i));
        }
        Node body = put(d.body(), parameters, values, at);
        Node condition = d.condition() == null ? null : put(d.condition(), parameters, values, at);
        return new Node.Inlined(name, d.condition() == null ? null : d.condition().text(), d.parameters(), arguments, condition, body, at);
    }

    private Node put(Formula f, Set<String> parameters, Map<String, Node> values, Node.At at) {
        Node bound = new Binder(scope, f.text()).bind(f.tree(), parameters);
        return Trees.substitute(bound.movedTo(at), values);
    }

    private static String usage(String name, Binding.Definition d) {
        return name + "(" + String.join(", ", d.parameters().stream().map(Parameter::name).toList()) + ")";
    }
}
