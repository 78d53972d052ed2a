"""Simulated 95 % intervals of the derived numbers: see reference.py.

Each measured input is drawn from a normal distribution around its value, with
the spread of repeat samples; NumPy takes the quantiles of the results.
"""

import math

import numpy

# One standard deviation of a reading: an absolute part and a part of the value,
# the larger counts. Gases after Mallat 2015, the rest common practice.
SPREADS = {
    "ph": (0.005, 0), "paco2": (0.74, 0.0185), "pao2": (0, 0.036), "hco3": (0, 0.022), "sao2": (0.005, 0), "spo2": (0.02, 0),
    "fio2": (0.005, 0), "etco2": (1, 0), "peco2": (1, 0), "vt": (0, 0.05), "ve": (0, 0.05), "rr": (1, 0), "pplat": (0.5, 0),
    "peep": (0.5, 0), "pip": (0.5, 0), "mpaw": (0.5, 0), "na": (0.7, 0), "k": (0.05, 0), "cl": (0.7, 0), "lactate": (0.1, 0.03),
    "albumin": (0.8, 0), "pb": (1, 0), "weight": (0, 0.01), "phosphate": (0.03, 0), "pbw": (0, 0), "calcium": (0, 0.01), "magnesium": (0, 0.02),
    "hb": (0, 0.02), "svo2": (0.005, 0), "pvo2": (0, 0.036),
}

# Whole samples, which hold one another's inputs. The spread of a set fraction of
# oxygen and of the pressure is lost there beside that of the others.
EXACT = ("fio2", "pb")

PATIENTS = {
    "adult": dict(ph=7.31, paco2=55, pao2=68, hco3=27, sao2=0.88, spo2=0.92, fio2=0.4, etco2=46, peco2=24, vt=420, ve=9.5, rr=24, pplat=26,
                  peep=8, pip=32, mpaw=14, na=138, k=4.2, cl=102, lactate=1.8, albumin=32, pb=760, weight=80, phosphate=1.1, pbw=66,
                  calcium=1.15, magnesium=0.85),
    "shocked": dict(ph=7.08, paco2=88, pao2=54, hco3=13, sao2=0.72, spo2=0.86, fio2=0.9, etco2=60, peco2=28, vt=380, ve=13, rr=34, pplat=31,
                    peep=14, pip=38, mpaw=22, na=131, k=5.9, cl=99, lactate=11, albumin=19, pb=742, weight=96, phosphate=2.3, pbw=58,
                    calcium=0.98, magnesium=1.1),
    "pregnant": dict(ph=7.45, paco2=30, pao2=101, hco3=20, sao2=0.89, spo2=0.95, fio2=0.3, etco2=29, peco2=20, vt=520, ve=10.4, rr=20, pplat=21,
                     peep=5, pip=25, mpaw=9, na=135, k=3.8, cl=105, lactate=1, albumin=30, pb=755, weight=78, phosphate=1, pbw=57,
                     calcium=1.12, magnesium=0.75),
    "resident of 3600 m": dict(ph=7.42, paco2=31, pao2=56, hco3=20, sao2=0.87, spo2=0.89, fio2=0.28, etco2=28, peco2=19, vt=480, ve=9.6, rr=20,
                               pplat=19, peep=5, pip=24, mpaw=10, na=140, k=4.1, cl=107, lactate=1.2, albumin=41, pb=495, weight=66,
                               phosphate=1.1, pbw=61, calcium=1.2, magnesium=0.9),
    "child": dict(ph=7.33, paco2=44, pao2=72, hco3=22, sao2=0.9, spo2=0.93, fio2=0.45, etco2=39, peco2=26, vt=130, ve=3.6, rr=28, pplat=22,
                  peep=6, pip=27, mpaw=12, na=137, k=4, cl=104, lactate=2.2, albumin=35, pb=760, weight=18, phosphate=1.5, pbw=22,
                  calcium=1.2, magnesium=0.85),
    "newborn": dict(ph=7.28, paco2=48, pao2=58, hco3=21, sao2=0.88, spo2=0.91, fio2=0.35, etco2=42, peco2=22, vt=16, ve=0.9, rr=55, pplat=18,
                    peep=5, pip=21, mpaw=9, na=138, k=5, cl=106, lactate=3, albumin=28, pb=760, weight=3.2, phosphate=2, pbw=20,
                    calcium=1.1, magnesium=0.8),
}


def alveolar(v):
    return v["fio2"] * (v["pb"] - 47) - v["paco2"] * (v["fio2"] + (1 - v["fio2"]) / 0.8)


def bicarbonate(v):
    return 0.0306 * v["paco2"] * 10 ** (v["ph"] - 6.1)


def effective(v):
    return v["hco3"] + v["albumin"] * (0.123 * v["ph"] - 0.631) + v["phosphate"] * (0.309 * v["ph"] - 0.469)


def apparent(v):
    return v["na"] + v["k"] + 2 * v["calcium"] + 2 * v["magnesium"] - v["cl"] - v["lactate"]


def p50(v):
    """The patient's P50: the same curve at another place, by its logarithm."""
    def log_po2(sat, shift):
        low, high = numpy.full_like(sat, math.log(0.1)), numpy.full_like(sat, math.log(100.0))
        for _ in range(60):
            middle = (low + high) / 2
            x = middle - math.log(7) - shift
            y = 1.8747 + x + (3.5 + shift) * numpy.tanh(0.5342857 * x)
            below = 1 / (1 + numpy.exp(-y)) < sat
            low, high = numpy.where(below, middle, low), numpy.where(below, high, middle)
        return low
    shift = -0.88 * (v["ph"] - 7.4) + 0.048 * numpy.log(v["paco2"] / 40)
    half = numpy.full_like(v["sao2"], 0.5)
    return v["pao2"] * numpy.exp(log_po2(half, 0 * shift) - log_po2(v["sao2"], shift))


# Each derived number: the inputs it is made from and how.
INDICES = {
    "hco3_calc": ("ph paco2", bicarbonate),
    "sbe": ("ph paco2", lambda v: 0.9287 * (bicarbonate(v) - 24.4 + 14.83 * (v["ph"] - 7.4))),
    "pao2_alveolar": ("fio2 pb paco2", alveolar),
    "aa": ("fio2 pb paco2 pao2", lambda v: alveolar(v) - v["pao2"]),
    "a_over_a": ("fio2 pb paco2 pao2", lambda v: v["pao2"] / alveolar(v)),
    "resp_index": ("fio2 pb paco2 pao2", lambda v: (alveolar(v) - v["pao2"]) / v["pao2"]),
    "pf": ("pao2 fio2", lambda v: v["pao2"] / v["fio2"]),
    "pf_altitude_corrected": ("pao2 fio2 pb", lambda v: v["pao2"] / v["fio2"] * v["pb"] / 760),
    "sf": ("spo2 fio2", lambda v: 100 * v["spo2"] / v["fio2"]),
    "rox": ("spo2 fio2 rr", lambda v: 100 * v["spo2"] / v["fio2"] / v["rr"]),
    "oi": ("fio2 mpaw pao2", lambda v: 100 * v["fio2"] * v["mpaw"] / v["pao2"]),
    "osi": ("spo2 fio2 mpaw", lambda v: v["fio2"] * v["mpaw"] / v["spo2"]),
    "ve_corrected": ("ve paco2", lambda v: v["ve"] * v["paco2"] / 40),
    "vent_ratio": ("ve paco2 pbw", lambda v: 1000 * v["ve"] * v["paco2"] / (3750 * v["pbw"])),
    "vd_vt": ("paco2 peco2", lambda v: 1 - v["peco2"] / v["paco2"]),
    "pa_et_gap": ("paco2 etco2", lambda v: v["paco2"] - v["etco2"]),
    "alveolar_dead_fraction": ("paco2 etco2", lambda v: 1 - v["etco2"] / v["paco2"]),
    "alveolar_vent": ("vt rr pbw", lambda v: (v["vt"] - 2.2 * v["pbw"]) * v["rr"] / 1000),
    "pbw": ("pbw", lambda v: v["pbw"]),
    "vt_per_pbw": ("vt pbw", lambda v: v["vt"] / v["pbw"]),
    "vt_per_weight": ("vt weight", lambda v: v["vt"] / v["weight"]),
    "driving_pressure": ("pplat peep", lambda v: v["pplat"] - v["peep"]),
    "compliance": ("vt pplat peep", lambda v: v["vt"] / (v["pplat"] - v["peep"])),
    "mech_power": ("rr vt pip pplat peep", lambda v: 0.098 * v["rr"] * v["vt"] / 1000 * (v["pip"] - (v["pplat"] - v["peep"]) / 2)),
    "rsbi": ("rr vt", lambda v: 1000 * v["rr"] / v["vt"]),
    "anion_gap": ("na cl hco3", lambda v: v["na"] - v["cl"] - v["hco3"]),
    "anion_gap_corrected": ("na cl hco3 albumin", lambda v: v["na"] - v["cl"] - v["hco3"] + 0.25 * (40 - v["albumin"])),
    "sid_apparent": ("na k calcium magnesium cl lactate", apparent),
    "sid_effective": ("ph hco3 albumin phosphate", effective),
    "sig": ("na k calcium magnesium cl lactate ph hco3 albumin phosphate", lambda v: apparent(v) - effective(v)),
    "p50": ("pao2 sao2 ph paco2", p50),
}


def saturation(v, po2):
    """The curve at the pH of a sample, 7.40 and 40 mmHg where none was said."""
    ph, pco2 = v.get("ph", 7.4), v.get("paco2", 40.0)
    shift = -0.88 * (ph - 7.4) + 0.048 * numpy.log(pco2 / 40)
    x = numpy.log(po2 * 0.133322387415 / 7) - shift
    return 1 / (1 + numpy.exp(-(1.8747 + x + (3.5 + shift) * numpy.tanh(0.5342857 * x))))


def content(v, sat, po2):
    return 1.34 * v["hb"] * sat + 0.0031 * po2


def admixture(v):
    """Berggren's equation; the end-capillary blood at the alveolar PO2."""
    best = content(v, saturation(v, alveolar(v)), alveolar(v))
    arterial = content(v, v["sao2"] if "sao2" in v else saturation(v, v["pao2"]), v["pao2"])
    return (best - arterial) / (best - content(v, v["svo2"], v["pvo2"]))


def delta(v):
    correction = 0.25 * (40 - v["albumin"]) if "albumin" in v else 0
    return (v["na"] - v["cl"] - v["hco3"] + correction - 12) / (24 - v["hco3"])


# Derived numbers that a whole sample is needed for: the sample and how.
SAMPLES = {
    "sao2_calc": (lambda v: saturation(v, v["pao2"]),
                  [dict(ph=7.31, paco2=55, pao2=68), dict(ph=7.1, paco2=80, pao2=44), dict(ph=7.48, paco2=30, pao2=95),
                   dict(pao2=58), dict(paco2=62, pao2=58)]),
    "cao2": (lambda v: content(v, v["sao2"] if "sao2" in v else saturation(v, v["pao2"]), v["pao2"]),
             [dict(ph=7.31, paco2=55, pao2=68, fio2=0.4, hb=12, sao2=0.91), dict(ph=7.36, paco2=48, pao2=52, fio2=0.5, hb=9)]),
    "shunt": (admixture,
              [dict(ph=7.31, paco2=55, pao2=68, fio2=0.4, pb=760, hb=12, sao2=0.92, svo2=0.65, pvo2=37),
               dict(ph=7.38, paco2=41, pao2=62, fio2=0.6, pb=760, hb=10, svo2=0.6, pvo2=34),
               dict(paco2=41, pao2=62, fio2=0.6, pb=760, hb=10, svo2=0.6, pvo2=34),
               dict(ph=7.25, paco2=60, pao2=110, fio2=1.0, pb=760, hb=13, sao2=0.975, svo2=0.7, pvo2=43)]),
    "delta_ratio": (delta,
                    [dict(ph=7.18, paco2=28, hco3=10.1, na=140, cl=104, albumin=38), dict(ph=7.31, paco2=37, hco3=18.2, na=142, cl=100)]),
}


def simulated(values, names, formula, draws, random, exact=()):
    """The inputs as name=value+-sd and both ends of the simulated interval."""
    spread = {n: 0 if n in exact else max(SPREADS[n][0], SPREADS[n][1] * abs(values[n])) for n in names}
    drawn = {n: random.normal(values[n], sd, draws) for n, sd in spread.items()}
    low, high = numpy.quantile(formula(drawn), [0.025, 0.975])
    return " ".join(f"{n}={values[n]:g}+-{sd:.6g}" for n, sd in spread.items()), low, high


def intervals(write, draws):
    """One row for each derived number and patient, then those of whole samples."""
    random = numpy.random.default_rng(2015)
    rows = []
    for patient, values in PATIENTS.items():
        for key, (names, formula) in INDICES.items():
            rows.append((patient, key, *simulated(values, names.split(), formula, draws, random)))
    for key, (formula, samples) in SAMPLES.items():
        for values in samples:
            rows.append(("whole sample", key, *simulated(values, values, formula, draws, random, EXACT)))
    write("intervals", f"quantiles of {draws} draws by NumPy {numpy.__version__}", ("patient", "index", "inputs", "low", "high"), rows)
