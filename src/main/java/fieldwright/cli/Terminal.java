package fieldwright.cli;

import java.io.Console;
import java.io.FileDescriptor;
import java.io.FileOutputStream;
import java.io.PrintStream;
import java.nio.charset.Charset;
import java.nio.charset.StandardCharsets;
import java.util.function.UnaryOperator;

/**
 * Where the commands print and whom they ask.
 *
 * @param json    takes UTF-8 whatever the terminal shows (RFC 8259)
 * @param unicode true when {@code out} and {@code err} show more than ASCII
 * @param ask     puts a question and gives the answer; null when nobody is there to answer
 */
record Terminal(PrintStream out, PrintStream err, PrintStream json, boolean unicode, UnaryOperator<String> ask) {

    /** The terminal this program was started from. */
    static Terminal real() {
        Charset charset = charset();
        return new Terminal(stream(FileDescriptor.out, charset), stream(FileDescriptor.err, charset),
                stream(FileDescriptor.out, StandardCharsets.UTF_8), charset.equals(StandardCharsets.UTF_8), asker());
    }

    /** A text as this terminal can show it. */
    String shown(String text) {
        return unicode ? text : Ascii.of(text);
    }

    /** A message beside the results. */
    void say(String message) {
        err.println(shown("fieldwright: " + message));
    }

    private static PrintStream stream(FileDescriptor descriptor, Charset charset) {
        return new PrintStream(new FileOutputStream(descriptor), true, charset);
    }

    private static Charset charset() {
        Console console = System.console();
        if (console != null) {
            return console.charset();
        }
        String name = System.getProperty("stdout.encoding", System.getProperty("native.encoding", "US-ASCII"));
        return Charset.isSupported(name) ? Charset.forName(name) : StandardCharsets.US_ASCII;
    }

    private static UnaryOperator<String> asker() {
        Console console = System.console();
        return console == null || !isTerminal(console) ? null : question -> console.readLine("%s", question);
    }

    /** From Java 22 on there is a console even where nobody sits; its own word counts, which Java 17 does not know. */
    private static boolean isTerminal(Console console) {
        try {
            return (Boolean) Console.class.getMethod("isTerminal").invoke(console);
        } catch (NoSuchMethodException olderJava) {
            return true;
        } catch (ReflectiveOperationException e) {
            return false;
        }
    }
}
