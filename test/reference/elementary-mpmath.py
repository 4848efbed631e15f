"""Makes elementary-mpmath.json: exact values of elementary functions, rounded once, from mpmath 1.2 (working with 400
digits, so that also the sine of 1e300 has all of its own). Run: /usr/bin/python3 test/reference/elementary-mpmath.py"""
import json
import random
from pathlib import Path

import mpmath as mp

mp.mp.dps = 400
random.seed(5)
SPREAD = [random.choice((-1, 1)) * random.uniform(1, 2) * 2.0 ** random.randint(-30, 6) for _ in range(40)]
ANGLES = SPREAD + [mp.pi / 2 * k for k in (1, 2, 3, 4, 7, 100, 12345)] + [1e6, 1e7, 1e15, 1e22, 1e100, 1e300, -1.7e308,
    # The double nearest to a multiple of pi/2 (Muller et al., Handbook of Floating-Point Arithmetic, 2010, ch. 11).
    6381956970095103 * 2.0**797]
PLUS = [abs(x) for x in SPREAD] + [0.999, 1.001, 1 - 2.0**-53, 1 + 2.0**-52, 0.9922, 1.0156, 1e-310, 1e308]
UNIT = [random.uniform(-1, 1) for _ in range(40)] + [1 - 2.0**-53, -1 + 2.0**-40, 0.5, 1e-5]
REACH = [random.uniform(-700, 700) for _ in range(40)] + [709.78, -745.13, -708.5]
PAIRS = [(random.uniform(-9, 9), random.uniform(-9, 9)) for _ in range(40)] + [(1e-300, -1e-5), (3e8, 1e-8)]
BASES = [(abs(x), random.uniform(-30, 30)) for x in SPREAD] + [(1.0095, -58744.0), (1 + 2.0**-40, 1e14)]


def cube_root(x):
    return mp.sign(x) * mp.cbrt(abs(x))


def table(f, arguments):
    rows = []
    for a in arguments:
        a = [float(v) for v in (a if isinstance(a, tuple) else (a,))]
        rows.append([*a, float(f(*[mp.mpf(v) for v in a]))])
    return rows


TABLES = {
    "exp": table(mp.exp, SPREAD + REACH),
    "expm1": table(mp.expm1, SPREAD + [-0.0116, 0.0539]),
    "log": table(mp.log, PLUS),
    "log1p": table(mp.log1p, [x for x in SPREAD if x > -1]),
    "log10": table(mp.log10, PLUS),
    "log2": table(lambda x: mp.log(x) / mp.log(2), PLUS),
    "sin": table(mp.sin, ANGLES),
    "cos": table(mp.cos, ANGLES),
    "tan": table(mp.tan, ANGLES),
    "sinh": table(mp.sinh, SPREAD),
    "cosh": table(mp.cosh, SPREAD),
    "asinh": table(mp.asinh, SPREAD),
    "asin": table(mp.asin, UNIT),
    "acos": table(mp.acos, UNIT),
    "atan2": table(mp.atan2, PAIRS),
    "cbrt": table(cube_root, SPREAD + [1e-310, 1.7e308]),
    "hypot": table(lambda x, y: mp.sqrt(x * x + y * y), PAIRS),
    "pow": table(mp.power, BASES),
}
lines = [f'"{name}": [\n' + ",\n".join(json.dumps(row) for row in rows) + "\n]" for name, rows in TABLES.items()]
Path(__file__).with_suffix(".json").write_text("{\n" + ",\n".join(lines) + "\n}\n")
