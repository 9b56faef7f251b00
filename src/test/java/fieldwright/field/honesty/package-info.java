/**
 * Whether the engine's stated numerical errors are true. Start at {@link fieldwright.field.honesty.HonestyRun}, which prints a
 * histogram; {@link fieldwright.field.honesty.HonestyTest} is its fast part, {@link fieldwright.field.honesty.LawProperties} holds the
 * engine to the laws of the field.
 *
 * <p>The judge works on plain doubles and shares neither mapping nor rule with the engine: bodies by rays from the place
 * ({@link fieldwright.field.honesty.RayJudge}), flat surfaces by parallel slices ({@link fieldwright.field.honesty.PlanarJudge}),
 * surfaces of revolution by rings ({@link fieldwright.field.honesty.RevolutionJudge}), curves by
 * {@link fieldwright.field.honesty.LineJudge}; everything by tanh–sinh rules
 * ({@link fieldwright.field.honesty.DoubleExponential}), twice with different steps and cuts. {@link fieldwright.field.honesty.Problem}
 * draws the questions, {@link fieldwright.field.honesty.Finding} holds one answer against the judge. An answer counts as judged only
 * where the judge's own error (difference of its two settings, and rounding) is below the stated one.
 *
 * <p>The full run, about a quarter of an hour of one processor for the judge, whose table is kept, and three minutes for the engine:
 * <pre>mvn -o -q test-compile
 * java -cp target/test-classes:target/classes:LIBRARIES fieldwright.field.honesty.HonestyRun 5000 1 target/honesty-1.csv</pre>
 *
 * <p>Its latest result, 5,000 problems of seed 1, accuracy 1e-9, all judged by a method of another kind, before the engine was merged
 * with kinks slanted in two coordinates: 9,249 answers that are finite, field and potential; converged 99.35 %; judged 8,938,
 * not judged 251 (half shells and heaps beside an edge, thin bodies); within the stated error 99.91 %; eight above it, by factors of 1.1, 1.2,
 * 1.4, 1.7, 3.7, 7.2, 9.8 and 57; three above the tolerance asked, by at most 30 times it; three answers of the wrong kind (places on a
 * line or surface moved far against its own thickness). Stated over true error, median 707, by decades from 1: 1,019, 1,406, 2,479, 2,778,
 * 1,165, 70, 13. Evaluations: median 1,519, 90 % below 11,446.
 *
 * <p>Loosest: boxes and polygons. Weakest: potentials on triangles of 1 : 1,000 and thinner with a density that is no polynomial (57 and
 * 1.1 times the stated error, 600,000 evaluations), and balls with a bend or jump of density along a plane, which do not converge and say so.
 */
package fieldwright.field.honesty;
