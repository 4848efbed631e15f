"""Sequences of numpy's RandomState (Mersenne Twister), which our generator follows draw for draw.

Makes numerics-random.json beside it:
    python3 numerics-random.py && npm run format
"""

import json
import pathlib

import numpy as np

SEED = 20260
LIST = [20260, 3]


def draws(seed):
    # A fresh generator for each distribution
    make = lambda: np.random.RandomState(seed)
    mixed = make()
    return {
        "seed": seed,
        "words": [int(v) for v in make().randint(0, 2**32, 8, dtype=np.uint32)],
        "uniform": make().random_sample(8).tolist(),
        "normal": make().standard_normal(8).tolist(),
        "poisson3.5": make().poisson(3.5, 20).tolist(),
        "poisson250": make().poisson(250.0, 200).tolist(),
        "poisson1e6": make().poisson(1e6, 50).tolist(),
        "mixed": [v for _ in range(4) for v in (mixed.random_sample(), mixed.standard_normal(), float(mixed.poisson(40)))],
    }


out = pathlib.Path(__file__).with_suffix(".json")
out.write_text(json.dumps({"madeBy": f"numpy {np.__version__}, numerics-random.py", "draws": [draws(SEED), draws(LIST)]}) + "\n")
