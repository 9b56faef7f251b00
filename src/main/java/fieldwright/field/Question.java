package fieldwright.field;

import java.util.List;

/**
 * Where a source is to be seen for one answer, in given surroundings: probes for the place and its images. For a place on an
 * interface {@code side} is the unit normal towards {@code probes}; the other side has {@code behind} (null: a conductor, all zero).
 * Permittivities are relative. No probes: inside a conductor.
 */
record Question(List<Probe> probes, double permittivity, double[] side, List<Probe> behind, double permittivityBehind) {
    static Question of(List<Probe> probes, double permittivity) {
        return new Question(probes, permittivity, null, null, permittivity);
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
