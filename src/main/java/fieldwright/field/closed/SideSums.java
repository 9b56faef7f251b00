package fieldwright.field.closed;

import static fieldwright.field.closed.Rounding.EPS;

/**
 * The sums over the sides of a flat polygon that its field and potential are made of, at height h >= 0 above its plane,
 * corners counterclockwise. For a side with outward normal m, at signed distance q from the foot of the place (positive when
 * the foot lies within): field = Σ m L, angle = Σ β, potential = Σ q L - h Ω, moment ∫ p/R = Σ m ∫ R dl, with L = ∫ dl/R and p the
 * source less the foot.
 */
final class SideSums {
    private final double x;
    private final double y;
    private final double h;
    private final double placeError;
    private final double slopeX;
    private final double slopeY;

    /** ∫ of the in-plane kernel: Σ m L. */
    double fieldX;
    double fieldY;
    /** Solid angle. */
    double angle;
    /** ∫ p/R. */
    double momentX;
    double momentY;
    /** ∮ (slope·p) m dl/R. */
    double weightedX;
    double weightedY;
    /** Σ (slope·m) L: the normal field of the sloping part is -h times this. */
    double slopeLog;

    boolean touched;
    double touchX;
    double touchY;

    double errField;
    double errWeighted;
    double errMoment;
    double potentialTerms;
    private double flat;
    private double errFlat;
    private double errAngle;
    private double logs;
    private double tide;
    private double nearestSide = Double.POSITIVE_INFINITY;
    private boolean footWithin;
    private double angles;

    SideSums(double x, double y, double h, double placeError, double slopeX, double slopeY) {
        this.x = x;
        this.y = y;
        this.h = h;
        this.placeError = placeError;
        this.slopeX = slopeX;
        this.slopeY = slopeY;
    }

    void addSide(double ax, double ay, double bx, double by) {
        double length = Math.hypot(bx - ax, by - ay);
        double tx = (bx - ax) / length;
        double ty = (by - ay) / length;
        double px = ax - x;
        double py = ay - y;
        double qx = bx - x;
        double qy = by - y;
        double s1 = px * tx + py * ty;
        double s2 = qx * tx + qy * ty;
        // distance from the nearer corner: least rounding
        boolean first = Math.abs(s1) < Math.abs(s2);
        double q = first ? px * ty - py * tx : qx * ty - qy * tx;
        double cornerGap = Math.sqrt(h * h + (first ? px * px + py * py : qx * qx + qy * qy));
        double moved = placeError + 2 * EPS * cornerGap;
        Edge e = new Edge(s1, s2, length, q * q + h * h, placeError + (tx == 0 || ty == 0 ? 0 : EPS * cornerGap));
        if (e.touched) {
            touch(e, ty, -tx, length, moved);
            return;
        }
        add(e, q, tx, ty, 2 * EPS * cornerGap);
        double gap = e.s1 < 0 && e.s2 > 0 ? Math.sqrt(e.d2) : Math.min(e.r1, e.r2);
        nearestSide = Math.min(nearestSide, gap);
        if (ay > y != by > y && (ax - x) * (by - ay) - (ay - y) * (bx - ax) > 0 == by > ay) {
            footWithin = !footWithin;
        }
    }

    /** Place on this side: its L is infinite; what is finite still counts. */
    private void touch(Edge e, double mx, double my, double length, double moved) {
        touched = true;
        boolean within = e.s1 < -placeError && e.s2 > placeError;
        double share = within ? 2 : 1; // a side seen from within has two ends' logarithms
        touchX += share * mx;
        touchY += share * my;
        double big = 2 * Rounding.logarithm(length, moved);
        errFlat += 2 * moved * big;
        potentialTerms += moved;
        addMoment(e, 0, mx, my, moved);
        double alongSlope = slopeX * -my + slopeY * mx;
        weightedX += mx * alongSlope * e.rise;
        weightedY += my * alongSlope * e.rise;
        errWeighted += 8 * EPS * (e.r1 + e.r2) + 2 * moved * big;
        // the density vanishes here or the field is called unbounded, so these only ever multiply a rounding
        logs += big;
        errField += big;
        angles += Math.PI;
        errAngle += 2 * Math.PI;
    }

    /** @param rounded how far the distances of this side are off by their own rounding, place taken as exact */
    private void add(Edge e, double q, double tx, double ty, double rounded) {
        double mx = ty;
        double my = -tx;
        double log = e.log;
        double a1 = Math.atan2(q * e.s1, e.d2 + h * e.r1);
        double a2 = Math.atan2(q * e.s2, e.d2 + h * e.r2);
        double terms = Math.abs(a1) + Math.abs(a2);
        double slopeOfLog = e.slope();
        double errLog = 4 * EPS * log + rounded * slopeOfLog;
        // the angles themselves turn with the corners' rounding, which is relative to the corners' distances
        double errBeta = 4 * EPS * (terms + 1) + rounded * slopeOfLog;
        tide += 2 * slopeOfLog;
        fieldX += mx * log;
        fieldY += my * log;
        angle += a2 - a1;
        flat += q * log;
        errField += errLog + errBeta;
        errFlat += Math.abs(q) * errLog + rounded * log;
        errAngle += errBeta;
        logs += log;
        angles += terms;
        potentialTerms += Math.abs(q) * log + h * terms;
        double moved = placeError + rounded;
        addMoment(e, log, mx, my, moved);
        addSloping(e, q, mx, my, tx, ty, errLog + placeError * slopeOfLog, moved);
    }

    private void addMoment(Edge e, double log, double mx, double my, double moved) {
        double moment = e.lengthMoment();
        momentX += mx * moment;
        momentY += my * moment;
        errMoment += 4 * EPS * (Math.abs(e.s1) * e.r1 + Math.abs(e.s2) * e.r2 + e.d2 * log) + 2 * moved * (e.r1 + e.r2);
    }

    private void addSloping(Edge e, double q, double mx, double my, double tx, double ty, double errLog, double moved) {
        double acrossSlope = slopeX * mx + slopeY * my;
        double alongSlope = slopeX * tx + slopeY * ty;
        double weighted = acrossSlope * q * e.log + alongSlope * e.rise;
        weightedX += mx * weighted;
        weightedY += my * weighted;
        slopeLog += acrossSlope * e.log;
        errWeighted += (Math.abs(q) + h) * errLog + 2 * moved * (e.log + 1) + 4 * EPS * (Math.abs(q) * e.log + h * e.log + e.r1 + e.r2);
    }

    /** ∫ dA/R. */
    double potential() {
        return flat - h * angle;
    }

    double errPotential() {
        return errFlat + h * errAngle + 4 * EPS * potentialTerms + placeError * (Math.hypot(fieldX, fieldY) + angle + placeError * tide());
    }

    /** Bound on the gradient of the field of unit density: the fields of the sides, or 2/R³ summed. */
    double tide() {
        double gap = footWithin ? h : nearestSide;
        return touched || gap == 0 ? tide : Math.min(tide, 2 * Math.abs(potential()) / (gap * gap));
    }

    /** Sum of the sizes of all terms of the field of unit density. */
    double fieldTerms() {
        return logs + angles;
    }
}
