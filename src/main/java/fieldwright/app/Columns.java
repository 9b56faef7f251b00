package fieldwright.app;

/**
 * Widths of the three columns of the page, in pixels.
 *
 * @param stacked true when the page is so narrow that Output stands below Calculation
 */
record Columns(double reference, double calculation, double output, boolean stacked) {
    static Columns of(double width, Zoom zoom) {
        double letters = width / zoom.em(1);
        boolean wide = letters > 66;
        double reference = zoom.em(wide ? 11 : letters > 44 ? 8.5 : 7);
        double output = zoom.em(wide ? 18 : 14.5);
        double calculation = width - reference - output;
        boolean stacked = calculation < zoom.em(21);
        return stacked ? new Columns(reference, width - reference, width - reference, true)
                : new Columns(Math.floor(reference), width - Math.floor(reference) - Math.floor(output), Math.floor(output), false);
    }
}
