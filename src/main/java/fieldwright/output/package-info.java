/**
 * What a sheet can show, as plain data: no numerics, no files, no pictures.
 *
 * <p>Start at {@link fieldwright.output.RunOutcome} (one run of a sheet), then
 * {@link fieldwright.output.CellOutcome}, {@link fieldwright.output.Output} (the closed family of things a cell
 * shows) and {@link fieldwright.output.Value} (number, vector, one-sided pair).
 *
 * <p>Numbers are held in SI; {@link fieldwright.output.Display} says in which unit a reader sees them.
 * {@link fieldwright.output.NumberText} turns numbers into text: exactly for the record, rounded for the reader.
 * Everything is immutable and serialisable, because it crosses the pipe from the calculation process.
 *
 * <p>May depend on nothing but {@code java.base}.
 */
package fieldwright.output;
