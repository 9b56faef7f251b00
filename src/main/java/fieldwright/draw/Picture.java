package fieldwright.draw;

import java.awt.Graphics2D;
import java.awt.RenderingHints;
import java.awt.image.BufferedImage;

/**
 * Something of a known size that paints itself with Java2D, top left at the origin. Sizes are in units of 1/96 inch;
 * the one who paints scales the graphics first, so a picture is sharp at every zoom.
 */
public interface Picture {
    double width();

    double height();

    /** Distance from the top to the line that text beside the picture stands on; the bottom unless the picture has one. */
    default double baseline() {
        return height();
    }

    /** Paints on a transparent ground. The graphics may be left with another colour, font or stroke, not transform or clip. */
    void paint(Graphics2D g);

    /** What the picture says, in words, for those who hear the page. */
    String inWords();

    /** The picture on white, in pixels: for files and tests. */
    default BufferedImage image(double scale) {
        int w = Math.max(1, (int) Math.ceil(width() * scale));
        int h = Math.max(1, (int) Math.ceil(height() * scale));
        BufferedImage image = new BufferedImage(w, h, BufferedImage.TYPE_INT_RGB);
        Graphics2D g = image.createGraphics();
        try {
            g.setColor(java.awt.Color.WHITE);
            g.fillRect(0, 0, w, h);
            g.setRenderingHint(RenderingHints.KEY_ANTIALIASING, RenderingHints.VALUE_ANTIALIAS_ON);
            g.setRenderingHint(RenderingHints.KEY_STROKE_CONTROL, RenderingHints.VALUE_STROKE_PURE);
            g.scale(scale, scale);
            paint(g);
        } finally {
            g.dispose();
        }
        return image;
    }
}
