package fieldwright.app;

import fieldwright.draw.Curves;
import fieldwright.draw.Mathematics;
import fieldwright.output.Output;

/** Makes pictures of the page: names, formulas, plots. */
final class Typesetting {
    /** Letter heights of formulas, in 1/96 inch; symbols in running text are smaller than formulas on their own line. */
    static final double FORMULA = 17;
    static final double SYMBOL = 15.5;
    static final double SMALL = 12;
    private static final double PLOT_WIDTH = 480;
    private static final double PLOT_SHAPE = 0.48;

    private Typesetting() { }

    static PictureView formula(String latex, String words, Zoom zoom) {
        PictureView view = new PictureView(width -> Mathematics.of(latex, words, FORMULA, width), zoom);
        view.getStyleClass().add("formula");
        return view;
    }

    static PictureView symbol(String latex, String words, Zoom zoom) {
        PictureView view = new PictureView(width -> Mathematics.of(latex, words, SYMBOL, width), zoom);
        view.getStyleClass().add("symbol");
        return view;
    }

    static PictureView small(String latex, String words, Zoom zoom) {
        return new PictureView(width -> Mathematics.of(latex, words, SMALL, width), zoom);
    }

    static PictureView plot(Output.Plot plot, Zoom zoom) {
        double legend = plot.series().size() > 1 ? 20 : 0;
        double title = plot.title().isEmpty() ? 0 : 22;
        PictureView view = new PictureView(width -> {
            double w = Math.min(PLOT_WIDTH, width);
            return new Curves(plot, w, Math.max(150, w * PLOT_SHAPE) + legend + title);
        }, zoom);
        view.getStyleClass().add("plot");
        return view;
    }
}
