package fieldwright.cli;

import fieldwright.output.RunOutcome;

/** Works a sheet from top to bottom. */
interface Engine {
    RunOutcome work(String sheetText) throws Exception;
}
