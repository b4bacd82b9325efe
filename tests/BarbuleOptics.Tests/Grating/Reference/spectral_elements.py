#!/usr/bin/env python3
"""Reflectance and transmittance of rows of hollow elliptical rods by spectral elements: an independent method of high accuracy.

Needs numpy and scipy (Debian: python3-numpy python3-scipy). Run: python3 spectral_elements.py [degree]
Prints the values that hollow-ellipses.csv holds, with the change from the degree below.

The equations.  Rods along y, x along the surface, z down; exp(i kappa y - i w t), lengths times k0, H times the vacuum impedance.
With E = Ey, H = Hy, q = e - kappa^2, a = e/q, b = 1/q, c = kappa/q, Maxwell's equations are
    d/dz (a Ez' + c Hx') + d/dx (a Ex' - c Hz') + e E = 0        d/dz (b Hz' - c Ex') + d/dx (b Hx' + c Ez') + H = 0
(Ez' = dE/dz and so on), solved in their weak form.  One period is meshed by curved quadrilaterals whose sides follow the ellipses
exactly, with polynomials of one degree in each; above and below, every order of the plane waves leaves as it must (a dense
boundary operator); left and right faces are tied by the phase of the incident wave.  The error falls exponentially with the degree.
Textbook: Karniadakis and Sherwin, Spectral/hp Element Methods, chapter 4 (from memory).
"""
import sys
import numpy as np
import scipy.sparse as sp
import scipy.sparse.linalg as spl


# --- polynomials of one element ---------------------------------------------------------------------------------------------
def lobatto(degree):
    """Gauss-Lobatto nodes on -1..1."""
    inner = np.polynomial.legendre.Legendre.basis(degree).deriv().roots()
    return np.concatenate([[-1.0], np.sort(inner.real), [1.0]])


def lagrange(nodes, points):
    """Values and slopes of the Lagrange polynomials of nodes at points."""
    to_legendre = np.linalg.inv(np.polynomial.legendre.legvander(nodes, len(nodes) - 1))
    values = np.polynomial.legendre.legvander(points, len(nodes) - 1) @ to_legendre
    slopes = np.stack([np.polynomial.legendre.legval(points, np.polynomial.legendre.legder(column)) for column in to_legendre.T], 1)
    return values, slopes


# --- mesh: each element is a ruled patch between two curves, given by (curve at r = 0, curve at r = 1), s in 0..1 ------------
def segment(p, q):
    p, q = np.array(p, float), np.array(q, float)
    return lambda s: p[:, None] * (1 - s) + q[:, None] * s


def arc(half_x, half_z, t0, t1):
    return lambda s: np.array([half_x * np.cos(t0 + (t1 - t0) * s), half_z * np.sin(t0 + (t1 - t0) * s)])


def film(period, top, thickness, e, most):
    """Two columns of rectangles, none taller than most."""
    count = max(1, int(np.ceil(thickness / most)))
    edges = top + thickness * np.arange(count + 1) / count
    return [(segment((x, z0), (x + period / 2, z0)), segment((x, z1), (x + period / 2, z1)), e)
            for x in (-period / 2, 0) for z0, z1 in zip(edges[:-1], edges[1:])]


def quarter(half_period, half_height, outer, pitch):
    """Rim of a tile from (half_period, 0) to (0, deepest), x, z >= 0: flat at half_height, or, towards a row at a distance pitch that is
    moved by half a period, along the line of equal distance from both rods (distances in units of their half axes)."""
    if pitch is None:
        return [(half_period, 0), (half_period, half_height), (0, half_height)]
    x, z = half_period / outer[0] ** 2, pitch / outer[1] ** 2
    reach = (x * half_period + z * pitch) / 2
    side, tip = (reach - x * half_period) / z, reach / z
    slope = [(half_period * (1 - u), side + (tip - side) * u) for u in (0, 1 / 3, 2 / 3, 1)]
    return [(half_period, 0)] + slope


def row(period, center, outer, core, e_matrix, e_shell, e_core, above, below, shifted=False):
    """A row of hollow ellipses (half axes outer, core); above and below are ("flat", distance) or ("nested", pitch)."""
    def part(kind):
        return quarter(period / 2, kind[1], outer, kind[1] if kind[0] == "nested" else None)

    low, high = part(below), part(above)
    rim = low + [(-x, z) for x, z in low[-2::-1]] + [(-x, -z) for x, z in high[1:]] + [(x, -z) for x, z in high[-2::-1]]
    angles = np.unwrap([np.arctan2(z / outer[1], x / outer[0]) for x, z in rim])
    hub = [(0.5 * core[0] * np.cos(t), 0.5 * core[1] * np.sin(t)) for t in angles]
    move = np.array([[period / 2 if shifted else 0.0], [center]])
    parts = []

    def add(inner, outside, e):
        parts.append((lambda s: inner(s) + move, lambda s: outside(s) + move, e))

    for j in range(len(rim) - 1):
        inside, shell = arc(*core, angles[j], angles[j + 1]), arc(*outer, angles[j], angles[j + 1])
        add(segment(hub[j], hub[j + 1]), inside, e_core)
        add(inside, shell, e_shell)
        add(shell, segment(rim[j], rim[j + 1]), e_matrix)
    for j in range(0, len(rim) - 1, 2):
        add(segment((0, 0), hub[j]), segment(hub[j + 2], hub[j + 1]), e_core)
    return parts


def graded(corners, ends, levels, ratio=0.15):
    """Breaks between the ends that crowd geometrically towards every corner, where the magnetic field is singular."""
    base = sorted(set(corners) | set(ends))
    breaks = set(base)
    for low, high in zip(base[:-1], base[1:]):
        at_low, at_high = low in corners, high in corners
        reach = (high - low) / 2 if at_low and at_high else high - low
        for k in range(0 if at_low and at_high else 1, levels + 1):
            if at_low:
                breaks.add(low + reach * ratio ** k)
            if at_high:
                breaks.add(high - reach * ratio ** k)
    return sorted(breaks)


# --- the solution -----------------------------------------------------------------------------------------------------------
class Mesh:
    def __init__(self, elements, degree):
        nodes, (points, weights) = lobatto(degree), np.polynomial.legendre.leggauss(degree + 4)
        self.nodes = nodes
        value, slope = lagrange(nodes, points)
        v = np.kron(value, value)
        dr, ds = np.kron(slope, value), np.kron(value, slope)
        w = np.kron(weights, weights)
        unit = (nodes + 1) / 2
        self.parts = []
        places = []
        for low, high, e in elements:
            r = np.repeat(unit, degree + 1)
            s = np.tile(unit, degree + 1)
            xz = low(s) * (1 - r) + high(s) * r
            # Exact geometry at the quadrature points: slopes of the ruled patch in r exactly, in s through a fine polynomial.
            xr, xs = dr @ xz.T, ds @ xz.T
            det = xr[:, 0] * xs[:, 1] - xr[:, 1] * xs[:, 0]
            assert np.all(det > 0) or np.all(det < 0), "folded element"
            dx = (dr * xs[:, 1:2] - ds * xr[:, 1:2]) / det[:, None]
            dz = (-dr * xs[:, 0:1] + ds * xr[:, 0:1]) / det[:, None]
            ww = (w * np.abs(det))[:, None]
            self.parts.append((e, dx.T @ (ww * dx), dz.T @ (ww * dz), dz.T @ (ww * dx), v.T @ (ww * v)))
            places.append(xz.T)
        places = np.concatenate(places)
        scale = np.abs(places).max()
        _, first, self.number = np.unique(np.round(places / scale * 1e8).astype(np.int64), axis=0, return_index=True, return_inverse=True)
        self.number = self.number.ravel()
        self.xz = places[first]
        self.degree = degree

    def assemble(self, pick):
        size = (self.degree + 1) ** 2
        rows = np.concatenate([np.repeat(self.number[k * size:(k + 1) * size], size) for k in range(len(self.parts))])
        columns = np.concatenate([np.tile(self.number[k * size:(k + 1) * size], size) for k in range(len(self.parts))])
        data = np.concatenate([pick(*part).ravel() for part in self.parts])
        return sp.csr_matrix((data, (rows, columns)), shape=(len(self.xz), len(self.xz)))


def projections(mesh, z, kx, period, breaks):
    """Row n: integral of exp(-i kx_n x) times each basis function over the edges at depth z, divided by the period."""
    points, weights = np.polynomial.legendre.leggauss(mesh.degree + 30)
    value, _ = lagrange(mesh.nodes, points)
    result = np.zeros((len(kx), len(mesh.xz)), complex)
    on = np.flatnonzero(np.abs(mesh.xz[:, 1] - z) < 1e-6 * period)
    for start, end in zip(breaks[:-1], breaks[1:]):
        mine = on[(mesh.xz[on, 0] > start - 1e-7 * period) & (mesh.xz[on, 0] < end + 1e-7 * period)]
        mine = mine[np.argsort(mesh.xz[mine, 0])]
        x = start + (points + 1) / 2 * (end - start)
        result[:, mine] += (np.exp(-1j * np.outer(kx, x)) * weights * (end - start) / 2) @ value / period
    return result


def solve(elements, period, height, wavelength, degree, n_surround, e_backing, incidence, axis, is_p, orders=16, breaks=None):
    """Powers (R, T) of the orders -orders..orders; lengths in nm, angles in degrees, as in PlainLight."""
    k0 = 2 * np.pi / wavelength
    period, height = period * k0, height * k0
    breaks = np.array([-period / 2, 0, period / 2]) if breaks is None else np.array(breaks) * k0
    scaled = [(lambda s, f=low: k0 * f(s), lambda s, f=high: k0 * f(s), e) for low, high, e in elements]
    mesh = Mesh(scaled, degree)
    theta, phi = np.radians(incidence), np.radians(axis)
    kappa = n_surround * np.sin(theta) * np.sin(phi) if axis else 0.0
    kx = n_surround * np.sin(theta) * np.cos(phi) + np.arange(-orders, orders + 1) * wavelength / (period / k0)
    if is_p:
        incident = np.array([np.cos(theta) * np.sin(phi), n_surround * np.cos(phi)])
    else:
        incident = np.array([np.cos(phi), -n_surround * np.cos(theta) * np.sin(phi)])

    ee = mesh.assemble(lambda e, xx, zz, zx, m: e / (e - kappa ** 2) * (xx + zz) - e * m)
    hh = mesh.assemble(lambda e, xx, zz, zx, m: (xx + zz) / (e - kappa ** 2) - m)
    eh = mesh.assemble(lambda e, xx, zz, zx, m: kappa / (e - kappa ** 2) * (zx - zx.T))
    count = len(mesh.xz)

    # Nodes one period apart are one unknown, up to the phase.
    known = {(round(x / period * 1e6), round(z / period * 1e6)): i for i, (x, z) in enumerate(mesh.xz)}
    partner = np.array([known.get((round(x / period * 1e6) - 1000000, round(z / period * 1e6)), -1) for x, z in mesh.xz])
    free, right = np.flatnonzero(partner < 0), np.flatnonzero(partner >= 0)
    place = np.full(count, -1)
    place[free] = np.arange(len(free))
    assert np.all(place[partner[right]] >= 0)
    tie = sp.csr_matrix((np.concatenate([np.ones(len(free)), np.full(len(right), np.exp(1j * kx[orders] * period))]),
                         (np.concatenate([free, right]), np.concatenate([place[free], place[partner[right]]]))), shape=(count, len(free)))
    tie_h = tie.conj().T

    def leaving(e, downward):
        q, kz = e - kappa ** 2, np.sqrt(e - kappa ** 2 - kx ** 2 + 0j)
        kz = np.where(kz.imag < -1e-14, -kz, kz)
        sign = 1 if downward else -1
        # F_E = sign a i kz E + c i kx H, F_H = sign b i kz H - c i kx E
        return kz, e / q, 1 / q, sign * 1j * kz * e / q, sign * 1j * kz / q, 1j * kx * kappa / q

    top, bottom = projections(mesh, 0.0, kx, period, breaks) @ tie, projections(mesh, height, kx, period, breaks) @ tie
    kz_top, a_top, b_top, te, th, tc = leaving(n_surround ** 2 + 0j, False)
    kz_bottom, a_bottom, b_bottom, be, bh, bc = leaving(e_backing, True)

    def boundary(t, b):
        used_t, used_b = np.flatnonzero(np.abs(top).max(0)), np.flatnonzero(np.abs(bottom).max(0))
        full = sp.lil_matrix((len(free), len(free)), dtype=complex)
        full[np.ix_(used_t, used_t)] = -period * top[:, used_t].conj().T @ (t[:, None] * top[:, used_t])
        full[np.ix_(used_b, used_b)] = full[np.ix_(used_b, used_b)].toarray() + period * bottom[:, used_b].conj().T @ (b[:, None] * bottom[:, used_b])
        return full.tocsr()

    reduced = lambda m: tie_h @ m @ tie
    source = -period * top[orders].conj() * 2j * kz_top[orders]
    if kappa == 0:
        system, rhs = (reduced(hh) - boundary(th, bh), source * b_top * incident[1]) if is_p else (reduced(ee) - boundary(te, be), source * a_top * incident[0])
        found = spl.spsolve(system.tocsc(), rhs)
        fields = [np.zeros_like(found), found] if is_p else [found, np.zeros_like(found)]
    else:
        system = sp.bmat([[reduced(ee) - boundary(te, be), reduced(eh) - boundary(tc, bc)],
                          [-reduced(eh) + boundary(tc, bc), reduced(hh) - boundary(th, bh)]]).tocsc()
        found = spl.spsolve(system, np.concatenate([source * a_top * incident[0], source * b_top * incident[1]]))
        fields = [found[:len(free)], found[len(free):]]

    unit = (kz_top[orders] * (a_top * abs(incident[0]) ** 2 + b_top * abs(incident[1]) ** 2)).real
    up = [top @ f for f in fields]
    up[0][orders] -= incident[0] if (kappa or not is_p) else 0
    up[1][orders] -= incident[1] if (kappa or is_p) else 0
    down = [bottom @ f for f in fields]
    reflected = kz_top.real * (a_top.real * abs(up[0]) ** 2 + b_top.real * abs(up[1]) ** 2) / unit
    # A wave in an absorbing backing carries Re of the whole flux, cross terms included.
    flux_e = be * down[0] + bc * down[1]
    flux_h = bh * down[1] - bc * down[0]
    transmitted = (down[0].conj() * flux_e + down[1].conj() * flux_h).imag / unit
    return reflected, transmitted


# --- the table --------------------------------------------------------------------------------------------------------------
COLUMNS = ("spacing,height,width,lumen_height,lumen_width,rows,pitch,cortex,gap,surround_n,body_n,body_k,backing_n,backing_k,"
           "wavelength,incidence,axis,polarization").split(",")
MATRIX_N = 1.55
FLAT = (170, 80, 140, 40, 90)
CASES = [
    # one row in keratin, keratin on both sides
    *[FLAT + (1, 0, 0, 0, 1.55, 1.75, .1, 1.55, 0, w, i, 0, pol) for w, i in ((450, 0), (450, 30), (620, 0)) for pol in "ps"],
    # under a cortex in air, also at azimuths of the rods
    *[FLAT + (1, 0, 150, 40, 1, 1.75, .1, 1.65, .05, 400, i, a, pol) for i, a in ((0, 0), (45, 0), (45, 30), (60, 90)) for pol in "ps"],
    # five staggered rows
    *[FLAT + (5, 110, 150, 0, 1, 1.75, .05, 1.55, 0, w, i, 0, pol) for w, i in ((420, 0), (510, 30)) for pol in "ps"],
    # lumen almost as large as the rod; a rod taller than wide; orders that leave
    *[(170, 80, 140, 72, 132, 1, 0, 100, 30, 1, 1.8, .02, 1.55, 0, 480, 30, 0, pol) for pol in "ps"],
    *[(150, 160, 100, 110, 50, 2, 180, 50, 30, 1, 1.75, .1, 1.55, 0, 350, 20, 0, pol) for pol in "ps"],
    *[(480, 120, 300, 70, 200, 1, 0, 60, 60, 1, 1.75, 0, 1.55, 0, 430, 25, 0, pol) for pol in "ps"],
    # round rods: one row at azimuths, five staggered rows, orders that leave beside the plane of incidence
    *[(170, 120, 120, 70, 70, 1, 0, 150, 40, 1, 1.75, .1, 1.65, .05, 430, i, a, pol) for i, a in ((30, 0), (45, 35), (60, 90)) for pol in "ps"],
    *[(170, 120, 120, 70, 70, 5, 150, 150, 0, 1, 1.75, .1, 1.55, 0, w, i, a, pol) for w, i, a in ((400, 30, 0), (560, 50, 60)) for pol in "ps"],
    *[(450, 240, 240, 120, 120, 1, 0, 60, 60, 1, 1.8, 0, 1.55, 0, 400, 35, 50, pol) for pol in "ps"],
    # rows that reach into each other
    *[(170, 120, 120, 70, 70, 3, 90, 100, 40, 1, 1.75, .1, 1.55, 0, w, i, a, pol) for w, i, a in ((410, 0, 0), (520, 40, 0), (450, 50, 40)) for pol in "ps"],
    *[(170, 80, 140, 40, 90, 4, 68, 100, 40, 1, 1.75, .1, 1.55, 0, w, 30, 0, pol) for w in (400, 550) for pol in "ps"],
]


def answer(case, degree):
    """Specular and diffracted reflectance, total transmittance."""
    c = dict(zip(COLUMNS, case))
    e_matrix, e_body = MATRIX_N ** 2, (c["body_n"] + 1j * c["body_k"]) ** 2
    backing = (c["backing_n"] + 1j * c["backing_k"]) ** 2
    outer, core = (c["width"] / 2, c["height"] / 2), (c["lumen_width"] / 2, c["lumen_height"] / 2)
    margin = (c["pitch"] - c["height"]) / 2 if c["rows"] > 1 and c["pitch"] > c["height"] + 10 else 25
    most = 0.6 * c["spacing"]
    # Enough of the surround above that few orders are left at the boundary.
    above = 0.4 * c["spacing"]
    elements = film(c["spacing"], 0, above, c["surround_n"] ** 2, most)
    z = above
    lead = c["cortex"] - margin
    assert lead > 0 or c["surround_n"] == MATRIX_N
    if lead > 0:
        elements += film(c["spacing"], z, lead, e_matrix, most)
        z += lead
    z += margin + outer[1]
    between = ("flat", c["pitch"] / 2) if c["pitch"] > c["height"] + 10 else ("nested", c["pitch"])
    for j in range(c["rows"]):
        elements += row(c["spacing"], z + j * c["pitch"], outer, core, e_matrix, e_body, 1.0,
                        between if j > 0 else ("flat", outer[1] + margin), between if j + 1 < c["rows"] else ("flat", outer[1] + margin), j % 2 == 1)
    # What lies below is laid out from the last row, which may be moved: its edges are the same up to a period.
    z += (c["rows"] - 1) * c["pitch"] + outer[1] + margin
    tail = c["gap"] - margin
    if tail > 0:
        elements += film(c["spacing"], z, tail, e_matrix, most)
        z += tail
    else:
        assert backing == e_matrix
        elements += film(c["spacing"], z, above, backing, most)
        z += above
    reflected, transmitted = solve(elements, c["spacing"], z, c["wavelength"], degree, c["surround_n"], backing,
                                   c["incidence"], c["axis"], c["polarization"] == "p")
    middle = len(reflected) // 2
    return reflected[middle], reflected.sum() - reflected[middle], transmitted.sum()


def main():
    degree = int(sys.argv[1]) if len(sys.argv) > 1 else 10
    print("# Specular and diffracted reflectance, total transmittance of rows of hollow elliptical rods (staggered where several) in a")
    print("# matrix of index 1.55, lumen of index 1. Lengths in nm, angles in degrees.")
    print(f"# Computed by an independent method: spectral elements of degree {degree} (spectral_elements.py, which prints this file);")
    print("# change is the largest change of the three from two degrees less. Not published.")
    print(",".join(COLUMNS) + ",reflectance,diffracted,transmittance,change")
    for case in CASES:
        fine, coarse = np.array(answer(case, degree)), np.array(answer(case, degree - 2))
        print(",".join(str(value) for value in case) + "," + ",".join(f"{value:.11f}" for value in fine) + f",{abs(fine - coarse).max():.0e}", flush=True)


if __name__ == "__main__":
    main()
