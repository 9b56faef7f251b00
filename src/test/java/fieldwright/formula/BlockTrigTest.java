package fieldwright.formula;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.math.MathContext;
import java.util.Random;
import org.junit.jupiter.api.Test;

class BlockTrigTest {
    private static final MathContext DIGITS = new MathContext(50);
    private static final BigDecimal PI = new BigDecimal("3.14159265358979323846264338327950288419716939937510582097494459230781640628620899862803");

    /** Against Taylor's series in 50 digits, near multiples of pi/2 and in between. */
    @Test
    void accurateToOneAndAHalfUnits() {
        Random random = new Random(20260321);
        double worst = 0;
        for (int block = 0; block < 40; block++) {
            double[] x = new double[256];
            for (int i = 0; i < x.length; i++) {
                double size = block < 20 ? 7 : Math.pow(10, random.nextInt(6));
                x[i] = i % 4 == 0 ? Math.rint(random.nextGaussian() * size) * Math.PI / 2 : size * (2 * random.nextDouble() - 1);
                x[i] = Math.abs(x[i]) < 1e5 ? x[i] : 1;
            }
            x[0] = 0;
            double[] sin = new double[256];
            double[] cos = new double[256];
            BlockTrig.sin(x, sin, 256);
            BlockTrig.cos(x, cos, 256);
            for (int i = 0; i < x.length; i += 3) {
                worst = Math.max(worst, Math.max(miss(x[i], 0, sin[i]), miss(x[i], 1, cos[i])));
            }
        }
        System.out.println("block sine and cosine, worst error in units of the last place: " + worst);
        assertTrue(worst < 1.5, "worst " + worst);
    }

    private static double miss(double x, int quarter, double found) {
        BigDecimal angle = new BigDecimal(x).add(PI.multiply(new BigDecimal("0.5")).multiply(new BigDecimal(quarter)));
        BigDecimal turn = PI.multiply(BigDecimal.valueOf(2));
        angle = angle.subtract(turn.multiply(angle.divide(turn, 0, java.math.RoundingMode.HALF_EVEN)));
        BigDecimal term = angle;
        BigDecimal sum = angle;
        for (int k = 1; k < 40; k++) {
            term = term.multiply(angle).multiply(angle).negate().divide(BigDecimal.valueOf(2L * k * (2L * k + 1)), DIGITS);
            sum = sum.add(term, DIGITS);
        }
        return sum.subtract(new BigDecimal(found)).abs().doubleValue() / Math.ulp(sum.doubleValue());
    }

    @Test
    void outsideTheRange() {
        double[] x = {1e6, Double.NaN, Double.POSITIVE_INFINITY, -0.0, 1e22};   // one near node beside far ones
        double[] out = new double[5];
        BlockTrig.sin(x, out, 5);
        for (int i = 0; i < 5; i++) {
            assertEquals(Math.sin(x[i]) + 0.0, out[i] + 0.0);
        }
        BlockTrig.cos(x, x, 5);   // in place
        assertEquals(Math.cos(1e6), x[0]);
        assertEquals(1, x[3]);
    }
}
