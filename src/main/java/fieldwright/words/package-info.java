/**
 * The vocabulary of working cells: what a sheet's Java imports, and nothing else.
 *
 * <p>Start at {@link fieldwright.words.Words}, the calls; {@link fieldwright.words.Shape} is a region being described,
 * {@link fieldwright.words.Distribution} charge that can be asked. Everything is immutable and thin: a call binds its
 * formula texts with the names of the current {@link fieldwright.words.Desk}, hands on to {@code geometry},
 * {@code charge}, {@code integral}, {@code field} and {@code judge}, and shows what comes back.
 *
 * <p>{@link fieldwright.words.Desk} is the one thing the session provides; {@link fieldwright.words.Outputs} turns
 * amounts, vectors and verdicts into the plain data of {@code output}. All numbers inside are SI.
 */
package fieldwright.words;
