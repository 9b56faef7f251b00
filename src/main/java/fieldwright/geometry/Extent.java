package fieldwright.geometry;

import java.util.LinkedHashSet;
import java.util.Set;

import fieldwright.formula.Formula;

/** What a region says about one coordinate: held fixed, or between limits; either may depend on other coordinates. */
public sealed interface Extent {
    Set<String> variables();

    record Fixed(Formula at) implements Extent {
        @Override
        public Set<String> variables() {
            return at.variables();
        }
    }

    record Limits(Formula from, Formula to) implements Extent {
        @Override
        public Set<String> variables() {
            Set<String> all = new LinkedHashSet<>(from.variables());
            all.addAll(to.variables());
            return all;
        }
    }
}
