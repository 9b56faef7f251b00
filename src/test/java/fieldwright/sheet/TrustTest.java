package fieldwright.sheet;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.net.URI;
import java.net.URL;
import java.net.URLClassLoader;
import java.nio.file.FileSystem;
import java.nio.file.FileSystems;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Map;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class TrustTest {

    private static final String SHEET = "fieldwright sheet 1\n:: working\nvar a = 1;\n";

    @TempDir
    Path folder;

    @Test
    void anAnswerIsKeptOnceForEachText() throws Exception {
        Path store = folder.resolve("a/b/trusted");
        Trust trust = new Trust(store);
        assertFalse(trust.isTrusted(SHEET));
        trust.remember(SHEET);
        trust.remember(SHEET.replace("\n", "\r\n"));
        assertTrue(new Trust(store).isTrusted(SHEET));
        assertFalse(new Trust(store).isTrusted(SHEET + "\n"));
        assertEquals(Digest.of(SHEET) + "\n", Files.readString(store));
    }

    @Test
    void aStoreThatCannotBeReadMeansAsking() throws Exception {
        Path store = folder.resolve("trusted");
        Files.write(store, new byte[] {(byte) 0xFF, (byte) 0xFE, 0});
        assertFalse(new Trust(store).isTrusted(SHEET));
    }

    @Test
    void sheetsShippedInTheClassFolderOrTheJarCountAsMadeHere() throws Exception {
        Path classes = folder.resolve("classes");
        Files.createDirectories(classes.resolve("fieldwright/worksheets"));
        Files.writeString(classes.resolve("fieldwright/worksheets/own.fws"), SHEET);
        assertShipped(classes.toUri().toURL());

        Path jar = folder.resolve("with blank.jar");
        try (FileSystem zip = FileSystems.newFileSystem(URI.create("jar:" + jar.toUri()), Map.of("create", "true"))) {
            Files.createDirectories(zip.getPath("fieldwright/worksheets"));
            Files.writeString(zip.getPath("fieldwright/worksheets/own.fws"), SHEET);
        }
        assertShipped(jar.toUri().toURL());
    }

    private void assertShipped(URL classPath) throws Exception {
        try (URLClassLoader loader = new URLClassLoader(new URL[] {classPath}, null)) {
            Trust trust = new Trust(folder.resolve("none"), loader);
            assertTrue(trust.isTrusted(SHEET), classPath.toString());
            assertTrue(trust.isTrusted(SHEET.replace("\n", "\r\n")));
            assertFalse(trust.isTrusted(SHEET + "x"));
        }
    }
}
