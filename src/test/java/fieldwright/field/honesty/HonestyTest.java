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
 * The stated errors are true, over the first problems of the full run. The judge's values lie in a table (see its header), for
 * speed; a sample of them is worked afresh. The same over thousands, with a histogram: {@link HonestyRun}. Limits are those of the
 * full run, but for one problem each, which so few cannot tell from one in a thousand.
 */
class HonestyTest {
    private static final int COUNT = 150;

    private static Map<Integer, List<Judged>> judged;
    private static List<Finding> findings;

    @BeforeAll
    static void ask() throws IOException {
        try (InputStream in = HonestyTest.class.getResourceAsStream("judged.csv")) {
            judged = Judged.read(new String(in.readAllBytes(), StandardCharsets.UTF_8).lines().toList());
        }
        findings = new ArrayList<>();
        for (int number = 0; number < COUNT; number++) {
            Problem p = Problem.of(HonestyRun.SEED, number);
            List<Judged> word = judged.get(number);
            if (!p.potentialUnbounded()) {
                assertEquals(p.toString().hashCode(), word.get(0).textHash(),
                        () -> "the table is of other problems: write it anew with HonestyRun " + COUNT);
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
        for (int number = 0; number < COUNT; number += 11) {
            Problem p = Problem.of(HonestyRun.SEED, number);
            if (p.potentialUnbounded() || p.dimension() == 3) {
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
        assertTrue(asked >= 5, "problems asked");
    }

    @Test
    void nearlyAllConverge() {
        List<Finding> finite = findings.stream().filter(f -> !f.expectedUnbounded()).toList();
        List<Finding> not = finite.stream().filter(f -> !f.isConverged()).toList();
        assertTrue(finite.size() > COUNT, "enough of them have a value");
        assertTrue(not.size() <= 0.02 * finite.size(), () -> list(not));
    }

    @Test
    void nearlyAllAreJudged() {
        List<Finding> not = findings.stream().filter(Finding::isUnjudged).toList();
        assertTrue(not.size() <= 0.05 * findings.size(), () -> list(not));
    }

    @Test
    void statedErrorHolds() {
        List<Finding> lies = findings.stream().filter(f -> f.isDishonest(1)).toList();
        assertTrue(lies.size() <= 1, () -> list(lies));
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
        double[] loose = findings.stream().filter(Finding::isJudged).mapToDouble(Finding::looseness).sorted().toArray();
        assertTrue(loose[loose.length / 2] <= 2e3, () -> "median of stated over true error " + loose[loose.length / 2]);
    }
}
