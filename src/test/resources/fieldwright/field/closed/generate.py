"""Writes the reference values of closed forms beside this file: python3 generate.py (needs mpmath).

Every value comes from textbook formulas other than those of the program, worked at 100 digits so that their cancellation
does not matter, or from quadrature at 40 digits; each formula is first checked here against plain quadrature of Coulomb's
law at a few places. Places are exact doubles. Bare kernel, no 1/(4 pi eps0).
"""
import math
import os
import random
import sys
from mpmath import mp, mpf, sqrt, asinh, atan, atan2, log, pi, quad, cos, sin, ellipk, ellipe, linspace

mp.dps = 100
HERE = os.path.dirname(os.path.abspath(__file__))
GAPS = [1e-9, 1e-8, 1e-7, 1e-6, 1e-5, 1e-4, 1e-3, 1e-2, 0.1, 1.0, 2.0, 3.5, 10.0, 1e2, 1e3, 1e4, 1e5, 1e6, 1e7, 1e8]


def F(v):
    return [mpf(float(c)) for c in v]


def norm(v):
    return sqrt(sum(c * c for c in v))


# ---- formulas: each returns ex, ey, ez, v ----

def rod(p, r):
    z1, z2, q0, q1 = F(p)
    x, y, z = F(r)
    s1, s2, d2 = z1 - z, z2 - z, x * x + y * y
    d, r1, r2 = sqrt(d2), sqrt(s1 * s1 + d2), sqrt(s2 * s2 + d2)
    if d == 0:
        L = log(abs(s2 / s1)) * (1 if s1 > 0 else -1)
        across, ratio = mpf(0), (1 if s2 > 0 else -1) - (1 if s1 > 0 else -1)
    else:
        L = asinh(s2 / d) - asinh(s1 / d)
        ratio = s2 / r2 - s1 / r1
        across = ((q0 + q1 * z) * ratio / d2 + q1 * (1 / r1 - 1 / r2))
    q = q0 + q1 * z
    return x * across, y * across, -(q * (1 / r1 - 1 / r2) + q1 * (L - ratio)), q * L + q1 * (r2 - r1)


def triangle_angle(a, b, c):
    """Signed solid angle of a triangle, van Oosterom and Strackee 1983."""
    det = (a[0] * (b[1] * c[2] - b[2] * c[1]) - a[1] * (b[0] * c[2] - b[2] * c[0]) + a[2] * (b[0] * c[1] - b[1] * c[0]))
    na, nb, nc = norm(a), norm(b), norm(c)
    dot = lambda u, w: sum(i * j for i, j in zip(u, w))
    return 2 * atan2(det, na * nb * nc + dot(a, b) * nc + dot(b, c) * na + dot(c, a) * nb)


def polygon(p, r):
    n = int(p[0])
    px, py = F(p[1:1 + n]), F(p[1 + n:1 + 2 * n])
    q0, gx, gy = F(p[1 + 2 * n:])
    x, y, z = F(r)
    area = sum(px[i] * py[(i + 1) % n] - px[(i + 1) % n] * py[i] for i in range(n))
    turn = 1 if area > 0 else -1
    omega = mpf(0)
    for i in range(1, n - 1):
        corner = [[px[k] - x, py[k] - y, -z] for k in (0, i, i + 1)]
        omega += triangle_angle(*corner) * turn
    ez0 = -omega  # along z: positive above a counterclockwise polygon
    field = [mpf(0), mpf(0)]
    v0 = mpf(0)
    first = [mpf(0), mpf(0)]
    second = [mpf(0), mpf(0)]
    sl = mpf(0)
    for i in range(n):
        k = (i + 1) % n
        ax, ay, bx, by = px[i] - x, py[i] - y, px[k] - x, py[k] - y
        l = sqrt((bx - ax) ** 2 + (by - ay) ** 2)
        tx, ty = (bx - ax) / l, (by - ay) / l
        mx, my = ty * turn, -tx * turn
        s1, s2 = ax * tx + ay * ty, bx * tx + by * ty
        q = ax * mx + ay * my
        d2 = q * q + z * z
        d = sqrt(d2)
        r1, r2 = sqrt(s1 * s1 + d2), sqrt(s2 * s2 + d2)
        if d != 0:
            L = asinh(s2 / d) - asinh(s1 / d)
        else:  # on the side itself: unbounded, and no more than an end of a quadrature
            L = log(abs(s2 / s1)) * (1 if s1 > 0 else -1) if s1 * s2 > 0 else mpf(0)
        field[0] += mx * L
        field[1] += my * L
        v0 += q * L
        I = (s2 * r2 - s1 * r1 + d2 * L) / 2
        first[0] += mx * I
        first[1] += my * I
        w = (gx * mx + gy * my) * q * L + (gx * tx + gy * ty) * (r2 - r1)
        second[0] += mx * w
        second[1] += my * w
        sl += (gx * mx + gy * my) * L
    v0 -= z * ez0
    q = q0 + gx * x + gy * y
    return (q * field[0] + second[0] - gx * v0, q * field[1] + second[1] - gy * v0, q * ez0 - z * sl,
            q * v0 + gx * first[0] + gy * first[1])


def box_uniform(p, r):
    """Corner sums as in Nagy 1966 (field) and MacMillan 1930 (potential)."""
    x1, x2, y1, y2, z1, z2 = F(p[:6])
    x, y, z = F(r)
    out = [mpf(0)] * 4
    at = lambda u, w: atan(u / w) if w != 0 else mpf(0)
    for i, X in enumerate((x1 - x, x2 - x)):
        for j, Y in enumerate((y1 - y, y2 - y)):
            for k, Z in enumerate((z1 - z, z2 - z)):
                s = -1 if (i + j + k) % 2 == 0 else 1
                R = sqrt(X * X + Y * Y + Z * Z)
                lx = half_log(X, Y, Z, R)
                ly = half_log(Y, X, Z, R)
                lz = half_log(Z, X, Y, R)
                axx, ayy, azz = at(Y * Z, X * R), at(X * Z, Y * R), at(X * Y, Z * R)
                out[0] += s * (Y * lz + Z * ly - X * axx)
                out[1] += s * (X * lz + Z * lx - Y * ayy)
                out[2] += s * (X * ly + Y * lx - Z * azz)
                out[3] += s * (X * Y * lz + Y * Z * lx + X * Z * ly - (X * X * axx + Y * Y * ayy + Z * Z * azz) / 2)
    return out


def half_log(X, Y, Z, R):
    """asinh(X / sqrt(Y² + Z²)); 0 on the edge's line beyond or on it, where its factor is 0 or the difference is."""
    d = sqrt(Y * Y + Z * Z)
    return asinh(X / d) if d != 0 else mpf(0)


def box(p, r):
    """Uniform part by corner sums; the sloping part by quadrature across of the linear rectangle."""
    q0, gx, gy, gz = F(p[6:])
    x, y, z = F(r)
    base = box_uniform(p, r)
    if gx == 0 and gy == 0 and gz == 0:
        return [q0 * c for c in base]
    return box_sloping(p, r)


def box_sloping(p, r):
    """Sheets z' = const by the polygon formula, summed over z' with breaks crowding towards the place."""
    x1, x2, y1, y2, z1, z2 = [float(c) for c in p[:6]]
    q0, gx, gy, gz = F(p[6:])
    old = mp.dps
    mp.dps = 34
    zz = mpf(float(r[2]))
    breaks = {mpf(z1), mpf(z2)}
    if zz < 50 * (z2 - z1) + z2 and zz > z1 - 50 * (z2 - z1):
        for sign in (-1, 1):
            for e in range(-11, 1):
                c = zz + sign * mpf(10) ** e
                if z1 < c < z2:
                    breaks.add(c)
        if z1 < zz < z2:
            breaks.add(zz)
    breaks = sorted(breaks)

    def sheet(t, comp):
        key = (t,)
        if key not in cache:
            cache[key] = sheet_at(t)
        return cache[key][comp]

    def sheet_at(t):
        q = q0 + gz * t
        return polygon_mp([mpf(x1), mpf(x2), mpf(x2), mpf(x1)], [mpf(y1), mpf(y1), mpf(y2), mpf(y2)], q, gx, gy,
                          mpf(float(r[0])), mpf(float(r[1])), zz - t)

    cache = {}
    out = [quad(lambda t: sheet(t, c), breaks) for c in range(4)]
    mp.dps = old
    return out


def polygon_mp(px, py, q0, gx, gy, x, y, z):
    global F
    keep = F
    F = lambda v: list(v)
    try:
        return polygon([4] + px + py + [q0, gx, gy], [x, y, z])
    finally:
        F = keep


def ring(p, r):
    a, q = F(p)
    x, y, z = F(r)
    rho = sqrt(x * x + y * y)
    r1, r2 = (a + rho) ** 2 + z * z, (a - rho) ** 2 + z * z
    m = 4 * a * rho / r1
    K, E = ellipk(m), ellipe(m)
    ez = 4 * a * z * E / (sqrt(r1) * r2)
    er = mpf(0) if rho == 0 else 2 * a / (rho * sqrt(r1)) * (K - E * (a * a - rho * rho + z * z) / r2)
    c, s = (x / rho, y / rho) if rho != 0 else (mpf(0), mpf(0))
    return q * er * c, q * er * s, q * ez, q * 4 * a * K / sqrt(r1)


def rim_breaks(width):
    """0 to pi with breaks in decades about the width of the peak at 0."""
    out = [mpf(0)]
    t = width / 10
    while t < 1:
        out.append(t)
        t *= 10
    return out + [mpf(1), mpf(2), pi]


def disc(p, r):
    """Rim integrals about the foot of the place, by quadrature over the azimuth."""
    a, q = F(p)
    x, y, z = F(r)
    old = mp.dps
    mp.dps = 40
    rho = sqrt(x * x + y * y)
    h = abs(z)
    near = sqrt((a - rho) ** 2 + z * z)
    width = max(mpf(10) ** -12, min(mpf(1), near / a))
    flat = min(mpf(1), abs(a - rho) / a) if rho != a else mpf(0)
    breaks = sorted(set(rim_breaks(width) + (rim_breaks(flat) if flat > 0 else [])))
    D = lambda f: sqrt((a - rho) ** 2 + z * z + 4 * a * rho * sin(f / 2) ** 2)
    er = 2 * a * quad(lambda f: cos(f) / D(f), breaks)
    num = lambda f: a * (a - rho + 2 * rho * sin(f / 2) ** 2)
    ez = 2 * quad(lambda f: num(f) / (D(f) * (D(f) + h)), breaks)
    v = 2 * quad(lambda f: num(f) / (D(f) + h), breaks)
    mp.dps = old
    c, s = (x / rho, y / rho) if rho != 0 else (mpf(0), mpf(0))
    return q * er * c, q * er * s, q * ez * (1 if z > 0 else -1 if z < 0 else 0), q * v


def shell(p, r):
    a, q = F(p)
    x = F(r)
    d = norm(x)
    Q = 4 * pi * a * a * q
    if d < a:
        return mpf(0), mpf(0), mpf(0), Q / a
    return [Q * c / d ** 3 for c in x] + [Q / d]


def ball(p, r):
    b, a, q = F(p)
    x = F(r)
    d = norm(x)
    w = min(d, a)
    v = 2 * pi * q * (a * a - max(w, b) ** 2)
    if d <= b:
        return mpf(0), mpf(0), mpf(0), v
    Q = 4 * pi / 3 * q * (w ** 3 - b ** 3)
    return [Q * c / d ** 3 for c in x] + [v + Q / d]


def tube(p, r):
    """Rings summed over their height by quadrature, breaks crowding towards the place."""
    z1, z2, a, q = F(p)
    x, y, z = F(r)
    old = mp.dps
    mp.dps = 26
    breaks = {z1, z2}
    for sign in (-1, 0, 1):
        for e in range(-10, 2):
            c = z + sign * mpf(10) ** e
            if z1 < c < z2:
                breaks.add(c)
    cache = {}

    def part(t, c):
        if t not in cache:
            mp.dps = 45  # the ring's own formula cancels near the axis and near the ring
            cache[t] = ring_mp(a, q, (x, y, z - t))
            mp.dps = 26
        return cache[t][c]

    out = [quad(lambda t: part(t, c), sorted(breaks)) for c in range(4)]
    mp.dps = old
    return out


def cylinder(p, r):
    """Surface integrals over the azimuth by quadrature: Ez from the end discs, Erho and V = ½ ∮ h dA/R with the side."""
    z1, z2, a, q = F(p)
    x, y, z = F(r)
    old = mp.dps
    mp.dps = 40
    rho = sqrt(x * x + y * y)
    up, down = z2 - z, z1 - z
    top, bottom = disc_mp(a, rho, up), disc_mp(a, rho, down)
    breaks = {mpf(0)}
    for w in (abs(a - rho), sqrt((a - rho) ** 2 + up * up), sqrt((a - rho) ** 2 + down * down)):
        breaks |= set(rim_breaks(max(mpf(10) ** -12, min(mpf(1), w / a))))
    breaks = sorted(breaks)
    s2 = lambda f: (a - rho) ** 2 + 4 * a * rho * sin(f / 2) ** 2
    L = lambda f: asinh(up / sqrt(s2(f))) - asinh(down / sqrt(s2(f)))
    er = 2 * a * quad(lambda f: cos(f) * L(f), breaks)
    side = 2 * a * quad(lambda f: (a - rho + 2 * rho * sin(f / 2) ** 2) * L(f), breaks)
    v = (up * top - down * bottom + side) / 2
    mp.dps = old
    c, s = (x / rho, y / rho) if rho != 0 else (mpf(0), mpf(0))
    return q * er * c, q * er * s, q * (top - bottom), q * v


def disc_mp(a, rho, z):
    global F
    keep = F
    F = lambda v: [mpf(c) for c in v]
    try:
        return disc([a, mpf(1)], (rho, mpf(0), z))[3]
    finally:
        F = keep


def strip(p, r):
    """Endless lines summed over the width: textbook antiderivatives at 100 digits."""
    x1, x2, q = F(p)
    x, y, z = F(r)
    u1, u2 = x1 - x, x2 - x
    at = lambda u: atan(u / z) if z != 0 else mpf(0)
    m = lambda u: (u * log(u * u + z * z) if u != 0 or z != 0 else 0) - 2 * u + 2 * z * at(u)
    return q * (log(u1 * u1 + z * z) - log(u2 * u2 + z * z)), mpf(0), 2 * q * (at(u2) - at(u1)), -q * (m(u2) - m(u1))


def half_line(p, r):
    """Limit of the rod's textbook form at 100 digits."""
    q, = F(p)
    x, y, z = F(r)
    rho2 = x * x + y * y
    d = sqrt(rho2 + z * z)
    across = (1 + z / d) / rho2 if rho2 != 0 else mpf(0)
    return q * across * x, q * across * y, -q / d, -q * log(d - z)


# ---- places: anchors on or in the body, and directions to leave them ----

def leave(anchors, gaps=GAPS):
    for (ax, ay, az), directions in anchors:
        for u in directions:
            l = sum(c * c for c in u) ** 0.5
            for g in gaps:
                yield (ax + g * u[0] / l, ay + g * u[1] / l, az + g * u[2] / l)


def segment_gap(a, b, r):
    a, b, r = F(a), F(b), F(r)
    t = [j - i for i, j in zip(a, b)]
    l2 = sum(c * c for c in t)
    w = max(mpf(0), min(mpf(1), sum((k - i) * c for i, k, c in zip(a, r, t)) / l2))
    return norm([k - i - w * c for i, k, c in zip(a, r, t)])


def rim_gap(a, r, z0=0.0):
    x, y, z = F(r)
    return sqrt((sqrt(x * x + y * y) - mpf(float(a))) ** 2 + (z - mpf(float(z0))) ** 2)


CASES = []


def case(name, formula, params, places, gap):
    CASES.append((name, formula, params, list(places), gap))


def polygon_gap(p):
    n = int(p[0])
    c = [(p[1 + i], p[1 + n + i], 0.0) for i in range(n)]
    return lambda r: min(segment_gap(c[i], c[(i + 1) % n], r) for i in range(n))


def box_gap(p):
    X, Y, Z = p[0:2], p[2:4], p[4:6]
    es = [((X[0], y, z), (X[1], y, z)) for y in Y for z in Z] + [((x, Y[0], z), (x, Y[1], z)) for x in X for z in Z] \
        + [((x, y, Z[0]), (x, y, Z[1])) for x in X for y in Y]
    return lambda r: min(segment_gap(a, b, r) for a, b in es)


def random_cases(seed=20250314):
    """Random bodies: aspect ratios to 1e4, off the origin, seen from random gaps beside random points of their edges."""
    rnd = random.Random(seed)

    def direction():
        v = [rnd.gauss(0, 1) for _ in range(3)]
        if rnd.random() < 0.3:
            v[rnd.randrange(3)] = 0.0
        l = sum(c * c for c in v) ** 0.5
        return [c / l for c in v]

    def beside(point, low, high):
        g = 10 ** rnd.uniform(low, high)
        return tuple(c + g * d for c, d in zip(point, direction()))

    def between(a, b, w):
        return tuple(i + w * (j - i) for i, j in zip(a, b))

    for _ in range(60):
        offset = rnd.choice([0.0, 0.0, 1.0, 30.0]) * rnd.uniform(-1, 1)
        q = rnd.choice([[1.0, 0.0], [rnd.uniform(-1, 1), rnd.uniform(-1, 1)]])
        l = 10 ** rnd.uniform(-3, 1)
        p = [offset, offset + l] + q
        ends = ((0, 0, p[0]), (0, 0, p[1]))
        case('rodRandom', rod, p, [beside(between(*ends, rnd.choice([0, 0.5, rnd.random(), 1])), -8, 1.5) for _ in range(3)],
             lambda r, e=ends: segment_gap(e[0], e[1], r))
    for _ in range(120):
        n = rnd.choice([3, 4, 5, 8])
        stretch = 10 ** rnd.uniform(-4, 0)
        turn, ox, oy = rnd.uniform(0, 6.3), rnd.choice([0.0, rnd.uniform(-5, 5)]), rnd.choice([0.0, rnd.uniform(-5, 5)])
        xs, ys = [], []
        for i in range(n):  # a star about its middle: sides do not cross
            f, m = 2 * math.pi * (i + rnd.uniform(0, 0.8)) / n, rnd.uniform(0.3, 1)
            a, b = m * math.cos(f), m * math.sin(f) * stretch
            xs.append(ox + a * math.cos(turn) - b * math.sin(turn))
            ys.append(oy + a * math.sin(turn) + b * math.cos(turn))
        q = rnd.choice([[1.0, 0.0, 0.0], [rnd.uniform(-1, 1) for _ in range(3)]])
        p = [n] + xs + ys + q
        corner = [(x, y, 0.0) for x, y in zip(xs, ys)]
        places = []
        for _ in range(3):
            i = rnd.randrange(n)
            places.append(beside(between(corner[i], corner[(i + 1) % n], rnd.choice([0, rnd.random()])), -8, 1))
        case('polygonRandom', polygon, p, [r for r in places if r[2] != 0], polygon_gap(p))
    for _ in range(120):
        side = [10 ** rnd.uniform(-4, 0) for _ in range(3)]
        at = [rnd.choice([0.0, rnd.uniform(-2, 2)]) for _ in range(3)]
        p = []
        for a, l in zip(at, side):
            p += [a, a + l]
        p += [1.0, 0.0, 0.0, 0.0]
        places = [beside([p[2 * i + rnd.randrange(2)] if rnd.random() < 0.7 else at[i] + rnd.random() * side[i] for i in range(3)], -8, 1)
                  for _ in range(3)]
        case('boxRandom', box, p, places, box_gap(p))
    for _ in range(100):
        a = 10 ** rnd.uniform(-2, 1)
        f = rnd.uniform(0, 6.3)
        places = [beside((a * math.cos(f), a * math.sin(f), 0.0), -8, 1.5) for _ in range(2)] \
            + [(a * rnd.uniform(-1.2, 1.2), a * rnd.uniform(-1.2, 1.2), a * 10 ** rnd.uniform(-6, 1))]
        case('ringRandom', ring, [a, 1.0], places, lambda r, a=a: rim_gap(a, r))
        case('discRandom', disc, [a, 1.0], [r for r in places if r[2] != 0], lambda r, a=a: rim_gap(a, r))


def build():
    all_round = [(1, 0, 0), (0.6, -0.8, 0), (0.3, 0.2, 0.7), (0, 0.1, 1), (-0.5, 0.4, -0.9), (1e-5, 0, 1), (1, 1e-5, 1e-6)]
    for p in ([-0.7, 1.1, 1.3, 0.0], [-0.7, 1.1, 0.4, -0.9], [-1.0, 1.0, 0.0, 1.0]):
        places = leave([((0, 0, 0.3), [(1, 0, 0), (0.6, -0.8, 0)]), ((0, 0, p[1]), all_round + [(0, 0, 1)]),
                        ((0, 0, p[0]), [(0, 0, -1), (0.2, 0.3, -0.4), (1, 0, 0.5)])])
        ends = ((0, 0, p[0]), (0, 0, p[1]))
        case('rod', rod, p, places, lambda r, e=ends: segment_gap(e[0], e[1], r))
    rect = [4, 0.0, 2.0, 2.0, 0.0, -1.0, -1.0, 0.5, 0.5]
    tri = [3, 0.1, 1.3, 0.4, -0.2, 0.3, 1.7]
    ell = [6, 0.0, 3.0, 3.0, 1.0, 1.0, 0.0, 0.0, 0.0, 1.0, 1.0, 2.0, 2.0]  # an L, one corner turned in
    up = [(0, 0, 1), (0, 0, -1)]
    for shape, inner, edge, corner in ((rect, (0.7, 0.1), (2.0, 0.2), (2.0, 0.5)), (tri, (0.5, 0.4), (0.7, 0.05), (0.4, 1.7)),
                                       (ell, (0.5, 1.5), (1.0, 1.5), (1.0, 1.0))):
        for q in ([1.0, 0.0, 0.0], [0.5, -0.8, 1.1], [0.0, 1.0, 0.0]):
            p = shape + q
            places = leave([((*inner, 0.0), up + [(0.5, 0.2, 0.6)]), ((*edge, 0.0), up + [(1, 0, 0), (1, 0.2, 1e-3)]),
                            ((*corner, 0.0), [(0, 0, 1), (0.6, 0.7, 0.2), (-0.3, 0.2, 0.4), (0.2, -0.5, 0.0)])])
            case('polygon', polygon, p, places, polygon_gap(p))
    for sides in ([-1.0, 1.0, -0.5, 0.75, 0.0, 2.0], [0.0, 1.0, 0.0, 1.0, 0.0, 1e-4], [0.0, 1e-3, 0.0, 1e-3, 0.0, 1.0]):
        mid = [(sides[2 * i] + sides[2 * i + 1]) / 2 for i in range(3)]
        face = (sides[1], mid[1], mid[2] * 0.9)
        edge = (sides[1], sides[3], mid[2] * 0.8)
        corner = (sides[1], sides[3], sides[5])
        p = sides + [1.0, 0.0, 0.0, 0.0]
        places = leave([(face, [(1, 0, 0), (-1, 0, 0)]), (edge, [(1, 1, 0.1), (1, -0.3, 0), (-1, -0.5, 0)]),
                        (corner, [(1, 0.8, 0.9), (-0.2, -0.3, -0.4), (0, 0, 1)]), (tuple(mid), [(0.3, 0.5, 1)])])
        case('box', box, p, places, box_gap(p))
    for q in ([0.5, -0.8, 1.1, 0.3], [0.0, 0.0, 1.0, 0.0]):
        p = [-1.0, 1.0, -0.5, 0.75, 0.0, 2.0] + q
        few = [1e-9, 1e-6, 1e-3, 0.3, 3.0, 6.0, 1e2, 1e5, 1e8]
        places = leave([((1.0, 0.1, 0.9), [(1, 0, 0)]), ((1.0, 0.75, 0.8), [(1, 1, 0.1)]), ((1.0, 0.75, 2.0), [(-0.2, -0.3, -0.4)])], few)
        case('box', box, p, places, box_gap(p))
    p = [1.25, 0.8]
    places = leave([((1.25, 0.0, 0.0), all_round + [(-1, 0, 0), (-0.7, 0, 0.2)]), ((0.0, 0.0, 0.0), all_round), ((-0.75, 1.0, 0.0), [(0.1, 0.2, 1), (0.3, -0.4, 0)])])
    case('ring', ring, p, places, lambda r: rim_gap(1.25, r))
    places = leave([((1.25, 0.0, 0.0), all_round + [(-1, 0, 0), (-0.7, 0, 0.2)]), ((0.0, 0.0, 0.0), [(0, 0, 1), (0.2, 0.1, 0.4), (1, 0, 1e-5)]), ((0.3, -0.6, 0.0), up + [(1, 0, 1e-3)])])
    case('disc', disc, [1.25, 0.8], [r for r in places if not (r[2] == 0 and r[0] ** 2 + r[1] ** 2 <= 1.25 ** 2)], lambda r: rim_gap(1.25, r))
    far = lambda r: mpf(1)
    places = list(leave([((0.0, 0.0, 1.5), [(0, 0, 1), (0, 0, -1), (0.3, 0.4, 0.5)]), ((0.9, -1.2, 0.0), [(0.9, -1.2, 0), (-0.9, 1.2, 0)]), ((0.0, 0.0, 0.0), [(0.3, 0.4, 0.2)])]))
    case('shell', shell, [1.5, 0.7], places, far)
    case('ball', ball, [0.0, 1.5, 0.7], places, far)
    case('ball', ball, [1.4999, 1.5, 0.7], places + list(leave([((0.0, 0.0, 1.4999), [(0, 0, 1), (0, 0, -1)])])), far)


    few = [1e-9, 1e-7, 1e-5, 1e-3, 0.03, 0.4, 1.0, 2.5, 5.0, 20.0, 1e2, 1e4, 1e6, 1e8]
    for p in ([-1.0, 0.5, 0.8, 1.3], [0.0, 1e-3, 0.8, 1.3], [-10.0, 10.0, 0.05, 1.3]):
        z1, z2, a, q = p
        mid = (z1 + z2) / 2
        places = list(leave([((a, 0.0, z2), [(1, 0, 0), (0.6, -0.3, 0.7), (-0.5, 0.2, -0.6), (-0.1, 0, 1)]),
                             ((a, 0.0, mid), [(1, 0, 1e-4), (-1, 0.2, 0.3)]), ((0.0, 0.0, 0.9 * z1 + 0.1 * z2), [(0.3, 0.2, 0.5)]), ((0.0, -a / 3, z2), [(0, 0, 1)])], few))
        gap = lambda r, p=p: min(rim_gap(p[2], r, p[0]), rim_gap(p[2], r, p[1]))
        case('tube', tube, p, places, gap)
        case('cylinder', cylinder, p, places, gap)
    random_cases()
    whole = lambda r: mpf(1)  # on the body itself, where the value is finite
    sides = [-1.0, 1.0, -0.5, 0.75, 0.0, 2.0]
    on = [(1.0, 0.75, 2.0), (-1.0, -0.5, 0.0), (1.0, 0.75, 0.8), (0.3, -0.5, 2.0), (1.0, 0.1, 0.9), (0.2, 0.1, 0.0), (1.0, 0.75, 3.0), (0.0, 0.125, 1.0)]
    case('boxOn', box, sides + [1.0, 0.0, 0.0, 0.0], on, whole)
    case('boxOn', box, sides + [0.5, -0.8, 1.1, 0.3], on, whole)
    for p in ([-1.0, 0.5, 1.25, 1.3], [-10.0, 10.0, 0.125, 1.3]):
        a = p[2]
        case('cylinderOn', cylinder, p, [(a, 0.0, p[1]), (0.6 * a, 0.8 * a, p[0]), (a, 0.0, 0.1), (0.0, a, -0.7), (0.3 * a, 0.0, p[1]),
                                         (0.0, 0.0, p[1]), (0.0, 0.0, 0.0), (a, 0.0, 2 * p[1]), (0.1 * a, 0.2 * a, 0.3)], whole)
    p = [-0.5, 1.5, 0.9]
    case('strip', strip, p, leave([((1.5, 0, 0), [(1, 0, 0), (0.5, 0, 1), (-0.7, 0.1, -0.4)]), ((0.2, 0, 0), up + [(1, 0, 1)])]),
         lambda r: min(sqrt((mpf(r[0]) - e) ** 2 + mpf(r[2]) ** 2) for e in (mpf(-0.5), mpf(1.5))))
    case('halfLine', half_line, [0.9], leave([((0, 0, 1.0), [(1, 0, 0), (0.6, 0.8, 1e-3)]), ((0, 0, 0), [(1, 0, 0), (0.1, 0.2, -1), (1, 0, 1)])]),
         lambda r: (sqrt(mpf(r[0]) ** 2 + mpf(r[1]) ** 2) if r[2] > 0 else norm(F(r))))


# ---- self-check: plain quadrature of Coulomb's law at places a good way off ----

def self_check():
    mp.dps = 20
    def close(a, b, what):
        d = norm([i - j for i, j in zip(a, b)]) / norm(b)
        assert d < 1e-12, (what, d)
    def kernel(r, s, q):
        d = [i - j for i, j in zip(F(r), s)]
        R = norm(d)
        return [q * c / R ** 3 for c in d] + [q / R]
    r = (0.7, -0.5, 1.9)
    p = [-0.7, 1.1, 0.4, -0.9]
    close(rod(p, r), [quad(lambda t: kernel(r, (0, 0, t), mpf(0.4) - mpf(0.9) * t)[c], [p[0], p[1]]) for c in range(4)], 'rod')
    tri = [3, 0.1, 1.3, 0.4, -0.2, 0.3, 1.7, 0.5, -0.8, 1.1]
    nodes, weights = gauss(24)
    def fan(c):
        total = mpf(0)
        ax, ay, ux, uy, wx, wy = 0.1, -0.2, 1.2, 0.5, 0.3, 1.9
        det = mpf(ux) * mpf(wy) - mpf(wx) * mpf(uy)
        for a, wa in zip(nodes, weights):
            for b, wb in zip(nodes, weights):
                u, t = (1 + a) / 2, (1 + b) / 2
                sx = mpf(ax) + u * ((1 - t) * ux + t * wx)
                sy = mpf(ay) + u * ((1 - t) * uy + t * wy)
                total += wa * wb / 4 * u * det * kernel(r, (sx, sy, mpf(0)), mpf(0.5) - mpf(0.8) * sx + mpf(1.1) * sy)[c]
        return total
    close(polygon(tri, r), [fan(c) for c in range(4)], 'polygon')
    rb = (1.7, -1.5, 3.9)
    for p in ([-1.0, 1.0, -0.5, 0.75, 0.0, 2.0, 1.0, 0.0, 0.0, 0.0], [-1.0, 1.0, -0.5, 0.75, 0.0, 2.0, 0.5, -0.8, 1.1, 0.3]):
        sums = [mpf(0)] * 4
        for a, wa in zip(nodes, weights):
            for b, wb in zip(nodes, weights):
                for c, wc in zip(nodes, weights):
                    s = (a, mpf(0.125) + mpf(0.625) * b, 1 + c)
                    q = p[6] + p[7] * s[0] + p[8] * s[1] + p[9] * s[2]
                    k = kernel(rb, s, q * mpf(0.625) * wa * wb * wc)
                    sums = [i + j for i, j in zip(sums, k)]
        close(box(p, rb), sums, 'box')
    a = mpf(1.25)
    close(ring([1.25, 0.8], r), [quad(lambda f: kernel(r, (a * cos(f), a * sin(f), mpf(0)), mpf(0.8) * a)[c], linspace(0, 2 * pi, 9)) for c in range(4)], 'ring')
    close(disc([1.25, 0.8], r), [sum(w * a / 2 * ring_mp(a * (1 + n) / 2, mpf(0.8), r)[c] for n, w in zip(*gauss(40))) for c in range(4)], 'disc')
    p = [-1.0, 0.5, 0.8, 1.3]
    r = (1.7, -0.5, 0.9)
    b = mpf(0.8)
    def surface(c):  # tube by plain Gauss in both
        m = 48
        return sum(wz * mpf(0.75) * 2 * pi / m * b * kernel(r, (b * cos(2 * pi * k / m), b * sin(2 * pi * k / m), mpf(-0.25) + mpf(0.75) * nz), mpf(1.3))[c]
                   for k in range(m) for nz, wz in zip(nodes, weights))
    close(tube(p, r), [surface(c) for c in range(4)], 'tube')
    discs = [[mpf(0.75) * w * c for c in disc_all(b, mpf(1.3), (r[0], r[1], mpf(r[2]) - (mpf(-0.25) + mpf(0.75) * n)))] for n, w in zip(*gauss(24))]
    close(cylinder(p, r), [sum(d[c] for d in discs) for c in range(4)], 'cylinder')
    lines = [[2 * w * mpf(0.9) * (mpf(r[0]) - xx) / ((mpf(r[0]) - xx) ** 2 + mpf(r[2]) ** 2), mpf(0), 2 * w * mpf(0.9) * mpf(r[2]) / ((mpf(r[0]) - xx) ** 2 + mpf(r[2]) ** 2),
              -w * mpf(0.9) * log((mpf(r[0]) - xx) ** 2 + mpf(r[2]) ** 2)] for xx, w in ((mpf(0.5) + n, w) for n, w in zip(*gauss(60)))]
    close(strip([-0.5, 1.5, 0.9], r), [sum(d[c] for d in lines) for c in range(4)], 'strip')
    mp.dps = 100


def disc_all(a, q, r):
    global F
    keep = F
    F = lambda v: [mpf(c) for c in v]
    try:
        return disc([a, q], r)
    finally:
        F = keep


def ring_mp(a, q, r):
    global F
    keep = F
    F = lambda v: [mpf(c) for c in v]
    try:
        return ring([a, q], r)
    finally:
        F = keep


def gauss(n):
    xs, ws = [], []
    for i in range(n):
        t = cos(pi * (i + mpf(3) / 4) / (n + mpf(1) / 2))
        for _ in range(8):
            p0, p1 = mpf(1), t
            for k in range(2, n + 1):
                p0, p1 = p1, ((2 * k - 1) * t * p1 - (k - 1) * p0) / k
            d = n * (p0 - t * p1) / (1 - t * t)
            t -= p1 / d
        xs.append(t)
        ws.append(2 / ((1 - t * t) * d * d))
    return xs, ws


def main(only):
    self_check()
    build()
    by = {}
    for name, formula, params, places, gap in CASES:
        if only and name not in only:
            continue
        rows = by.setdefault(name, [])
        for r in places:
            value = formula(params, r)
            g = gap(r)
            rows.append(','.join([' '.join(repr(float(c)) for c in params)] + [repr(float(c)) for c in r] + [mp.nstr(g, 5)]
                                 + [mp.nstr(c, 22) for c in value]))
    for name, rows in by.items():
        with open(os.path.join(HERE, name + '.csv'), 'w') as f:
            f.write('# generate.py with mpmath; formulas worked at 100 digits (disc, cylinder, sloping box, tube: quadrature at 26 to 40), 22 printed\n')
            f.write('# bare kernel, no 1/(4 pi eps0); gap: distance to the nearest edge, rim or line (1 where there is none)\n')
            f.write('parameters,x,y,z,gap,ex,ey,ez,v\n')
            f.write('\n'.join(rows) + '\n')
        print(name, len(rows))


if __name__ == '__main__':
    main(sys.argv[1:])
