package fieldwright.field;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.BufferedReader;
import java.io.InputStreamReader;
import java.nio.charset.StandardCharsets;
import java.util.List;
import java.util.Map;

import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.EnumSource;

import fieldwright.formula.Constants;
import fieldwright.quantity.Amount;
import fieldwright.quantity.Place;
import fieldwright.quantity.Vector;

/**
 * The work items of the speed table against values worked to 30 digits with mpmath by two routes (own computation): fast is nothing
 * without right. Bare integrals, so times 1/(4π eps0).
 */
class WorkItemsTest {
    private static final double SCALE = 1 / (4 * Math.PI * Constants.EPS0);
    private static final double NOT_ASKED = Double.NaN;

    private static final Map<Item, double[]> REFERENCE = Map.ofEntries(
        Map.entry(Item.A, new double[] {42.001155780190503389, -148.0549969012411036, -9.5366103519578599776}),
        Map.entry(Item.B1, new double[] {NOT_ASKED, NOT_ASKED, 1.0144423024112047515}),
        Map.entry(Item.B2, new double[] {NOT_ASKED, NOT_ASKED, 4.6670088532124423482}),
        Map.entry(Item.B3, new double[] {NOT_ASKED, NOT_ASKED, 5.6020187179846460313}),
        Map.entry(Item.B4, new double[] {NOT_ASKED, NOT_ASKED, 5.7060182423406414001}),
        Map.entry(Item.B5, new double[] {NOT_ASKED, NOT_ASKED, 5.7176869365995107297}),
        Map.entry(Item.C, new double[] {-2.0488671680262283695, NOT_ASKED, 7.5137457751148939088}),
        Map.entry(Item.D1, new double[] {0.10503650072781841357, 0, 0.59379639912978756608}),
        Map.entry(Item.D2, new double[] {1.097898822915598825, 0, -0.44162101358693521213}),
        Map.entry(Item.D3, new double[] {0.74318296651781420481, 0, 2.5686395353226394039}),
        Map.entry(Item.E, new double[] {0.32023734737446318155, 0.17187948861839938375, -0.036089762692556559735}));

    @ParameterizedTest
    @EnumSource(value = Item.class, names = "F", mode = EnumSource.Mode.EXCLUDE)
    void item(Item item) {
        Item.Parsed parsed = item.parsed(0);
        Vector e = FieldSolver.electricField(parsed.source(), parsed.place(0, 0), Accuracy.PANELS);
        check(e, REFERENCE.get(item), 1e-9);
    }

    /** Rows 33 and 66 of the map lie on the end faces. */
    @Test
    void map() throws Exception {
        FieldSolver solver = FieldSolver.of(Item.F.parsed(0).source(), Accuracy.PANELS.withRelative(1e-6));
        List<String> rows;
        try (var in = new BufferedReader(new InputStreamReader(WorkItemsTest.class.getResourceAsStream("cylinder-map.tsv"), StandardCharsets.UTF_8))) {
            rows = in.lines().filter(l -> l.matches("[0-9].*")).toList();
        }
        assertEquals(40, rows.size());
        for (String row : rows) {
            String[] f = row.split("\\s+");
            Vector e = solver.electricField(new Place(-2 + 4.0 * Integer.parseInt(f[0]) / 99, 0.17, -1 + 3.0 * Integer.parseInt(f[1]) / 99));
            check(e, new double[] {Double.parseDouble(f[4]), Double.parseDouble(f[5]), Double.parseDouble(f[6])}, 1e-6);
        }
    }

    private static void check(Vector e, double[] expected, double tolerance) {
        assertTrue(e.standing().isConverged(), e.standing()::toString);
        double size = 0;
        double error = 0;
        double stated = 0;
        Amount[] c = {e.x(), e.y(), e.z()};
        for (int a = 0; a < 3; a++) {
            if (!Double.isNaN(expected[a])) {
                double difference = c[a].si() / SCALE - expected[a];
                size += expected[a] * expected[a];
                error += difference * difference;
                stated += c[a].error() * c[a].error();
            }
        }
        assertTrue(Math.sqrt(error) <= tolerance * Math.sqrt(size), "error " + Math.sqrt(error / size));
        assertTrue(Math.sqrt(error) <= Math.sqrt(stated) / SCALE + 1e-16 * Math.sqrt(size), "error " + Math.sqrt(error) + " above stated "
            + Math.sqrt(stated) / SCALE);
    }
}
