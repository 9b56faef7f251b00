package fieldwright.field.honesty;

import java.math.BigDecimal;
import java.util.ArrayList;
import java.util.List;

/**
 * A charged line, surface or body in its own frame as the judge knows it. Lengths in m. {@code push} counts how many units
 * along the surface normal the place is displaced when it lies on the charge: the two one-sided values.
 */
sealed interface Charged {
    /** A place nearer than this many sizes is on the charge: some roundings of its coordinates. */
    double ON = 1e-14;

    /** Stands for no distance at all where a scale is needed: potentials on a rim, m. */
    double LEAST = 1e-30;

    /** 1 line, 2 surface, 3 volume. */
    int dimension();

    /** Largest extent. */
    double size();

    /** Smallest extent. */
    double thickness();

    Answer judge(SmoothDensity density, boolean polynomial, Exact.Position place, double[] push, DoubleExponential.Setting setting);

    /** Nodes along a ray: polynomials of degree up to 5 exactly, others to rounding. */
    private static int radial(boolean polynomial) {
        return polynomial ? 9 : 26;
    }

    /** Straight along an axis (0 x, 1 y, 2 z) through a point. */
    record Rod(int axis, double[] through, double from, double to) implements Charged {
        /** Along z. */
        Rod(double from, double to) {
            this(2, new double[3], from, to);
        }

        @Override
        public int dimension() {
            return 1;
        }

        @Override
        public double size() {
            return to - from;
        }

        @Override
        public double thickness() {
            return to - from;
        }

        @Override
        public Answer judge(SmoothDensity density, boolean polynomial, Exact.Position place, double[] push,
                DoubleExponential.Setting setting) {
            double[] p = place.doubles();
            double nearest = Math.max(from, Math.min(to, p[axis]));
            double[] foot = through.clone();
            foot[axis] = nearest;
            double distance = Charged.distance(foot, p);
            LineJudge.Curve curve = new LineJudge.Curve() {
                @Override
                public double speed(double q) {
                    return 1;
                }

                @Override
                public BigDecimal[] exact(double q) {
                    BigDecimal[] e = {Exact.of(through[0]), Exact.of(through[1]), Exact.of(through[2])};
                    e[axis] = Exact.of(q);
                    return e;
                }

                @Override
                public void step(double q, double dq, double[] out) {
                    out[0] = 0;
                    out[1] = 0;
                    out[2] = 0;
                    out[axis] = dq;
                }
            };
            return LineJudge.judge(curve, density, new double[] {from - nearest, to - nearest}, place, nearest, distance, setting);
        }
    }

    /** Several of one dimension, charged alike. */
    record Several(List<Charged> parts, double size, double thickness) implements Charged {
        @Override
        public int dimension() {
            return parts.get(0).dimension();
        }

        @Override
        public Answer judge(SmoothDensity density, boolean polynomial, Exact.Position place, double[] push,
                DoubleExponential.Setting setting) {
            Answer sum = Answer.zero();
            for (Charged part : parts) {
                sum = sum.plus(part.judge(density, polynomial, place, push, setting));
            }
            return sum;
        }
    }

    /** Arc about z in the plane z = 0, a helix when the rise (m per rad) is not zero; limits of the angle in rad. */
    record Coil(double radius, double rise, double from, double to) implements Charged {
        @Override
        public int dimension() {
            return 1;
        }

        @Override
        public double size() {
            return Math.max(2 * radius, rise * (to - from));
        }

        @Override
        public double thickness() {
            return Math.min(radius, rise == 0 ? radius : 2 * Math.PI * rise);
        }

        double[] at(double p) {
            return new double[] {radius * Math.cos(p), radius * Math.sin(p), rise * p};
        }

        private double nearest(double[] p) {
            double azimuth = Math.atan2(p[1], p[0]);
            double best = from;
            double least = Double.POSITIVE_INFINITY;
            int turns = (int) ((to - from) / (2 * Math.PI)) + 3;
            for (int k = -2; k <= turns + 2; k++) {
                double angle = azimuth + 2 * Math.PI * k;
                for (int iteration = 0; iteration < 60 && rise != 0; iteration++) {
                    double rho = Math.sqrt(p[0] * p[0] + p[1] * p[1]);
                    double slope = radius * rho * Math.sin(angle - azimuth) - rise * (p[2] - rise * angle);
                    double bend = Math.max(radius * rho * Math.cos(angle - azimuth) + rise * rise, rise * rise);
                    angle -= slope / bend;
                }
                angle = Math.max(from, Math.min(to, angle));
                double d = distance(at(angle), p);
                if (d < least) {
                    least = d;
                    best = angle;
                }
            }
            return best;
        }

        @Override
        public Answer judge(SmoothDensity density, boolean polynomial, Exact.Position place, double[] push,
                DoubleExponential.Setting setting) {
            double[] p = place.doubles();
            double nearest = nearest(p);
            LineJudge.Curve curve = new LineJudge.Curve() {
                @Override
                public double speed(double q) {
                    return Math.sqrt(radius * radius + rise * rise);
                }

                @Override
                public BigDecimal[] exact(double q) {
                    BigDecimal angle = Exact.of(q);
                    return new BigDecimal[] {Exact.of(radius).multiply(Exact.cos(angle)), Exact.of(radius).multiply(Exact.sin(angle)),
                        Exact.of(rise).multiply(angle)};
                }

                @Override
                public void step(double q, double dq, double[] out) {
                    double chord = 2 * radius * Math.sin(dq / 2);
                    out[0] = -chord * Math.sin(q + dq / 2);
                    out[1] = chord * Math.cos(q + dq / 2);
                    out[2] = rise * dq;
                }
            };
            double[] pairs = rise == 0 ? RevolutionJudge.relative(new double[] {from, to}, nearest)
                    : new double[] {from - nearest, to - nearest};
            return LineJudge.judge(curve, density, pairs, place, nearest, gap(curve, place, nearest), setting);
        }

        private static double gap(LineJudge.Curve curve, Exact.Position place, double q) {
            BigDecimal[] e = curve.exact(q);
            double dx = place.x().subtract(e[0]).doubleValue();
            double dy = place.y().subtract(e[1]).doubleValue();
            double dz = place.z().subtract(e[2]).doubleValue();
            return Math.sqrt(dx * dx + dy * dy + dz * dz);
        }
    }

    /** Above a plane; on it exactly, to the side pushed to, when there is a push. */
    private static double height(Exact.Position place, double[] push) {
        return push[2] != 0 ? push[2] : place.z().doubleValue();
    }

    private static double distance(double[] a, double[] b) {
        double dx = a[0] - b[0];
        double dy = a[1] - b[1];
        double dz = a[2] - b[2];
        return Math.sqrt(dx * dx + dy * dy + dz * dz);
    }

    /** In z = 0. */
    record Rectangle(double x1, double x2, double y1, double y2) implements Charged {
        @Override
        public int dimension() {
            return 2;
        }

        @Override
        public double size() {
            return Math.max(x2 - x1, y2 - y1);
        }

        @Override
        public double thickness() {
            return Math.min(x2 - x1, y2 - y1);
        }

        @Override
        public Answer judge(SmoothDensity density, boolean polynomial, Exact.Position place, double[] push,
                DoubleExponential.Setting setting) {
            double left = Exact.of(x1).subtract(place.x()).doubleValue();
            double right = Exact.of(x2).subtract(place.x()).doubleValue();
            double low = Exact.of(y1).subtract(place.y()).doubleValue();
            double high = Exact.of(y2).subtract(place.y()).doubleValue();
            double height = height(place, push);
            double dx = Math.max(0, Math.max(left, -right));
            double dy = Math.max(0, Math.max(low, -high));
            double[] breaks = left < 0 && right > 0 ? new double[] {left, 0, right} : new double[] {left, right};
            return PlanarJudge.judge(new PlanarJudge.Outline() {
                @Override
                public double[] breaks() {
                    return breaks;
                }

                @Override
                public int spans(double x, int k, double fromBreak, double toBreak, double[] out) {
                    out[0] = low;
                    out[1] = high;
                    return 2;
                }
            }, density, place.doubles(), height, Math.sqrt(dx * dx + dy * dy + height * height), setting);
        }
    }

    /** Corners (0, 0), (a, 0), (0, b) in z = 0. */
    record Triangle(double a, double b) implements Charged {
        @Override
        public int dimension() {
            return 2;
        }

        @Override
        public double size() {
            return Math.max(a, b);
        }

        @Override
        public double thickness() {
            return Math.min(a, b);
        }

        @Override
        public Answer judge(SmoothDensity density, boolean polynomial, Exact.Position place, double[] push,
                DoubleExponential.Setting setting) {
            double[] p = place.doubles();
            double left = -p[0];
            double right = Exact.of(a).subtract(place.x()).doubleValue();
            double low = -p[1];
            double height = height(place, push);
            double outward = (b * p[0] + a * p[1] - a * b) / Math.sqrt(a * a + b * b);
            double outside = Math.max(0, Math.max(left, Math.max(low, outward)));
            double[] breaks = left < 0 && right > 0 ? new double[] {left, 0, right} : new double[] {left, right};
            return PlanarJudge.judge(new PlanarJudge.Outline() {
                @Override
                public double[] breaks() {
                    return breaks;
                }

                @Override
                public int spans(double x, int k, double fromBreak, double toBreak, double[] out) {
                    double toEnd = toBreak + (breaks[breaks.length - 1] - breaks[k + 1]);
                    out[0] = low;
                    out[1] = low + b / a * toEnd;
                    return 2;
                }
            }, density, p, height, Math.sqrt(outside * outside + height * height), setting);
        }
    }

    /** About the origin in z = 0; a disc when the inner radius is 0. */
    record Annulus(double inner, double outer) implements Charged {
        @Override
        public int dimension() {
            return 2;
        }

        @Override
        public double size() {
            return 2 * outer;
        }

        @Override
        public double thickness() {
            return outer - inner;
        }

        @Override
        public Answer judge(SmoothDensity density, boolean polynomial, Exact.Position place, double[] push,
                DoubleExponential.Setting setting) {
            BigDecimal exactRho = Exact.hypot(place.x(), place.y());
            double rho0 = exactRho.doubleValue();
            double cos = rho0 == 0 ? 1 : place.x().doubleValue() / rho0;
            double sin = rho0 == 0 ? 0 : place.y().doubleValue() / rho0;
            double height = height(place, push);
            double outerGap = Exact.of(outer).subtract(exactRho).doubleValue();
            double innerGap = Exact.of(inner).subtract(exactRho).doubleValue();
            double[] breaks = inner > 0 ? new double[] {-outer, -inner, 0, inner, outer} : new double[] {-outer, 0, outer};
            int last = breaks.length - 1;
            double outside = Math.max(0, Math.max(-outerGap, inner > 0 ? innerGap : 0));
            // Slices run along the radius through the foot point: near a rim their ends move slowly from slice to slice.
            PlanarJudge.Outline outline = new PlanarJudge.Outline() {
                @Override
                public double[] breaks() {
                    return breaks;
                }

                private double half(int low, int k, double fromBreak, double toBreak) {
                    double fromLeft = fromBreak + (breaks[k] - breaks[low]);
                    double toRight = toBreak + (breaks[last - low] - breaks[k + 1]);
                    return Math.sqrt(fromLeft * toRight);
                }

                private double top(double gap, double radius, double half, double x) {
                    return (gap * (radius + rho0) - x * x) / (half + rho0);
                }

                @Override
                public int spans(double x, int k, double fromBreak, double toBreak, double[] out) {
                    double far = half(0, k, fromBreak, toBreak);
                    out[0] = -far - rho0;
                    if (inner == 0 || k == 0 || k == last - 1) {
                        out[1] = top(outerGap, outer, far, x);
                        return 2;
                    }
                    double near = half(1, k, fromBreak, toBreak);
                    out[1] = -near - rho0;
                    out[2] = top(innerGap, inner, near, x);
                    out[3] = top(outerGap, outer, far, x);
                    return 4;
                }
            };
            // In the slices' frame y points outwards along the radius of the place and x is at right angles to it.
            SmoothDensity turned = (x, y, z) -> density.at(sin * x + cos * y, -cos * x + sin * y, z);
            Answer a = PlanarJudge.judge(outline, turned, new double[] {0, rho0}, height,
                    Math.sqrt(outside * outside + height * height), setting);
            double[] v = a.value();
            double size = Math.max(a.magnitude()[0], a.magnitude()[1]);
            return new Answer(new double[] {sin * v[0] + cos * v[1], -cos * v[0] + sin * v[1], v[2], v[3]},
                    new double[] {size, size, a.magnitude()[2], a.magnitude()[3]}, a.evaluations());
        }
    }

    /**
     * Surface of revolution over a straight meridian from (rho1, z1) to (rho2, z2), parameter in m along it: tube, cone, frustum;
     * arc: limits of phi, null for all round.
     */
    record Frustum(double rho1, double z1, double rho2, double z2, double[] arc) implements Charged {
        @Override
        public int dimension() {
            return 2;
        }

        @Override
        public double size() {
            return Math.max(2 * Math.max(rho1, rho2), Math.abs(z2 - z1));
        }

        @Override
        public double thickness() {
            return Math.min(Math.max(rho1, rho2), Math.abs(z2 - z1));
        }

        @Override
        public Answer judge(SmoothDensity density, boolean polynomial, Exact.Position place, double[] push,
                DoubleExponential.Setting setting) {
            double dRho = rho2 - rho1;
            double dZ = z2 - z1;
            double[] p = place.doubles();
            double rho0 = Math.sqrt(p[0] * p[0] + p[1] * p[1]);
            double t = ((rho0 - rho1) * dRho + (p[2] - z1) * dZ) / (dRho * dRho + dZ * dZ);
            double nearest = Math.max(0, Math.min(1, t));
            RevolutionJudge.Profile profile = new RevolutionJudge.Profile() {
                @Override
                public double from() {
                    return 0;
                }

                @Override
                public double to() {
                    return 1;
                }

                @Override
                public double speed(double q) {
                    return Math.sqrt(dRho * dRho + dZ * dZ);
                }

                @Override
                public BigDecimal exactRho(double q) {
                    return Exact.of(rho1).add(Exact.of(rho2).subtract(Exact.of(rho1)).multiply(Exact.of(q)));
                }

                @Override
                public BigDecimal exactZ(double q) {
                    return Exact.of(z1).add(Exact.of(z2).subtract(Exact.of(z1)).multiply(Exact.of(q)));
                }

                @Override
                public double rhoStep(double q, double dq) {
                    return dRho * dq;
                }

                @Override
                public double zStep(double q, double dq) {
                    return dZ * dq;
                }
            };
            return onProfile(profile, arc, density, place, push, nearest, size(), setting);
        }
    }

    /** rho from rho1 to rho2 on z = rho² k. */
    record Bowl(double k, double rho1, double rho2) implements Charged {
        @Override
        public int dimension() {
            return 2;
        }

        @Override
        public double size() {
            return Math.max(2 * rho2, k * rho2 * rho2);
        }

        @Override
        public double thickness() {
            return Math.min(rho2, k * rho2 * rho2);
        }

        @Override
        public Answer judge(SmoothDensity density, boolean polynomial, Exact.Position place, double[] push,
                DoubleExponential.Setting setting) {
            double[] p = place.doubles();
            double rho0 = Math.sqrt(p[0] * p[0] + p[1] * p[1]);
            double best = nearest(rho0, p[2]);
            RevolutionJudge.Profile profile = new RevolutionJudge.Profile() {
                @Override
                public double from() {
                    return rho1;
                }

                @Override
                public double to() {
                    return rho2;
                }

                @Override
                public double speed(double q) {
                    return Math.sqrt(1 + 4 * k * k * q * q);
                }

                @Override
                public BigDecimal exactRho(double q) {
                    return Exact.of(q);
                }

                @Override
                public BigDecimal exactZ(double q) {
                    return Exact.of(q).multiply(Exact.of(q)).multiply(Exact.of(k));
                }

                @Override
                public double rhoStep(double q, double dq) {
                    return dq;
                }

                @Override
                public double zStep(double q, double dq) {
                    return k * dq * (2 * q + dq);
                }
            };
            return onProfile(profile, null, density, place, push, best, size(), setting);
        }

        private double nearest(double rho0, double z0) {
            double best = rho1;
            double least = Double.POSITIVE_INFINITY;
            for (int start = 0; start <= 64; start++) {
                double q = rho1 + (rho2 - rho1) * start / 64;
                for (int i = 0; i < 40; i++) {
                    double f = q - rho0 + 2 * k * q * (k * q * q - z0);
                    double d = Math.max(1 + 2 * k * (k * q * q - z0) + 4 * k * k * q * q, 0.5);
                    q = Math.max(rho1, Math.min(rho2, q - f / d));
                }
                double dr = q - rho0;
                double dz = k * q * q - z0;
                if (dr * dr + dz * dz < least) {
                    least = dr * dr + dz * dz;
                    best = q;
                }
            }
            return best;
        }
    }

    /** Sphere about the origin between two polar angles. */
    record Zone(double radius, double theta1, double theta2) implements Charged {
        @Override
        public int dimension() {
            return 2;
        }

        @Override
        public double size() {
            return 2 * radius;
        }

        @Override
        public double thickness() {
            return radius * Math.min(1, theta2 - theta1);
        }

        @Override
        public Answer judge(SmoothDensity density, boolean polynomial, Exact.Position place, double[] push,
                DoubleExponential.Setting setting) {
            double[] p = place.doubles();
            double rho0 = Math.sqrt(p[0] * p[0] + p[1] * p[1]);
            double nearest = Math.max(theta1, Math.min(theta2, Math.atan2(rho0, p[2])));
            RevolutionJudge.Profile profile = new RevolutionJudge.Profile() {
                @Override
                public double from() {
                    return theta1;
                }

                @Override
                public double to() {
                    return theta2;
                }

                @Override
                public double speed(double q) {
                    return radius;
                }

                @Override
                public BigDecimal exactRho(double q) {
                    return Exact.of(radius).multiply(Exact.sin(Exact.of(q)));
                }

                @Override
                public BigDecimal exactZ(double q) {
                    return Exact.of(radius).multiply(Exact.cos(Exact.of(q)));
                }

                @Override
                public double rhoStep(double q, double dq) {
                    return 2 * radius * Math.cos(q + dq / 2) * Math.sin(dq / 2);
                }

                @Override
                public double zStep(double q, double dq) {
                    return -2 * radius * Math.sin(q + dq / 2) * Math.sin(dq / 2);
                }
            };
            return onProfile(profile, null, density, place, push, nearest, size(), setting);
        }
    }

    /** Surface of a torus about z: radius of the centre line, radius of the tube. */
    record Torus(double major, double minor) implements Charged {
        @Override
        public int dimension() {
            return 2;
        }

        @Override
        public double size() {
            return 2 * (major + minor);
        }

        @Override
        public double thickness() {
            return minor;
        }

        @Override
        public Answer judge(SmoothDensity density, boolean polynomial, Exact.Position place, double[] push,
                DoubleExponential.Setting setting) {
            double[] p = place.doubles();
            double nearest = Math.atan2(p[2], Math.sqrt(p[0] * p[0] + p[1] * p[1]) - major);
            RevolutionJudge.Profile profile = new RevolutionJudge.Profile() {
                @Override
                public double from() {
                    return nearest - Math.PI;
                }

                @Override
                public double to() {
                    return nearest + Math.PI;
                }

                @Override
                public double speed(double q) {
                    return minor;
                }

                @Override
                public BigDecimal exactRho(double q) {
                    return Exact.of(major).add(Exact.of(minor).multiply(Exact.cos(Exact.of(q))));
                }

                @Override
                public BigDecimal exactZ(double q) {
                    return Exact.of(minor).multiply(Exact.sin(Exact.of(q)));
                }

                @Override
                public double rhoStep(double q, double dq) {
                    return -2 * minor * Math.sin(q + dq / 2) * Math.sin(dq / 2);
                }

                @Override
                public double zStep(double q, double dq) {
                    return 2 * minor * Math.cos(q + dq / 2) * Math.sin(dq / 2);
                }
            };
            return onProfile(profile, null, density, place, push, nearest, size(), setting);
        }
    }

    private static Answer onProfile(RevolutionJudge.Profile profile, double[] arc, SmoothDensity density, Exact.Position place,
            double[] push, double nearest, double size, DoubleExponential.Setting setting) {
        BigDecimal rho0 = Exact.hypot(place.x(), place.y());
        double azimuth = Math.atan2(place.y().doubleValue(), place.x().doubleValue());
        double pushRho = push[0] * Math.cos(azimuth) + push[1] * Math.sin(azimuth);
        double offRho = rho0.subtract(profile.exactRho(nearest)).doubleValue();
        double offZ = place.z().subtract(profile.exactZ(nearest)).doubleValue();
        // Of two parts that meet at a kink the place is on one only: the push is from there, from the other its true offset.
        if ((pushRho != 0 || push[2] != 0) && Math.hypot(offRho, offZ) < ON * size) {
            offRho = pushRho;
            offZ = push[2];
        }
        double distance = Math.sqrt(offRho * offRho + offZ * offZ);
        return RevolutionJudge.judge(profile, density, arc, place, new double[] {offRho, offZ}, nearest, distance, setting);
    }

    /** Sides along the axes. */
    record Box(double[] low, double[] high) implements Charged {
        @Override
        public int dimension() {
            return 3;
        }

        @Override
        public double size() {
            return Math.max(high[0] - low[0], Math.max(high[1] - low[1], high[2] - low[2]));
        }

        @Override
        public double thickness() {
            return Math.min(high[0] - low[0], Math.min(high[1] - low[1], high[2] - low[2]));
        }

        /** From afar the integrand is smooth: Clenshaw and Curtis along the three sides. */
        private Answer product(SmoothDensity density, double[] place, DoubleExponential.Setting setting) {
            double[][] rule = RayJudge.clenshawCurtis(32 + setting.extraRadialNodes());
            int n = rule[0].length;
            double[] value = new double[4];
            double[] magnitude = new double[4];
            double eighth = (high[0] - low[0]) * (high[1] - low[1]) * (high[2] - low[2]) / 8;
            double[][] node = new double[3][n];
            for (int c = 0; c < 3; c++) {
                for (int i = 0; i < n; i++) {
                    node[c][i] = (high[c] + low[c]) / 2 + (high[c] - low[c]) / 2 * rule[0][i];
                }
            }
            for (int i = 0; i < n; i++) {
                for (int j = 0; j < n; j++) {
                    for (int k = 0; k < n; k++) {
                        double q = eighth * rule[1][i] * rule[1][j] * rule[1][k] * density.at(node[0][i], node[1][j], node[2][k]);
                        double dx = place[0] - node[0][i];
                        double dy = place[1] - node[1][j];
                        double dz = place[2] - node[2][k];
                        double square = dx * dx + dy * dy + dz * dz;
                        double r = Math.sqrt(square);
                        double[] each = {q * dx / (square * r), q * dy / (square * r), q * dz / (square * r), q / r};
                        for (int c = 0; c < 4; c++) {
                            value[c] += each[c];
                            magnitude[c] += Math.abs(each[c]);
                        }
                    }
                }
            }
            return new Answer(value, magnitude, (long) n * n * n);
        }

        @Override
        public Answer judge(SmoothDensity density, boolean polynomial, Exact.Position place, double[] push,
                DoubleExponential.Setting setting) {
            double[] middle = {(low[0] + high[0]) / 2, (low[1] + high[1]) / 2, (low[2] + high[2]) / 2};
            if (Charged.distance(middle, place.doubles()) > 1.5 * size()) {
                return product(density, place.doubles(), setting);
            }
            return RayJudge.judge(RayBody.box(place.doubles(), low, high), density, radial(polynomial), setting);
        }
    }

    /** Body of revolution about z bounded by quadrics; rims are where two faces meet. */
    record Round(List<RayBody.Quadric> faces, List<RayBody.Rim> rims, boolean central, double size, double thickness)
            implements Charged {
        @Override
        public int dimension() {
            return 3;
        }

        @Override
        public Answer judge(SmoothDensity density, boolean polynomial, Exact.Position place, double[] push,
                DoubleExponential.Setting setting) {
            if (Charged.distance(middle(), place.doubles()) > 1.5 * size) {
                return RayJudge.fromAfar(RayBody.revolution(middle(), faces, rims, central), density, place.doubles(), setting);
            }
            return RayJudge.judge(RayBody.revolution(place.doubles(), faces, rims, central), density, radial(polynomial), setting);
        }

        /** On the axis, half-way between the lowest and highest rim; the origin for bodies without rims. */
        private double[] middle() {
            double low = rims.stream().mapToDouble(RayBody.Rim::z).min().orElse(0);
            double high = rims.stream().mapToDouble(RayBody.Rim::z).max().orElse(0);
            return new double[] {0, 0, low == high ? low / 2 : (low + high) / 2};
        }

        static Round drum(double inner, double outer, double z1, double z2) {
            List<RayBody.Quadric> faces = new ArrayList<>(List.of(RayBody.Quadric.cylinder(outer, false), RayBody.Quadric.above(z1),
                    RayBody.Quadric.below(z2)));
            List<RayBody.Rim> rims = new ArrayList<>(List.of(new RayBody.Rim(outer, z1), new RayBody.Rim(outer, z2)));
            if (inner > 0) {
                faces.add(RayBody.Quadric.cylinder(inner, true));
                rims.add(new RayBody.Rim(inner, z1));
                rims.add(new RayBody.Rim(inner, z2));
            }
            return new Round(faces, rims, false, Math.max(2 * outer, z2 - z1), Math.min(outer - inner, z2 - z1));
        }

        /** Between two spheres; {@code upper}: only z at least 0. */
        static Round shell(double inner, double outer, boolean upper) {
            List<RayBody.Quadric> faces = new ArrayList<>(List.of(RayBody.Quadric.sphere(outer, false)));
            List<RayBody.Rim> rims = new ArrayList<>();
            if (inner > 0) {
                faces.add(RayBody.Quadric.sphere(inner, true));
            }
            if (upper) {
                faces.add(RayBody.Quadric.above(0));
                rims.add(new RayBody.Rim(outer, 0));
                if (inner > 0) {
                    rims.add(new RayBody.Rim(inner, 0));
                }
            }
            return new Round(faces, rims, !upper, 2 * outer, outer - inner);
        }

        /** Part of a ball about the origin between two heights. */
        static Round slice(double radius, double z1, double z2) {
            List<RayBody.Rim> rims = new ArrayList<>();
            for (double z : new double[] {z1, z2}) {
                rims.add(new RayBody.Rim(Math.sqrt((radius - z) * (radius + z)), z));
            }
            return new Round(List.of(RayBody.Quadric.sphere(radius, false), RayBody.Quadric.above(z1), RayBody.Quadric.below(z2)), rims, false,
                    2 * radius, z2 - z1);
        }

        /** Solid cone, apex at the origin, from z1 to z2, slope = radius over height. */
        static Round cone(double slope, double z1, double z2) {
            return new Round(List.of(new RayBody.Quadric(1, -slope * slope, 0, 0, false), RayBody.Quadric.above(z1),
                    RayBody.Quadric.below(z2)), List.of(new RayBody.Rim(slope * z1, z1), new RayBody.Rim(slope * z2, z2)), false,
                    Math.max(z2 - z1, 2 * slope * z2), Math.min(z2 - z1, slope * z2));
        }

        /** From z = k rho² up to z = height. */
        static Round heap(double k, double height) {
            double radius = Math.sqrt(height / k);
            return new Round(List.of(new RayBody.Quadric(1, 0, -1 / k, 0, false), RayBody.Quadric.below(height)),
                    List.of(new RayBody.Rim(radius, height)), false, Math.max(2 * radius, height), Math.min(radius, height));
        }
    }
}
