package fieldwright.formula;

import java.util.ArrayList;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Set;

/** Trees on whose zero sets a formula, or a derivative of it, jumps. */
final class Kinks {
    private Kinks() {
    }

    static List<Node> of(Node n) {
        Set<Node> found = new LinkedHashSet<>();
        collect(n, found);
        found.removeIf(k -> Trees.free(k).isEmpty());
        return new ArrayList<>(found);
    }

    private static void collect(Node n, Set<Node> found) {
        if (n instanceof Node.Call c) {
            Node x = c.arguments().get(0);
            switch (c.function()) {
                case ABS, SIGN, CBRT -> found.add(x);
                case MIN, MAX -> found.add(Node.minus(x, c.arguments().get(1)));
                case ATAN2 -> found.add(x);   // the cut along the negative axis
                case FLOOR, CEIL -> found.add(Node.call(Function.SIN, Node.times(new Node.Constant("pi", x.at()), x)));
                default -> { }
            }
        } else if (n instanceof Node.Compare c) {
            found.add(Node.minus(c.left(), c.right()));
        } else if (n instanceof Node.Integral) {
            return;   // an integral is smooth in its parameters but for limits that jump
        } else if (n instanceof Node.Inlined f) {
            collect(f.body(), found);   // outside its condition there is an error, no jump
            return;
        }
        n.children().forEach(c -> collect(c, found));
    }
}
