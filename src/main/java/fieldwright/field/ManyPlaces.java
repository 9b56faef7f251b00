package fieldwright.field;

import fieldwright.charge.Source;
import fieldwright.field.tree.Workers;
import fieldwright.quantity.Amount;
import fieldwright.quantity.Place;
import fieldwright.quantity.Vector;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.function.BiFunction;

/**
 * One question at many places, shared among threads; what comes out does not depend on how many. Sets of very many charges are worked
 * for all places together by a treecode. A stop request ends it.
 */
public final class ManyPlaces {
    /** Fewer places than this are worked one by one: a tree is not worth building. */
    private static final int FEW = 300;

    private final Source source;
    private final Accuracy accuracy;
    private final Workers workers;

    private ManyPlaces(Source source, Accuracy accuracy, Workers workers) {
        this.source = source;
        this.accuracy = accuracy;
        this.workers = workers;
    }

    public static ManyPlaces of(Source source, Accuracy accuracy, Workers workers) {
        return new ManyPlaces(source, accuracy, workers);
    }

    /** E in V/m. */
    public List<Vector> electricFields(List<Place> places) {
        return each(places, FieldSolver::electricField, crowds(places, null, false));
    }

    /** D in C/m². */
    public List<Vector> fluxDensities(List<Place> places) {
        return each(places, FieldSolver::fluxDensity, crowds(places, null, false));
    }

    /** V, zero at infinity or on the grounded conductor, or at {@code zero} when that is not null. */
    public List<Amount> potentials(List<Place> places, Place zero) {
        return each(places, zero == null ? FieldSolver::potential : (solver, place) -> solver.potential(place, zero), crowds(places, zero, true));
    }

    private <T> List<T> each(List<Place> places, BiFunction<FieldSolver, Place, T> question, List<Crowd> crowds) {
        Object[] answers = new Object[places.size()];
        workers.each(answers.length, () -> FieldSolver.of(source, accuracy, crowds.stream().map(Crowd::copy).toList()),
            (solver, i) -> answers[i] = question.apply(solver, places.get(i)));
        @SuppressWarnings("unchecked")
        List<T> all = (List<T>) Arrays.asList(answers);
        return all;
    }

    private List<Crowd> crowds(List<Place> places, Place zero, boolean potential) {
        List<Crowd> crowds = Compiled.of(source, accuracy.closedForms()).crowds;
        if (crowds.isEmpty() || places.size() < FEW) {
            return crowds;
        }
        List<Place> seen = new ArrayList<>();
        boolean both = false;
        List<Place> asked = new ArrayList<>(places);
        if (zero != null) {
            asked.add(zero);
        }
        for (Place place : asked) {
            Question q = Images.question(source.around(), place);
            for (View view : q.side() == null ? List.of(potential ? q.forPotential() : q.here()) : List.of(q.here(), q.behind())) {
                for (Probe probe : view.probes()) {
                    seen.add(new Place(probe.place()[0], probe.place()[1], probe.place()[2]));
                    both |= probe.b() != null;
                }
            }
        }
        boolean field = !potential;
        boolean alsoPotential = potential || both;
        return crowds.stream().map(c -> c.preparedFor(seen, field, alsoPotential, 0.5 * accuracy.relative(), workers)).toList();
    }
}
