package fieldwright.field;

import java.util.ArrayList;
import java.util.List;

import fieldwright.quantity.Place;

/**
 * How a source is to be seen for one answer, in given surroundings. For a place on a conductor or an interface {@code side} is the
 * unit normal towards what {@code here} sees, and {@code behind} what the other side sees. Permittivities are relative.
 */
record Question(View here, double permittivity, double[] side, View behind, double permittivityBehind) {
    static Question of(View here, double permittivity) {
        return new Question(here, permittivity, null, null, permittivity);
    }

    /** On a conductor whose inside is {@code within}. */
    static Question on(View here, double[] side, View within) {
        return new Question(here, 1, side, within, 1);
    }

    /** The side whose potential is that of the place: both have the same, a conductor's is simpler. */
    View forPotential() {
        return side == null ? here : behind;
    }

    /**
     * What is left of the answer at {@code at} without the source's own field in the medium it stands in, and without what is there
     * when the source is not: that of the charge it induces.
     */
    Question reaction(Place at) {
        return new Question(reaction(here, at), permittivity, side, side == null ? null : reaction(behind, at), permittivity);
    }

    private static View reaction(View view, Place at) {
        View rest = View.of(withoutOwn(view.isConductor() ? steady(view.probes()) : view.probes(), at));
        View.Round round = view.round() == null ? null : new View.Round(view.round().cylinder(), ball -> {
            RingGreen.Parts parts = view.round().parts().apply(ball);
            return new RingGreen.Parts(withoutOwn(parts.probes(), at), parts.green(), parts.wall());
        });
        return rest.with(view.green()).orRound(round);
    }

    /** Potential only. */
    private static List<Probe> steady(List<Probe> probes) {
        return probes.stream().map(p -> new Probe(p.place(), new double[9], null, p.c())).toList();
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
}
