package fieldwright.judge;

import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Standing;
import fieldwright.quantity.Units;

/**
 * A value held against a threshold with a margin: passes when |value| + numerical error is at most threshold/margin, at
 * the stated inputs and in the worst case of their tolerances.
 *
 * @param label names the assessment in the record
 * @param value as worked with the stated inputs
 * @param worstCase as worked at the worst of the tolerances; null when the inputs have none, or before they were tried
 * @param threshold with source and caution
 * @param margin how many times the value must fit under the threshold; {@code >= 1} unless said otherwise, {@code > 0}
 */
public record Assessment(String label, Amount value, Amount worstCase, Threshold threshold, double margin) {

    /** @throws AuthorException if the dimensions differ or the margin is not a finite positive number */
    public Assessment {
        for (Amount each : worstCase == null ? new Amount[] {value} : new Amount[] {value, worstCase}) {
            if (!each.dimension().equals(threshold.value().dimension())) {
                throw new AuthorException("assessment '" + label + "': the value is " + Units.describe(each.dimension())
                        + " but the threshold '" + threshold.name() + "' is " + Units.describe(threshold.value().dimension())
                        + ". Assess a quantity of the same kind.");
            }
        }
        if (!(margin > 0) || Double.isInfinite(margin)) {
            throw new AuthorException("assessment '" + label + "': margin = " + margin + ": must be finite and > 0; 2 means that twice"
                    + " the value still fits under the threshold.");
        }
    }

    public static Assessment of(String label, Amount value, Threshold threshold, double margin) {
        return new Assessment(label, value, null, threshold, margin);
    }

    /** Threshold over (|value| + numerical error), the worst case's when there is one; NaN when there is no number. */
    public double marginFound() {
        double found = marginOf(value);
        return worstCase == null ? found : Math.min(found, marginOf(worstCase));
    }

    public boolean passed() {
        return marginFound() >= margin;
    }

    /** Threshold over margin, SI: what the value may reach. */
    public double allowed() {
        return (threshold.value().si() - threshold.value().error()) / margin;
    }

    private double marginOf(Amount x) {
        boolean unbounded = x.standing().kind() == Standing.Kind.UNBOUNDED;
        if (!x.isConverged() || Double.isNaN(x.error())) {
            return unbounded ? 0 : Double.NaN;
        }
        return (threshold.value().si() - threshold.value().error()) / (Math.abs(x.si()) + x.error());
    }
}
