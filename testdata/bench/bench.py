#!/usr/bin/env python3
"""Time pandas, numpy and scipy on the input of the project's own benchmarks.

    bench.py FOLDER

writes FOLDER/million.csv (a line of names and 1,000,000 rows of three numbers,
the same bytes as the Go benchmarks make) unless it is there, and prints one JSON
object: seconds, the best of five runs, by name. Imports are not timed; the file
is in the page cache.
"""

import json
import math
import os
import platform
import sys
import time

import numpy
import pandas
import scipy
from scipy.interpolate import PchipInterpolator

ROWS = 1000000
RUNS = 5


def written(path):
    """The rows of millionRows in core/tablefile/bench_test.go."""
    if not os.path.exists(path):
        with open(path + ".part", "w", encoding="ascii", newline="\n") as out:
            out.write("x [m],y,cp\n")
            for i in range(ROWS):
                x = i / ROWS
                out.write("%.9f,%.10f,%.6e\n" % (x, math.sqrt(x) * 0.1, 1 - 4 * x))
        os.replace(path + ".part", path)
    return os.path.getsize(path)


def best(work):
    seconds = []
    for _ in range(RUNS):
        start = time.perf_counter()
        work()
        seconds.append(time.perf_counter() - start)
    return min(seconds)


def linear(x, y, at):
    """Linear interpolation and its standard uncertainty, 1.05 (t - x_i)(x_(i+1) - t)/2 max|f''| over sqrt 3."""
    s = numpy.interp(at, x, y)
    slope = numpy.diff(y) / numpy.diff(x)
    inner = numpy.abs(2 * numpy.diff(slope) / (x[2:] - x[:-2]))
    second = numpy.concatenate((inner[:1], inner, inner[-1:]))
    i = numpy.clip(numpy.searchsorted(x, at) - 1, 0, len(x) - 2)
    bound = 1.05 / 2 * (at - x[i]) * (x[i + 1] - at) * numpy.maximum(second[i], second[i + 1])
    return s, bound / math.sqrt(3)


def monotone(x, y, at):
    """Monotone cubic interpolation, and its difference from linear as the bound of its error."""
    s = PchipInterpolator(x, y)(at)
    return s, numpy.abs(s - numpy.interp(at, x, y)) / math.sqrt(3)


def compare(s, d, u):
    """What a pointwise comparison states: the differences, their ratios and the summary of them."""
    e = s - d
    size = numpy.abs(e)
    ratio = size / u
    return e, ratio, e.mean(), size.mean(), math.sqrt((e * e).mean()), size.argmax(), (ratio <= 1).sum(), (ratio <= 2).sum()


def main(folder):
    path = os.path.join(folder, "million.csv")
    size = written(path)
    blanks, zone = os.path.join(folder, "blanks.dat"), os.path.join(folder, "zone.dat")
    with open(path) as rows, open(blanks, "w") as b, open(zone, "w") as z:
        head = rows.readline().replace(",", " ")
        b.write(head)
        z.write("VARIABLES = " + head + 'ZONE T="a"\n')
        for row in rows:
            row = row.replace(",", " ")
            b.write(row)
            z.write(row)

    # Two sorted sets of stations that interleave without coinciding.
    index = numpy.arange(ROWS)
    x = index / ROWS
    y = numpy.sin(7 * x)
    stations = (index + 0.37) / ROWS * (x[-1] / ((ROWS - 1 + 0.37) / ROWS))
    s = numpy.interp(stations, x, y)
    d = s + 0.01 * numpy.cos(41 * stations)
    u = numpy.full(ROWS, 0.004)

    seconds = {
        "pandas.read_csv": best(lambda: pandas.read_csv(path)),
        "numpy.loadtxt": best(lambda: numpy.loadtxt(path, delimiter=",", skiprows=1)),
        "pandas, blanks": best(lambda: pandas.read_csv(blanks, sep=r"\s+")),
        "numpy, blanks": best(lambda: numpy.loadtxt(blanks, skiprows=1)),
        "pandas, zone": best(lambda: pandas.read_csv(zone, sep=r"\s+", skiprows=2, header=None)),
        "numpy, zone": best(lambda: numpy.loadtxt(zone, skiprows=2)),
        "numpy.interp": best(lambda: numpy.interp(stations, x, y)),
        "numpy, same work": best(lambda: linear(x, y, stations)),
        "scipy, same work": best(lambda: monotone(x, y, stations)),
        "numpy arithmetic": best(lambda: compare(s, d, u)),
    }
    json.dump({
        "bytes": size,
        "versions": "Python %s, pandas %s, numpy %s, scipy %s" % (
            platform.python_version(), pandas.__version__, numpy.__version__, scipy.__version__),
        "seconds": seconds,
    }, sys.stdout)


if __name__ == "__main__":
    if len(sys.argv) != 2:
        sys.exit("usage: bench.py FOLDER")
    main(sys.argv[1])
