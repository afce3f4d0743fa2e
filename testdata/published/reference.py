#!/usr/bin/env python3
"""Recompute reference figures without any code of the project.

Reads the shared files (folder nasa-tmr, see WEIRMARK_SHARED below), computes
with numpy and scipy, and either compares the result with the committed files
beside this script, byte for byte, or writes them:

    python3 reference.py            compare; exit status 1 where a file differs
    python3 reference.py --write    write the files

The shared folder is the one named by WEIRMARK_SHARED, or the first folder
"shared" found walking up from this script. Numbers are printed with 12
significant digits; sums use math.fsum, so that the order of the terms and the
linear-algebra library do not show in them.
"""

import difflib
import json
import math
import os
import platform
import sys

import numpy
import scipy
from scipy import interpolate, optimize, stats

HERE = os.path.dirname(os.path.abspath(__file__))

VERSIONS = "computed by reference.py with Python %s, numpy %s, scipy %s" % (
    platform.python_version(), numpy.__version__, scipy.__version__)

TMR = "NASA Turbulence Modeling Resource (public copy, CC0 1.0)"


def shared_folder():
    named = os.environ.get("WEIRMARK_SHARED")
    if named:
        return named
    folder = HERE
    while True:
        candidate = os.path.join(folder, "shared")
        if os.path.isdir(os.path.join(candidate, "nasa-tmr")):
            return candidate
        up = os.path.dirname(folder)
        if up == folder:
            sys.exit("no folder shared/nasa-tmr above this script: set WEIRMARK_SHARED")
        folder = up


def columns(name):
    """The numeric rows of a zoned file, as one array per column."""
    path = os.path.join(shared_folder(), "nasa-tmr", *name.split("/"))
    rows = []
    with open(path, encoding="ascii") as lines:
        for line in lines:
            text = line.strip()
            if not text or text[0] not in "+-.0123456789":
                continue
            rows.append([float(cell) for cell in text.split()])
    return numpy.array(rows).T


def digits(value):
    if isinstance(value, (str, int)):
        return str(value)
    return "%.12g" % value


def table(notes, names, rows):
    lines = ["# " + note for note in notes + [VERSIONS]]
    lines.append(",".join(names))
    lines += [",".join(digits(cell) for cell in row) for row in rows]
    return "\n".join(lines) + "\n"


# ---------------------------------------------------------------- backstep

MODELS = [("SA", "sa"), ("SST", "sst"), ("W06", "w06")]

ASSUMPTION = ("assumption: the printed error of a station is one standard uncertainty (k = 1), independent of "
              "the other stations; the source states no coverage")


def curve(short):
    x, cf = columns("backstep/backstep_cfl3d_cf_%s.dat" % short)
    if not (numpy.diff(x) > 0).all():
        sys.exit("backstep %s: the stations do not increase" % short)
    return x, cf


def measured():
    return columns("backstep/cf.exp.dat")


def backstep_rows(short):
    x, d, u = measured()
    s = numpy.interp(x, *curve(short))
    e = s - d
    return x, d, u, s, e, abs(e) / u


def backstep_stations(model, short):
    notes = [
        "Backward-facing step, skin friction of the lower wall: CFL3D, model %s, against Driver and Seegmiller" % model,
        "source: %s, backstep/backstep_cfl3d_cf_%s.dat and backstep/cf.exp.dat" % (TMR, short),
        ASSUMPTION,
        "x is x/H; d measured; u_d its uncertainty; s simulation, linear between its own stations; e = s - d; ratio = |e|/u_d",
    ]
    return table(notes, ["x", "d", "u_d", "s", "e", "ratio"], zip(*backstep_rows(short)))


def backstep_summary():
    rows = []
    for model, short in MODELS:
        _, _, _, _, e, ratio = backstep_rows(short)
        n = len(e)
        chi2 = math.fsum(ratio * ratio)
        rows.append([
            model, n,
            math.fsum(e) / n,
            math.fsum(abs(e)) / n,
            math.sqrt(math.fsum(e * e) / n),
            max(abs(e)),
            int((ratio <= 1).sum()),
            int((ratio <= 2).sum()),
            chi2,
            stats.chi2.sf(chi2, n),
        ])
    notes = [
        "Backward-facing step, skin friction: one row a model over the stations of backstep-*.csv",
        "source: %s, backstep/" % TMR,
        ASSUMPTION,
        "bias mean of e; mae mean of |e|; rmse root mean square of e; within_1, within_2 stations with |e| <= u_d, 2 u_d;",
        "chi2 sum of (e/u_d)^2; tail its upper tail with n degrees of freedom (scipy.stats.chi2.sf), 0 below the smallest double. No u_num and no u_input are in it.",
    ]
    return table(notes, ["model", "n", "bias", "mae", "rmse", "max", "within_1", "within_2", "chi2", "tail"], rows)


def crossings(x, y):
    """Sign changes between neighbours; a run of zeros is none."""
    for i in range(len(x) - 1):
        if y[i] * y[i + 1] < 0:
            at = x[i] - y[i] * (x[i + 1] - x[i]) / (y[i + 1] - y[i])
            yield ("up" if y[i + 1] > y[i] else "down"), at


def backstep_crossings():
    curves = [("measured", measured()[:2])] + [(model, curve(short)) for model, short in MODELS]
    rows = [[name, direction, at] for name, (x, y) in curves for direction, at in crossings(x, y)]
    notes = [
        "Backward-facing step: where the skin friction changes sign (x/H), linear between neighbouring stations of opposite sign",
        "source: %s, backstep/backstep_cfl3d_cf_*.dat and backstep/cf.exp.dat" % TMR,
        "The resource prints reattachment near 6.1 (SA), 6.50 (SST), 6.8 (W06), measured 6.26 +- 0.10. The measured row here is only",
        "the straight line between the stations at 5.882 and 7.090, not the published reattachment.",
    ]
    return table(notes, ["curve", "direction", "x"], rows)


def backstep_monotone():
    x = measured()[0]
    curve_x, curve_cf = curve("sa")
    linear = numpy.interp(x, curve_x, curve_cf)
    monotone = interpolate.PchipInterpolator(curve_x, curve_cf, extrapolate=False)(x)
    notes = [
        "Backward-facing step, model SA: skin friction at the measured stations, linear and monotone cubic",
        "source: %s, backstep/backstep_cfl3d_cf_sa.dat" % TMR,
        "linear: numpy.interp; monotone: scipy.interpolate.PchipInterpolator (weighted harmonic mean of the slopes, three-point ends)",
    ]
    return table(notes, ["x", "linear", "monotone"], zip(x, linear, monotone))


# -------------------------------------------------------------- flat plate

def karman_schoenherr(retheta):
    decades = numpy.log10(retheta)
    return 1 / (17.08 * decades ** 2 + 25.11 * decades + 6.012)


def flatplate_formula():
    retheta, printed = columns("flatplate/theory/cf_K-S.dat")
    formula = karman_schoenherr(retheta)
    notes = [
        "Flat plate: Karman-Schoenherr, cf = 1/(17.08 L^2 + 25.11 L + 6.012) with L = log10 Re_theta",
        "source: %s, flatplate/theory/cf_K-S.dat" % TMR,
        "printed: the table of the source (9 decimals); formula: recomputed",
    ]
    return table(notes, ["retheta", "printed", "formula"], zip(retheta, printed, formula))


def flatplate_friction():
    stations = columns("flatplate/theory/cf_K-S.dat")[0]
    rows = []
    for model, name in [("SA", "sa"), ("SST", "sst")]:
        cf, retheta = columns("flatplate/theory/%s-cf_cfl3d.dat" % name)
        if not (numpy.diff(retheta) > 0).all():
            sys.exit("flat plate %s: Re_theta does not increase" % model)
        inside = stations[(stations >= retheta[0]) & (stations <= retheta[-1])]
        for at, s in zip(inside, numpy.interp(inside, retheta, cf)):
            d = float(karman_schoenherr(at))
            rows.append([model, at, s, d, s - d, (s - d) / d])
    notes = [
        "Flat plate: skin friction of CFL3D (grid 545 x 385) against Karman-Schoenherr over Re_theta",
        "source: %s, flatplate/theory/sa-cf_cfl3d.dat, sst-cf_cfl3d.dat; stations of cf_K-S.dat within each curve" % TMR,
        "s simulation, linear between its own stations; d Karman-Schoenherr by its formula; e = s - d; relative = e/d.",
        "The reference is a correlation and carries no uncertainty: this is a comparison, not a validation.",
    ]
    return table(notes, ["model", "retheta", "s", "d", "e", "relative"], rows)


# ----------------------------------------------------------- distributions

def distributions():
    rows = []
    for p in [0.90, 0.95, 0.975, 0.99, 0.995, 0.999]:
        rows.append(["normal-quantile", p, "", stats.norm.ppf(p)])
    for k in [1.0, 1.15, 1.5, 2.0, 2.5, 3.0]:
        rows.append(["normal-coverage", k, "", stats.norm.cdf(k) - stats.norm.cdf(-k)])
    for p in [0.05, 0.50, 0.90, 0.95, 0.99, 0.999]:
        for nu in [1, 2, 3, 5, 10, 20, 23, 24, 30, 100, 1000, 1000000]:
            rows.append(["chi2-quantile", p, nu, stats.chi2.ppf(p, nu)])
    for q in [0.5, 1.0, 3.8414588207, 10.0, 36.4, 100.0]:
        for nu in [1, 2, 3, 5, 10, 24, 100]:
            rows.append(["chi2-tail", q, nu, stats.chi2.sf(q, nu)])
    # Coverage of the student rows is two-sided: the factor is the quantile at (1 + p)/2.
    sigma = [math.erf(k / math.sqrt(2)) for k in (1, 2, 3)]
    for p in [sigma[0], 0.90, 0.95, sigma[1], 0.99, sigma[2]]:
        for nu in [1, 2, 3, 4, 5, 10, 16, 16.656, 20, 50, 100]:
            rows.append(["student-factor", p, nu, stats.t.ppf((1 + p) / 2, nu)])
    notes = [
        "Quantiles, tails and coverage factors of the distributions that the tests need",
        "source: scipy.stats norm, chi2, t",
        "normal-quantile: argument p, value z with P(Z <= z) = p; normal-coverage: argument k, value P(|Z| <= k);",
        "chi2-quantile: argument p, value q with P(Q <= q) = p; chi2-tail: argument q, value P(Q > q);",
        "student-factor: argument two-sided coverage, value t. A coverage of 0.6827..., 0.9545..., 0.9973... is that of 1, 2, 3 sigma exactly.",
    ]
    return table(notes, ["name", "argument", "nu", "value"], rows)


# ------------------------------------------------------------------- joint

TAPS_A = """.0382 .0245 .0315 .0160 .0294 .0392 .0409 .0226 .0264 .0282 .0124 .0409
            .0345 .0334 .0368 .0278 .0315 .0355 .0349 .0268 .0218 .0340 .0326 .0229"""
TAPS_B = """.0046 .0150 .0230 .0243 .0219 .0153 -.0045 -.0092 -.0216 -.0218 -.0114 -.0056
            .0083 .0154 .0235 .0233 .0131 .0006 -.0058 -.0152 -.0275 -.0239 -.0092 .0047"""


def numbers(text):
    return numpy.array([float(cell) for cell in text.split()])


def dense(n, independent, commons):
    """Covariance of n stations: independent standard uncertainties, and sources common to all."""
    covariance = math.fsum(u * u for u in independent) * numpy.eye(n)
    for u in commons:
        covariance = covariance + u * u * numpy.ones((n, n))
    return covariance


def statistic(e, covariance):
    return float(e @ numpy.linalg.solve(covariance, e))


def decomposition(e, covariance):
    """A constant fitted with the inverse covariance, and what is left."""
    ones = numpy.ones(len(e))
    weight = float(ones @ numpy.linalg.solve(covariance, ones))
    offset = float(ones @ numpy.linalg.solve(covariance, e)) / weight
    return offset, 1 / math.sqrt(weight), offset * offset * weight, statistic(e - offset, covariance)


def rounded(value):
    return float(digits(float(value)))


def settled(value):
    """As rounded, and zero for what is only the rounding of the solver: the inputs have three digits."""
    return 0.0 if abs(value) < 1e-13 else rounded(value)


def joint_case(name, source, e, covariance, independent=None, common=None):
    n = len(e)
    q = statistic(e, covariance)
    offset, u_offset, q_offset, q_rest = decomposition(e, covariance)
    case = {
        "name": name,
        "source": source,
        "e": [rounded(value) for value in e],
        "statistic": rounded(q),
        "degrees_of_freedom": n,
        "tail": rounded(stats.chi2.sf(q, n)),
        "point_95": rounded(stats.chi2.ppf(0.95, n)),
        "offset": settled(offset),
        "u_offset": rounded(u_offset),
        "statistic_offset": settled(q_offset),
        "statistic_remainder": settled(q_rest),
        "tail_remainder": rounded(stats.chi2.sf(q_rest, n - 1)),
    }
    if independent is None:
        case["covariance"] = [[rounded(value) for value in row] for row in covariance]
    else:
        case["u_independent"] = list(independent)
        case["u_common"] = list(common)
    return case


def pattern_case(name, source, e, independent, common):
    return joint_case(name, source, e, dense(len(e), independent, common), independent, common)


def shared_part(e, rho):
    """The statistic where the share rho of the pressure reference's variance is common to all taps."""
    n = len(e)
    return statistic(e, dense(n, [0.006, 0.004, 0.020 * math.sqrt(1 - rho)], [0.020 * math.sqrt(rho)]))


def share_at_95_point(e):
    """Every share rho in [0, 1] at which the statistic passes its 95 % point."""
    point = stats.chi2.ppf(0.95, len(e))
    grid = numpy.linspace(0, 1, 101)
    excess = [shared_part(e, rho) - point for rho in grid]
    return [rounded(optimize.brentq(lambda rho: shared_part(e, rho) - point, grid[i], grid[i + 1], xtol=1e-15))
            for i in range(len(grid) - 1) if excess[i] * excess[i + 1] < 0]


def shares(e):
    return {
        "statistic_at_share_0.5": rounded(shared_part(e, 0.5)),
        "share_at_95_point": share_at_95_point(e),
    }


def joint():
    exact = "exactly solvable, Q = E' V^-1 E; dense linear algebra"
    invented = "invented demo campaign, upper-branch pressure taps; dense linear algebra"
    cases = [
        pattern_case("independent", exact + "; Q = 25/3", numpy.ones(3), [0.6], []),
        pattern_case("shared systematic", exact + "; Q = 3/2.28", numpy.ones(3), [0.6], [0.8]),
        pattern_case("shared, alternating", exact + "; Q = 4/0.36", numpy.array([1.0, -1.0, 1.0, -1.0]), [0.6], [0.8]),
        joint_case("general", exact, numpy.array([0.5, 0.8, -0.2]),
                   numpy.array([[0.25, 0.10, 0.05], [0.10, 0.36, 0.08], [0.05, 0.08, 0.16]])),
    ]
    for model, text in [("A", TAPS_A), ("B", TAPS_B)]:
        e = numbers(text)
        cases += [
            pattern_case("taps %s, all independent" % model, invented, e, [0.006, 0.004, 0.020], []),
            pattern_case("taps %s, pressure reference common" % model, invented, e, [0.006, 0.004], [0.020]),
            pattern_case("taps %s, grid uncertainty common too" % model, invented, e, [0.006], [0.020, 0.004]),
        ]
    document = {
        "about": "Joint statistic over stations: differences, their covariance, and the result. " + VERSIONS,
        "shapes": "u_independent: standard uncertainties of sources independent between stations; u_common: of sources fully shared by "
                  "all; covariance: the full matrix. offset: constant fitted with the inverse covariance; statistic = statistic_offset + "
                  "statistic_remainder (degrees_of_freedom - 1).",
        "cases": cases,
        "shares": {
            "about": "taps with the variance 0.020^2 of the pressure reference split: the share rho common to all taps, the rest independent",
            "taps A": shares(numbers(TAPS_A)),
            "taps B": shares(numbers(TAPS_B)),
        },
    }
    return json.dumps(document, indent=1, ensure_ascii=True) + "\n"


# ----------------------------------------------------------- least squares

FAMILIES = [
    # name, dimension, cells fine to coarse, values
    ("3 + 0.1 h^1.5", 1, [1, 1 / 1.25, 1 / 1.5, 0.5, 0.4], [3 + 0.1 * h ** 1.5 for h in (1, 1.25, 1.5, 2, 2.5)]),
    ("3 + 0.1 h^3", 1, [1, 1 / 1.25, 1 / 1.5, 0.5, 0.4], [3 + 0.1 * h ** 3 for h in (1, 1.25, 1.5, 2, 2.5)]),
    ("3 + 0.1 h + 0.02 h^2", 1, [1, 1 / 1.25, 1 / 1.5, 0.5, 0.4], [3 + 0.1 * h + 0.02 * h * h for h in (1, 1.25, 1.5, 2, 2.5)]),
    ("flat plate SA CFL3D CD", 2, [208896, 52224, 13056, 3264, 816],
     [0.285985288e-2, 0.286130951e-2, 0.286620917e-2, 0.288437885e-2, 0.295438152e-2]),
    ("flat plate SA CFL3D cf(0.97)", 2, [208896, 52224, 13056, 3264, 816],
     [0.270562153e-2, 0.270673749e-2, 0.271115173e-2, 0.272834697e-2, 0.279568508e-2]),
    ("demo x_r A", 3, [5.60e6, 2.35e6, 0.98e6, 0.41e6], [6.38, 6.31, 6.18, 5.92]),
    ("demo x_r B", 3, [5.60e6, 2.35e6, 0.98e6, 0.41e6], [5.715, 5.67, 5.58, 5.41]),
    ("demo Cd A", 3, [5.60e6, 2.35e6, 0.98e6, 0.41e6], [0.03178, 0.03217, 0.03287, 0.03412]),
    ("demo Cd B", 3, [5.60e6, 2.35e6, 0.98e6, 0.41e6], [0.02995, 0.03021, 0.03068, 0.03155]),
    ("scattered", 1, [1, 1 / 1.3, 1 / 1.7, 1 / 2.2, 1 / 2.9], [1.00, 1.02, 1.10, 0.55, 1.15]),
]


def fitted(h, f, w, shapes):
    """Coefficients, fit and weighted sum of squares of f on a constant and shapes."""
    root = numpy.sqrt(w)
    matrix = numpy.stack([numpy.ones_like(h)] + shapes, 1)
    c = numpy.linalg.lstsq(matrix * root[:, None], f * root, rcond=None)[0]
    fit = matrix @ c
    return c, fit, math.fsum(w * (f - fit) ** 2)


def free_order(h, f, w):
    """The order of either sign with the least sum of squares, None at an end of the search."""
    def total(p):
        return fitted(h, f, w, [h ** p])[2]

    def slope(p):
        c, fit, _ = fitted(h, f, w, [h ** p])
        return -c[1] * math.fsum(w * (f - fit) * h ** p * numpy.log(h))

    ps = numpy.arange(-997, 998, 2) / 100
    i = int(numpy.argmin([total(p) for p in ps]))
    if i in (0, len(ps) - 1):
        return None
    return optimize.brentq(slope, ps[i - 1], ps[i + 1], xtol=1e-14)


def least_squares():
    rows = []
    for name, dim, cells, values in FAMILIES:
        n, f = len(cells), numpy.array(values) - values[0]
        h = (cells[0] / numpy.array(cells, float)) ** (1 / dim)
        step = (max(values) - min(values)) / (n - 1)
        weights = [("weighted", 1 / h / math.fsum(1 / h)), ("equal", numpy.full(n, 1 / n))]

        def candidate(form, weighting, w, shapes, m):
            c, fit, squares = fitted(h, f, w, shapes)
            return math.sqrt(n * squares / (n - m)), form, weighting, c, fit

        free = []
        for weighting, w in weights:
            p = free_order(h, f, w)
            if p is not None and p > 0:
                free.append(candidate("power", weighting, w, [h ** p], 3) + (p,))
        p, best = None, None
        if free:
            best = min(free, key=lambda x: x[0])
            p = best[5]
        if p is None or not 0.5 <= p <= 2:
            shapes = [("first", [h], 2), ("second", [h * h], 2)]
            if p is None or p < 0.5:
                shapes.append(("both", [h, h * h], 3))
            best = min((candidate(form, weighting, w, s, m) for form, s, m in shapes for weighting, w in weights), key=lambda x: x[0])
        scatter, form, weighting, c, fit = best[:5]
        error, off = abs(fit[0] - c[0]), abs(f[0] - fit[0])
        safe = 1.25 if scatter < step and p is not None and 0.5 <= p < 2.1 else 3
        u = safe * error + scatter + off if scatter < step else 3 * scatter / step * (error + scatter + off)
        eight = lambda v: "%.8g" % v
        rows.append([name, form, "" if form == "power" and scatter < 1e-9 else weighting, "" if p is None else eight(p), eight(values[0] + c[0]), eight(u)])
    notes = [
        "Least squares over four or more grids, by the formulas in core/refinement/leastsquares.go",
        "source of the formulas: a description of Eca and Hoekstra, J. Comput. Phys. 262 (2014) 104; no published table checks them",
        "flat plate: %s; demo: invented; the others are formulas of h" % TMR,
        "order: of the free fit with the smaller scatter, empty without one; weighting: empty where both fits are exact; eight digits",
    ]
    return table(notes, ["family", "form", "weighting", "order", "extrapolated", "u"], rows)


# ------------------------------------------------------------------- files

def files():
    result = {"backstep-%s.csv" % short: backstep_stations(model, short) for model, short in MODELS}
    result["backstep-summary.csv"] = backstep_summary()
    result["backstep-crossings.csv"] = backstep_crossings()
    result["backstep-monotone.csv"] = backstep_monotone()
    result["flatplate-karman-schoenherr.csv"] = flatplate_formula()
    result["flatplate-friction.csv"] = flatplate_friction()
    result["distributions.csv"] = distributions()
    result["joint.json"] = joint()
    result["least-squares.csv"] = least_squares()
    return result


def main(arguments):
    if arguments not in ([], ["--write"]):
        sys.exit("usage: reference.py [--write]")
    different = 0
    for name, text in sorted(files().items()):
        path = os.path.join(HERE, name)
        if arguments:
            with open(path, "w", encoding="ascii", newline="\n") as out:
                out.write(text)
            print("written   ", name)
            continue
        committed = ""
        if os.path.exists(path):
            with open(path, encoding="ascii", newline="") as lines:
                committed = lines.read()
        if committed == text:
            print("identical ", name)
            continue
        different += 1
        print("DIFFERENT ", name)
        sys.stdout.writelines(difflib.unified_diff(
            committed.splitlines(True), text.splitlines(True), "committed", "recomputed", n=0))
    if not arguments:
        print("%d passed, %d failed" % (len(files()) - different, different))
    return 1 if different else 0


if __name__ == "__main__":
    sys.exit(main(sys.argv[1:]))
