package fieldwright.words;

import fieldwright.charge.Charge;
import fieldwright.charge.ChargedPolyline;
import fieldwright.charge.PointCharge;
import fieldwright.charge.PointCloud;
import fieldwright.charge.Surroundings;
import fieldwright.formula.Formula;
import fieldwright.geometry.Bodies;
import fieldwright.judge.Assessment;
import fieldwright.judge.Check;
import fieldwright.judge.Threshold;
import fieldwright.judge.Thresholds;
import fieldwright.output.Output;
import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Place;
import fieldwright.quantity.Units;
import fieldwright.quantity.Vector;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.function.Function;
import javax.measure.Dimension;

/**
 * The words of working cells. An argument declared {@code Object} is a formula in quotes over the sheet's names, a
 * {@link Formula}, an {@link Amount}, or a plain number; lengths need their unit ({@code "0.3 m"}), a bare 0 does not.
 * Wrong arguments are an {@link AuthorException} that says what to write instead.
 */
public final class Words {
    private Words() { }

    // Places, in the sheet's frame

    public static Place at(Object x, Object y, Object z) {
        return new Place(Given.length("x of the place", x), Given.length("y of the place", y), Given.length("z of the place", z));
    }

    /** phi in radian unless a unit says otherwise. */
    public static Place atCylindrical(Object rho, Object phi, Object z) {
        return Place.cylindrical(notNegative("rho of the place", rho), Given.plain("phi of the place", phi), Given.length("z of the place", z));
    }

    /** theta from the polar axis; angles in radian unless a unit says otherwise. */
    public static Place atSpherical(Object r, Object theta, Object phi) {
        return Place.spherical(notNegative("r of the place", r), Given.plain("theta of the place", theta), Given.plain("phi of the place", phi));
    }

    private static double notNegative(String what, Object given) {
        double value = Given.length(what, given);
        if (value < 0) {
            throw new AuthorException(what + " = " + value + " m: must be >= 0. Turn the direction with an angle.");
        }
        return value;
    }

    // Regions

    public static CartesianShape cartesian() {
        return CartesianShape.open();
    }

    public static CylindricalShape cylindrical() {
        return CylindricalShape.open();
    }

    public static SphericalShape spherical() {
        return SphericalShape.open();
    }

    /** Any shape: x, y, z as formulas of parameters, each then given limits by {@code .over(name, from, to)}. */
    public static ParametricShape parametric(Object x, Object y, Object z) {
        return ParametricShape.open(x, y, z);
    }

    // Charge

    public static Distribution pointCharge(Place place, Object charge) {
        return Distribution.of("point charge", new PointCharge(place, Given.amount("charge", charge), null));
    }

    /** Density in C/m over a line. */
    public static Distribution lineCharge(Shape line, Object density) {
        return spread("lineCharge", 1, line, density);
    }

    /** Density in C/m² over a surface. */
    public static Distribution surfaceCharge(Shape surface, Object density) {
        return spread("surfaceCharge", 2, surface, density);
    }

    /** Density in C/m³ over a volume. */
    public static Distribution volumeCharge(Shape volume, Object density) {
        return spread("volumeCharge", 3, volume, density);
    }

    /** None at all: for what conductors do to an applied field alone. */
    public static Distribution noCharge() {
        return Distribution.of("no charge", new PointCharge(new Place(0, 0, 0), Amount.si(0, 0, Units.CHARGE), null));
    }

    /** Charges that act together. */
    public static Distribution sources(Distribution... parts) {
        return Distribution.together(List.of(parts));
    }

    private static Distribution spread(String word, int dimension, Shape shape, Object density) {
        if (shape.dimension() != dimension) {
            throw new AuthorException(word + ": the region is a " + KINDS[shape.dimension()] + " (" + shape.dimension()
                    + " coordinates with limits), a " + KINDS[dimension] + " has " + dimension + ". "
                    + (shape.dimension() == 0 ? "Use pointCharge(place, charge)" : "Use " + KINDS[shape.dimension()] + "Charge(…)")
                    + ", or " + (shape.dimension() < dimension ? "give limits to one more coordinate." : "hold one more coordinate fixed."));
        }
        Spread spread = Spread.of("density", density, shape);
        Dimension needed = Charge.densityDimension(dimension);
        if (spread.dimension() != null && !spread.dimension().equals(needed)) {
            throw new AuthorException(word + ": density " + spread.formula().text() + " is " + Units.describe(spread.dimension()) + ", a "
                    + KINDS[dimension] + " needs " + Units.describe(needed) + ". " + remedy(spread.dimension()));
        }
        return Distribution.of(KINDS[dimension] + " charge", Charge.of(spread.region(), spread.formula()));
    }

    private static final String[] KINDS = {"point", "line", "surface", "volume"};

    private static String remedy(Dimension found) {
        for (int other = 1; other <= 3; other++) {
            if (found.equals(Charge.densityDimension(other))) {
                return "Use " + KINDS[other] + "Charge(…) over a " + KINDS[other] + ", or correct the density.";
            }
        }
        return found.equals(Units.CHARGE) ? "Divide the charge by the region's measure." : "Check its units.";
    }

    // Very many charges, numbers alone

    /**
     * Point charges from numbers, up to a million and more: {@code pointCloud("mm", "pC", x, y, z, charge)}. Lists from elsewhere are read
     * by {@link #pointCloud(String, String, String)}.
     */
    public static Distribution pointCloud(String lengthUnit, String chargeUnit, double[] x, double[] y, double[] z, double[] charge) {
        double[][] si = Rows.si("pointCloud", lengthUnit, chargeUnit, Units.CHARGE, x, y, z, charge);
        return Distribution.of("point cloud", PointCloud.of(si[0], si[1], si[2], si[3]));
    }

    /** Point charges from a list: a line for each, x, y, z and charge apart by comma, semicolon or space; a # starts a remark. */
    public static Distribution pointCloud(String lengthUnit, String chargeUnit, String rows) {
        double[][] c = Rows.parse("pointCloud", rows);
        return pointCloud(lengthUnit, chargeUnit, c[0], c[1], c[2], c[3]);
    }

    /** A line of very many straight sides from numbers: its corners and the charge per length there, linear between. */
    public static Distribution chargedPolyline(String lengthUnit, String densityUnit, double[] x, double[] y, double[] z, double[] density) {
        double[][] si = Rows.si("chargedPolyline", lengthUnit, densityUnit, Units.LINE_DENSITY, x, y, z, density);
        return Distribution.of("charged polyline", ChargedPolyline.of(si[0], si[1], si[2], si[3]));
    }

    /** The same from a list: a line for each corner, x, y, z and charge per length. */
    public static Distribution chargedPolyline(String lengthUnit, String densityUnit, String rows) {
        double[][] c = Rows.parse("chargedPolyline", rows);
        return chargedPolyline(lengthUnit, densityUnit, c[0], c[1], c[2], c[3]);
    }

    // Charge without ends: limits of their own

    /** Along the z axis, C/m. */
    public static Distribution endlessLine(Object density) {
        return endlessLine(density, "z", new Place(0, 0, 0));
    }

    /** Along an axis' direction through a place, C/m. */
    public static Distribution endlessLine(Object density, String direction, Place through) {
        axis("endlessLine", direction);
        CartesianShape line = cartesian();
        line = direction.equals("x") ? line.x("-inf", "inf") : line.x(0);
        line = direction.equals("y") ? line.y("-inf", "inf") : line.y(0);
        line = direction.equals("z") ? line.z("-inf", "inf") : line.z(0);
        return spread("endlessLine", 1, moved(line, through), density);
    }

    /** The plane z = 0, C/m². */
    public static Distribution endlessPlane(Object density) {
        return endlessPlane(density, "z", 0);
    }

    /** A plane across an axis, C/m². */
    public static Distribution endlessPlane(Object density, String axis, Object offset) {
        axis("endlessPlane", axis);
        CartesianShape plane = cartesian();
        plane = axis.equals("x") ? plane.x(offset) : plane.x("-inf", "inf");
        plane = axis.equals("y") ? plane.y(offset) : plane.y("-inf", "inf");
        plane = axis.equals("z") ? plane.z(offset) : plane.z("-inf", "inf");
        return spread("endlessPlane", 2, plane, density);
    }

    /** Flat in z = 0, endless along y, from {@code -width/2} to {@code width/2} along x; C/m², a formula of x. */
    public static Distribution strip(Object density, Object width) {
        Amount half = size("strip, width", width).dividedBy(2);
        return spread("strip", 2, cartesian().x(half.negated(), half).y("-inf", "inf").z(0), density);
    }

    /** Between two heights, endless along x and y; C/m³, a formula of z. */
    public static Distribution slab(Object density, Object fromZ, Object toZ) {
        return spread("slab", 3, cartesian().x("-inf", "inf").y("-inf", "inf").z(fromZ, toZ), density);
    }

    /** Solid, about the z axis, endless along it; C/m³, a formula of rho. */
    public static Distribution endlessCylinder(Object density, Object radius) {
        return spread("endlessCylinder", 3,
                cylindrical().rho(0, size("endlessCylinder, radius", radius)).phi(0, "2*pi").z("-inf", "inf"), density);
    }

    private static Amount size(String what, Object given) {
        double si = Given.length(what, given);
        if (!(si > 0) || Double.isInfinite(si)) {
            throw new AuthorException(what + " = " + Given.text(given) + ": must be finite and > 0. Check the sign and the unit prefix.");
        }
        return Given.amount(what, given);
    }

    private static Shape moved(Shape shape, Place to) {
        boolean stays = to.x() == 0 && to.y() == 0 && to.z() == 0;
        return stays ? shape : new Shape(shape.region().movedBy(to.x(), to.y(), to.z()));
    }

    // Bodies: ring, arc, disc, annulus, rectangle, shell, ball, box, torus about the origin, flat ones in z = 0; tube, cylinder, helix
    // upwards from z = 0; cone with its apex at the origin, opening upwards

    /** Straight line; its parameter u runs from 0 to 1 and may stand in the density. */
    public static Shape rod(Place from, Place to) {
        return new Shape(Bodies.rod(from, to));
    }

    public static Shape polyline(Place... places) {
        return new Shape(Bodies.polyline(List.of(places)));
    }

    public static Shape ring(Object radius) {
        return new Shape(Bodies.ring(number("ring, radius", radius)));
    }

    /** Part of a ring, angles from the x axis. */
    public static Shape arc(Object radius, Object fromAngle, Object toAngle) {
        return new Shape(Bodies.arc(number("arc, radius", radius), number("arc, from", fromAngle), number("arc, to", toAngle)));
    }

    public static Shape disc(Object radius) {
        return new Shape(Bodies.disc(number("disc, radius", radius)));
    }

    public static Shape annulus(Object inner, Object outer) {
        return new Shape(Bodies.annulus(number("annulus, inner radius", inner), number("annulus, outer radius", outer)));
    }

    public static Shape rectangle(Object alongX, Object alongY) {
        return new Shape(Bodies.rectangle(number("rectangle, side along x", alongX), number("rectangle, side along y", alongY)));
    }

    /** Flat, by its corners in order. */
    public static Shape polygon(Place... corners) {
        return new Shape(Bodies.polygon(List.of(corners)));
    }

    /** Spherical surface. */
    public static Shape shell(Object radius) {
        return new Shape(Bodies.shell(number("shell, radius", radius)));
    }

    /** Cylindrical surface without ends. */
    public static Shape tube(Object radius, Object length) {
        return new Shape(Bodies.tube(number("tube, radius", radius), number("tube, length", length)));
    }

    public static Shape ball(Object radius) {
        return new Shape(Bodies.ball(number("ball, radius", radius)));
    }

    public static Shape box(Object alongX, Object alongY, Object alongZ) {
        return new Shape(Bodies.box(number("box, side along x", alongX), number("box, side along y", alongY), number("box, side along z", alongZ)));
    }

    public static Shape cylinder(Object radius, Object height) {
        return new Shape(Bodies.cylinder(number("cylinder, radius", radius), number("cylinder, height", height)));
    }

    public static Shape cone(Object radius, Object height) {
        return new Shape(Bodies.cone(number("cone, radius", radius), number("cone, height", height)));
    }

    /** Solid torus: radius of its centre line, radius of its tube. */
    public static Shape torus(Object centreLine, Object tube) {
        return new Shape(Bodies.torus(number("torus, radius of the centre line", centreLine), number("torus, radius of the tube", tube)));
    }

    /** Line of so many turns; its parameter t is the angle and may stand in the density. */
    public static Shape helix(Object radius, Object pitch, Object turns) {
        return new Shape(Bodies.helix(number("helix, radius", radius), number("helix, pitch", pitch), number("helix, turns", turns)));
    }

    private static Formula number(String what, Object given) {
        return Formula.constant(Given.amount(what, given));
    }

    // Surroundings

    /** An earthed conducting plane: {@code groundPlane("z", "H")}. */
    public static GroundPlane groundPlane(String axis, Object offset) {
        axis("groundPlane", axis);
        double value = Given.length("groundPlane, offset", offset);
        return new GroundPlane(axis, value, stated(offset, value));
    }

    /** A dielectric behind a plane: {@code dielectricHalfSpace("-z", "0", 2.3)} fills z < 0. */
    public static DielectricHalfSpace dielectricHalfSpace(String side, Object offset, Object relativePermittivity) {
        String text = side.strip().replace('\u2212', '-');
        if (!text.matches("[+-][xyz]")) {
            throw new AuthorException("dielectricHalfSpace: side '" + side + "' must say which side it fills: \"-z\", \"+x\", …");
        }
        double value = Given.length("dielectricHalfSpace, offset", offset);
        double permittivity = Given.plain("dielectricHalfSpace, relative permittivity", relativePermittivity);
        String axis = text.substring(1);
        int filled = text.startsWith("-") ? -1 : 1;
        return new DielectricHalfSpace(axis, value, filled, permittivity, "dielectric of relative permittivity " + Amount.of(permittivity)
                + " fills " + axis + (filled > 0 ? " > " : " < ") + stated(offset, value));
    }

    /** Two earthed parallel planes for {@code .between(…)}: {@code groundPlanes("z", "0", "H")}. */
    public static GroundPlanes groundPlanes(String axis, Object from, Object to) {
        axis("groundPlanes", axis);
        double low = Given.length("groundPlanes, first offset", from);
        double high = Given.length("groundPlanes, second offset", to);
        return new GroundPlanes(new Surroundings.GroundedPair(axis, Math.min(low, high), Math.max(low, high)),
                "ground planes " + axis + " = " + stated(from, low) + " and " + axis + " = " + stated(to, high));
    }

    /** A closed earthed box with its sides across the axes, by two opposite corners, for {@code .inside(…)}. */
    public static Enclosure groundedBox(Place corner, Place opposite) {
        Surroundings box = new Surroundings.GroundedBox(Math.min(corner.x(), opposite.x()), Math.max(corner.x(), opposite.x()),
                Math.min(corner.y(), opposite.y()), Math.max(corner.y(), opposite.y()), Math.min(corner.z(), opposite.z()),
                Math.max(corner.z(), opposite.z()));
        return new Enclosure(box, "closed earthed box from " + stated(corner) + " to " + stated(opposite));
    }

    /** An endless earthed circular tube along an axis' direction about the line through a place, for {@code .inside(…)}. */
    public static Enclosure groundedTube(String axis, Place through, Object radius) {
        axis("groundedTube", axis);
        double r = size("groundedTube, radius", radius).si();
        return new Enclosure(new Surroundings.GroundedTube(axis, through.x(), through.y(), through.z(), r),
                "endless earthed tube along " + axis + " through " + stated(through) + ", radius " + stated(radius, r));
    }

    /**
     * A closed earthed drum: circular cylinder along an axis' direction about the line through a place, with ends, for {@code .inside(…)}:
     * {@code groundedDrum("z", at(0, 0, 0), "R_s", "0", "H")}.
     *
     * @param from end on the axis, a coordinate of the sheet
     * @param to the other end
     */
    public static Enclosure groundedDrum(String axis, Place through, Object radius, Object from, Object to) {
        axis("groundedDrum", axis);
        double r = size("groundedDrum, radius", radius).si();
        double low = Given.length("groundedDrum, first end", from);
        double high = Given.length("groundedDrum, second end", to);
        return new Enclosure(new Surroundings.GroundedDrum(axis, through.x(), through.y(), through.z(), r, Math.min(low, high), Math.max(low, high)),
                "closed earthed drum along " + axis + " through " + stated(through) + ", radius " + stated(radius, r) + ", ends at " + axis + " = "
                        + stated(from, low) + " and " + axis + " = " + stated(to, high));
    }

    /** An earthed sphere for {@code .outside(…)}, or an earthed spherical shell for {@code .inside(…)}. */
    public static ConductingSphere groundedSphere(Place centre, Object radius) {
        double a = size("groundedSphere, radius", radius).si();
        return new ConductingSphere(new Surroundings.GroundedSphere(centre.x(), centre.y(), centre.z(), a, true),
                new Surroundings.GroundedSphere(centre.x(), centre.y(), centre.z(), a, false),
                "earthed sphere of radius " + stated(radius, a) + " about " + stated(centre));
    }

    /** An insulated conducting sphere without charge of its own. */
    public static ConductingSphere floatingSphere(Place centre, Object radius) {
        return floatingSphere(centre, radius, 0);
    }

    /** An insulated conducting sphere with a net charge, C. */
    public static ConductingSphere floatingSphere(Place centre, Object radius, Object netCharge) {
        double a = size("floatingSphere, radius", radius).si();
        double charge = Given.si("floatingSphere, net charge", netCharge, Units.CHARGE);
        return new ConductingSphere(new Surroundings.FloatingSphere(centre.x(), centre.y(), centre.z(), a, true, charge),
                new Surroundings.FloatingSphere(centre.x(), centre.y(), centre.z(), a, false, charge),
                "insulated conducting sphere of radius " + stated(radius, a) + " about " + stated(centre) + ", "
                        + (charge == 0 ? "uncharged" : "net charge " + Amount.si(charge, 0, Units.CHARGE)));
    }

    /** A conducting sphere held at a potential against infinity, V. */
    public static ConductingSphere sphereHeldAt(Object potential, Place centre, Object radius) {
        double v = Given.si("sphereHeldAt, potential", potential, Units.POTENTIAL);
        double a = size("sphereHeldAt, radius", radius).si();
        return new ConductingSphere(new Surroundings.HeldSphere(centre.x(), centre.y(), centre.z(), a, true, v),
                new Surroundings.HeldSphere(centre.x(), centre.y(), centre.z(), a, false, v),
                "conducting sphere of radius " + stated(radius, a) + " about " + stated(centre) + " held at " + Amount.si(v, 0, Units.POTENTIAL));
    }

    private static String stated(Place place) {
        return "(" + place.x() + ", " + place.y() + ", " + place.z() + ") m";
    }

    /** As the author wrote it; a name or formula with its number behind it. */
    private static String stated(Object given, double si) {
        String text = Given.text(given);
        return text.matches("-?[0-9].*") ? text : text + " (" + Amount.si(si, 0, Units.LENGTH) + ")";
    }

    // Numbers and formulas

    /** A number worked by the formula language; locals by name: {@code calc("Q/(4*pi*eps0*a^2)", "a", a)}. */
    public static Amount calc(String formula, Object... locals) {
        return Given.amount("calc", formula, Given.locals("calc", locals));
    }

    /** A formula of coordinates, with the sheet's names and locals put in. */
    public static Formula formula(String text, Object... locals) {
        return Given.withLocals("formula", text, Given.locals("formula", locals));
    }

    /** Coordinates enter as numbers in the first unit (angles in radian), the result has the second. */
    public static Formula plain(String text, String coordinateUnit, String resultUnit) {
        return Formula.plain(text, coordinateUnit, resultUnit, Desk.current().scope());
    }

    public static Integration integral(Object integrand) {
        return Integration.of(integrand);
    }

    // Results and looks

    /** Makes a name of the sheet hold this number. */
    public static Amount result(String name, Amount value) {
        Desk.current().result(name, value);
        return value;
    }

    /** The same, shown in a unit. */
    public static Amount result(String name, Amount value, String unit) {
        return result(name, value.in(unit));
    }

    public static Vector result(String name, Vector value) {
        Desk.current().result(name, value);
        return value;
    }

    public static Vector result(String name, Vector value, String unit) {
        return result(name, value.in(unit));
    }

    /** Shows a number, a vector, a formula or a text. */
    public static void show(Object thing) {
        Desk desk = Desk.current();
        if (desk.mode() == Desk.Mode.REPLAY) {
            return;
        }
        if (thing instanceof Output output) {
            desk.show(output);
        } else if (thing instanceof Formula formula) {
            desk.show(new Output.Typeset("", formula.latex(), formula.text(), "", ""));
        } else {
            desk.show(new Output.Printed(String.valueOf(thing)));
        }
    }

    /** Something the reader must not miss. */
    public static void caution(String text) {
        caution(text, "");
    }

    public static void caution(String text, String source) {
        Desk.current().sayOnce(new Output.Caution(text, source));
    }

    /** Curves along a path, y axis in {@code unit}. */
    public static void profile(String title, String unit, Path path, Curve... curves) {
        if (Desk.current().mode() == Desk.Mode.WORKING) {
            Desk.current().show(Profile.plot(title, unit, path, curves));
        }
    }

    /** What is asked along the path: {@code "|E|"}, {@code "E_z"}, {@code "D_rho"}, … or {@code "V"}. */
    public static Curve curve(String label, Distribution charge, String ask) {
        return Curve.of(label, charge, ask);
    }

    /** A formula of the coordinates along the path, for comparison. */
    public static Curve curve(String label, Object formula) {
        return Curve.of(label, formula);
    }

    /** Straight from one place to another. */
    public static Path between(Place start, Place end) {
        return Path.between(start, end);
    }

    /** One coordinate runs; the others are those of {@code through}. */
    public static Path along(String coordinate, Object from, Object to, Place through) {
        return Path.along(coordinate, from, to, through);
    }

    /** x, y or z runs on its own axis, rho along the x axis, r along the z axis. */
    public static Path along(String coordinate, Object from, Object to) {
        if (coordinate.equals("phi") || coordinate.equals("theta")) {
            throw new AuthorException("path along " + coordinate + ": at the origin no angle runs. Say through which place: along(\""
                    + coordinate + "\", from, to, at(…)).");
        }
        return Path.along(coordinate, from, to, new Place(0, 0, 0));
    }

    /** A rectangle of places for maps: two of x, y, z, or rho with z; the other coordinates are those of {@code through}. */
    public static Window window(String across, Object from, Object to, String up, Object bottom, Object top, Place through) {
        return Window.of(across, from, to, up, bottom, top, through);
    }

    /** Through the origin. */
    public static Window window(String across, Object from, Object to, String up, Object bottom, Object top) {
        return Window.of(across, from, to, up, bottom, top, new Place(0, 0, 0));
    }

    /** Lines on which what a curve asks takes a level each; round levels are chosen when none are named. */
    public static void map(String title, String unit, Window window, Curve curve, Object... levels) {
        if (Desk.current().mode() == Desk.Mode.WORKING) {
            Desk.current().show(Maps.contours(title, unit, window, curve, Maps.levels(unit, levels)));
        }
    }

    /** Lines of equal potential; round levels are chosen when none are named. */
    public static void equipotentials(String title, String unit, Window window, Distribution charge, Object... levels) {
        map(title, unit, window, curve("V", charge, "V"), levels);
    }

    /** Field lines through places, in both directions, seen square to the window; the remarks say how they end. */
    public static void fieldLines(String title, Window window, Distribution charge, Place... through) {
        if (Desk.current().mode() == Desk.Mode.WORKING) {
            Desk.current().show(Maps.lines(title, window, charge, List.of(through)));
        }
    }

    /** A table, one column beside the other. */
    public static void table(String title, Column... columns) {
        if (Desk.current().mode() == Desk.Mode.REPLAY) {
            return;
        }
        int rows = columns.length == 0 ? 0 : columns[0].values().size();
        for (Column column : columns) {
            if (column.values().size() != rows) {
                throw new AuthorException("table '" + title + "': column " + column.quantity() + " has " + column.values().size() + " values, "
                        + columns[0].quantity() + " has " + rows + ". Every column needs as many.");
            }
        }
        List<List<String>> texts = new ArrayList<>();
        for (int row = 0; row < rows; row++) {
            int at = row;
            texts.add(Arrays.stream(columns).map(c -> Column.text(c.values().get(at))).toList());
        }
        Desk.current().show(new Output.Table(title, Arrays.stream(columns).map(Column::heading).toList(), texts, List.of()));
    }

    /** One column: quantity, unit, and numbers or lists of numbers. */
    public static Column column(String quantity, String unit, Object... values) {
        List<Amount> all = new ArrayList<>();
        for (Object value : values) {
            if (value instanceof Iterable<?> list) {
                list.forEach(each -> all.add(Given.amount("column " + quantity, each)));
            } else {
                all.add(Given.amount("column " + quantity, value));
            }
        }
        return new Column(quantity, unit, all);
    }

    /** One column worked from the numbers of another; not worked in a replay, whose tables nobody sees. */
    public static Column column(String quantity, String unit, List<Amount> from, Function<Amount, Amount> value) {
        return new Column(quantity, unit, Desk.current().mode() == Desk.Mode.REPLAY ? List.of() : from.stream().map(value).toList());
    }

    /** Numbers as a list: {@code amounts("0.5 m", "1 m", "H")}. */
    public static List<Amount> amounts(Object... values) {
        return Arrays.stream(values).map(v -> Given.amount("amounts", v)).toList();
    }

    // Verdicts

    /**
     * Compares two numbers; b is the reference.
     *
     * @param tolerance a plain number or {@code "1 %"} is relative to b; {@code "2 kV/m"} is absolute
     */
    public static void check(String label, Object a, Object b, Object tolerance) {
        Amount allowed = Given.amount("check '" + label + "', tolerance", tolerance);
        boolean vectors = a instanceof Vector && b instanceof Vector;
        if (!vectors && (a instanceof Vector || b instanceof Vector)) {
            throw new AuthorException("check '" + label + "': a vector stands against a number. Compare a component or .magnitude().");
        }
        Check check = vectors ? Check.of(label, (Vector) a, (Vector) b, allowed)
                : Check.of(label, Given.amount("check '" + label + "'", a), Given.amount("check '" + label + "'", b), allowed);
        Desk.current().show(Outputs.check(check));
    }

    /** Holds a value against a threshold: it must fit under it {@code margin} times, in the worst case of the inputs too. */
    public static void assess(Amount value, Threshold threshold, double margin) {
        assess(threshold.name(), value, threshold, margin);
    }

    public static void assess(String label, Amount value, Threshold threshold, double margin) {
        Desk.current().show(Outputs.assessment(Assessment.of(label, value, threshold, margin)));
    }

    /** A threshold of one's own; source and caution must be said. */
    public static Threshold threshold(String name, Object value, String source, String caution) {
        return new Threshold(name, Given.amount("threshold '" + name + "'", value), source, caution);
    }

    /** @see Thresholds#airBreakdown() */
    public static Threshold airBreakdown() {
        return Thresholds.airBreakdown();
    }

    /** @see Thresholds#dischargeAtProjection() */
    public static Threshold dischargeAtProjection() {
        return Thresholds.dischargeAtProjection();
    }

    /** @see Thresholds#surfaceChargeInAir() */
    public static Threshold surfaceChargeInAir() {
        return Thresholds.surfaceChargeInAir();
    }

    /** @see Thresholds#surfacePotential() */
    public static Threshold surfacePotential() {
        return Thresholds.surfacePotential();
    }

    static double[] axis(String word, String axis) {
        return switch (axis) {
            case "x" -> new double[] {1, 0, 0};
            case "y" -> new double[] {0, 1, 0};
            case "z" -> new double[] {0, 0, 1};
            default -> throw new AuthorException(word + ": axis '" + axis + "' must be \"x\", \"y\" or \"z\".");
        };
    }
}
