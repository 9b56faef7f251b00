/**
 * Java of working cells: compiled by JShell, run by ourselves.
 *
 * <p>Start at {@link fieldwright.session.snippet.SnippetCompiler}: text and the meaning of the names in it go in, a
 * {@link fieldwright.session.snippet.CompiledSnippet} comes out; the same again costs nothing. JShell believes that it
 * runs what it compiles; {@code CapturingControl}, our {@code DirectExecutionControl}, only keeps the classes.
 * {@link fieldwright.session.snippet.Workspace} runs them, over classes of its own, as often as needed: the first
 * time, after an edit, and with other inputs.
 *
 * <p>Nothing here knows what a sheet is. The only place that sees JShell. May depend on {@code quantity} for its errors.
 */
package fieldwright.session.snippet;
