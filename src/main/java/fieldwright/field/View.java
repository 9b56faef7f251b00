package fieldwright.field;

import java.util.List;

/**
 * What is summed for one side of a place: the source seen through {@code probes}; {@code green} integrated over it (null: nothing); a
 * steady field (V/m) and potential (V) that do not depend on it. For parts of the source further away than {@code farBeyond} (m),
 * {@code far} alone stands for probes and green together (null: never); for charge all round an axis {@code round} does (null: never). In a conductor the field is zero.
 */
record View(List<Probe> probes, Green green, Green far, double farBeyond, double[] field, double potential, boolean isConductor,
    Round round) {
    private static final double[] NONE = new double[3];

    /** Within a grounded conductor. */
    static final View GROUNDED = new View(List.of(), null, null, 0, NONE, 0, true, null);

    static View of(List<Probe> probes) {
        return new View(probes, null, null, 0, NONE, 0, false, null);
    }

    /** Within a conductor whose potential is that seen through the probes. */
    static View conductor(List<Probe> probes) {
        return new View(probes, null, null, 0, NONE, 0, true, null);
    }

    static View of(List<Probe> probes, Green green) {
        return new View(probes, green, null, 0, NONE, 0, false, null);
    }

    View orFar(Green far, double beyond) {
        return new View(probes, green, far, beyond, field, potential, isConductor, round);
    }

    View orRound(Round parts) {
        return new View(probes, green, far, farBeyond, field, potential, isConductor, parts);
    }

    /** Within a round wall: what stands for probes and green for charge that is the same all round its axis. */
    record Round(RoundGreen.Cylinder cylinder, java.util.function.Function<Ball, RingGreen.Parts> parts) { }

    View with(Green part) {
        return new View(probes, part, far, farBeyond, field, potential, isConductor, round);
    }

    /** With a steady field and potential more. */
    View plus(double[] e, double v) {
        return new View(probes, green, far, farBeyond, new double[] {field[0] + e[0], field[1] + e[1], field[2] + e[2]}, potential + v, isConductor, round);
    }

    boolean hasSteadyField() {
        return field[0] != 0 || field[1] != 0 || field[2] != 0;
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
