/**
 * Numeric integration: Gauss rules on boxes, their error estimates, and adaptive refinement.
 *
 * <p>Start at {@link fieldwright.integral.Cubature}: it takes smooth pieces ({@link fieldwright.integral.Integrand}),
 * refines the worst one until the sum is good enough, and says how good it is. {@link fieldwright.integral.RegionIntegral}
 * integrates a formula over a region; {@link fieldwright.integral.NestedIntegrator} serves {@code integral(...)} inside formulas.
 * All values are SI. May depend on quantity, formula, geometry, charge.
 */
package fieldwright.integral;
