package fieldwright.words;

import fieldwright.quantity.Place;

/** An earthed conducting sphere or spherical shell, radius in m. */
public record GroundedSphere(Place centre, double radius, String text) { }
