package fieldwright.field.closed;

/** A circle of radius a about the z axis, seen from (rho, z relative to its plane): the distances all ring forms share. */
final class Rim {
    final double a;
    final double rho;
    final double z;
    /** Farthest distance of the place from the circle. */
    final double far;
    /** Nearest distance. */
    final double near;
    /** Parameter m = 4 a rho/far². */
    final double m;
    /** Complementary modulus near/far, formed without cancellation. */
    final double kc;

    Rim(double a, double rho, double z) {
        this.a = a;
        this.rho = rho;
        this.z = z;
        far = Math.sqrt((a + rho) * (a + rho) + z * z);
        near = Math.sqrt((a - rho) * (a - rho) + z * z);
        m = 4 * a * rho / (far * far);
        kc = near / far;
    }

    /** ∫ dl/R² round the circle. */
    double inverseSquare() {
        return 2 * Math.PI * a / (far * near);
    }

    /** ∫ dl/R: potential of the circle with unit charge per length. */
    double potential() {
        return 4 * a / far * CompleteIntegral.first(kc);
    }
}
