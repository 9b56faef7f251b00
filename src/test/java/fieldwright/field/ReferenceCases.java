package fieldwright.field;

import java.io.IOException;
import java.io.InputStreamReader;
import java.io.Reader;
import java.nio.charset.StandardCharsets;
import java.util.ArrayList;
import java.util.Collection;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;

import com.google.gson.JsonElement;
import com.google.gson.JsonObject;
import com.google.gson.JsonParser;

import fieldwright.charge.Charge;
import fieldwright.charge.PointCharge;
import fieldwright.charge.Source;
import fieldwright.charge.Sources;
import fieldwright.charge.Surroundings;
import fieldwright.formula.Binding;
import fieldwright.formula.Constants;
import fieldwright.formula.Formula;
import fieldwright.formula.Integrator;
import fieldwright.formula.Scope;
import fieldwright.geometry.CoordinateRegion;
import fieldwright.geometry.CoordinateSystem;
import fieldwright.geometry.ParametricRegion;
import fieldwright.geometry.Region;
import fieldwright.integral.NestedIntegrator;
import fieldwright.quantity.Amount;
import fieldwright.quantity.Place;

/** Reads cases.json into sources, places and values. */
final class ReferenceCases {
    static final Scope NOTHING = new Scope() {
        @Override
        public Binding lookup(String name) {
            return null;
        }

        @Override
        public Collection<String> names() {
            return List.of();
        }

        @Override
        public Integrator integrator() {
            return new NestedIntegrator();
        }
    };

    record Case(String id, String group, Source source, Place place, String side, String quantity, double value, double scale) {
        @Override
        public String toString() {
            return id;
        }
    }

    private ReferenceCases() {
    }

    static List<Case> read(Set<String> groups) {
        List<Case> all = new ArrayList<>();
        try (Reader in = new InputStreamReader(ReferenceCases.class.getResourceAsStream("/fieldwright/reference/cases.json"), StandardCharsets.UTF_8)) {
            for (JsonElement e : JsonParser.parseReader(in).getAsJsonObject().getAsJsonArray("cases")) {
                JsonObject c = e.getAsJsonObject();
                if (groups.contains(c.get("group").getAsString().substring(0, 1))) {
                    all.add(read(c));
                }
            }
        } catch (IOException e) {
            throw new java.io.UncheckedIOException(e);
        }
        return all;
    }

    private static Case read(JsonObject c) {
        List<Source> sources = new ArrayList<>();
        for (JsonElement s : c.getAsJsonArray("sources")) {
            sources.add(source(s.getAsJsonObject()));
        }
        Source source = sources.size() == 1 ? sources.get(0) : new Sources(sources);
        source = source.with(surroundings(c.get("environment")));
        double without = Double.parseDouble(c.get("value_with_eps0_removed").getAsString());
        double value = without * Math.pow(Constants.EPS0, c.get("eps0_exponent").getAsInt());
        double scale = c.has("scale_for_absolute_comparison") ? Double.parseDouble(c.get("scale_for_absolute_comparison").getAsString()) : Math.abs(value);
        JsonObject o = c.getAsJsonObject("observation");
        String side = o.get("type").getAsString().equals("one-sided") ? c.get("quantity").getAsString() : null;
        return new Case(c.get("id").getAsString(), c.get("group").getAsString(), source, place(o), side, c.get("quantity").getAsString(), value, scale);
    }

    private static double number(JsonObject o, String name) {
        return o.has(name) ? Double.parseDouble(o.get(name).getAsString()) : 0;
    }

    private static Place place(JsonObject o) {
        if (!o.has("coordinates")) {
            return null;
        }
        return switch (o.get("coordinates").getAsString()) {
            case "Cartesian" -> new Place(number(o, "x_m"), number(o, "y_m"), number(o, "z_m"));
            default -> Place.spherical(number(o, "r_m"), number(o, "theta_rad"), number(o, "phi_rad"));
        };
    }

    private static Surroundings surroundings(JsonElement e) {
        if (e.isJsonPrimitive()) {
            return Surroundings.FREE_SPACE;
        }
        JsonObject o = e.getAsJsonObject();
        return switch (o.get("type").getAsString()) {
            case "grounded plane" -> new Surroundings.GroundPlane("z", 0, 1);
            case "dielectric half-space" -> new Surroundings.DielectricHalfSpace("z", 0, 1,
                number(o, "relative_permittivity_above"), number(o, "relative_permittivity_below"));
            default -> new Surroundings.GroundedSphere(0, 0, 0, number(o, "radius_m"), true);
        };
    }

    private static Source source(JsonObject s) {
        String kind = s.get("kind").getAsString();
        String density = s.get("density").getAsString();
        if (kind.equals("point")) {
            String[] parts = density.split(" at |[(),]+");
            List<Double> v = new ArrayList<>();
            for (String part : parts) {
                if (!part.isBlank()) {
                    v.add(Double.parseDouble(part.trim()));
                }
            }
            return new PointCharge(new Place(v.get(1), v.get(2), v.get(3)), Amount.of(v.get(0), "C"), null);
        }
        Map<String, String[]> limits = new LinkedHashMap<>();
        for (JsonElement e : s.getAsJsonArray("limits")) {
            JsonObject o = e.getAsJsonObject();
            limits.put(o.get("variable").getAsString(), new String[] {o.get("from").getAsString().replace("infinity", "inf"),
                o.get("to").getAsString().replace("infinity", "inf")});
        }
        Map<String, String> held = new LinkedHashMap<>();
        if (s.has("geometry")) {
            for (String part : s.get("geometry").getAsString().split(",")) {
                String[] sides = part.split("=");
                held.put(sides[0].trim(), sides[1].trim());
            }
        }
        String unit = s.get("density_unit").getAsString();
        CoordinateSystem system = CoordinateSystem.valueOf(s.get("coordinates").getAsString().toUpperCase(java.util.Locale.ROOT));
        if (!system.names().containsAll(limits.keySet())) {
            return parametric(limits, held, density, unit);
        }
        CoordinateRegion region = CoordinateRegion.in(system);
        for (Map.Entry<String, String[]> e : limits.entrySet()) {
            region = region.limits(e.getKey(), coordinate(e.getKey(), e.getValue()[0]), coordinate(e.getKey(), e.getValue()[1]));
        }
        for (Map.Entry<String, String> e : held.entrySet()) {
            region = region.fixed(e.getKey(), coordinate(e.getKey(), e.getValue()));
        }
        return Charge.of(region, Formula.plain(density, "m", unit, NOTHING));
    }

    private static Source parametric(Map<String, String[]> limits, Map<String, String> held, String density, String unit) {
        Set<String> names = new LinkedHashSet<>(limits.keySet());
        ParametricRegion region = ParametricRegion.of(metres(held.get("x"), names), metres(held.get("y"), names), metres(held.get("z"), names));
        for (Map.Entry<String, String[]> e : limits.entrySet()) {
            region = region.over(e.getKey(), plain(e.getValue()[0], names), plain(e.getValue()[1], names));
        }
        return Charge.of((Region) region, plain(density, names).times(Formula.constant(Amount.of(1, unit))));
    }

    private static Formula plain(String text, Set<String> names) {
        return Formula.parse(text).bind(NOTHING, names);
    }

    private static Formula metres(String text, Set<String> names) {
        return plain(text, names).times(Formula.constant(Amount.of(1, "m")));
    }

    static Formula coordinate(String name, String text) {
        boolean angle = name.equals("phi") || name.equals("theta");
        return angle ? Formula.parse(text).bind(NOTHING) : Formula.plain(text, "m", "m", NOTHING);
    }
}
