/**
 * Whether the engine's stated numerical errors are true. Start at {@link fieldwright.field.honesty.HonestyRun}, which prints a
 * histogram; {@link fieldwright.field.honesty.LawProperties} holds the engine to the laws of the field.
 *
 * <p>Known weakness of the judge: on a curved surface of revolution whose density has a kink it is wrong at places on the
 * surface itself, without saying so. A finding there is no finding against the engine. Problems with a helix are not put right
 * either: their text does not pass the unit check.
 *
 * <p>The judge works on plain doubles and shares neither mapping nor rule with the engine: bodies by rays from the place
 * ({@link fieldwright.field.honesty.RayJudge}), flat surfaces by parallel slices ({@link fieldwright.field.honesty.PlanarJudge}),
 * surfaces of revolution by rings ({@link fieldwright.field.honesty.RevolutionJudge}), curves by
 * {@link fieldwright.field.honesty.LineJudge}; everything by tanh–sinh rules
 * ({@link fieldwright.field.honesty.DoubleExponential}), twice with different steps and cuts. {@link fieldwright.field.honesty.Problem}
 * draws the questions, {@link fieldwright.field.honesty.Finding} holds one answer against the judge.
 */
package fieldwright.field.honesty;
