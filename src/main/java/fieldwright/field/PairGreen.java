package fieldwright.field;

import fieldwright.quantity.AuthorException;

/**
 * Endless charge between two grounded planes, without the nearest images. A line along the planes, H their distance, η across the line
 * in the plane: ln (cosh πη/H − cos π(z + z')/H) − ln (cosh πη/H − cos π(z − z')/H) (Morse and Feshbach, Methods of Theoretical
 * Physics, 10.2, from memory); a plane: 4π z(H − z')/H for z < z'. Heights are counted from the nearer plane.
 */
final class PairGreen implements Green {
    private final int axis;
    private final double wall;
    private final int side;
    private final double distance;
    private final double[] place;
    /** Across the line along the planes; null: charge is uniform along both. */
    private final double[] across;

    private PairGreen(int axis, double wall, int side, double distance, double[] place, double[] across) {
        this.axis = axis;
        this.wall = wall;
        this.side = side;
        this.distance = distance;
        this.place = place;
        this.across = across;
    }

    /** {@code wall}: offset of the plane nearest to the place, the field on its {@code side}. Errors: AuthorException for half-endless charge. */
    static PairGreen of(Patch patch, int axis, double wall, int side, double distance, double[] place) {
        if (patch.kernel().kind == Kernel.Kind.HALF_LINE) {
            throw new AuthorException("charge endless to one side between parallel planes: it is not worked. Give it a finite limit some distances "
                + "of the planes away; what lies further is screened.");
        }
        double[] across = null;
        if (patch.kernel().kind == Kernel.Kind.LINE) {
            double[] own = new double[3];
            own[patch.kernel().axis] = 1;
            double[] along = patch.frame().directionToSheet(own);
            across = new double[3];
            across[(axis + 1) % 3] = -along[(axis + 2) % 3];
            across[(axis + 2) % 3] = along[(axis + 1) % 3];
        }
        return new PairGreen(axis, wall, side, distance, place, across);
    }

    @Override
    public void potential(double[][] s, int n, double[] out, double[] doubt) {
        java.util.Arrays.fill(doubt, 0, n, 1e-14);
        for (int i = 0; i < n; i++) {
            double z = side * (place[axis] - wall);
            double w = side * (s[axis][i] - wall);
            if (across == null) {
                out[i] = -4 * Math.PI * z * w / distance;
            } else {
                double eta = eta(s, i);
                out[i] = log(eta, z + w) - log(eta, z - w);
            }
        }
    }

    @Override
    public void field(double[][] s, int n, double[][] out, double[] doubt) {
        java.util.Arrays.fill(doubt, 0, n, 1e-14 / distance);
        for (int i = 0; i < n; i++) {
            double z = side * (place[axis] - wall);
            double w = side * (s[axis][i] - wall);
            if (across == null) {
                out[0][i] = 0;
                out[1][i] = 0;
                out[2][i] = 0;
                out[axis][i] = side * 4 * Math.PI * w / distance;
                continue;
            }
            double eta = eta(s, i);
            double along = slope(eta, z - w, true) - slope(eta, z + w, true);
            for (int k = 0; k < 3; k++) {
                out[k][i] = along * across[k];
            }
            out[axis][i] = side * (slope(eta, z - w, false) - slope(eta, z + w, false));
        }
    }

    private double eta(double[][] s, int i) {
        double eta = 0;
        for (int k = 0; k < 3; k++) {
            eta += (place[k] - s[k][i]) * across[k];
        }
        return eta;
    }

    /** ln of (cosh πη/H − cos πb/H) by 2(π/2H)²(η² + b²), which is 1 in the origin. */
    private double log(double eta, double b) {
        double x = Math.PI * Math.abs(eta) / (2 * distance);
        double y = Math.PI * b / (2 * distance);
        double square = x * x + y * y;
        if (square < 1e-24) {
            return 0;
        }
        double sine = Math.sin(y);
        if (x > 20) {
            return 2 * x - Math.log(4 * square);
        }
        double sinh = Math.sinh(x);
        return Math.log((sinh * sinh + sine * sine) / square);
    }

    /** Its derivative by η or by b. */
    private double slope(double eta, double b, boolean byEta) {
        double unit = Math.PI / (2 * distance);
        double x = unit * eta;
        double y = unit * b;
        double square = x * x + y * y;
        if (square < 1e-24) {
            return 0;
        }
        double own = 2 * (byEta ? x : y) / square;
        if (Math.abs(x) > 20) {
            return unit * ((byEta ? 2 * Math.signum(x) : 0) - own);
        }
        double sinh = Math.sinh(x);
        double sine = Math.sin(y);
        double top = byEta ? Math.sinh(2 * x) : Math.sin(2 * y);
        return unit * (top / (sinh * sinh + sine * sine) - own);
    }
}
