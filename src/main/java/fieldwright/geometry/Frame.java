package fieldwright.geometry;

/**
 * Rigid motion from a region's own frame to the sheet's: first turned, then moved. Lengths in m.
 * {@code turn} is the rotation matrix by rows.
 */
public record Frame(double[] turn, double[] move) {
    public static final Frame OWN = new Frame(new double[] {1, 0, 0, 0, 1, 0, 0, 0, 1}, new double[3]);

    public boolean isOwn() {
        return this == OWN;
    }

    /** Whether it moves without turning. */
    public boolean isUnturned() {
        for (int i = 0; i < 9; i++) {
            if (turn[i] != (i % 4 == 0 ? 1 : 0)) {
                return false;
            }
        }
        return true;
    }

    public static Frame moved(double x, double y, double z) {
        return new Frame(OWN.turn, new double[] {x, y, z});
    }

    /** Right-handed turn by {@code angle} (rad) about an axis through the origin (Rodrigues' formula). */
    public static Frame turned(double ax, double ay, double az, double angle) {
        double n = Math.sqrt(ax * ax + ay * ay + az * az);
        double x = ax / n;
        double y = ay / n;
        double z = az / n;
        double c = cosine(angle);
        double s = sine(angle);
        double d = 1 - c;
        return new Frame(new double[] {
            c + x * x * d, x * y * d - z * s, x * z * d + y * s,
            y * x * d + z * s, c + y * y * d, y * z * d - x * s,
            z * x * d - y * s, z * y * d + x * s, c + z * z * d}, new double[3]);
    }

    /** Quarter turns are exact, so that a turned body keeps its faces on the axes. */
    private static double cosine(double angle) {
        double quarter = angle / (Math.PI / 2);
        return quarter == Math.rint(quarter) ? Math.rint(Math.cos(angle)) : Math.cos(angle);
    }

    private static double sine(double angle) {
        double quarter = angle / (Math.PI / 2);
        return quarter == Math.rint(quarter) ? Math.rint(Math.sin(angle)) : Math.sin(angle);
    }

    /** This motion first, then {@code next}. */
    public Frame then(Frame next) {
        double[] r = new double[9];
        for (int i = 0; i < 3; i++) {
            for (int j = 0; j < 3; j++) {
                for (int k = 0; k < 3; k++) {
                    r[3 * i + j] += next.turn[3 * i + k] * turn[3 * k + j];
                }
            }
        }
        return new Frame(r, next.toSheet(move));
    }

    public double[] toSheet(double[] own) {
        double[] v = directionToSheet(own);
        for (int i = 0; i < 3; i++) {
            v[i] += move[i];
        }
        return v;
    }

    public double[] toOwn(double[] sheet) {
        return directionToOwn(new double[] {sheet[0] - move[0], sheet[1] - move[1], sheet[2] - move[2]});
    }

    public double[] directionToSheet(double[] own) {
        double[] v = new double[3];
        for (int i = 0; i < 3; i++) {
            v[i] = turn[3 * i] * own[0] + turn[3 * i + 1] * own[1] + turn[3 * i + 2] * own[2];
        }
        return v;
    }

    public double[] directionToOwn(double[] sheet) {
        double[] v = new double[3];
        for (int i = 0; i < 3; i++) {
            v[i] = turn[i] * sheet[0] + turn[3 + i] * sheet[1] + turn[6 + i] * sheet[2];
        }
        return v;
    }
}
