package fieldwright.session;

import fieldwright.formula.Binding;
import fieldwright.formula.Integrator;
import fieldwright.formula.Names;
import fieldwright.formula.Scope;
import fieldwright.output.CellOutcome;
import fieldwright.output.Output;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Stop;
import fieldwright.quantity.UnknownNameException;
import fieldwright.sheet.Cell;
import java.util.ArrayList;
import java.util.Collection;
import java.util.Collections;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.TreeSet;
import java.util.function.UnaryOperator;

/** A cell while it is worked: what it has read, written and shown so far. It is the scope of the formulas in it. */
final class Draft implements Scope {
    private final int number;
    private final Cell cell;
    private final NameTable above;
    private final Integrator integrator;
    private final Reads reads = new Reads();
    private final Map<String, SheetName> written = new LinkedHashMap<>();
    private final List<Output> outputs = new ArrayList<>();
    private final Map<String, Integer> resultPlaces = new HashMap<>();
    private final UnaryOperator<String> hint;
    private WorkingCode code;
    private InputSpread spread = InputSpread.NONE;
    private CellOutcome.State state = CellOutcome.State.WORKED;

    /**
     * @param number of the cell, 1-based
     * @param hint   says more about a name that is not known here; null when there is nothing to say
     */
    Draft(int number, Cell cell, NameTable above, Integrator integrator, UnaryOperator<String> hint) {
        this.hint = hint;
        this.number = number;
        this.cell = cell;
        this.above = above;
        this.integrator = integrator;
    }

    int number() {
        return number;
    }

    Cell cell() {
        return cell;
    }

    NameTable above() {
        return above;
    }

    void setSpread(InputSpread ofInputs) {
        spread = ofInputs;
    }

    void setCode(WorkingCode compiled) {
        code = compiled;
    }

    // -- reading --

    /** What a name means at this point; null when nothing writes it. A read of something above is noted. */
    SheetName read(String name) {
        SheetName own = written.get(name);
        if (own != null) {
            return own;
        }
        SheetName found = above.get(name);
        reads.add(name, found);
        return found;
    }

    @Override
    public Binding lookup(String name) {
        SheetName found = read(name);
        if (found == null) {
            return null;
        }
        if (found.isFailed()) {
            throw new AuthorException(hasNoValue(found));
        }
        return found.binding();
    }

    String hasNoValue(SheetName name) {
        return "'" + name.name() + "' has no value: " + (name.cell() == number ? "its own line" : "cell " + name.cell()) + " "
                + name.failure() + ".";
    }

    @Override
    public Collection<String> names() {
        Collection<String> names = new TreeSet<>(written.keySet());
        above.all().stream().filter(name -> name.binding() != null).forEach(name -> names.add(name.name()));
        return names;
    }

    @Override
    public Integrator integrator() {
        return integrator;
    }

    // -- writing --

    SheetName own(String name) {
        return written.get(name);
    }

    /** Throws when this cell may not write that name: it is reserved, or another cell writes it. */
    void requireFree(String name, boolean sheetName) {
        String reserved = sheetName ? Names.whyReserved(name) : null;
        if (reserved != null) {
            throw new AuthorException(reserved);
        }
        SheetName taken = above.get(name);
        if (taken != null && taken.cell() == 0) {
            throw new AuthorException("'" + name + "' is the name of a library sheet that this sheet uses. Choose another name here.");
        }
        if (taken != null) {
            throw new AuthorException("'" + name + "' is written by cell " + taken.cell() + " and again by cell " + number
                    + ": a name is written by one cell. Choose another name here.");
        }
    }

    /** As {@link #requireFree}, and the cell itself may not have written it before. */
    void requireNew(String name, boolean sheetName) {
        requireFree(name, sheetName);
        if (written.containsKey(name)) {
            throw new AuthorException("'" + name + "' is declared twice in this cell. Choose another name for one of them.");
        }
    }

    void write(SheetName name) {
        written.put(name.name(), name);
    }

    /** Says that a name this cell should have written has no value, unless it has one. */
    void writeFailed(String name, String failure) {
        if (above.get(name) == null) {
            written.putIfAbsent(name, SheetName.failed(name, number, failure));
        }
    }

    // -- showing --

    void show(Output output) {
        outputs.add(output);
    }

    /** Shows a result, in place of one of the same name shown before. */
    void showResult(String name, Output result) {
        Integer place = resultPlaces.get(name);
        if (place == null) {
            resultPlaces.put(name, outputs.size());
            outputs.add(result);
        } else {
            outputs.set(place, result);
        }
    }

    String hint(String name) {
        return hint.apply(name);
    }

    /**
     * What was thrown while a line of the file was worked: a stop ends the cell, anything else is a failure.
     */
    void fail(int line, Throwable thrown) {
        if (Stop.isRequested() || Mishap.isStop(thrown)) {
            state = CellOutcome.State.STOPPED;
            return;
        }
        String more = thrown instanceof UnknownNameException unknown ? hint(unknown.name()) : null;
        fail(line, Mishap.describe(thrown) + (more == null ? "" : " " + more));
    }

    /** @param line of the file */
    void fail(int line, String message) {
        state = CellOutcome.State.FAILED;
        outputs.add(new Output.Problem(line, number, message));
    }

    void stop() {
        state = CellOutcome.State.STOPPED;
    }

    boolean isStopped() {
        return state == CellOutcome.State.STOPPED;
    }

    void printed(String text) {
        if (!text.isEmpty()) {
            outputs.add(new Output.Printed(text));
        }
    }

    CellRun finished() {
        return new CellRun(cell.kind(), cell.source(), code, spread, reads, Collections.unmodifiableMap(new LinkedHashMap<>(written)), List.copyOf(outputs), state);
    }
}
