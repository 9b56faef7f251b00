package fieldwright.field;

/**
 * What the place of the question touches: a charged surface (the field jumps there), an edge of one or a line or
 * point charge (the field has no bound).
 */
final class Contact {
    /** Sum over all directions around the place of density times direction: zero within a smooth surface, not on its edge. */
    private final double[] pull = new double[3];
    private double pullSize;
    /** Field above minus field below, in units of the kernel, along {@link #normal}. */
    private final double[] jump = new double[3];
    private double[] normal;
    private boolean folded;
    private String unbounded;
    private double[] direction;

    /** {@code share} of a full turn of a surface of density sigma with this normal; {@code around} is ∫ density·direction over it. */
    void surface(double sigma, double share, double[] unitNormal, double[] around) {
        double sign = 1;
        if (normal == null) {
            normal = unitNormal.clone();
        } else {
            double dot = normal[0] * unitNormal[0] + normal[1] * unitNormal[1] + normal[2] * unitNormal[2];
            folded |= Math.abs(dot) < 1 - 1e-9;
            sign = dot < 0 ? -1 : 1;
        }
        for (int a = 0; a < 3; a++) {
            jump[a] += sign * 4 * Math.PI * sigma * share * unitNormal[a];
            pull[a] += around[a];
        }
        pullSize += Math.abs(sigma) * share * 2 * Math.PI;
    }

    void unbounded(String reason, double[] along) {
        if (unbounded == null) {
            unbounded = reason;
            direction = along;
        }
    }

    /** Whether anything was touched so far. */
    boolean isTouched() {
        return normal != null || unbounded != null;
    }

    /** Why the field has no bound here, or null. */
    String unboundedReason() {
        if (unbounded != null) {
            return unbounded;
        }
        if (edgeSize() > 1e-6 * pullSize && pullSize > 0) {
            return "on an edge or fold of a charged surface: the field grows without bound towards it";
        }
        return null;
    }

    private double edgeSize() {
        return Math.sqrt(pull[0] * pull[0] + pull[1] * pull[1] + pull[2] * pull[2]);
    }

    /** Unit vector along which the field grows, or null. */
    double[] unboundedDirection() {
        if (unbounded != null) {
            return direction;
        }
        double size = edgeSize();
        return size > 0 ? new double[] {-pull[0] / size, -pull[1] / size, -pull[2] / size} : null;
    }

    boolean isUnboundedLine() {
        return unbounded != null;
    }

    boolean isFolded() {
        return folded;
    }

    boolean isSided() {
        return normal != null && jump[0] * jump[0] + jump[1] * jump[1] + jump[2] * jump[2] > 0;
    }

    double[] normal() {
        return normal;
    }

    double[] jump() {
        return jump;
    }
}
