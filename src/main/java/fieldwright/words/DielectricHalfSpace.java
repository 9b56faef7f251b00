package fieldwright.words;

/**
 * A dielectric that fills one side of a plane: behind {@code axis = offset}, seen from the charge.
 *
 * @param axis x, y or z
 * @param offset where the plane cuts the axis, m
 * @param filled +1 or -1: the side that is filled
 * @param behind its relative permittivity
 * @param text for the assumptions
 */
public record DielectricHalfSpace(String axis, double offset, int filled, double behind, String text) { }
