package fieldwright.field;

import fieldwright.quantity.AuthorException;
import java.util.Locale;

/** What may answer: closed forms where there are any and panels elsewhere, panels alone, or closed forms alone. */
public enum ClosedForms {
    AUTO, OFF, ONLY;

    /** Errors: AuthorException for any other text than {@code auto}, {@code off} and {@code only}. */
    public static ClosedForms named(String text) {
        for (ClosedForms c : values()) {
            if (c.name().equalsIgnoreCase(text.strip())) {
                return c;
            }
        }
        throw new AuthorException("closedForms(\"" + text + "\"): write \"auto\" (closed forms where there are any), \"off\" (panels alone) or "
            + "\"only\" (closed forms alone).");
    }

    @Override
    public String toString() {
        return name().toLowerCase(Locale.ROOT);
    }
}
