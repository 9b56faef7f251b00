package fieldwright.judge;

import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;

/**
 * A limit that a value is held against.
 *
 * @param name what begins there
 * @param value the limit; positive
 * @param source where the number comes from; a number from memory or common practice says so
 * @param caution what a reader must know before relying on it; defers to local codes and licensed practice
 */
public record Threshold(String name, Amount value, String source, String caution) {
    public Threshold {
        require("name", name, name);
        require("source", source, name);
        require("caution", caution, name);
        if (!(value.si() > 0) || !value.isConverged() || Double.isInfinite(value.si())) {
            throw new AuthorException("threshold '" + name + "' = " + value + ": must be finite and > 0.");
        }
    }

    /** The same limit, its value and source replaced: for a figure from a standard that is at hand. */
    public Threshold at(Amount newValue, String newSource) {
        return new Threshold(name, newValue, newSource, caution);
    }

    private static void require(String what, String text, String name) {
        if (text == null || text.isBlank()) {
            throw new AuthorException("threshold '" + name + "' has no " + what + ". Say where the number comes from and what it does not cover.");
        }
    }
}
