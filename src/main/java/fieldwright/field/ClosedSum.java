package fieldwright.field;

import fieldwright.field.closed.Closed;
import fieldwright.geometry.Frame;
import java.util.ArrayList;
import java.util.List;

/**
 * What closed forms say to one question: each body seen at each probe, added to the paver's start value. Where a form has lost more
 * digits than were asked for, and on edges where several surfaces meet, the body's patches go to the paver instead.
 */
final class ClosedSum {
    /** A place is known to this part of its coordinates; the same measure of touching as the panels', within a small factor. */
    private static final double PLACE = 4 * Sampler.EPS;
    /** Squares and cubes of distances beyond it leave the range of doubles. */
    private static final double LARGEST = 1e90;

    private final Paver paver;
    private final boolean potential;
    private final Accuracy accuracy;
    private final double[] error;
    private final List<Seen> all = new ArrayList<>();
    private boolean lost;
    private int evaluations;

    /** {@code error}: of the answer's components, by rounding; added to. */
    ClosedSum(Paver paver, Accuracy accuracy, double[] error) {
        this.paver = paver;
        this.accuracy = accuracy;
        this.error = error;
        potential = paver.isPotential();
    }

    int evaluations() {
        return evaluations;
    }

    /** True when closed forms alone were asked for and one of them lost more digits than the accuracy allows. */
    boolean hasLostDigits() {
        return lost;
    }

    /** One body at one probe: E in the sheet's frame, V, their errors, and where it was touched. */
    private static final class Seen {
        final SpreadBody body;
        final Probe probe;
        final double[] e = new double[3];
        double v;
        double errE;
        double errV;
        final List<Touch> touches = new ArrayList<>();
        /** Furthest charge. */
        double furthest;

        Seen(SpreadBody body, Probe probe) {
            this.body = body;
            this.probe = probe;
        }

        boolean isOnEdge() {
            return touches.stream().anyMatch(t -> t.closed.status() == Closed.Status.UNBOUNDED);
        }
    }

    private record Touch(Closed closed, Frame frame, Probe probe) {
        boolean isLine() {
            return Double.isInfinite(closed.errV());
        }

        /** A direction of the form's own frame in the answer's. */
        double[] mapped() {
            Closed.Direction d = closed.direction();
            double[] s = frame.directionToSheet(new double[] {d.x(), d.y(), d.z()});
            double[] m = new double[3];
            for (int i = 0; i < 3; i++) {
                for (int k = 0; k < 3; k++) {
                    m[i] += probe.a()[3 * i + k] * s[k];
                }
            }
            return m;
        }
    }

    /** One body at one probe. */
    void see(SpreadBody body, Probe probe) {
        Seen seen = body.forms().isEmpty() ? null : look(body, probe, 1);
        if (seen == null || losesDigits(seen)) {
            pave(body, probe);
        } else {
            all.add(seen);
        }
    }

    /** When everything was seen. */
    void finish() {
        edges();
        all.forEach(this::add);
    }

    private void pave(SpreadBody body, Probe probe) {
        body.patches().forEach(patch -> paver.pave(patch, probe));
    }

    /** {@code share} of the place's rounding: 1, or 0 for what the form itself loses. Null where the numbers are too large for it. */
    private Seen look(SpreadBody body, Probe probe, double share) {
        Seen seen = new Seen(body, probe);
        for (double c : probe.place()) {
            if (!(Math.abs(c) <= 0.1 * LARGEST)) {
                return null;
            }
        }
        for (SpreadBody.Placed placed : body.forms()) {
            double[] p = placed.frame().toOwn(probe.place());
            Closed c = placed.form().at(p[0], p[1], p[2], share * rounding(placed, probe));
            evaluations++;
            if (c.status() != Closed.Status.REGULAR) {
                seen.touches.add(new Touch(c, placed.frame(), probe));
            }
            double[] e = placed.frame().directionToSheet(new double[] {c.ex(), c.ey(), c.ez()});
            for (int a = 0; a < 3; a++) {
                seen.e[a] += e[a];
            }
            seen.v += c.v();
            seen.errE += Double.isInfinite(c.errE()) ? 0 : c.errE() + 4 * Sampler.EPS * norm(e);
            seen.errV += Double.isInfinite(c.errV()) ? 0 : c.errV();
            seen.furthest = Math.max(seen.furthest, norm(p) + 2 * placed.form().reach());
        }
        return seen;
    }

    private static double rounding(SpreadBody.Placed placed, Probe probe) {
        Frame frame = placed.frame();
        double most = placed.form().reach();
        for (int j = 0; j < 3; j++) {
            if (!placed.changesAlong(j)) {
                continue;
            }
            double sum = 0;
            int terms = 0;
            for (int k = 0; k < 3; k++) {
                double part = Math.abs(frame.turn()[3 * k + j]);
                sum += part * (Math.abs(probe.place()[k]) + Math.abs(frame.move()[k]));
                terms += part > 0 ? 1 : 0;
            }
            most = Math.max(most, terms * sum);
        }
        return PLACE * most * (probe.isPlain() ? 1 : 2);
    }

    /** A form that lost digits of its own, not those the place itself is uncertain by; closed forms alone keep what they have. */
    private boolean losesDigits(Seen seen) {
        if (seen.body.isEndless() || isGoodEnough(seen, seen)) {
            return false;
        }
        Seen own = look(seen.body, seen.probe, 0);
        boolean byPlace = own.errE <= 0.5 * seen.errE && own.errV <= 0.5 * seen.errV;   // the rest is rounding of the distance from an axis
        if (byPlace || isGoodEnough(own, seen)) {
            return false;
        }
        lost |= accuracy.closedForms() == ClosedForms.ONLY;
        return accuracy.closedForms() != ClosedForms.ONLY;
    }

    private boolean isGoodEnough(Seen errors, Seen values) {
        double allowed = 0.25 * accuracy.relative();
        boolean v = errors.errV <= allowed * Math.abs(values.v) || !Double.isFinite(values.v);
        if (potential) {
            return v;
        }
        boolean e = errors.errE <= allowed * Math.max(norm(values.e), 1e-3 * Math.abs(values.v) / values.furthest);
        return e && (v || values.probe.b() == null) || values.isOnEdge();
    }

    /** Edges: one alone is told by its own form, several together by the panels. */
    private void edges() {
        List<Seen> onEdge = new ArrayList<>();
        for (Seen seen : all) {
            for (Touch touch : seen.touches) {
                if (touch.closed.status() == Closed.Status.UNBOUNDED && touch.isLine()) {
                    paver.contact.unbounded("on a line charge: the field grows without bound as 1 over the distance", null);
                }
            }
            if (seen.isOnEdge()) {
                onEdge.add(seen);
            }
        }
        if (potential || onEdge.isEmpty()) {
            return;
        }
        List<Touch> touches = onEdge.get(0).touches.stream().filter(t -> t.closed.status() == Closed.Status.UNBOUNDED).toList();
        if (onEdge.size() == 1 && touches.size() == 1 && !paver.contact.isTouched()) {
            paver.contact.unbounded("on an edge of a charged surface: the field grows without bound towards it", direction(touches.get(0)));
            return;
        }
        for (Seen seen : onEdge) {
            all.remove(seen);
            pave(seen.body, seen.probe);
        }
    }

    private static double[] direction(Touch touch) {
        double[] d = touch.mapped();
        double size = norm(d);
        return size > 0 ? new double[] {d[0] / size, d[1] / size, d[2] / size} : null;
    }

    private void add(Seen seen) {
        if (potential) {
            paver.start[0] += seen.probe.c() * seen.v;
            error[0] += Math.abs(seen.probe.c()) * seen.errV;
            return;
        }
        double[] a = seen.probe.a();
        double[] b = seen.probe.b();
        for (int i = 0; i < 3; i++) {
            double row = Math.sqrt(a[3 * i] * a[3 * i] + a[3 * i + 1] * a[3 * i + 1] + a[3 * i + 2] * a[3 * i + 2]);
            double value = a[3 * i] * seen.e[0] + a[3 * i + 1] * seen.e[1] + a[3 * i + 2] * seen.e[2] + (b == null ? 0 : b[i] * seen.v);
            paver.start[i] += value;
            error[i] += row * seen.errE + (b == null ? 0 : Math.abs(b[i]) * seen.errV) + Sampler.EPS * Math.abs(value);
        }
        for (Touch touch : seen.touches) {
            if (touch.closed.status() == Closed.Status.ON_SURFACE) {
                paver.contact.surface(touch.closed.jump() / (4 * Math.PI), 1, touch.mapped(), new double[3]);
            }
        }
    }

    private static double norm(double[] v) {
        return Math.sqrt(v[0] * v[0] + v[1] * v[1] + v[2] * v[2]);
    }
}
