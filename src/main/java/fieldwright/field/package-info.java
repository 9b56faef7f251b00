/**
 * Field and potential of charge at any place.
 *
 * <p>Start at {@link fieldwright.field.FieldSolver}. A source becomes {@link fieldwright.field.Patch patches} (chart, density, kernel); a
 * question becomes {@link fieldwright.field.Probe probes} (the place, and its images in the surroundings);
 * {@link fieldwright.field.Paver} cuts each patch into pieces that suit the place: plain boxes far away, polar triangles and sinh
 * segments about the nearest point, volumes by their faces with the radial integral done first. All pieces of one question are refined
 * together by {@link fieldwright.integral.Cubature}. Bodies that {@link fieldwright.field.ClosedShapes} recognises are answered by
 * {@code field.closed} instead ({@link fieldwright.field.ClosedSum}), unless {@link fieldwright.field.Accuracy} says otherwise: that is how
 * one is checked with the other. A result depends on its own question only.
 * SI units. May depend on quantity, formula, geometry, charge, integral.
 */
package fieldwright.field;
