package fieldwright.field;

import java.util.ArrayList;
import java.util.List;

import fieldwright.charge.Surroundings;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Place;

/** Surroundings as images: the field of an image charge is the charge's own field seen from a mirrored place, mirrored back. */
final class Images {
    private static final double EPS = 1e-15;

    private Images() {
    }

    /** Squares and cubes of longer lengths leave the range of doubles. */
    static final double LONGEST = 1e90;

    /** Errors: AuthorException when the surroundings were not stated, or the place is missing or beyond all reach. */
    static Question question(Surroundings around, Place p) {
        if (p == null) {
            throw new AuthorException("the place is missing (null). Give one, for example at(\"0\", \"0\", \"0.5 m\").");
        }
        if (!(Math.abs(p.x()) <= LONGEST && Math.abs(p.y()) <= LONGEST && Math.abs(p.z()) <= LONGEST)) {
            throw new AuthorException("place (" + p.x() + ", " + p.y() + ", " + p.z() + ") m is more than " + LONGEST
                + " m away, where squares of distances leave the range of numbers. Check the unit prefix.");
        }
        if (around == null) {
            throw new AuthorException("surroundings not stated: say what stands around the charge, for example .inFreeSpace(), .inMedium(\"2.3\") or "
                + ".above(groundPlane(\"z\", \"0\")). Leaving out a grounded wall errs to the unsafe side.");
        }
        if (around instanceof Surroundings.GroundPlane plane) {
            return walled(List.of(new Wall(plane.axis(), plane.offset(), plane.side())), p);
        }
        if (around instanceof Surroundings.GroundedCorner corner) {
            return walled(List.of(new Wall(corner.first()), new Wall(corner.second())), p);
        }
        if (around instanceof Surroundings.DielectricHalfSpace half) {
            return halfSpace(half, p);
        }
        if (around instanceof Surroundings.ConductingSphere sphere) {
            return Spheres.question(sphere, p);
        }
        if (around instanceof Surroundings.GroundedPair pair) {
            double[] low = new double[3];
            double[] high = {Double.POSITIVE_INFINITY, Double.POSITIVE_INFINITY, Double.POSITIVE_INFINITY};
            low[axis(pair.axis())] = pair.from();
            high[axis(pair.axis())] = pair.to();
            return between(low, high, p);
        }
        if (around instanceof Surroundings.GroundedBox b) {
            return between(new double[] {b.x0(), b.y0(), b.z0()}, new double[] {b.x1(), b.y1(), b.z1()}, p);
        }
        if (around instanceof Surroundings.GroundedTube || around instanceof Surroundings.GroundedDrum) {
            return inCylinder(cylinder(around), p);
        }
        if (around instanceof Surroundings.Applied applied) {
            return Applied.question(applied, p);
        }
        return Question.of(View.of(List.of(Probe.direct(p.x(), p.y(), p.z()))), around.permittivity());
    }

    /** Distance to the nearest wall, positive on the charge's side. */
    static double clearance(Surroundings around, double[] p) {
        if (around instanceof Surroundings.GroundPlane g) {
            return loosely(depth(g.axis(), g.offset(), g.side(), p), g.offset());
        }
        if (around instanceof Surroundings.DielectricHalfSpace h) {
            return loosely(depth(h.axis(), h.offset(), h.side(), p), h.offset());
        }
        if (around instanceof Surroundings.GroundedCorner c) {
            return Math.min(clearance(c.first(), p), clearance(c.second(), p));
        }
        if (around instanceof Surroundings.ConductingSphere s) {
            double r = Math.sqrt((p[0] - s.x()) * (p[0] - s.x()) + (p[1] - s.y()) * (p[1] - s.y()) + (p[2] - s.z()) * (p[2] - s.z()));
            return loosely(s.outside() ? r - s.radius() : s.radius() - r, s.radius());
        }
        if (around instanceof Surroundings.GroundedPair g) {
            double at = p[axis(g.axis())];
            return loosely(Math.min(at - g.from(), g.to() - at), Math.abs(g.from()) + Math.abs(g.to()));
        }
        if (around instanceof Surroundings.GroundedBox b) {
            double least = Math.min(Math.min(p[0] - b.x0(), b.x1() - p[0]), Math.min(p[1] - b.y0(), b.y1() - p[1]));
            least = Math.min(least, Math.min(p[2] - b.z0(), b.z1() - p[2]));
            return loosely(least, Math.abs(b.x0()) + Math.abs(b.x1()) + Math.abs(b.y0()) + Math.abs(b.y1()) + Math.abs(b.z0()) + Math.abs(b.z1()));
        }
        if (around instanceof Surroundings.GroundedTube || around instanceof Surroundings.GroundedDrum) {
            RoundGreen.Cylinder c = cylinder(around);
            double ends = c.isTube() ? Double.POSITIVE_INFINITY : Math.min(p[c.axis()] - c.from(), c.to() - p[c.axis()]);
            return loosely(Math.min(c.radius() - c.distance(p), ends), c.radius() + (c.isTube() ? 0 : Math.abs(c.from()) + Math.abs(c.to())));
        }
        if (around instanceof Surroundings.Applied a) {
            return clearance(a.around(), p);
        }
        return 1;
    }

    /** The place on a conductor nearest to p. Errors: AuthorException when there is no conductor. */
    static Place foot(Surroundings around, Place place) {
        double[] p = coordinates(place);
        if (around instanceof Surroundings.Applied a) {
            return foot(a.around(), place);
        }
        if (around instanceof Surroundings.ConductingSphere s) {
            double[] d = {p[0] - s.x(), p[1] - s.y(), p[2] - s.z()};
            double r = Math.sqrt(d[0] * d[0] + d[1] * d[1] + d[2] * d[2]);
            return r == 0 ? new Place(s.x(), s.y(), s.z() + s.radius())
                : new Place(s.x() + s.radius() * (d[0] / r), s.y() + s.radius() * (d[1] / r), s.z() + s.radius() * (d[2] / r));
        }
        List<Place> feet = new ArrayList<>();
        if (around instanceof Surroundings.GroundedTube || around instanceof Surroundings.GroundedDrum) {
            RoundGreen.Cylinder c = cylinder(around);
            double r = c.distance(p);
            double[] q = p.clone();
            for (int k = 1; k < 3; k++) {
                int i = (c.axis() + k) % 3;
                q[i] = c.centre()[i] + (r == 0 ? k == 1 ? c.radius() : 0 : c.radius() * ((p[i] - c.centre()[i]) / r));
            }
            feet.add(new Place(q[0], q[1], q[2]));
            if (!c.isTube()) {
                feet.add(moved(p, c.axis(), c.from()));
                feet.add(moved(p, c.axis(), c.to()));
            }
        }
        for (Wall wall : planes(around)) {
            feet.add(moved(p, axis(wall.axis), wall.offset));
        }
        return feet.stream().min(java.util.Comparator.comparingDouble(f -> distance(f, place))).orElseThrow(() -> new AuthorException(
            "charge on a conductor: there is none in " + around.title() + "."));
    }

    private static List<Wall> planes(Surroundings around) {
        if (around instanceof Surroundings.GroundPlane g) {
            return List.of(new Wall(g));
        }
        if (around instanceof Surroundings.GroundedCorner c) {
            return List.of(new Wall(c.first()), new Wall(c.second()));
        }
        if (around instanceof Surroundings.GroundedPair g) {
            return List.of(new Wall(g.axis(), g.from(), 1), new Wall(g.axis(), g.to(), -1));
        }
        if (around instanceof Surroundings.GroundedBox b) {
            return List.of(new Wall("x", b.x0(), 1), new Wall("x", b.x1(), -1), new Wall("y", b.y0(), 1), new Wall("y", b.y1(), -1),
                new Wall("z", b.z0(), 1), new Wall("z", b.z1(), -1));
        }
        return List.of();
    }

    private static Place moved(double[] p, int axis, double to) {
        double[] q = p.clone();
        q[axis] = to;
        return new Place(q[0], q[1], q[2]);
    }

    static double distance(Place a, Place b) {
        return Math.sqrt((a.x() - b.x()) * (a.x() - b.x()) + (a.y() - b.y()) * (a.y() - b.y()) + (a.z() - b.z()) * (a.z() - b.z()));
    }

    private static double loosely(double distance, double scale) {
        return Math.abs(distance) <= 1e-12 * Math.abs(scale) ? 0 : distance;
    }

    /** A grounded plane; {@code side}: where the field is. */
    private record Wall(String axis, double offset, int side) {
        Wall(Surroundings.GroundPlane plane) {
            this(plane.axis(), plane.offset(), plane.side());
        }
    }

    /** All images in walls that stand at right angles to each other: every wall doubles their number. */
    private static Question walled(List<Wall> walls, Place place) {
        double[] p = coordinates(place);
        Wall touched = null;
        List<Probe> probes = new ArrayList<>(List.of(Probe.direct(p[0], p[1], p[2])));
        for (Wall wall : walls) {
            double s = depth(wall.axis, wall.offset, wall.side, p);
            if (s < 0 || s == 0 && touched != null) {
                return Question.of(View.GROUNDED, 1);   // behind a wall, or in the edge between two
            }
            touched = s == 0 ? wall : touched;
            for (Probe probe : List.copyOf(probes)) {
                probes.add(mirrored(wall.axis, wall.offset, probe, s == 0));
            }
        }
        View here = View.of(probes);
        return touched == null ? Question.of(here, 1) : Question.on(here, normal(touched.axis, touched.side), View.GROUNDED);
    }

    private static Probe mirrored(String axis, double offset, Probe probe, boolean onPlane) {
        int k = axis(axis);
        double[] q = probe.place().clone();
        q[k] = onPlane ? q[k] : 2 * offset - q[k];
        double[] a = probe.a().clone();
        for (int i = 0; i < 3; i++) {
            for (int j = 0; j < 3; j++) {
                a[3 * i + j] *= j == k ? 1 : -1;
            }
        }
        return new Probe(q, a, null, -probe.c());
    }

    /** Between walls across one, two or three axes: the nearest images as probes, all others as a smooth part. */
    private static Question between(double[] low, double[] high, Place place) {
        double[] p = coordinates(place);
        List<Wall> nearest = new ArrayList<>();
        double[] length = new double[3];
        for (int k = 0; k < 3; k++) {
            length[k] = high[k] - low[k];
            if (length[k] < Double.POSITIVE_INFINITY) {
                String axis = "xyz".substring(k, k + 1);
                boolean upper = p[k] - low[k] > length[k] / 2;
                if (depth(axis, upper ? high[k] : low[k], upper ? -1 : 1, p) < 0) {
                    return Question.of(View.GROUNDED, 1);
                }
                nearest.add(new Wall(axis, upper ? high[k] : low[k], upper ? -1 : 1));
            }
        }
        Question q = walled(nearest, place);
        if (q.here().isConductor()) {
            return q;
        }
        View here = q.here().with(new WalledGreen(p, low, length, false))
            .orFar(new WalledGreen(p, low, length, true), WalledGreen.farBeyond(length));
        return new Question(here, 1, q.side(), q.behind(), 1);
    }

    private static RoundGreen.Cylinder cylinder(Surroundings around) {
        if (around instanceof Surroundings.GroundedDrum d) {
            return new RoundGreen.Cylinder(axis(d.axis()), new double[] {d.x(), d.y(), d.z()}, d.radius(), d.from(), d.to());
        }
        Surroundings.GroundedTube t = (Surroundings.GroundedTube) around;
        return new RoundGreen.Cylinder(axis(t.axis()), new double[] {t.x(), t.y(), t.z()}, t.radius(), Double.NEGATIVE_INFINITY,
            Double.POSITIVE_INFINITY);
    }

    /** Within a cylinder: the nearer end as an image, the round wall and the other images as a smooth part. */
    private static Question inCylinder(RoundGreen.Cylinder c, Place place) {
        double[] p = coordinates(place);
        double r = c.distance(p);
        double size = c.radius() + Math.abs(c.centre()[(c.axis() + 1) % 3]) + Math.abs(c.centre()[(c.axis() + 2) % 3]);
        boolean onWall = Math.abs(r - c.radius()) <= 4 * EPS * size;
        if (r > c.radius() && !onWall) {
            return Question.of(View.GROUNDED, 1);
        }
        Question q = Question.of(View.of(List.of(Probe.direct(p[0], p[1], p[2]))), 1);
        if (!c.isTube()) {
            boolean upper = p[c.axis()] - c.from() > (c.to() - c.from()) / 2;
            q = walled(List.of(new Wall("xyz".substring(c.axis(), c.axis() + 1), upper ? c.to() : c.from(), upper ? -1 : 1)), place);
        }
        if (q.here().isConductor() || onWall && q.side() != null) {
            return Question.of(View.GROUNDED, 1);
        }
        View here = q.here().with(RoundGreen.rest(c, p, onWall)).orFar(new RoundGreen(c, p, onWall, true), RoundGreen.farBeyond(c))
            .orRound(new View.Round(c, ball -> RingGreen.parts(c, p, onWall, ball)));
        double[] side = q.side();
        if (onWall) {
            side = new double[3];
            for (int k = 0; k < 3; k++) {
                side[k] = k == c.axis() ? 0 : (c.centre()[k] - p[k]) / r;
            }
        }
        return side == null ? Question.of(here, 1) : Question.on(here, side, View.GROUNDED);
    }

    private static int axis(String name) {
        return "xyz".indexOf(name);
    }

    static double[] coordinates(Place p) {
        return new double[] {p.x(), p.y(), p.z()};
    }

    /** Distance from a plane, positive on the charge's side, 0 within rounding. */
    static double depth(String axis, double offset, int side, double[] p) {
        double at = p[axis(axis)];
        double s = side * (at - offset);
        return Math.abs(s) <= EPS * (Math.abs(at) + Math.abs(offset)) ? 0 : s;
    }

    private static double[] normal(String axis, int side) {
        double[] n = new double[3];
        n[axis(axis)] = side;
        return n;
    }

    /** Image −q(ε₂ − ε₁)/(ε₂ + ε₁) before the interface, q·2ε₁/(ε₁ + ε₂) in place of q behind it. */
    private static Question halfSpace(Surroundings.DielectricHalfSpace d, Place place) {
        double[] p = coordinates(place);
        double s = depth(d.axis(), d.offset(), d.side(), p);
        double k = (d.behind() - d.here()) / (d.behind() + d.here());
        double through = 2 * d.here() / (d.here() + d.behind());
        Probe direct = Probe.direct(p[0], p[1], p[2]);
        List<Probe> before = List.of(direct, mirrored(d.axis(), d.offset(), direct, s == 0).times(k));
        List<Probe> behind = List.of(new Probe(p, new double[] {through, 0, 0, 0, through, 0, 0, 0, through}, null, through));
        if (s > 0) {
            return Question.of(View.of(before), d.here());
        }
        if (s < 0) {
            return new Question(View.of(behind), d.here(), null, null, d.behind());
        }
        return new Question(View.of(before), d.here(), normal(d.axis(), d.side()), View.of(behind), d.behind());
    }
}
