package fieldwright.sheet;

import fieldwright.output.Output;
import java.util.ArrayList;
import java.util.List;
import java.util.Objects;
import java.util.stream.Collectors;

/**
 * A block of a sheet: what its author wrote, and the record stored under it. Immutable.
 *
 * <p>The source are the lines that do not belong to the form, up to the last that is not blank, without escapes and
 * joined by {@code \n}. Blank lines behind it only separate cells.
 */
public final class Cell {

    /** The four kinds. */
    public enum Kind {
        NOTE, INPUT, DERIVE, WORKING;

        /** As written in the file. */
        public String word() {
            return name().toLowerCase(java.util.Locale.ROOT);
        }
    }

    private final Kind kind;
    private final String label;
    private final Line head;
    private final List<Line> body;
    private final int headLine;
    private final String source;

    Cell(Kind kind, String label, Line head, List<Line> body, int headLine) {
        this.kind = kind;
        this.label = label;
        this.head = head;
        this.body = List.copyOf(body);
        this.headLine = headLine;
        this.source = sourceIndices().stream().map(i -> this.body.get(i).unescaped()).collect(Collectors.joining("\n"));
    }

    /** A new cell, to be inserted into a sheet. */
    public static Cell of(Kind kind, String label, String source) {
        String cleanLabel = label == null ? "" : label.strip();
        if (!Line.isOne(cleanLabel)) {
            throw new IllegalArgumentException("label '" + cleanLabel + "': it must stand on one line.");
        }
        return new Cell(kind, cleanLabel, new Line(headText(kind, cleanLabel), "\n"), List.of(), 0).withSource(source, "\n");
    }

    public Kind kind() {
        return kind;
    }

    /** What stands behind the kind; empty when there is nothing. */
    public String label() {
        return label;
    }

    /** What the author wrote, lines joined by {@code \n}. */
    public String source() {
        return source;
    }

    /** Line of the file on which {@code :: kind} stands, 1-based; 0 for a cell outside a sheet. */
    public int headLine() {
        return headLine;
    }

    /** Line of the file on which the body begins. */
    public int firstLine() {
        return headLine + 1;
    }

    /** Line of the file on which a line of the source stands, both 1-based. */
    public int lineOf(int sourceLine) {
        List<Integer> indices = sourceIndices();
        if (indices.isEmpty()) {
            return headLine;
        }
        int within = Math.min(Math.max(sourceLine, 1), indices.size());
        return headLine + 1 + indices.get(within - 1);
    }

    /** The record lines, in order, the unreadable ones too. */
    public List<RecordLine> records() {
        return body.stream().filter(line -> line.is(":rec")).map(line -> RecordLine.read(line.text())).toList();
    }

    /** The lines of an input cell that are not blank, in order. */
    public List<InputLine> inputs() {
        return EntryParser.inputs(this);
    }

    /** The formulas of a derive cell, in order, each with the lines that continue it. */
    public List<DeriveLine> derives() {
        return EntryParser.derives(this);
    }

    Line head() {
        return head;
    }

    List<Line> body() {
        return body;
    }

    int lineCount() {
        return 1 + body.size();
    }

    boolean endsBlank() {
        return !body.isEmpty() && body.get(body.size() - 1).isBlank();
    }

    Cell at(int newHeadLine) {
        return newHeadLine == headLine ? this : new Cell(kind, label, head, body, newHeadLine);
    }

    Cell withLabel(String newLabel, String end) {
        Cell named = of(kind, newLabel, "");
        return named.label.equals(label) ? this : new Cell(kind, named.label, new Line(named.head.text(), end), body, headLine);
    }

    Cell withSource(String newSource, String end) {
        if (newSource.equals(source)) {
            return this;
        }
        List<Line> newBody = new ArrayList<>();
        for (Line line : Line.split(newSource.replace("\r\n", "\n").replace('\r', '\n'))) {
            newBody.add(Line.ofSource(line.text(), end));
        }
        while (!newBody.isEmpty() && newBody.get(newBody.size() - 1).isBlank()) {
            newBody.remove(newBody.size() - 1);
        }
        int last = lastSourceIndex();
        for (int i = 0; i < body.size(); i++) {
            if (i > last || body.get(i).isForm()) {
                newBody.add(body.get(i));
            }
        }
        Cell changed = new Cell(kind, label, head, newBody, headLine);
        return changed.source.equals(source) ? this : changed;
    }

    /** Replaces the readable record lines; a line that stores the very same keeps its text. */
    Cell withRecords(List<? extends Output> results, String end) {
        List<Line> oldRecords = body.stream().filter(line -> line.is(":rec")).toList();
        List<Line> newRecords = new ArrayList<>();
        for (Output result : results) {
            RecordLine wanted = RecordLine.of(result);
            newRecords.add(oldRecords.stream().filter(line -> RecordLine.read(line.text()).sameContent(wanted)).findFirst()
                    .orElse(new Line(wanted.text(), end)));
        }
        oldRecords.stream().filter(line -> !RecordLine.read(line.text()).isReadable()).forEach(newRecords::add);

        List<Line> newBody = new ArrayList<>();
        int place = oldRecords.isEmpty() ? lastSourceIndex() + 1 : body.indexOf(oldRecords.get(0));
        for (int i = 0; i <= body.size(); i++) {
            if (i == place) {
                newBody.addAll(newRecords);
            }
            if (i < body.size() && !body.get(i).is(":rec")) {
                newBody.add(body.get(i));
            }
        }
        return newBody.equals(body) ? this : new Cell(kind, label, head, newBody, headLine);
    }

    Cell withBlankEnd(String end) {
        if (endsBlank()) {
            return this;
        }
        List<Line> newBody = new ArrayList<>(body);
        newBody.add(new Line("", end));
        return new Cell(kind, label, head, newBody, headLine);
    }

    private static String headText(Kind kind, String label) {
        return label.isEmpty() ? ":: " + kind.word() : ":: " + kind.word() + " " + label;
    }

    private int lastSourceIndex() {
        for (int i = body.size() - 1; i >= 0; i--) {
            if (!body.get(i).isForm() && !body.get(i).isBlank()) {
                return i;
            }
        }
        return -1;
    }

    private List<Integer> sourceIndices() {
        List<Integer> indices = new ArrayList<>();
        for (int i = 0; i <= lastSourceIndex(); i++) {
            if (!body.get(i).isForm()) {
                indices.add(i);
            }
        }
        return indices;
    }

    /** Same bytes; where in the sheet it stands does not matter. */
    @Override
    public boolean equals(Object other) {
        return other instanceof Cell that && head.equals(that.head) && body.equals(that.body);
    }

    @Override
    public int hashCode() {
        return Objects.hash(head, body);
    }

    @Override
    public String toString() {
        return "Cell[" + head.text() + ", line " + headLine + "]";
    }
}
