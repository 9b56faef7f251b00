package fieldwright.formula;

import fieldwright.quantity.Standing;

/** A value, a bound on its numerical error, and how far it can be trusted; SI, the unit is known elsewhere. */
record Approx(double value, double error, Standing standing) {
    static Approx exact(double value) {
        return new Approx(value, 0, Standing.CONVERGED);
    }

    static Approx of(fieldwright.quantity.Amount a) {
        return new Approx(a.si(), a.error(), a.standing());
    }

    Approx with(Approx other) {
        return new Approx(value, error, standing.worse(other.standing));
    }
}
