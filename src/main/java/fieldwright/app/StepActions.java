package fieldwright.app;

import fieldwright.sheet.Cell;

/** What a reader can do with a step; the page asks, the pad does it. */
interface StepActions {
    /** Makes it the step at hand. */
    void takeUp(long id);

    /** Opens its text, the caret before this letter. */
    void edit(long id, int caret);

    /** Takes over what was edited and closes the editor. */
    void leave();

    /** The same, and works the sheet out. */
    void workOut();

    void add(int at, Cell.Kind kind);

    void move(long id, int by);

    void remove(long id);
}
