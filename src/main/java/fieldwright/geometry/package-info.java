/**
 * Regions: where charge is, as data, and the maps that make integrals of them.
 *
 * <p>Start at {@link fieldwright.geometry.Region}. A {@link fieldwright.geometry.CoordinateRegion} holds or limits each
 * coordinate of a system; {@link fieldwright.geometry.ParametricRegion} is any other shape; {@link fieldwright.geometry.Bodies}
 * names the usual ones. {@link fieldwright.geometry.Chart} is the numeric side: the unit box mapped onto the region, a block of
 * nodes at a time, with tangents, so that arc length, area and volume are true ones.
 * Lengths in m, angles in rad. May depend on quantity and formula.
 */
package fieldwright.geometry;
