package fieldwright.geometry;

import java.util.List;

import fieldwright.formula.Formula;
import fieldwright.quantity.AuthorException;

/**
 * The unit box mapped onto one region, in the region's own frame: depth 0 is the outermost integral.
 * Each coordinate runs through its limits; where an inner limit has a square-root end the outer one runs so that the
 * root disappears (u², 2u − u², u²(3 − 2u)); endless limits are mapped algebraically.
 * Immutable; {@link Nodes} is the scratch space. Positions in m, measure in m^dimension.
 */
public final class Chart {
    /** How a coordinate runs between its limits. */
    private enum Run {
        PLAIN, ROOT_LOW, ROOT_HIGH, ROOT_BOTH, UP, DOWN, BOTH;

        boolean endless() {
            return compareTo(UP) >= 0;
        }

        boolean low() {
            return this == ROOT_LOW || this == ROOT_BOTH;
        }

        boolean high() {
            return this == ROOT_HIGH || this == ROOT_BOTH;
        }

        double psi(double u) {
            return switch (this) {
                case ROOT_LOW -> u * u;
                case ROOT_HIGH -> u * (2 - u);
                case ROOT_BOTH -> u * u * (3 - 2 * u);
                case UP -> u / (1 - u);
                case DOWN -> -(1 - u) / u;
                case BOTH -> (2 * u - 1) / (4 * u * (1 - u));
                default -> u;
            };
        }

        /** 1 − psi, without cancellation; for finite runs. */
        double rest(double u) {
            return restOf(1 - u);
        }

        /** 1 − psi from v = 1 − u. */
        double restOf(double v) {
            return switch (this) {
                case ROOT_LOW -> v * (2 - v);
                case ROOT_HIGH -> v * v;
                case ROOT_BOTH -> v * v * (3 - 2 * v);
                default -> v;
            };
        }

        double slope(double u) {
            return slope(u, 1 - u);
        }

        double slope(double u, double v) {
            return switch (this) {
                case ROOT_LOW -> 2 * u;
                case ROOT_HIGH -> 2 * v;
                case ROOT_BOTH -> 6 * u * v;
                case UP -> 1 / (v * v);
                case DOWN -> 1 / (u * u);
                case BOTH -> (u * u + v * v) / (4 * u * u * v * v);
                default -> 1;
            };
        }

        /** psi(u0 + du) − psi(u0). */
        double difference(double u0, double du) {
            return switch (this) {
                case ROOT_LOW -> du * (2 * u0 + du);
                case ROOT_HIGH -> du * (2 * (1 - u0) - du);
                case ROOT_BOTH -> du * (6 * u0 * (1 - u0) + du * (3 - 6 * u0 - 2 * du));
                case UP -> du / ((1 - u0 - du) * (1 - u0));
                case DOWN -> du / ((u0 + du) * u0);
                case BOTH -> {
                    double t0 = 2 * u0 - 1;
                    double t = t0 + 2 * du;
                    yield 2 * du * (1 + t * t0) / ((1 - t * t) * (1 - t0 * t0));
                }
                default -> du;
            };
        }

        double inverse(double psi) {
            double p = Math.min(1, Math.max(0, psi));
            return switch (this) {
                case ROOT_LOW -> Math.sqrt(p);
                case ROOT_HIGH -> 1 - Math.sqrt(1 - p);
                case ROOT_BOTH -> 0.5 - Math.sin(Math.asin(1 - 2 * p) / 3);
                case UP -> Math.max(0, psi) / (1 + Math.max(0, psi));
                case DOWN -> 1 / (1 + Math.max(0, -psi));
                case BOTH -> psi == 0 ? 0.5 : 0.5 + (Math.sqrt(1 + 4 * psi * psi) - 1) / (4 * psi);
                default -> p;
            };
        }
    }

    /** A base point in the unit box; offsets of nodes are taken from its position. */
    public record Anchor(double[] u, double[] coordinates, double[] position, double[] slots) { }

    private final Nest nest;
    private final Embedding embedding;
    private final CoordinateSystem system;
    private final int dimension;
    private final int names;
    private final int[] free;
    private final Scalar[] from;
    private final Scalar[] to;
    private final Scalar[][] dFrom;
    private final Scalar[][] dTo;
    private final Scalar[] fixed;
    private final Scalar[][] dFixed;
    private final Run[] run;
    private final double[] centre;
    private final double[] scale;
    /** The limits without cancellation; null when they are all numbers, or of another kind. */
    private Algebraic algebraic;

    private Chart(Nest nest, Embedding embedding, CoordinateSystem system) {
        this.nest = nest;
        this.embedding = embedding;
        this.system = system;
        dimension = nest.order().size();
        names = nest.names().size();
        free = new int[dimension];
        from = new Scalar[dimension];
        to = new Scalar[dimension];
        dFrom = new Scalar[dimension][dimension];
        dTo = new Scalar[dimension][dimension];
        fixed = new Scalar[names];
        dFixed = new Scalar[names][dimension];
        run = new Run[dimension];
        centre = new double[dimension];
        scale = new double[dimension];
        List<String> order = nest.order();
        for (int k = 0; k < dimension; k++) {
            String name = order.get(k);
            free[k] = nest.names().indexOf(name);
            from[k] = Scalar.of(nest.from(name), nest.names());
            to[k] = Scalar.of(nest.to(name), nest.names());
            for (int j = 0; j < k; j++) {
                dFrom[k][j] = slope(nest.from(name), order.get(j));
                dTo[k][j] = slope(nest.to(name), order.get(j));
            }
        }
        for (int m = 0; m < names; m++) {
            Formula f = nest.fixed(nest.names().get(m));
            if (f != null) {
                fixed[m] = Scalar.of(f, nest.names());
                for (int j = 0; j < dimension; j++) {
                    dFixed[m][j] = slope(f, order.get(j));
                }
            }
        }
    }

    private Chart(Chart like, double[] centre, double[] scale) {
        nest = like.nest;
        embedding = like.embedding;
        system = like.system;
        dimension = like.dimension;
        names = like.names;
        free = like.free;
        from = like.from;
        to = like.to;
        dFrom = like.dFrom;
        dTo = like.dTo;
        fixed = like.fixed;
        dFixed = like.dFixed;
        run = like.run.clone();
        algebraic = like.algebraic;
        this.centre = centre;
        this.scale = scale;
    }

    private Scalar slope(Formula f, String name) {
        return f.variables().contains(name) ? Scalar.of(f.derivative(name), nest.names()) : Scalar.ZERO;
    }

    static Chart of(Nest nest, Embedding embedding, CoordinateSystem system) {
        Chart chart = new Chart(nest, embedding, system);
        chart.checkConstants();
        chart.chooseRuns();
        chart.checkOrder();
        chart.chooseAlgebra();
        return chart;
    }

    private void chooseAlgebra() {
        if (hasOnlyNumbers()) {
            return;
        }
        algebraic = Algebraic.of(nest, new Algebraic.Ends() {
            @Override
            public double[] coordinatesAt(double[] psi) {
                double[] limits = Chart.this.limitsAt(psi);
                double[] c = new double[names];
                for (int k = 0; k < dimension; k++) {
                    c[free[k]] = run[k].endless() ? centre[k] + scale[k] * (psi[k] - 0.5) : limits[2 * k] + (limits[2 * k + 1] - limits[2 * k]) * psi[k];
                }
                return c;
            }

            @Override
            public double[] limitsAt(double[] psi) {
                return Chart.this.limitsAt(psi);
            }

            @Override
            public boolean isEndless(int depth) {
                return run[depth].endless();
            }
        });
    }

    public int dimension() {
        return dimension;
    }

    /** Names of the coordinates, in the order of {@link Nodes#c}. */
    public List<String> coordinates() {
        return nest.names();
    }

    /** Dimension of a coordinate or parameter; a parameter has that of its limits. */
    public javax.measure.Dimension coordinateDimension(String name) {
        return nest.dimensions().get(name);
    }

    /** The coordinate system, or null for a parametric region. */
    public CoordinateSystem system() {
        return system;
    }

    /** Coordinate index (into {@link #coordinates}) of a depth. */
    public int coordinateOf(int depth) {
        return free[depth];
    }

    public boolean isEndless() {
        for (Run r : run) {
            if (r.endless()) {
                return true;
            }
        }
        return false;
    }

    public boolean isEndless(int depth) {
        return run[depth].endless();
    }

    /** True when the limits of this depth are numbers. */
    public boolean hasConstantLimits(int depth) {
        return from[depth].isConstant() && to[depth].isConstant();
    }

    /** Whether a surface lies in a plane because of the coordinate that is held. */
    public boolean isFlat() {
        if (dimension != 2 || system == null) {
            return false;
        }
        for (int m = 0; m < names; m++) {
            if (fixed[m] != null) {
                return fixed[m].isConstant() && isPlane(m);
            }
        }
        return false;
    }

    /** Both ends of a full turn are the same line or surface, seen from its two sides. */
    public boolean isFullTurn(int depth) {
        return system != null && hasConstantLimits(depth) && coordinates().get(free[depth]).equals("phi")
            && Math.abs(upper(depth) - lower(depth) - 2 * Math.PI) < 1e-14;
    }

    /** Whether one end of a volume's coordinate is a plane. */
    public boolean isFlatFace(int depth, boolean upper) {
        return dimension == 3 && system != null && (upper ? to[depth] : from[depth]).isConstant() && isPlane(free[depth]);
    }

    /** Whether a coordinate is constant on planes. */
    private boolean isPlane(int coordinate) {
        String name = nest.names().get(coordinate);
        return system == CoordinateSystem.CARTESIAN || name.equals("z") || name.equals("phi");
    }

    /** True when offsets from an anchor carry no cancellation: all limits and fixed values are numbers, or algebraic. */
    public boolean hasExactOffsets() {
        if (algebraic != null) {
            return embedding.isExact();
        }
        for (int k = 0; k < dimension; k++) {
            if (!hasConstantLimits(k)) {
                return false;
            }
        }
        return embedding.isExact() && !hasFixedFormula();
    }

    /** Where, in [0, 1], this depth takes the value {@code coordinate}; constant limits only. */
    public double parameter(int depth, double coordinate) {
        if (run[depth].endless()) {
            return run[depth].inverse((coordinate - centre[depth]) / scale[depth]);
        }
        double a = from[depth].constant();
        return run[depth].inverse((coordinate - a) / (to[depth].constant() - a));
    }

    /** The coordinate at a parameter in [0, 1]; finite constant limits only. */
    double coordinateAt(int depth, double u) {
        double a = from[depth].constant();
        double b = to[depth].constant();
        double psi = run[depth].psi(u);
        return psi <= 0.5 ? a + (b - a) * psi : b - (b - a) * run[depth].rest(u);
    }

    /**
     * Interior parameters at which a function of the coordinate of this depth alone is to be cut so that it is as good as a polynomial
     * between; null when it is not, or when it is no such function.
     */
    public double[] resolvingCuts(Formula f, int depth) {
        String name = coordinates().get(free[depth]);
        boolean alone = f.variables().size() == 1 && f.variables().contains(name);
        return alone && hasConstantLimits(depth) && !run[depth].endless() && lower(depth) < upper(depth) ? Resolved.cuts(f, this, depth) : null;
    }

    /**
     * This chart with a coordinate that starts at an axis or origin running as the square of its parameter, for functions of its
     * square root; null when it does not start there plainly.
     */
    public Chart squared(int depth) {
        String name = coordinates().get(free[depth]);
        boolean axis = system != null && (name.equals("rho") || name.equals("r"));
        if (!axis || run[depth] != Run.PLAIN || !hasConstantLimits(depth) || lower(depth) != 0) {
            return null;
        }
        Chart chart = new Chart(this, centre, scale);
        chart.run[depth] = Run.ROOT_LOW;
        return chart;
    }

    public double lower(int depth) {
        return from[depth].constant();
    }

    public double upper(int depth) {
        return to[depth].constant();
    }

    // ---- checks and choices made once

    private void checkConstants() {
        for (int k = 0; k < dimension; k++) {
            String name = nest.order().get(k);
            for (Scalar s : new Scalar[] {from[k], to[k]}) {
                if (s.isConstant() && Double.isNaN(s.constant())) {
                    throw new AuthorException(nest.title() + ": a limit of " + name + " is not a number (from "
                        + nest.from(name).text() + " to " + nest.to(name).text() + "). Check the formula.");
                }
            }
            if (from[k].isConstant() && to[k].isConstant() && from[k].constant() > to[k].constant()) {
                throw lowerAboveUpper(name, from[k].constant(), to[k].constant(), "");
            }
            boolean angle = system != null && (name.equals("phi") || name.equals("theta"));
            if (angle && (Double.isInfinite(constantOr(from[k], 0)) || Double.isInfinite(constantOr(to[k], 0)))) {
                throw new AuthorException(nest.title() + ": " + name + " is an angle and cannot be endless. Use 0 to 2*pi for a full turn.");
            }
            if (system != null && (name.equals("rho") || name.equals("r")) && constantOr(from[k], 0) < 0) {
                throw new AuthorException(nest.title() + ": lower limit of " + name + " = " + from[k].constant()
                    + " m: a distance from the axis or origin must be >= 0. Use 0 and give phi the full turn.");
            }
        }
        for (int m = 0; m < names; m++) {
            if (fixed[m] != null && fixed[m].isConstant() && !Double.isFinite(fixed[m].constant())) {
                throw new AuthorException(nest.title() + ": " + nest.names().get(m) + " = " + fixed[m].constant()
                    + " is not a finite number. Hold it at a finite value or give it limits.");
            }
            if (system != null && fixed[m] != null && m == 0 && system != CoordinateSystem.CARTESIAN && constantOr(fixed[m], 0) < 0) {
                throw new AuthorException(nest.title() + ": " + nest.names().get(m) + " = " + fixed[m].constant()
                    + " m: a distance from the axis or origin must be >= 0.");
            }
        }
    }

    private static double constantOr(Scalar s, double other) {
        return s.isConstant() ? s.constant() : other;
    }

    private AuthorException lowerAboveUpper(String name, double low, double high, String where) {
        return new AuthorException(nest.title() + ": lower limit of " + name + " = " + low + " is above the upper = " + high + where
            + " (SI; from " + nest.from(name).text() + " to " + nest.to(name).text() + "). Exchange them or bound the outer coordinate.");
    }

    private void chooseRuns() {
        for (int k = 0; k < dimension; k++) {
            boolean down = constantOr(from[k], 0) == Double.NEGATIVE_INFINITY;
            boolean up = constantOr(to[k], 0) == Double.POSITIVE_INFINITY;
            run[k] = down && up ? Run.BOTH : up ? Run.UP : down ? Run.DOWN : Run.PLAIN;
            scale[k] = 1;
            centre[k] = up && !down ? from[k].isConstant() ? from[k].constant() : 0 : down && !up ? to[k].isConstant() ? to[k].constant() : 0 : 0;
            if (run[k].endless() && !(from[k].isConstant() && to[k].isConstant())) {
                throw new AuthorException(nest.title() + ": " + nest.order().get(k) + " is endless on one side and its other limit depends on "
                    + "another coordinate. Give the other limit as a number, or split the region in two.");
            }
        }
        for (int k = 0; k < dimension; k++) {
            if (!run[k].endless()) {
                boolean low = hasRoot(k, false);
                boolean high = hasRoot(k, true);
                run[k] = low && high ? Run.ROOT_BOTH : low ? Run.ROOT_LOW : high ? Run.ROOT_HIGH : Run.PLAIN;
            }
        }
    }

    /** Whether some deeper limit or fixed coordinate leaves this end of depth k like a square root. */
    private boolean hasRoot(int k, boolean high) {
        if (hasOnlyNumbers()) {
            return false;
        }
        double e = 1e-8;
        double[] psi = new double[dimension];
        for (double middle : new double[] {0.5, 0.37}) {
            double[][] g = new double[3][];
            for (int j = 0; j < 3; j++) {
                java.util.Arrays.fill(psi, middle);
                double step = e * Math.pow(4, j);
                psi[k] = high ? 1 - step : step;
                g[j] = limitsAt(psi);
            }
            for (int i = 0; i < g[0].length; i++) {
                double ratio = (g[2][i] - g[1][i]) / (g[1][i] - g[0][i]);
                if (ratio > 1.9 && ratio < 2.1) {
                    return true;
                }
            }
        }
        return false;
    }

    private boolean hasFixedFormula() {
        for (Scalar s : fixed) {
            if (s != null && !s.isConstant()) {
                return true;
            }
        }
        return false;
    }

    /** All limits and fixed values with each coordinate at this fraction of its range. */
    private double[] limitsAt(double[] psi) {
        double[] values = new double[2 * dimension + names];
        double[][] c = new double[3][1];
        double[] out = new double[1];
        for (int k = 0; k < dimension; k++) {
            from[k].evaluate(c, 1, out);
            double low = out[0];
            to[k].evaluate(c, 1, out);
            double high = out[0];
            values[2 * k] = low;
            values[2 * k + 1] = high;
            c[free[k]][0] = run[k] != null && run[k].endless() ? centre[k] + scale[k] * (psi[k] - 0.5) : low + (high - low) * psi[k];
        }
        for (int m = 0; m < names; m++) {
            if (fixed[m] != null) {
                fixed[m].evaluate(c, 1, out);
                values[2 * dimension + m] = out[0];
            }
        }
        return values;
    }

    /** Whether all limits and fixed values are numbers. */
    private boolean hasOnlyNumbers() {
        boolean numbers = !hasFixedFormula();
        for (int k = 0; k < dimension; k++) {
            numbers &= hasConstantLimits(k);
        }
        return numbers;
    }

    private void checkOrder() {
        if (hasOnlyNumbers()) {
            return;   // checkConstants saw them all
        }
        double[] at = {0.013, 0.25, 0.51, 0.77, 0.99};
        int count = 1;
        for (int k = 0; k < dimension; k++) {
            count *= at.length;
        }
        double[] psi = new double[dimension];
        for (int i = 0; i < count; i++) {
            int rest = i;
            for (int k = 0; k < dimension; k++) {
                psi[k] = at[rest % at.length];
                rest /= at.length;
            }
            double[] limits = limitsAt(psi);
            for (int k = 0; k < dimension; k++) {
                double low = limits[2 * k];
                double high = limits[2 * k + 1];
                if (Double.isNaN(low) || Double.isNaN(high)) {
                    throw new AuthorException(nest.title() + ": a limit of " + nest.order().get(k) + " is not a number" + where(psi, k)
                        + " (from " + nest.from(nest.order().get(k)).text() + " to " + nest.to(nest.order().get(k)).text()
                        + "). Check the limits of the outer coordinates.");
                }
                if (low > high + 1e-12 * (Math.abs(low) + Math.abs(high))) {
                    throw lowerAboveUpper(nest.order().get(k), low, high, where(psi, k));
                }
            }
        }
    }

    private String where(double[] psi, int depth) {
        StringBuilder text = new StringBuilder();
        double[] limits = limitsAt(psi);
        for (int j = 0; j < depth; j++) {
            double value = limits[2 * j] + (limits[2 * j + 1] - limits[2 * j]) * psi[j];
            text.append(j == 0 ? " at " : ", ").append(nest.order().get(j)).append(" = ")
                .append(String.format(java.util.Locale.ROOT, "%.6g", value));
        }
        return text.toString();
    }

    // ---- the map

    /** For endless limits: the same chart with its algebraic map centred and scaled for this target (own frame, m). */
    public Chart towards(double[] target) {
        if (!isEndless()) {
            return this;
        }
        double[] c = system == null ? new double[names] : coordinatesOf(target);
        double reach = 0;
        double[] middle = new double[dimension];
        java.util.Arrays.fill(middle, 0.5);
        double[] limits = limitsAt(middle);
        for (double v : limits) {
            if (Double.isFinite(v)) {
                reach = Math.max(reach, Math.abs(v));
            }
        }
        double[] newCentre = centre.clone();
        double[] newScale = scale.clone();
        for (int k = 0; k < dimension; k++) {
            if (run[k].endless()) {
                double size = Math.max(reach, Math.abs(target[0]) + Math.abs(target[1]) + Math.abs(target[2]));
                newScale[k] = size > 0 ? size : 1;
                if (run[k] == Run.BOTH) {
                    newCentre[k] = c[free[k]];
                }
            }
        }
        return new Chart(this, newCentre, newScale);
    }

    /** Coordinates of a place (own frame), angles moved into the range of the limits where they are numbers. */
    public double[] coordinatesOf(double[] p) {
        double rho = Math.sqrt(p[0] * p[0] + p[1] * p[1]);
        double phi = Math.atan2(p[1], p[0]);
        return switch (system) {
            case CARTESIAN -> p.clone();
            case CYLINDRICAL -> new double[] {rho, wrap(phi, 1), p[2]};
            case SPHERICAL -> new double[] {Math.sqrt(rho * rho + p[2] * p[2]), Math.atan2(rho, p[2]), wrap(phi, 2)};
        };
    }

    private double wrap(double phi, int name) {
        for (int k = 0; k < dimension; k++) {
            if (free[k] == name && from[k].isConstant() && to[k].isConstant()) {
                double low = from[k].constant();
                double high = to[k].constant();
                double turns = Math.ceil((low - phi) / (2 * Math.PI) - 1e-15);
                double up = phi + 2 * Math.PI * turns;
                if (up <= high) {
                    return up;
                }
                return up - high < low - (up - 2 * Math.PI) ? up : up - 2 * Math.PI;
            }
        }
        return phi;
    }

    /**
     * The point of the unit box whose coordinates are nearest to those of a place: exact when the place is in the region,
     * a start for a search otherwise. Coordinate systems only; the middle for parametric regions.
     */
    public double[] nearest(double[] place) {
        double[] u = new double[dimension];
        java.util.Arrays.fill(u, 0.5);
        if (system == null) {
            return u;
        }
        double[] wanted = coordinatesOf(place);
        double[][] c = new double[3][1];
        double[] low = new double[1];
        double[] high = new double[1];
        for (int k = 0; k < dimension; k++) {
            double value = wanted[free[k]];
            if (run[k].endless()) {
                u[k] = run[k].inverse((value - centre[k]) / scale[k]);
                c[free[k]][0] = value;
                continue;
            }
            from[k].evaluate(c, 1, low);
            to[k].evaluate(c, 1, high);
            double width = high[0] - low[0];
            u[k] = width > 0 ? run[k].inverse((value - low[0]) / width) : 0.5;
            c[free[k]][0] = Math.min(high[0], Math.max(low[0], value));
        }
        return u;
    }

    /**
     * Anchor at a point of the unit box.
     * Errors: AuthorException when a limit is not a number there.
     */
    public Anchor anchor(double[] u) {
        if (algebraic != null) {
            return algebraicAnchor(u);
        }
        double[] c = new double[names];
        double[][] block = new double[3][1];
        double[] low = new double[1];
        double[] high = new double[1];
        for (int k = 0; k < dimension; k++) {
            double value;
            if (run[k].endless()) {
                value = centre[k] + scale[k] * run[k].psi(u[k]);
            } else {
                limits(k, block, 1, low, high);
                double psi = run[k].psi(u[k]);
                value = psi <= 0.5 ? low[0] + (high[0] - low[0]) * psi : high[0] - (high[0] - low[0]) * run[k].rest(u[k]);
            }
            c[free[k]] = value;
            block[free[k]][0] = value;
        }
        for (int m = 0; m < names; m++) {
            if (fixed[m] != null) {
                fixed[m].evaluate(block, 1, low);
                c[m] = low[0];
            }
        }
        return new Anchor(u.clone(), c, embedding.position(c), null);
    }

    private Anchor algebraicAnchor(double[] u) {
        double[] c = new double[names];
        double[] slots = new double[algebraic.slots()];
        for (int k = 0; k < dimension; k++) {
            algebraic.work(k, slots);
            double low = slots[algebraic.from(k)];
            double high = slots[algebraic.to(k)];
            int own = Algebraic.PER_DEPTH * k;
            if (run[k].endless()) {
                slots[own] = centre[k] + scale[k] * run[k].psi(u[k]);
            } else {
                double psi = run[k].psi(Math.max(AT_END, u[k]));
                double rest = run[k].restOf(Math.max(AT_END, 1 - u[k]));
                slots[own + Algebraic.FROM_LOW] = (high - low) * psi;
                slots[own + Algebraic.TO_HIGH] = (high - low) * rest;
                slots[own] = psi <= 0.5 ? low + (high - low) * psi : high - (high - low) * rest;
            }
            c[free[k]] = slots[own];
        }
        algebraic.work(dimension, slots);
        for (int m = 0; m < names; m++) {
            if (fixed[m] != null) {
                c[m] = slots[algebraic.held(m)];
            }
        }
        return new Anchor(u.clone(), c, embedding.position(c), slots);
    }

    /** A parameter on an end of its range is taken this far inside, where a root and its slope are numbers. */
    private static final double AT_END = 1e-60;

    private void algebraicCoordinates(Anchor anchor, double[][] du, int n, Nodes nodes) {
        Algebraic.Slot[] slots = nodes.slots(algebraic.slots());
        double[] base = anchor.slots;
        for (int k = 0; k < dimension; k++) {
            algebraic.work(k, base, slots, n);
            int own = Algebraic.PER_DEPTH * k;
            int m = free[k];
            if (run[k].endless()) {
                coordinate(k, anchor, du[k], n, nodes);
                System.arraycopy(nodes.c[m], 0, slots[own].value, 0, n);
                System.arraycopy(nodes.delta[m], 0, slots[own].delta, 0, n);
                System.arraycopy(nodes.dc[m][k], 0, slots[own].d[k], 0, n);
                continue;
            }
            between(k, anchor, du[k], n, nodes, slots);
            System.arraycopy(slots[own].value, 0, nodes.c[m], 0, n);
            System.arraycopy(slots[own].delta, 0, nodes.delta[m], 0, n);
            copyDerivatives(own, m, slots, n, nodes);
        }
        algebraic.work(dimension, base, slots, n);
        for (int m = 0; m < names; m++) {
            if (fixed[m] != null) {
                Algebraic.Slot s = slots[algebraic.held(m)];
                System.arraycopy(s.value, 0, nodes.c[m], 0, n);
                System.arraycopy(s.delta, 0, nodes.delta[m], 0, n);
                copyDerivatives(algebraic.held(m), m, slots, n, nodes);
            }
        }
    }

    private void copyDerivatives(int slot, int m, Algebraic.Slot[] slots, int n, Nodes nodes) {
        for (int j = 0; j < dimension; j++) {
            if (algebraic.depends(slot, j)) {
                System.arraycopy(slots[slot].d[j], 0, nodes.dc[m][j], 0, n);
            } else {
                java.util.Arrays.fill(nodes.dc[m][j], 0, n, 0);
            }
        }
    }

    /** A coordinate between its limits, and its distances from them: c = from·(1 − psi) + to·psi. */
    private void between(int k, Anchor anchor, double[] du, int n, Nodes nodes, Algebraic.Slot[] slots) {
        int own = Algebraic.PER_DEPTH * k;
        Algebraic.Slot low = slots[algebraic.from(k)];
        Algebraic.Slot high = slots[algebraic.to(k)];
        Algebraic.Slot c = slots[own];
        Algebraic.Slot fromLow = slots[own + Algebraic.FROM_LOW];
        Algebraic.Slot toHigh = slots[own + Algebraic.TO_HIGH];
        Run r = run[k];
        double u0 = anchor.u[k];
        double v0 = 1 - u0;
        double psi0 = r.psi(Math.max(AT_END, u0));
        double rest0 = r.restOf(Math.max(AT_END, v0));
        for (int i = 0; i < n; i++) {
            double u = Math.max(AT_END, u0 + du[i]);
            double v = Math.max(AT_END, v0 - du[i]);
            double psi = r.psi(u);
            double rest = r.restOf(v);
            double step = r.difference(u0, du[i]);
            double slope = r.slope(u, v);
            double width = high.value[i] - low.value[i];
            double grown = high.delta[i] - low.delta[i];
            nodes.psi[i] = psi;
            nodes.work[i] = rest;
            c.value[i] = psi <= 0.5 ? low.value[i] + width * psi : high.value[i] - width * rest;
            c.delta[i] = rest0 * low.delta[i] + psi0 * high.delta[i] + width * step;
            c.d[k][i] = width * slope;
            fromLow.value[i] = width * psi;
            fromLow.delta[i] = width * step + psi0 * grown;
            fromLow.d[k][i] = width * slope;
            toHigh.value[i] = width * rest;
            toHigh.delta[i] = rest0 * grown - width * step;
            toHigh.d[k][i] = -width * slope;
        }
        for (int j = 0; j < k; j++) {
            if (!algebraic.depends(own, j)) {
                continue;
            }
            double[] lowD = algebraic.depends(algebraic.from(k), j) ? low.d[j] : null;
            double[] highD = algebraic.depends(algebraic.to(k), j) ? high.d[j] : null;
            for (int i = 0; i < n; i++) {
                double a = lowD == null ? 0 : lowD[i];
                double b = highD == null ? 0 : highD[i];
                c.d[j][i] = nodes.work[i] * a + nodes.psi[i] * b;
                fromLow.d[j][i] = nodes.psi[i] * (b - a);
                toHigh.d[j][i] = nodes.work[i] * (b - a);
            }
        }
    }

    /** Limits at the nodes; where a square root has just become negative by rounding both become the finite one, or the last good value. */
    private void limits(int k, double[][] c, int n, double[] low, double[] high) {
        from[k].evaluate(c, n, low);
        to[k].evaluate(c, n, high);
        if (from[k].isConstant() && to[k].isConstant()) {
            return;
        }
        for (int i = 0; i < n; i++) {
            if (Double.isNaN(low[i]) || Double.isNaN(high[i])) {
                pullIn(k, c, i, low, high);
            }
        }
    }

    /**
     * Limits that are not a number because an outer coordinate is, by rounding, beyond the end of a square root: taken a little
     * inside twice and carried on to the end as a root goes, L = 2 v(p) − v(4p).
     */
    private void pullIn(int k, double[][] c, int i, double[] low, double[] high) {
        for (double pull = 1e-14; pull < 1e-11; pull *= 10) {
            double[] near = pulled(k, c, i, pull);
            double[] far = pulled(k, c, i, 4 * pull);
            if (Double.isFinite(near[0] + near[1] + far[0] + far[1])) {
                low[i] = 2 * near[0] - far[0];
                high[i] = 2 * near[1] - far[1];
                if (low[i] > high[i] || high[i] - low[i] < 0.1 * (near[1] - near[0])) {
                    low[i] = (low[i] + high[i]) / 2;
                    high[i] = low[i];
                }
                return;
            }
        }
    }

    private double[] pulled(int k, double[][] c, int i, double pull) {
        double[] psi = new double[dimension];
        java.util.Arrays.fill(psi, 0.5);
        double[] middle = limitsAt(psi);
        double[][] moved = new double[3][1];
        double[] out = new double[1];
        for (int j = 0; j < k; j++) {
            double centreOfRange = (middle[2 * j] + middle[2 * j + 1]) / 2;
            moved[free[j]][0] = c[free[j]][i] + pull * (centreOfRange - c[free[j]][i]);
        }
        from[k].evaluate(moved, 1, out);
        double a = out[0];
        to[k].evaluate(moved, 1, out);
        return new double[] {a, out[0]};
    }

    /**
     * True when a deeper range closes like a square root at this end, so that the box has no face there. (Rounding may leave the root
     * of a few units in the last place.)
     */
    public boolean closesAt(int depth, boolean upper) {
        Run r = run[depth];
        if (r != Run.ROOT_BOTH && r != (upper ? Run.ROOT_HIGH : Run.ROOT_LOW)) {
            return false;
        }
        for (double other : new double[] {0.5, 0.37}) {
            double[] psi = new double[dimension];
            java.util.Arrays.fill(psi, other);
            double[] middle = limitsAt(psi);
            psi[depth] = upper ? 1 - 1e-14 : 1e-14;
            double[] end = limitsAt(psi);
            boolean closed = false;
            for (int k = depth + 1; k < dimension; k++) {
                closed |= !(end[2 * k + 1] - end[2 * k] > 1e-5 * (middle[2 * k + 1] - middle[2 * k]));
            }
            if (!closed) {
                return false;
            }
        }
        return true;
    }

    /** Coordinates, offsets, tangents and measure at anchor.u + du. */
    public void evaluate(Anchor anchor, double[][] du, int n, Nodes nodes) {
        java.util.Arrays.fill(nodes.rounding, 0, n, 0);
        java.util.Arrays.fill(nodes.relative, 0, n, 0);
        if (algebraic != null) {
            algebraicCoordinates(anchor, du, n, nodes);
            embedding.embed(anchor.coordinates, anchor.position, nodes, n);
            tangents(n, nodes);
            measure(n, nodes);
            return;
        }
        for (int k = 0; k < dimension; k++) {
            coordinate(k, anchor, du[k], n, nodes);
        }
        for (int m = 0; m < names; m++) {
            if (fixed[m] != null) {
                held(m, anchor, n, nodes);
            }
        }
        embedding.embed(anchor.coordinates, anchor.position, nodes, n);
        tangents(n, nodes);
        tangentsAtRoots(anchor, du, n, nodes);
        measure(n, nodes);
    }

    /** At the very end of a root the chain rule reads infinity times zero: tangents are taken a little inside instead. */
    private void tangentsAtRoots(Anchor anchor, double[][] du, int n, Nodes nodes) {
        double inside = 1e-6;
        for (int i = 0; i < n; i++) {
            boolean moved = false;
            for (int k = 0; k < dimension; k++) {
                double u = anchor.u[k] + du[k][i];
                moved |= run[k].low() && u < inside / 2 || run[k].high() && u > 1 - inside / 2;
            }
            if (!moved) {
                continue;
            }
            double[] at = new double[dimension];
            for (int k = 0; k < dimension; k++) {
                double u = anchor.u[k] + du[k][i];
                at[k] = run[k].low() && u < inside ? inside : run[k].high() && u > 1 - inside ? 1 - inside : u;
            }
            Nodes one = nodes.single();
            evaluate(anchor(at), new double[3][1], 1, one);
            for (int k = 0; k < dimension; k++) {
                for (int a = 0; a < 3; a++) {
                    nodes.tangent[k][a][i] = one.tangent[k][a][0];
                }
            }
        }
    }

    private void coordinate(int k, Anchor anchor, double[] du, int n, Nodes nodes) {
        int m = free[k];
        double[] c = nodes.c[m];
        double[] delta = nodes.delta[m];
        double[] own = nodes.dc[m][k];
        double u0 = anchor.u[k];
        double c0 = anchor.coordinates[m];
        Run r = run[k];
        if (r.endless()) {
            for (int i = 0; i < n; i++) {
                delta[i] = scale[k] * r.difference(u0, du[i]);
                c[i] = c0 + delta[i];
                own[i] = scale[k] * r.slope(u0 + du[i]);
            }
            return;
        }
        if (from[k].isConstant() && to[k].isConstant()) {
            double a = from[k].constant();
            double b = to[k].constant();
            double width = b - a;
            if (r == Run.PLAIN) {
                for (int i = 0; i < n; i++) {
                    delta[i] = width * du[i];
                    c[i] = c0 + delta[i];
                    own[i] = width;
                }
            } else {
                for (int i = 0; i < n; i++) {
                    double u = u0 + du[i];
                    delta[i] = width * r.difference(u0, du[i]);
                    double psi = r.psi(u);
                    c[i] = psi <= 0.5 ? a + width * psi : b - width * r.rest(u);
                    own[i] = width * r.slope(u);
                }
            }
            return;
        }
        limits(k, nodes.c, n, nodes.low, nodes.high);
        for (int i = 0; i < n; i++) {
            double u = u0 + du[i];
            double width = nodes.high[i] - nodes.low[i];
            double psi = r.psi(u);
            nodes.psi[i] = psi;
            c[i] = psi <= 0.5 ? nodes.low[i] + width * psi : nodes.high[i] - width * r.rest(u);
            delta[i] = c[i] - c0;
            own[i] = width * r.slope(u);
        }
        System.arraycopy(nodes.rounding, 0, nodes.slope, 0, n);
        for (int j = 0; j < k; j++) {
            slopes(k, j, n, nodes);
        }
        for (int i = 0; i < n; i++) {
            double width = nodes.high[i] - nodes.low[i];
            nodes.relative[i] = Math.max(nodes.relative[i], width > 0 ? (nodes.rounding[i] - nodes.slope[i]) / width : 1e8);
        }
    }

    /** ∂c_k/∂u_j by the chain rule through the limits. */
    private void slopes(int k, int j, int n, Nodes nodes) {
        double[] total = nodes.dc[free[k]][j];
        java.util.Arrays.fill(total, 0, n, 0);
        for (int via = j; via < k; via++) {
            double[] inner = nodes.dc[free[via]][j];
            if (via > j && hasConstantLimits(via)) {
                continue;
            }
            if (dFrom[k][via] != Scalar.ZERO) {
                dFrom[k][via].evaluate(nodes.c, n, nodes.work);
                for (int i = 0; i < n; i++) {
                    total[i] += chained((1 - nodes.psi[i]) * nodes.work[i], inner[i], nodes, free[via], i);
                }
            }
            if (dTo[k][via] != Scalar.ZERO) {
                dTo[k][via].evaluate(nodes.c, n, nodes.work);
                for (int i = 0; i < n; i++) {
                    total[i] += chained(nodes.psi[i] * nodes.work[i], inner[i], nodes, free[via], i);
                }
            }
        }
    }

    /** One link of the chain; a root's infinite slope at its very end counts as none, and rounding of the outer coordinate is noted. */
    private static double chained(double slope, double inner, Nodes nodes, int via, int i) {
        double product = slope * inner;
        double carried = slope * nodes.c[via][i];
        nodes.rounding[i] += Double.isFinite(carried) ? Math.abs(carried) : 1e8 * Math.abs(nodes.c[via][i]);
        return Double.isFinite(product) ? product : 0;
    }

    private void held(int m, Anchor anchor, int n, Nodes nodes) {
        if (fixed[m].isConstant()) {
            java.util.Arrays.fill(nodes.c[m], 0, n, fixed[m].constant());
            java.util.Arrays.fill(nodes.delta[m], 0, n, 0);
            return;
        }
        fixed[m].evaluate(nodes.c, n, nodes.c[m]);
        for (int i = 0; i < n; i++) {
            nodes.delta[m][i] = nodes.c[m][i] - anchor.coordinates[m];
        }
        for (int j = 0; j < dimension; j++) {
            double[] total = nodes.dc[m][j];
            java.util.Arrays.fill(total, 0, n, 0);
            for (int via = j; via < dimension; via++) {
                if (dFixed[m][via] == Scalar.ZERO || via > j && hasConstantLimits(via)) {
                    continue;
                }
                dFixed[m][via].evaluate(nodes.c, n, nodes.work);
                double[] inner = nodes.dc[free[via]][j];
                for (int i = 0; i < n; i++) {
                    total[i] += chained(nodes.work[i], inner[i], nodes, free[via], i);
                }
            }
        }
    }

    private void tangents(int n, Nodes nodes) {
        boolean cartesian = embedding.isCartesian();
        for (int k = 0; k < dimension; k++) {
            for (int a = 0; a < 3; a++) {
                java.util.Arrays.fill(nodes.tangent[k][a], 0, n, 0);
            }
            for (int m = 0; m < names; m++) {
                if (!depends(m, k)) {
                    continue;
                }
                double[] dc = nodes.dc[m][k];
                if (cartesian) {
                    System.arraycopy(dc, 0, nodes.tangent[k][m], 0, n);
                    continue;
                }
                for (int a = 0; a < 3; a++) {
                    double[] t = nodes.tangent[k][a];
                    double[] j = nodes.jacobian[m][a];
                    for (int i = 0; i < n; i++) {
                        t[i] += j[i] * dc[i];
                    }
                }
            }
        }
    }

    private boolean depends(int m, int k) {
        if (fixed[m] != null) {
            return !fixed[m].isConstant();
        }
        if (free[k] == m) {
            return true;
        }
        for (int d = k + 1; d < dimension; d++) {
            if (free[d] == m) {
                return !hasConstantLimits(d);
            }
        }
        return false;
    }

    private void measure(int n, Nodes nodes) {
        double[] out = nodes.measure;
        double[][][] t = nodes.tangent;
        switch (dimension) {
            case 0 -> java.util.Arrays.fill(out, 0, n, 1);
            case 1 -> {
                for (int i = 0; i < n; i++) {
                    double x = t[0][0][i];
                    double y = t[0][1][i];
                    double z = t[0][2][i];
                    out[i] = Math.sqrt(x * x + y * y + z * z);
                }
            }
            case 2 -> {
                for (int i = 0; i < n; i++) {
                    double x = t[0][1][i] * t[1][2][i] - t[0][2][i] * t[1][1][i];
                    double y = t[0][2][i] * t[1][0][i] - t[0][0][i] * t[1][2][i];
                    double z = t[0][0][i] * t[1][1][i] - t[0][1][i] * t[1][0][i];
                    out[i] = Math.sqrt(x * x + y * y + z * z);
                }
            }
            default -> {
                for (int i = 0; i < n; i++) {
                    out[i] = Math.abs(determinant(t, i));
                }
            }
        }
    }

    /** Product of the coordinate differentials per unit of du, without any measure: what a bare integral takes. */
    public void differentials(Nodes nodes, int n, double[] out) {
        java.util.Arrays.fill(out, 0, n, 1);
        for (int k = 0; k < dimension; k++) {
            double[] own = nodes.dc[free[k]][k];
            for (int i = 0; i < n; i++) {
                out[i] *= own[i];
            }
        }
    }

    private static double determinant(double[][][] t, int i) {
        return t[0][0][i] * (t[1][1][i] * t[2][2][i] - t[1][2][i] * t[2][1][i])
            - t[0][1][i] * (t[1][0][i] * t[2][2][i] - t[1][2][i] * t[2][0][i])
            + t[0][2][i] * (t[1][0][i] * t[2][1][i] - t[1][1][i] * t[2][0][i]);
    }

    /** +1 when the three tangents are right-handed in the middle of the box, −1 otherwise. */
    public int handedness(Nodes nodes) {
        double[] u = {0.41, 0.43, 0.47};
        Anchor a = anchor(java.util.Arrays.copyOf(u, dimension));
        evaluate(a, new double[3][Nodes.BLOCK], 1, nodes);
        return determinant(nodes.tangent, 0) < 0 ? -1 : 1;
    }
}
