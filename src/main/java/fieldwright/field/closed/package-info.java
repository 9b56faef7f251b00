/**
 * Closed forms for the field and potential of simply charged bodies: rod, polygon, box, disc, ring, tube, cylinder,
 * sphere, ball, and the endless forms.
 *
 * <p>Start at {@link fieldwright.field.closed.ClosedForm}: every body is a record in its own local frame that answers
 * one question, {@code at(x, y, z, placeError)}, with a {@link fieldwright.field.closed.Closed}: field, potential and a
 * bound on the error of each.
 *
 * <p>Units: none. Kernel convention without 1/(4 pi eps0): E = ∫ density (r - r')/|r - r'|³, V = ∫ density/|r - r'|.
 * Lengths in one unit L, charge in one unit C; then V is in C/L and E in C/L². Endless bodies have their potential
 * zero at distance 1 L, stated in each.
 *
 * <p>Accuracy: the stated bounds are meant to hold always; the tests hold every form to the larger of 1e-12 and
 * 8 eps size/gap (relative to the length of E, and to V) against mpmath at 40 digits, gaps from 1e-9 to 1e8 sizes,
 * and the stated bound above the true error in every row. A form that loses digits far away hands over to a Gauss
 * rule on the smooth kernel or to a multipole series. Forms of thin bodies (thickness t, size s) lose s/t digits close
 * by and say so in their bound.
 *
 * <p>May depend on java.lang only.
 */
package fieldwright.field.closed;
