package fieldwright.words;

import fieldwright.charge.Surroundings;

/**
 * Earthed walls all round the charge.
 *
 * @param around the walls
 * @param text for the assumptions
 */
public record Enclosure(Surroundings around, String text) { }
