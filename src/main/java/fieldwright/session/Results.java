package fieldwright.session;

import fieldwright.formula.Formula;
import fieldwright.formula.Latex;
import fieldwright.output.Output;
import fieldwright.words.Outputs;

/** Values of names as outputs. */
final class Results {
    private Results() { }

    /** The name typeset. */
    static String latex(String name) {
        return Latex.name(name);
    }

    /** What a cell shows of a name that holds an amount, a vector or a formula. */
    static Output output(String name, Object value) {
        if (value instanceof Formula formula) {
            return new Output.Typeset(name, latex(name) + "=" + formula.latex(), name + " = " + formula.text(), "", "");
        }
        return new Output.Result(name, latex(name), Outputs.value(value));
    }
}
