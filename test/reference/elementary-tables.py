"""Makes shared-core/numerics/elementary/tables.ts with mpmath 1.2 (60 digits): /usr/bin/python3 test/reference/elementary-tables.py"""
from pathlib import Path

import mpmath as mp

mp.mp.dps = 60


def parts(x, bits=53):
    """x as the sum of two doubles; the first keeps `bits` bits."""
    if x == 0:
        return 0.0, 0.0
    exponent = int(mp.floor(mp.log(abs(x), 2))) + 1 - bits
    high = float(mp.nint(mp.ldexp(x, -exponent)) * mp.mpf(2) ** exponent)
    return high, float(x - mp.mpf(high))


def on_grid(x, power):
    """x as the sum of two doubles; the first is a multiple of 2^-power."""
    high = float(mp.nint(mp.ldexp(x, power)) * mp.mpf(2) ** -power)
    return high, float(x - mp.mpf(high))


def column(name, note, values):
    body = "".join(f"  {v!r},\n" for v in values)
    return f"/** {note} */\nexport const {name} = Float64Array.of(\n{body});\n"


def single(name, note, value):
    return f"/** {note} */\nexport const {name} = {value!r};\n"


out = ["// Made by test/reference/elementary-tables.py: each number is the exact value rounded to double precision.\n"
       "// biome-ignore-all lint/suspicious/noApproximativeNumericConstant: the digits are the point of this file, none is left to the engine\n"]

powers = [parts(mp.mpf(2) ** (mp.mpf(j) / 32)) for j in range(32)]
out.append(column("EXP2_HIGH", "2^(j/32), and what rounding lost.", [p[0] for p in powers]))
out.append(column("EXP2_LOW", "See EXP2_HIGH.", [p[1] for p in powers]))
high, low = parts(mp.log(2) / 32, 36)
out.append(single("STEP_HIGH", "ln 2 / 32 to 36 bits, so that its multiples are exact.", high))
out.append(single("STEP_LOW", "ln 2 / 32 less STEP_HIGH.", low))
out.append(single("STEPS_PER_UNIT", "32 / ln 2.", float(32 / mp.log(2))))

# The mantissa runs over [0.6875, 1.375) in 64 parts of equal count of doubles; both parts at 1 keep 1 itself.
inverses, logs = [], []
for i in range(64):
    word = 0x3FE60000 + (i << 14)
    start, end = [
        mp.ldexp(1 + mp.mpf(w & 0xFFFFF) / 2**20, (w >> 20) - 1023) for w in (word, word + (1 << 14))
    ]
    inverse = mp.mpf(1) if start == 1 or end == 1 else mp.nint(512 * 2 / (start + end)) / 512
    inverses.append(float(inverse))
    logs.append(on_grid(-mp.log(inverse), 42))
out.append(column("INVERSE", "1/c to 10 bits for a c in the middle of each part of the mantissa.", inverses))
out.append(column("LOG_HIGH", "ln c, a multiple of 2^-42, and the rest.", [p[0] for p in logs]))
out.append(column("LOG_LOW", "See LOG_HIGH.", [p[1] for p in logs]))
high, low = on_grid(mp.log(2), 42)
out.append(single("LN2_HIGH", "ln 2 as a multiple of 2^-42.", high))
out.append(single("LN2_LOW", "ln 2 less LN2_HIGH.", low))
for name, base in (("LN10", 10), ("LN2", 2)):
    high, low = parts(1 / mp.log(base))
    out.append(column(f"PER_{name}", f"1 / ln {base} as two doubles.", [high, low]))

arcs = [parts(mp.atan(mp.mpf(i) / 16)) for i in range(17)]
out.append(column("ATAN_HIGH", "atan(i/16), and what rounding lost.", [p[0] for p in arcs]))
out.append(column("ATAN_LOW", "See ATAN_HIGH.", [p[1] for p in arcs]))
out.append(column("HALF_PI", "pi/2 as two doubles.", list(parts(mp.pi / 2))))

rest, cuts = mp.pi / 2, []
for _ in range(2):
    high = float(mp.floor(mp.ldexp(rest, 32 + 33 * len(cuts))) * mp.mpf(2) ** -(32 + 33 * len(cuts)))
    cuts.append(high)
    rest -= mp.mpf(high)
cuts.append(float(rest))
out.append(column("QUARTER_TURN", "pi/2 in three parts, the first two of 33 bits.", cuts))
mp.mp.dps = 420
out.append(f"/** floor(2/pi 2^1216). */\nexport const TWO_OVER_PI = 0x{int(mp.floor(mp.ldexp(2 / mp.pi, 1216))):x}n;\n")
out.append(f"/** floor(pi/2 2^256). */\nexport const HALF_PI_256 = 0x{int(mp.floor(mp.ldexp(mp.pi / 2, 256))):x}n;\n")
mp.mp.dps = 60


def interpolated(f, end, terms):
    """Coefficients of the polynomial through f at the Chebyshev points of [0, end]: within a bit of minimax."""
    nodes = [end * (1 - mp.cos(mp.pi * (2 * j + 1) / (2 * terms))) / 2 for j in range(terms)]
    matrix = mp.matrix(terms, terms)
    for row, node in enumerate(nodes):
        for power in range(terms):
            matrix[row, power] = node**power
    return [float(c) for c in mp.lu_solve(matrix, mp.matrix([f(n) for n in nodes]))]


end = (mp.pi / 4) ** 2 * mp.mpf("1.0001")
root = mp.sqrt
out.append(column("SINE", "(sin x / x - 1) / x^2 as a polynomial in x^2 for |x| <= pi/4.",
                  interpolated(lambda z: (mp.sin(root(z)) / root(z) - 1) / z, end, 6)))
out.append(column("COSINE", "(cos x - 1 + x^2/2) / x^4 as a polynomial in x^2 for |x| <= pi/4.",
                  interpolated(lambda z: (mp.cos(root(z)) - 1 + z / 2) / z**2, end, 6)))
target = Path(__file__).parents[2] / "shared-core/numerics/elementary/tables.ts"
target.write_text("\n".join(out))
