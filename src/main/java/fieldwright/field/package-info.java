/**
 * Field and potential of charge at any place.
 *
 * <p>Start at {@link fieldwright.field.FieldSolver}. A source becomes {@link fieldwright.field.Patch patches} (chart, density, kernel); a
 * question becomes {@link fieldwright.field.Probe probes} (the place, and its images in the surroundings), and where images have no end a
 * smooth {@link fieldwright.field.Green} part. What a patch is integrated over is a {@link fieldwright.field.Facet}: itself, a face of a
 * volume, or an edge of a flat face. {@link fieldwright.field.Paver} chooses for each patch and place:
 * <ul>
 * <li>volumes near by whose density may be read beyond them: their faces, with the integral along rays from the place done first;</li>
 * <li>flat surfaces and flat faces with a polynomial density: one integral round the edge, the rays in the plane in closed form
 *   ({@link fieldwright.field.FlatFace});</li>
 * <li>anything else, and far away: boxes of parameters halved until they are far or flat, polar triangles and sinh segments about the
 *   nearest point.</li>
 * </ul>
 * {@link fieldwright.field.Panel Panels} are what facets are halved into; they keep the nodes of the rules used on them and serve every
 * place, which is what makes the second question cheap. They are the same whichever question comes first. All pieces of one question are
 * refined together by {@link fieldwright.integral.Cubature}. Bodies that {@link fieldwright.field.ClosedShapes} recognises are answered by
 * {@code field.closed} instead ({@link fieldwright.field.ClosedSum}), unless {@link fieldwright.field.Accuracy} says otherwise: that is how
 * one is checked with the other. A result depends on its own question only.
 *
 * <p>Where time goes: a question with panels kept takes 6 to 40 microseconds, of which half is the bookkeeping of pieces; a question from
 * nothing is mostly the compiling of formulas and the first nodes. Parametric regions are slowest: position and tangents are six formulas.
 *
 * <p>Surroundings: {@link fieldwright.field.Images} makes of a place a {@link fieldwright.field.Question}, one {@link fieldwright.field.View} for
 * each side: the near images as probes, what is left of endless rows of them as a smooth {@link fieldwright.field.Green} part that is
 * integrated over the source as it is ({@link fieldwright.field.GreenPiece}). {@link fieldwright.field.WalledGreen}: parallel planes and
 * boxes; {@link fieldwright.field.RoundGreen}: tubes and drums, and {@link fieldwright.field.RingGreen} for charge that is the same all
 * round their axis; {@link fieldwright.field.Spheres}. {@code reactionField} and {@code reactionPotential} give the induced charge's part
 * alone. Weak: place and charge both within a few hundredths of the radius of a round wall, unless the charge is the same all round;
 * it is said then.
 *
 * <p>Questions about a whole are sums of such answers: {@link fieldwright.field.Interaction} (energy, force, torque),
 * {@link fieldwright.field.Flux} (flux, voltage), {@link fieldwright.field.Moments}. Each is a {@code Sweep} over
 * {@code Domain}s, cut at {@code Crossings} with charged surfaces and walls. Weak places: volumes that cut each other's faces askew and
 * surfaces through the rim of a charged one converge slowly at small tolerances and then say so.
 * SI units. May depend on quantity, formula, geometry, charge, integral.
 */
package fieldwright.field;
