package fieldwright.words;

import fieldwright.field.search.Peak;
import fieldwright.quantity.Amount;
import fieldwright.quantity.Place;
import fieldwright.quantity.Units;

/** The largest field strength found over a region. Immutable. */
public final class FieldPeak {
    private final Peak peak;

    FieldPeak(Peak peak) {
        this.peak = peak;
    }

    /** V/m; its error contains what the search left open. */
    public Amount magnitude() {
        return peak.magnitude();
    }

    public Place place() {
        return peak.place();
    }

    /** No larger value is expected anywhere in the region; not known where the field is unbounded. */
    public Amount upTo() {
        return peak.magnitude().isConverged() ? Amount.si(peak.upTo(), 0, Units.FIELD) : peak.magnitude();
    }

    @Override
    public String toString() {
        return peak.magnitude() + " at (" + peak.place().x() + ", " + peak.place().y() + ", " + peak.place().z() + ") m";
    }
}
