package fieldwright.session;

import fieldwright.formula.FormulaException;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.StoppedException;

/** Puts what was thrown while a cell was worked into words, and tells whose fault it is. */
final class Mishap {
    private Mishap() { }

    static boolean isStop(Throwable thrown) {
        for (Throwable cause = thrown; cause != null; cause = cause.getCause()) {
            if (cause instanceof StoppedException || cause instanceof InterruptedException) {
                return true;
            }
        }
        return false;
    }

    /** Thing, value, remedy; without the place. */
    static String describe(Throwable thrown) {
        if (thrown instanceof FormulaException wrong) {
            return wrong.getMessage() + place(wrong);
        }
        if (thrown instanceof AuthorException) {
            return thrown.getMessage();
        }
        if (thrown instanceof ExceptionInInitializerError && thrown.getCause() != null) {
            return describe(thrown.getCause());
        }
        if (thrown instanceof StackOverflowError) {
            return "calls within calls without end (stack overflow). Look for a method that calls itself.";
        }
        if (thrown instanceof OutOfMemoryError) {
            return "out of memory. Keep less at once.";
        }
        String what = thrown.getClass().getSimpleName() + (thrown.getMessage() == null ? "" : ": " + readable(thrown.getMessage()));
        String ours = ourPlace(thrown);
        return ours == null ? what : "internal: " + what + " (" + ours
                + "). This is an error of the program, not of the sheet. Please report it with the sheet.";
    }

    /** The formula and what stands in it where it is wrong, unless the message tells. */
    private static String place(FormulaException wrong) {
        String text = wrong.text().strip();
        if (text.isEmpty() || wrong.getMessage().contains(text)) {
            return "";
        }
        boolean within = wrong.position() > 0 && wrong.position() < wrong.text().length();
        return " In '" + shortened(text) + "'" + (within ? ", at '" + shortened(wrong.text().substring(wrong.position())) + "'." : ".");
    }

    private static String shortened(String text) {
        return text.length() <= 60 ? text : text.substring(0, text.offsetByCodePoints(0, text.codePointCount(0, 57))) + "…";
    }

    private static String readable(String message) {
        return message.replaceAll("(?:REPL\\.)?\\$JShell\\$\\d+[A-Z]*[.$]?", "").replaceAll("\\s*\\n\\s*", "; ");
    }

    /**
     * Where in our own code it was thrown; null when the author's code threw it, itself or through a Java class it
     * called. The topmost frame that is not Java's own decides.
     */
    private static String ourPlace(Throwable thrown) {
        for (StackTraceElement frame : thrown.getStackTrace()) {
            String name = frame.getClassName();
            if (name.startsWith("REPL.")) {
                return null;
            }
            if (!name.startsWith("java.") && !name.startsWith("javax.") && !name.startsWith("jdk.") && !name.startsWith("sun.")) {
                return name + ", line " + frame.getLineNumber();
            }
        }
        return "no place known";
    }
}
