package fieldwright.field;

import fieldwright.charge.ChargedPolyline;
import fieldwright.charge.PointCloud;
import fieldwright.charge.Surroundings;
import fieldwright.field.tree.Answers;
import fieldwright.field.tree.Charges;
import fieldwright.field.tree.DirectField;
import fieldwright.field.tree.FieldTree;
import fieldwright.field.tree.Workers;
import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Place;
import fieldwright.quantity.Units;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;

/**
 * Very many charges as a solver sees them: one place charge by charge, or many places prepared together by a treecode. One thread;
 * {@link #copy} for another.
 */
final class Crowd {
    private static final int BLOCK = Workspace.BLOCK;

    /** Answers at places asked for together; {@code potential} is null when it is not needed. */
    private record Prepared(Map<Place, Integer> number, Answers field, Answers potential) { }

    private final String name;
    private final Charges charges;
    private final Prepared prepared;
    private DirectField direct;

    private Crowd(String name, Charges charges, Prepared prepared) {
        this.name = name;
        this.charges = charges;
        this.prepared = prepared;
    }

    static Crowd of(PointCloud cloud) {
        double[][] c = cloud.columns();
        return new Crowd("a point charge", Charges.points(c[0], c[1], c[2], c[3]), null);
    }

    static Crowd of(ChargedPolyline line) {
        double[][] c = line.corners();
        return new Crowd("a charged line", Charges.polyline(c[0], c[1], c[2], line.atStart(), line.atEnd()), null);
    }

    Crowd copy() {
        return new Crowd(name, charges, prepared);
    }

    /** With the answers at all these places, worked together. Places on a charge are told by the same rule as a single one. */
    Crowd preparedFor(List<Place> places, boolean field, boolean potential, double relative, Workers workers) {
        Map<Place, Integer> number = new LinkedHashMap<>();
        places.forEach(p -> number.putIfAbsent(p, number.size()));
        double[][] at = new double[3][number.size()];
        number.forEach((p, i) -> {
            at[0][i] = p.x();
            at[1][i] = p.y();
            at[2][i] = p.z();
        });
        FieldTree tree = FieldTree.of(charges, relative, workers);
        return new Crowd(name, charges, new Prepared(number, field ? tree.field(at[0], at[1], at[2], workers) : null,
            potential ? tree.potential(at[0], at[1], at[2], workers) : null));
    }

    int size() {
        return charges.count();
    }

    double[] centre() {
        return charges.centre();
    }

    double radius() {
        return charges.radius();
    }

    /** Total charge, C. */
    Amount total() {
        double[] sum = charges.total();
        return Amount.si(sum[0], sum[1], Units.CHARGE);
    }

    /** Adds what a probe sees; error is a bound for each component. */
    void see(Probe probe, Paver paver, double[] error) {
        DirectField.At at = at(probe, paver.isPotential());
        if (at.touching()) {
            paver.contact.unbounded("on " + name + ": the " + (paver.isPotential() ? "potential" : "field") + " grows without bound", null);
            return;
        }
        if (paver.isPotential()) {
            paver.start[0] += probe.c() * at.potential();
            error[0] += Math.abs(probe.c()) * at.potentialError();
            return;
        }
        for (int a = 0; a < 3; a++) {
            double square = 0;
            for (int k = 0; k < 3; k++) {
                double factor = probe.a()[3 * a + k];
                paver.start[a] += factor * at.field()[k];
                square += factor * factor;
            }
            error[a] += Math.sqrt(square) * at.fieldError();
            if (probe.b() != null) {
                paver.start[a] += probe.b()[a] * at.potential();
                error[a] += Math.abs(probe.b()[a]) * at.potentialError();
            }
        }
    }

    private DirectField.At at(Probe probe, boolean potentialOnly) {
        double[] p = probe.place();
        Integer i = prepared == null ? null : prepared.number().get(new Place(p[0], p[1], p[2]));
        boolean known = i != null && (potentialOnly || prepared.field() != null)
            && (prepared.potential() != null || !potentialOnly && probe.b() == null);
        if (known) {
            return prepared(i);
        }
        direct = direct == null ? new DirectField(charges) : direct;
        return direct.at(p[0], p[1], p[2]);
    }

    private DirectField.At prepared(int i) {
        Answers f = prepared.field();
        Answers v = prepared.potential();
        double[] e = f == null ? null : new double[] {f.value()[0][i], f.value()[1][i], f.value()[2][i]};
        return new DirectField.At(e, v == null ? Double.NaN : v.value()[0][i], f == null ? Double.NaN : f.error()[i],
            v == null ? Double.NaN : v.error()[i], f == null ? v.touching()[i] : f.touching()[i]);
    }

    /** Adds the smooth part of the surroundings. Errors: AuthorException for a polyline with sides too long for it. */
    void smooth(Green green, Paver paver, double[] error) {
        if (green == null) {
            return;
        }
        if (charges.hasSides()) {
            throw new AuthorException("a charged polyline of numbers in these surroundings: it is not worked. Use "
                + "lineCharge(polyline(…), density), which is.");
        }
        double[][] s = new double[3][BLOCK];
        double[][] out = new double[3][BLOCK];
        double[] q = new double[BLOCK];
        int rows = paver.isPotential() ? 1 : 3;
        double[] doubt = new double[BLOCK];
        Green part = green.forPatch();
        double missing = 0;
        double size = 0;
        for (int first = 0; first < charges.count(); first += BLOCK) {
            int n = charges.copy(first, BLOCK, s, q);
            if (paver.isPotential()) {
                part.potential(s, n, out[0], doubt);
            } else {
                part.field(s, n, out, doubt);
            }
            for (int i = 0; i < n; i++) {
                double length = 0;
                for (int a = 0; a < rows; a++) {
                    paver.start[a] += q[i] * out[a][i];
                    length += out[a][i] * out[a][i];
                }
                missing += Math.abs(q[i]) * doubt[i];
                size += Math.abs(q[i]) * Math.sqrt(length);
            }
        }
        double rounding = Math.min(charges.count(), 1e4) * Sampler.EPS;
        for (int a = 0; a < rows; a++) {
            error[a] += missing + (4 * Sampler.EPS + rounding) * size;
        }
    }

    /** The place of a charge that is behind or on the wall, or null. */
    double[] behind(Surroundings around) {
        double[] p = new double[3];
        for (int i = 0; i < charges.places(); i++) {
            charges.place(i, p);
            double clearance = Images.clearance(around, p);
            if (clearance < 0 || clearance == 0 && !charges.isCorner(i)) {
                return p;
            }
        }
        return null;
    }
}
