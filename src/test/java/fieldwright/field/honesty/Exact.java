package fieldwright.field.honesty;

import java.math.BigDecimal;
import java.math.MathContext;

/** Forty-digit arithmetic for the one thing plain doubles cannot give the judge: the offset of a place from a foot point. */
final class Exact {
    static final MathContext DIGITS = new MathContext(40);
    private static final BigDecimal TINY = new BigDecimal("1e-45");

    private Exact() { }

    static BigDecimal of(double value) {
        return new BigDecimal(value);
    }

    static BigDecimal sqrt(BigDecimal value) {
        return value.signum() == 0 ? BigDecimal.ZERO : value.sqrt(DIGITS);
    }

    static BigDecimal hypot(BigDecimal x, BigDecimal y) {
        return sqrt(x.multiply(x).add(y.multiply(y)));
    }

    /** Sine of a moderate angle in rad, by its power series. */
    static BigDecimal sin(BigDecimal angle) {
        return series(angle, angle, 1);
    }

    static BigDecimal cos(BigDecimal angle) {
        return series(angle, BigDecimal.ONE, 0);
    }

    private static BigDecimal series(BigDecimal angle, BigDecimal first, int order) {
        BigDecimal square = angle.multiply(angle).negate();
        BigDecimal term = first;
        BigDecimal sum = first;
        for (int k = order; term.abs().compareTo(TINY) > 0; k += 2) {
            term = term.multiply(square).divide(BigDecimal.valueOf((long) (k + 1) * (k + 2)), new MathContext(60));
            sum = sum.add(term);
        }
        return sum.round(DIGITS);
    }

    /** A place in a body's own frame, to forty digits. */
    record Position(BigDecimal x, BigDecimal y, BigDecimal z) {
        static Position of(double x, double y, double z) {
            return new Position(Exact.of(x), Exact.of(y), Exact.of(z));
        }

        double[] doubles() {
            return new double[] {x.doubleValue(), y.doubleValue(), z.doubleValue()};
        }
    }

    /** Turned by an angle about an axis (0 x, 1 y, 2 z) through the origin, then moved. */
    record Placing(int axis, double angle, double[] shift) {
        static final Placing NONE = new Placing(2, 0, new double[3]);

        boolean isNone() {
            return angle == 0 && shift[0] == 0 && shift[1] == 0 && shift[2] == 0;
        }

        /** Where a place of the sheet lies in the body's own frame. */
        Position local(double[] sheet) {
            BigDecimal[] p = new BigDecimal[3];
            for (int c = 0; c < 3; c++) {
                p[c] = of(sheet[c]).subtract(of(shift[c]));
            }
            turn(p, sin(of(angle)).negate());
            return new Position(p[0], p[1], p[2]);
        }

        /** Where a place of the body's frame lies on the sheet, rounded to doubles. */
        double[] sheet(double[] local) {
            BigDecimal[] p = {of(local[0]), of(local[1]), of(local[2])};
            turn(p, sin(of(angle)));
            double[] sheet = new double[3];
            for (int c = 0; c < 3; c++) {
                sheet[c] = p[c].add(of(shift[c])).doubleValue();
            }
            return sheet;
        }

        /** A direction of the body's frame as seen on the sheet. */
        double[] turned(double[] v) {
            double cos = Math.cos(angle);
            double sin = Math.sin(angle);
            int i = (axis + 1) % 3;
            int j = (axis + 2) % 3;
            double[] out = v.clone();
            out[i] = cos * v[i] - sin * v[j];
            out[j] = sin * v[i] + cos * v[j];
            return out;
        }

        private void turn(BigDecimal[] p, BigDecimal sin) {
            BigDecimal cos = cos(of(angle));
            int i = (axis + 1) % 3;
            int j = (axis + 2) % 3;
            BigDecimal pi = p[i];
            p[i] = cos.multiply(pi).subtract(sin.multiply(p[j])).round(new MathContext(60));
            p[j] = sin.multiply(pi).add(cos.multiply(p[j])).round(new MathContext(60));
        }
    }
}
