package fieldwright.field.honesty;

import fieldwright.charge.Charge;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Random;

/**
 * A random question: charge, density, placing, place; for the engine as a {@link Charge}, for the judge as parts without kinks.
 * {@code normal} leads away from the charge at the nearest place (sheet frame); gap is in m, 0 on the charge.
 */
record Problem(int number, String kind, Where where, RegionSpec spec, String density, List<Part> parts, Exact.Placing placing, double[] at,
        double[] normal, double gap, double size, double thickness) {
    /** How far a place on a surface is moved to either side, in sizes: beyond all digits of the answer. */
    private static final double PUSH = 1e-20;

    enum Where { FAR, MID, NEAR, NEAR_RIM, ON, RIM, INSIDE, AXIS }

    /** A part whose density has no kink. */
    record Part(Charged charged, SmoothDensity density, boolean polynomial) { }

    /** The same number gives the same problem, whatever was asked before. */
    static Problem of(long seed, int number) {
        Random random = new Random(seed * 1_000_003L + number * 7919L);
        for (int k = 0; k < 5; k++) {
            random.nextLong();
        }
        Shape shape = Shape.of(random);
        int dimension = shape.charged().dimension();
        double size = shape.charged().size();
        Drawn drawn = density(shape, dimension, random);
        Exact.Placing placing = Exact.Placing.NONE;
        if (random.nextInt(3) == 0) {
            placing = new Exact.Placing(random.nextInt(3), random.nextBoolean() ? 0.7 : 6 * random.nextDouble() - 3, new double[] {
                size * (2 * random.nextDouble() - 1), size * (2 * random.nextDouble() - 1), random.nextBoolean() ? 0 : size * random.nextDouble()});
        }
        Where where = where(shape, random);
        double[][] spot = switch (where) {
            case NEAR_RIM, RIM -> shape.rim().pick(random);
            case INSIDE -> shape.inside().pick(random);
            default -> shape.on().pick(random);
        };
        double gap = switch (where) {
            case FAR -> size * Math.pow(10, 0.5 + 3.5 * random.nextDouble());
            case MID, AXIS -> size * Math.pow(10, -1 + 1.5 * random.nextDouble());
            case NEAR, NEAR_RIM -> size * Math.pow(10, -8 + 7 * random.nextDouble());
            default -> 0;
        };
        double[] local = new double[3];
        for (int c = 0; c < 3; c++) {
            local[c] = spot[0][c] + gap * spot[1][c];
        }
        if (where == Where.AXIS) {
            local = new double[] {0, 0, random.nextBoolean() ? size * (random.nextDouble() * 2 - 1) : gap};
        }
        double[] at = placing.isNone() ? local : placing.sheet(local);
        return new Problem(number, shape.kind(), where, shape.spec(), drawn.text, drawn.parts, placing, at, placing.turned(spot[1]), gap, size,
                shape.charged().thickness());
    }

    private static Where where(Shape shape, Random random) {
        int dice = random.nextInt(100);
        boolean volume = shape.inside() != null;
        if (dice < 12) {
            return Where.FAR;
        }
        if (dice < 30) {
            return Where.MID;
        }
        if (dice < 60) {
            return Where.NEAR;
        }
        if (dice < 72) {
            return shape.rim() != null ? Where.NEAR_RIM : Where.NEAR;
        }
        if (dice < 84) {
            return volume ? Where.INSIDE : Where.ON;
        }
        if (dice < 91) {
            return Where.ON;
        }
        if (dice < 95) {
            return shape.rim() != null ? Where.RIM : Where.MID;
        }
        return shape.charged() instanceof Charged.Rod || shape.charged() instanceof Charged.Several ? Where.FAR : Where.AXIS;
    }

    private static final class Drawn {
        private String text;
        private final List<Part> parts = new ArrayList<>();
    }

    /** A random smooth density: its text without unit (coordinates over their lengths) and its value. */
    private record Smooth(String text, SmoothDensity value, boolean polynomial) { }

    private static Drawn density(Shape shape, int dimension, Random random) {
        String unit = dimension == 1 ? "(nC/m)" : dimension == 2 ? "(nC/m^2)" : "(nC/m^3)";
        double nano = 1e-9;
        Drawn drawn = new Drawn();
        Smooth f = smooth(shape, random);
        Shape.Cut cut = shape.cut();
        if (cut == null || random.nextInt(4) != 0) {
            drawn.text = "1 " + unit + "*" + f.text;
            drawn.parts.add(new Part(shape.charged(), (x, y, z) -> nano * f.value.at(x, y, z), f.polynomial));
            return drawn;
        }
        if (random.nextBoolean()) {
            Smooth g = smooth(shape, random);
            drawn.text = "1 " + unit + "*when(" + cut.text() + " < " + quantity(cut.at(), cut.unit()) + ", " + f.text + ", " + g.text + ")";
            drawn.parts.add(new Part(cut.below(), (x, y, z) -> nano * f.value.at(x, y, z), f.polynomial));
            drawn.parts.add(new Part(cut.above(), (x, y, z) -> nano * g.value.at(x, y, z), g.polynomial));
            return drawn;
        }
        double scale = 1 / Math.max(Math.abs(cut.at()), 1e-300);
        drawn.text = "1 " + unit + "*(0.5+abs(" + cut.text() + "-" + quantity(cut.at(), cut.unit()) + ")/(" + Math.abs(cut.at()) + cut.unit()
                + "))*" + f.text;
        drawn.parts.add(new Part(cut.below(),
                (x, y, z) -> nano * (0.5 + (cut.at() - cut.value().at(x, y, z)) * scale) * f.value.at(x, y, z), f.polynomial));
        drawn.parts.add(new Part(cut.above(),
                (x, y, z) -> nano * (0.5 + (cut.value().at(x, y, z) - cut.at()) * scale) * f.value.at(x, y, z), f.polynomial));
        return drawn;
    }

    private static String quantity(double value, String unit) {
        return value < 0 ? "(" + value + unit + ")" : value + unit;
    }

    private static double digits(double value) {
        return Math.rint(value * 1000) / 1000;
    }

    private static Smooth smooth(Shape shape, Random random) {
        double[] l = shape.lengths();
        double k = digits(0.2 + 3 * random.nextDouble());
        double c1 = digits(2 * random.nextDouble() - 1);
        double c2 = digits(2 * random.nextDouble() - 1);
        double c3 = digits(2 * random.nextDouble() - 1);
        String x = "x/(" + RegionSpec.m(l[0]) + ")";
        String y = "y/(" + RegionSpec.m(l[1]) + ")";
        String z = "z/(" + RegionSpec.m(l[2]) + ")";
        String n1 = RegionSpec.number(c1);
        String n2 = RegionSpec.number(c2);
        String n3 = RegionSpec.number(c3);
        return switch (random.nextInt(5)) {
            case 0 -> new Smooth("" + k, (a, b, c) -> k, true);
            case 1 -> new Smooth(k + "*(1+" + n1 + "*" + x + "+" + n2 + "*(" + y + ")^2+" + n3 + "*(" + x + ")*(" + z + "))",
                    (a, b, c) -> k * (1 + c1 * a / l[0] + c2 * (b / l[1]) * (b / l[1]) + c3 * (a / l[0]) * (c / l[2])), true);
            case 2 -> new Smooth(k + "*exp(" + n1 + "*" + x + "+" + n2 + "*" + y + "-2*" + z + ")",
                    (a, b, c) -> k * Math.exp(c1 * a / l[0] + c2 * b / l[1] - 2 * c / l[2]), false);
            case 3 -> new Smooth(k + "*cos(3*" + x + "+" + n2 + "*" + y + "+2*" + z + "+" + n3 + ")",
                    (a, b, c) -> k * Math.cos(3 * a / l[0] + c2 * b / l[1] + 2 * c / l[2] + c3), false);
            default -> new Smooth(k + "*(1.5+" + n1 + "*sin(4*" + y + "))*(1+" + n2 + "*(" + z + ")^2)",
                    (a, b, c) -> k * (1.5 + c1 * Math.sin(4 * b / l[1])) * (1 + c2 * (c / l[2]) * (c / l[2])), false);
        };
    }

    int dimension() {
        return parts.get(0).charged.dimension();
    }

    Charge charge() {
        return spec.charge(density, placing);
    }

    /** On a line, or on a rim of a surface: no finite field. */
    boolean fieldUnbounded() {
        return dimension() == 1 && gap == 0 && where != Where.AXIS || dimension() == 2 && where == Where.RIM;
    }

    boolean potentialUnbounded() {
        return dimension() == 1 && gap == 0 && where != Where.AXIS;
    }

    /** On a surface: two answers. */
    boolean sided() {
        return dimension() == 2 && where == Where.ON;
    }

    /** Field and potential times 4π eps0, in the sheet's frame; side 0, or ±1 times the normal for one-sided values. */
    Answer judge(int side, DoubleExponential.Setting setting) {
        Exact.Position local = placing.local(at);
        double[] push = new double[3];
        if (side != 0) {
            double[] n = new Exact.Placing(placing.axis(), -placing.angle(), new double[3]).turned(normal);
            for (int c = 0; c < 3; c++) {
                push[c] = side * n[c] * PUSH * size;
            }
        }
        Answer sum = Answer.zero();
        for (Part part : parts) {
            sum = sum.plus(part.charged.judge(part.density, part.polynomial, local, push, setting));
        }
        double[] field = placing.turned(sum.value());
        double[] magnitude = new double[4];
        Arrays.fill(magnitude, 0, 3, sum.fieldMagnitude());
        magnitude[3] = sum.magnitude()[3];
        return new Answer(new double[] {field[0], field[1], field[2], sum.value()[3]}, magnitude, sum.evaluations());
    }

    @Override
    public String toString() {
        String placed = placing.isNone() ? "" : " turned about " + "xyz".charAt(placing.axis()) + " by " + placing.angle() + " rad, then moved by "
                + Arrays.toString(placing.shift()) + " m";
        return "problem " + number + " (" + kind + ", " + where + ", gap " + gap + " m): " + spec + placed + ", density \"" + density + "\", at "
                + Arrays.toString(at);
    }
}
