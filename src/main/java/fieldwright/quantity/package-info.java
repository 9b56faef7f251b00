/**
 * Amounts: a value in SI, its numerical error, its dimension, and whether it converged.
 *
 * <p>Start at {@link fieldwright.quantity.Amount}; unit texts are read by {@link fieldwright.quantity.Units}; a field at a
 * place is a {@link fieldwright.quantity.Vector}. Every number is held in coherent SI; angles are plain numbers in
 * radian. Units come from JSR 385 (Indriya); dimensions are compared by {@link fieldwright.quantity.Dimensions}.
 *
 * <p>Numerical errors are absolute bounds, carried outward: each operation adds the rounding it made. Functions
 * of the Java library are taken at their documented accuracy (1 ulp, 2.5 ulp for hyperbolic functions).
 *
 * <p>Depends on nothing else of this program.
 */
package fieldwright.quantity;
