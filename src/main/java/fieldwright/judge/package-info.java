/**
 * Verdicts: a check compares two values, an assessment holds one value against a threshold.
 *
 * <p>Start at {@link fieldwright.judge.Check} and {@link fieldwright.judge.Assessment};
 * {@link fieldwright.judge.Threshold} says where a limit comes from, {@link fieldwright.judge.Thresholds} has a few that
 * are common practice. Both verdicts count the numerical error against the author, and neither passes on a number that
 * did not converge, is unbounded, or whose numerical error was not carried.
 *
 * <p>Amounts in, verdict out; no sheet, no display. May depend on {@code quantity} only, of the folders below it.
 */
package fieldwright.judge;
