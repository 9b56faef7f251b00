/**
 * A sheet as a function of its inputs: what the inputs' tolerances do to its results.
 *
 * <p>Start at {@link fieldwright.study.Replay}, which the session implements, and
 * {@link fieldwright.study.ToleranceStudy}, which asks it. All values are plain numbers in coherent SI
 * units; names are the sheet's. Nothing here knows a cell, a formula or a unit. May depend on
 * {@code fieldwright.quantity} only.
 *
 * <p>Source of the combination: JCGM 100:2008 (GUM), "Evaluation of measurement data — Guide to the
 * expression of uncertainty in measurement": 4.3.7 (rectangular limits), 5.1.2 and 5.2.2 (combination
 * without and with correlation), 5.1.3 note 2 (contributions by differences instead of derivatives),
 * 6.2.1 (expanded uncertainty), G.4.1 (effective degrees of freedom).
 */
package fieldwright.study;
