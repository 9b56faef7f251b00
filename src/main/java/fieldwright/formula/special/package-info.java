/**
 * Special functions that Commons Math does not have: elliptic integrals by Carlson's symmetric forms, Bessel functions
 * Y, I, K of whole order. Scalar in, scalar out, plain numbers; NaN outside the domain, never an exception.
 * Each method names its source and the accuracy measured in its test. Depends on Commons Math only.
 */
package fieldwright.formula.special;
