package fieldwright.words;

/**
 * An earthed conducting plane across an axis, before it is said on which side of it the charge stands.
 *
 * @param axis x, y or z
 * @param offset where it cuts the axis, m
 * @param offsetText the same as the author wrote it: {@code H}
 */
public record GroundPlane(String axis, double offset, String offsetText) {
    String text() {
        return axis + " = " + offsetText;
    }
}
