/**
 * Searches on a field: its peak over a region, how fast it falls, field lines, contours of a potential or of anything else.
 *
 * <p>Plain data with what was left open stated: {@link fieldwright.field.search.Peak}, {@link fieldwright.field.search.DecayExponent},
 * {@link fieldwright.field.search.FieldLine}, {@link fieldwright.field.search.Contours}. SI units.
 */
package fieldwright.field.search;
