package fieldwright.charge;

import fieldwright.quantity.AuthorException;

/** What stands around a charge; named always, free space too. Lengths in m. */
public sealed interface Surroundings {
    FreeSpace FREE_SPACE = new FreeSpace();

    /** For assumptions and messages, for example "free space". */
    String title();

    /** Whether a uniform field applied from far away reaches the charge. */
    default boolean isOpen() {
        return false;
    }

    /** Relative permittivity where the charge is. */
    default double permittivity() {
        return 1;
    }

    record FreeSpace() implements Surroundings {
        @Override
        public boolean isOpen() {
            return true;
        }

        @Override
        public String title() {
            return "free space";
        }
    }

    /** Everywhere the same relative permittivity. */
    record Medium(double permittivity) implements Surroundings {
        public Medium {
            requirePermittivity(permittivity);
        }

        @Override
        public boolean isOpen() {
            return true;
        }

        @Override
        public String title() {
            return "uniform medium, relative permittivity " + number(permittivity);
        }
    }

    /**
     * Grounded conducting half-space behind the plane axis = offset; the charge is on the side {@code side} (+1 or −1) of
     * it along the axis ("x", "y" or "z").
     */
    record GroundPlane(String axis, double offset, int side) implements Surroundings {
        public GroundPlane {
            requirePlane(axis, offset, side);
        }

        @Override
        public boolean isOpen() {
            return true;
        }

        @Override
        public String title() {
            return "ground plane " + axis + " = " + number(offset) + " m, charge on the side of " + (side > 0 ? "+" : "-") + axis;
        }
    }

    /**
     * Dielectric half-space behind the plane axis = offset: relative permittivity {@code behind} there and {@code here} on the
     * charge's side.
     */
    record DielectricHalfSpace(String axis, double offset, int side, double here, double behind) implements Surroundings {
        public DielectricHalfSpace {
            requirePlane(axis, offset, side);
            requirePermittivity(here);
            requirePermittivity(behind);
        }

        @Override
        public String title() {
            return "dielectric half-space, relative permittivity " + number(behind) + " behind " + axis + " = " + number(offset) + " m and "
                + number(here) + " on the charge's side (" + (side > 0 ? "+" : "-") + axis + ")";
        }

        @Override
        public double permittivity() {
            return here;
        }
    }

    /** A conducting sphere; the charge is outside it, or inside when it is a thin shell around the charge. */
    sealed interface ConductingSphere extends Surroundings {
        double x();

        double y();

        double z();

        double radius();

        boolean outside();

        /** What its potential is, for the title. */
        String state();

        @Override
        default boolean isOpen() {
            return outside();
        }

        @Override
        default String title() {
            return state() + " sphere of radius " + number(radius()) + " m about (" + number(x()) + ", " + number(y()) + ", " + number(z())
                + ") m, charge " + (outside() ? "outside" : "inside");
        }
    }

    /** At potential zero. */
    record GroundedSphere(double x, double y, double z, double radius, boolean outside) implements ConductingSphere {
        public GroundedSphere {
            requireSphere("grounded", x, y, z, radius);
        }

        @Override
        public String state() {
            return "grounded";
        }
    }

    /** Insulated, with this net charge (C) on it. */
    record FloatingSphere(double x, double y, double z, double radius, boolean outside, double charge) implements ConductingSphere {
        public FloatingSphere {
            requireSphere("floating", x, y, z, radius);
            requireFinite("net charge of the floating sphere", charge, "C");
        }

        @Override
        public String state() {
            return charge == 0 ? "floating uncharged" : "floating (net charge " + charge + " C)";
        }
    }

    /** Held at this potential (V) against infinity. */
    record HeldSphere(double x, double y, double z, double radius, boolean outside, double potential) implements ConductingSphere {
        public HeldSphere {
            requireSphere("conducting", x, y, z, radius);
            requireFinite("potential of the sphere", potential, "V");
        }

        @Override
        public String state() {
            return "conducting (held at " + potential + " V)";
        }
    }

    /** Two grounded planes at right angles; the charge is in the corner, on the side given of each. */
    record GroundedCorner(GroundPlane first, GroundPlane second) implements Surroundings {
        public GroundedCorner {
            if (first.axis().equals(second.axis())) {
                throw new AuthorException("corner of two planes across " + first.axis() + ": they must stand across different axes.");
            }
        }

        @Override
        public String title() {
            return "grounded corner " + side(first) + ", " + side(second);
        }

        private static String side(GroundPlane p) {
            return p.axis() + (p.side() > 0 ? " > " : " < ") + number(p.offset()) + " m";
        }
    }

    /** Two endless grounded planes across an axis, the charge between them. */
    record GroundedPair(String axis, double from, double to) implements Surroundings {
        public GroundedPair {
            requirePlane(axis, from, 1);
            requirePlane(axis, to, 1);
            requireOrder("parallel planes across " + axis, from, to);
        }

        @Override
        public String title() {
            return "grounded parallel planes " + axis + " = " + number(from) + " m and " + axis + " = " + number(to) + " m, charge between";
        }
    }

    /** Closed grounded box with sides across the axes, the charge inside. */
    record GroundedBox(double x0, double x1, double y0, double y1, double z0, double z1) implements Surroundings {
        public GroundedBox {
            requireOrder("grounded box, x", x0, x1);
            requireOrder("grounded box, y", y0, y1);
            requireOrder("grounded box, z", z0, z1);
        }

        @Override
        public String title() {
            return "grounded box x " + number(x0) + " to " + number(x1) + " m, y " + number(y0) + " to " + number(y1) + " m, z " + number(z0)
                + " to " + number(z1) + " m, charge inside";
        }
    }

    /** Endless grounded circular tube about the line along an axis through (x, y, z), the charge inside. */
    record GroundedTube(String axis, double x, double y, double z, double radius) implements Surroundings {
        public GroundedTube {
            requirePlane(axis, x + y + z, 1);
            requireRadius("grounded tube", radius);
        }

        @Override
        public String title() {
            return "grounded tube along " + axis + " through (" + number(x) + ", " + number(y) + ", " + number(z) + ") m, radius " + number(radius)
                + " m, charge inside";
        }
    }

    /** Closed grounded drum: circular cylinder about the line along an axis through (x, y, z), with ends; the charge inside. */
    record GroundedDrum(String axis, double x, double y, double z, double radius, double from, double to) implements Surroundings {
        public GroundedDrum {
            requirePlane(axis, x + y + z, 1);
            requireRadius("grounded drum", radius);
            requireOrder("grounded drum, " + axis, from, to);
        }

        @Override
        public String title() {
            return "grounded drum along " + axis + " through (" + number(x) + ", " + number(y) + ", " + number(z) + ") m, radius " + number(radius)
                + " m, " + axis + " from " + number(from) + " to " + number(to) + " m, charge inside";
        }
    }

    /** With a uniform field (V/m) applied from far away, as it is where the surroundings do not disturb it. */
    record Applied(Surroundings around, double ex, double ey, double ez) implements Surroundings {
        public Applied {
            requireFinite("applied field, x", ex, "V/m");
            requireFinite("applied field, y", ey, "V/m");
            requireFinite("applied field, z", ez, "V/m");
            if (!around.isOpen()) {
                throw new AuthorException("uniform field applied to " + around.title() + ": it is worked in free space, in a uniform medium, before a "
                    + "ground plane and outside a conducting sphere; closed conductors keep it out. Leave it out.");
            }
            if (around instanceof GroundPlane plane) {
                double[] e = {ex, ey, ez};
                e["xyz".indexOf(plane.axis())] = 0;
                if (e[0] != 0 || e[1] != 0 || e[2] != 0) {
                    throw new AuthorException("uniform field (" + ex + ", " + ey + ", " + ez + ") V/m before " + around.title()
                        + ": it must stand normal to the conducting plane, along " + plane.axis() + " only.");
                }
            }
        }

        /** Whether a conductor or its centre gives the potential a zero. */
        public boolean hasZero() {
            return around instanceof GroundPlane || around instanceof ConductingSphere;
        }

        @Override
        public double permittivity() {
            return around.permittivity();
        }

        @Override
        public String title() {
            return around.title() + ", with a uniform field (" + ex + ", " + ey + ", " + ez + ") V/m applied";
        }
    }

    private static void requireSphere(String kind, double x, double y, double z, double radius) {
        if (!(radius > 0) || !Double.isFinite(radius + x + y + z)) {
            throw new AuthorException(kind + " sphere of radius " + radius + " m about (" + x + ", " + y + ", " + z
                + ") m: the radius must be > 0 and all numbers finite.");
        }
    }

    private static void requireRadius(String what, double radius) {
        if (!(radius > 0) || !Double.isFinite(radius)) {
            throw new AuthorException(what + " of radius " + radius + " m: must be finite and > 0.");
        }
    }

    private static void requireOrder(String what, double from, double to) {
        if (!(from < to) || !Double.isFinite(to - from)) {
            throw new AuthorException(what + " from " + from + " m to " + to + " m: the first must be less than the second, both finite.");
        }
    }

    private static void requireFinite(String what, double value, String unit) {
        if (!Double.isFinite(value)) {
            throw new AuthorException(what + " = " + value + " " + unit + ": must be finite.");
        }
    }

    private static void requirePlane(String axis, double offset, int side) {
        if (!"x".equals(axis) && !"y".equals(axis) && !"z".equals(axis)) {
            throw new AuthorException("plane across axis '" + axis + "': a plane stands across x, y or z.");
        }
        if (!Double.isFinite(offset)) {
            throw new AuthorException("plane " + axis + " = " + offset + " m: the offset must be finite.");
        }
        if (side != 1 && side != -1) {
            throw new AuthorException("plane " + axis + " = " + offset + " m: side " + side + " must be +1 or -1.");
        }
    }

    private static void requirePermittivity(double e) {
        if (!(e > 0) || !Double.isFinite(e)) {
            throw new AuthorException("relative permittivity " + e + ": must be finite and > 0; 1 is vacuum.");
        }
    }

    private static String number(double v) {
        return v == Math.rint(v) && Math.abs(v) < 1e9 ? Long.toString((long) v) : Double.toString(v);
    }
}
