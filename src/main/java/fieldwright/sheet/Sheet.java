package fieldwright.sheet;

import fieldwright.output.Output;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Objects;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import java.util.stream.Collectors;

/**
 * A sheet: header and cells. Immutable; {@code Sheet.parse(text).write()} is {@code text}, and after a change all that
 * was not changed keeps its bytes. Cells are counted from 0 here, from 1 before a reader.
 */
public final class Sheet {
    static final String BYTE_ORDER_MARK = "\uFEFF";

    private static final String FIRST_LINE = "fieldwright sheet 1";
    private static final Pattern FORM_NUMBER = Pattern.compile("fieldwright sheet (\\S+)\\s*");
    private static final Pattern CELL_HEAD = Pattern.compile("::\\s*(\\S*)(.*)", Pattern.DOTALL);

    private final boolean marked;
    private final boolean finalNewline;
    private final String lineEnd;
    private final Header header;
    private final List<Cell> cells;

    private Sheet(boolean marked, boolean finalNewline, String lineEnd, Header header, List<Cell> cells) {
        this.marked = marked;
        this.finalNewline = finalNewline;
        this.lineEnd = lineEnd;
        this.header = header;
        List<Cell> placed = new ArrayList<>();
        int line = header.lines().size() + 1;
        for (Cell cell : cells) {
            placed.add(cell.at(line));
            line += cell.lineCount();
        }
        this.cells = List.copyOf(placed);
    }

    /** A sheet without a cell. */
    public static Sheet empty() {
        return new Sheet(false, true, "\n", new Header(List.of(new Line(FIRST_LINE, "\n"), new Line("", "\n"))), List.of());
    }

    /**
     * Reads a sheet.
     *
     * @throws SheetException when the text is not one; with line, thing, value and remedy
     */
    public static Sheet parse(String text) throws SheetException {
        boolean marked = text.startsWith(BYTE_ORDER_MARK);
        List<Line> lines = Line.split(marked ? text.substring(1) : text);
        requireFirstLine(lines);
        String lineEnd = lines.get(0).end().isEmpty() ? "\n" : lines.get(0).end();
        boolean finalNewline = !lines.get(lines.size() - 1).end().isEmpty();
        if (!finalNewline) {
            lines.set(lines.size() - 1, new Line(lines.get(lines.size() - 1).text(), lineEnd));
        }
        int next = endOfBlock(lines, 1);
        Header header = parseHeader(lines.subList(0, next));
        List<Cell> cells = new ArrayList<>();
        while (next < lines.size()) {
            int end = endOfBlock(lines, next + 1);
            cells.add(parseCell(lines.subList(next, end), next + 1));
            next = end;
        }
        return new Sheet(marked, finalNewline, lineEnd, header, cells);
    }

    private static void requireFirstLine(List<Line> lines) throws SheetException {
        if (lines.stream().allMatch(Line::isBlank)) {
            throw new SheetException(lines.isEmpty() ? 0 : 1,
                    "the file is empty. A sheet begins with the line '" + FIRST_LINE + "'.");
        }
        String first = lines.get(0).text();
        Matcher form = FORM_NUMBER.matcher(first);
        if (!form.matches()) {
            throw new SheetException(1, "not a sheet: the first line is '" + shortened(first) + "'. A sheet begins with the line '"
                    + FIRST_LINE + "'.");
        }
        if (!form.group(1).equals("1")) {
            throw new SheetException(1, "sheet of form '" + shortened(form.group(1))
                    + "': this program reads form 1. Use the version of the program that wrote it.");
        }
    }

    private static int endOfBlock(List<Line> lines, int from) {
        int end = from;
        while (end < lines.size() && !lines.get(end).text().startsWith("::")) {
            end++;
        }
        return end;
    }

    private static Header parseHeader(List<Line> lines) throws SheetException {
        for (int i = 1; i < lines.size(); i++) {
            Line line = lines.get(i);
            if (line.is(":rec")) {
                throw new SheetException(i + 1, "':rec' above the first cell: a record belongs under the cell that gave it. "
                        + "Move the line there or delete it.");
            }
            requireKnownForm(line, i + 1);
            if (!line.isForm() && !line.isBlank() && !Header.isField(line.text())) {
                throw new SheetException(i + 1, "'" + shortened(line.text()) + "' stands in no cell and is no header line "
                        + "'name: value'. Begin a cell above it, for instance ':: note'.");
            }
        }
        return new Header(lines);
    }

    private static Cell parseCell(List<Line> lines, int headLine) throws SheetException {
        Matcher head = CELL_HEAD.matcher(lines.get(0).text());
        String word = head.matches() ? head.group(1) : "";
        Cell.Kind kind = Arrays.stream(Cell.Kind.values()).filter(known -> known.word().equals(word)).findFirst()
                .orElseThrow(() -> new SheetException(headLine, "unknown kind of cell '" + shortened(word)
                        + "'. Write ':: note', ':: input', ':: derive' or ':: working'."));
        for (int i = 1; i < lines.size(); i++) {
            requireKnownForm(lines.get(i), headLine + i);
        }
        return new Cell(kind, head.group(2).strip(), lines.get(0), lines.subList(1, lines.size()), headLine);
    }

    private static void requireKnownForm(Line line, int number) throws SheetException {
        if (line.isForm() && !line.is(":rec") && !line.is(":signed")) {
            throw new SheetException(number, "unknown line '" + shortened(line.text()) + "': a line that begins with ':' is "
                    + "'::' and a kind, ':rec' or ':signed'. If it belongs to the text of the cell, write '\\' before it.");
        }
    }

    private static String shortened(String text) {
        return text.length() <= 60 ? text : text.substring(0, text.offsetByCodePoints(0, text.codePointCount(0, 57))) + "…";
    }

    /** The text of the file. */
    public String write() {
        StringBuilder text = new StringBuilder(marked ? BYTE_ORDER_MARK : "");
        List<Line> lines = lines();
        for (int i = 0; i < lines.size(); i++) {
            text.append(lines.get(i).text());
            if (i < lines.size() - 1 || finalNewline) {
                text.append(lines.get(i).end());
            }
        }
        return text.toString();
    }

    private List<Line> lines() {
        List<Line> lines = new ArrayList<>(header.lines());
        for (Cell cell : cells) {
            lines.add(cell.head());
            lines.addAll(cell.body());
        }
        return lines;
    }

    public Header header() {
        return header;
    }

    public List<Cell> cells() {
        return cells;
    }

    /** The signatures, wherever they stand. */
    public List<Signature> signatures() {
        List<Line> lines = lines();
        List<Signature> signatures = new ArrayList<>();
        for (int i = 0; i < lines.size(); i++) {
            if (lines.get(i).is(":signed")) {
                signatures.add(Signature.read(lines.get(i).text(), i + 1));
            }
        }
        return List.copyOf(signatures);
    }

    /** Digest of the whole text. */
    public String digest() {
        return Digest.of(write());
    }

    /** With another source in one cell; its record stays, to be compared or replaced. */
    public Sheet withCell(int index, String source) {
        return withCell(index, cells.get(index).withSource(source, lineEnd));
    }

    public Sheet withLabel(int index, String label) {
        return withCell(index, cells.get(index).withLabel(label, lineEnd));
    }

    /**
     * With these results, checks and assessments as the record of one cell. Record lines that cannot be read stay, and
     * so does the text of a line that stores the very same.
     */
    public Sheet withRecords(int index, List<? extends Output> results) {
        return withCell(index, cells.get(index).withRecords(results, lineEnd));
    }

    private Sheet withCell(int index, Cell cell) {
        List<Cell> newCells = new ArrayList<>(cells);
        newCells.set(index, cell);
        return withCells(newCells);
    }

    /** With a new cell before the one at this index; an index of {@code cells().size()} puts it last. */
    public Sheet insert(int index, Cell cell) {
        List<Cell> newCells = new ArrayList<>(cells);
        Cell fitted = withLineEnd(cell);
        newCells.add(index, index < cells.size() ? fitted.withBlankEnd(lineEnd) : fitted);
        if (index == 0) {
            return new Sheet(marked, finalNewline, lineEnd, headerWithBlankEnd(), newCells);
        }
        newCells.set(index - 1, newCells.get(index - 1).withBlankEnd(lineEnd));
        return withCells(newCells);
    }

    /** Without one cell and its record. */
    public Sheet remove(int index) {
        List<Cell> newCells = new ArrayList<>(cells);
        newCells.remove(index);
        return withCells(newCells);
    }

    /** With another value in the header line of that name, or a new line where there is none. */
    public Sheet withHeader(String name, String value) {
        return new Sheet(marked, finalNewline, lineEnd, header.with(name, value.strip(), lineEnd), cells);
    }

    private Sheet withCells(List<Cell> newCells) {
        return new Sheet(marked, finalNewline, lineEnd, header, newCells);
    }

    private Header headerWithBlankEnd() {
        List<Line> lines = new ArrayList<>(header.lines());
        if (!lines.get(lines.size() - 1).isBlank()) {
            lines.add(new Line("", lineEnd));
        }
        return new Header(lines);
    }

    /** A cell made elsewhere takes the line ends of this file. */
    private Cell withLineEnd(Cell cell) {
        List<Line> body = cell.body().stream().map(line -> new Line(line.text(), lineEnd)).collect(Collectors.toList());
        return new Cell(cell.kind(), cell.label(), new Line(cell.head().text(), lineEnd), body, 0);
    }

    @Override
    public boolean equals(Object other) {
        return other instanceof Sheet that && write().equals(that.write());
    }

    @Override
    public int hashCode() {
        return Objects.hash(write());
    }

    @Override
    public String toString() {
        return "Sheet[" + header.get("title") + ", " + cells.size() + " cells]";
    }
}
