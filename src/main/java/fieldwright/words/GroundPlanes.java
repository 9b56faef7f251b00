package fieldwright.words;

import fieldwright.charge.Surroundings;

/**
 * Two earthed parallel planes.
 *
 * @param around the planes
 * @param text for the assumptions
 */
public record GroundPlanes(Surroundings around, String text) { }
