/**
 * Outputs as pictures and as figures on paper.
 *
 * <p>Start at {@link fieldwright.draw.Picture}: {@link fieldwright.draw.Curves} draws a plot,
 * {@link fieldwright.draw.Mathematics} a typeset formula; both paint on any Java2D graphics at any scale, a window's
 * canvas or an image. {@link fieldwright.draw.Reading} turns a value into digits, unit and doubt;
 * {@link fieldwright.draw.Figures} and {@link fieldwright.draw.Scale} hold the rules it goes by.
 *
 * <p>Lengths are in 1/96 inch. Nothing here computes or changes a result: numbers are only scaled and rounded for show.
 * May depend on {@code output}, Java2D, the chart and the typesetting library; knows no window.
 */
package fieldwright.draw;
