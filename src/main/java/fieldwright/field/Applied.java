package fieldwright.field;

import fieldwright.charge.Surroundings;
import fieldwright.quantity.Place;

/**
 * A uniform field E₀ applied from far away. V = −E₀·p counted from the origin (in free space or a medium its zero must be named),
 * from the ground plane, or from the plane through the centre of the sphere, which adds its dipole:
 * E₀·n (a³/r² ) to the potential, (a/r)³(3 n(E₀·n) − E₀) to the field (Jackson, Classical Electrodynamics, 3rd ed., 2.5).
 */
final class Applied {
    private Applied() {
    }

    static Question question(Surroundings.Applied applied, Place place) {
        Question q = Images.question(applied.around(), place);
        double[] e = {applied.ex(), applied.ey(), applied.ez()};
        double[] p = Images.coordinates(place);
        if (q.here().isConductor()) {
            return q;
        }
        View here;
        if (applied.around() instanceof Surroundings.GroundPlane plane) {
            int k = "xyz".indexOf(plane.axis());
            here = q.here().plus(e, -e[k] * (p[k] - plane.offset()));
        } else if (applied.around() instanceof Surroundings.ConductingSphere s) {
            here = besideSphere(q, e, new double[] {p[0] - s.x(), p[1] - s.y(), p[2] - s.z()}, s.radius());
        } else {
            here = q.here().plus(e, -dot(e, p));
        }
        return new Question(here, q.permittivity(), q.side(), q.behind(), q.permittivityBehind());
    }

    private static View besideSphere(Question q, double[] e, double[] p, double a) {
        double r = Math.sqrt(dot(p, p));
        double ratio = q.side() == null ? a / r : 1;
        double cube = ratio * ratio * ratio;
        double along = dot(e, p) / r;
        double[] field = new double[3];
        for (int k = 0; k < 3; k++) {
            field[k] = e[k] + cube * (3 * along * p[k] / r - e[k]);
        }
        return q.here().plus(field, -along * r * (1 - cube));
    }

    private static double dot(double[] a, double[] b) {
        return a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
    }
}
