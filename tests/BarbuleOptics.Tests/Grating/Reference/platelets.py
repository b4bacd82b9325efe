#!/usr/bin/env python3
"""Reflectance and transmittance of rows of hollow platelets (rectangles with a rectangular core): spectral elements on a grid that crowds
towards every corner, where the magnetic field is singular.

Needs numpy and scipy. Run: python3 platelets.py [degree] [levels]; prints platelets.csv, with the change from one degree and one level less.
Equations and elements: spectral_elements.py. Rectangles need no curved sides, but their corners leave an error that falls by a
constant factor with each level of the grid.
"""
import sys
import numpy as np
from spectral_elements import graded, segment, solve

COLUMNS = ("spacing,thickness,width,wall,rows,pitch,cortex,gap,surround_n,body_n,body_k,backing_n,backing_k,"
           "wavelength,incidence,axis,polarization").split(",")
MATRIX_N = 1.55
CASES = [
    *[(190, 70, 150, 20, 1, 0, 120, 40, 1, 1.75, .1, 1.65, .05, w, i, a, pol)
      for w, i, a in ((420, 0, 0), (420, 50, 0), (500, 40, 35)) for pol in "ps"],
    *[(190, 70, 150, 15, 2, 110, 120, 40, 1, 1.75, .1, 1.55, 0, 560, 40, 0, pol) for pol in "ps"],
    *[(460, 100, 300, 30, 1, 0, 60, 60, 1, 1.8, 0, 1.55, 0, 430, 25, 0, pol) for pol in "ps"],
]


def answer(case, degree, levels):
    """Specular and diffracted reflectance, total transmittance."""
    c = dict(zip(COLUMNS, case))
    e_matrix, e_body = MATRIX_N ** 2, (c["body_n"] + 1j * c["body_k"]) ** 2
    backing = (c["backing_n"] + 1j * c["backing_k"]) ** 2
    period, above = c["spacing"], 0.4 * c["spacing"]
    boxes = []
    for j in range(c["rows"]):
        middle = above + c["cortex"] + c["thickness"] / 2 + j * c["pitch"]
        for x in ((0,) if j % 2 == 0 else (-period / 2, period / 2)):
            for shrink, e in ((0, e_body), (c["wall"], 1.0)):
                boxes.append((x - c["width"] / 2 + shrink, x + c["width"] / 2 - shrink,
                              middle - c["thickness"] / 2 + shrink, middle + c["thickness"] / 2 - shrink, e))
    surface = above + c["cortex"]
    bottom = surface + (c["rows"] - 1) * c["pitch"] + c["thickness"] + c["gap"]
    rounded = lambda value: round(value, 9)
    corners_x = {rounded(x) for box in boxes for x in box[:2] if abs(x) < period / 2}
    corners_z = {rounded(z) for box in boxes for z in box[2:4]}
    xs = graded(corners_x, [-period / 2, 0.0, period / 2], levels)
    zs = graded(corners_z, [0.0, rounded(above), rounded(bottom)], levels)

    elements = []
    for x0, x1 in zip(xs[:-1], xs[1:]):
        for z0, z1 in zip(zs[:-1], zs[1:]):
            x, z = (x0 + x1) / 2, (z0 + z1) / 2
            e = c["surround_n"] ** 2 if z < above else e_matrix
            for left, right, high, low, inside in boxes:
                if left < x < right and high < z < low:
                    e = inside
            elements.append((segment((x0, z0), (x1, z0)), segment((x0, z1), (x1, z1)), e))
    reflected, transmitted = solve(elements, period, bottom, c["wavelength"], degree, c["surround_n"], backing, c["incidence"], c["axis"],
                                   c["polarization"] == "p", breaks=xs)
    middle = len(reflected) // 2
    return reflected[middle], reflected.sum() - reflected[middle], transmitted.sum()


def main():
    degree = int(sys.argv[1]) if len(sys.argv) > 1 else 5
    levels = int(sys.argv[2]) if len(sys.argv) > 2 else 3
    print("# Specular and diffracted reflectance, total transmittance of rows of hollow platelets (staggered where several) in a matrix")
    print("# of index 1.55, core of index 1. Lengths in nm, angles in degrees.")
    print(f"# Computed by an independent method: spectral elements of degree {degree} on {levels} levels towards the corners (platelets.py,")
    print("# which prints this file); change is the largest change of the three from one degree and one level less. Not published.")
    print(",".join(COLUMNS) + ",reflectance,diffracted,transmittance,change")
    for case in CASES:
        fine, coarse = np.array(answer(case, degree, levels)), np.array(answer(case, degree - 1, levels - 1))
        print(",".join(str(value) for value in case) + "," + ",".join(f"{value:.9f}" for value in fine) + f",{abs(fine - coarse).max():.0e}", flush=True)


if __name__ == "__main__":
    main()
