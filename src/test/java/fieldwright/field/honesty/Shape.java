package fieldwright.field.honesty;

import static fieldwright.field.honesty.RegionSpec.between;
import static fieldwright.field.honesty.RegionSpec.fixed;
import static fieldwright.field.honesty.RegionSpec.m;

import java.util.List;
import java.util.Random;

/**
 * One kind of charged region, for the engine (spec) and for the judge (charged), with what a random problem needs of it:
 * points on it with their normals, inside it and on its rims, and a coordinate along which it can be cut in two.
 */
record Shape(String kind, RegionSpec spec, Charged charged, double[] lengths, Cut cut, Spot on, Spot rim, Spot inside) {
    /** A random point and the direction that leads away from the charge there (unit). */
    interface Spot {
        double[][] pick(Random random);
    }

    /** Text of a coordinate function, its unit, where to cut (SI), its value, the parts below and above. */
    record Cut(String text, String unit, double at, SmoothDensity value, Charged below, Charged above) { }

    private static final String TURN = "2*pi";

    static Shape of(Random random) {
        double size = Math.pow(10, -3 + 5 * random.nextDouble());
        double ratio = Math.pow(10, -(random.nextInt(3) == 0 ? 4 : 1) * random.nextDouble());
        boolean flat = random.nextBoolean();
        double a = flat ? size : size * ratio;
        double b = flat ? size * ratio : size;
        return switch (random.nextInt(25)) {
            case 0, 1 -> rod(size, random);
            case 2 -> arc(size, random, true);
            case 3 -> arc(size, random, false);
            case 4, 5 -> helix(a / 2, b, random);
            case 6 -> rectangle(a, b, random);
            case 7 -> triangle(a, b, random);
            case 8 -> annulus(0, size, random);
            case 9 -> annulus(size * (1 - ratio * 0.9), size, random);
            case 10 -> tube(a, b, null, random);
            case 11 -> tube(a, b, new double[] {random.nextDouble() * 3, 3.2 + random.nextDouble() * 3}, random);
            case 12 -> coneSurface(a, b, random);
            case 13 -> bowl(a, b, random);
            case 14 -> zone(size, random);
            case 15 -> box(a, b, random);
            case 16 -> drum(0, a, b, random);
            case 17 -> drum(a * (0.1 + 0.8 * random.nextDouble()), a, b, random);
            case 18 -> ball(size, random);
            case 19 -> shell(size * (1 - ratio * 0.9), size, random.nextBoolean(), random);
            case 20 -> cone(a, b, random);
            case 21 -> polyline(a, b, random);
            case 22 -> polygon(a, b, random);
            case 23 -> torus(size, 0.9 * size * ratio, random);
            default -> heap(a, b, random);
        };
    }

    private static double uniform(Random r, double from, double to) {
        return from + (to - from) * r.nextDouble();
    }

    private static double[] about(double radius, double angle, double z) {
        return new double[] {radius * Math.cos(angle), radius * Math.sin(angle), z};
    }

    private static double angle(Random r) {
        return r.nextInt(4) == 0 ? 0 : uniform(r, -Math.PI, Math.PI);
    }

    // ---- lines

    private static Shape rod(double length, Random random) {
        double from = uniform(random, -1, 0) * length;
        double to = from + length;
        double c = from + uniform(random, 0.2, 0.8) * length;
        return new Shape("rod", RegionSpec.of("cartesian", fixed("x", "0 m"), fixed("y", "0 m"), between("z", m(from), m(to))),
                new Charged.Rod(from, to), new double[] {length, length, length},
                new Cut("z", " m", c, (x, y, z) -> z, new Charged.Rod(from, c), new Charged.Rod(c, to)),
                r -> new double[][] {{0, 0, uniform(r, from, to)}, about(1, angle(r), 0)},
                r -> r.nextBoolean() ? new double[][] {{0, 0, to}, {0.6, 0, 0.8}} : new double[][] {{0, 0, from}, {0, 0, -1}}, null);
    }

    private static Shape arc(double radius, Random random, boolean full) {
        double from = full ? 0 : uniform(random, -3, 0);
        double to = full ? 2 * Math.PI : from + uniform(random, 0.1, 3);
        double c = from + uniform(random, 0.2, 0.8) * (to - from);
        Charged.Coil whole = new Charged.Coil(radius, 0, from, to);
        return new Shape(full ? "ring" : "arc", RegionSpec.of("cylindrical", fixed("rho", m(radius)),
                between("phi", RegionSpec.number(from), full ? TURN : RegionSpec.number(to)), fixed("z", "0 m")), whole,
                new double[] {radius, radius, radius},
                new Cut("phi", "", c, (x, y, z) -> angleFrom(x, y, from, to), new Charged.Coil(radius, 0, from, c),
                        new Charged.Coil(radius, 0, c, to)),
                r -> {
                    double p = uniform(r, from, to);
                    double tilt = angle(r);
                    return new double[][] {whole.at(p), about(Math.cos(tilt), p, Math.sin(tilt))};
                }, full ? null : r -> new double[][] {whole.at(to), about(0.8, to, 0.6)}, null);
    }

    /** Azimuth in the turn that holds [from, to]. */
    private static double angleFrom(double x, double y, double from, double to) {
        double middle = (from + to) / 2;
        double p = Math.atan2(y, x);
        return p - 2 * Math.PI * Math.rint((p - middle) / (2 * Math.PI));
    }

    private static Shape helix(double radius, double pitch, Random random) {
        double rise = pitch / (2 * Math.PI);
        double to = uniform(random, 1, 14);
        Charged.Coil whole = new Charged.Coil(radius, rise, 0, to);
        double t = uniform(random, 0.2, 0.8) * to;
        double c = rise * t;
        return new Shape("helix", RegionSpec.of("parametric", fixed("x", m(radius) + "*cos(t)"), fixed("y", m(radius) + "*sin(t)"),
                fixed("z", m(rise) + "*t"), between("t", "0", RegionSpec.number(to))), whole, new double[] {radius, radius, rise * to},
                new Cut("z", " m", c, (x, y, z) -> z, new Charged.Coil(radius, rise, 0, c / rise), new Charged.Coil(radius, rise, c / rise, to)),
                r -> {
                    double p = uniform(r, 0, to);
                    return new double[][] {whole.at(p), about(r.nextBoolean() ? 1 : -1, p, 0)};
                }, r -> new double[][] {whole.at(to), about(1, to, 0)}, null);
    }

    /** Up z, then along x. */
    private static Shape polyline(double a, double b, Random random) {
        double low = uniform(random, -1, 0) * b;
        double top = low + b;
        Charged.Rod up = new Charged.Rod(low, top);
        Charged.Rod along = new Charged.Rod(0, new double[] {0, 0, top}, 0, a);
        return new Shape("polyline", RegionSpec.corners("polyline", new double[] {0, 0, low}, new double[] {0, 0, top}, new double[] {a, 0, top}),
                new Charged.Several(List.of(up, along), Math.max(a, b), Math.min(a, b)), new double[] {a, a, b}, null,
                r -> {
                    if (r.nextBoolean()) {
                        return new double[][] {{0, 0, uniform(r, low, top)}, about(1, uniform(r, 0.5, 1.5) * Math.PI, 0)};
                    }
                    double[] n = about(1, uniform(r, 0, 1) * Math.PI, 0);
                    return new double[][] {{uniform(r, 0, a), 0, top}, {0, n[0], n[1]}};
                }, r -> r.nextBoolean() ? new double[][] {{0, 0, top}, {-0.6, 0, 0.8}} : new double[][] {{a, 0, top}, {0.8, 0.6, 0}}, null);
    }

    // ---- surfaces

    /** An angle of two rectangles that meet in a corner turned inwards. */
    private static Shape polygon(double a, double b, Random random) {
        double x = uniform(random, 0.2, 0.8) * a;
        double y = uniform(random, 0.2, 0.8) * b;
        return new Shape("polygon", RegionSpec.corners("polygon", new double[] {0, 0, 0}, new double[] {a, 0, 0}, new double[] {a, y, 0},
                new double[] {x, y, 0}, new double[] {x, b, 0}, new double[] {0, b, 0}),
                new Charged.Several(List.of(new Charged.Rectangle(0, a, 0, y), new Charged.Rectangle(0, x, y, b)), Math.max(a, b),
                        Math.min(Math.min(x, a - x), Math.min(y, b - y))), new double[] {a, b, a}, null,
                r -> {
                    double[] p = r.nextBoolean() ? new double[] {uniform(r, 0, a), uniform(r, 0, y), 0} : new double[] {uniform(r, 0, x), uniform(r, y, b), 0};
                    return new double[][] {p, {0, 0, r.nextBoolean() ? 1 : -1}};
                },
                r -> switch (r.nextInt(3)) {
                    case 0 -> new double[][] {{x, y, 0}, {0.48, 0.36, 0.8}};
                    case 1 -> new double[][] {{a, 0, 0}, {0.6, 0, 0.8}};
                    default -> new double[][] {{x, uniform(r, y, b), 0}, {0.8, 0, 0.6}};
                }, null);
    }

    private static Shape torus(double major, double minor, Random random) {
        String distance = "(" + m(major) + "+" + m(minor) + "*cos(beta))";
        return new Shape("torus surface", RegionSpec.of("parametric", fixed("x", distance + "*cos(alpha)"), fixed("y", distance + "*sin(alpha)"),
                fixed("z", m(minor) + "*sin(beta)"), between("alpha", "0", TURN), between("beta", "0", TURN)), new Charged.Torus(major, minor),
                new double[] {major, major, minor}, null,
                r -> {
                    double p = angle(r);
                    double q = angle(r);
                    int s = r.nextBoolean() ? 1 : -1;
                    double[] n = about(s * Math.cos(q), p, s * Math.sin(q));
                    return new double[][] {about(major + minor * Math.cos(q), p, minor * Math.sin(q)), n};
                }, null, null);
    }

    private static Shape rectangle(double a, double b, Random random) {
        double x1 = uniform(random, -1, 0) * a;
        double y1 = uniform(random, -1, 0) * b;
        double x2 = x1 + a;
        double y2 = y1 + b;
        double c = x1 + uniform(random, 0.2, 0.8) * a;
        return new Shape("rectangle", RegionSpec.of("cartesian", between("x", m(x1), m(x2)), between("y", m(y1), m(y2)), fixed("z", "0 m")),
                new Charged.Rectangle(x1, x2, y1, y2), new double[] {a, b, a},
                new Cut("x", " m", c, (x, y, z) -> x, new Charged.Rectangle(x1, c, y1, y2), new Charged.Rectangle(c, x2, y1, y2)),
                r -> new double[][] {{uniform(r, x1, x2), uniform(r, y1, y2), 0}, {0, 0, r.nextBoolean() ? 1 : -1}},
                r -> r.nextInt(3) == 0 ? new double[][] {{x2, y2, 0}, {0.6, 0, 0.8}}
                        : new double[][] {{x2, uniform(r, y1, y2), 0}, about(Math.cos(angleValue(r)), 0, 0.6)}, null);
    }

    private static double angleValue(Random r) {
        return r.nextBoolean() ? Math.acos(0.8) : Math.acos(-0.8);
    }

    private static Shape triangle(double a, double b, Random random) {
        double c = uniform(random, 0.2, 0.8) * a;
        return new Shape("triangle", RegionSpec.of("cartesian", between("x", "0 m", m(a)), between("y", "0 m", m(b) + "*(1-x/(" + m(a) + "))"),
                fixed("z", "0 m")), new Charged.Triangle(a, b), new double[] {a, b, a}, null,
                r -> {
                    double u = uniform(r, 0.01, 0.98);
                    return new double[][] {{u * a, uniform(r, 0.01, 0.99) * b * (1 - u), 0}, {0, 0, r.nextBoolean() ? 1 : -1}};
                }, r -> r.nextBoolean() ? new double[][] {{0, b, 0}, {0, 0.6, 0.8}} : new double[][] {{c, 0, 0}, {0, -0.6, 0.8}}, null);
    }

    private static Shape annulus(double inner, double outer, Random random) {
        double q = inner + uniform(random, 0.2, 0.8) * (outer - inner);
        double c = q * q;
        double edge = Math.sqrt(c);
        return new Shape(inner == 0 ? "disc" : "annulus", RegionSpec.of("cylindrical", between("rho", m(inner), m(outer)),
                between("phi", "0", TURN), fixed("z", "0 m")), new Charged.Annulus(inner, outer), new double[] {outer, outer, outer},
                new Cut("rho^2", " (m^2)", c, (x, y, z) -> x * x + y * y, new Charged.Annulus(inner, edge),
                        new Charged.Annulus(edge, outer)),
                r -> new double[][] {about(uniform(r, inner, outer), angle(r), 0), {0, 0, r.nextBoolean() ? 1 : -1}},
                r -> {
                    double p = angle(r);
                    boolean out = inner == 0 || r.nextBoolean();
                    return new double[][] {about(out ? outer : inner, p, 0), about(out == r.nextBoolean() ? 0.8 : -0.8, p, 0.6)};
                }, null);
    }

    private static Shape tube(double radius, double height, double[] arc, Random random) {
        double z1 = uniform(random, -1, 0) * height;
        double z2 = z1 + height;
        double c = z1 + uniform(random, 0.2, 0.8) * height;
        return new Shape(arc == null ? "tube" : "tube sector", RegionSpec.of("cylindrical", fixed("rho", m(radius)),
                arc == null ? between("phi", "0", TURN) : between("phi", RegionSpec.number(arc[0]), RegionSpec.number(arc[1])),
                between("z", m(z1), m(z2))), new Charged.Frustum(radius, z1, radius, z2, arc), new double[] {radius, radius, height},
                new Cut("z", " m", c, (x, y, z) -> z, new Charged.Frustum(radius, z1, radius, c, arc),
                        new Charged.Frustum(radius, c, radius, z2, arc)),
                r -> {
                    double p = arc == null ? angle(r) : uniform(r, arc[0], arc[1]);
                    return new double[][] {about(radius, p, uniform(r, z1, z2)), about(r.nextBoolean() ? 1 : -1, p, 0)};
                },
                r -> {
                    double p = arc == null ? angle(r) : arc[r.nextInt(2)];
                    double z = arc == null ? z2 : uniform(r, z1, z2);
                    return new double[][] {about(radius, p, z), about(r.nextBoolean() ? 0.8 : -0.8, p, 0.6)};
                }, null);
    }

    private static Shape coneSurface(double radius, double height, Random random) {
        double slope = radius / height;
        double z1 = random.nextBoolean() ? 0 : height * uniform(random, 0.1, 0.5);
        double c = z1 + uniform(random, 0.2, 0.8) * (height - z1);
        double norm = Math.sqrt(1 + slope * slope);
        return new Shape("cone surface", RegionSpec.of("cylindrical", fixed("rho", RegionSpec.number(slope) + "*z"), between("phi", "0", TURN),
                between("z", m(z1), m(height))), new Charged.Frustum(slope * z1, z1, slope * height, height, null),
                new double[] {radius, radius, height},
                new Cut("z", " m", c, (x, y, z) -> z, new Charged.Frustum(slope * z1, z1, slope * c, c, null),
                        new Charged.Frustum(slope * c, c, slope * height, height, null)),
                r -> {
                    double z = uniform(r, z1 + 0.02 * (height - z1), height);
                    double p = angle(r);
                    int s = r.nextBoolean() ? 1 : -1;
                    return new double[][] {about(slope * z, p, z), about(s / norm, p, -s * slope / norm)};
                },
                r -> new double[][] {about(slope * height, angle(r), height), {0, 0, 1}}, null);
    }

    private static Shape bowl(double radius, double height, Random random) {
        double k = height / (radius * radius);
        double q = uniform(random, 0.2, 0.8) * radius;
        double c = q * q;
        double edge = Math.sqrt(c);
        return new Shape("bowl", RegionSpec.of("cylindrical", between("rho", "0 m", m(radius)), between("phi", "0", TURN),
                fixed("z", RegionSpec.number(k) + " (1/m)*rho^2")), new Charged.Bowl(k, 0, radius), new double[] {radius, radius, height},
                new Cut("rho^2", " (m^2)", c, (x, y, z) -> x * x + y * y, new Charged.Bowl(k, 0, edge),
                        new Charged.Bowl(k, edge, radius)),
                r -> {
                    double rho = uniform(r, 0, radius);
                    double p = angle(r);
                    int s = r.nextBoolean() ? 1 : -1;
                    double norm = Math.sqrt(1 + 4 * k * k * rho * rho);
                    return new double[][] {about(rho, p, k * rho * rho), about(s * 2 * k * rho / norm, p, -s / norm)};
                }, r -> new double[][] {about(radius, angle(r), k * radius * radius), {0, 0, 1}}, null);
    }

    private static Shape zone(double radius, Random random) {
        boolean full = random.nextInt(3) == 0;
        double t1 = full || random.nextBoolean() ? 0 : uniform(random, 0.1, 1.2);
        double t2 = full ? Math.PI : t1 + uniform(random, 0.2, 1.8);
        return new Shape(full ? "sphere" : "zone", RegionSpec.of("spherical", fixed("r", m(radius)),
                between("theta", RegionSpec.number(t1), full ? "pi" : RegionSpec.number(t2)), between("phi", "0", TURN)),
                new Charged.Zone(radius, t1, t2), new double[] {radius, radius, radius}, null,
                r -> {
                    double t = uniform(r, t1, t2);
                    double p = angle(r);
                    int s = r.nextBoolean() ? 1 : -1;
                    return new double[][] {about(radius * Math.sin(t), p, radius * Math.cos(t)), about(s * Math.sin(t), p, s * Math.cos(t))};
                }, full ? null : r -> {
                    double p = angle(r);
                    int s = r.nextBoolean() ? 1 : -1;
                    return new double[][] {about(radius * Math.sin(t2), p, radius * Math.cos(t2)), about(s * Math.sin(t2), p, s * Math.cos(t2))};
                }, null);
    }

    // ---- volumes

    private static Shape box(double a, double b, Random random) {
        double depth = random.nextBoolean() ? a : Math.sqrt(a * b);
        double[] side = {a, depth, b};
        double[] low = new double[3];
        double[] high = new double[3];
        for (int c = 0; c < 3; c++) {
            low[c] = uniform(random, -1, 0) * side[c];
            high[c] = low[c] + side[c];
        }
        double cut = low[0] + uniform(random, 0.2, 0.8) * a;
        return new Shape("box", RegionSpec.of("cartesian", between("x", m(low[0]), m(high[0])), between("y", m(low[1]), m(high[1])),
                between("z", m(low[2]), m(high[2]))), new Charged.Box(low, high), side,
                new Cut("x", " m", cut, (x, y, z) -> x, new Charged.Box(low, new double[] {cut, high[1], high[2]}),
                        new Charged.Box(new double[] {cut, low[1], low[2]}, high)),
                r -> {
                    double[] p = inside(low, high, r);
                    double[] n = new double[3];
                    int c = r.nextInt(3);
                    boolean up = r.nextBoolean();
                    p[c] = up ? high[c] : low[c];
                    n[c] = up ? 1 : -1;
                    return new double[][] {p, n};
                },
                r -> {
                    double[] p = inside(low, high, r);
                    p[0] = high[0];
                    p[1] = high[1];
                    if (r.nextBoolean()) {
                        p[2] = high[2];
                    }
                    return new double[][] {p, {0.6, 0.8, 0}};
                },
                r -> new double[][] {inside(low, high, r), {0, 0, 1}});
    }

    private static double[] inside(double[] low, double[] high, Random r) {
        return new double[] {uniform(r, low[0], high[0]), uniform(r, low[1], high[1]), uniform(r, low[2], high[2])};
    }

    private static Shape drum(double inner, double outer, double height, Random random) {
        double z1 = uniform(random, -1, 0) * height;
        double z2 = z1 + height;
        double cz = z1 + uniform(random, 0.2, 0.8) * height;
        double q = inner + uniform(random, 0.2, 0.8) * (outer - inner);
        double c = q * q;
        double edge = Math.sqrt(c);
        Cut cut = random.nextBoolean()
                ? new Cut("z", " m", cz, (x, y, z) -> z, Charged.Round.drum(inner, outer, z1, cz), Charged.Round.drum(inner, outer, cz, z2))
                : new Cut("rho^2", " (m^2)", c, (x, y, z) -> x * x + y * y, Charged.Round.drum(inner, edge, z1, z2),
                        Charged.Round.drum(edge, outer, z1, z2));
        return new Shape(inner == 0 ? "cylinder" : "hollow cylinder", RegionSpec.of("cylindrical", between("rho", m(inner), m(outer)),
                between("phi", "0", TURN), between("z", m(z1), m(z2))), Charged.Round.drum(inner, outer, z1, z2),
                new double[] {outer, outer, height}, cut,
                r -> {
                    double p = angle(r);
                    if (r.nextBoolean()) {
                        boolean top = r.nextBoolean();
                        return new double[][] {about(uniform(r, inner, outer), p, top ? z2 : z1), {0, 0, top ? 1 : -1}};
                    }
                    boolean out = inner == 0 || r.nextBoolean();
                    return new double[][] {about(out ? outer : inner, p, uniform(r, z1, z2)), about(out ? 1 : -1, p, 0)};
                },
                r -> new double[][] {about(outer, 0, z2), {0.6, 0, 0.8}},
                r -> new double[][] {about(uniform(r, inner, outer), angle(r), uniform(r, z1, z2)), {0, 0, 1}});
    }

    private static double[] direction(Random r) {
        double c = uniform(r, -1, 1);
        return about(Math.sqrt(1 - c * c), angle(r), c);
    }

    private static double[] times(double f, double[] v) {
        return new double[] {f * v[0], f * v[1], f * v[2]};
    }

    private static Shape ball(double radius, Random random) {
        boolean cartesian = random.nextBoolean();
        double q = uniform(random, 0.2, 0.8) * radius;
        double c = q * q;
        double edge = Math.sqrt(c);
        String square = RegionSpec.number(radius) + " m*" + RegionSpec.number(radius) + " m";
        RegionSpec spec = cartesian
                ? RegionSpec.of("cartesian", between("x", m(-radius), m(radius)),
                        between("y", "-sqrt((" + m(radius) + "-x)*(" + m(radius) + "+x))", "sqrt((" + m(radius) + "-x)*(" + m(radius) + "+x))"),
                        between("z", "-sqrt(" + square + "-x^2-y^2)", "sqrt(" + square + "-x^2-y^2)"))
                : RegionSpec.of("spherical", between("r", "0 m", m(radius)), between("theta", "0", "pi"), between("phi", "0", TURN));
        Cut cut = cartesian ? null : new Cut("r^2", " (m^2)", c, (x, y, z) -> x * x + y * y + z * z,
                Charged.Round.shell(0, edge, false), Charged.Round.shell(edge, radius, false));
        if (random.nextInt(3) == 0) {
            double plane = uniform(random, -0.6, 0.6) * radius;
            cut = new Cut("z", " m", plane, (x, y, z) -> z, Charged.Round.slice(radius, -radius, plane), Charged.Round.slice(radius, plane, radius));
        }
        return new Shape(cartesian ? "ball in xyz" : "ball", spec, Charged.Round.shell(0, radius, false), new double[] {radius, radius, radius},
                cut, r -> {
                    double[] d = direction(r);
                    return new double[][] {times(radius, d), d};
                }, null, r -> new double[][] {times(radius * r.nextDouble(), direction(r)), {0, 0, 1}});
    }

    private static Shape shell(double inner, double outer, boolean upper, Random random) {
        double q = inner + uniform(random, 0.2, 0.8) * (outer - inner);
        double c = q * q;
        double edge = Math.sqrt(c);
        return new Shape(upper ? "half shell" : "thick shell", RegionSpec.of("spherical", between("r", m(inner), m(outer)),
                between("theta", "0", upper ? "pi/2" : "pi"), between("phi", "0", TURN)), Charged.Round.shell(inner, outer, upper),
                new double[] {outer, outer, outer},
                new Cut("r^2", " (m^2)", c, (x, y, z) -> x * x + y * y + z * z, Charged.Round.shell(inner, edge, upper),
                        Charged.Round.shell(edge, outer, upper)),
                r -> {
                    double[] d = direction(r);
                    d[2] = upper ? Math.abs(d[2]) : d[2];
                    if (upper && r.nextInt(3) == 0) {
                        return new double[][] {about(uniform(r, inner, outer), angle(r), 0), {0, 0, -1}};
                    }
                    boolean out = r.nextBoolean();
                    return new double[][] {times(out ? outer : inner, d), times(out ? 1 : -1, d)};
                },
                upper ? r -> new double[][] {about(outer, angle(r), 0), {0, 0, -1}} : null,
                r -> {
                    double[] d = direction(r);
                    d[2] = upper ? Math.abs(d[2]) : d[2];
                    return new double[][] {times(uniform(r, inner, outer), d), {0, 0, 1}};
                });
    }

    private static Shape cone(double radius, double height, Random random) {
        double slope = radius / height;
        double c = uniform(random, 0.2, 0.8) * height;
        double norm = Math.sqrt(1 + slope * slope);
        return new Shape("cone", RegionSpec.of("cylindrical", between("z", "0 m", m(height)), between("phi", "0", TURN),
                between("rho", "0 m", RegionSpec.number(slope) + "*z")), Charged.Round.cone(slope, 0, height), new double[] {radius, radius, height},
                new Cut("z", " m", c, (x, y, z) -> z, Charged.Round.cone(slope, 0, c), Charged.Round.cone(slope, c, height)),
                r -> {
                    double p = angle(r);
                    if (r.nextBoolean()) {
                        return new double[][] {about(uniform(r, 0, radius), p, height), {0, 0, 1}};
                    }
                    double z = uniform(r, 0.02, 1) * height;
                    return new double[][] {about(slope * z, p, z), about(1 / norm, p, -slope / norm)};
                },
                r -> r.nextBoolean() ? new double[][] {{0, 0, 0}, {0, 0, -1}} : new double[][] {about(slope * height, angle(r), height), {0, 0, 1}},
                r -> {
                    double z = uniform(r, 0.05, 1) * height;
                    return new double[][] {about(slope * z * Math.sqrt(r.nextDouble()), angle(r), z), {0, 0, 1}};
                });
    }

    private static Shape heap(double radius, double height, Random random) {
        double k = height / (radius * radius);
        boolean cartesian = random.nextBoolean();
        double rim = Math.sqrt(height / k);
        RegionSpec spec = cartesian
                ? RegionSpec.of("cartesian", between("x", m(-radius), m(radius)),
                        between("y", "-sqrt((" + m(radius) + "-x)*(" + m(radius) + "+x))", "sqrt((" + m(radius) + "-x)*(" + m(radius) + "+x))"),
                        between("z", RegionSpec.number(k) + " (1/m)*(x^2+y^2)", m(height)))
                : RegionSpec.of("cylindrical", between("rho", "0 m", m(radius)), between("phi", "0", TURN),
                        between("z", RegionSpec.number(k) + " (1/m)*rho^2", m(height)));
        return new Shape(cartesian ? "heap in xyz" : "heap", spec, Charged.Round.heap(k, height), new double[] {radius, radius, height}, null,
                r -> {
                    double p = angle(r);
                    double rho = uniform(r, 0, radius);
                    if (r.nextBoolean()) {
                        return new double[][] {about(rho, p, height), {0, 0, 1}};
                    }
                    double norm = Math.sqrt(1 + 4 * k * k * rho * rho);
                    return new double[][] {about(rho, p, k * rho * rho), about(2 * k * rho / norm, p, -1 / norm)};
                },
                r -> new double[][] {about(rim, angle(r), height), {0, 0, 1}},
                r -> {
                    double rho = uniform(r, 0, 0.98) * radius;
                    return new double[][] {about(rho, angle(r), uniform(r, k * rho * rho, height)), {0, 0, 1}};
                });
    }


    List<Charged> whole() {
        return List.of(charged);
    }
}
