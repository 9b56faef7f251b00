package fieldwright.geometry;

import java.util.ArrayList;
import java.util.List;

import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Place;

/** A simple flat polygon cut into triangles: ears are cut off until three corners are left (Meisters 1975). */
final class PolygonEars {
    private PolygonEars() {
    }

    static List<Region> triangles(List<Place> corners) {
        if (corners.size() < 3) {
            throw new AuthorException("polygon of " + corners.size() + " corner(s): give at least three.");
        }
        List<double[]> left = new ArrayList<>();
        corners.forEach(p -> left.add(new double[] {p.x(), p.y(), p.z()}));
        double[] normal = normal(left);
        double size = Math.sqrt(dot(normal, normal));
        double extent = 0;
        for (double[] p : left) {
            extent = Math.max(extent, Math.sqrt(dot(minus(p, left.get(0)), minus(p, left.get(0)))));
        }
        if (!(size > 1e-14 * extent * extent)) {
            throw new AuthorException("polygon whose corners lie on one line: it has no area.");
        }
        for (double[] p : left) {
            double off = dot(minus(p, left.get(0)), normal) / size;
            if (Math.abs(off) > 1e-9 * extent) {
                throw new AuthorException("polygon: corner (" + p[0] + ", " + p[1] + ", " + p[2] + ") m stands " + Math.abs(off)
                    + " m off the plane of the others. Give corners of one plane, or several polygons.");
            }
        }
        List<Region> parts = new ArrayList<>();
        while (left.size() > 3) {
            int ear = ear(left, normal);
            if (ear < 0) {
                throw new AuthorException("polygon: its sides cross each other. Give the corners in order round the edge.");
            }
            int n = left.size();
            parts.add(Bodies.triangle(left.get((ear + n - 1) % n), left.get(ear), left.get((ear + 1) % n)));
            left.remove(ear);
        }
        parts.add(Bodies.triangle(left.get(0), left.get(1), left.get(2)));
        return parts;
    }

    private static int ear(List<double[]> p, double[] normal) {
        int n = p.size();
        for (int i = 0; i < n; i++) {
            double[] a = p.get((i + n - 1) % n);
            double[] b = p.get(i);
            double[] c = p.get((i + 1) % n);
            if (!(side(a, b, c, normal) > 0)) {
                continue;
            }
            boolean empty = true;
            for (int j = 0; j < n && empty; j++) {
                double[] q = p.get(j);
                if (q != a && q != b && q != c) {
                    empty = !(side(a, b, q, normal) >= 0 && side(b, c, q, normal) >= 0 && side(c, a, q, normal) >= 0);
                }
            }
            if (empty) {
                return i;
            }
        }
        return -1;
    }

    private static double side(double[] a, double[] b, double[] c, double[] normal) {
        return dot(cross(minus(b, a), minus(c, b)), normal);
    }

    /** Twice the area vector (Newell's sum). */
    private static double[] normal(List<double[]> p) {
        double[] sum = new double[3];
        for (int i = 0; i < p.size(); i++) {
            double[] c = cross(minus(p.get(i), p.get(0)), minus(p.get((i + 1) % p.size()), p.get(0)));
            for (int a = 0; a < 3; a++) {
                sum[a] += c[a];
            }
        }
        return sum;
    }

    private static double[] minus(double[] a, double[] b) {
        return new double[] {a[0] - b[0], a[1] - b[1], a[2] - b[2]};
    }

    private static double[] cross(double[] a, double[] b) {
        return new double[] {a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]};
    }

    private static double dot(double[] a, double[] b) {
        return a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
    }
}
