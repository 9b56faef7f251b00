package fieldwright.app;

import fieldwright.formula.Names;
import fieldwright.output.CellOutcome;
import fieldwright.output.Output;
import fieldwright.sheet.Cell;
import fieldwright.sheet.DeriveEntry;
import fieldwright.sheet.InputEntry;
import fieldwright.sheet.RecordLine;
import java.util.HashSet;
import java.util.List;
import java.util.Objects;
import java.util.Set;
import java.util.function.UnaryOperator;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/**
 * One step of the sheet as it stands now, with what is known of its results.
 *
 * @param id      stays the same while the step is edited or moved
 * @param number  place on the sheet, 1-based
 * @param cell    its text
 * @param worked  the cell as it was when it was last worked out; null when it was not worked here
 * @param outcome what it gave then; null when it was not worked here
 * @param stale   true when a clean run might give something else than what is shown
 */
record Step(long id, int number, Cell cell, Cell worked, CellOutcome outcome, boolean stale) {

    /** True when the results shown are those stored in the file, not worked out here. */
    boolean isRecorded() {
        return outcome == null && cell.records().stream().anyMatch(RecordLine::isReadable);
    }

    /** What the step shows: of the last run, or of the record when there was none. */
    List<Output> outputs() {
        return outcome != null ? outcome.outputs() : cell.records().stream().map(RecordLine::content).filter(Objects::nonNull).toList();
    }

    <T extends Output> List<T> all(Class<T> type) {
        return outputs().stream().filter(type::isInstance).map(type::cast).toList();
    }

    /** True when its own text differs from what was worked. */
    boolean isEdited() {
        return worked == null || !worked.source().equals(cell.source()) || worked.kind() != cell.kind();
    }

    /** Names of the sheet that it declares, by its text and by its last run; folded as formulas fold them. */
    Set<String> names() {
        Set<String> names = new HashSet<>();
        if (cell.kind() == Cell.Kind.INPUT) {
            cell.inputs().stream().filter(InputEntry.class::isInstance).forEach(e -> names.add(Names.fold(((InputEntry) e).name())));
        } else if (cell.kind() == Cell.Kind.DERIVE) {
            cell.derives().stream().filter(DeriveEntry.class::isInstance).forEach(e -> names.add(Names.fold(((DeriveEntry) e).name())));
        }
        all(Output.Result.class).forEach(r -> names.add(r.name()));
        all(Output.Given.class).forEach(g -> names.add(g.name()));
        all(Output.Typeset.class).forEach(t -> names.add(t.name()));
        names.remove("");
        return names;
    }

    /** A quoted name in a note; with a backslash before it the brace stands for itself. */
    private static final Pattern QUOTED = Pattern.compile("(?<!\\\\)\\{([\\p{L}_][\\p{L}\\p{N}_]*)\\}");

    /** Names that a note quotes as {@code {E_roof}}; empty for other steps. */
    Set<String> quotes() {
        Set<String> names = new HashSet<>();
        if (cell.kind() == Cell.Kind.NOTE) {
            QUOTED.matcher(cell.source()).results().forEach(m -> names.add(Names.fold(m.group(1))));
        }
        return names;
    }

    /** A note's CommonMark with the figures of what it quotes; a name without figures stays as it is written. */
    String filled(UnaryOperator<String> figures) {
        return QUOTED.matcher(cell.source()).replaceAll(m -> {
            String known = figures.apply(Names.fold(m.group(1)));
            return Matcher.quoteReplacement(known == null ? m.group() : "**" + known + "**");
        });
    }

    Step asStale() {
        return new Step(id, number, cell, worked, outcome, true);
    }

    /** Line within the step's text of a line of the file as it was worked, 1-based; 0 when it is not in this step. */
    int lineWithin(int fileLine) {
        if (worked == null) {
            return 0;
        }
        int lines = (int) worked.source().lines().count();
        for (int i = 1; i <= lines; i++) {
            if (worked.lineOf(i) == fileLine) {
                return i;
            }
        }
        return 0;
    }
}
