package fieldwright.words;

import fieldwright.formula.Coordinates;
import fieldwright.formula.Formula;
import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Place;
import fieldwright.quantity.Vector;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.function.Function;
import java.util.function.Supplier;
import java.util.stream.Stream;

/** One line of a profile: what to ask of which charge, or a formula of the coordinates. Immutable. */
public final class Curve {
    private static final List<String> PARTS = List.of("x", "y", "z", "rho", "phi", "r", "theta");

    private final String label;
    private final String asked;
    private final Along along;
    private final Supplier<Function<List<Place>, List<Amount>>> sampling;

    private Curve(String label, String asked, Along along, Supplier<Function<List<Place>, List<Amount>>> sampling) {
        this.label = label;
        this.asked = asked;
        this.along = along;
        this.sampling = sampling;
    }

    /** Values along a path. A place where the value jumps has two, in the order of the path. */
    interface Along {
        List<List<Amount>> values(List<Path.Stop> stops);
    }

    String label() {
        return label;
    }

    /** What stands on the y axis: {@code E_z}, {@code V}, or empty for a formula. */
    String asked() {
        return asked;
    }

    List<List<Amount>> values(List<Path.Stop> stops) {
        return along.values(stops);
    }

    /** @param ask {@code "|E|"}, {@code "E_z"}, {@code "D_rho"}, … or {@code "V"} */
    static Curve of(String label, Distribution charge, String ask) {
        if (ask.equals("V")) {
            return new Curve(label, "V", stops -> each(charge.potentials(places(stops))), charge::potentialSampling);
        }
        boolean size = ask.equals("|E|") || ask.equals("|D|");
        String component = ask.length() > 2 ? ask.substring(2) : "";
        if (!size && !(ask.matches("[ED]_.*") && PARTS.contains(component))) {
            throw new AuthorException("curve '" + label + "' asks for '" + ask + "'. Ask for \"|E|\", \"E_z\" (or x, y, rho, phi, r, theta),"
                    + " the same with D, or \"V\".");
        }
        boolean displacement = ask.contains("D");
        return new Curve(label, ask, stops -> {
            List<Vector> fields = displacement ? charge.fluxDensities(places(stops)) : charge.electricFields(places(stops));
            List<List<Amount>> values = new ArrayList<>();
            for (int i = 0; i < stops.size(); i++) {
                values.add(sides(fields.get(i), stops, i, component));
            }
            return values;
        }, () -> {
            Function<List<Place>, List<Vector>> fields = charge.fieldSampling(displacement);
            return places -> fields.apply(places).stream().map(field -> single(field, component)).toList();
        });
    }

    static Curve of(String label, Object formula) {
        Formula bound = Given.formula("curve '" + label + "'", formula);
        return new Curve(label, "", stops -> stops.stream().map(stop -> List.of(at(stop.place(), bound))).toList(),
                () -> places -> places.stream().map(place -> at(place, bound)).toList());
    }

    /** What is drawn of it: what was asked, or the label of a formula. */
    String quantity() {
        return asked.isEmpty() ? label : asked;
    }

    /** Values at any places, one each; keeps what serves the next places. On a charged surface the larger side counts. */
    Function<List<Place>, List<Amount>> sampling() {
        return sampling.get();
    }

    private static Amount single(Vector field, String component) {
        if (!field.isSided()) {
            return part(field, component);
        }
        Amount plus = part(field.plusSide(), component);
        Amount minus = part(field.minusSide(), component);
        return Math.abs(plus.si()) >= Math.abs(minus.si()) ? plus : minus;
    }

    private static List<Place> places(List<Path.Stop> stops) {
        return stops.stream().map(Path.Stop::place).toList();
    }

    private static List<List<Amount>> each(List<Amount> amounts) {
        return amounts.stream().map(List::of).toList();
    }

    /**
     * On a charged surface the side the path comes from and the side it goes to; at an end, the one side there is. Along a
     * conductor the side that has a field.
     */
    private static List<Amount> sides(Vector field, List<Path.Stop> stops, int i, String component) {
        if (!field.isSided()) {
            return List.of(part(field, component));
        }
        List<Amount> values = new ArrayList<>();
        for (int neighbour : new int[] {i - 1, i + 1}) {
            if (neighbour >= 0 && neighbour < stops.size()) {
                Place here = field.place();
                Place there = stops.get(neighbour).place();
                double[] way = {there.x() - here.x(), there.y() - here.y(), there.z() - here.z()};
                if (!runsAlong(field.normal(), way)) {
                    values.add(part(field.onSide(way[0], way[1], way[2]), component));
                }
            }
        }
        return values.isEmpty() ? List.of(part(outsideConductor(field), component)) : values;
    }

    private static boolean runsAlong(double[] normal, double[] way) {
        double across = normal[0] * way[0] + normal[1] * way[1] + normal[2] * way[2];
        return Math.abs(across) < 1e-6 * Math.hypot(Math.hypot(way[0], way[1]), way[2]);
    }

    private static Vector outsideConductor(Vector field) {
        if (isNothing(field.plusSide()) || isNothing(field.minusSide())) {
            return isNothing(field.plusSide()) ? field.minusSide() : field.plusSide();
        }
        throw new AuthorException("a path runs along a charged surface, where the field has two values. Move it a little to one side.");
    }

    /** Inside a conductor the field is exactly zero. */
    private static boolean isNothing(Vector field) {
        return Stream.of(field.x(), field.y(), field.z()).allMatch(c -> c.si() == 0 && c.error() == 0);
    }

    private static Amount part(Vector v, String component) {
        return switch (component) {
            case "x" -> v.x();
            case "y" -> v.y();
            case "z" -> v.z();
            case "rho" -> v.rho();
            case "phi" -> v.phi();
            case "r" -> v.r();
            case "theta" -> v.theta();
            default -> v.magnitude();
        };
    }

    private static Amount at(Place p, Formula formula) {
        Map<String, Amount> values = new LinkedHashMap<>();
        double[] coordinates = {p.x(), p.y(), p.z(), p.rho(), p.phi(), p.r(), p.theta()};
        for (int i = 0; i < PARTS.size(); i++) {
            values.put(PARTS.get(i), Amount.si(coordinates[i], 0, Coordinates.DIMENSIONS.get(PARTS.get(i))));
        }
        values.keySet().retainAll(formula.variables());
        return formula.amount(values);
    }
}
