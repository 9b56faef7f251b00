package fieldwright.formula;

import java.util.ArrayList;
import java.util.HashSet;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.function.Consumer;

/** Free names, substitution, and searches in trees. */
final class Trees {
    private Trees() {
    }

    /** Names that are not bound by an integral above them, in order of writing. */
    static Set<String> free(Node n) {
        Set<String> found = new LinkedHashSet<>();
        collect(n, Set.of(), found);
        return found;
    }

    private static void collect(Node n, Set<String> bound, Set<String> found) {
        if (n instanceof Node.Name v) {
            if (!bound.contains(v.name())) {
                found.add(v.name());
            }
        } else if (n instanceof Node.Integral i) {
            // A limit sees the other variables of its integral; its own is refused by Nesting.
            Set<String> inner = new HashSet<>(bound);
            inner.addAll(Nesting.variables(i));
            i.children().forEach(c -> collect(c, inner, found));
        } else {
            n.children().forEach(c -> collect(c, bound, found));
        }
    }

    static boolean mentions(Node n, String name) {
        return free(n).contains(name);
    }

    static boolean mentionsAny(Node n, Set<String> names) {
        return free(n).stream().anyMatch(names::contains);
    }

    /** Replaces free names. Integration variables are renamed where a replacement mentions them, so nothing is captured. */
    static Node substitute(Node n, Map<String, Node> values) {
        if (values.isEmpty()) {
            return n;
        }
        if (n instanceof Node.Name v) {
            return values.getOrDefault(v.name(), v);
        }
        if (n instanceof Node.Integral i) {
            Map<String, Node> inner = new LinkedHashMap<>(values);
            inner.keySet().removeAll(Nesting.variables(i));
            Set<String> used = free(i);
            inner.keySet().retainAll(used);
            if (inner.isEmpty()) {
                return i;
            }
            return substituteInside(renamed(i, inner), inner);
        }
        return n.mapChildren(c -> substitute(c, values));
    }

    private static Node substituteInside(Node.Integral i, Map<String, Node> values) {
        return i.mapChildren(c -> substitute(c, values));
    }

    private static Node.Integral renamed(Node.Integral i, Map<String, Node> values) {
        Set<String> taken = new HashSet<>(free(i));
        values.values().forEach(v -> taken.addAll(free(v)));
        Map<String, Node> renames = new LinkedHashMap<>();
        Map<String, String> names = new LinkedHashMap<>();
        for (Node.Range r : i.ranges()) {
            boolean clash = values.values().stream().anyMatch(v -> mentions(v, r.variable()));
            if (clash) {
                String fresh = r.variable();
                do {
                    fresh += "'";
                } while (taken.contains(fresh) || Nesting.variables(i).contains(fresh));
                taken.add(fresh);
                names.put(r.variable(), fresh);
                renames.put(r.variable(), new Node.Name(fresh, r.at()));
            }
        }
        if (renames.isEmpty()) {
            return i;
        }
        List<Node.Range> ranges = new ArrayList<>();
        for (Node.Range r : i.ranges()) {
            ranges.add(new Node.Range(names.getOrDefault(r.variable(), r.variable()), substitute(r.from(), renames),
                substitute(r.to(), renames), r.at()));
        }
        return new Node.Integral(substitute(i.body(), renames), ranges, i.at());
    }

    /** The coordinate that a renamed integration variable stands for: rho for rho'. */
    static String original(String name) {
        String base = name;
        while (base.endsWith("'")) {
            base = base.substring(0, base.length() - 1);
        }
        return base;
    }

    static void visit(Node n, Consumer<Node> visitor) {
        visitor.accept(n);
        n.children().forEach(c -> visit(c, visitor));
    }

    /** The tree without the conditions of the sheet's formulas in it. */
    static Node unguarded(Node n) {
        if (n instanceof Node.Inlined f && f.condition() != null) {
            return unguarded(new Node.Inlined(f.name(), f.holdsFor(), f.parameters(), f.arguments(), null, f.body(), f.at()));
        }
        return n.withChildren(n.children().stream().map(Trees::unguarded).toList());
    }

    static boolean any(Node n, java.util.function.Predicate<Node> test) {
        return test.test(n) || n.children().stream().anyMatch(c -> any(c, test));
    }
}
