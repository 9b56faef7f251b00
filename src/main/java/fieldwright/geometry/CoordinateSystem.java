package fieldwright.geometry;

import java.util.List;

/** Right-handed coordinate systems, names as in ISO 80000-2; theta is measured from the polar axis. */
public enum CoordinateSystem {
    CARTESIAN("x", "y", "z"), CYLINDRICAL("rho", "phi", "z"), SPHERICAL("r", "theta", "phi");

    private final List<String> names;

    CoordinateSystem(String... names) {
        this.names = List.of(names);
    }

    public List<String> names() {
        return names;
    }

    public String title() {
        return name().toLowerCase(java.util.Locale.ROOT);
    }
}
