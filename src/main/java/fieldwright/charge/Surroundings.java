package fieldwright.charge;

import fieldwright.quantity.AuthorException;

/** What stands around a charge; named always, free space too. Lengths in m. */
public sealed interface Surroundings {
    FreeSpace FREE_SPACE = new FreeSpace();

    /** For assumptions and messages, for example "free space". */
    String title();

    /** Relative permittivity where the charge is. */
    default double permittivity() {
        return 1;
    }

    record FreeSpace() implements Surroundings {
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

    /** Grounded conducting sphere; the charge is outside it, or inside when it is a shell around the charge. */
    record GroundedSphere(double x, double y, double z, double radius, boolean outside) implements Surroundings {
        public GroundedSphere {
            if (!(radius > 0) || !Double.isFinite(radius + x + y + z)) {
                throw new AuthorException("grounded sphere of radius " + radius + " m about (" + x + ", " + y + ", " + z
                    + ") m: the radius must be > 0 and all numbers finite.");
            }
        }

        @Override
        public String title() {
            return "grounded sphere of radius " + number(radius) + " m about (" + number(x) + ", " + number(y) + ", " + number(z)
                + ") m, charge " + (outside ? "outside" : "inside");
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
