package fieldwright.field.honesty;

import fieldwright.charge.Charge;
import fieldwright.charge.Surroundings;
import fieldwright.formula.Formula;
import fieldwright.formula.Scope;
import fieldwright.geometry.Bodies;
import fieldwright.geometry.CoordinateRegion;
import fieldwright.geometry.CoordinateSystem;
import fieldwright.geometry.ParametricRegion;
import fieldwright.geometry.Region;
import fieldwright.quantity.Place;
import java.util.ArrayList;
import java.util.HashSet;
import java.util.List;
import java.util.Locale;
import java.util.Set;

/** A region as an author would type it: a system with limits, three formulas with parameters, or corners of a polyline or polygon. */
record RegionSpec(String system, List<String[]> entries) {
    /** Coordinates between limits {name, from, to} or held fixed {name, at}. */
    static RegionSpec of(String system, String[]... entries) {
        return new RegionSpec(system, List.of(entries));
    }

    static String[] between(String name, String from, String to) {
        return new String[] {name, from, to};
    }

    static String[] fixed(String name, String at) {
        return new String[] {name, at};
    }

    /** A length that reads back as the same double. */
    static String m(double value) {
        return value < 0 ? "(" + value + " m)" : value + " m";
    }

    static String number(double value) {
        return value < 0 ? "(" + value + ")" : Double.toString(value);
    }

    static Formula formula(String text) {
        return Formula.parse(text).bind(Scope.EMPTY);
    }

    /** Corners in order, m; each of three numbers. */
    static RegionSpec corners(String system, double[]... corners) {
        List<String[]> all = new ArrayList<>();
        for (double[] c : corners) {
            all.add(new String[] {"at", c[0] + " m", c[1] + " m", c[2] + " m"});
        }
        return new RegionSpec(system, all);
    }

    private Place corner(String[] e) {
        double[] c = new double[3];
        for (int i = 0; i < 3; i++) {
            c[i] = Double.parseDouble(e[i + 1].replace(" m", ""));
        }
        return new Place(c[0], c[1], c[2]);
    }

    Region region() {
        if (system.equals("polyline") || system.equals("polygon")) {
            List<Place> corners = entries.stream().map(this::corner).toList();
            return system.equals("polyline") ? Bodies.polyline(corners) : Bodies.polygon(corners);
        }
        if (system.equals("parametric")) {
            Set<String> free = new HashSet<>();
            entries.subList(3, entries.size()).forEach(e -> free.add(e[0]));
            Formula[] x = new Formula[3];
            for (int c = 0; c < 3; c++) {
                x[c] = Formula.parse(entries.get(c)[1]).bind(Scope.EMPTY, free);
            }
            ParametricRegion r = ParametricRegion.of(x[0], x[1], x[2]);
            for (String[] e : entries.subList(3, entries.size())) {
                r = r.over(e[0], formula(e[1]), formula(e[2]));
            }
            return r;
        }
        CoordinateRegion r = CoordinateRegion.in(CoordinateSystem.valueOf(system.toUpperCase(Locale.ROOT)));
        for (String[] e : entries) {
            r = e.length == 2 ? r.fixed(e[0], formula(e[1])) : r.limits(e[0], formula(e[1]), formula(e[2]));
        }
        return r;
    }

    Charge charge(String density, Exact.Placing placing) {
        Region r = region();
        if (placing.angle() != 0) {
            r = r.turnedAbout(placing.axis() == 0 ? 1 : 0, placing.axis() == 1 ? 1 : 0, placing.axis() == 2 ? 1 : 0, placing.angle());
        }
        double[] s = placing.shift();
        if (s[0] != 0 || s[1] != 0 || s[2] != 0) {
            r = r.movedBy(s[0], s[1], s[2]);
        }
        return new Charge(r, formula(density), Surroundings.FREE_SPACE);
    }

    @Override
    public String toString() {
        List<String> parts = new ArrayList<>();
        for (String[] e : entries) {
            parts.add(e.length == 4 ? ".at(\"" + e[1] + "\", \"" + e[2] + "\", \"" + e[3] + "\")" : e.length == 2 ? "." + e[0] + "(\"" + e[1] + "\")" : "." + e[0] + "(\"" + e[1] + "\", \"" + e[2] + "\")");
        }
        return system + "()" + String.join("", parts);
    }
}
