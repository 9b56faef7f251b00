package fieldwright.field.honesty;

/** A density without kinks, in the body's own frame, constants of nature left out. */
interface SmoothDensity {
    double at(double x, double y, double z);
}
