package fieldwright.field.honesty;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;

/**
 * The judge's word on one place, SI: V/m and V; error from two settings of the judge, magnitude the integral of the absolute value.
 * Side 0, or +1 and −1 for the two one-sided values of a charged surface.
 */
record Judged(int number, int side, double[] value, double fieldError, double potentialError, double fieldMagnitude,
        double potentialMagnitude, int textHash) {
    /** CODATA 2022, F/m, written here again so that the engine's own constant is judged too. */
    static final double EPS0 = 8.8541878188e-12;
    private static final double COULOMB = 1 / (4 * Math.PI * EPS0);

    static List<Judged> of(Problem p) {
        List<Judged> both = new ArrayList<>();
        for (int side : p.sided() ? new int[] {1, -1} : new int[] {0}) {
            Answer a = p.judge(side, DoubleExponential.Setting.FIRST);
            Answer b = p.judge(side, DoubleExponential.Setting.SECOND);
            double[] value = new double[4];
            for (int c = 0; c < 4; c++) {
                value[c] = b.value()[c] * COULOMB;
            }
            double field = COULOMB * (2 * a.fieldDifference(b) + 16 * Answer.EPS * b.fieldMagnitude());
            // On the charge the place lies to rounding only, and the field changes over the thickness; a ray through a thin body is
            // the difference of two distances.
            double thin = p.gap() == 0 ? 8 : p.dimension() == 3 && p.gap() < 10 * p.size() ? 4 : 0;
            double rounding = thin * Answer.EPS * p.size() / p.thickness();
            field += rounding * COULOMB * b.fieldMagnitude();
            double potential = COULOMB * (2 * Math.abs(a.value()[3] - b.value()[3])
                    + (16 * Answer.EPS + (p.dimension() == 3 ? rounding : 0)) * b.magnitude()[3]);
            both.add(new Judged(p.number(), side, value, field, potential, COULOMB * b.fieldMagnitude(), COULOMB * b.magnitude()[3],
                    p.toString().hashCode()));
        }
        return both;
    }

    double field() {
        return Math.sqrt(value[0] * value[0] + value[1] * value[1] + value[2] * value[2]);
    }

    String line() {
        return number + "," + side + "," + value[0] + "," + value[1] + "," + value[2] + "," + value[3] + "," + fieldError + ","
                + potentialError + "," + fieldMagnitude + "," + potentialMagnitude + "," + textHash;
    }

    static Judged parse(String line) {
        String[] f = line.split(",");
        double[] d = new double[f.length];
        for (int i = 2; i < f.length - 1; i++) {
            d[i] = Double.parseDouble(f[i]);
        }
        return new Judged(Integer.parseInt(f[0]), Integer.parseInt(f[1]), new double[] {d[2], d[3], d[4], d[5]}, d[6], d[7], d[8], d[9],
                Integer.parseInt(f[f.length - 1]));
    }

    /** Lines that begin with # are remarks. */
    static Map<Integer, List<Judged>> read(List<String> lines) {
        Map<Integer, List<Judged>> all = new HashMap<>();
        for (String line : lines) {
            if (!line.isBlank() && !line.startsWith("#")) {
                Judged j = parse(line);
                List<Judged> sides = all.computeIfAbsent(j.number, n -> new ArrayList<>());
                sides.removeIf(old -> old.side == j.side);
                sides.add(j);
            }
        }
        return all;
    }

    static Map<Integer, List<Judged>> read(Path file) {
        try {
            return Files.exists(file) ? read(Files.readAllLines(file, StandardCharsets.UTF_8)) : new HashMap<>();
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }
}
