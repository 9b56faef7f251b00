package fieldwright.field;

import fieldwright.field.closed.ClosedForm;
import fieldwright.field.closed.EndlessCylinder;
import fieldwright.field.closed.EndlessLine;
import fieldwright.field.closed.EndlessPlane;
import fieldwright.field.closed.EndlessTube;
import fieldwright.field.closed.HalfEndlessLine;
import fieldwright.field.closed.Slab;
import fieldwright.field.closed.Strip;
import fieldwright.geometry.Frame;
import java.util.List;

/**
 * One body of a source: its patches, from number {@code first} on among all, and the closed forms whose sum is its field (an annulus: a
 * disc less a disc), none when there are none or none are wanted. The patches take over at places where the forms say too little.
 */
record SpreadBody(List<Placed> forms, int first, List<Patch> patches) {
    /** A closed form and where its frame stands. */
    record Placed(ClosedForm form, Frame frame) {
        boolean isEndless() {
            return form instanceof EndlessLine || form instanceof HalfEndlessLine || form instanceof Strip || form instanceof EndlessTube
                || form instanceof EndlessCylinder || form instanceof EndlessPlane || form instanceof Slab;
        }

        /** Whether the form changes along one of its own axes, so that the rounding of the place along it counts. */
        boolean changesAlong(int axis) {
            if (form instanceof EndlessLine || form instanceof EndlessTube || form instanceof EndlessCylinder) {
                return axis != 2;
            }
            return form instanceof Strip ? axis != 1 : !(form instanceof EndlessPlane || form instanceof Slab) || axis == 2;
        }
    }

    boolean isEndless() {
        return forms.stream().anyMatch(Placed::isEndless);
    }
}
