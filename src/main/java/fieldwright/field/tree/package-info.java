/**
 * Very many charges: point clouds and polylines of numbers.
 *
 * <p>Start at {@link fieldwright.field.tree.FieldTree} for many targets, at {@link fieldwright.field.tree.DirectField} for one. Bare
 * values without 1/(4π eps0), lengths in m, with error bounds that are rigorous but for the rounding of sums, which is taken a few times
 * larger than it was measured. Weak: the bound is 100 to 1,000 times the true error, since it takes all phases at their worst; and few
 * targets among very many charges, where neither local expansions nor small blocks of targets help.
 */
package fieldwright.field.tree;
