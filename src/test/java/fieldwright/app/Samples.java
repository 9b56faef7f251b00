package fieldwright.app;

import fieldwright.output.Axis;
import fieldwright.output.CellOutcome;
import fieldwright.output.Display;
import fieldwright.output.Output;
import fieldwright.output.RunOutcome;
import fieldwright.output.Series;
import fieldwright.output.Status;
import fieldwright.output.Value;
import fieldwright.sheet.Cell;
import fieldwright.sheet.InputEntry;
import fieldwright.sheet.Sheet;
import fieldwright.sheet.SheetException;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Set;
import java.util.stream.IntStream;

/** A sheet, and what a run of it could give where a test needs no real one: numbers from a formula of one line. */
final class Samples {
    static final String SILO = """
            fieldwright sheet 1
            title: Dust cloud in pellet silo 3: field at the roof
            project: Tarnwick pellet works
            number: TW-S3-07
            revision: B
            made: RO, 14 March

            :: note
            The headspace above the heap carries charged dust. How strong is the field at the *roof centre*? The roof is
            taken as a ground plane, which for charge of one sign bounds the closed silo from above: {E_roof} there.

            :: input
            R_s   = 1.80 m ± 0.02 m    | inner radius             | drawing TW-S3-02
            H     = 4.00 m ± 0.05 m    | headspace at 60 % fill   | level record
            rho_0 = 2.1 uC/m^3 ± 25 %  | charge density on axis   | mill test 14
            k     = 0.6                | radial fall-off          |

            :: working cloud
            // the charged headspace, earthed roof above it
            var headspace = cylindrical().rho("0", "R_s").phi("0", "2*pi").z("0", "H");
            var cloud = volumeCharge(headspace, "rho_0*(1 - k*(rho/R_s)^2)").under(groundPlane("z", "H"));
            var Q = cloud.totalCharge();
            var E_roof = cloud.electricField(at("0 m", "0 m", "H")).onSide("-z").magnitude();

            :: derive
            Q_hand = pi*rho_0*R_s^2*H*(1 - k/2)     | the charge by hand
            E_slab = rho_0*(H + 1 m)/eps0 in kV/m   | upper bound: endless slab

            :: working judgement
            check("charge by hand", Q, Q_hand, 1e-9);
            check("endless slab within 5 %", E_roof, E_slab, 0.05);
            assess("breakdown of air", E_roof, airBreakdown(), 3);
            """;

    private Samples() { }

    static Value.Scalar scalar(double v, Double num, Double tol, String unit) {
        return new Value.Scalar(v, num, tol, unit, null, Status.CONVERGED, "");
    }

    /** What a run of this text gives; {@code Q} is proportional to rho_0 and H, so that an edit can be seen. */
    static RunOutcome outcome(String text) {
        try {
            return outcome(Sheet.parse(text));
        } catch (SheetException e) {
            return RunOutcome.refused(new Output.Problem(e.line(), 0, e.getMessage()));
        }
    }

    private static RunOutcome outcome(Sheet sheet) {
        List<CellOutcome> cells = new ArrayList<>();
        double h = number(sheet, "H", 4);
        double rho = number(sheet, "rho_0", 2.1);
        for (int i = 0; i < sheet.cells().size(); i++) {
            Cell cell = sheet.cells().get(i);
            cells.add(outcome(i + 1, cell, h, rho));
        }
        return new RunOutcome(cells, List.of());
    }

    private static double number(Sheet sheet, String name, double otherwise) {
        return sheet.cells().stream().filter(c -> c.kind() == Cell.Kind.INPUT).flatMap(c -> c.inputs().stream())
                .filter(InputEntry.class::isInstance).map(InputEntry.class::cast).filter(e -> e.name().equals(name))
                .flatMap(e -> InputValue.of(e.definition()).stream()).mapToDouble(v -> Double.parseDouble(v.number())).findFirst()
                .orElse(otherwise);
    }

    private static CellOutcome outcome(int number, Cell cell, double h, double rho) {
        double q = 59.8511e-6 * h / 4 * rho / 2.1;
        double e = 276969.0 * h / 4 * rho / 2.1;
        List<Output> outputs = new ArrayList<>();
        Set<String> reads = Set.of();
        if (cell.source().contains("fail()")) {
            int line = 1 + (int) cell.source().substring(0, cell.source().indexOf("fail()")).chars().filter(c -> c == '\n').count();
            outputs.add(new Output.Problem(cell.lineOf(line), number, "no quantity 'lamda'. Closest defined name: 'lambda'."));
            return new CellOutcome(number, CellOutcome.State.FAILED, outputs, Set.of());
        }
        if (cell.kind() == Cell.Kind.WORKING && cell.source().contains("totalCharge")) {
            outputs.add(new Output.Assumption("the roof is an earthed plane z = H; nothing else stands around"));
            outputs.add(new Output.Result("Q", "Q", scalar(q, 3e-20, 0.284 * q, "C")));
            outputs.add(new Output.Result("E_roof", "E_{\\mathrm{roof}}", scalar(e, 2e-5, 0.29 * e, "V/m")));
            double[] z = IntStream.rangeClosed(0, 60).mapToDouble(i -> h * i / 60).toArray();
            double[] f = Arrays.stream(z).map(v -> e * (0.35 - v / h * 0.9 + 1.55 * v * v / h / h)).map(Math::abs).toArray();
            outputs.add(new Output.Plot("", new Axis("height on the axis, z", "m"), new Axis("|E|", "V/m"),
                    List.of(new Series("|E|", z, f, null)), List.of()));
            reads = Set.of("R_s", "H", "rho_0", "k");
        } else if (cell.kind() == Cell.Kind.DERIVE) {
            outputs.add(new Output.Result("Q_hand", "Q_{\\mathrm{hand}}", scalar(q, 1e-20, 0.284 * q, "C")));
            outputs.add(new Output.Result("E_slab", "E_{\\mathrm{slab}}",
                    scalar(4.28 * e, 1e-9, null, "V/m").withDisplay(new Display("kV/m", 1e3))));
            reads = Set.of("R_s", "H", "rho_0", "k");
        } else if (cell.source().contains("assess(")) {
            outputs.add(new Output.Check("charge by hand", true, "agrees to 2·10⁻¹⁰", 2e-10, 1e-9, ""));
            outputs.add(new Output.Check("endless slab within 5 %", false, "3.3 times", 3.3, 0.05, ""));
            outputs.add(new Output.Assessment("breakdown of air", true, scalar(e, 2e-5, null, "V/m"), scalar(1.26 * e, 2e-5, null, "V/m"),
                    scalar(3e6, 0.0, null, "V/m"), 3, 3e6 / (1.26 * e), "common practice, plain gap, 1 bar",
                    "3 MV/m holds for a plain gap; at a projection discharge starts far below. Ignition hazard: local rules and a "
                            + "licensed specialist decide."));
            reads = Set.of("Q", "E_roof", "Q_hand", "E_slab");
        } else if (cell.kind() == Cell.Kind.NOTE && cell.source().contains("{E_roof}")) {
            reads = Set.of("E_roof");
        }
        return new CellOutcome(number, CellOutcome.State.WORKED, outputs, reads);
    }
}
