package fieldwright.cli;

/** The app: opens a window for each file, or one with a new sheet, and returns when the last is closed. */
interface Window {
    void open(String... files);
}
