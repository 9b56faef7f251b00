package fieldwright.field;

import java.util.Collection;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Random;
import java.util.Set;

import fieldwright.charge.Charge;
import fieldwright.charge.Source;
import fieldwright.charge.Surroundings;
import fieldwright.formula.Binding;
import fieldwright.formula.Formula;
import fieldwright.formula.Integrator;
import fieldwright.formula.Scope;
import fieldwright.geometry.CoordinateRegion;
import fieldwright.geometry.CoordinateSystem;
import fieldwright.geometry.ParametricRegion;
import fieldwright.geometry.Region;
import fieldwright.quantity.Amount;
import fieldwright.quantity.Place;

/**
 * The twelve work items of the speed table: formulas as a sheet has them, parsed and bound; a region and a place for each.
 * {@code vary} multiplies sizes and coefficients by factors within 10 %, another set for each number; 0 leaves them.
 */
enum Item {
    A(17e-6), B1(26e-6), B2(0.656e-3), B3(2.20e-3), B4(4.66e-3), B5(17.4e-3), C(5.73e-3), D1(1.064e-3), D2(64.9e-3), D3(31.8e-3), E(5.02e-3), F(92);

    /** Seconds the fastest compiled general quadrature needs for it here; taken afresh by its own script. */
    final double peer;

    Item(double peer) {
        this.peer = peer;
    }

    /** Formulas of one variant, parsed once; {@link #source} starts from these. */
    record Parsed(Item item, Map<String, Formula> formulas, double[] at) {
        /** Region, charge and surroundings, made anew. */
        Source source() {
            return Charge.of(item.region(formulas), formulas.get("density")).with(Surroundings.FREE_SPACE);
        }

        /** The place moved by up to 1 % of it in each coordinate that is not zero or on a face. */
        Place place(double a, double b) {
            double fx = 1 + 0.01 * a;
            double fy = 1 + 0.01 * b;
            return switch (item) {
                case A -> {
                    double r = at[0] * (1 + 0.0005 * a);
                    yield new Place(r * Math.cos(5 + 0.01 * b), r * Math.sin(5 + 0.01 * b), at[2] + at[3] * 0.01 * b);
                }
                case D3 -> new Place(at[0] * fx, at[1], at[2]);
                default -> new Place(at[0] * fx, at[1] * fy, at[2] * (1 + 0.01 * (a - b) / 2));
            };
        }
    }

    Parsed parsed(int vary) {
        Random random = new Random(vary);
        double[] f = new double[4];
        for (int i = 0; i < f.length; i++) {
            f[i] = vary == 0 ? 1 : 0.9 + 0.2 * random.nextDouble();
        }
        Map<String, Amount> given = new HashMap<>();
        given.put("a", Amount.of(f[0], "m"));
        given.put("h", Amount.of(f[1], "m"));
        given.put("k", Amount.of(f[2]));
        given.put("l", Amount.of(f[3], "C/m"));
        given.put("s", Amount.of(f[3], "C/m^2"));
        given.put("v", Amount.of(f[3], "C/m^3"));
        Map<String, Formula> formulas = new HashMap<>();
        texts().forEach((name, text) -> formulas.put(name, Formula.parse(text).bind(scope(given), Set.of("t"))));
        double a = f[0];
        double h = f[1];
        double[] at = switch (this) {
            case A -> new double[] {1.05 * a, 0, h, h / 5};
            case B1 -> new double[] {0.3 * a, 0, 1};
            case B2 -> new double[] {0.3 * a, 0, 0.1};
            case B3 -> new double[] {0.3 * a, 0, 0.01};
            case B4 -> new double[] {0.3 * a, 0, 0.001};
            case B5 -> new double[] {0.3 * a, 0, 1e-6};
            case C -> new double[] {0.4 * a, 0.7 * h, 1e-4};
            case D1 -> new double[] {0.3 * a, 0, 2 * h};
            case D2 -> new double[] {0.3 * a, 0, 0.4 * h};
            case D3 -> new double[] {0.3 * a, 0, h};
            case E -> new double[] {2 * a, a, 0.5 * a};
            case F -> new double[] {0, 0.17 * a, 0};
        };
        return new Parsed(this, formulas, at);
    }

    private Map<String, String> texts() {
        return switch (this) {
            case A -> Map.of("x", "a*cos(t)", "y", "a*sin(t)", "z", "h*t/5", "from", "0", "to", "4*pi", "density", "l*(1 + k*t/2)");
            case B1, B2, B3, B4, B5 -> Map.of("zero", "0", "rho", "a", "phi", "2*pi", "z", "0 m", "density", "s*(1 - k*(rho/a)^2)");
            case C -> Map.of("zero", "0", "x", "a", "y", "2*h", "z", "0 m", "density", "s*(k*x*y^2/a^3 + 1)");
            case D1, D2, D3, F -> Map.of("zero", "0", "rho", "a", "phi", "2*pi", "z", "h", "density", "v*(1 - k*(rho/a)^2)");
            case E -> Map.of("-x", "-a", "x", "a", "-y", "-sqrt(a^2 - x^2)", "y", "sqrt(a^2 - x^2)", "-z", "(x^2 + y^2)/a", "z", "a", "density",
                "v*(1 + k*x/a)");
        };
    }

    private Region region(Map<String, Formula> f) {
        return switch (this) {
            case A -> ParametricRegion.of(f.get("x"), f.get("y"), f.get("z")).over("t", f.get("from"), f.get("to"));
            case B1, B2, B3, B4, B5 -> CoordinateRegion.in(CoordinateSystem.CYLINDRICAL).limits("phi", f.get("zero"), f.get("phi"))
                .limits("rho", f.get("zero"), f.get("rho")).fixed("z", f.get("z"));
            case C -> CoordinateRegion.in(CoordinateSystem.CARTESIAN).limits("x", f.get("zero"), f.get("x")).limits("y", f.get("zero"), f.get("y"))
                .fixed("z", f.get("z"));
            case D1, D2, D3, F -> CoordinateRegion.in(CoordinateSystem.CYLINDRICAL).limits("z", f.get("zero"), f.get("z"))
                .limits("phi", f.get("zero"), f.get("phi")).limits("rho", f.get("zero"), f.get("rho"));
            case E -> CoordinateRegion.in(CoordinateSystem.CARTESIAN).limits("x", f.get("-x"), f.get("x")).limits("y", f.get("-y"), f.get("y"))
                .limits("z", f.get("-z"), f.get("z"));
        };
    }

    private static Scope scope(Map<String, Amount> values) {
        return new Scope() {
            @Override
            public Binding lookup(String name) {
                return values.containsKey(name) ? new Binding.Value(values.get(name)) : null;
            }

            @Override
            public Collection<String> names() {
                return values.keySet();
            }

            @Override
            public Integrator integrator() {
                return null;
            }
        };
    }

    static final List<Item> POINTS = List.of(A, B1, B2, B3, B4, B5, C, D1, D2, D3, E);
}
