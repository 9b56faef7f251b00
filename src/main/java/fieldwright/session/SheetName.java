package fieldwright.session;

import fieldwright.formula.Binding;
import fieldwright.session.snippet.Declaration;
import java.util.ArrayList;
import java.util.List;
import java.util.Objects;
import java.util.stream.IntStream;

/**
 * A name as it stands below the cell that writes it.
 *
 * @param cell     the cell that writes it, 1-based
 * @param value    what Java code sees; null when there is none
 * @param binding  what formulas see; null when they do not see it at all
 * @param declares how Java code names it; null when it cannot
 * @param failure  why it has no value; null when it has one
 * @param touched  for an object that may change: the workings of cells that have had it in hand since it was made
 */
record SheetName(String name, int cell, Object value, Binding binding, Declaration declares, String failure, List<CellRun> touched) {

    SheetName(String name, int cell, Object value, Binding binding, Declaration declares, String failure) {
        this(name, cell, value, binding, declares, failure, List.of());
    }

    /** A name that its cell should have given a value and did not. */
    static SheetName failed(String name, int cell, String failure) {
        return new SheetName(name, cell, null, null, null, failure);
    }

    SheetName inCell(int newCell) {
        return new SheetName(name, newCell, value, binding, declares, failure, touched);
    }

    /** After a cell has had it in hand. */
    SheetName touchedBy(CellRun run) {
        List<CellRun> more = new ArrayList<>(touched);
        more.add(run);
        return new SheetName(name, cell, value, binding, declares, failure, more);
    }

    boolean isFailed() {
        return failure != null;
    }

    /**
     * True when whoever reads the one would find the same in the other. Of objects that may change under way only the
     * very same object is the same, and only if the same has been done to it.
     */
    boolean meansSame(SheetName other) {
        boolean constant = Constancy.isConstant(value) && Constancy.isConstant(other.value);
        boolean sameValue = constant ? Objects.equals(value, other.value) : value == other.value && isSame(touched, other.touched);
        return sameValue && Objects.equals(binding, other.binding) && Objects.equals(declares, other.declares)
                && Objects.equals(failure, other.failure);
    }

    private static boolean isSame(List<CellRun> a, List<CellRun> b) {
        return a.size() == b.size() && IntStream.range(0, a.size()).allMatch(i -> a.get(i) == b.get(i));
    }
}
