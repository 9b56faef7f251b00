package fieldwright.formula;

import java.util.ArrayDeque;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;

/** Straight-line code over blocks of nodes. Immutable; scratch blocks come from a pool of the calling thread. */
final class Program implements BlockFunction, BlockMap {
    /** One operation on whole blocks. */
    interface Kernel {
        /** {@code out[i]} from {@code registers[operands[k]][i]}, i < n. */
        void run(double[][] registers, int[] operands, double[] out, int n);

        /** True when {@code out[i]} depends on the i-th elements only, so that {@code out} may be an operand's block. */
        default boolean elementwise() {
            return true;
        }
    }

    record Step(Kernel kernel, int[] operands) {
    }

    private static final ThreadLocal<ArrayDeque<double[]>> POOL = ThreadLocal.withInitial(ArrayDeque::new);

    private final int arguments;
    private final double[][] constantBlocks;   // by value; null where it is not a constant that is read
    private final Step[] code;
    private final int[] targets;               // value each step makes
    private final int[] scratch;               // scratch block of that value; -1 - k: straight into result k
    private final int scratchBlocks;
    private final int[] results;
    private final int values;

    Program(int arguments, List<Step> steps, List<Double> constants, int... results) {
        this.arguments = arguments;
        this.results = results;
        this.values = steps.size();
        boolean[] used = used(steps, results);
        this.constantBlocks = new double[values][];
        List<Step> kept = new ArrayList<>();
        List<Integer> made = new ArrayList<>();
        for (int v = 0; v < values; v++) {
            if (used[v] && constants.get(v) != null) {
                constantBlocks[v] = new double[BLOCK];
                Arrays.fill(constantBlocks[v], constants.get(v));
            } else if (used[v] && steps.get(v) != null) {
                kept.add(steps.get(v));
                made.add(v);
            }
        }
        this.code = kept.toArray(new Step[0]);
        this.targets = made.stream().mapToInt(Integer::intValue).toArray();
        this.scratch = new int[code.length];
        this.scratchBlocks = assignScratch();
    }

    private static boolean[] used(List<Step> steps, int[] results) {
        boolean[] used = new boolean[steps.size()];
        for (int result : results) {
            used[result] = true;
        }
        for (int v = steps.size() - 1; v >= 0; v--) {
            if (used[v] && steps.get(v) != null) {
                for (int o : steps.get(v).operands()) {
                    used[o] = true;
                }
            }
        }
        return used;
    }

    /** A block is free again after the last step that reads it; an elementwise step may write over its own operand. */
    private int assignScratch() {
        int[] lastRead = new int[values];
        Arrays.fill(lastRead, -1);
        for (int i = 0; i < code.length; i++) {
            for (int o : code[i].operands()) {
                lastRead[o] = i;
            }
        }
        int[] blockOf = new int[values];
        Arrays.fill(blockOf, -1);
        ArrayDeque<Integer> free = new ArrayDeque<>();
        int blocks = 0;
        for (int i = 0; i < code.length; i++) {
            List<Integer> ending = new ArrayList<>();
            for (int o : code[i].operands()) {
                if (blockOf[o] >= 0 && lastRead[o] == i && !ending.contains(blockOf[o])) {
                    ending.add(blockOf[o]);
                }
            }
            if (code[i].kernel().elementwise()) {
                free.addAll(ending);
            }
            int straight = resultOf(targets[i]);
            if (straight >= 0 && (results.length > 1 || code[i].kernel().elementwise())) {
                scratch[i] = -1 - straight;
            } else {
                scratch[i] = free.isEmpty() ? blocks++ : free.pop();
                blockOf[targets[i]] = scratch[i];
            }
            if (!code[i].kernel().elementwise()) {
                free.addAll(ending);
            }
        }
        return blocks;
    }

    /** Which result a value is, or −1. */
    private int resultOf(int value) {
        for (int k = 0; k < results.length; k++) {
            if (results[k] == value) {
                return k;
            }
        }
        return -1;
    }

    @Override
    public int arguments() {
        return arguments;
    }

    @Override
    public void evaluate(double[][] args, int n, double[] out) {
        evaluate(args, n, new double[][] {out});
    }

    @Override
    public void evaluate(double[][] args, int n, double[][] out) {
        if (n > BLOCK || args.length < arguments) {
            throw new IllegalArgumentException("block of " + n + " nodes and " + args.length + " arguments");
        }
        ArrayDeque<double[]> pool = POOL.get();
        double[][] blocks = new double[scratchBlocks][];
        for (int i = 0; i < scratchBlocks; i++) {
            double[] block = pool.poll();
            blocks[i] = block != null ? block : new double[BLOCK];
        }
        double[][] registers = constantBlocks.clone();
        System.arraycopy(args, 0, registers, 0, arguments);
        for (int i = 0; i < code.length; i++) {
            double[] target = scratch[i] < 0 ? out[-1 - scratch[i]] : blocks[scratch[i]];
            code[i].kernel().run(registers, code[i].operands(), target, n);
            registers[targets[i]] = target;
        }
        for (int k = 0; k < results.length; k++) {
            if (registers[results[k]] != out[k]) {
                System.arraycopy(registers[results[k]], 0, out[k], 0, n);
            }
        }
        for (double[] block : blocks) {   // after an exception they are left to the collector
            pool.push(block);
        }
    }
}
