package fieldwright.field;

import java.util.Random;

import fieldwright.quantity.Place;
import fieldwright.quantity.Vector;

/** A quick look at the items without JMH: microseconds from nothing, with panels kept, evaluations. */
final class ItemsLook {
    public static void main(String[] args) {
        double logNew = 0;
        double logKept = 0;
        for (Item item : Item.POINTS) {
            if (args.length > 1 && !item.name().equals(args[1])) {
                continue;
            }
            Item.Parsed parsed = item.parsed(args.length > 0 ? Integer.parseInt(args[0]) : 0);
            double fresh = args.length > 2 && args[2].equals("kept") ? 1 : time(parsed, false);
            double kept = args.length > 2 && args[2].equals("new") ? 1 : time(parsed, true);
            FieldSolver solver = FieldSolver.of(parsed.source(), Accuracy.PANELS);
            Vector v = solver.electricField(parsed.place(0, 0));
            logNew += Math.log(item.peer / fresh);
            logKept += Math.log(item.peer / kept);
            System.out.printf("%-3s new %8.1f us  x%8.1f   kept %8.1f us  x%8.1f   evaluations %d %s%n", item, fresh * 1e6, item.peer / fresh,
                kept * 1e6, item.peer / kept, solver.evaluations(), v.standing().isConverged() ? "" : v.standing());
        }
        if (args.length < 2 || args[1].equals("F")) {
            MapBench.map(Item.F.parsed(0));
            MapBench.map(Item.F.parsed(0));
            long start = cpu();
            sink += MapBench.map(Item.F.parsed(0));
            System.out.printf("F   map %8.3f s%n", (cpu() - start) * 1e-9);
        }
        System.out.printf("geometric mean: new x%.1f kept x%.1f%n", Math.exp(logNew / 11), Math.exp(logKept / 11));
    }

    static double sink;

    private static final java.lang.management.ThreadMXBean CLOCK = java.lang.management.ManagementFactory.getThreadMXBean();

    /** Processor time of this thread, ns: what other work on the machine takes is not counted. */
    private static long cpu() {
        return CLOCK.getCurrentThreadCpuTime();
    }

    private static double time(Item.Parsed parsed, boolean kept) {
        Random random = new Random(1);
        FieldSolver solver = FieldSolver.of(parsed.source(), Accuracy.PANELS);
        double best = Double.POSITIVE_INFINITY;
        for (int round = 0; round < 12; round++) {
            int count = 0;
            long start = cpu();
            while (cpu() - start < 150_000_000) {
                Place place = parsed.place(2 * random.nextDouble() - 1, 2 * random.nextDouble() - 1);
                FieldSolver s = kept ? solver : FieldSolver.of(parsed.source(), Accuracy.PANELS);
                sink += s.electricField(place).x().si();
                count++;
            }
            best = Math.min(best, (cpu() - start) * 1e-9 / count);
        }
        return best;
    }
}
