#!/usr/bin/env python3
"""Films in plain numpy, timed: what the film workloads of the benchmark `kernels` cost when the 2x2 matrices are written out.

All wavelengths at once as arrays, films one after another, s and p one after another; the characteristic matrix of each film
(cos, -i sin/eta; -i eta sin, cos) times the field below it. Nothing is kept from call to call but the refractive indices.
Prints a JSON object a line, as `kernels --json` does: the median of seven runs.

    OPENBLAS_NUM_THREADS=1 OMP_NUM_THREADS=1 python3 plain_films.py [WORKLOAD...]

A workload that it does not know prints nothing. Needs numpy (Debian: python3-numpy).
"""
import json
import sys
import time
import numpy as np

WAVELENGTHS = np.arange(300.0, 781.0)
FILMS, GRADED_FILMS, RUNS = 24, 100, 7
KERATIN = (1.532 + 5890 / WAVELENGTHS ** 2) ** 2 + 0j
EUMELANIN = (1.648 + 23700 / WAVELENGTHS ** 2 + 0.56j * np.exp(-WAVELENGTHS / 270)) ** 2
K0 = 2 * np.pi / WAVELENGTHS


def random_thicknesses(count, state=1):
    values = []
    for _ in range(count):
        state = (1103515245 * state + 12345) & 0x7fffffff
        values.append(20 + 180 * state / 2147483648)
    return values, state


def admittance(e, kx2, is_p):
    """kz/k0 and the admittance of an isotropic medium."""
    kz = np.sqrt(e - kx2)
    return kz, kz / e if is_p else kz


def solve(films, kx2, cosine, is_p):
    """Fields at the top, flux at the bottom and the surround's admittance; films are (ex, ey, ez, thickness), outermost first."""
    _, back = admittance(KERATIN, kx2, is_p)
    phi, psi = np.ones_like(back), back
    for ex, ey, ez, thickness in reversed(films):
        if is_p:
            q = np.sqrt(1 - kx2 / ez)
            index = np.sqrt(ex)
            kz, eta = index * q, q / index
        else:
            kz = eta = np.sqrt(ey - kx2)
        delta = kz * (K0 * thickness)
        cosine_of, sine_of = np.cos(delta), np.sin(delta)
        phi, psi = cosine_of * phi - 1j * sine_of / eta * psi, cosine_of * psi - 1j * sine_of * eta * phi
    return phi, psi, back.real, cosine


def reflectance(films, degrees, is_p):
    angle = np.radians(degrees)
    phi, psi, _, eta = solve(films, np.sin(angle) ** 2, np.cos(angle), is_p)
    return abs((eta * phi - psi) / (eta * phi + psi)) ** 2


def powers(films, degrees, is_p):
    angle = np.radians(degrees)
    phi, psi, flux, eta = solve(films, np.sin(angle) ** 2, np.cos(angle), is_p)
    below = abs(eta * phi + psi) ** 2
    r, t = abs(eta * phi - psi) ** 2 / below, 4 * eta * flux / below
    return r, t, 1 - r - t


def two_media(thicknesses):
    return [(e, e, e, d) for e, d in zip([KERATIN, EUMELANIN] * (len(thicknesses) // 2), thicknesses)]


def report(name, points, run):
    run()
    seconds = []
    for _ in range(RUNS):
        start = time.perf_counter()
        run()
        seconds.append(time.perf_counter() - start)
    print(json.dumps({"workload": name, "threads": 1, "points_per_second": points / sorted(seconds)[RUNS // 2]}), flush=True)


def angles():
    films = two_media(random_thicknesses(FILMS)[0])
    degrees = [4.5 * i for i in range(19)]
    report("films-angles", len(WAVELENGTHS) * FILMS * len(degrees),
           lambda: [(reflectance(films, a, False) + reflectance(films, a, True)) / 2 for a in degrees])


def ensemble():
    stacks, state = [], 1
    for _ in range(20):
        thicknesses, state = random_thicknesses(FILMS, state)
        stacks.append(two_media(thicknesses))
    report("films-ensemble", len(WAVELENGTHS) * FILMS * len(stacks), lambda: [reflectance(films, 0, False) for films in stacks])


def graded(count):
    films = []
    for film in range(count):
        share = 0.5 - 0.5 * np.cos(2 * np.pi * film / 20)
        mean, series = share * EUMELANIN + (1 - share) * KERATIN, 1 / (share / EUMELANIN + (1 - share) / KERATIN)
        films.append((series, mean, (mean + series) / 2, 4 + 0.01 * film))
    degrees = [0, 20, 40, 60]
    report("films-graded", len(WAVELENGTHS) * count * len(degrees),
           lambda: [(powers(films, a, False), powers(films, a, True)) for a in degrees])


if __name__ == "__main__":
    wanted = {"films-angles": angles, "films-ensemble": ensemble, "films-graded": lambda: graded(GRADED_FILMS)}
    for name in sys.argv[1:] or wanted:
        if name in wanted:
            wanted[name]()
