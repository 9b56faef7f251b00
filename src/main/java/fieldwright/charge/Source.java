package fieldwright.charge;

/** Something that makes a field. */
public sealed interface Source permits Charge, PointCharge, PointCloud, ChargedPolyline, Sources {
    /** What stands around it; null when that was never stated. */
    Surroundings around();

    /** The same charge in these surroundings. */
    Source with(Surroundings around);
}
