package fieldwright.sheet;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.ByteBuffer;
import java.nio.channels.FileChannel;
import java.nio.channels.WritableByteChannel;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardOpenOption;
import java.nio.file.attribute.PosixFilePermissions;
import java.util.List;
import java.util.stream.Stream;
import org.junit.jupiter.api.Assumptions;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class SheetFileTest {

    private static final String OLD = "\uFEFFfieldwright sheet 1\r\n:: note\r\nold, 2 µC/m³";

    @TempDir
    Path folder;

    private List<String> names() throws IOException {
        try (Stream<Path> files = Files.list(folder)) {
            return files.map(file -> file.getFileName().toString()).sorted().toList();
        }
    }

    @Test
    void bytesSurviveReadingAndSaving() throws Exception {
        Path file = folder.resolve("a.fws");
        Files.writeString(file, OLD);
        byte[] before = Files.readAllBytes(file);
        SheetFile.save(file, SheetFile.read(file));
        assertArrayEquals(before, Files.readAllBytes(file));
        SheetFile.save(folder.resolve("b.fws"), SheetFile.readText(file));
        assertArrayEquals(before, Files.readAllBytes(folder.resolve("b.fws")));
        assertEquals(List.of("a.fws", "b.fws"), names());
    }

    @Test
    void onAFullDiskTheOldFileSurvivesAndNothingIsLeftBehind() throws Exception {
        Path file = folder.resolve("a.fws");
        Files.writeString(file, OLD);
        IOException e = assertThrows(IOException.class, () -> SheetFile.save(file, OLD + " and new", FullDisk::new));
        assertEquals("No space left on device", e.getMessage());
        assertEquals(OLD, Files.readString(file));
        assertEquals(List.of("a.fws"), names());
    }

    /** Takes five bytes, then is full. */
    private static final class FullDisk implements WritableByteChannel {
        private final FileChannel real;
        private int room = 5;

        FullDisk(Path file) throws IOException {
            real = FileChannel.open(file, StandardOpenOption.WRITE, StandardOpenOption.CREATE_NEW);
        }

        @Override
        public int write(ByteBuffer bytes) throws IOException {
            if (room == 0) {
                throw new IOException("No space left on device");
            }
            ByteBuffer some = bytes.slice().limit(Math.min(room, bytes.remaining()));
            int written = real.write(some);
            bytes.position(bytes.position() + written);
            room -= written;
            return written;
        }

        @Override
        public boolean isOpen() {
            return real.isOpen();
        }

        @Override
        public void close() throws IOException {
            real.close();
        }
    }

    @Test
    void permissionsAndLinksStay() throws Exception {
        Assumptions.assumeTrue(folder.getFileSystem().supportedFileAttributeViews().contains("posix"));
        Path file = folder.resolve("a.fws");
        Files.writeString(file, OLD);
        Files.setPosixFilePermissions(file, PosixFilePermissions.fromString("rw-rw-r--"));
        Path link = Files.createSymbolicLink(folder.resolve("link.fws"), file);
        SheetFile.save(link, OLD + "!");
        assertTrue(Files.isSymbolicLink(link));
        assertEquals(OLD + "!", Files.readString(file));
        assertEquals("rw-rw-r--", PosixFilePermissions.toString(Files.getPosixFilePermissions(file)));
    }

    @Test
    void bytesThatAreNotTextAreNamedWithTheirLine() throws Exception {
        Path file = folder.resolve("a.fws");
        Files.write(file, new byte[] {'a', '\n', 'b', '\n', 'c', (byte) 0xE9, 'd'});
        SheetException e = assertThrows(SheetException.class, () -> SheetFile.read(file));
        assertEquals(3, e.line());
        assertEquals("byte 0xE9 is not UTF-8 text. A sheet is a text file; save it as UTF-8.", e.getMessage());
        Files.write(file, "fieldwright sheet 1\n:: note\n\u00e9".getBytes(StandardCharsets.ISO_8859_1));
        assertThrows(SheetException.class, () -> SheetFile.read(file), "cut off in the middle of a character");
    }

    @Test
    void halfACharacterIsNotWrittenAsAQuestionMark() throws Exception {
        Path file = folder.resolve("a.fws");
        Files.writeString(file, OLD);
        assertThrows(IOException.class, () -> SheetFile.save(file, "x\uD835y"));
        assertEquals(OLD, Files.readString(file));
    }
}
