package fieldwright.words;

import fieldwright.charge.Surroundings;

/**
 * A conducting sphere, or a spherical shell, before it is said whether the charge stands outside it or inside.
 *
 * @param outside surroundings of charge outside it
 * @param inside surroundings of charge inside it
 * @param text for the assumptions
 */
public record ConductingSphere(Surroundings outside, Surroundings inside, String text) { }
