/**
 * Whether the engine's stated numerical errors are true. Start at {@link fieldwright.field.honesty.HonestyTest} (the fast part)
 * and {@link fieldwright.field.honesty.HonestyRun} (the full run, with a histogram).
 *
 * <p>The judge works on plain doubles and shares neither mapping nor rule with the engine: bodies by rays from the place
 * ({@link fieldwright.field.honesty.RayJudge}), flat surfaces by parallel slices ({@link fieldwright.field.honesty.PlanarJudge}),
 * surfaces of revolution by rings ({@link fieldwright.field.honesty.RevolutionJudge}), curves by
 * {@link fieldwright.field.honesty.LineJudge}; everything by tanh–sinh rules
 * ({@link fieldwright.field.honesty.DoubleExponential}), twice with different steps and cuts. {@link fieldwright.field.honesty.Problem}
 * draws the questions, {@link fieldwright.field.honesty.Finding} holds one answer against the judge.
 */
package fieldwright.field.honesty;
