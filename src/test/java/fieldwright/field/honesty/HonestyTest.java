package fieldwright.field.honesty;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.io.InputStream;
import java.nio.charset.StandardCharsets;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.stream.Collectors;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;

/**
 * The stated errors are true, over the first problems of the fixed seed. The judge's values lie in a table (see its header), for
 * speed; a sample of them is worked afresh. The same over thousands, with a histogram: {@link HonestyRun}.
 */
class HonestyTest {
    private static final int COUNT = 300;

    private static Map<Integer, List<Judged>> judged;
    private static List<Finding> findings;

    @BeforeAll
    static void ask() throws IOException {
        try (InputStream in = HonestyTest.class.getResourceAsStream("judged.csv")) {
            judged = Judged.read(new String(in.readAllBytes(), StandardCharsets.UTF_8).lines().toList());
        }
        findings = new ArrayList<>();
        for (int number = 0; number < COUNT; number++) {
            Problem p = Problem.of(HonestyRun.FAST_SEED, number);
            List<Judged> word = judged.get(number);
            if (!p.potentialUnbounded()) {
                assertEquals(p.toString().hashCode(), word.get(0).textHash(),
                        () -> "the table is of other problems: write it anew with HonestyRun " + COUNT + " " + HonestyRun.FAST_SEED);
            }
            findings.addAll(Finding.of(p, word));
        }
    }

    private static String list(List<Finding> bad) {
        return bad.size() + " of " + findings.size() + ":\n" + bad.stream().limit(5).map(Finding::toString).collect(Collectors.joining("\n"));
    }

    /** Without this a wrong table could hide a wrong engine. */
    @Test
    void tableIsTheJudges() {
        int asked = 0;
        for (int number = 0; number < COUNT; number += 23) {
            Problem p = Problem.of(HonestyRun.FAST_SEED, number);
            if (p.potentialUnbounded()) {
                continue;
            }
            Judged stored = judged.get(number).get(0);
            Answer again = p.judge(stored.side(), DoubleExponential.Setting.FIRST);
            double coulomb = 1 / (4 * Math.PI * Judged.EPS0);
            for (int c = 0; c < 3; c++) {
                assertEquals(stored.value()[c], again.value()[c] * coulomb, 1.01 * stored.fieldError(), p::toString);
            }
            assertEquals(stored.value()[3], again.value()[3] * coulomb, 1.01 * stored.potentialError(), p::toString);
            asked++;
        }
        assertTrue(asked >= 10, "problems asked");
    }

    @Test
    void converges() {
        List<Finding> outside = findings.stream().filter(Finding::outside).toList();
        List<Finding> not = outside.stream().filter(f -> !f.isConverged()).toList();
        assertTrue(outside.size() > COUNT, "enough of them lie outside");
        assertTrue(not.size() <= 0.01 * outside.size(), () -> list(not));
    }

    @Test
    void statedErrorHolds() {
        List<Finding> converged = findings.stream().filter(f -> f.isConverged() && !f.expectedUnbounded()).toList();
        List<Finding> lies = converged.stream().filter(f -> f.isDishonest(1)).toList();
        assertTrue(lies.size() <= 0.001 * converged.size(), () -> list(lies));
        assertTrue(lies.stream().noneMatch(f -> f.isDishonest(10)), () -> list(lies));
    }

    @Test
    void convergedMeansWithinTolerance() {
        List<Finding> above = findings.stream().filter(Finding::exceedsTolerance).toList();
        assertTrue(above.isEmpty(), () -> list(above));
    }

    @Test
    void noNumberWhereThereIsNone() {
        List<Finding> wrong = findings.stream().filter(Finding::isWrongKind).toList();
        assertTrue(wrong.isEmpty(), () -> list(wrong));
    }

    @Test
    void statedErrorIsOfUse() {
        double[] loose = findings.stream().filter(f -> f.isConverged() && !f.expectedUnbounded()).mapToDouble(Finding::looseness).sorted().toArray();
        assertTrue(loose[loose.length / 2] <= 1e4, () -> "median of stated over true error " + loose[loose.length / 2]);
    }
}
