package fieldwright.session;

import fieldwright.quantity.Stop;
import java.io.ByteArrayOutputStream;
import java.io.OutputStream;
import java.io.PrintStream;
import java.nio.charset.StandardCharsets;

/**
 * Stands in for {@code System.out} and {@code System.err} of the calculation process: keeps what is printed while a cell
 * is worked, up to a bound, and lets the rest go.
 */
final class Printing extends OutputStream {
    static final int LINES = 200;
    static final int CHARACTERS = 20_000;

    private final ByteArrayOutputStream kept = new ByteArrayOutputStream();
    private int lines;
    private boolean cut;
    private boolean open;

    /** Takes the place of the system's streams for the rest of this process's life. */
    static Printing install() {
        Printing printing = new Printing();
        PrintStream stream = new PrintStream(printing, true, StandardCharsets.UTF_8);
        System.setOut(stream);
        System.setErr(stream);
        return printing;
    }

    /** Keeps from now on. */
    synchronized void begin() {
        kept.reset();
        lines = 0;
        cut = false;
        open = true;
    }

    /** What was printed since {@link #begin()}; keeps nothing any more. */
    synchronized String end() {
        open = false;
        String text = kept.toString(StandardCharsets.UTF_8);
        boolean tooLong = text.length() > CHARACTERS;
        String bounded = tooLong ? text.substring(0, text.offsetByCodePoints(0, text.codePointCount(0, CHARACTERS))) : text;
        kept.reset();
        return cut || tooLong ? bounded.stripTrailing() + "\n… cut" : bounded;
    }

    @Override
    public void write(int b) {
        write(new byte[] {(byte) b}, 0, 1);
    }

    /** A cell that prints without end ends here when a stop is asked. */
    @Override
    public synchronized void write(byte[] bytes, int from, int length) {
        Stop.check();
        for (int i = from; open && !cut && i < from + length; i++) {
            cut = lines >= LINES || kept.size() >= 4 * CHARACTERS;
            if (!cut) {
                kept.write(bytes[i]);
                lines += bytes[i] == '\n' ? 1 : 0;
            }
        }
    }
}
