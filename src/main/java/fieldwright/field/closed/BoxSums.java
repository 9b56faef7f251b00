package fieldwright.field.closed;

import static fieldwright.field.closed.Rounding.EPS;

/**
 * The sums over the faces of a box that its field and potential are made of, the place at the origin. With V = ∫ dA/R over a
 * face at signed distance h along its outward normal n: field = Σ n V, potential = ½ Σ h V, moment ∫ p/R = Σ n ∫ R dA.
 */
final class BoxSums {
    private final double[][] limit;
    private final double[] side;
    private final double[] slope;
    private final double placeError;
    /** The twelve edges: first the axis they run along, then which end of the next axis, then of the one after. */
    private final Edge[][][] edges = new Edge[3][2][2];
    /** Distances of the eight corners. */
    private final double[][][] corner = new double[2][2][2];

    final double[] field = new double[3];
    /** ∮ (slope·p) n dA/R. */
    final double[] weighted = new double[3];
    /** ∫ p/R. */
    final double[] moment = new double[3];
    double potential;
    double errField;
    double errWeighted;
    double errMoment;
    double errPotential;
    double fieldTerms;
    double potentialTerms;

    BoxSums(double[] from, double[] to, double[] side, double[] slope, double placeError) {
        this.side = side;
        limit = new double[][] {{from[0], to[0]}, {from[1], to[1]}, {from[2], to[2]}};
        this.slope = slope;
        this.placeError = placeError;
        for (int axis = 0; axis < 3; axis++) {
            for (int i = 0; i < 2; i++) {
                for (int j = 0; j < 2; j++) {
                    edges[axis][i][j] = edge(axis, i, j);
                }
            }
        }
        for (int i = 0; i < 8; i++) {
            double a = limit[0][i & 1];
            double b = limit[1][i >> 1 & 1];
            double c = limit[2][i >> 2];
            corner[i & 1][i >> 1 & 1][i >> 2] = Math.sqrt(a * a + b * b + c * c);
        }
        for (int axis = 0; axis < 3; axis++) {
            addFace(axis, 0);
            addFace(axis, 1);
        }
        double tide = tide();
        errField += placeError * tide;
        errPotential += placeError * (Math.abs(field[0]) + Math.abs(field[1]) + Math.abs(field[2]) + placeError * tide);
    }

    /**
     * Bound on the gradient of the field: 2/R³ summed from outside; everywhere the solid angles (at most 4 pi together) and
     * the alternating sums of the edges' logarithms, which are its elements across axes.
     */
    private double tide() {
        double gap2 = 0;
        double elements = 4 * Math.PI;
        for (int axis = 0; axis < 3; axis++) {
            double out = Math.max(0, Math.max(limit[axis][0], -limit[axis][1]));
            gap2 += out * out;
            Edge[][] e = edges[axis];
            double nearest = 0;
            for (int i = 0; i < 4; i++) {
                Edge at = e[i >> 1][i & 1];
                nearest += at.touched ? 2 * Rounding.logarithm(at.s2 - at.s1, placeError) : 0;
            }
            elements += 2 * (Math.abs(e[0][0].log - e[0][1].log - e[1][0].log + e[1][1].log) + nearest);
        }
        return Math.min(elements, 2 * Math.abs(potential) / gap2);
    }

    private Edge edge(int axis, int i, int j) {
        double b = limit[(axis + 1) % 3][i];
        double c = limit[(axis + 2) % 3][j];
        double s1 = limit[axis][0];
        double s2 = limit[axis][1];
        return new Edge(s1, s2, side[axis], b * b + c * c, placeError);
    }

    private double cornerAt(int axis, int end, int i, int j) {
        return axis == 0 ? corner[end][i][j] : axis == 1 ? corner[j][end][i] : corner[i][j][end];
    }

    /** The face across the axis at its lower (end 0) or upper end. */
    private void addFace(int axis, int end) {
        int b = (axis + 1) % 3;
        int c = (axis + 2) % 3;
        double sign = end == 0 ? -1 : 1;
        double h = sign * limit[axis][end]; // along the outward normal
        double height = Math.abs(h);
        double flat = 0;
        double flatTerms = 0;
        double errFlat = 0;
        double angle = 0;
        double angleTerms = 0;
        double qMoment = 0;
        double slopeMoment = 0;
        double momentTerms = 0;
        for (int i = 0; i < 2; i++) {
            double out = i == 0 ? -1 : 1;
            // side across b (runs along c), then side across c (runs along b)
            for (int which = 0; which < 2; which++) {
                int across = which == 0 ? b : c;
                Edge e = which == 0 ? edges[c][end][i] : edges[b][i][end];
                double q = out * limit[across][i];
                double m = e.lengthMoment();
                flat += q * e.log;
                flatTerms += Math.abs(q) * e.log;
                // q L changes by at most L + q slope(L) <= L + 2 per move, on the edge itself by the logarithm of the move
                double length = e.s2 - e.s1;
                errFlat += placeError * (e.touched ? 4 * Rounding.logarithm(length, placeError) : e.log + 4);
                qMoment += q * m;
                slopeMoment += out * slope[across] * m;
                momentTerms += Math.abs(e.s1) * e.r1 + Math.abs(e.s2) * e.r2 + e.d2 * e.log;
            }
            for (int j = 0; j < 2; j++) {
                double a = Math.atan2(limit[b][i] * limit[c][j], height * cornerAt(axis, end, i, j));
                angle += i == j ? a : -a;
                angleTerms += Math.abs(a);
            }
        }
        double face = flat - height * angle;
        double faceTerms = flatTerms + height * angleTerms;
        double errFace = 4 * EPS * faceTerms + errFlat + placeError * angleTerms;
        double square = (qMoment + h * h * face) / 3; // ∫ R dA
        double reach = Math.sqrt(momentTerms);
        field[axis] += sign * face;
        potential += 0.5 * h * face;
        moment[axis] += sign * square;
        weighted[axis] += sign * (sign * slope[axis] * h * face + slopeMoment);
        errField += 4 * EPS * faceTerms;
        fieldTerms += faceTerms;
        errPotential += 3 * EPS * height * faceTerms;
        potentialTerms += 0.5 * height * faceTerms;
        errWeighted += height * errFace + placeError * (faceTerms + 4 * reach) + 3 * EPS * (height * faceTerms + momentTerms);
        errMoment += (4 * EPS * (reach * momentTerms + height * height * faceTerms) + height * height * errFace
                + placeError * (4 * momentTerms + 2 * height * faceTerms)) / 3;
    }
}
