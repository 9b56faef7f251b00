package fieldwright.draw;

import java.awt.Color;
import java.awt.Graphics2D;
import java.util.LinkedHashMap;
import java.util.Map;
import org.scilab.forge.jlatexmath.ParseException;
import org.scilab.forge.jlatexmath.TeXConstants;
import org.scilab.forge.jlatexmath.TeXFormula;
import org.scilab.forge.jlatexmath.TeXIcon;

/**
 * A typeset formula. Wider than its column, it is broken before a relation or an operator; what cannot be broken is
 * scaled down, to no less than half; a formula that cannot be read as LaTeX stands as its plain text, in the colour of
 * a fault, never as nothing.
 */
public final class Mathematics implements Picture {
    private static final double SMALLEST = 0.5;
    private static final int KEPT = 400;
    private static final float GAP_BETWEEN_LINES = 0.5f;   // ex, in the formula's own size

    private final TeXIcon icon;
    private final String words;
    private final double scale;
    private final Color ink;
    private final boolean readable;

    private Mathematics(TeXIcon icon, String words, double scale, Color ink, boolean readable) {
        this.icon = icon;
        this.words = words;
        this.scale = scale;
        this.ink = ink;
        this.readable = readable;
    }

    /** Formulas as last set, newest last: typesetting one costs more than painting it. */
    private static final Map<String, Mathematics> SET = new LinkedHashMap<>(64, 0.75f, true) {
        @Override
        protected boolean removeEldestEntry(Map.Entry<String, Mathematics> eldest) {
            return size() > KEPT;
        }
    };

    /**
     * @param latex    the formula
     * @param words    the same in plain text
     * @param size     height of the letters, 1/96 inch
     * @param maxWidth column width, 1/96 inch; infinite for as wide as it comes
     */
    public static synchronized Mathematics of(String latex, String words, double size, double maxWidth) {
        return SET.computeIfAbsent(size + " " + maxWidth + " " + latex, k -> set(latex, words, size, maxWidth));
    }

    private static Mathematics set(String latex, String words, double size, double maxWidth) {
        try {
            TeXIcon icon = icon(latex, size, Double.POSITIVE_INFINITY);
            if (icon.getTrueIconWidth() > maxWidth) {
                icon = icon(latex, size, maxWidth);
            }
            return fitted(icon, words, maxWidth, Ink.INK, true);
        } catch (ParseException | IllegalArgumentException | IndexOutOfBoundsException | NullPointerException e) {
            // The typesetter throws all of these on text that is not LaTeX; the formula itself must still be read.
            return fitted(icon("\\text{" + escaped(words) + "}", size, maxWidth), words, maxWidth, Ink.BAD, false);
        }
    }

    private static Mathematics fitted(TeXIcon icon, String words, double maxWidth, Color ink, boolean readable) {
        double scale = Math.max(SMALLEST, Math.min(1, maxWidth / Math.max(1, icon.getTrueIconWidth())));
        return new Mathematics(icon, words, scale, ink, readable);
    }

    private static TeXIcon icon(String latex, double size, double maxWidth) {
        TeXFormula.TeXIconBuilder builder = new TeXFormula(latex).new TeXIconBuilder()
                .setStyle(TeXConstants.STYLE_DISPLAY).setSize((float) size).setTrueValues(true);
        if (Double.isFinite(maxWidth)) {
            builder.setWidth(TeXConstants.UNIT_PIXEL, (float) maxWidth, TeXConstants.ALIGN_LEFT).setIsMaxWidth(true)
                    .setInterLineSpacing(TeXConstants.UNIT_EX, GAP_BETWEEN_LINES);
        }
        return builder.build();
    }

    private static String escaped(String words) {
        return words.replaceAll("[^\\p{Alnum} +\\-*/=().,:;<>|]", " ");
    }

    /** Whether the LaTeX could be read. */
    public boolean readable() {
        return readable;
    }

    @Override
    public double width() {
        return icon.getTrueIconWidth() * scale;
    }

    @Override
    public double height() {
        return (icon.getTrueIconHeight() + icon.getTrueIconDepth()) * scale;
    }

    @Override
    public double baseline() {
        return icon.getTrueIconHeight() * scale;
    }

    @Override
    public String inWords() {
        return words;
    }

    @Override
    public void paint(Graphics2D g) {
        var before = g.getTransform();
        g.scale(scale, scale);
        icon.setForeground(ink);
        synchronized (Mathematics.class) {
            icon.paintIcon(null, g, 0, 0);
        }
        g.setTransform(before);
    }
}
