package fieldwright.quantity;

/** A place in the sheet's frame; metres. Angles in radian, from the x axis and from the z axis. */
public record Place(double x, double y, double z) {
    public Place {
        if (!Double.isFinite(x) || !Double.isFinite(y) || !Double.isFinite(z)) {
            throw new AuthorException("place (" + x + ", " + y + ", " + z + ") m: coordinates must be finite.");
        }
    }

    public static Place cylindrical(double rho, double phi, double z) {
        return new Place(rho * Math.cos(phi), rho * Math.sin(phi), z);
    }

    public static Place spherical(double r, double theta, double phi) {
        double rho = r * Math.sin(theta);
        return new Place(rho * Math.cos(phi), rho * Math.sin(phi), r * Math.cos(theta));
    }

    /** Distance from the z axis, m. */
    public double rho() {
        return Math.hypot(x, y);
    }

    /** Azimuth in (-pi, pi]; 0 on the axis. */
    public double phi() {
        return Math.atan2(y, x);
    }

    /** Distance from the origin, m. */
    public double r() {
        return Math.hypot(rho(), z);
    }

    /** Polar angle in [0, pi]; 0 at the origin. */
    public double theta() {
        return Math.atan2(rho(), z);
    }
}
