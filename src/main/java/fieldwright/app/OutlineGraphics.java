package fieldwright.app;

import java.awt.Font;
import java.awt.font.GlyphVector;
import javafx.scene.canvas.GraphicsContext;
import org.jfree.fx.FXGraphics2D;

/**
 * Java2D on a canvas, letters as outlines. The typesetting library brings fonts of its own that the window does not
 * know by name; and outlines are placed alike on every platform.
 */
final class OutlineGraphics extends FXGraphics2D {
    OutlineGraphics(GraphicsContext canvas) {
        super(canvas);
    }

    @Override
    public void drawString(String text, int x, int y) {
        drawString(text, (float) x, (float) y);
    }

    @Override
    public void drawString(String text, float x, float y) {
        if (!text.isEmpty()) {
            drawGlyphVector(getFont().layoutGlyphVector(getFontRenderContext(), text.toCharArray(), 0, text.length(),
                    Font.LAYOUT_LEFT_TO_RIGHT), x, y);
        }
    }

    @Override
    public void drawGlyphVector(GlyphVector glyphs, float x, float y) {
        fill(glyphs.getOutline(x, y));
    }
}
