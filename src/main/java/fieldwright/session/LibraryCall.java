package fieldwright.session;

import fieldwright.quantity.Amount;
import fieldwright.words.Words;
import java.util.StringJoiner;

/** What Java code of a working cell calls when it uses a formula of a library sheet. */
public final class LibraryCall {
    private LibraryCall() { }

    /**
     * @param name      with the library's before it
     * @param arguments formulas in quotes, amounts or numbers, in the order of the definition
     */
    public static Amount of(String name, Object... arguments) {
        StringJoiner places = new StringJoiner(", ", "(", ")");
        Object[] locals = new Object[2 * arguments.length];
        for (int i = 0; i < arguments.length; i++) {
            String local = "argument_" + (i + 1);
            places.add(local);
            locals[2 * i] = local;
            locals[2 * i + 1] = arguments[i];
        }
        return Words.calc(arguments.length == 0 ? name : name + places, locals);
    }
}
