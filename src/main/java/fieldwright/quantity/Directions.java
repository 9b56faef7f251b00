package fieldwright.quantity;

import java.util.Locale;

/** Directions named by a sign and a coordinate: "+z", "-rho", "+r". */
public final class Directions {
    private Directions() {
    }

    /** Unit vector at the place. Errors: {@link AuthorException} for another text, or where the direction is not defined. */
    public static double[] at(Place place, String text) {
        String t = text.strip().replace('\u2212', '-');
        double sign = t.startsWith("-") ? -1 : 1;
        String name = t.startsWith("-") || t.startsWith("+") ? t.substring(1).strip() : t;
        double rho = place.rho();
        double r = place.r();
        double[] d = switch (name) {
            case "x" -> new double[] {1, 0, 0};
            case "y" -> new double[] {0, 1, 0};
            case "z" -> new double[] {0, 0, 1};
            case "rho" -> new double[] {place.x() / rho, place.y() / rho, 0};
            case "phi" -> new double[] {-place.y() / rho, place.x() / rho, 0};
            case "r" -> new double[] {place.x() / r, place.y() / r, place.z() / r};
            case "theta" -> new double[] {place.z() / r * place.x() / rho, place.z() / r * place.y() / rho, -rho / r};
            default -> throw new AuthorException("direction '" + text + "': write a sign and a coordinate, such as +z, -x, +rho, -r.");
        };
        if (Double.isNaN(d[0] + d[1] + d[2])) {
            throw new AuthorException("direction '" + text + "' is not defined at (" + place.x() + ", " + place.y() + ", " + place.z()
                + ") m. Use +x, +y or +z.");
        }
        return new double[] {sign * d[0] + 0.0, sign * d[1] + 0.0, sign * d[2] + 0.0};
    }

    /** The Cartesian direction closest to a vector, "+z" style. */
    static String nearest(double[] v) {
        int best = 2;
        for (int i = 0; i < 3; i++) {
            best = Math.abs(v[i]) > Math.abs(v[best]) ? i : best;
        }
        return (v[best] < 0 ? "-" : "+") + "xyz".charAt(best);
    }

    static String text(double[] v) {
        return String.format(Locale.ROOT, "(%.4g, %.4g, %.4g)", v[0], v[1], v[2]);
    }
}
