package fieldwright.field.honesty;

import java.io.IOException;
import java.io.PrintWriter;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardOpenOption;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.TreeMap;
import java.util.function.Function;

/**
 * The full run: {@code HonestyRun COUNT [SEED] [TABLE] [FIRST]} puts COUNT random problems from number FIRST on to engine and judge and prints the histogram of
 * stated over true error, by decades, by kind and by place, the worst ten with reproducing text, and what was not answered.
 * TABLE keeps the judge's values from run to run (default target/honesty-SEED.csv).
 */
public final class HonestyRun {
    static final long SEED = 1;
    private static final int DECADES = 9;
    private static final int LISTED = 25;

    private HonestyRun() { }

    public static void main(String[] args) throws IOException {
        Locale.setDefault(Locale.ROOT);
        int count = args.length > 0 ? Integer.parseInt(args[0]) : 5000;
        long seed = args.length > 1 ? Long.parseLong(args[1]) : SEED;
        Path table = Path.of(args.length > 2 ? args[2] : "target/honesty-" + seed + ".csv");
        int first = args.length > 3 ? Integer.parseInt(args[3]) : 0;
        long start = System.nanoTime();
        List<Finding> findings = run(first, count, seed, table);
        report(findings);
        System.out.printf("%d problems, seed %d, %.0f s%n", count, seed, (System.nanoTime() - start) * 1e-9);
    }

    private static List<Finding> run(int first, int count, long seed, Path table) throws IOException {
        Map<Integer, List<Judged>> known = new HashMap<>(Judged.read(table));
        List<Finding> findings = new ArrayList<>();
        if (table.getParent() != null) {
            Files.createDirectories(table.getParent());
        }
        boolean fresh = !Files.exists(table);
        try (PrintWriter out = new PrintWriter(Files.newBufferedWriter(table, StandardCharsets.UTF_8, StandardOpenOption.CREATE,
                StandardOpenOption.APPEND))) {
            if (fresh) {
                out.println("# Values of the honesty suite's own judge (DoubleExponential and the judges beside it), not published ones; seed "
                        + seed + ", worked by HonestyRun.");
                out.println("# number, side, Ex, Ey, Ez (V/m), V (V), error of E, error of V (from two settings of the judge), magnitude of E, "
                        + "of V (integral of the absolute value), hash of the problem's text");
            }
            for (int number = first; number < first + count; number++) {
                Problem p = Problem.of(seed, number);
                List<Judged> judged = null;
                if (!p.potentialUnbounded()) {
                    judged = known.get(number);
                    if (judged == null || judged.get(0).textHash() != p.toString().hashCode()) {
                        judged = Judged.of(p);
                        judged.forEach(j -> out.println(j.line()));
                        out.flush();
                    }
                }
                findings.addAll(Finding.of(p, judged));
            }
        }
        return findings;
    }

    static void report(List<Finding> findings) {
        System.out.println("Stated over true error by decades (columns: floor of log10); 'lie' is true above stated");
        histogram("quantity", findings, Finding::quantity);
        histogram("kind", findings, f -> f.problem().kind());
        histogram("place", findings, f -> f.problem().where().toString());
        long[] evaluations = findings.stream().mapToLong(Finding::evaluations).sorted().toArray();
        System.out.printf("evaluations: median %d, 90 %% %d, 99 %% %d, most %d%n", evaluations[evaluations.length / 2],
                evaluations[evaluations.length * 9 / 10], evaluations[evaluations.length * 99 / 100], evaluations[evaluations.length - 1]);
        double[] loose = findings.stream().filter(Finding::isJudged).mapToDouble(Finding::looseness).sorted().toArray();
        System.out.printf("median of stated over true: %.3g%n", loose[loose.length / 2]);
        long finite = findings.stream().filter(f -> !f.expectedUnbounded()).count();
        long converged = findings.stream().filter(f -> !f.expectedUnbounded() && f.isConverged()).count();
        long judged = findings.stream().filter(Finding::isJudged).count();
        long lies = findings.stream().filter(f -> f.isDishonest(1)).count();
        System.out.printf("converged %d of %d (%.2f %%), judged %d, of those within the stated error %.3f %%, above ten times %d, above the tolerance %d%n",
                converged, finite, 100.0 * converged / finite, judged, 100.0 * (judged - lies) / judged,
                findings.stream().filter(f -> f.isDishonest(10)).count(), findings.stream().filter(Finding::exceedsTolerance).count());
        list("true error above stated, worst first", findings.stream().filter(f -> f.isDishonest(1))
                .sorted(Comparator.comparingDouble(Finding::excess).reversed()).toList());
        list("converged above the tolerance asked", findings.stream().filter(Finding::exceedsTolerance)
                .sorted(Comparator.comparingDouble((Finding f) -> f.trueError() / f.allowed()).reversed()).toList());
        list("wrong kind of answer", findings.stream().filter(Finding::isWrongKind).toList());
        list("not converged outside all charge", findings.stream()
                .filter(f -> f.outside() && f.outcome() == Finding.Outcome.NOT_CONVERGED).toList());
        list("not judged: the judge's own error is above the stated one", findings.stream().filter(Finding::isUnjudged).toList());
        list("not converged elsewhere, finite", findings.stream()
                .filter(f -> !f.outside() && !f.expectedUnbounded() && f.outcome() == Finding.Outcome.NOT_CONVERGED).toList());
    }

    private static void list(String title, List<Finding> findings) {
        System.out.printf("%n%s: %d%n", title, findings.size());
        findings.stream().limit(LISTED).forEach(f -> System.out.println("  " + f));
    }

    private static void histogram(String what, List<Finding> findings, Function<Finding, String> key) {
        Map<String, List<Finding>> groups = new TreeMap<>();
        for (Finding f : findings) {
            groups.computeIfAbsent(key.apply(f), k -> new ArrayList<>()).add(f);
        }
        groups.put("~all", findings);
        System.out.printf("%-16s %6s %6s %5s %5s %5s %5s |", what, "asked", "conv", "not", "unbd", "wrong", "unjd");
        System.out.printf(" %5s %5s", ">10lie", "lie");
        for (int d = 0; d < DECADES; d++) {
            System.out.printf(" %5d", d);
        }
        System.out.println("+ | evaluations");
        groups.forEach((name, group) -> {
            long[] bins = new long[DECADES + 2];
            for (Finding f : group) {
                if (f.isJudged()) {
                    bins[bin(f)]++;
                }
            }
            System.out.printf("%-16s %6d %6d %5d %5d %5d %5d |", name, group.size(), count(group, Finding.Outcome.CONVERGED),
                    count(group, Finding.Outcome.NOT_CONVERGED), count(group, Finding.Outcome.UNBOUNDED),
                    group.stream().filter(Finding::isWrongKind).count(), group.stream().filter(Finding::isUnjudged).count());
            for (int b = 0; b < bins.length; b++) {
                System.out.printf(b == 0 ? " %6d" : " %5d", bins[b]);
            }
            System.out.printf("  | %.0f%n", group.stream().mapToInt(Finding::evaluations).average().orElse(0));
        });
    }

    private static int bin(Finding f) {
        if (f.excess() > 1) {
            return f.excess() > 10 ? 0 : 1;
        }
        return 2 + (int) Math.max(0, Math.min(DECADES - 1, Math.floor(Math.log10(f.looseness()))));
    }

    private static long count(List<Finding> group, Finding.Outcome outcome) {
        return group.stream().filter(f -> f.outcome() == outcome).count();
    }
}
