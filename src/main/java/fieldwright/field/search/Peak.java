package fieldwright.field.search;

import fieldwright.field.FieldSolver;
import fieldwright.geometry.Chart;
import fieldwright.geometry.Region;
import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Place;
import fieldwright.quantity.Standing;
import fieldwright.quantity.Stop;
import fieldwright.quantity.Units;
import fieldwright.quantity.Vector;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.PriorityQueue;
import org.apache.commons.math3.analysis.UnivariateFunction;
import org.apache.commons.math3.optim.InitialGuess;
import org.apache.commons.math3.optim.MaxEval;
import org.apache.commons.math3.optim.PointValuePair;
import org.apache.commons.math3.optim.SimpleBounds;
import org.apache.commons.math3.optim.nonlinear.scalar.GoalType;
import org.apache.commons.math3.optim.nonlinear.scalar.ObjectiveFunction;
import org.apache.commons.math3.optim.nonlinear.scalar.noderiv.BOBYQAOptimizer;
import org.apache.commons.math3.optim.univariate.BrentOptimizer;
import org.apache.commons.math3.optim.univariate.SearchInterval;
import org.apache.commons.math3.optim.univariate.UnivariateObjectiveFunction;
import org.apache.commons.math3.optim.univariate.UnivariatePointValuePair;

/**
 * The largest field strength found over a line, surface or volume; on a charged surface the larger side counts.
 *
 * <p>Branch and bound: the region's own box is cut where the field may still be larger than the best found. A cell's bound is its
 * largest sample plus the change from sample to sample along each of its axes, which is twice what a straight slope can add. So the
 * bound holds for a field that is resolved by the first samples, 1/32 (line), 1/12 (surface), 1/6 (volume) of the region apart; a peak
 * much narrower than that and far from every sample can be missed. The best place is then polished (Brent, or Powell's BOBYQA).
 *
 * @param place     where it was found
 * @param magnitude V/m; its error contains what the search left open. Not converged when the limit of evaluations came first,
 *                  unbounded where the field grows without bound
 * @param upTo      no larger value is expected anywhere in the region, V/m
 */
public record Peak(Place place, Amount magnitude, double upTo, int evaluations) {
    /** Search left open, relative to the peak. */
    public static final double WITHIN = 1e-5;
    public static final int LIMIT = 20_000;
    /** Halvings of one axis before a cell counts as a point, and how far back to look whether the field still grows there. */
    private static final int DEEPEST = 26;
    private static final int BACK = 10;
    private static final double GROWTH = 1.02;

    /**
     * Errors: AuthorException for a region that is a point or endless.
     *
     * @param within tolerance of the search, relative
     */
    public static Peak over(Region region, FieldSolver solver, double within) {
        if (region.dimension() == 0) {
            throw new AuthorException("peakField over a point: no coordinate of the region has limits. Use electricField(place).");
        }
        return new Search(region, solver, within).run();
    }

    /** A box of one part's unit box. */
    private record Cell(int part, double[] from, double[] to, int[] depth, double most, double bound, int steepest, Cell parent, long age) { }

    private record Spot(int part, List<Double> u) { }

    private record Sample(Place place, Amount magnitude) { }

    private static final class Search {
        private final List<Region.PlacedChart> parts;
        private final FieldSolver solver;
        private final double within;
        private final int dimension;
        private final Map<Spot, Sample> samples = new HashMap<>();
        private final PriorityQueue<Cell> open = new PriorityQueue<>((a, b) -> a.bound() != b.bound() ? Double.compare(b.bound(), a.bound())
            : Long.compare(a.age(), b.age()));
        private long made;
        private int evaluations;
        private Sample best;
        private Cell bestCell;
        private Standing doubt = Standing.CONVERGED;

        Search(Region region, FieldSolver solver, double within) {
            this.solver = solver;
            this.within = within;
            parts = region.charts();
            dimension = region.dimension();
            for (Region.PlacedChart part : parts) {
                if (part.chart().isEndless()) {
                    throw new AuthorException("peakField over an endless region: it cannot be searched. Give every coordinate finite limits.");
                }
            }
        }

        Peak run() {
            for (int part = 0; part < parts.size(); part++) {
                start(part);
            }
            double closed = 0;      // bound of cells that are points by now
            while (!isUnbounded() && !open.isEmpty() && open.peek().bound() > best.magnitude().si() * (1 + within) && evaluations < LIMIT) {
                Stop.check();
                Cell cell = open.poll();
                if (cell.depth()[cell.steepest()] >= DEEPEST) {
                    if (grows(cell)) {
                        return unbounded();
                    }
                    closed = Math.max(closed, cell.most());
                } else {
                    cut(cell);
                }
            }
            if (isUnbounded()) {
                return unbounded();
            }
            double upTo = Math.max(closed, open.isEmpty() ? 0 : open.peek().bound());
            boolean reached = !(upTo > best.magnitude().si() * (1 + within));
            polish();
            double found = best.magnitude().si();
            upTo = Math.max(upTo, found);
            Standing standing = reached ? doubt : Standing.notConverged(String.format(Locale.ROOT,
                "peak field: %d evaluations, the largest found is %.6g V/m and it could be up to %.6g V/m. Search a smaller region", evaluations,
                found, upTo));
            return new Peak(best.place(), Amount.si(found, best.magnitude().error() + (upTo - found), Units.FIELD, standing), upTo, evaluations);
        }

        private boolean isUnbounded() {
            return best.magnitude().standing().kind() == Standing.Kind.UNBOUNDED;
        }

        private Peak unbounded() {
            Standing reason = isUnbounded() ? best.magnitude().standing() : Standing.unbounded(String.format(Locale.ROOT,
                "the field grows without bound towards (%.6g, %.6g, %.6g) m", best.place().x(), best.place().y(), best.place().z()));
            double infinite = Double.POSITIVE_INFINITY;
            return new Peak(best.place(), Amount.si(infinite, infinite, Units.FIELD, reason), infinite, evaluations);
        }

        private void start(int part) {
            int n = parts.size() > 8 ? 2 : dimension == 1 ? 16 : dimension == 2 ? 6 : 3;
            int cells = (int) Math.round(Math.pow(n, dimension));
            for (int c = 0; c < cells; c++) {
                double[] from = new double[dimension];
                double[] to = new double[dimension];
                int rest = c;
                for (int k = 0; k < dimension; k++) {
                    from[k] = (double) (rest % n) / n;
                    to[k] = (double) (rest % n + 1) / n;
                    rest /= n;
                }
                add(part, from, to, new int[dimension], null);
            }
        }

        private void cut(Cell cell) {
            int k = cell.steepest();
            double middle = 0.5 * (cell.from()[k] + cell.to()[k]);
            int[] depth = cell.depth().clone();
            depth[k]++;
            double[] to = cell.to().clone();
            to[k] = middle;
            add(cell.part(), cell.from(), to, depth, cell);
            double[] from = cell.from().clone();
            from[k] = middle;
            add(cell.part(), from, cell.to(), depth, cell);
        }

        /** Samples a cell at three places along each axis. */
        private void add(int part, double[] from, double[] to, int[] depth, Cell parent) {
            int total = (int) Math.round(Math.pow(3, dimension));
            double[] value = new double[total];
            double most = 0;
            Sample bestBefore = best;
            for (int i = 0; i < total; i++) {
                double[] u = new double[dimension];
                int rest = i;
                for (int k = 0; k < dimension; k++) {
                    u[k] = rest % 3 == 0 ? from[k] : rest % 3 == 2 ? to[k] : 0.5 * (from[k] + to[k]);
                    rest /= 3;
                }
                value[i] = at(part, u).magnitude().si();
                most = Math.max(most, value[i]);
            }
            double slack = 0;
            double steepness = -1;
            int steepest = 0;
            int stride = 1;
            for (int k = 0; k < dimension; k++) {
                double change = 0;
                for (int i = 0; i < total; i++) {
                    if (i / stride % 3 < 2) {
                        change = Math.max(change, Math.abs(value[i + stride] - value[i]));
                    }
                }
                slack += change;
                if (depth[k] < DEEPEST && change > steepness) {
                    steepness = change;
                    steepest = k;
                }
                stride *= 3;
            }
            Cell cell = new Cell(part, from, to, depth, most, most + slack, steepest, parent, made++);
            if (best != bestBefore || bestCell == null) {
                bestCell = cell;
            }
            open.add(cell);
        }

        private Sample at(int part, double[] u) {
            List<Double> key = new ArrayList<>();
            for (double v : u) {
                key.add(v);
            }
            return samples.computeIfAbsent(new Spot(part, key), s -> look(place(part, u)));
        }

        private Place place(int part, double[] u) {
            Chart chart = parts.get(part).chart();
            double[] p = parts.get(part).frame().toSheet(chart.anchor(u).position());
            return new Place(p[0], p[1], p[2]);
        }

        private Sample look(Place place) {
            Vector e = solver.electricField(place);
            evaluations++;
            Amount size = e.isSided() ? larger(e.plusSide().magnitude(), e.minusSide().magnitude()) : e.magnitude();
            Sample sample = new Sample(place, size);
            if (size.standing().kind() == Standing.Kind.NOT_CONVERGED) {
                doubt = doubt.worse(size.standing());
            }
            if (best == null || size.si() > best.magnitude().si()) {
                best = sample;
            }
            return sample;
        }

        private static Amount larger(Amount a, Amount b) {
            return b.si() > a.si() ? b : a;
        }

        /** Whether the largest sample went on growing while the cell shrank about it. */
        private boolean grows(Cell cell) {
            Cell before = cell;
            for (int k = 0; k < BACK * dimension && before.parent() != null; k++) {
                before = before.parent();
            }
            return cell.most() > GROWTH * before.most();
        }

        /** Climbs from the best sample within twice its cell. */
        private void polish() {
            int part = bestCell.part();
            double[] low = new double[dimension];
            double[] high = new double[dimension];
            double[] start = new double[dimension];
            double radius = Double.POSITIVE_INFINITY;
            for (int k = 0; k < dimension; k++) {
                double size = bestCell.to()[k] - bestCell.from()[k];
                low[k] = Math.max(0, bestCell.from()[k] - size);
                high[k] = Math.min(1, bestCell.to()[k] + size);
                start[k] = 0.5 * (bestCell.from()[k] + bestCell.to()[k]);
                radius = Math.min(radius, 0.4 * (high[k] - low[k]));
            }
            if (dimension == 1) {
                UnivariateFunction f = u -> look(place(part, new double[] {u})).magnitude().si();
                UnivariatePointValuePair p = new BrentOptimizer(1e-9, 1e-14).optimize(new MaxEval(200), GoalType.MAXIMIZE,
                    new UnivariateObjectiveFunction(f), new SearchInterval(low[0], high[0], start[0]));
                look(place(part, new double[] {p.getPoint()}));
            } else {
                PointValuePair p = new BOBYQAOptimizer(2 * dimension + 1, radius, 1e-7 * radius).optimize(new MaxEval(2000),
                    GoalType.MAXIMIZE, new ObjectiveFunction(u -> look(place(part, u)).magnitude().si()), new SimpleBounds(low, high),
                    new InitialGuess(start));
                look(place(part, p.getPoint()));
            }
        }
    }
}
