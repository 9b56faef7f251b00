package fieldwright.quantity;

import java.util.Collection;
import java.util.Locale;

/** A name that nothing on the sheet defines. The message offers the closest defined name when one is close. */
public final class UnknownNameException extends AuthorException {
    private static final long serialVersionUID = 1L;
    private final String name;
    private final String nearest;
    private final int position;

    public UnknownNameException(String name, Collection<String> defined) {
        this(name, defined, -1, "");
    }

    /**
     * @param position 0-based offset in the formula text, or -1 when there is none
     * @param hint a further sentence for the message, or ""
     */
    public UnknownNameException(String name, Collection<String> defined, int position, String hint) {
        this(name, nearest(name, defined), position, hint);
    }

    private UnknownNameException(String name, String nearest, int position, String hint) {
        super("no quantity '" + name + "'."
            + (nearest == null ? "" : " Closest defined name: '" + nearest + "'.")
            + (hint.isEmpty() ? "" : " " + hint)
            + (nearest == null && hint.isEmpty() ? " Define it above this line." : ""));
        this.name = name;
        this.nearest = nearest;
        this.position = position;
    }

    public String name() {
        return name;
    }

    /** The closest defined name, or null when none is close. */
    public String nearest() {
        return nearest;
    }

    /** 0-based offset in the formula text, or -1. */
    public int position() {
        return position;
    }

    /** The name within an edit distance of about a third of its length, case only for one or two letters, upper and lower case counting half; or null. */
    public static String nearest(String name, Collection<String> defined) {
        String best = null;
        double bestDistance = Math.max(0.5, name.length() / 3.0) + 0.25;
        for (String candidate : defined) {
            double distance = distance(name, candidate);
            if (distance >= name.length()) {
                continue;   // nothing in common
            }
            if (distance < bestDistance || (distance == bestDistance && best != null && candidate.compareTo(best) < 0)) {
                best = candidate;
                bestDistance = distance;
            }
        }
        return best;
    }

    /** Edit distance in which two neighbours changing places cost one, and a change of case only one half. */
    private static double distance(String a, String b) {
        double[][] d = new double[a.length() + 1][b.length() + 1];
        for (int i = 0; i <= a.length(); i++) {
            for (int j = 0; j <= b.length(); j++) {
                if (i == 0 || j == 0) {
                    d[i][j] = i + j;
                    continue;
                }
                d[i][j] = Math.min(d[i - 1][j - 1] + cost(a.substring(i - 1, i), b.substring(j - 1, j)),
                    Math.min(d[i - 1][j], d[i][j - 1]) + 1);
                boolean swapped = i > 1 && j > 1 && a.charAt(i - 1) == b.charAt(j - 2) && a.charAt(i - 2) == b.charAt(j - 1);
                if (swapped) {
                    d[i][j] = Math.min(d[i][j], d[i - 2][j - 2] + 1);
                }
            }
        }
        return d[a.length()][b.length()];
    }

    private static double cost(String a, String b) {
        if (a.equals(b)) {
            return 0;
        }
        return a.toLowerCase(Locale.ROOT).equals(b.toLowerCase(Locale.ROOT)) ? 0.5 : 1;
    }
}
