/**
 * The program from a terminal: opens the app, or runs a sheet and prints its results.
 *
 * <p>Start at {@link fieldwright.cli.Main}. {@link fieldwright.cli.RunCommand} reads, asks for trust, runs and records;
 * {@link fieldwright.cli.TextReport} and {@link fieldwright.cli.JsonReport} print what a run gave. Results stand on
 * standard output, everything else on standard error.
 *
 * <p>A thin face: no numerics here. May depend on {@code output}, {@code sheet}, {@code draw} (figures only),
 * {@code session} and {@code app}.
 */
package fieldwright.cli;
