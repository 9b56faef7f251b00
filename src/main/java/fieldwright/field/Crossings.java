package fieldwright.field;

import java.util.ArrayList;
import java.util.List;
import java.util.function.DoubleFunction;

import fieldwright.charge.Charge;
import fieldwright.charge.Source;
import fieldwright.charge.Sources;
import fieldwright.charge.Surroundings;
import fieldwright.formula.BlockFunction;
import fieldwright.formula.Formula;
import fieldwright.geometry.CoordinateRegion;
import fieldwright.geometry.CoordinateSystem;
import fieldwright.geometry.Extent;
import fieldwright.geometry.Frame;
import fieldwright.geometry.PlacedRegion;
import fieldwright.geometry.Region;
import fieldwright.geometry.RegionParts;
import fieldwright.geometry.TriangleRegion;

/**
 * Where a field may have a kink or a jump: at the limits of charged surfaces and volumes, and at walls. Each is given by a margin, a
 * continuous function of the place (m or rad) that is zero there; it may be zero elsewhere too, which only costs a needless cut.
 * Parametric regions have no margins: an integral across them is left to refinement.
 */
final class Crossings {
    /** Zero on a surface, of either sign beside it; NaN where a limit has no value. */
    interface Margin {
        double at(double[] p);
    }

    /** A zero of margin {@code which} at parameter {@code at}. */
    record Root(double at, int which) { }

    private static final int SAMPLES = 64;

    private final List<Margin> margins = new ArrayList<>();

    /** Of charged surfaces and volumes, and of surroundings. */
    static Crossings of(List<Source> sources, Surroundings around) {
        Crossings c = new Crossings();
        sources.forEach(c::add);
        c.add(around);
        return c;
    }

    static Crossings of(Region region) {
        Crossings c = new Crossings();
        c.add(region, Frame.OWN);
        return c;
    }

    static Crossings none() {
        return new Crossings();
    }

    private void add(Source source) {
        if (source instanceof Sources many) {
            many.parts().forEach(this::add);
        } else if (source instanceof Charge charge && charge.region().dimension() > 1) {
            add(charge.region(), Frame.OWN);
        }
    }

    private void add(Surroundings around) {
        if (around instanceof Surroundings.GroundPlane g) {
            add(g.axis(), g.offset());
        } else if (around instanceof Surroundings.DielectricHalfSpace d) {
            add(d.axis(), d.offset());
        } else if (around instanceof Surroundings.ConductingSphere s) {
            double[] centre = {s.x(), s.y(), s.z()};
            margins.add(p -> Vectors.norm(Vectors.minus(p, centre)) - s.radius());
        } else if (around instanceof Surroundings.GroundedCorner c) {
            add(c.first());
            add(c.second());
        } else if (around instanceof Surroundings.GroundedPair p) {
            add(p.axis(), p.from());
            add(p.axis(), p.to());
        } else if (around instanceof Surroundings.GroundedBox b) {
            add("x", b.x0());
            add("x", b.x1());
            add("y", b.y0());
            add("y", b.y1());
            add("z", b.z0());
            add("z", b.z1());
        } else if (around instanceof Surroundings.Applied a) {
            add(a.around());
        }
    }

    private void add(String axis, double offset) {
        int k = "xyz".indexOf(axis);
        margins.add(p -> p[k] - offset);
    }

    private void add(Region region, Frame frame) {
        if (region instanceof PlacedRegion placed) {
            add(placed.inner(), placed.frame().then(frame));
        } else if (region instanceof RegionParts parts) {
            parts.parts().forEach(p -> add(p, frame));
        } else if (region instanceof TriangleRegion t) {
            add(t, frame);
        } else if (region instanceof CoordinateRegion c) {
            c.extents().forEach((name, extent) -> add(c.system(), name, extent, frame));
        }
    }

    private void add(TriangleRegion t, Frame frame) {
        double[][] corner = new double[3][];
        List<List<Double>> own = List.of(t.a(), t.b(), t.c());
        for (int k = 0; k < 3; k++) {
            corner[k] = frame.toSheet(new double[] {own.get(k).get(0), own.get(k).get(1), own.get(k).get(2)});
        }
        double[] n = unit(Vectors.cross(Vectors.minus(corner[1], corner[0]), Vectors.minus(corner[2], corner[0])));
        margins.add(p -> Vectors.dot(n, Vectors.minus(p, corner[0])));
        for (int k = 0; k < 3; k++) {
            double[] from = corner[k];
            double[] across = unit(Vectors.cross(n, Vectors.minus(corner[(k + 1) % 3], from)));
            margins.add(p -> Vectors.dot(across, Vectors.minus(p, from)));
        }
    }

    private static double[] unit(double[] v) {
        double size = Math.sqrt(Vectors.dot(v, v));
        return new double[] {v[0] / size, v[1] / size, v[2] / size};
    }

    private void add(CoordinateSystem system, String name, Extent extent, Frame frame) {
        if (extent instanceof Extent.Fixed held) {
            add(system, name, held.at(), frame);
        } else if (extent instanceof Extent.Limits limits && !isFullTurn(name, limits)) {
            add(system, name, limits.from(), frame);
            add(system, name, limits.to(), frame);
        }
    }

    private static boolean isFullTurn(String name, Extent.Limits limits) {
        return name.equals("phi") && limits.variables().isEmpty()
            && Math.abs(limits.to().compile(List.of()).at() - limits.from().compile(List.of()).at()) > 2 * Math.PI - 1e-12;
    }

    private void add(CoordinateSystem system, String name, Formula limit, Frame frame) {
        int k = system.names().indexOf(name);
        List<String> used = limit.variables().stream().sorted().toList();
        int[] from = used.stream().mapToInt(system.names()::indexOf).toArray();
        BlockFunction f = limit.compile(used);
        if (from.length == 0 && isTrivial(name, f.at())) {
            return;
        }
        double[] args = new double[from.length];
        margins.add(p -> {
            double[] c = coordinates(system, frame.toOwn(p));
            for (int i = 0; i < args.length; i++) {
                args[i] = c[from[i]];
            }
            double margin = c[k] - f.at(args);
            return name.equals("phi") ? Math.sin(margin) : margin;
        });
    }

    /** Ends without a surface: infinity, an axis, an origin, a pole. */
    private static boolean isTrivial(String name, double limit) {
        return Double.isInfinite(limit) || limit == 0 && (name.equals("rho") || name.equals("r") || name.equals("theta"))
            || name.equals("theta") && Math.abs(limit - Math.PI) < 1e-12;
    }

    private static double[] coordinates(CoordinateSystem system, double[] p) {
        double rho = Math.sqrt(p[0] * p[0] + p[1] * p[1]);
        double phi = Math.atan2(p[1], p[0]);
        return switch (system) {
            case CARTESIAN -> p;
            case CYLINDRICAL -> new double[] {rho, phi, p[2]};
            case SPHERICAL -> new double[] {Math.sqrt(rho * rho + p[2] * p[2]), Math.atan2(rho, p[2]), phi};
        };
    }

    boolean isEmpty() {
        return margins.isEmpty();
    }

    int count() {
        return margins.size();
    }

    /** Sign of a margin; 0 on it within rounding. */
    int side(int which, double[] p) {
        double v = margins.get(which).at(p);
        return isOn(v, p) ? 0 : v > 0 ? 1 : v < 0 ? -1 : -2;
    }

    private static boolean isOn(double margin, double[] p) {
        return Math.abs(margin) <= 1e-12 * Vectors.norm(p);
    }

    /** Zeros of all margins within a stretch of a curve, in order; pairs that nearly touch are searched for, ends do not count. */
    List<Root> along(DoubleFunction<double[]> curve, double from, double to) {
        List<Root> roots = new ArrayList<>();
        if (margins.isEmpty() || !(to > from)) {
            return roots;
        }
        double[][] places = new double[SAMPLES + 1][];
        for (int i = 0; i <= SAMPLES; i++) {
            places[i] = curve.apply(from + (to - from) * i / SAMPLES);
        }
        double[] f = new double[SAMPLES + 1];
        for (int m = 0; m < margins.size(); m++) {
            Margin margin = margins.get(m);
            boolean lies = true;
            for (int i = 0; i <= SAMPLES; i++) {
                f[i] = margin.at(places[i]);
                lies &= isOn(f[i], places[i]);
            }
            if (!lies) {
                search(curve, margin, m, f, from, (to - from) / SAMPLES, roots);
            }
        }
        double least = 1e-12 * (to - from);
        roots.removeIf(r -> r.at < from + least || r.at > to - least);
        roots.sort((a, b) -> Double.compare(a.at, b.at));
        return roots;
    }

    private static int sign(double v) {
        return v > 0 ? 1 : v < 0 ? -1 : v == 0 ? 0 : -2;
    }

    private static void search(DoubleFunction<double[]> curve, Margin margin, int which, double[] f, double from, double step, List<Root> roots) {
        for (int i = 0; i < SAMPLES; i++) {
            if (sign(f[i]) != sign(f[i + 1])) {
                if (f[i] != 0) {
                    roots.add(new Root(bisect(curve, margin, from + i * step, from + (i + 1) * step, sign(f[i])), which));
                }
            } else if (i > 0 && sign(f[i - 1]) == sign(f[i]) && Math.abs(f[i]) <= Math.abs(f[i - 1]) && Math.abs(f[i]) <= Math.abs(f[i + 1])) {
                touching(curve, margin, which, f, i, from, step, roots);
            }
        }
    }

    /** A dip towards zero between samples: two zeros when it goes through. */
    private static void touching(DoubleFunction<double[]> curve, Margin margin, int which, double[] f, int i, double from, double step, List<Root> roots) {
        double bend = f[i - 1] - 2 * f[i] + f[i + 1];
        double least = bend == 0 ? f[i] : f[i] - (f[i + 1] - f[i - 1]) * (f[i + 1] - f[i - 1]) / (8 * bend);
        if (sign(least) == sign(f[i]) && Math.abs(least) > 0.3 * Math.abs(f[i])) {
            return;
        }
        double a = from + (i - 1) * step;
        double b = from + (i + 1) * step;
        double golden = 0.3819660112501051;
        for (int k = 0; k < 60 && b - a > 1e-9 * step; k++) {
            double low = a + golden * (b - a);
            double high = b - golden * (b - a);
            double fLow = margin.at(curve.apply(low));
            double fHigh = margin.at(curve.apply(high));
            if (sign(fLow) != sign(f[i]) || sign(fHigh) != sign(f[i])) {
                double middle = sign(fLow) != sign(f[i]) ? low : high;
                roots.add(new Root(bisect(curve, margin, from + (i - 1) * step, middle, sign(f[i])), which));
                roots.add(new Root(bisect(curve, margin, from + (i + 1) * step, middle, sign(f[i])), which));
                return;
            }
            if (Math.abs(fLow) < Math.abs(fHigh)) {
                b = high;
            } else {
                a = low;
            }
        }
    }

    private static double bisect(DoubleFunction<double[]> curve, Margin margin, double start, double end, int sign) {
        double a = start;
        double b = end;
        for (int k = 0; k < 60; k++) {
            double middle = (a + b) / 2;
            if (middle == a || middle == b) {
                break;
            }
            if (sign(margin.at(curve.apply(middle))) == sign) {
                a = middle;
            } else {
                b = middle;
            }
        }
        return (a + b) / 2;
    }
}
