package fieldwright.words;

import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Place;
import fieldwright.quantity.TradeUnit;
import fieldwright.quantity.Units;
import java.util.List;

/** A rectangle of places to be drawn: two coordinates run, the others stay. Immutable. */
public final class Window {
    private static final List<String> COORDINATES = List.of("x", "y", "z", "rho");

    private final String across;
    private final String up;
    private final double[] limits;
    private final TradeUnit acrossUnit;
    private final TradeUnit upUnit;
    private final Place through;

    private Window(String across, String up, double[] limits, TradeUnit acrossUnit, TradeUnit upUnit, Place through) {
        this.across = across;
        this.up = up;
        this.limits = limits;
        this.acrossUnit = acrossUnit;
        this.upUnit = upUnit;
        this.through = through;
    }

    static Window of(String across, Object from, Object to, String up, Object bottom, Object top, Place through) {
        boolean fit = COORDINATES.contains(across) && COORDINATES.contains(up) && !across.equals(up)
                && (!across.equals("rho") || up.equals("z")) && (!up.equals("rho") || across.equals("z"));
        if (!fit) {
            throw new AuthorException("window over '" + across + "' and '" + up + "': two of \"x\", \"y\", \"z\", or \"rho\" with \"z\".");
        }
        double[] limits = {Given.length("window, " + across + " from", from), Given.length("window, " + across + " to", to),
            Given.length("window, " + up + " from", bottom), Given.length("window, " + up + " to", top)};
        requireOrder(across, limits[0], limits[1]);
        requireOrder(up, limits[2], limits[3]);
        return new Window(across, up, limits, unit(to), unit(top), through);
    }

    private static void requireOrder(String coordinate, double from, double to) {
        if (!(from < to) || Double.isInfinite(to - from) || coordinate.equals("rho") && from < 0) {
            throw new AuthorException("window, " + coordinate + " from " + from + " m to " + to + " m: the lower end comes first, both are finite"
                    + (coordinate.equals("rho") ? ", and rho is not negative." : "."));
        }
    }

    private static TradeUnit unit(Object given) {
        Amount amount = Given.amount("window", given);
        return Units.parse(amount.shown() != null ? amount.shown() : "m");
    }

    String across() {
        return across;
    }

    String up() {
        return up;
    }

    TradeUnit acrossUnit() {
        return acrossUnit;
    }

    TradeUnit upUnit() {
        return upUnit;
    }

    /** Left, right, bottom, top; m. */
    double[] limits() {
        return limits.clone();
    }

    double size() {
        return Math.max(limits[1] - limits[0], limits[3] - limits[2]);
    }

    /** The place with these two coordinates, m. */
    Place at(double u, double v) {
        double x = across.equals("x") ? u : up.equals("x") ? v : through.x();
        double y = across.equals("y") ? u : up.equals("y") ? v : through.y();
        double z = across.equals("z") ? u : up.equals("z") ? v : through.z();
        if (across.equals("rho") || up.equals("rho")) {
            return Place.cylindrical(across.equals("rho") ? u : v, through.phi(), z);
        }
        return new Place(x, y, z);
    }

    /** The two coordinates of a place, seen square to the window. */
    double[] seen(Place p) {
        return new double[] {coordinate(across, p), coordinate(up, p)};
    }

    private static double coordinate(String name, Place p) {
        return switch (name) {
            case "x" -> p.x();
            case "y" -> p.y();
            case "z" -> p.z();
            default -> p.rho();
        };
    }

    boolean holds(double[] seen) {
        return seen[0] >= limits[0] && seen[0] <= limits[1] && seen[1] >= limits[2] && seen[1] <= limits[3];
    }
}
