package fieldwright.judge;

import fieldwright.quantity.Amount;

/**
 * Thresholds in common use, from memory: orders of magnitude for a first look, none taken from a standard. Where a
 * standard or the authority having jurisdiction gives a figure, that figure replaces these
 * ({@link Threshold#at}).
 */
public final class Thresholds {
    private static final String DEFER = " The local code, the safety standard in force and licensed practice decide; this figure does not.";

    private Thresholds() { }

    /** Breakdown of air between wide smooth electrodes, about 3 MV/m. */
    public static Threshold airBreakdown() {
        return new Threshold("air breakdown, uniform field", Amount.of(3, "MV/m"),
                "common practice, from memory: uniform gap of about 1 cm, dry air, sea level, 20 degC",
                "Holds for a uniform gap between smooth electrodes. At a projection, an edge or a wire discharge begins while the"
                        + " mean field is far lower; it falls with air density, and in long gaps." + DEFER);
    }

    /** Mean field at which an earthed rounded projection may draw a brush discharge, about 500 kV/m. */
    public static Threshold dischargeAtProjection() {
        return new Threshold("brush discharge at an earthed projection", Amount.of(500, "kV/m"),
                "common practice, from memory: order of magnitude for rounded projections of some millimetres to centimetres",
                "The field is that without the projection; the projection raises it many times over. Whether a discharge can ignite"
                        + " depends on the dust, vapour or gas and on the energy, not on the field alone." + DEFER);
    }

    /** Largest charge density a surface in air holds on one side, eps0 times the breakdown field: about 27 uC/m^2. */
    public static Threshold surfaceChargeInAir() {
        return new Threshold("surface charge density in air", Amount.of(26.5, "uC/m^2"),
                "eps0 times 3 MV/m, all flux to one side; air breakdown from memory as common practice",
                "A film charged on both sides or backed by a near earthed surface can carry more, and then discharges more"
                        + " violently." + DEFER);
    }

    /** Potential of a charged liquid or powder surface at which brush discharges are expected, about 25 kV. */
    public static Threshold surfacePotential() {
        return new Threshold("brush discharge from a charged surface", Amount.of(25, "kV"),
                "common practice, from memory: order of magnitude for tanks with earthed walls",
                "Depends on the shape of what the surface discharges to and on the sign of the charge." + DEFER);
    }
}
