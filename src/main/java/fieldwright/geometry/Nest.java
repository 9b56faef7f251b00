package fieldwright.geometry;

import java.util.ArrayList;
import java.util.Collection;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;

import javax.measure.Dimension;

import fieldwright.formula.Formula;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Units;

/**
 * Limits in an order in which they can be worked: each uses only coordinates that stand before it.
 * Fixed coordinates are put into the limits that use them.
 */
final class Nest {
    private final String title;
    private final List<String> names;
    private final List<String> order = new ArrayList<>();
    private final Map<String, Formula> from = new LinkedHashMap<>();
    private final Map<String, Formula> to = new LinkedHashMap<>();
    private final Map<String, Formula> fixed = new LinkedHashMap<>();

    private Nest(String title, List<String> names) {
        this.title = title;
        this.names = names;
    }

    static Nest of(List<String> names, Map<String, Extent> extents, String title) {
        Nest nest = new Nest(title, names);
        for (Map.Entry<String, Extent> e : extents.entrySet()) {
            for (String v : e.getValue().variables()) {
                if (!extents.containsKey(v)) {
                    throw new AuthorException(title + ": " + e.getKey() + " depends on '" + v + "', which is not one of its coordinates "
                        + String.join(", ", names) + ". Write it with these.");
                }
            }
        }
        nest.sort(extents);
        nest.checkUnits();
        return nest;
    }

    static void requireKnown(String what, Formula f, Collection<String> known, String title) {
        for (String v : f.variables()) {
            if (!known.contains(v)) {
                throw new AuthorException(title + ": " + what + " " + f.text() + " uses '" + v + "', which is not one of its parameters "
                    + String.join(", ", known) + ". Add .over(\"" + v + "\", from, to).");
            }
        }
    }

    /** Takes, again and again, the first stated coordinate whose limits use only those already taken. */
    private void sort(Map<String, Extent> extents) {
        Set<String> placed = new LinkedHashSet<>();
        while (placed.size() < extents.size()) {
            String next = null;
            for (Map.Entry<String, Extent> e : extents.entrySet()) {
                if (!placed.contains(e.getKey()) && placed.containsAll(e.getValue().variables())) {
                    next = e.getKey();
                    break;
                }
            }
            if (next == null) {
                throw new AuthorException(title + ": " + cycle(extents, placed) + ". Limits must not go round in a circle: "
                    + "write one of them without the other coordinate.");
            }
            place(next, extents.get(next));
            placed.add(next);
        }
    }

    private void place(String name, Extent extent) {
        if (extent instanceof Extent.Limits limits) {
            order.add(name);
            from.put(name, limits.from().substitute(fixed));
            to.put(name, limits.to().substitute(fixed));
        } else if (extent instanceof Extent.Fixed held) {
            fixed.put(name, held.at().substitute(fixed));
        }
    }

    private static String cycle(Map<String, Extent> extents, Set<String> placed) {
        String start = extents.keySet().stream().filter(k -> !placed.contains(k)).findFirst().orElseThrow();
        List<String> path = new ArrayList<>();
        String at = start;
        while (!path.contains(at)) {
            path.add(at);
            String here = at;
            at = extents.get(here).variables().stream().filter(v -> !placed.contains(v)).findFirst().orElse(here);
        }
        List<String> ring = new ArrayList<>(path.subList(path.indexOf(at), path.size()));
        ring.add(at);
        StringBuilder text = new StringBuilder();
        for (int i = 0; i + 1 < ring.size(); i++) {
            text.append(i == 0 ? "" : ", ").append(ring.get(i)).append(" depends on ").append(ring.get(i + 1));
        }
        return text.toString();
    }

    private void checkUnits() {
        Map<String, Dimension> known = new HashMap<>();
        for (String name : names) {
            Dimension own = coordinateDimension(name);
            if (own != null) {
                known.put(name, own);
            }
        }
        for (String name : order) {
            Dimension wanted = coordinateDimension(name);
            Dimension low = dimension(from.get(name), known);
            Dimension high = dimension(to.get(name), known);
            if (wanted == null) {
                wanted = low == null ? high : low;
                known.put(name, wanted == null ? Units.NONE : wanted);
            }
            require("lower limit", name, from.get(name), low, wanted);
            require("upper limit", name, to.get(name), high, wanted);
        }
        for (Map.Entry<String, Formula> e : fixed.entrySet()) {
            require("fixed value", e.getKey(), e.getValue(), dimension(e.getValue(), known), coordinateDimension(e.getKey()));
        }
    }

    /** Dimension of a formula, null for a bare 0 or inf, which fits any. */
    private static Dimension dimension(Formula f, Map<String, Dimension> known) {
        return f.variables().isEmpty() && f.fitsAnyUnit() ? null : f.dimension(known);
    }

    private void require(String what, String name, Formula f, Dimension found, Dimension wanted) {
        if (found != null && wanted != null && !found.equals(wanted)) {
            throw new AuthorException(title + ": " + what + " of " + name + ", " + f.text() + ", is " + Units.describe(found) + "; "
                + name + " needs " + Units.describe(wanted) + ". Check the formula and its units.");
        }
    }

    /** Dimension of a coordinate of the usual names; null for a parameter, which takes that of its limits. */
    private static Dimension coordinateDimension(String name) {
        return switch (name) {
            case "x", "y", "z", "rho", "r" -> Units.LENGTH;
            case "phi", "theta" -> Units.NONE;
            default -> null;
        };
    }

    Map<String, Dimension> dimensions() {
        Map<String, Dimension> known = new HashMap<>();
        for (String name : names) {
            Dimension own = coordinateDimension(name);
            if (own == null) {
                own = dimension(from.get(name), known);
                own = own == null ? dimension(to.get(name), known) : own;
            }
            known.put(name, own == null ? Units.NONE : own);
        }
        return known;
    }

    String title() {
        return title;
    }

    List<String> names() {
        return names;
    }

    List<String> order() {
        return order;
    }

    Formula from(String name) {
        return from.get(name);
    }

    Formula to(String name) {
        return to.get(name);
    }

    Formula fixed(String name) {
        return fixed.get(name);
    }
}
