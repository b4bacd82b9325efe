#!/usr/bin/env python3
"""A plain Fourier modal code in numpy, timed: what the rods of the benchmark `rows` cost without multipoles.

Five staggered rows of rods (120 nm, spacing 170, pitch 150; solid or with a lumen of 70 nm) in keratin, under air, without and with
a cortex of 150 nm. Every rod is cut into slices of 6 nm; the modes of each slice come from an eigenvalue problem (inverse rule in p);
scattering matrices join the slices. Two ways of doing so:
  plain    the modes of the 20 slices of one row, then all 100 slices of the stack joined one after another
  careful  the modes of half a row only, one row joined from its mirror images, the stack joined from five rows
One solve is one wavelength in one polarization.

    OPENBLAS_NUM_THREADS=1 python3 plain_modal.py REFERENCE.csv [every]

REFERENCE.csv is what the benchmark wrote (rows REFERENCE.csv; rows.sh runs both); `every` takes every so many of its wavelengths (default 4).
Needs numpy (Debian: python3-numpy). Error: largest difference of the specular reflectance from the reference.
"""
import csv
import sys
import time
import numpy as np

PERIOD, DIAMETER, PITCH, ROWS, SLICE = 170.0, 120.0, 150.0, 5, 6.0


def keratin(wavelength):
    return (1.532 + 5890 / wavelength ** 2) ** 2 + 0j


def eumelanin(wavelength):
    return (1.648 + 23700 / wavelength ** 2 + 0.56j * np.exp(-wavelength / 270)) ** 2


def toeplitz(matrix, chords, orders):
    """Toeplitz matrix of a slice: the matrix everywhere, and for each outline around x = 0 (half chord, what it adds)."""
    m = orders[:, None] - orders[None, :]
    result = matrix * np.eye(len(orders), dtype=complex)
    for half, step in chords:
        result = result + step * (2 * half / PERIOD) * np.sinc(2 * half * m / PERIOD)
    return result


def modes(k, is_p, e, inverse):
    """E = W (a + b), H = V (a - b) with exp(+-i gamma z), lengths times k0."""
    if is_p:
        q = np.linalg.inv(inverse)
        square = (np.eye(len(k)) - k[:, None] * np.linalg.inv(e) * k[None, :]) @ q
    else:
        q = np.diag(k ** 2) - e
        square = -q
    values, w = np.linalg.eig(square)
    gamma = np.sqrt(values)
    gamma = np.where(gamma.imag < -1e-10 * abs(gamma), -gamma, gamma)
    return w, q @ w / gamma, gamma


def admittance(k, is_p, e):
    kz = np.sqrt(e - k ** 2 + 0j)
    kz = np.where(kz.imag < 0, -kz, kz)
    return kz, e / kz if is_p else -kz


def slice_matrix(w, v, gamma, thickness, gap):
    """Reflection and transmission, the same from both sides, of a slice between films of the matrix of no thickness."""
    first, second = np.linalg.inv(w), np.linalg.inv(v) * gap
    a, b = first + second, first - second
    fade = np.exp(1j * gamma * thickness)[:, None]
    x = fade * b @ np.linalg.inv(a) * fade.T
    r = np.linalg.solve(a - x @ b, x @ a - b)
    return r, np.linalg.solve(a, fade * (a + b @ r))


def join(top, bottom):
    """(R from above, T down, T up, R from below) of one piece on another."""
    r1, d1, u1, s1 = top
    r2, d2, u2, s2 = bottom
    one = np.eye(len(r1))
    down = np.linalg.solve(one - s1 @ r2, np.hstack([d1, s1 @ u2]))
    n = len(r1)
    return r1 + u1 @ r2 @ down[:, :n], d2 @ down[:, :n], u1 @ (u2 + r2 @ down[:, n:]), s2 + d2 @ down[:, n:]


def symmetric(r, t):
    return r, t, t, r


def behind(piece, phase):
    """The piece behind a film of the matrix."""
    r, d, u, s = piece
    return phase[:, None] * r * phase, d * phase, phase[:, None] * u, s


def shifted(piece, signs):
    """The piece moved by half a period."""
    return tuple(signs[:, None] * m * signs for m in piece)


def solve(wavelength, degrees, is_p, lumen, cortex, harmonics, careful):
    k0 = 2 * np.pi / wavelength
    orders = np.arange(-(harmonics // 2), harmonics // 2 + 1)
    k = np.sin(np.radians(degrees)) + orders * wavelength / PERIOD
    matrix, melanin = keratin(wavelength), eumelanin(wavelength)
    kz, gap = admittance(k, is_p, matrix)
    signs = (-1.0) ** orders

    def film(thickness):
        return np.exp(1j * kz * k0 * thickness)

    count = int(round(DIAMETER / SLICE))
    slices = []
    for j in range(count // 2 if careful else count):
        z = (j + 0.5) * SLICE - DIAMETER / 2
        chords = [(np.sqrt(DIAMETER ** 2 / 4 - z ** 2), melanin, matrix)]
        if abs(z) < lumen / 2:
            chords.append((np.sqrt(lumen ** 2 / 4 - z ** 2), 1.0, melanin))
        e = toeplitz(matrix, [(half, inside - outside) for half, inside, outside in chords], orders)
        inverse = toeplitz(1 / matrix, [(half, 1 / inside - 1 / outside) for half, inside, outside in chords], orders) if is_p else None
        slices.append(symmetric(*slice_matrix(*modes(k, is_p, e, inverse), k0 * SLICE, gap)))

    between = film(PITCH - DIAMETER)
    if careful:
        half = slices[0]
        for piece in slices[1:]:
            half = join(half, piece)
        r, d, u, s = half
        row = join(half, (s, u, d, r))
        rows = [behind(row, between), behind(shifted(row, signs), between)]
        stack = row
        for j in range(1, ROWS):
            stack = join(stack, rows[j % 2])
    else:
        stack = slices[0]
        for j in range(1, ROWS * count):
            piece = slices[j % count] if j // count % 2 == 0 else shifted(slices[j % count], signs)
            stack = join(stack, behind(piece, between) if j % count == 0 else piece)

    _, air = admittance(k, is_p, 1.0)
    r = np.diag((air - gap) / (air + gap))
    surface = r, np.diag(2 * air / (air + gap)), np.diag(2 * gap / (air + gap)), -r
    total = join(surface, behind(stack, film(cortex)))
    zeroth = harmonics // 2
    return abs(total[0][zeroth, zeroth]) ** 2


def main():
    with open(sys.argv[1], newline="") as file:
        lines = [line for line in csv.DictReader(row for row in file if not row.startswith("#"))]
    every = int(sys.argv[2]) if len(sys.argv) > 2 else 4
    wavelengths = sorted({float(line["wavelength_nm"]) for line in lines})[::every]
    lines = [line for line in lines if float(line["wavelength_nm"]) in wavelengths]
    print(f"numpy {np.__version__}, {len(wavelengths)} wavelengths; ms a solve (median) and largest error of R")
    for careful in (False, True):
        for harmonics in (21, 41):
            for lumen in sorted({float(line["lumen_nm"]) for line in lines}):
                for polarization in "sp":
                    times, error = [], 0.0
                    for line in lines:
                        if float(line["lumen_nm"]) != lumen or line["polarization"] != polarization:
                            continue
                        start = time.perf_counter()
                        found = solve(float(line["wavelength_nm"]), float(line["incidence_deg"]), polarization == "p", lumen,
                                      float(line["cortex_nm"]), harmonics, careful)
                        times.append(time.perf_counter() - start)
                        error = max(error, abs(found - float(line["reflectance"])))
                    print(f"numpy {'careful' if careful else 'plain'} {harmonics} harmonics, lumen {lumen:g} nm, {polarization}: "
                          f"{1e3 * np.median(times):.2f} ms, {error:.1e}", flush=True)


if __name__ == "__main__":
    main()
