/**
 * Formulas in ordinary notation: parse, check units, simplify, differentiate, typeset, evaluate in blocks.
 *
 * <p>Start at {@link fieldwright.formula.Formula}. A text becomes a tree ({@link fieldwright.formula.Node}) by the parser;
 * {@code bind} gives names their values through a {@link fieldwright.formula.Scope}; units are checked before any number
 * is worked; {@code compile} turns the tree into straight-line code over blocks of at most
 * {@value fieldwright.formula.BlockFunction#BLOCK} nodes. Functions and constants are listed in
 * {@link fieldwright.formula.Function} and {@link fieldwright.formula.Constants}; what a name may be, in
 * {@link fieldwright.formula.Names}; inputs with tolerance, in
 * {@link fieldwright.formula.InputDefinition}; lines of derive cells, in {@link fieldwright.formula.DeriveDefinition}.
 *
 * <p>Depends on {@code fieldwright.quantity} and Commons Math. Numbers are coherent SI.
 */
package fieldwright.formula;
