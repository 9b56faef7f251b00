package fieldwright.field;

import java.util.ArrayList;
import java.util.List;

import fieldwright.quantity.Place;

/**
 * Where a source is to be seen for one answer, in given surroundings: probes for the place and its images. For a place on an
 * interface {@code side} is the unit normal towards {@code probes}; the other side has {@code behind} (null: a conductor, all zero).
 * Permittivities are relative. No probes: inside a conductor.
 */
record Question(List<Probe> probes, double permittivity, double[] side, List<Probe> behind, double permittivityBehind) {
    static Question of(List<Probe> probes, double permittivity) {
        return new Question(probes, permittivity, null, null, permittivity);
    }

    /** What is left of the answer at {@code at} without the source's own field in the medium it stands in: that of induced charge. */
    Question reaction(Place at) {
        return new Question(withoutOwn(probes, at), permittivity, side, side == null ? null : withoutOwn(behind == null ? List.of() : behind, at),
            permittivity);
    }

    private static List<Probe> withoutOwn(List<Probe> probes, Place at) {
        List<Probe> rest = new ArrayList<>();
        double own = 1;
        for (Probe probe : probes) {
            if (probe.isPlain() && at.equals(new Place(probe.place()[0], probe.place()[1], probe.place()[2]))) {
                own -= probe.c();
            } else {
                rest.add(probe);
            }
        }
        if (own != 0) {
            rest.add(Probe.direct(at.x(), at.y(), at.z()).times(-own));
        }
        return rest;
    }

    boolean isInsideConductor() {
        return probes.isEmpty();
    }

    /** True when image charges balance: an endless source then has a potential. */
    boolean isBalanced() {
        double sum = 0;
        for (Probe p : probes) {
            sum += p.c();
        }
        return probes.size() > 1 && sum == 0;
    }
}
