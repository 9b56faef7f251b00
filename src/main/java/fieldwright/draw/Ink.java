package fieldwright.draw;

import java.awt.Color;

/** The few colours of the paper, the same as in the style sheet of the window. */
public final class Ink {
    public static final Color INK = new Color(0x1b2733);
    public static final Color SOFT = new Color(0x5b6875);
    public static final Color RULE = new Color(0xd5d9dc);
    public static final Color ACCENT = new Color(0x0b5f73);
    public static final Color BAD = new Color(0xb23a12);

    private Ink() { }
}
