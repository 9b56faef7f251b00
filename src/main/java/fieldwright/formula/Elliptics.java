package fieldwright.formula;

import static fieldwright.formula.Node.call;
import static fieldwright.formula.Node.minus;
import static fieldwright.formula.Node.number;
import static fieldwright.formula.Node.over;
import static fieldwright.formula.Node.plus;
import static fieldwright.formula.Node.power;
import static fieldwright.formula.Node.times;

import java.util.List;

/** Derivatives of the elliptic integrals with respect to amplitude, characteristic and parameter; DLMF 19.4, with m = k². */
final class Elliptics {
    private Elliptics() {
    }

    static Node derivative(Function f, int i, List<Node> a) {
        Node m = a.get(a.size() - 1);
        return switch (f) {
            case ELLIPTIC_K -> over(minus(call(Function.ELLIPTIC_E, m), times(complement(m), call(Function.ELLIPTIC_K, m))),
                times(times(number(2), m), complement(m)));
            case ELLIPTIC_E -> over(minus(call(Function.ELLIPTIC_E, m), call(Function.ELLIPTIC_K, m)), times(number(2), m));
            case ELLIPTIC_PI -> i == 0
                ? byCharacteristic(a.get(0), m, call(Function.ELLIPTIC_K, m), call(Function.ELLIPTIC_E, m), call(f, a.get(0), m), number(0))
                : over(minus(call(f, a.get(0), m), over(call(Function.ELLIPTIC_E, m), complement(m))),
                    times(number(2), minus(a.get(0), m)));
            case ELLIPTIC_F_PHI -> i == 0 ? over(number(1), delta(a.get(0), m)) : firstByParameter(a.get(0), m);
            case ELLIPTIC_E_PHI -> i == 0 ? delta(a.get(0), m)
                : over(minus(call(f, a.get(0), m), call(Function.ELLIPTIC_F_PHI, a.get(0), m)), times(number(2), m));
            case ELLIPTIC_PI_PHI -> third(i, a.get(0), a.get(1), m);
            default -> null;
        };
    }

    private static Node firstByParameter(Node phi, Node m) {
        Node e = over(call(Function.ELLIPTIC_E_PHI, phi, m), times(times(number(2), m), complement(m)));
        Node f = over(call(Function.ELLIPTIC_F_PHI, phi, m), times(number(2), m));
        Node end = over(sineTwice(phi), times(times(number(4), complement(m)), delta(phi, m)));
        return minus(minus(e, f), end);
    }

    private static Node third(int i, Node n, Node phi, Node m) {
        Node e = call(Function.ELLIPTIC_E_PHI, phi, m);
        Node pi = call(Function.ELLIPTIC_PI_PHI, n, phi, m);
        Node pole = minus(number(1), times(n, power(call(Function.SIN, phi), 2)));
        if (i == 1) {
            return over(number(1), times(pole, delta(phi, m)));
        }
        if (i == 0) {
            Node end = over(times(times(n, delta(phi, m)), sineTwice(phi)), times(number(2), pole));
            return byCharacteristic(n, m, call(Function.ELLIPTIC_F_PHI, phi, m), e, pi, end);
        }
        Node end = over(times(m, sineTwice(phi)), times(times(number(2), complement(m)), delta(phi, m)));
        return over(plus(minus(pi, over(e, complement(m))), end), times(number(2), minus(n, m)));
    }

    /** (E + (m-n) F/n + (n²-m) Π/n - end) / (2 (m-n)(n-1)). */
    private static Node byCharacteristic(Node n, Node m, Node f, Node e, Node pi, Node end) {
        Node first = over(times(minus(m, n), f), n);
        Node last = over(times(minus(power(n, 2), m), pi), n);
        Node top = minus(plus(plus(e, first), last), end);
        return over(top, times(times(number(2), minus(m, n)), minus(n, number(1))));
    }

    private static Node complement(Node m) {
        return minus(number(1), m);
    }

    private static Node delta(Node phi, Node m) {
        return call(Function.SQRT, minus(number(1), times(m, power(call(Function.SIN, phi), 2))));
    }

    private static Node sineTwice(Node phi) {
        return call(Function.SIN, times(number(2), phi));
    }
}
