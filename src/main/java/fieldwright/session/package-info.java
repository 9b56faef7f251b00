/**
 * From the text of a sheet to its outcome: JShell, the calculation process, the pipe, replay.
 *
 * <p>Two places to start. {@link fieldwright.session.Session} is what a window or a command uses: text in, outcome out;
 * it keeps a child process ({@code CalculationProcess}) at work over a {@code Pipe} of serialised records and replaces
 * it when a cell has ruined it. {@link fieldwright.session.SheetRunner} works a sheet, in that process or in a test: a
 * {@code Pass} goes over the cells from top to bottom, a {@code Draft} is the cell at hand, {@code InputCell},
 * {@code DeriveCell} and {@code WorkingCell} work the kinds, {@code NameTable} is what they have written so far.
 * {@code SheetReplay} works it again with other inputs, for {@code Tolerances}.
 *
 * <p>No hidden state: a {@code CellRun} of an earlier pass stands again only if the cell has the same text, the same
 * compiled code and would read the same; objects that can change are made anew with every cell that uses them. Java of
 * working cells is compiled and run by {@code fieldwright.session.snippet}.
 *
 * <p>May depend on everything below it; nothing below it knows it.
 */
package fieldwright.session;
