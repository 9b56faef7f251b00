package fieldwright.output;

import java.io.Serializable;
import java.util.List;
import java.util.Objects;

/** One thing a cell shows. Texts are never null: what is absent is empty. */
public sealed interface Output extends Serializable {

    /**
     * What a name of the sheet holds. A name that holds a formula, not a number, is a {@link Typeset} with that name.
     *
     * @param latexName   the name typeset, for instance {@code E_{\mathrm{roof}}}
     * @param description what it is, from a derive line; empty when not said
     * @param source      where it comes from; empty when not said
     */
    record Result(String name, String latexName, Value value, String description, String source) implements Output {
        public Result {
            requireText("name", name);
            Objects.requireNonNull(value, "value");
            latexName = orEmpty(latexName);
            description = orEmpty(description);
            source = orEmpty(source);
        }

        public Result(String name, String latexName, Value value) {
            this(name, latexName, value, "", "");
        }

        public Result withValue(Value newValue) {
            return new Result(name, latexName, newValue, description, source);
        }
    }

    /**
     * An input as the run took it.
     *
     * @param value   in SI with the unit as written for show; its tolerance is the expanded uncertainty k = 2 of what
     *                is written. Null when the input is not one number (a list, a table, a choice)
     * @param written the definition as it stands on the sheet, for instance {@code 1.80 m ± 0.02 m}
     * @param source  empty when none is given; shown as "no source"
     */
    record Given(String name, String latexName, Value.Scalar value, String written, String description, String source)
            implements Output {
        public Given {
            requireText("name", name);
            latexName = orEmpty(latexName);
            written = orEmpty(written);
            description = orEmpty(description);
            source = orEmpty(source);
        }
    }

    /**
     * One line of typeset mathematics.
     *
     * @param name      the name of the sheet this line defines; empty when it defines none
     * @param latex     the whole line, name included
     * @param plainText the same for a terminal
     */
    record Typeset(String name, String latex, String plainText, String description, String source) implements Output {
        public Typeset {
            name = orEmpty(name);
            requireText("latex", latex);
            plainText = orEmpty(plainText);
            description = orEmpty(description);
            source = orEmpty(source);
        }
    }

    /** A chart. Remarks say what a reader must know of it: points left out, points not converged. */
    record Plot(String title, Axis x, Axis y, List<Series> series, List<String> remarks) implements Output {
        public Plot {
            title = orEmpty(title);
            Objects.requireNonNull(x, "x");
            Objects.requireNonNull(y, "y");
            series = List.copyOf(series);
            remarks = List.copyOf(remarks);
        }
    }

    /** A table of texts, headed as quantity over unit: {@code rho_0 / (uC/m^3)}. Every row has one text per heading. */
    record Table(String title, List<String> headings, List<List<String>> rows, List<String> remarks) implements Output {
        public Table {
            title = orEmpty(title);
            headings = List.copyOf(headings);
            rows = rows.stream().map(List::copyOf).toList();
            remarks = List.copyOf(remarks);
            for (List<String> row : rows) {
                if (row.size() != headings.size()) {
                    throw new IllegalArgumentException("table '" + title + "': a row of " + row.size() + " under "
                            + headings.size() + " headings.");
                }
            }
        }
    }

    /**
     * A comparison that passed or failed.
     *
     * @param detail   what was found, for a reader: {@code agrees to 2e-10}
     * @param measured what was found; NaN when there is no number
     * @param allowed  what was allowed, in the same unit
     * @param unit     SI unit of both; empty when they are relative
     */
    record Check(String label, boolean passed, String detail, double measured, double allowed, String unit)
            implements Output {
        public Check {
            requireText("label", label);
            detail = orEmpty(detail);
            unit = orEmpty(unit);
        }
    }

    /**
     * A value held against a threshold.
     *
     * @param worstCase   at the worst ends of the inputs' tolerances, numerical error included; null when not established
     * @param marginAsked threshold over the value allowed
     * @param marginFound threshold over worst case, or over value + numerical error; NaN when there is no number
     * @param source      where the threshold comes from; never empty
     * @param caution     what must be said beside it; never empty
     */
    record Assessment(String label, boolean passed, Value.Scalar value, Value.Scalar worstCase, Value.Scalar threshold,
                      double marginAsked, double marginFound, String source, String caution) implements Output {
        public Assessment {
            requireText("label", label);
            Objects.requireNonNull(value, "value");
            Objects.requireNonNull(threshold, "threshold");
            requireText("source of the threshold", source);
            requireText("caution of the threshold", caution);
        }

        /** The worst status of what was judged. */
        public Status status() {
            return worstCase == null ? value.status() : value.status().and(worstCase.status());
        }
    }

    /** Something the reader must not miss; never folded away. */
    record Caution(String text, String source) implements Output {
        public Caution {
            requireText("caution", text);
            source = orEmpty(source);
        }
    }

    /** What the working takes for granted: surroundings, free space too; never folded away. */
    record Assumption(String text) implements Output {
        public Assumption {
            requireText("assumption", text);
        }
    }

    /** What a working cell printed. */
    record Printed(String text) implements Output {
        public Printed {
            text = orEmpty(text);
        }
    }

    /**
     * The author's error.
     *
     * @param line    line in the file, 1-based; 0 when the error is nowhere in the text
     * @param cell    1-based; 0 when it is in the header or in the file as a whole
     * @param message thing, value, remedy; without the place
     */
    record Problem(int line, int cell, String message) implements Output {
        public Problem {
            requireText("message", message);
        }

        /** {@code cell 7, line 41: message}. */
        public String text() {
            String place = (cell > 0 ? "cell " + cell : "") + (cell > 0 && line > 0 ? ", " : "") + (line > 0 ? "line " + line : "");
            return place.isEmpty() ? message : place + ": " + message;
        }
    }

    /** A note with its live results filled in, as CommonMark. */
    record Note(String commonmark) implements Output {
        public Note {
            commonmark = orEmpty(commonmark);
        }
    }

    private static String orEmpty(String text) {
        return text == null ? "" : text;
    }

    private static void requireText(String what, String text) {
        if (text == null || text.isBlank()) {
            throw new IllegalArgumentException(what + " is empty: it must be stated.");
        }
    }
}
