package fieldwright.formula;

import fieldwright.quantity.Units;
import java.util.LinkedHashMap;
import java.util.Map;
import java.util.Set;
import javax.measure.Dimension;

/** The coordinates of ISO 80000-2: Cartesian x y z, cylindrical rho phi z, spherical r theta phi. */
public final class Coordinates {
    /** Name to dimension, in the order x y z rho phi r theta. */
    public static final Map<String, Dimension> DIMENSIONS = dimensions();
    public static final Set<String> NAMES = DIMENSIONS.keySet();

    private Coordinates() {
    }

    public static boolean is(String name) {
        return DIMENSIONS.containsKey(name);
    }

    private static Map<String, Dimension> dimensions() {
        Map<String, Dimension> d = new LinkedHashMap<>();
        for (String length : new String[] {"x", "y", "z", "rho"}) {
            d.put(length, Units.LENGTH);
        }
        d.put("phi", Units.NONE);
        d.put("r", Units.LENGTH);
        d.put("theta", Units.NONE);
        return java.util.Collections.unmodifiableMap(d);
    }
}
