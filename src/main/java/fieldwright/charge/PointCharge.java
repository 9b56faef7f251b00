package fieldwright.charge;

import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Place;
import fieldwright.quantity.Units;

/** A charge (C) at one place. */
public record PointCharge(Place at, Amount charge, Surroundings around) implements Source {
    /** Errors: AuthorException when the amount is not a charge, or the place is missing. */
    public PointCharge {
        if (at == null) {
            throw new AuthorException("point charge of " + charge + ": its place is missing (null). Give one, for example at(\"0\", \"0\", \"0.5 m\").");
        }
        if (!charge.dimension().equals(Units.CHARGE)) {
            throw new AuthorException("point charge of " + Units.describe(charge.dimension()) + ": it must be a charge, for example 1 nC.");
        }
    }

    @Override
    public PointCharge with(Surroundings surroundings) {
        return new PointCharge(at, charge, surroundings);
    }
}
