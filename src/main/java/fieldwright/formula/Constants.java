package fieldwright.formula;

import fieldwright.quantity.Amount;
import fieldwright.quantity.Bounds;
import fieldwright.quantity.Units;
import java.util.LinkedHashMap;
import java.util.Map;

/**
 * Constants by name. CODATA recommended values 2022 (Mohr, Newell, Taylor, Tiesinga, "CODATA recommended values of the
 * fundamental physical constants: 2022"): eps0 = 8.8541878188(14)e-12 F/m; c_0 and q_e are exact by definition of the SI.
 * The uncertainty of eps0, 1.6e-10 relative, is a property of nature, not of the arithmetic, and is not a numerical error.
 */
public final class Constants {
    public static final double EPS0 = 8.8541878188e-12;
    private static final Map<String, Amount> VALUES = values();

    private Constants() {
    }

    public static boolean is(String name) {
        return VALUES.containsKey(name);
    }

    /** The constant, or null. */
    public static Amount value(String name) {
        return VALUES.get(name);
    }

    public static java.util.Set<String> names() {
        return VALUES.keySet();
    }

    private static Map<String, Amount> values() {
        Map<String, Amount> v = new LinkedHashMap<>();
        v.put("pi", Amount.si(Math.PI, Math.ulp(Math.PI) / 2, Units.NONE));
        v.put("eps0", rounded(EPS0, "F/m"));
        v.put("c_0", Amount.si(299792458, 0, Units.parse("m/s").dimension()));
        v.put("q_e", rounded(1.602176634e-19, "C"));
        return java.util.Collections.unmodifiableMap(v);
    }

    /** The decimal is not a double: half a unit in the last place is its error. */
    private static Amount rounded(double value, String unit) {
        return Amount.si(value, Bounds.sum(Math.ulp(value) / 2), Units.parse(unit).dimension());
    }
}
