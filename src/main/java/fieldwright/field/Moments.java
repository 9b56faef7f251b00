package fieldwright.field;

import fieldwright.charge.Source;
import fieldwright.integral.Cubature;
import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Place;
import fieldwright.quantity.Units;
import fieldwright.quantity.Vector;

/**
 * Multipole moments of charge about a place; what the surroundings hold is not counted.
 * Errors: AuthorException for endless charge. Accuracy: as asked, in practice rounding for smooth densities.
 */
public final class Moments {
    private Moments() {
    }

    /**
     * Dipole moment ∫ρ(r − r₀)dV in C m.
     *
     * @param about r₀; null is allowed for zero total charge only, of which the moment does not depend on it
     */
    public static Vector dipole(Source source, Place about, Accuracy accuracy) {
        if (about == null) {
            Tally total = sum("dipoleMoment", source, new Place(0, 0, 0), 1, accuracy, (d, value) -> value[0] = 1);
            if (!total.isZero()) {
                Amount charge = total.amount("total charge", Units.CHARGE, "C");
                throw new AuthorException("dipoleMoment of charge whose total is " + charge + ", not zero: it depends on the place it is taken about. "
                    + "Name it: dipoleMoment(at(…)).");
            }
        }
        Place origin = about == null ? new Place(0, 0, 0) : about;
        Tally sum = sum("dipoleMoment", source, origin, 3, accuracy, (d, value) -> System.arraycopy(d, 0, value, 0, 3));
        return sum.vector("dipole moment", origin, Units.CHARGE.multiply(Units.LENGTH), "C m");
    }

    /** Quadrupole moment ∫ρ(3 xᵢxⱼ − r²δᵢⱼ)dV about a place, in C m². */
    public static Quadrupole quadrupole(Source source, Place about, Accuracy accuracy) {
        Tally sum = sum("quadrupoleMoment", source, about, 6, accuracy, (d, value) -> {
            double r2 = Vectors.dot(d, d);
            for (int a = 0; a < 3; a++) {
                value[a] = 3 * d[a] * d[a] - r2;
            }
            value[3] = 3 * d[0] * d[1];
            value[4] = 3 * d[0] * d[2];
            value[5] = 3 * d[1] * d[2];
        });
        Amount[] q = sum.amounts("quadrupole moment", Units.CHARGE.multiply(Units.AREA), "C m^2");
        return new Quadrupole(about, q[0], q[1], q[2], q[3], q[4], q[5]);
    }

    private interface Moment {
        void of(double[] d, double[] value);
    }

    private static Tally sum(String question, Source source, Place about, int components, Accuracy accuracy, Moment moment) {
        double[] origin = Images.coordinates(about);
        Sweep.Asked asked = (place, element, value) -> {
            double[] d = Vectors.minus(place, origin);
            moment.of(d, value);
            for (int c = 0; c < components; c++) {
                value[c] *= element[0];
            }
            double size = (Vectors.norm(place) + Vectors.norm(origin)) * Sampler.EPS;
            return Math.abs(element[0]) * size * (components == 1 ? 0 : components == 3 ? 2 : 12 * Vectors.norm(d));
        };
        Tally sum = new Tally(accuracy, components);
        Cubature.Goal goal = new Cubature.Goal(Math.max(1e-14, 1e-5 * accuracy.relative()), 1e-3, accuracy.absoluteFloor(), accuracy.maxEvaluations() / 4);
        for (Source part : Elements.of(source)) {
            Elements.refuseEndless(question, part);
            if (Elements.dimension(part) == 0) {
                Sweep.overPoints(part, asked, 1, sum);
            } else {
                sum.add(1, Sweep.over(Domain.charge(part, false), asked, components, Crossings.none(), false, goal));
            }
        }
        return sum;
    }

    /** The six independent components, in C m². */
    public record Quadrupole(Place about, Amount xx, Amount yy, Amount zz, Amount xy, Amount xz, Amount yz) { }
}
