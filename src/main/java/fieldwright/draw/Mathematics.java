package fieldwright.draw;

import java.awt.Graphics2D;
import java.awt.geom.AffineTransform;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import org.scilab.forge.jlatexmath.Box;
import org.scilab.forge.jlatexmath.TeXConstants;
import org.scilab.forge.jlatexmath.TeXFormula;

/**
 * A typeset formula. Wider than its column, it is broken before relations, and where that does not suffice before the
 * operators of a sum; what is still too wide is scaled down, to no less than half. A formula that cannot be read as
 * LaTeX stands as its plain text, in the colour of a fault, never as nothing.
 */
public final class Mathematics implements Picture {
    private static final double SMALLEST = 0.5;
    private static final int KEPT = 400;
    private static final double INDENT = 1.5;       // of a line that goes on, in letter heights
    private static final double LEFT_SIDE = 0.3;    // of the column: a wider left side is not hung under
    private static final double LEADING = 0.35;

    /** One line as set: where its left end and the line it stands on are. The box measures in letter heights. */
    private record Line(Box box, double size, double x, double baseline) {
        static Line of(String latex, double size, double x) {
            Box box = new TeXFormula(latex).new TeXIconBuilder()
                    .setStyle(TeXConstants.STYLE_DISPLAY).setSize((float) size).setTrueValues(true).build().getBox();
            return new Line(box, size, x, box.getHeight() * size);
        }

        double width() {
            return box.getWidth() * size;
        }

        double depth() {
            return box.getDepth() * size;
        }
    }

    private final List<Line> lines;
    private final String words;
    private final double scale;
    private final boolean readable;

    private Mathematics(List<Line> lines, String words, double maxWidth, boolean readable) {
        this.lines = lines;
        this.words = words;
        this.scale = Math.max(SMALLEST, Math.min(1, maxWidth / Math.max(1, fullWidth())));
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
        String key = size + " " + maxWidth + " " + latex;
        Mathematics known = SET.get(key);
        if (known == null) {
            known = set(latex, words, size, maxWidth);
            SET.put(key, known);
        }
        return known;
    }

    private static Mathematics set(String latex, String words, double size, double maxWidth) {
        try {
            Breaks.requireClosedBraces(latex);
            return new Mathematics(broken(spaced(latex), size, maxWidth), words, maxWidth, true);
        } catch (RuntimeException e) {
            // The typesetter throws several kinds on text that is not LaTeX; the formula itself must still be read.
            return new Mathematics(List.of(Line.of("\\text{" + escaped(words) + "}", size, 0)), words, maxWidth, false);
        }
    }

    /** The typesetter leaves no gap between the columns of a case distinction. */
    private static String spaced(String latex) {
        return latex.contains("{cases}") ? latex.replace("&", "&\\quad ") : latex;
    }

    private static List<Line> broken(String latex, double size, double maxWidth) {
        Line whole = Line.of(latex, size, 0);
        if (whole.width() <= maxWidth) {
            return List.of(whole);
        }
        List<Breaks.Part> parts = Breaks.parts(latex);
        double left = parts.size() > 1 ? Line.of(parts.get(0).latex(), size, 0).width() : 0;
        boolean hangs = left < LEFT_SIDE * maxWidth;
        double indent = hangs ? left : INDENT * size;
        List<Line> lines = new ArrayList<>();
        for (String chain : filled(parts, Breaks.Rank.RELATION, hangs, size, maxWidth, indent)) {
            double start = lines.isEmpty() ? 0 : indent;
            for (String sum : filled(Breaks.parts(chain), Breaks.Rank.SUM, false, size, maxWidth - start, INDENT * size)) {
                lines.add(Line.of(sum, size, start));
                start = (lines.size() == 1 ? 0 : start) + INDENT * size;
            }
        }
        return stacked(lines, size);
    }

    /**
     * As many parts on a line as fit, broken only before places of the rank; further lines have less room by the indent.
     *
     * @param keepFirst a short left side stays with its relation, so that those below can stand under it
     */
    private static List<String> filled(List<Breaks.Part> parts, Breaks.Rank rank, boolean keepFirst, double size, double maxWidth,
            double indent) {
        List<String> lines = new ArrayList<>();
        String line = "";
        boolean kept = !keepFirst;
        for (Breaks.Part part : parts) {
            double room = maxWidth - (lines.isEmpty() ? 0 : indent);
            boolean mayBreak = part.before() == rank && kept;
            if (mayBreak && Line.of(line + part.latex(), size, 0).width() > room) {
                lines.add(line);
                line = "";
            }
            kept |= part.before() == rank;
            line += part.latex();
        }
        lines.add(line);
        return lines;
    }

    private static List<Line> stacked(List<Line> lines, double size) {
        List<Line> stacked = new ArrayList<>();
        double top = 0;
        for (Line line : lines) {
            stacked.add(new Line(line.box, size, line.x, top + line.baseline));
            top += line.baseline + line.depth() + LEADING * size;
        }
        return List.copyOf(stacked);
    }

    private static String escaped(String words) {
        return words.replaceAll("[^\\p{Alnum} +\\-*/=().,:;<>|]", " ");
    }

    /** Whether the LaTeX could be read. */
    public boolean readable() {
        return readable;
    }

    /** On how many lines it stands. */
    public int lineCount() {
        return lines.size();
    }

    private double fullWidth() {
        return lines.stream().mapToDouble(l -> l.x + l.width()).max().orElse(0);
    }

    @Override
    public double width() {
        return fullWidth() * scale;
    }

    @Override
    public double height() {
        Line last = lines.get(lines.size() - 1);
        return (last.baseline + last.depth()) * scale;
    }

    @Override
    public double baseline() {
        return lines.get(0).baseline * scale;
    }

    @Override
    public String inWords() {
        return words;
    }

    @Override
    public void paint(Graphics2D g) {
        AffineTransform before = g.getTransform();
        g.scale(scale, scale);
        g.setColor(readable ? Ink.INK : Ink.BAD);
        synchronized (Mathematics.class) {
            for (Line line : lines) {
                AffineTransform page = g.getTransform();
                g.translate(line.x, line.baseline);
                g.scale(line.size, line.size);
                line.box.draw(g, 0, 0);
                g.setTransform(page);
            }
        }
        g.setTransform(before);
    }
}
