package fieldwright.session;

import static fieldwright.session.SheetRunnerTest.sheet;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.output.Output;
import fieldwright.output.RunOutcome;
import java.util.List;
import org.junit.jupiter.api.AfterAll;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;

class LibraryTest {
    private static SheetRunner runner;

    @BeforeAll
    static void start() {
        runner = new SheetRunner();
    }

    @AfterAll
    static void end() {
        runner.close();
    }

    private static RunOutcome work(String use, String... cells) {
        return runner.work(sheet(cells).replaceFirst("\n", "\nuse: " + use + "\n"), WorkOptions.FULL, progress -> { });
    }

    private static List<String> problems(RunOutcome outcome) {
        return outcome.problems().stream().map(Output.Problem::text).toList();
    }

    /** Every closed form of the shipped library against the integral over the charge it belongs to. */
    @Test
    void closedFormsAgreeWithIntegration() {
        RunOutcome outcome = work("closed-forms",
                "input\nQ = 3 nC\na_1 = 0.4 m\nL = 1.2 m\nh = 0.7 m\nsigma_1 = 2 uC/m^2\nlambda_1 = 5 nC/m",
                """
                working
                var up = at("0", "0", "h");
                var ring = lineCharge(ring("a_1"), "Q/(2*pi*a_1)").inFreeSpace();
                check("ring, field", ring.electricField(up).z(), calc("closedForms.E_ring(Q, a_1, h)"), 1e-8);
                check("ring, potential", ring.potential(up), calc("closedForms.V_ring(Q, a_1, h)"), 1e-8);
                var disc = surfaceCharge(disc("a_1"), "sigma_1").inFreeSpace();
                check("disc, field", disc.electricField(up).z(), calc("closedForms.E_disc(sigma_1, a_1, h)"), 1e-8);
                check("disc, potential", disc.potential(up), calc("closedForms.V_disc(sigma_1, a_1, h)"), 1e-8);
                var rod = lineCharge(rod(at("0", "0", "-L/2"), at("0", "0", "L/2")), "Q/L").inFreeSpace();
                check("rod, middle", rod.electricField(at("h", "0", "0")).x(), calc("closedForms.E_rod_middle(Q, L, h)"), 1e-8);
                check("rod, end", rod.electricField(up).z(), calc("closedForms.E_rod_end(Q, L, h)"), 1e-8);
                var ball = volumeCharge(ball("a_1"), "3*Q/(4*pi*a_1^3)").inFreeSpace();
                check("ball, outside", ball.electricField(up).z(), calc("closedForms.E_sphere(Q, h)"), 1e-8);
                check("ball, potential", ball.potential(up), calc("closedForms.V_sphere(Q, h)"), 1e-8);
                check("ball, inside", ball.electricField(at("0", "0", "a_1/2")).z(), calc("closedForms.E_ball_inside(Q, a_1, a_1/2)"), 1e-8);
                check("line", endlessLine("lambda_1").inFreeSpace().electricField(at("h", "0", "0")).x(), calc("closedForms.E_line(lambda_1, h)"), 1e-8);
                check("sheet", endlessPlane("sigma_1").inFreeSpace().electricField(up).z(), calc("closedForms.E_sheet(sigma_1)"), 1e-8);
                """);
        assertEquals(List.of(), problems(outcome));
        List<Output.Check> checks = outcome.all(Output.Check.class);
        assertEquals(11, checks.size());
        assertEquals(List.of(), checks.stream().filter(check -> !check.passed()).toList());
    }

    @Test
    void formulasOfALibraryAreUsedInDeriveLinesAndInJava() {
        RunOutcome outcome = work("closed-forms", "input\nQ = 3 nC ± 0.1 nC", "derive\nE_1 = closedForms.E_ring(Q, 0.4 m, 0.7 m)",
                "working\nvar E_2 = closedForms.E_ring(Q, \"0.4 m\", Amount.of(0.7, \"m\"));\ncheck(\"same\", E_1, E_2, 1e-12);");
        assertEquals(List.of(), problems(outcome));
        assertTrue(outcome.all(Output.Check.class).get(0).passed());
        assertTrue(outcome.cells().get(2).reads().contains("closedForms.E_ring"));
        assertEquals("E_{1}=E_{\\mathrm{ring}}\\left(Q,\\,0.4\\,\\mathrm{m},\\,0.7\\,\\mathrm{m}\\right)",
                outcome.all(Output.Typeset.class).get(0).latex());
    }

    @Test
    void mistakesInTheUseOfALibrary() {
        assertEquals(List.of("line 2: use: there is no library sheet 'closed-form'. Correct its name, or take it out of the line."),
                problems(work("closed-form", "derive\na = 1")));
        assertEquals(List.of("cell 1, line 5: 'closedForms' is the name of a library sheet that this sheet uses. Choose another name here."),
                problems(work("closed-forms", "input\nclosedForms = 1")));
        assertTrue(problems(work("closed-forms", "derive\na = closedForms.E_rinng(1 C, 1 m, 1 m)")).get(0)
                .contains("Closest defined name: 'closedForms.E_ring'"));
        assertTrue(problems(work("closed-forms", "derive\na = closedForms.E_sheet(1 C)")).get(0).startsWith("cell 1, line 5: "));
        assertTrue(problems(work("", "derive\na = closedForms.E_sheet(1 (C/m^2))")).get(0).contains("no quantity 'closedForms.E_sheet'"));
    }
}
