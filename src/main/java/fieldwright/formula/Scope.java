package fieldwright.formula;

import java.util.Collection;
import java.util.List;

/** What names mean to a formula. */
public interface Scope {
    /** Knows no name and cannot integrate. */
    Scope EMPTY = new Scope() {
        @Override
        public Binding lookup(String name) {
            return null;
        }

        @Override
        public Collection<String> names() {
            return List.of();
        }

        @Override
        public Integrator integrator() {
            return null;
        }
    };

    /** The meaning of an ASCII name, or null when it is not known here. */
    Binding lookup(String name);

    /** All names, for "closest defined name". */
    Collection<String> names();

    /** Works {@code integral(…)}; null when integrals cannot be worked here. */
    Integrator integrator();
}
