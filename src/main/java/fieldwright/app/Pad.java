package fieldwright.app;

import fieldwright.output.Output;
import fieldwright.sheet.Cell;
import fieldwright.sheet.InputEntry;
import fieldwright.sheet.SheetException;
import fieldwright.sheet.Trust;
import java.io.IOException;
import java.nio.file.Path;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.concurrent.Executor;
import java.util.function.Supplier;
import javafx.animation.Animation;
import javafx.animation.PauseTransition;
import javafx.application.Platform;
import javafx.geometry.Bounds;
import javafx.scene.Node;
import javafx.scene.Parent;
import javafx.scene.control.ScrollPane;
import javafx.scene.layout.BorderPane;
import javafx.scene.layout.StackPane;
import javafx.scene.layout.VBox;
import javafx.util.Duration;

/**
 * The calculation pad of one sheet: bar, page and ledgers, and all a reader can do with them. The window around it is
 * {@link PadWindow}.
 */
final class Pad extends BorderPane {
    /** How long a run may take before steps show that they wait for it; a quick one then does not flicker. */
    private static final Duration PATIENCE = Duration.millis(250);

    private final Zoom zoom = new Zoom();
    private final Questions questions;
    private final Trust trust;
    private final Supplier<Calculator> start;
    private final Executor home;
    private final Bar bar = new Bar(this);
    private final TitleBlock title = new TitleBlock(zoom, (name, value) -> desk().setHeader(name, value));
    private final PageView page = new PageView(zoom, title, new Actions());
    private final InputsLedger inputs = new InputsLedger(zoom, this::setInput);
    private final ChecksLedger checks = new ChecksLedger(this::goTo);
    private final ScrollPane scroll = new ScrollPane();
    private final PauseTransition patience = new PauseTransition(PATIENCE);
    private SheetDesk desk;
    private Workbench bench;
    private boolean madeHere;
    private boolean folded;
    private boolean waiting;
    private Runnable titleChanged = () -> { };

    /**
     * @param trust which texts may run without asking
     * @param start starts a calculation process, off the window's thread
     * @param home  leads back to the window's thread
     */
    Pad(SheetDesk desk, Questions questions, Trust trust, Supplier<Calculator> start, Executor home) {
        this.questions = questions;
        this.trust = trust;
        this.start = start;
        this.home = home;
        getStyleClass().add("pad");
        getStylesheets().addAll(Pad.class.getResource("pad.css").toExternalForm(), Fonts.styleSheet());
        zoom.factorProperty().addListener((o, was, is) -> applyZoom());
        patience.setOnFinished(e -> {
            waiting = true;
            show();
        });
        buildDesk();
        applyZoom();
        setDesk(desk);
    }

    private void buildDesk() {
        VBox side = new VBox(inputs, checks);
        side.getStyleClass().add("side");
        ScrollPane sideScroll = new ScrollPane(side);
        sideScroll.setFitToWidth(true);
        sideScroll.setHbarPolicy(ScrollPane.ScrollBarPolicy.NEVER);
        sideScroll.getStyleClass().add("side-scroll");
        sideScroll.setFocusTraversable(false);
        StackPane sheet = new StackPane(page);
        sheet.getStyleClass().add("sheet");
        scroll.setContent(sheet);
        scroll.setFitToWidth(true);
        scroll.setHbarPolicy(ScrollPane.ScrollBarPolicy.NEVER);
        scroll.setFocusTraversable(false);
        scroll.getStyleClass().add("page-scroll");
        setTop(bar);
        setCenter(new DeskPane(zoom, scroll, sideScroll));
    }

    private void applyZoom() {
        setStyle(String.format(Locale.ROOT, "-fx-font-size: %.2fpx; -fx-font-family: \"%s\";", Zoom.LETTER * zoom.factor(), Fonts.text()));
        measureAnew(this);
    }

    /** Sizes that come from the zoom and not from a font are remembered by the toolkit until they are asked to change. */
    private static void measureAnew(Parent parent) {
        parent.requestLayout();
        for (Node child : parent.getChildrenUnmodifiable()) {
            if (child instanceof Parent inner) {
                measureAnew(inner);
            }
        }
    }

    private void setDesk(SheetDesk now) {
        if (bench != null) {
            bench.close();
        }
        desk = now;
        madeHere = desk.file() == null || trust.isTrusted(desk.sheet().write());
        bench = new Workbench(desk, start, this::consent, home, this::benchChanged);
        desk.listen(this::show);
        page.setAtHand(-1);
        waiting = false;
        show();
        scroll.setVvalue(0);
    }

    SheetDesk desk() {
        return desk;
    }

    Workbench bench() {
        return bench;
    }

    PageView page() {
        return page;
    }

    InputsLedger inputs() {
        return inputs;
    }

    ChecksLedger checks() {
        return checks;
    }

    TitleBlock title() {
        return title;
    }

    Bar bar() {
        return bar;
    }

    Zoom zoom() {
        return zoom;
    }

    void onTitleChanged(Runnable listener) {
        titleChanged = listener;
    }

    // --- showing ---

    private void benchChanged() {
        if (bench.isBusy()) {
            if (!waiting && patience.getStatus() != Animation.Status.RUNNING) {
                patience.playFromStart();
            }
        } else {
            patience.stop();
            waiting = false;
        }
        show();
    }

    private void show() {
        title.show(desk.sheet().header());
        page.show(shown(), desk.sheetProblems(), folded, waiting ? bench.reached() : 0, bench.isBusy());
        inputs.show(desk.steps());
        checks.show(desk.steps());
        bar.show();
        titleChanged.run();
    }

    /** While a quick run is under way the steps it will change are not yet marked stale; they would only flicker. */
    private List<Step> shown() {
        if (!bench.isBusy() || waiting) {
            return desk.steps();
        }
        return desk.steps().stream().map(s -> s.stale() && s.outcome() != null && !s.isEdited()
                ? new Step(s.id(), s.number(), s.cell(), s.worked(), s.outcome(), false) : s).toList();
    }

    boolean isFolded() {
        return folded;
    }

    void setFolded(boolean fold) {
        leaveEditor();
        folded = fold;
        show();
    }

    String name() {
        return desk.file() == null ? "new sheet" : desk.file().getFileName().toString();
    }

    /** What the bar says at its right end. */
    String status() {
        if (bench.isBusy()) {
            return bench.isStopping() ? "stopping …"
                    : bench.reached() > 0 ? "working out step " + bench.reached() + " of " + desk.steps().size() + " …" : "working out …";
        }
        long problems = desk.sheetProblems().size() + desk.steps().stream().filter(s -> s.outcome() != null
                && !s.all(Output.Problem.class).isEmpty()).count();
        long stale = desk.steps().stream().filter(Step::stale).count();
        String state = problems > 0 ? (problems == 1 ? "1 step has an error" : problems + " steps have errors")
                : !desk.wasWorked() ? (desk.steps().stream().anyMatch(Step::isRecorded) ? "results on record, nothing worked out here"
                        : "nothing worked out yet")
                : stale > 0 ? (stale == 1 ? "1 step is stale" : stale + " steps are stale")
                : desk.isCurrent() ? "all steps agree with a clean run" : "not all steps were worked out";
        return desk.isUnsaved() ? "unsaved · " + state : state;
    }

    // --- working ---

    /** A text that was made here or trusted before runs; another one runs when its reader says so, asked once. */
    private boolean consent() {
        if (!madeHere && questions.mayRun(name())) {
            madeHere = true;
            remember();
        }
        return madeHere;
    }

    private void remember() {
        try {
            trust.remember(desk.sheet().write());
        } catch (IOException e) {
            questions.tell("the answer was not kept", e.getMessage() + "\nYou will be asked again.");
        }
    }

    void workOut() {
        leaveEditor();
        bench.workOut();
    }

    void stop() {
        bench.stop();
    }

    private void setInput(long stepId, InputEntry entry, String typed) {
        leaveEditor();
        Step step = desk.step(stepId);
        desk.editStep(stepId, InputValue.replaced(step.cell(), entry, typed));
        bench.workOut();
    }

    // --- editing ---

    private final class Actions implements StepActions, CellEditor.Host {
        @Override
        public void takeUp(long id) {
            StepView edited = page.edited();
            if (edited != null && edited.id() != id) {
                leaveEditor();
            }
            page.setAtHand(id);
            bar.show();
        }

        @Override
        public void edit(long id, int caret) {
            openEditor(id, caret);
        }

        @Override
        public void leave() {
            StepView edited = page.edited();
            leaveEditor();
            if (edited != null) {
                edited.requestFocus();
            }
        }

        @Override
        public void workOut() {
            leave();
            bench.workOut();
        }

        @Override
        public void caretAt(Bounds place) {
            Bounds at = scroll.getContent().screenToLocal(place);
            if (at != null) {
                reveal(at);
            }
        }

        @Override
        public void add(int at, Cell.Kind kind) {
            addStep(Math.min(at, desk.steps().size()), kind);
        }

        @Override
        public void move(long id, int by) {
            desk.moveStep(id, by);
            reveal(id);
            bench.edited();
        }

        @Override
        public void remove(long id) {
            removeStep(id);
        }
    }

    private void openEditor(long id, int caret) {
        StepView edited = page.edited();
        if (edited != null && edited.id() != id) {
            leaveEditor();
        }
        page.setAtHand(id);
        StepView view = page.view(id);
        if (folded && view.step().cell().kind() == Cell.Kind.WORKING) {
            folded = false;
            show();
        }
        view.edit(caret, new Actions());
        bar.show();
    }

    /** Takes over what is being edited, closes the editor, and works the sheet out again if its text changed. */
    void leaveEditor() {
        StepView edited = page.edited();
        if (edited == null) {
            return;
        }
        String text = edited.endEdit();
        String label = edited.endLabel();
        edited.showText();
        Step step = desk.step(edited.id());
        boolean changed = !step.cell().source().equals(Cell.of(step.cell().kind(), "", text).source());
        desk.editStep(edited.id(), text);
        desk.labelStep(edited.id(), label);
        if (changed) {
            bench.edited();
        }
        bar.show();
    }

    /** Called when the keys go to another part of the pad. */
    void focusMoved(Node owner) {
        StepView edited = page.edited();
        if (edited != null && owner != null && !isWithin(owner, edited)) {
            leaveEditor();
        }
        if (owner != null && isWithin(owner, page)) {
            reveal(owner);
        }
    }

    private static boolean isWithin(Node node, Node parent) {
        for (Node n = node; n != null; n = n.getParent()) {
            if (n == parent) {
                return true;
            }
        }
        return false;
    }

    /** Puts a new step below the one at hand, or last. */
    void addBelow(Cell.Kind kind) {
        Step atHand = desk.step(page.atHand());
        addStep(atHand == null ? desk.steps().size() : atHand.number(), kind);
    }

    private void addStep(int at, Cell.Kind kind) {
        leaveEditor();
        long id = desk.insertStep(at, kind);
        openEditor(id, 0);
        reveal(id);
    }

    void removeStep(long id) {
        leaveEditor();
        int number = desk.step(id).number();
        desk.removeStep(id);
        List<Step> steps = desk.steps();
        if (!steps.isEmpty()) {
            page.view(steps.get(Math.min(number, steps.size()) - 1).id()).requestFocus();
        }
        bench.edited();
    }

    void removeAtHand() {
        if (desk.step(page.atHand()) != null) {
            removeStep(page.atHand());
        }
    }

    void moveAtHand(int by) {
        leaveEditor();
        if (desk.step(page.atHand()) != null) {
            new Actions().move(page.atHand(), by);
        }
    }

    /** Takes up the step above (−1) or below (+1) the one at hand. */
    void step(int by) {
        Step now = desk.step(page.atHand());
        int next = now == null ? (by > 0 ? 0 : desk.steps().size() - 1) : now.number() - 1 + by;
        if (next >= 0 && next < desk.steps().size()) {
            goTo(desk.steps().get(next).id());
        }
    }

    /** Takes the keys to the first input of the ledger. */
    void toInputs() {
        leaveEditor();
        inputs.takeKeys();
    }

    void showKeys() {
        questions.tell("Keys", Keys.TEXT);
    }

    void undo() {
        leaveEditor();
        desk.undo();
        bench.edited();
    }

    void redo() {
        leaveEditor();
        desk.redo();
        bench.edited();
    }

    // --- moving about ---

    private void goTo(long id) {
        StepView view = page.view(id);
        if (view != null) {
            view.requestFocus();
            reveal(id);
        }
    }

    private void reveal(long id) {
        Platform.runLater(() -> {
            StepView view = page.view(id);
            if (view != null && view.getScene() != null) {
                reveal(view);
            }
        });
    }

    private void reveal(Node node) {
        scroll.layout();
        reveal(scroll.getContent().sceneToLocal(node.localToScene(node.getBoundsInLocal())));
    }

    /** Scrolls just so far that a place on the page is seen; one that is higher than the window is left if any of it is. */
    private void reveal(Bounds at) {
        double view = scroll.getViewportBounds().getHeight();
        double room = scroll.getContent().getBoundsInLocal().getHeight() - view;
        double top = scroll.getVvalue() * room;
        double margin = zoom.em(1);
        boolean tall = at.getHeight() + 2 * margin > view;
        boolean seen = at.getMaxY() > top && at.getMinY() < top + view;
        if (room <= 0 || tall && seen) {
            return;
        }
        if (at.getMinY() - margin < top || tall) {
            scroll.setVvalue(Math.max(0, Math.min(1, (at.getMinY() - margin) / room)));
        } else if (at.getMaxY() + margin > top + view) {
            scroll.setVvalue(Math.max(0, Math.min(1, (at.getMaxY() + margin - view) / room)));
        }
    }

    // --- files ---

    void newSheet() {
        if (mayLeaveSheet()) {
            setDesk(SheetDesk.blank());
        }
    }

    void open() {
        leaveEditor();
        questions.fileToOpen(desk.file()).ifPresent(this::open);
    }

    void open(Path file) {
        if (!mayLeaveSheet()) {
            return;
        }
        try {
            setDesk(SheetDesk.open(file));
        } catch (SheetException e) {
            questions.tell(file.getFileName() + " cannot be opened", (e.line() > 0 ? "line " + e.line() + ": " : "") + e.getMessage());
        } catch (IOException e) {
            questions.tell(file.getFileName() + " cannot be read", e.getMessage());
        }
    }

    boolean save() {
        leaveEditor();
        return desk.file() == null ? saveAs() : saveTo(desk.file());
    }

    boolean saveAs() {
        leaveEditor();
        Optional<Path> file = questions.fileToSave(desk.file(), suggestedName());
        return file.isPresent() && saveTo(file.get());
    }

    private String suggestedName() {
        String number = desk.sheet().header().get("number");
        String title = number.isEmpty() ? desk.sheet().header().get("title") : number;
        String plain = title.toLowerCase(Locale.ROOT).replaceAll("[^\\p{L}\\p{N}]+", "-").replaceAll("^-|-$", "");
        return (plain.isEmpty() ? "sheet" : plain) + ".fws";
    }

    private boolean saveTo(Path file) {
        if (desk.isChangedOutside(file) && !questions.mayReplace(name())) {
            return false;
        }
        try {
            String remark = desk.save(file);
            if (madeHere) {
                remember();
            }
            if (!remark.isEmpty()) {
                questions.tell("saved", remark);
            }
            return true;
        } catch (IOException e) {
            questions.tell("not saved", file.getFileName() + ": " + e.getMessage() + "\nThe old file is unchanged; the text is still here.");
            return false;
        }
    }

    /** Asks what to do with unsaved text; false when the reader stays. */
    boolean mayLeaveSheet() {
        leaveEditor();
        if (!desk.isUnsaved()) {
            return true;
        }
        return switch (questions.unsaved(name())) {
            case SAVE -> save();
            case DISCARD -> true;
            case STAY -> false;
        };
    }

    /** Ends the calculation; the pad is not used afterwards. */
    void close() {
        patience.stop();
        bench.close();
        StepView edited = page.edited();
        if (edited != null) {
            edited.dispose();
        }
    }
}
