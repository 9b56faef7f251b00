package fieldwright.cli;

import fieldwright.sheet.Trust;
import java.io.ByteArrayOutputStream;
import java.io.PrintStream;
import java.nio.charset.StandardCharsets;
import java.nio.file.Path;
import java.util.function.UnaryOperator;

/** A command run in the test: what it printed, and its exit code. */
record Recording(int exit, String out, String err) {

    private static final Window NO_WINDOW = files -> {
        throw new UnsupportedOperationException("Unable to open DISPLAY");
    };

    static Recording of(Path trusted, UnaryOperator<String> ask, boolean unicode, Engine engine, String... arguments) {
        ByteArrayOutputStream out = new ByteArrayOutputStream();
        ByteArrayOutputStream err = new ByteArrayOutputStream();
        PrintStream outText = new PrintStream(out, true, StandardCharsets.UTF_8);
        PrintStream errText = new PrintStream(err, true, StandardCharsets.UTF_8);
        Terminal terminal = new Terminal(outText, errText, outText, unicode, ask);
        int exit = Main.run(terminal, new Trust(trusted), engine, NO_WINDOW, arguments);
        return new Recording(exit, out.toString(StandardCharsets.UTF_8), err.toString(StandardCharsets.UTF_8));
    }
}
