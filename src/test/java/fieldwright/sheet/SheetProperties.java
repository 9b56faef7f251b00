package fieldwright.sheet;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.stream.Collectors;
import net.jqwik.api.Arbitraries;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.Combinators;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import net.jqwik.api.Tuple;

/** Random sheets, built from blocks of text so that each test knows what belongs to which cell. */
class SheetProperties {

    /** A sheet as text blocks: the head, then one block per cell, every line with its line end. */
    record Blocks(boolean marked, String head, List<String> cells, boolean finalNewline) {

        String text() {
            String all = (marked ? "\uFEFF" : "") + head + String.join("", cells);
            return finalNewline ? all : all.substring(0, all.length() - (all.endsWith("\r\n") ? 2 : 1));
        }

        /** The text before and behind one cell. */
        String before(int i) {
            return (marked ? "\uFEFF" : "") + head + String.join("", cells.subList(0, i));
        }

        String behind(int i) {
            String all = String.join("", cells.subList(i + 1, cells.size()));
            boolean cut = !finalNewline && !all.isEmpty();
            return cut ? all.substring(0, all.length() - (all.endsWith("\r\n") ? 2 : 1)) : all;
        }
    }

    @Property(tries = 1000, seed = "4711")
    void whatIsReadIsWrittenBack(@ForAll("sheets") Blocks blocks) throws SheetException {
        assertEquals(blocks.text(), Sheet.parse(blocks.text()).write());
        assertEquals(blocks.cells().size(), Sheet.parse(blocks.text()).cells().size());
    }

    @Property(tries = 1000, seed = "4712")
    void editingACellLeavesAllOtherBytes(@ForAll("sheets") Blocks blocks, @ForAll("sources") String source, @ForAll int pick)
            throws SheetException {
        Sheet sheet = Sheet.parse(blocks.text());
        int i = Math.floorMod(pick, sheet.cells().size());
        Sheet changed = sheet.withCell(i, source);
        String text = changed.write();
        assertTrue(text.startsWith(blocks.before(i)), text);
        assertTrue(text.endsWith(blocks.behind(i)), text);

        String expected = withoutBlankEnd(source);
        assertEquals(expected, changed.cells().get(i).source());
        assertEquals(expected, Sheet.parse(text).cells().get(i).source());
        assertEquals(sheet.cells().get(i).records(), Sheet.parse(text).cells().get(i).records());
        assertEquals(text, Sheet.parse(text).write());
    }

    @Property(tries = 500, seed = "4713")
    void everySourceLineIsFoundOnItsLineOfTheFile(@ForAll("sheets") Blocks blocks) throws SheetException {
        List<String> lines = blocks.text().replace("\uFEFF", "").lines().toList();
        for (Cell cell : Sheet.parse(blocks.text()).cells()) {
            List<String> source = cell.source().lines().toList();
            for (int i = 0; i < source.size(); i++) {
                String inFile = lines.get(cell.lineOf(i + 1) - 1);
                assertTrue(inFile.equals(source.get(i)) || inFile.equals("\\" + source.get(i)), inFile + " / " + source.get(i));
            }
        }
    }

    @Property(tries = 500, seed = "4714")
    void aCellPutInAndTakenOutLeavesTheOthers(@ForAll("sheets") Blocks blocks, @ForAll("sources") String source, @ForAll int pick)
            throws SheetException {
        Sheet sheet = Sheet.parse(blocks.text());
        int i = Math.floorMod(pick, sheet.cells().size() + 1);
        Sheet more = Sheet.parse(sheet.insert(i, Cell.of(Cell.Kind.WORKING, "new", source)).write());
        assertEquals(withoutBlankEnd(source), more.cells().get(i).source());
        assertEquals("new", more.cells().get(i).label());
        assertEquals(contents(sheet), contents(more.remove(i)));
        assertTrue(sheet.insert(i, Cell.of(Cell.Kind.NOTE, "", source)).write().startsWith(blocks.before(0)));
    }

    @Property(tries = 1000, seed = "4715")
    void anyTextIsASheetOrAnErrorWithALine(@ForAll("texts") String text) {
        String all = "fieldwright sheet 1\n" + text;
        try {
            Sheet sheet = Sheet.parse(all);
            assertEquals(all, sheet.write());
            for (Cell cell : sheet.cells()) {
                cell.records();
                cell.inputs();
                cell.derives();
            }
        } catch (SheetException e) {
            assertTrue(e.line() >= 2 && e.line() <= all.lines().count(), e.line() + ": " + e.getMessage());
        }
    }

    private static List<String> contents(Sheet sheet) {
        return sheet.cells().stream().map(cell -> cell.kind() + cell.label() + "\n" + cell.source() + cell.records()).toList();
    }

    private static String withoutBlankEnd(String source) {
        List<String> lines = new ArrayList<>(source.lines().toList());   // lines() ends lines at a lone \r too
        while (!lines.isEmpty() && lines.get(lines.size() - 1).isBlank()) {
            lines.remove(lines.size() - 1);
        }
        return String.join("\n", lines);
    }

    // ---- random texts

    @Provide
    Arbitrary<Blocks> sheets() {
        Arbitrary<String> ends = Arbitraries.of("\n", "\n", "\r\n");
        Arbitrary<String> headers = Arbitraries.of("title: a", "revision: B", "shelf : 3", "", "note:", ":signed made: x | revision A");
        Arbitrary<String> head = Combinators.combine(lines(headers, ends).list().ofMaxSize(4), ends)
                .as((fields, end) -> "fieldwright sheet 1" + end + String.join("", fields));
        Arbitrary<String> kinds = Arbitraries.of(":: note", ":: input geometry", "::derive", ":: working a b ");
        Arbitrary<String> body = Arbitraries.frequencyOf(
                Tuple.of(6, sourceLines()),
                Tuple.of(2, Arbitraries.of("", " ", "\t")),
                Tuple.of(2, Arbitraries.of(":rec Q = 1.5 C | num 1e-9", ":rec what is this", ":signed x", ":rec")));
        Arbitrary<String> cell = Combinators.combine(lines(kinds, ends), lines(body, ends).list().ofMaxSize(6))
                .as((first, rest) -> first + String.join("", rest));
        return Combinators.combine(Arbitraries.of(true, false), head, cell.list().ofMinSize(1).ofMaxSize(5), Arbitraries.of(true, false))
                .as(Blocks::new);
    }

    private static Arbitrary<String> lines(Arbitrary<String> texts, Arbitrary<String> ends) {
        return Combinators.combine(texts, ends).as(String::concat);
    }

    /** One line of the file that is source: it does not begin with a colon, perhaps with backslashes and one. */
    private static Arbitrary<String> sourceLines() {
        return Arbitraries.strings().withChars("ab \\:|=±ρ\"(").ofMinLength(1).ofMaxLength(10)
                .map(text -> text.startsWith(":") ? "\\" + text : text);
    }

    @Provide
    Arbitrary<String> sources() {
        return Arbitraries.strings().withChars("ab \\:\n\r|=é\uD835").ofMaxLength(24).map(text -> text.replace("\uD835", "\uD835\uDC38"));
    }

    @Provide
    Arbitrary<String> texts() {
        Arbitrary<String> pieces = Arbitraries.of("\n", "\n", ":", "::", " note", " input", " derive", " working", ":rec ", ":signed", "check \"a\" ",
                "passed", " | ", " = ", "[1, 2, 3]", "1.5", " C", "\\", "\"", "(", ")", "name", " in ", " for ", "?", "unbounded", "\t", "\r", "±");
        return pieces.list().ofMaxSize(30).map(list -> list.stream().collect(Collectors.joining()));
    }
}
