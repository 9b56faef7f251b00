package fieldwright.sheet;

import java.io.IOException;
import java.nio.ByteBuffer;
import java.nio.CharBuffer;
import java.nio.channels.FileChannel;
import java.nio.channels.WritableByteChannel;
import java.nio.charset.CharacterCodingException;
import java.nio.charset.CodingErrorAction;
import java.nio.charset.StandardCharsets;
import java.nio.file.AtomicMoveNotSupportedException;
import java.nio.file.FileSystemException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardCopyOption;
import java.nio.file.StandardOpenOption;
import java.nio.file.attribute.PosixFileAttributeView;
import java.util.UUID;

/** Reads and saves the text of a sheet as UTF-8. Saving is all or nothing: on a full disk the old file is still there. */
public final class SheetFile {

    private SheetFile() { }

    /** Opens a file for writing; tests put a full disk here. */
    interface Opener {
        WritableByteChannel open(Path file) throws IOException;
    }

    /**
     * The text of a file, byte order mark included.
     *
     * @throws SheetException when the bytes are not UTF-8; names the line
     * @throws IOException    when the file cannot be read
     */
    public static String readText(Path file) throws IOException, SheetException {
        byte[] bytes = Files.readAllBytes(file);
        ByteBuffer in = ByteBuffer.wrap(bytes);
        CharBuffer out = CharBuffer.allocate(bytes.length);
        var result = StandardCharsets.UTF_8.newDecoder().onMalformedInput(CodingErrorAction.REPORT)
                .onUnmappableCharacter(CodingErrorAction.REPORT).decode(in, out, true);
        if (result.isError()) {
            int line = 1;
            for (int i = 0; i < in.position(); i++) {
                line += bytes[i] == '\n' ? 1 : 0;
            }
            throw new SheetException(line, String.format(java.util.Locale.ROOT,
                    "byte 0x%02X is not UTF-8 text. A sheet is a text file; save it as UTF-8.", bytes[in.position()]));
        }
        return out.flip().toString();
    }

    /** Reads a sheet. */
    public static Sheet read(Path file) throws IOException, SheetException {
        return Sheet.parse(readText(file));
    }

    /** Saves a sheet; see {@link #save(Path, String)}. */
    public static void save(Path file, Sheet sheet) throws IOException {
        save(file, sheet.write());
    }

    /**
     * Saves a text: written to a new file beside, forced to the disk, then put in the place of the old one. A symbolic
     * link stays one; the permissions of the old file are kept.
     *
     * @throws IOException when it could not be saved; the old file is then unchanged
     */
    public static void save(Path file, String text) throws IOException {
        save(file, text, temporary -> FileChannel.open(temporary, StandardOpenOption.WRITE, StandardOpenOption.CREATE_NEW));
    }

    static void save(Path file, String text, Opener opener) throws IOException {
        ByteBuffer bytes = encode(file, text);
        boolean exists = Files.exists(file);
        Path target = exists ? file.toRealPath() : file.toAbsolutePath();
        if (exists && !Files.isWritable(target)) {
            throw new FileSystemException(file.toString(), null, "may not be written. Change its permissions or save under another name.");
        }
        Path temporary = target.resolveSibling("." + target.getFileName() + "." + UUID.randomUUID() + ".part");
        try {
            write(temporary, bytes, opener);
            if (exists) {
                copyPermissions(target, temporary);
            }
            replace(temporary, target);
        } catch (IOException | RuntimeException e) {
            deleteQuietly(temporary, e);
            throw e;
        }
        forceFolder(target.getParent());
    }

    private static ByteBuffer encode(Path file, String text) throws IOException {
        try {
            return StandardCharsets.UTF_8.newEncoder().onMalformedInput(CodingErrorAction.REPORT).encode(CharBuffer.wrap(text));
        } catch (CharacterCodingException e) {
            throw new FileSystemException(file.toString(), null, "the text holds half a character (an unpaired surrogate). Delete it.");
        }
    }

    private static void write(Path temporary, ByteBuffer bytes, Opener opener) throws IOException {
        try (WritableByteChannel channel = opener.open(temporary)) {
            while (bytes.hasRemaining()) {
                channel.write(bytes);
            }
            if (channel instanceof FileChannel onDisk) {
                onDisk.force(true);
            }
        }
    }

    private static void copyPermissions(Path from, Path to) throws IOException {
        PosixFileAttributeView view = Files.getFileAttributeView(to, PosixFileAttributeView.class);
        if (view != null) {
            view.setPermissions(Files.getPosixFilePermissions(from));
        }
    }

    private static void replace(Path temporary, Path target) throws IOException {
        try {
            Files.move(temporary, target, StandardCopyOption.ATOMIC_MOVE);
        } catch (AtomicMoveNotSupportedException e) {
            Files.move(temporary, target, StandardCopyOption.REPLACE_EXISTING);
        }
    }

    private static void deleteQuietly(Path temporary, Exception cause) {
        try {
            Files.deleteIfExists(temporary);
        } catch (IOException e) {
            cause.addSuppressed(e);
        }
    }

    /** The new name itself is on the disk only once the folder is; not every system lets a folder be opened. */
    private static void forceFolder(Path folder) {
        try (FileChannel channel = FileChannel.open(folder, StandardOpenOption.READ)) {
            channel.force(true);
        } catch (IOException notOffered) {
            // The text itself is safe: the file was forced before it was renamed.
        }
    }
}
