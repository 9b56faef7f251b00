package fieldwright.sheet;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertSame;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.output.Output;
import fieldwright.output.Value;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

class SheetTest {

    private static final String FILM = """
            fieldwright sheet 1
            title: Charged film on a drum
            number: CF-2
            shelf: 14 b
            revision: A

            :: note
            What the film gives: {E_gap}.

            :: input geometry
            a = 12 mm ± 0.1 mm | drum radius | drawing 7

            :: working film
            var film = 1;
            :rec E_gap = 1250 V/m | num 0.001
            :rec check "closes" passed | measured 2e-10 | allowed 1e-9

            :: derive
            E_g = 2*a | twice
            """;

    private static Sheet film() throws SheetException {
        return Sheet.parse(FILM);
    }

    // ---- reading

    @Test
    void headerFieldsKeepTheirOrderAndUnknownOnesStay() throws SheetException {
        Sheet sheet = film();
        assertEquals(List.of("title", "number", "shelf", "revision"), sheet.header().fields().stream().map(Header.Field::name).toList());
        assertEquals("Charged film on a drum", sheet.header().get("title"));
        assertEquals("14 b", sheet.header().get("shelf"));
        assertEquals("", sheet.header().get("approved"));
        assertEquals(4, sheet.header().fields().get(2).line());
    }

    @Test
    void cellsHaveKindLabelSourceAndLines() throws SheetException {
        List<Cell> cells = film().cells();
        assertEquals(List.of(Cell.Kind.NOTE, Cell.Kind.INPUT, Cell.Kind.WORKING, Cell.Kind.DERIVE), cells.stream().map(Cell::kind).toList());
        assertEquals(List.of("", "geometry", "film", ""), cells.stream().map(Cell::label).toList());
        assertEquals("What the film gives: {E_gap}.", cells.get(0).source());
        assertEquals(13, cells.get(2).headLine());
        assertEquals(14, cells.get(2).firstLine());
        assertEquals(2, cells.get(2).records().size());
    }

    @Test
    void aSourceLineIsFoundInTheFileEvenWithARecordBetween() throws SheetException {
        Cell cell = Sheet.parse("fieldwright sheet 1\n:: working\nfirst\n:rec Q = 1 C\n\nsecond\n\n").cells().get(0);
        assertEquals("first\n\nsecond", cell.source());
        assertEquals(3, cell.lineOf(1));
        assertEquals(5, cell.lineOf(2));
        assertEquals(6, cell.lineOf(3));
    }

    @Test
    void blankLinesBehindTheSourceSeparateAndAreNotSource() throws SheetException {
        assertEquals("x", Sheet.parse("fieldwright sheet 1\n:: note\nx\n \n\n:: note\n").cells().get(0).source());
        assertEquals("\nx", Sheet.parse("fieldwright sheet 1\n:: note\n\nx\n").cells().get(0).source());
    }

    @ParameterizedTest(name = "file {0}, source {1}")
    @CsvSource({"\\:rec,:rec", "\\\\:x,\\:x", "\\\\\\::,\\\\::", "\\x:,\\x:", "a:,a:", "' :x',' :x'", "\\,\\", "\\\\,\\\\"})
    void backslashesBeforeAColon(String inFile, String source) throws SheetException {
        Sheet sheet = Sheet.parse("fieldwright sheet 1\n:: note\n" + inFile + "\n");
        assertEquals(source, sheet.cells().get(0).source());
        Sheet written = Sheet.parse("fieldwright sheet 1\n:: note\n").withCell(0, source);
        assertEquals("fieldwright sheet 1\n:: note\n" + inFile + "\n", written.write());
    }

    @ParameterizedTest
    @ValueSource(strings = {
        "fieldwright sheet 1", "fieldwright sheet 1\n", "fieldwright sheet 1\r\n\r\n:: note\r\na\r\n", "\uFEFFfieldwright sheet 1\n:: note\nb",
        "fieldwright sheet 1\n:: note\r\na\nb\r:: note", "fieldwright sheet 1  \n\n\n::note\n\n\n", ":: note"})
    void whatIsReadIsWrittenBackByteForByte(String text) throws SheetException {
        String whole = text.startsWith("::") ? "fieldwright sheet 1\nx: y\n" + text + " a\u2028b \u0085c\n\u2029\n" : text;
        assertEquals(whole, Sheet.parse(whole).write());
    }

    // ---- changing

    @Test
    void editingOneCellChangesItsSourceOnly() throws SheetException {
        Sheet changed = film().withCell(2, "var film = 2;\nvar b = 3;\n\n");
        assertEquals(FILM.replace("var film = 1;", "var film = 2;\nvar b = 3;"), changed.write());
    }

    @Test
    void anEditThatChangesNothingGivesTheSameBytes() throws SheetException {
        String odd = "fieldwright sheet 1\r\n:: note\na\rb\r\n :x\n";
        Sheet sheet = Sheet.parse(odd);
        assertEquals(odd, sheet.withCell(0, sheet.cells().get(0).source()).write());
    }

    @Test
    void editsTakeTheLineEndOfTheFile() throws SheetException {
        Sheet sheet = Sheet.parse("fieldwright sheet 1\r\n:: note\r\na\r\n\r\n:: note\r\nz");
        assertEquals("fieldwright sheet 1\r\n:: note\r\nb\r\nc\r\n\r\n:: note\r\nz", sheet.withCell(0, "b\nc").write());
        assertEquals("fieldwright sheet 1\r\n:: note\r\na\r\n\r\n:: note\r\ny", sheet.withCell(1, "y\n").write());
        assertEquals("fieldwright sheet 1\r\n:: note\r\na\r\n\r\n:: note\r\nz\r\n\r\n:: derive more\r\nQ = 1",
                sheet.insert(2, Cell.of(Cell.Kind.DERIVE, "more", "Q = 1")).write());
    }

    @Test
    void insertingSetsBlankLinesBetweenCells() throws SheetException {
        Sheet one = Sheet.parse("fieldwright sheet 1\n").insert(0, Cell.of(Cell.Kind.NOTE, "", "a"));
        assertEquals("fieldwright sheet 1\n\n:: note\na\n", one.write());
        Sheet two = one.insert(0, Cell.of(Cell.Kind.INPUT, "k", "b = 1"));
        assertEquals("fieldwright sheet 1\n\n:: input k\nb = 1\n\n:: note\na\n", two.write());
        assertEquals(one.write(), two.remove(0).write());
        assertEquals("fieldwright sheet 1\n\n:: input k\nb = 1\n\n", two.remove(1).write());
    }

    @Test
    void headerLinesAreChangedInPlaceOrAddedBehindTheLast() throws SheetException {
        assertEquals(FILM.replace("number: CF-2", "number: CF-3"), film().withHeader("number", "CF-3").write());
        assertEquals(FILM.replace("revision: A\n", "revision: A\nmade: MT, 3 May\n"), film().withHeader("made", "MT, 3 May").write());
        assertEquals(FILM, film().withHeader("number", "CF-2").write());
        assertThrows(IllegalArgumentException.class, () -> film().withHeader("made", "a\nb"));
    }

    @Test
    void labelsAreChanged() throws SheetException {
        assertEquals(FILM.replace(":: derive", ":: derive by hand"), film().withLabel(3, "by hand").write());
        assertSame(film().cells().get(3).getClass(), film().withLabel(3, "").cells().get(3).getClass());
        assertEquals(FILM, film().withLabel(3, " ").write());
    }

    // ---- records

    @Test
    void recordsAreReplacedAndTheSameOnesKeepTheirText() throws SheetException {
        List<Output> results = List.of(
                new Output.Result("E_gap", "", Value.Scalar.of(1250.0, 0.001, "V/m")),
                new Output.Check("closes", true, "", 3e-10, 1e-9, ""));
        assertEquals(FILM.replace("measured 2e-10", "measured 3e-10"), film().withRecords(2, results).write());
        String handWritten = FILM.replace("1250 V/m | num 0.001", "1.25e3 V/m  | num 1e-3");
        assertEquals(handWritten.replace("measured 2e-10", "measured 3e-10"), Sheet.parse(handWritten).withRecords(2, results).write());
    }

    @Test
    void aFirstRecordStandsRightUnderTheSource() throws SheetException {
        assertEquals(FILM.replace("drawing 7\n", "drawing 7\n:rec a2 = 4 m\n"),
                film().withRecords(1, List.of(new Output.Result("a2", "", Value.Scalar.of(4, null, "m")))).write());
        assertEquals(FILM.replaceAll(":rec.*\n", ""), film().withRecords(2, List.of()).write());
    }

    @Test
    void anUnreadableRecordIsKeptAndSaysWhy() throws SheetException {
        String odd = FILM.replace(":rec E_gap = 1250 V/m", ":rec E_gap = about 1250 V/m");
        RecordLine line = Sheet.parse(odd).cells().get(2).records().get(0);
        assertEquals(false, line.isReadable());
        assertTrue(line.trouble().contains("expected"), line.trouble());
        assertEquals(odd, Sheet.parse(odd).write());
        String rerun = Sheet.parse(odd).withRecords(2, List.of()).write();
        assertTrue(rerun.contains(":rec E_gap = about 1250 V/m | num 0.001\n"), rerun);
    }

    @Test
    void signaturesStayAndTheirRevisionIsRead() throws SheetException {
        String signed = FILM + "\n:signed checked: LM | revision A | 2 June | sha256 00ff\n:signed made: RO\n";
        Sheet sheet = Sheet.parse(signed);
        assertEquals(signed, sheet.write());
        assertEquals(List.of("A"), sheet.signatures().stream().map(Signature::revision).filter(r -> r != null).toList());
        assertEquals(21, sheet.signatures().get(0).line());
        assertEquals("E_g = 2*a | twice", sheet.cells().get(3).source());
        assertTrue(sheet.withCell(3, "E_g = 1").write().contains(":signed made: RO\n"));
    }

    // ---- errors

    @ParameterizedTest(name = "{1}")
    @CsvSource(delimiter = '|', value = {
        "''                                                 | 0 | the file is empty. A sheet begins with the line 'fieldwright sheet 1'.",
        "'~ ~'                                              | 1 | the file is empty. A sheet begins with the line 'fieldwright sheet 1'.",
        "'%PDF-1.4~x'                                       | 1 | not a sheet: the first line is '%PDF-1.4'. A sheet begins with the line 'fieldwright sheet 1'.",
        "'fieldwright sheet 2~'                             | 1 | sheet of form '2': this program reads form 1. Use the version of the program that wrote it.",
        "'fieldwright sheet 1~~:: deriv~'                   | 3 | unknown kind of cell 'deriv'. Write ':: note', ':: input', ':: derive' or ':: working'.",
        "'fieldwright sheet 1~::~'                          | 2 | unknown kind of cell ''. Write ':: note', ':: input', ':: derive' or ':: working'.",
        "'fieldwright sheet 1~:: note~a~:record Q = 1 C~'   | 4 | unknown line ':record Q = 1 C': a line that begins with ':' is '::' and a kind, ':rec' or ':signed'. If it belongs to the text of the cell, write '\\' before it.",
        "'fieldwright sheet 1~:rec Q = 1 C~'                | 2 | ':rec' above the first cell: a record belongs under the cell that gave it. Move the line there or delete it.",
        "'fieldwright sheet 1~R = 3 m~'                     | 2 | 'R = 3 m' stands in no cell and is no header line 'name: value'. Begin a cell above it, for instance ':: note'."})
    void errorsNameLineThingValueAndRemedy(String text, int line, String message) {
        SheetException e = assertThrows(SheetException.class, () -> Sheet.parse(text.replace('~', '\n')));
        assertEquals(message, e.getMessage());
        assertEquals(line, e.line());
    }

    // ---- digest

    @Test
    void theDigestLooksThroughLineEndsAndByteOrderMark() {
        assertEquals(Digest.of(FILM), Digest.of("\uFEFF" + FILM.replace("\n", "\r\n")));
        assertNotEquals(Digest.of(FILM), Digest.of(FILM + "\n"));
        // FIPS 180-2, appendix B.1: SHA-256 of "abc".
        assertEquals("ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad", Digest.of("abc"));
    }
}
