package fieldwright.formula;

/**
 * How far an input may be off.
 *
 * @param form limits ± half-width (rectangular), or an expanded uncertainty
 * @param halfWidth SI, > 0; a percentage is of the absolute value
 * @param coverage k of an expanded uncertainty; NaN for limits
 * @param degreesOfFreedom nu of an expanded uncertainty; infinite when not stated, and for limits
 * @param written what stands behind the ±
 */
public record Tolerance(Form form, double halfWidth, double coverage, double degreesOfFreedom, String written) {
    public enum Form { LIMITS, EXPANDED }

    public Tolerance {
        if (!(halfWidth > 0) || Double.isInfinite(halfWidth)) {
            throw new IllegalArgumentException("half-width " + halfWidth);
        }
    }

    /** Standard uncertainty, SI: half-width/sqrt(3) for limits (JCGM 100:2008, 4.3.7), U/k for an expanded one (6.2.1). */
    public double standardUncertainty() {
        return form == Form.LIMITS ? halfWidth / Math.sqrt(3) : halfWidth / coverage;
    }
}
