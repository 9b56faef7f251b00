package fieldwright.session;

import fieldwright.charge.Charge;
import fieldwright.charge.Surroundings;
import fieldwright.field.Accuracy;
import fieldwright.field.FieldSolver;
import fieldwright.formula.Formula;
import fieldwright.geometry.Bodies;
import fieldwright.quantity.Amount;
import fieldwright.quantity.Place;
import fieldwright.quantity.StoppedException;

/** A small question asked for nothing, so that the numeric classes are loaded while another thread starts JShell. */
final class WarmUp {
    private WarmUp() {
    }

    static void run() {
        try {
            ask();
        } catch (StoppedException e) {
            // a stop was meant for the sheet; what is loaded is loaded
        }
    }

    private static void ask() {
        Formula length = Formula.constant(Amount.of(1, "m"));
        Formula density = Formula.constant(Amount.of(1, "nC/m^3")).times(Formula.parse("1 - rho^2/(1 m)^2"));
        Charge charge = new Charge(Bodies.cylinder(length, length), density, new Surroundings.GroundPlane("z", 1, -1));
        FieldSolver solver = FieldSolver.of(charge, Accuracy.DEFAULT);
        solver.totalCharge();
        solver.electricField(new Place(0, 0, 1));
        solver.electricField(new Place(0.3, 0, 0.9));
        solver.potential(new Place(0, 0, 0.5));
    }
}
