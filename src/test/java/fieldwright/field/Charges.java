package fieldwright.field;

import fieldwright.charge.Charge;
import fieldwright.charge.PointCharge;
import fieldwright.charge.Source;
import fieldwright.charge.Surroundings;
import fieldwright.formula.Formula;
import fieldwright.geometry.Bodies;
import fieldwright.geometry.CoordinateRegion;
import fieldwright.geometry.CoordinateSystem;
import fieldwright.geometry.Region;
import fieldwright.quantity.Amount;
import fieldwright.quantity.Place;
import fieldwright.quantity.Units;

/** Charges in free space by few words, for tests: lengths in m, densities as plain formulas in SI. */
final class Charges {
    private Charges() {
    }

    static Formula length(double v) {
        return Formula.constant(Amount.si(v, 0, Units.LENGTH));
    }

    static Source point(double x, double y, double z, double q) {
        return new PointCharge(new Place(x, y, z), Amount.si(q, 0, Units.CHARGE), Surroundings.FREE_SPACE);
    }

    static Source charge(Region region, String density) {
        String unit = region.dimension() == 1 ? "C/m" : region.dimension() == 2 ? "C/m^2" : "C/m^3";
        return Charge.of(region, Formula.plain(density, "m", unit, ReferenceCases.NOTHING)).with(Surroundings.FREE_SPACE);
    }

    static Region box(double x0, double x1, double y0, double y1, double z0, double z1) {
        return CoordinateRegion.in(CoordinateSystem.CARTESIAN).limits("x", length(x0), length(x1)).limits("y", length(y0), length(y1))
            .limits("z", length(z0), length(z1));
    }

    static Region ball(double radius) {
        return Bodies.ball(length(radius));
    }

    static Region disc(double radius) {
        return Bodies.disc(length(radius));
    }

    static Region ring(double radius) {
        return Bodies.ring(length(radius));
    }

    static Region cylinder(double radius, double height) {
        return Bodies.cylinder(length(radius), length(height));
    }

    static Region rectangle(double x, double y) {
        return Bodies.rectangle(length(x), length(y));
    }

    static Region rod(double x0, double y0, double z0, double x1, double y1, double z1) {
        return Bodies.rod(new Place(x0, y0, z0), new Place(x1, y1, z1));
    }
}
