package fieldwright.geometry;

import java.util.ArrayList;
import java.util.List;

import javax.measure.Dimension;

import fieldwright.formula.BlockMap;
import fieldwright.formula.Formula;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Units;

/** From coordinates to positions: the differences to an anchor without cancellation, and the derivatives. */
abstract class Embedding {
    /** Position (m) of one set of coordinates. */
    abstract double[] position(double[] c);

    /** Fills offset and jacobian of the nodes from c and delta; {@code c0} are the anchor's coordinates. */
    abstract void embed(double[] c0, double[] position0, Nodes nodes, int n);

    /** True when offsets carry no cancellation once the coordinates' differences carry none. */
    boolean isExact() {
        return true;
    }

    /** True when coordinates are positions, so that the jacobian is the unit matrix and is left unset. */
    boolean isCartesian() {
        return false;
    }

    static Embedding of(CoordinateSystem system) {
        return switch (system) {
            case CARTESIAN -> new Cartesian();
            case CYLINDRICAL -> new Cylindrical();
            case SPHERICAL -> new Spherical();
        };
    }

    static Embedding of(Nest nest, Formula x, Formula y, Formula z) {
        return new Parametric(nest, x, y, z);
    }

    private static final class Cartesian extends Embedding {
        @Override
        double[] position(double[] c) {
            return c.clone();
        }

        @Override
        void embed(double[] c0, double[] position0, Nodes nodes, int n) {
            for (int a = 0; a < 3; a++) {
                System.arraycopy(nodes.delta[a], 0, nodes.offset[a], 0, n);
            }
        }

        @Override
        boolean isCartesian() {
            return true;
        }
    }

    /** π less the double next to it, over π. */
    private static final double SHORT_OF_PI = 1.2246467991473532e-16 / Math.PI;

    /**
     * Sine of an angle of a limit or a coordinate, in which the double next to π stands for π itself. Else a full turn ends
     * short of where it began, and a place over that seam sees a slit as wide as the rounding over its distance.
     */
    private static double sine(double angle) {
        return Math.sin(angle) + SHORT_OF_PI * angle * Math.cos(angle);
    }

    private static double cosine(double angle) {
        return Math.cos(angle) - SHORT_OF_PI * angle * Math.sin(angle);
    }

    private static final class Cylindrical extends Embedding {
        @Override
        double[] position(double[] c) {
            return new double[] {c[0] * cosine(c[1]), c[0] * sine(c[1]), c[2]};
        }

        @Override
        void embed(double[] c0, double[] position0, Nodes nodes, int n) {
            double sin0 = sine(c0[1]);
            double cos0 = cosine(c0[1]);
            double[] rho = nodes.c[0];
            for (int i = 0; i < n; i++) {
                double half = nodes.delta[1][i] / 2;
                double s0 = Math.sin(half);
                double q0 = Math.cos(half);
                double s = s0 + SHORT_OF_PI * half * q0;
                double q = q0 - SHORT_OF_PI * half * s0;
                double sinMiddle = sin0 * q + cos0 * s;
                double cosMiddle = cos0 * q - sin0 * s;
                double dRho = nodes.delta[0][i];
                double r = rho[i];
                nodes.offset[0][i] = dRho * cos0 - 2 * r * sinMiddle * s;
                nodes.offset[1][i] = dRho * sin0 + 2 * r * cosMiddle * s;
                nodes.offset[2][i] = nodes.delta[2][i];
                double sin = sinMiddle * q + cosMiddle * s;
                double cos = cosMiddle * q - sinMiddle * s;
                nodes.jacobian[0][0][i] = cos;
                nodes.jacobian[0][1][i] = sin;
                nodes.jacobian[0][2][i] = 0;
                nodes.jacobian[1][0][i] = -r * sin;
                nodes.jacobian[1][1][i] = r * cos;
                nodes.jacobian[1][2][i] = 0;
                nodes.jacobian[2][0][i] = 0;
                nodes.jacobian[2][1][i] = 0;
                nodes.jacobian[2][2][i] = 1;
            }
        }
    }

    private static final class Spherical extends Embedding {
        @Override
        double[] position(double[] c) {
            double rho = c[0] * sine(c[1]);
            return new double[] {rho * cosine(c[2]), rho * sine(c[2]), c[0] * cosine(c[1])};
        }

        @Override
        void embed(double[] c0, double[] position0, Nodes nodes, int n) {
            double sinT0 = sine(c0[1]);
            double cosT0 = cosine(c0[1]);
            double sinP0 = sine(c0[2]);
            double cosP0 = cosine(c0[2]);
            for (int i = 0; i < n; i++) {
                double r = nodes.c[0][i];
                double dr = nodes.delta[0][i];
                double half = nodes.delta[1][i] / 2;
                double s0 = Math.sin(half);
                double q0 = Math.cos(half);
                double s = s0 + SHORT_OF_PI * half * q0;
                double q = q0 - SHORT_OF_PI * half * s0;
                double sinMiddle = sinT0 * q + cosT0 * s;
                double cosMiddle = cosT0 * q - sinT0 * s;
                double dRho = dr * sinT0 + 2 * r * cosMiddle * s;
                double dz = dr * cosT0 - 2 * r * sinMiddle * s;
                double sinT = sinMiddle * q + cosMiddle * s;
                double cosT = cosMiddle * q - sinMiddle * s;
                double rho = r * sinT;
                half = nodes.delta[2][i] / 2;
                s0 = Math.sin(half);
                q0 = Math.cos(half);
                s = s0 + SHORT_OF_PI * half * q0;
                q = q0 - SHORT_OF_PI * half * s0;
                sinMiddle = sinP0 * q + cosP0 * s;
                cosMiddle = cosP0 * q - sinP0 * s;
                nodes.offset[0][i] = dRho * cosP0 - 2 * rho * sinMiddle * s;
                nodes.offset[1][i] = dRho * sinP0 + 2 * rho * cosMiddle * s;
                nodes.offset[2][i] = dz;
                double sinP = sinMiddle * q + cosMiddle * s;
                double cosP = cosMiddle * q - sinMiddle * s;
                nodes.jacobian[0][0][i] = sinT * cosP;
                nodes.jacobian[0][1][i] = sinT * sinP;
                nodes.jacobian[0][2][i] = cosT;
                nodes.jacobian[1][0][i] = r * cosT * cosP;
                nodes.jacobian[1][1][i] = r * cosT * sinP;
                nodes.jacobian[1][2][i] = -rho;
                nodes.jacobian[2][0][i] = -rho * sinP;
                nodes.jacobian[2][1][i] = rho * cosP;
                nodes.jacobian[2][2][i] = 0;
            }
        }
    }

    private static final class Parametric extends Embedding {
        /** x, y, z; and with their derivatives by each parameter behind them. */
        private final BlockMap at;
        private final BlockMap withSlopes;
        private final int parameters;
        /** At most two parameters and linear in each: offsets follow from slopes, without cancellation. */
        private final boolean bilinear;

        Parametric(Nest nest, Formula... position) {
            parameters = nest.names().size();
            boolean linear = parameters <= 2;
            List<Formula> all = new ArrayList<>(List.of(position));
            for (int m = 0; m < parameters; m++) {
                String name = nest.names().get(m);
                for (int a = 0; a < 3; a++) {
                    linear &= position[a].degree(name).orElse(2) <= 1;
                    all.add(position[a].derivative(name));
                }
            }
            for (int a = 0; a < 3; a++) {
                checkLength(nest, position[a], a);
            }
            bilinear = linear;
            at = Formula.compile(List.of(position), nest.names());
            withSlopes = Formula.compile(all, nest.names());
        }

        private static void checkLength(Nest nest, Formula position, int axis) {
            boolean any = position.variables().isEmpty() && position.fitsAnyUnit();
            Dimension found = any ? Units.LENGTH : position.dimension(nest.dimensions());
            if (!found.equals(Units.LENGTH)) {
                throw new AuthorException("parametric region: " + "xyz".charAt(axis) + " = " + position.text() + " is " + Units.describe(found)
                    + ", not a length. Give its lengths units, for example 0.5 m*cos(t).");
            }
        }

        @Override
        boolean isExact() {
            return bilinear;
        }

        @Override
        double[] position(double[] c) {
            double[][] out = new double[3][1];
            at.evaluate(single(c), 1, out);
            return new double[] {out[0][0], out[1][0], out[2][0]};
        }

        private static double[][] single(double[] c) {
            double[][] one = new double[c.length][1];
            for (int m = 0; m < c.length; m++) {
                one[m][0] = c[m];
            }
            return one;
        }

        @Override
        void embed(double[] c0, double[] position0, Nodes nodes, int n) {
            double[][] out = new double[3 + 3 * parameters][];
            for (int a = 0; a < 3; a++) {
                out[a] = nodes.offset[a];
                for (int m = 0; m < parameters; m++) {
                    out[3 + 3 * m + a] = nodes.jacobian[m][a];
                }
            }
            withSlopes.evaluate(nodes.c, n, out);
            double[][] first = bilinear ? slopesAt(c0) : null;
            for (int a = 0; a < 3; a++) {
                double[] o = nodes.offset[a];
                for (int i = 0; i < n; i++) {
                    o[i] = bilinear
                        ? first[3 + a][0] * nodes.delta[0][i] + (parameters > 1 ? nodes.jacobian[1][a][i] * nodes.delta[1][i] : 0)
                        : o[i] - position0[a];
                }
            }
        }

        /** At the anchor; the second parameter's derivative, at a node, depends on the first only. */
        private double[][] slopesAt(double[] c0) {
            double[][] out = new double[3 + 3 * parameters][1];
            withSlopes.evaluate(single(c0), 1, out);
            return out;
        }
    }
}
