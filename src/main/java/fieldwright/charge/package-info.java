/**
 * Charge: what is where, and what stands around it. Plain data.
 *
 * <p>Start at {@link fieldwright.charge.Source}. Lengths in m; densities in C/m, C/m², C/m³ as the region has one, two or three
 * dimensions; point charges in C. Surroundings are always stated: {@link fieldwright.charge.Surroundings}.
 * May depend on quantity, formula and geometry.
 */
package fieldwright.charge;
