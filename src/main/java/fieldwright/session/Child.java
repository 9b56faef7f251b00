package fieldwright.session;

import fieldwright.session.snippet.SnippetCompiler;
import java.io.BufferedInputStream;
import java.io.BufferedOutputStream;
import java.io.IOException;
import java.io.InputStream;
import java.nio.charset.StandardCharsets;
import java.util.ArrayList;
import java.util.ArrayList;
import java.util.List;
import java.util.concurrent.TimeUnit;

/** A running {@link CalculationProcess}, seen from its parent. */
final class Child {
    /** What HotSpot ends with under {@code -XX:+ExitOnOutOfMemoryError}. */
    private static final int OUT_OF_MEMORY = 3;
    private static final int KILLED = 128 + 9;
    private static final int LAST_WORDS = 2000;
    /**
     * The optimising compiler waits twenty times as long as it would by itself. Most sheets are worked before its code would
     * pay, and it takes a core from the sheet; one that computes for long still gets it.
     */
    private static final List<String> LATE_OPTIMISING = List.of("-XX:Tier4InvocationThreshold=100000",
            "-XX:Tier4MinInvocationThreshold=12000", "-XX:Tier4CompileThreshold=300000", "-XX:Tier4BackEdgeThreshold=800000");

    private final Process process;
    private final Pipe pipe;
    private final int heapMegabytes;
    private final StringBuilder lastWords = new StringBuilder();
    private final Thread listener;

    private Child(Process process, int heapMegabytes) {
        this.process = process;
        this.heapMegabytes = heapMegabytes;
        this.pipe = new Pipe(new BufferedInputStream(process.getInputStream()), new BufferedOutputStream(process.getOutputStream()));
        this.listener = new Thread(this::listen, "last words of the calculation process");
        listener.setDaemon(true);
        listener.start();
    }

    /** Starts one with the Java and the class path of this process, from a directory or a jar alike, and waits until it answers. */
    static Child start(SessionOptions options) throws IOException {
        List<String> command = new ArrayList<>(List.of(System.getProperty("java.home") + "/bin/java",
                "-Xmx" + options.heapMegabytes() + "m", "-XX:+UseSerialGC", "-XX:+ExitOnOutOfMemoryError",
                "-XX:+DisplayVMOutputToStderr", "-Djava.awt.headless=true", "-Dfile.encoding=UTF-8",
                // the compiler's messages are read and put into the author's terms: they must come in one language
                "-Duser.language=en", "-Duser.country="));
        if (options.brief()) {
            command.add("-XX:TieredStopAtLevel=1");
        }
        command.addAll(List.of("-cp", SnippetCompiler.absoluteClassPath(), CalculationProcess.class.getName()));
        Process process = new ProcessBuilder(command).start();
        Child child = new Child(process, options.heapMegabytes());
        try {
            child.pipe.receive(Reply.Ready.class);
            return child;
        } catch (IOException e) {
            throw new IOException("the calculation process did not start: " + child.causeOfDeath(), e);
        }
    }

    Pipe pipe() {
        return pipe;
    }

    long pid() {
        return process.pid();
    }

    boolean isAlive() {
        return process.isAlive();
    }

    void kill() {
        process.destroyForcibly();
    }

    /** Why it ended, as a sentence without a full stop. Waits for the end if need be. */
    String causeOfDeath() {
        try {
            if (!process.waitFor(2, TimeUnit.SECONDS)) {
                kill();
                process.waitFor();
                return "it no longer made sense and was killed";
            }
            listener.join(500);
        } catch (InterruptedException e) {
            Thread.currentThread().interrupt();
            return "it ended";
        }
        int code = process.exitValue();
        return code == OUT_OF_MEMORY ? "it ran out of memory (limit " + heapMegabytes + " MB)"
                : code == KILLED ? "it was killed" : "it ended with exit code " + code + lastWords();
    }

    private synchronized String lastWords() {
        String words = lastWords.toString().strip();
        return words.isEmpty() ? "" : ", saying: " + words.substring(words.lastIndexOf('\n') + 1);
    }

    private void listen() {
        byte[] buffer = new byte[1024];
        try (InputStream errors = process.getErrorStream()) {
            for (int n = errors.read(buffer); n >= 0; n = errors.read(buffer)) {
                hear(new String(buffer, 0, n, StandardCharsets.UTF_8));
            }
        } catch (IOException e) {
            // it is gone
        }
    }

    private synchronized void hear(String words) {
        lastWords.append(words);
        if (lastWords.length() > LAST_WORDS) {
            lastWords.delete(0, lastWords.length() - LAST_WORDS);
        }
    }
}
