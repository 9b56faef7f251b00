package fieldwright.field.closed;

/** Sum of axial multipoles, even orders only: V = Σ M_2n r^(-2n-1) P_2n(cos θ), with its field in cylindrical components. */
final class ZonalSeries {
    double eRho;
    double ez;
    double v;

    /**
     * @param moments M_2n / scale^(2n), n = 0, 1, …; field and potential come in their unit
     * @param scale radius of a sphere that holds the charge
     */
    ZonalSeries(double[] moments, double scale, double rho, double z) {
        double r = Math.sqrt(rho * rho + z * z);
        double c = z / r;
        double s = rho / r;
        double p0 = 1; // P_l
        double d0 = 0; // P_l'
        double p1 = c; // P_(l+1)
        double d1 = 1;
        double eR = 0;
        double eTheta = 0;
        double power = 1 / r;
        double t = scale / r * (scale / r);
        for (int n = 0; n < moments.length; n++) {
            int l = 2 * n;
            v += moments[n] * power * p0;
            eR += (l + 1) * moments[n] * power / r * p0;
            eTheta += s * moments[n] * power / r * d0;
            power *= t;
            for (int k = l; k < l + 2; k++) { // Bonnet's recurrence; P'(k+2) = P'(k) + (2k+3) P(k+1)
                double p2 = ((2 * k + 3) * c * p1 - (k + 1) * p0) / (k + 2);
                double d2 = d0 + (2 * k + 3) * p1;
                p0 = p1;
                d0 = d1;
                p1 = p2;
                d1 = d2;
            }
        }
        eRho = eR * s + eTheta * c;
        ez = eR * c - eTheta * s;
    }
}
