package fieldwright.field.closed;

import static fieldwright.field.closed.Rounding.EPS;

/**
 * Field and potential, far away, of charges spread about a centre: the total charge at the centre, plus for every
 * charge the difference of its kernel from the centre's, formed without cancellation. So a body without net charge keeps
 * its digits at any distance: only the dipole's own size is rounded.
 */
final class FarSum {
    private final double dx;
    private final double dy;
    private final double dz;
    private final double far2;
    private final double far;
    private double ex;
    private double ey;
    private double ez;
    private double v;
    private double spread;

    /** Seen from the place (dx, dy, dz) relative to the centre of the charges. */
    FarSum(double dx, double dy, double dz) {
        this.dx = dx;
        this.dy = dy;
        this.dz = dz;
        far2 = dx * dx + dy * dy + dz * dz;
        far = Math.sqrt(far2);
    }

    /** Adds charge q at (px, py, pz) relative to the centre, less the same charge at the centre. */
    void add(double q, double px, double py, double pz) {
        double p2 = px * px + py * py + pz * pz;
        double shift = p2 - 2 * (dx * px + dy * py + dz * pz); // R² - far²
        double r2 = far2 + shift;
        double r = Math.sqrt(r2);
        double inv = 1 / r;
        double inv0 = 1 / far;
        double diff = -shift / (far * r * (far + r)); // 1/R - 1/far
        double diff3 = diff * (inv * inv + inv * inv0 + inv0 * inv0); // 1/R³ - 1/far³
        double inv3 = inv / r2;
        ex += q * (dx * diff3 - px * inv3);
        ey += q * (dy * diff3 - py * inv3);
        ez += q * (dz * diff3 - pz * inv3);
        v += q * diff;
        spread += Math.abs(q) * Math.sqrt(p2);
    }

    /**
     * The sum with the total charge put at the centre.
     *
     * @param total total of the charges added
     * @param totalError how far total may be off by the rounding of the density
     */
    Closed with(double total, double totalError, double placeError) {
        double inv3 = total / (far2 * far);
        double moved = placeError + EPS * far;
        double q = Math.abs(total) + totalError;
        double field = q / far2 + 4 * spread / (far2 * far);
        double errE = 8 * EPS * field + 2 * moved / far * field + totalError / far2;
        double errV = 8 * EPS * (q / far + spread / far2) + moved * field + totalError / far;
        return Closed.regular(ex + dx * inv3, ey + dy * inv3, ez + dz * inv3, v + total / far, errE, errV);
    }
}
