/**
 * The window: a calculation pad for one sheet.
 *
 * <p>Start at {@link fieldwright.app.AppLauncher}. What lies on the desk (text, results, what is stale, undo) is
 * {@code SheetDesk}, which knows no window; {@code Workbench} hands its text to a {@code Calculator} in another process
 * and brings results back, so the window never waits. {@code Pad} puts both behind a page: {@code PageView} with a
 * {@code StepView} for each step, whose three columns are filled by {@code ReferenceColumn}, {@code CalculationColumn}
 * and {@code OutputColumn}; {@code InputsLedger} and {@code ChecksLedger} stand beside it. {@code PadWindow} adds the
 * window, its dialogs and keys ({@code Keys} is the list of them all).
 *
 * <p>Opening a file runs nothing: the page shows what the file has on record and says so. Only one editor is alive at a
 * time; it is disposed of when the step is left.
 *
 * <p>Everything is measured in letter heights ({@code Zoom}), so the page scales as a whole. Colours and fonts stand in
 * {@code pad.css}. May depend on {@code output}, {@code sheet}, {@code formula} (names and formulas as read),
 * {@code session} and {@code draw}.
 */
package fieldwright.app;
