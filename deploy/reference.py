"""Writes what general libraries say into CSV files that Go tests read.

Usage: python3 reference.py FOLDER

The equations stand here a second time, written from the publications and not
from the Go code, and SciPy finds their roots, optima and quantiles. A fixed seed
makes the draws the same on every run of one NumPy version.
"""
import math
import sys

import fluids
import iapws
import numpy
import scipy
from fluids.atmosphere import ATMOSPHERE_1976
from iapws import IAPWS95
from iapws.iapws97 import _PSat_T
from reference_intervals import intervals
from scipy.optimize import brentq, least_squares

MMHG = 133.322387415  # Pa, the conventional millimetre of mercury
FOLDER = sys.argv[1]
DRAWS = 100_000
LUNGS = 30


def write(name, source, columns, rows):
    """Writes one file: its source, its columns and its rows."""
    with open(f"{FOLDER}/{name}.csv", "w", encoding="ascii") as out:
        out.write(f"# {source}\n{','.join(columns)}\n")
        for row in rows:
            out.write(",".join(v if isinstance(v, str) else f"{v:.13g}" for v in row) + "\n")


def water():
    """Saturated vapour over water in mmHg; just above the triple point for 0 C."""
    rows = []
    for celsius in [0.02, *range(1, 61)]:
        kelvin = celsius + 273.15
        rows.append((celsius, _PSat_T(kelvin) * 1e6 / MMHG, IAPWS95(T=kelvin, x=0).P * 1e6 / MMHG))
    source = f"IAPWS-IF97 and IAPWS-95 saturation line by iapws {iapws.__version__}"
    write("water", source, ("celsius", "if97", "iapws95"), rows)


def atmosphere():
    """Pressure in mmHg at heights taken as geometric and as geopotential."""
    earth = 6356766.0  # m, radius of the 1976 standard
    rows = []
    for metres in range(0, 11001, 250):
        above = earth * metres / (earth - metres)
        rows.append((metres, ATMOSPHERE_1976(metres).P / MMHG, ATMOSPHERE_1976(above).P / MMHG))
    source = f"US Standard Atmosphere 1976 by fluids {fluids.__version__}"
    write("atmosphere", source, ("metres", "geometric", "geopotential"), rows)


def curve(po2, ph=7.4, pco2=40.0, methb=0.0):
    """Siggaard-Andersen 1984 with the shifts of 1990, at 37 C; mmHg."""
    a = -0.88 * (ph - 7.4) + 0.048 * math.log(pco2 / 40) - 0.7 * methb
    x = math.log(po2 * MMHG / 1000) - math.log(7) - a
    y = 1.8747 + x + (3.5 + a) * math.tanh(0.5342857 * x)
    return 1 / (1 + math.exp(-y))


def functional(po2, ph, pco2, cohb, methb):
    """Saturation of the haemoglobin that carbon monoxide leaves (Haldane)."""
    if cohb == 0:
        return curve(po2, ph, pco2, methb)
    rest = 1 - methb
    s = brentq(lambda s: s - curve(po2 * s * rest / (s * rest - cohb), ph, pco2, methb), cohb / rest + 1e-9, 1, xtol=1e-15)
    return (s * rest - cohb) / (rest - cohb)


def buffer_excess(ph, pco2):
    """Standard base excess of Van Slyke with the constants 0.0306, 6.10, 24.4."""
    return 0.9287 * (0.0306 * pco2 * 10 ** (ph - 6.1) - 24.4 + 14.83 * (ph - 7.4))


def roots():
    """Roots by brentq: PO2 at a saturation, and pH at a PCO2 and base excess."""
    rows = []
    for ph, pco2, cohb, methb in [(7.4, 40, 0, 0), (7.0, 90, 0, 0), (7.65, 18, 0, 0), (7.3, 50, 0.3, 0), (7.4, 40, 0.1, 0.2), (7.2, 60, 0, 0.15)]:
        for percent in [1, 5, 20, 50, 75, 90, 95, 97]:
            at = math.exp(brentq(lambda ln: functional(math.exp(ln), ph, pco2, cohb, methb) - percent / 100, math.log(1e-3), math.log(1e5), xtol=1e-15))
            rows.append(("po2", percent / 100, ph, pco2, cohb, methb, at))
    for excess in [-30, -20, -10, -4, 0, 4, 10, 20, 30]:
        for pco2 in [8, 20, 40, 60, 100, 180]:
            at = brentq(lambda ph: buffer_excess(ph, pco2) - excess, 5, 9.5, xtol=1e-15)
            rows.append(("ph", excess, 0, pco2, 0, 0, at))
    write("roots", f"scipy.optimize.brentq of SciPy {scipy.__version__}", ("root", "given", "ph", "pco2", "cohb", "methb", "at"), rows)


def content(po2):
    """Oxygen content at haemoglobin 15 g/dL, mL/dL."""
    return 1.34 * 15 * curve(po2) + 0.0031 * po2


def model(fio2, shunt, drop):
    """PaO2 of a lung with a shunt and a drop (Sapsford and Jones 1995)."""
    capillary = max(fio2 * 713 - 40 * (fio2 + (1 - fio2) / 0.8) - drop, 1)
    arterial = content(capillary) - 5 * shunt / (1 - shunt)
    if content(1) >= arterial:
        return 1.0
    return math.exp(brentq(lambda ln: content(math.exp(ln)) - arterial, 0, math.log(capillary) + 1e-12, xtol=1e-15))


def fit(points, pulse):
    """The best shunt and drop within the bounds, from several starts."""
    def misfit(x):
        shown = [(model(f, x[0], x[1] * 100), seen) for f, seen in points]
        return [(curve(p) - seen) / 0.02 if pulse else math.log(p / seen) / 0.036 for p, seen in shown]
    best = None
    for start in [(0.05, 0.1), (0.1, 1.5), (0.3, 0.3), (0.45, 1.0), (0.6, 0.05)]:
        found = least_squares(misfit, start, bounds=([0, 0], [0.7, 4.5]), xtol=1e-15, ftol=1e-15, gtol=1e-15, jac="3-point")
        if best is None or found.cost < best.cost:
            best = found
    return best.x[0], best.x[1] * 100, 2 * best.cost


def shows(draw, shunt, drop, count, pulse):
    """What a lung shows on several fractions of oxygen, with measurement error.

    Every third lung is seen by an oximeter alone, whose readings above 97 % tell
    nothing. A PaO2 above the alveolar one would be refused and is kept below it.
    """
    points = []
    for fio2 in [0.3, 0.4, 0.5, 0.7, 0.9][:count]:
        po2 = model(fio2, shunt, drop)
        if pulse:
            points.append((fio2, curve(po2) + 0.02 * draw.standard_normal()))
        else:
            alveolar = fio2 * 713 - 40 * (fio2 + (1 - fio2) / 0.8)
            points.append((fio2, min(po2 * math.exp(0.036 * draw.standard_normal()), alveolar)))
    return [p for p in points if not pulse or 0.5 <= p[1] <= 0.97]


def lungs():
    """Invented lungs, what they would show, and the fit."""
    draw = numpy.random.default_rng(1995)
    rows, patient = [], 0
    while patient < LUNGS:
        pulse = patient % 3 == 2
        shunt, drop = draw.uniform(0.02, 0.45), draw.uniform(2, 80)
        points = shows(draw, shunt, drop, 3 + patient % 3, pulse)
        if len(points) < 3:
            continue
        best = fit(points, pulse)
        rows += [(patient, shunt, drop, "sao2" if pulse else "pao2", f, seen, *best) for f, seen in points]
        patient += 1
    columns = ("patient", "true_shunt", "true_drop", "seen", "fio2", "value", "shunt", "drop", "sum")
    write("lungs", f"scipy.optimize.least_squares of SciPy {scipy.__version__}, lungs drawn by NumPy {numpy.__version__}", columns, rows)


if __name__ == "__main__":
    water()
    atmosphere()
    roots()
    lungs()
    intervals(write, DRAWS)
