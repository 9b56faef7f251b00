package fieldwright.words;

import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Place;
import fieldwright.quantity.TradeUnit;
import fieldwright.quantity.Units;
import java.util.ArrayList;
import java.util.List;
import java.util.function.DoubleFunction;

/** A path through space and what is drawn along it: a coordinate, or the distance from its start. Immutable. */
public final class Path {
    private final String quantity;
    private final TradeUnit unit;
    private final double from;
    private final double to;
    private final DoubleFunction<Place> place;

    private Path(String quantity, TradeUnit unit, double from, double to, DoubleFunction<Place> place) {
        if (!(from < to)) {
            throw new AuthorException("path along " + quantity + " from " + from + " to " + to + " (SI): the start must lie below the end.");
        }
        this.quantity = quantity;
        this.unit = unit;
        this.from = from;
        this.to = to;
        this.place = place;
    }

    /** Straight, drawn over the distance from its start in m. */
    static Path between(Place start, Place end) {
        double length = Math.hypot(Math.hypot(end.x() - start.x(), end.y() - start.y()), end.z() - start.z());
        return new Path("distance from the start", Units.parse("m"), 0, length, s -> {
            double part = s / length;
            return part >= 1 ? end : new Place(start.x() + part * (end.x() - start.x()), start.y() + part * (end.y() - start.y()),
                    start.z() + part * (end.z() - start.z()));
        });
    }

    /** One coordinate of a place runs, the other two of its system stay. A z is that of cylindrical coordinates too. */
    static Path along(String coordinate, Object from, Object to, Place through) {
        Amount upper = Given.amount("end of the path", to);
        boolean angle = coordinate.equals("phi") || coordinate.equals("theta");
        double a = angle ? Given.plain("start of the path", from) : Given.length("start of the path", from);
        double b = angle ? Given.plain("end of the path", to) : Given.length("end of the path", to);
        TradeUnit unit = Units.parse(upper.shown() != null ? upper.shown() : angle ? "rad" : "m");
        return new Path(coordinate, unit, a, b, runner(coordinate, through));
    }

    private static DoubleFunction<Place> runner(String coordinate, Place p) {
        return switch (coordinate) {
            case "x" -> v -> new Place(v, p.y(), p.z());
            case "y" -> v -> new Place(p.x(), v, p.z());
            case "z" -> v -> new Place(p.x(), p.y(), v);
            case "rho" -> v -> Place.cylindrical(v, p.phi(), p.z());
            case "phi" -> v -> Place.cylindrical(p.rho(), v, p.z());
            case "r" -> v -> Place.spherical(v, p.theta(), p.phi());
            case "theta" -> v -> Place.spherical(p.r(), v, p.phi());
            default -> throw new AuthorException("path along '" + coordinate + "': a path runs along x, y, z, rho, phi, r or theta.");
        };
    }

    String quantity() {
        return quantity;
    }

    String unit() {
        return unit.text();
    }

    double from() {
        return from;
    }

    double to() {
        return to;
    }

    /** Where s (m, or rad) lies. */
    Place place(double s) {
        return place.apply(s);
    }

    /** Evenly spread, both ends among them. */
    List<Stop> stops(int count) {
        List<Stop> stops = new ArrayList<>();
        for (int i = 0; i < count; i++) {
            double s = i == count - 1 ? to : from + (to - from) * i / (count - 1);
            stops.add(new Stop(s / unit.factor(), place.apply(s)));
        }
        return stops;
    }

    /** A place of the path and where it is drawn, in the path's unit. */
    record Stop(double drawnAt, Place place) { }
}
