package fieldwright.field.honesty;

import java.util.ArrayList;
import java.util.List;

/** A body as a place sees it: where a ray enters and leaves, and at which directions that changes its form. */
abstract class RayBody {
    /** The place, in the body's frame, and the frame in which the directions are counted: polar axis last. */
    final double[] place;
    final double[][] axes;

    RayBody(double[] place, double[][] axes) {
        this.place = place;
        this.axes = axes;
    }

    /** Azimuths in rad at which the set of crossings changes its form; any order, any period. */
    abstract List<Double> azimuths();

    /** Polar angles in [0, pi] at which the crossings change their form in the half-plane of one azimuth. */
    abstract int polars(double cosA, double sinA, double[] out);

    /** Pairs of distances (in, out), both at least 0, along the ray; number of distances. */
    abstract int crossings(double sinT, double cosT, double cosA, double sinA, double[] out);

    private static double[][] identity() {
        return new double[][] {{1, 0, 0}, {0, 1, 0}, {0, 0, 1}};
    }

    /** x1 to x2, y1 to y2, z1 to z2. */
    static RayBody box(double[] place, double[] low, double[] high) {
        double[] from = new double[3];
        double[] to = new double[3];
        for (int c = 0; c < 3; c++) {
            from[c] = low[c] - place[c];
            to[c] = high[c] - place[c];
        }
        return new RayBody(place, identity()) {
            @Override
            List<Double> azimuths() {
                List<Double> found = new ArrayList<>();
                for (double x : new double[] {from[0], to[0]}) {
                    for (double y : new double[] {from[1], to[1]}) {
                        found.add(Math.atan2(y, x));
                    }
                }
                return found;
            }

            @Override
            int polars(double cosA, double sinA, double[] out) {
                double near = 0;
                double far = Double.POSITIVE_INFINITY;
                for (int c = 0; c < 2; c++) {
                    double u = c == 0 ? cosA : sinA;
                    if (u == 0) {
                        continue;
                    }
                    double r1 = from[c] / u;
                    double r2 = to[c] / u;
                    near = Math.max(near, Math.min(r1, r2));
                    far = Math.min(far, Math.max(r1, r2));
                }
                if (!(far > near)) {
                    return 0;
                }
                int n = 0;
                for (double s : new double[] {near, far}) {
                    out[n++] = Math.atan2(s, from[2]);
                    out[n++] = Math.atan2(s, to[2]);
                }
                return n;
            }

            @Override
            int crossings(double sinT, double cosT, double cosA, double sinA, double[] out) {
                double near = 0;
                double far = Double.POSITIVE_INFINITY;
                for (int c = 0; c < 3; c++) {
                    double u = c == 0 ? sinT * cosA : c == 1 ? sinT * sinA : cosT;
                    if (u == 0) {
                        if (from[c] > 0 || to[c] < 0) {
                            return 0;
                        }
                        continue;
                    }
                    double r1 = from[c] / u;
                    double r2 = to[c] / u;
                    near = Math.max(near, Math.min(r1, r2));
                    far = Math.min(far, Math.max(r1, r2));
                }
                out[0] = near;
                out[1] = far;
                return far > near ? 2 : 0;
            }
        };
    }

    /** A x² + A y² + B z² + C z + D, taken where it is at most 0, or (outside) where it is at least 0. */
    record Quadric(double a, double b, double c, double d, boolean outside) {
        boolean isSphere() {
            return a == 1 && b == 1 && c == 0;
        }

        boolean isCylinder() {
            return a == 1 && b == 0 && c == 0;
        }

        static Quadric sphere(double radius, boolean outside) {
            return new Quadric(1, 1, 0, -radius * radius, outside);
        }

        static Quadric cylinder(double radius, boolean outside) {
            return new Quadric(1, 0, 0, -radius * radius, outside);
        }

        static Quadric below(double z) {
            return new Quadric(0, 0, 1, -z, false);
        }

        static Quadric above(double z) {
            return new Quadric(0, 0, -1, z, false);
        }
    }

    /** A rim: the circle where two of a body's faces meet. */
    record Rim(double radius, double z) { }

    /** Common part of several quadrics of revolution about z; {@code central} when all are spheres about the origin. */
    static RayBody revolution(double[] place, List<Quadric> faces, List<Rim> rims, boolean central) {
        double radial = Math.sqrt(place[0] * place[0] + place[1] * place[1]);
        double distance = Math.sqrt(radial * radial + place[2] * place[2]);
        double cp = radial == 0 ? 1 : place[0] / radial;
        double sp = radial == 0 ? 0 : place[1] / radial;
        if (!central || distance == 0) {
            return new Revolution(place, new double[][] {{cp, sp, 0}, {-sp, cp, 0}, {0, 0, 1}}, radial, place[2], faces, rims);
        }
        double ct = place[2] / distance;
        double st = radial / distance;
        return new Revolution(place, new double[][] {{ct * cp, ct * sp, -st}, {-sp, cp, 0}, {st * cp, st * sp, ct}},
                0, distance, faces, rims);
    }

    /** In the frame turned so that the place stands at (rho0, 0, z0). */
    private static final class Revolution extends RayBody {
        private final double rho0;
        private final double z0;
        private final Quadric[] faces;
        private final List<Rim> rims;
        private final double[] value;
        private final double[] slope;
        /** In the half-plane of one azimuth a ray meets face i where p sin² + 2 m sin cos + s cos² is positive. */
        private final double[] p;
        private final double[] m;
        private final double[] s;
        /** Radius of the circle in which the half-plane's plane cuts a sphere; -1 when it does not. */
        private final double[] section;
        private final double[] work = new double[32];

        Revolution(double[] place, double[][] axes, double rho0, double z0, List<Quadric> faces, List<Rim> rims) {
            super(place, axes);
            this.rho0 = rho0;
            this.z0 = z0;
            this.faces = faces.toArray(new Quadric[0]);
            this.rims = rims;
            value = new double[this.faces.length];
            slope = new double[this.faces.length];
            p = new double[this.faces.length];
            m = new double[this.faces.length];
            s = new double[this.faces.length];
            section = new double[this.faces.length];
            for (int i = 0; i < value.length; i++) {
                Quadric q = this.faces[i];
                double v = valueAt(q);
                double size = Math.abs(q.a) * rho0 * rho0 + Math.abs(q.b) * z0 * z0 + Math.abs(q.c * z0) + Math.abs(q.d);
                // On a curved face to rounding: exactly on it.
                value[i] = q.a != 0 && Math.abs(v) < 4 * Math.ulp(1.0) * size ? 0 : v;
                slope[i] = q.b * z0 + q.c / 2;
            }
        }

        /** Value of the quadric at the place; the common forms factored so that a small gap keeps its digits. */
        private double valueAt(Quadric q) {
            if (q.isCylinder()) {
                double radius = Math.sqrt(-q.d);
                return (rho0 - radius) * (rho0 + radius);
            }
            if (q.isSphere()) {
                double radius = Math.sqrt(-q.d);
                double r = rho0 == 0 ? Math.abs(z0) : Math.sqrt(rho0 * rho0 + z0 * z0);
                return (r - radius) * (r + radius);
            }
            if (q.a == 1 && q.b < 0 && q.c == 0 && q.d == 0) {
                double slope = Math.sqrt(-q.b);
                return (rho0 - slope * Math.abs(z0)) * (rho0 + slope * Math.abs(z0));
            }
            return q.a * rho0 * rho0 + q.b * z0 * z0 + q.c * z0 + q.d;
        }

        @Override
        List<Double> azimuths() {
            List<Double> found = new ArrayList<>();
            if (rho0 == 0) {
                return found;
            }
            found.add(0.0);
            found.add(Math.PI);
            for (Rim rim : rims) {
                both(found, rim.radius / rho0);
                for (Quadric q : faces) {
                    double on = q.a * rim.radius * rim.radius + q.b * rim.z * rim.z + q.c * rim.z + q.d;
                    double size = q.a * rim.radius * rim.radius + Math.abs(q.d);
                    if (q.a != 0 && Math.abs(on) < 1e-9 * size) {
                        double x = -(q.b * z0 * rim.z + q.c / 2 * (z0 + rim.z) + q.d) / (q.a * rho0);
                        if (Math.abs(x) < rim.radius) {
                            double y = Math.sqrt((rim.radius - x) * (rim.radius + x));
                            found.add(Math.atan2(y, x - rho0));
                            found.add(-Math.atan2(y, x - rho0));
                        }
                    }
                }
            }
            for (Quadric q : faces) {
                if (q.a > 0 && q.b >= 0) {
                    double widest = -(q.d - (q.b == 0 ? 0 : q.c * q.c / (4 * q.b))) / q.a;
                    if (widest > 0 && (q.b > 0 || q.c == 0)) {
                        both(found, Math.sqrt(widest) / rho0);
                    }
                }
            }
            return found;
        }

        private static void both(List<Double> found, double sine) {
            if (sine < 1) {
                found.add(Math.PI + Math.asin(sine));
                found.add(Math.PI - Math.asin(sine));
            }
            if (Math.abs(sine - 1) < 0.1) {
                found.add(Math.PI / 2);
                found.add(-Math.PI / 2);
            }
        }

        @Override
        int polars(double cosA, double sinA, double[] out) {
            int n = 0;
            double off = rho0 * sinA;
            double along = rho0 * cosA;
            for (Rim rim : rims) {
                double square = (rim.radius - off) * (rim.radius + off);
                double half = square > 0 ? Math.sqrt(square) : 0;
                if (half - along > 0) {
                    out[n++] = Math.atan2(half - along, rim.z - z0);
                }
                // A rim that is just missed still bends the outline sharply where it is nearest.
                if (half > 0 && -half - along > 0) {
                    out[n++] = Math.atan2(-half - along, rim.z - z0);
                }
            }
            for (int i = 0; i < faces.length; i++) {
                Quadric q = faces[i];
                if (q.a == 0) {
                    continue;
                }
                discriminant(i, off, along);
                // m² − p s without its cancellation
                double square = q.a * value[i] * (q.isSphere() ? section[i] * Math.abs(section[i]) : q.a * q.b * along * along + s[i]);
                if (value[i] == 0) {
                    n = direction(-slope[i], q.a * along, out, n);
                } else if (square > 0) {
                    double root = -(m[i] + Math.copySign(Math.sqrt(square), m[i]));
                    n = direction(root, p[i], out, n);
                    n = direction(s[i], root, out, n);
                }
            }
            return n;
        }

        /** The same expressions serve the outline and the crossings, so that they agree to the last digit. */
        private void discriminant(int i, double off, double along) {
            Quadric q = faces[i];
            double w = q.b * z0 * z0 + q.c * z0 + q.d;
            double radius = Math.sqrt(Math.max(0, -w / q.a));
            p[i] = w < 0 && q.a > 0 ? q.a * q.a * (radius - off) * (radius + off) : -q.a * (q.a * off * off + w);
            m[i] = q.a * along * slope[i];
            s[i] = q.c * q.c / 4 - q.b * q.d - q.a * q.b * rho0 * rho0;
            if (q.isSphere()) {
                double whole = Math.sqrt(-q.d);
                double square = (whole - off) * (whole + off);
                section[i] = square < 0 ? -1 : Math.sqrt(square);
            }
        }

        private static int direction(double sine, double cosine, double[] out, int n) {
            // a negative zero would be read as the other half-plane
            out[n] = Math.atan2(Math.abs(sine), sine < 0 ? -cosine : cosine);
            return n + 1;
        }

        @Override
        int crossings(double sinT, double cosT, double cosA, double sinA, double[] out) {
            out[0] = 0;
            out[1] = Double.POSITIVE_INFINITY;
            int n = 2;
            for (int i = 0; i < faces.length && n > 0; i++) {
                n = cut(out, n, i, sinT, cosT, cosA);
            }
            return n;
        }

        /** Keeps of the n/2 pieces what lies within face i. */
        private int cut(double[] pieces, int n, int i, double sinT, double cosT, double cosA) {
            Quadric q = faces[i];
            double a = q.a * sinT * sinT + q.b * cosT * cosT;
            double half = q.a * rho0 * cosA * sinT + slope[i] * cosT;
            double c = value[i];
            double low;
            double high;
            boolean between;
            if (a == 0) {
                if (half == 0) {
                    return c <= 0 != q.outside ? n : 0;
                }
                double r = -c / (2 * half);
                low = half > 0 ? Double.NEGATIVE_INFINITY : r;
                high = half > 0 ? r : Double.POSITIVE_INFINITY;
                between = true;
            } else {
                double square = half * half - a * c;
                if (q.isCylinder() && c != 0) {
                    square = sinT * sinT * p[i];
                }
                if (square <= 0) {
                    return a < 0 != q.outside ? n : 0;
                }
                double root = -(half + Math.copySign(Math.sqrt(square), half));
                double r1 = root / a;
                double r2 = c / root;
                low = Math.min(r1, r2);
                high = Math.max(r1, r2);
                between = a > 0;
            }
            int m = 0;
            for (int k = 0; k < n; k += 2) {
                if (between != q.outside) {
                    m = keep(m, Math.max(pieces[k], low), Math.min(pieces[k + 1], high));
                } else {
                    m = keep(m, pieces[k], Math.min(pieces[k + 1], low));
                    m = keep(m, Math.max(pieces[k], high), pieces[k + 1]);
                }
            }
            System.arraycopy(work, 0, pieces, 0, m);
            return m;
        }

        private int keep(int m, double from, double to) {
            if (!(to > from)) {
                return m;
            }
            work[m] = from;
            work[m + 1] = to;
            return m + 2;
        }
    }
}
