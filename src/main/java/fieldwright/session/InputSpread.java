package fieldwright.session;

import fieldwright.formula.Correlation;
import fieldwright.study.Correlations;
import fieldwright.study.InputTolerance;
import java.util.ArrayList;
import java.util.List;

/** By how much inputs may be off: what the tolerances and {@code corr} lines of input cells say. */
record InputSpread(List<InputTolerance> tolerances, List<Correlation> correlations) {
    static final InputSpread NONE = new InputSpread(List.of(), List.of());

    InputSpread {
        tolerances = List.copyOf(tolerances);
        correlations = List.copyOf(correlations);
    }

    InputSpread and(InputSpread more) {
        List<InputTolerance> allTolerances = new ArrayList<>(tolerances);
        allTolerances.addAll(more.tolerances);
        List<Correlation> allCorrelations = new ArrayList<>(correlations);
        allCorrelations.addAll(more.correlations);
        return new InputSpread(allTolerances, allCorrelations);
    }

    Correlations asCorrelations() {
        Correlations all = Correlations.NONE;
        for (Correlation one : correlations) {
            all = all.with(one.first(), one.second(), one.coefficient());
        }
        return all;
    }
}
