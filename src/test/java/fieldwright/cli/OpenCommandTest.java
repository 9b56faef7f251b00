package fieldwright.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.sheet.Trust;
import java.io.ByteArrayOutputStream;
import java.io.PrintStream;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class OpenCommandTest {

    @TempDir
    Path folder;

    private final List<List<String>> opened = new ArrayList<>();

    private int command(String... arguments) {
        PrintStream none = new PrintStream(new ByteArrayOutputStream(), true, StandardCharsets.UTF_8);
        Terminal terminal = new Terminal(none, none, none, true, null);
        return Main.run(terminal, new Trust(folder.resolve("trusted")), text -> {
            throw new AssertionError("opening runs nothing");
        }, files -> opened.add(List.of(files)), arguments);
    }

    @Test
    void aloneItOpensTheAppAndWithAFileTheSheet() throws Exception {
        Path file = folder.resolve("a.fws");
        Files.writeString(file, "fieldwright sheet 1\n");
        assertEquals(0, command());
        assertEquals(0, command("open", file.toString()));
        assertEquals(List.of(List.of(), List.of(file.toString())), opened);
    }

    @Test
    void wrongUse() {
        assertEquals(64, command("open"));
        assertEquals(64, command("open", folder.resolve("none.fws").toString()));
        assertEquals(64, command("open", folder.toString()));
        assertEquals(List.of(), opened);
    }

    @Test
    void withoutADisplayItSaysWhatWorks() {
        Recording result = Recording.of(folder.resolve("trusted"), null, true, null);
        assertEquals(64, result.exit());
        assertTrue(result.err().contains("fieldwright run FILE"), result.err());
    }
}
