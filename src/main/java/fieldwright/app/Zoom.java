package fieldwright.app;

import javafx.beans.property.ReadOnlyDoubleProperty;
import javafx.beans.property.ReadOnlyDoubleWrapper;

/** Size of the page: everything on it is measured in the letter height that this sets. */
final class Zoom {
    /** Letter height at factor 1, in pixels. */
    static final double LETTER = 13.5;
    private static final double[] STEPS = {0.5, 0.67, 0.8, 0.9, 1, 1.1, 1.25, 1.5, 1.75, 2, 2.5, 3};

    private final ReadOnlyDoubleWrapper factor = new ReadOnlyDoubleWrapper(1);

    double factor() {
        return factor.get();
    }

    ReadOnlyDoubleProperty factorProperty() {
        return factor.getReadOnlyProperty();
    }

    /** Pixels of so many letter heights. */
    double em(double letters) {
        return letters * LETTER * factor();
    }

    void larger() {
        for (double step : STEPS) {
            if (step > factor() + 1e-9) {
                factor.set(step);
                return;
            }
        }
    }

    void smaller() {
        for (int i = STEPS.length - 1; i >= 0; i--) {
            if (STEPS[i] < factor() - 1e-9) {
                factor.set(STEPS[i]);
                return;
            }
        }
    }

    void reset() {
        factor.set(1);
    }
}
