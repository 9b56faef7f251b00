package fieldwright.sheet;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.net.URI;
import java.net.URISyntaxException;
import java.net.URL;
import java.nio.file.FileSystem;
import java.nio.file.FileSystems;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardOpenOption;
import java.util.ArrayList;
import java.util.List;
import java.util.stream.Stream;

/**
 * Which sheets may run without asking. A sheet is a program; one that came from elsewhere runs only after its reader
 * said so, once for each text. The sheets shipped with the program count as made here, and so does what the reader
 * saved here.
 *
 * <p>The answers are kept as digests of the text, one a line, in {@code trusted} in the user's configuration folder:
 * {@code $XDG_CONFIG_HOME/fieldwright} or {@code ~/.config/fieldwright}; the system property
 * {@code fieldwright.config} names another folder.
 */
public final class Trust {
    private static final String SHIPPED = "fieldwright/worksheets";

    private final Path store;
    private final ClassLoader program;

    /** @param store the file that keeps the digests; made when the first one is kept */
    public Trust(Path store) {
        this(store, Trust.class.getClassLoader());
    }

    /** @param program finds the sheets shipped with the program */
    Trust(Path store, ClassLoader program) {
        this.store = store;
        this.program = program;
    }

    /** The answers of this user. */
    public static Trust ofUser() {
        return new Trust(configuration().resolve("trusted"));
    }

    private static Path configuration() {
        String property = System.getProperty("fieldwright.config");
        if (property != null && !property.isBlank()) {
            return Path.of(property);
        }
        String xdg = System.getenv("XDG_CONFIG_HOME");
        // A relative path there is to be ignored: XDG Base Directory Specification.
        boolean usable = xdg != null && Path.of(xdg).isAbsolute();
        Path home = usable ? Path.of(xdg) : Path.of(System.getProperty("user.home"), ".config");
        return home.resolve("fieldwright");
    }

    /** True when this very text, line ends apart, is shipped with the program or was trusted before. */
    public boolean isTrusted(String text) {
        String digest = Digest.of(text);
        return isKept(digest) || shipped().stream().anyMatch(shipped -> Digest.of(shipped).equals(digest));
    }

    /** Keeps the answer for this text. */
    public void remember(String text) throws IOException {
        String digest = Digest.of(text);
        if (!isKept(digest)) {
            Files.createDirectories(store.toAbsolutePath().getParent());
            Files.writeString(store, digest + "\n", StandardOpenOption.CREATE, StandardOpenOption.APPEND);
        }
    }

    private boolean isKept(String digest) {
        try {
            return Files.exists(store) && Files.readAllLines(store).stream().anyMatch(line -> line.strip().equals(digest));
        } catch (IOException unreadable) {
            return false;   // then the reader is asked again
        }
    }

    /** The texts of the sheets in the jar, or in the class folder during development. */
    private List<String> shipped() {
        URL folder = program.getResource(SHIPPED);
        if (folder == null) {
            return List.of();
        }
        try {
            URI uri = folder.toURI();
            if (!uri.getScheme().equals("jar")) {
                return texts(Path.of(uri));
            }
            // A view of our own: closing a shared one would close it for others.
            String inJar = uri.getRawSchemeSpecificPart();
            Path jar = Path.of(URI.create(inJar.substring(0, inJar.indexOf("!/"))));
            try (FileSystem inside = FileSystems.newFileSystem(jar)) {
                return texts(inside.getPath(SHIPPED));
            }
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        } catch (URISyntaxException e) {
            throw new IllegalStateException(e);
        }
    }

    private static List<String> texts(Path folder) throws IOException {
        List<String> texts = new ArrayList<>();
        try (Stream<Path> files = Files.list(folder)) {
            for (Path file : files.filter(each -> each.toString().endsWith(".fws")).sorted().toList()) {
                texts.add(Files.readString(file));
            }
        }
        return texts;
    }
}
