package fieldwright.app;

import fieldwright.output.CellOutcome;
import fieldwright.output.Output;
import fieldwright.output.RunOutcome;
import fieldwright.sheet.Cell;
import fieldwright.sheet.Sheet;
import fieldwright.sheet.SheetException;
import fieldwright.sheet.SheetFile;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayDeque;
import java.util.ArrayList;
import java.util.Deque;
import java.util.HashMap;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Objects;
import java.util.Set;
import java.util.function.IntFunction;

/**
 * What lies on the desk: the sheet's text as it stands, what each step gave when it was last worked, and what of that
 * still holds. No window, no calculation; used from one thread.
 *
 * <p>Opening a file runs nothing: steps then show what the file has on record.
 */
final class SheetDesk {

    /** Told after every change. */
    interface Listener {
        void changed();
    }

    /** The text handed to a calculation, and which steps it was made of. */
    record Order(String text, List<Step> steps) { }

    /** What undo goes back to. */
    private record Page(Sheet sheet, List<Long> ids) { }

    /**
     * What a step gave, and the cell as it was then.
     *
     * @param doubtful true when a later run was to work it again and has not yet, so that what it read may be of old
     */
    private record Worked(Cell cell, CellOutcome outcome, boolean doubtful) { }

    private static final int UNDO_DEPTH = 200;

    private final List<Listener> listeners = new ArrayList<>();
    private final Deque<Page> undo = new ArrayDeque<>();
    private final Deque<Page> redo = new ArrayDeque<>();
    private final Map<Long, Worked> worked = new HashMap<>();
    private List<Long> workedOrder = List.of();
    private List<Output.Problem> sheetProblems = List.of();
    private long lastId;
    private Page page;
    private List<Step> steps;
    private String savedText;
    private Path file;

    private SheetDesk(Sheet sheet, Path file) {
        this.page = new Page(sheet, newIds(sheet.cells().size()));
        this.file = file;
        this.savedText = sheet.write();
        this.steps = judged();
    }

    /** A desk with a new sheet that has no file yet. */
    static SheetDesk blank() {
        Sheet sheet = Sheet.empty().withHeader("title", "").withHeader("project", "").insert(0, Cell.of(Cell.Kind.NOTE, "", ""));
        return new SheetDesk(sheet, null);
    }

    /** A desk with the sheet of a text that has no file yet. */
    static SheetDesk of(String text) throws SheetException {
        return new SheetDesk(Sheet.parse(text), null);
    }

    static SheetDesk open(Path file) throws IOException, SheetException {
        return new SheetDesk(SheetFile.read(file), file);
    }

    void listen(Listener listener) {
        listeners.add(listener);
    }

    Sheet sheet() {
        return page.sheet;
    }

    List<Step> steps() {
        return steps;
    }

    Step step(long id) {
        return steps.stream().filter(s -> s.id() == id).findFirst().orElse(null);
    }

    /** Null for a sheet that was never saved. */
    Path file() {
        return file;
    }

    /** Errors of the last run that belong to no step. */
    List<Output.Problem> sheetProblems() {
        return sheetProblems;
    }

    boolean isUnsaved() {
        return !page.sheet.write().equals(savedText);
    }

    /** True when every step was worked here and a clean run would give what is shown. */
    boolean isCurrent() {
        return sheetProblems.isEmpty() && steps.stream().noneMatch(s -> s.stale() || s.outcome() == null || !s.outcome().isComplete());
    }

    boolean wasWorked() {
        return !worked.isEmpty();
    }

    // --- changing the text ---

    void editStep(long id, String source) {
        change(index(id), i -> page.sheet.withCell(i, source));
    }

    void labelStep(long id, String label) {
        change(index(id), i -> page.sheet.withLabel(i, label));
    }

    void setHeader(String name, String value) {
        turnTo(new Page(page.sheet.withHeader(name, value), page.ids));
    }

    /** Puts a new step at an index, 0-based, and gives its id. */
    long insertStep(int at, Cell.Kind kind) {
        long id = ++lastId;
        List<Long> ids = new ArrayList<>(page.ids);
        ids.add(at, id);
        turnTo(new Page(page.sheet.insert(at, Cell.of(kind, "", "")), ids));
        return id;
    }

    void removeStep(long id) {
        int i = index(id);
        List<Long> ids = new ArrayList<>(page.ids);
        ids.remove(i);
        turnTo(new Page(page.sheet.remove(i), ids));
    }

    /** Moves a step up (−1) or down (+1); nothing happens at the end of the sheet. */
    void moveStep(long id, int by) {
        int from = index(id);
        int to = from + by;
        if (to < 0 || to >= page.ids.size()) {
            return;
        }
        List<Long> ids = new ArrayList<>(page.ids);
        ids.add(to, ids.remove(from));
        turnTo(new Page(page.sheet.remove(from).insert(to, page.sheet.cells().get(from)), ids));
    }

    boolean canUndo() {
        return !undo.isEmpty();
    }

    boolean canRedo() {
        return !redo.isEmpty();
    }

    void undo() {
        if (canUndo()) {
            redo.push(page);
            set(undo.pop());
        }
    }

    void redo() {
        if (canRedo()) {
            undo.push(page);
            set(redo.pop());
        }
    }

    private void change(int index, IntFunction<Sheet> edit) {
        turnTo(new Page(edit.apply(index), page.ids));
    }

    private void turnTo(Page next) {
        if (next.sheet.equals(page.sheet) && next.ids.equals(page.ids)) {
            return;
        }
        undo.push(page);
        if (undo.size() > UNDO_DEPTH) {
            undo.removeLast();
        }
        redo.clear();
        set(next);
    }

    private void set(Page next) {
        page = next;
        refresh();
    }

    private int index(long id) {
        int i = page.ids.indexOf(id);
        if (i < 0) {
            throw new IllegalArgumentException("step " + id + " is no longer on the sheet.");
        }
        return i;
    }

    private List<Long> newIds(int n) {
        List<Long> ids = new ArrayList<>();
        for (int i = 0; i < n; i++) {
            ids.add(++lastId);
        }
        return List.copyOf(ids);
    }

    // --- results ---

    /**
     * What to hand to a calculation now. Steps that are stale stay so until they give something themselves: an order may
     * end anywhere.
     */
    Order order() {
        steps.stream().filter(Step::stale).forEach(s -> doubt(s.id()));
        return new Order(page.sheet.write(), steps);
    }

    private void doubt(long id) {
        worked.computeIfPresent(id, (i, w) -> new Worked(w.cell, w.outcome, true));
    }

    /** Takes what steps of an order gave, as soon as it is known. */
    void take(Order order, List<CellOutcome> outcomes) {
        // What was not stale when the order was given holds in the order's sequence too; the rest is doubted until it comes.
        workedOrder = order.steps.stream().map(Step::id).toList();
        boolean changed = false;
        for (CellOutcome outcome : outcomes) {
            changed |= store(order, outcome);
        }
        if (changed) {
            refresh();
        }
    }

    /** Takes a whole run of an order. Steps the run did not reach keep what they showed, marked stale. */
    void take(Order order, RunOutcome run) {
        sheetProblems = run.sheetProblems();
        if (run.cells().size() == order.steps.size()) {
            workedOrder = order.steps.stream().map(Step::id).toList();
            run.cells().forEach(outcome -> store(order, outcome));
        }
        refresh();
    }

    private boolean store(Order order, CellOutcome outcome) {
        if (outcome.cell() < 1 || outcome.cell() > order.steps.size()) {
            return false;
        }
        Step step = order.steps.get(outcome.cell() - 1);
        if (outcome.state() == CellOutcome.State.NOT_REACHED) {
            doubt(step.id());
            return true;
        }
        Worked now = new Worked(step.cell(), outcome, false);
        return !now.equals(worked.put(step.id(), now));
    }

    private void refresh() {
        steps = judged();
        List.copyOf(listeners).forEach(Listener::changed);
    }

    /**
     * The steps with what still holds. A step is stale when its own text changed, when it was not worked through to its
     * end, when it reads a name that a stale or changed step above declares or declared, or when its place among the
     * steps changed. A note is stale with the results it quotes, wherever they stand. Working steps share Java names, which their reads do not tell: below a stale one all are stale.
     */
    private List<Step> judged() {
        List<Step> result = new ArrayList<>();
        Set<String> doubtful = namesGone();
        boolean javaDoubtful = false;
        List<Long> above = new ArrayList<>();
        for (int i = 0; i < page.ids.size(); i++) {
            long id = page.ids.get(i);
            Cell cell = page.sheet.cells().get(i);
            Worked w = worked.get(id);
            Step fresh = new Step(id, i + 1, cell, w == null ? null : w.cell, w == null ? null : w.outcome, false);
            boolean stale = w != null && (w.doubtful || fresh.isEdited() || !w.outcome.isComplete() && w.outcome.state() != CellOutcome.State.FAILED
                    || w.outcome.reads().stream().anyMatch(doubtful::contains)
                    || cell.kind() == Cell.Kind.WORKING && javaDoubtful
                    || !above.equals(workedAbove(id)));
            boolean doubt = stale || w == null && !workedOrder.isEmpty();
            if (doubt) {
                doubtful.addAll(fresh.names());
                javaDoubtful |= cell.kind() == Cell.Kind.WORKING;
            }
            if (cell.kind() != Cell.Kind.NOTE) {
                above.add(id);
            }
            result.add(doubt ? fresh.asStale() : fresh);
        }
        result.replaceAll(step -> step.quotes().stream().anyMatch(doubtful::contains) ? step.asStale() : step);
        return List.copyOf(result);
    }

    /** Names that steps gave which are no longer on the sheet. */
    private Set<String> namesGone() {
        Set<String> gone = new HashSet<>();
        worked.forEach((id, w) -> {
            if (!page.ids.contains(id)) {
                gone.addAll(new Step(id, 0, w.cell, w.cell, w.outcome, true).names());
            }
        });
        return gone;
    }

    /** The steps other than notes that stood above this one in the last run. */
    private List<Long> workedAbove(long id) {
        int at = workedOrder.indexOf(id);
        return at < 0 ? List.of() : workedOrder.subList(0, at).stream().filter(other -> {
            Worked w = worked.get(other);
            return w == null || w.cell.kind() != Cell.Kind.NOTE;
        }).toList();
    }

    // --- the file ---

    /** True when the file holds another text than was opened or saved here last. */
    boolean isChangedOutside(Path target) {
        if (!target.equals(file) || !Files.exists(target)) {
            return false;
        }
        try {
            return !SheetFile.readText(target).equals(savedText);
        } catch (IOException | SheetException unreadable) {
            return true;
        }
    }

    /**
     * Saves the text; the results on the page become its record when all of them are current and the sheet is not
     * signed. Returns what a reader must know, empty when all is plain.
     */
    String save(Path target) throws IOException {
        String remark = record();
        String text = page.sheet.write();
        SheetFile.save(target, text);
        file = target;
        savedText = text;
        refresh();
        return remark;
    }

    private String record() {
        if (!isCurrent() || steps.stream().noneMatch(s -> !stored(s).isEmpty())) {
            return "";
        }
        Sheet recorded = page.sheet;
        for (int i = 0; i < steps.size(); i++) {
            recorded = recorded.withRecords(i, stored(steps.get(i)));
        }
        if (recorded.equals(page.sheet)) {
            return "";
        }
        if (isSigned()) {
            return "the sheet is signed: its record was left as it is. Change the revision to store new results.";
        }
        page = new Page(recorded, page.ids);
        return "";
    }

    private boolean isSigned() {
        String revision = page.sheet.header().get("revision");
        return page.sheet.signatures().stream().anyMatch(s -> s.revision() == null || Objects.equals(s.revision(), revision));
    }

    private static List<Output> stored(Step step) {
        return step.outputs().stream().filter(o -> o instanceof Output.Result || o instanceof Output.Check
                || o instanceof Output.Assessment).toList();
    }
}
