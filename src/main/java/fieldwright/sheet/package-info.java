/**
 * The sheet as a plain-text file: text to immutable cells and back, record lines, digest, saving. No numerics.
 *
 * <p>Start at {@link fieldwright.sheet.Sheet}: {@code Sheet.parse(text)} and {@code sheet.write()} are inverse, byte for
 * byte; {@code withCell}, {@code insert}, {@code remove}, {@code withRecords} give a new sheet whose other cells keep
 * their bytes. {@link fieldwright.sheet.Cell} splits the lines of input and derive cells into records with line and
 * column; what a formula or a unit means is for others to say. {@link fieldwright.sheet.RecordLine} writes results
 * exactly and reads them back. {@link fieldwright.sheet.SheetFile} reads and saves files.
 *
 * <p>Lines and columns are 1-based; lines are lines of the file. Whatever cannot be understood in a line that only
 * stores something is kept; whatever cannot be understood in a line that says something is an error with its line.
 *
 * <p>May depend on {@code fieldwright.output} and {@code java.base} only.
 */
package fieldwright.sheet;
