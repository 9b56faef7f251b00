package fieldwright.integral;

/** value ± errorEstimate, in the integrand's unit times the variables'; status says why refinement stopped. */
public record Estimate(double value, double errorEstimate, int evaluations, Status status) {
    public enum Status { CONVERGED, EVALUATION_LIMIT, ROUNDOFF, NOT_A_NUMBER }

    public boolean isConverged() {
        return status == Status.CONVERGED;
    }
}
