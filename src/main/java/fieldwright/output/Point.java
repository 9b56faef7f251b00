package fieldwright.output;

import java.io.Serializable;

/** A place in the sheet's frame, in m. */
public record Point(double x, double y, double z) implements Serializable { }
