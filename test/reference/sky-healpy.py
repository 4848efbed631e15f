"""Writes sky-healpy.json: HEALPix numbers and areas by healpy, to hold shared-core/sky against.

    python3 sky-healpy.py && npm run format
in this folder, with a python3 that has healpy (Debian: python3-healpy).
"""
import json

import healpy as hp
import numpy as np

rng = np.random.default_rng(20261201)


def positions(count):
    """Over the whole sphere, a fifth of them crowded towards the poles; RA also outside 0 to 360."""
    dec = np.degrees(np.arcsin(rng.uniform(-1, 1, count)))
    near_pole = rng.random(count) < 0.2
    dec[near_pole] = np.sign(dec[near_pole]) * (90 - 10 ** rng.uniform(-7, 0, near_pole.sum()))
    return rng.uniform(-360, 720, count), dec


pixels = []
corners = []
for order in range(14):
    nside = 2**order
    for number, (ra, dec) in enumerate(zip(*positions(25))):
        nest = int(hp.ang2pix(nside, ra, dec, nest=True, lonlat=True))
        ring = int(hp.ang2pix(nside, ra, dec, lonlat=True))
        pixels.append([nside, ra, dec, nest, ring, *map(float, hp.pix2ang(nside, nest, nest=True, lonlat=True))])
        if number < 5:
            # healpy's corners come north, west, south, east as unit vectors.
            north, west, south, east = hp.boundaries(nside, nest, 1, nest=True).T.tolist()
            corners.append([nside, nest, *south, *east, *north, *west])

# Which cells of a patchy set have all their neighbours in the set.
interiors = []
for nside in (1, 2, 4, 8):
    for share in (0.6, 0.95):
        cells = np.flatnonzero(rng.random(12 * nside**2) < share)
        held = set(cells.tolist())
        inside = [
            all(n in held for n in hp.get_all_neighbours(nside, int(c), nest=True) if n >= 0) for c in cells
        ]
        interiors.append({"nside": nside, "cells": cells.tolist(), "interior": [int(i) for i in inside]})

# Areas by counting pixel centres. The pixels are turned first, so that no edge runs along their rows: then a count is
# off by about the square root of the number of border pixels.
NSIDE = 1024
turned = hp.Rotator(rot=(31.7, 47.1, 12.3))(hp.pix2vec(NSIDE, np.arange(12 * NSIDE**2)))
turned_ra, turned_dec = hp.vec2ang(turned.T, lonlat=True)


def cap(ra, dec, radius):
    return hp.ang2vec(ra, dec, lonlat=True) @ turned >= np.cos(np.radians(radius))


def polygon(vertices):
    """Convex, counter-clockwise seen from outside."""
    v = hp.ang2vec([a for a, _ in vertices], [d for _, d in vertices], lonlat=True)
    inside = np.ones(turned.shape[1], bool)
    for a, b in zip(v, np.roll(v, -1, 0)):
        inside &= np.cross(a, b) @ turned >= 0
    return inside


def box(ra1, ra2, dec1, dec2):
    return ((turned_ra - ra1) % 360 <= (ra2 - ra1) % 360) & (turned_dec >= dec1) & (turned_dec <= dec2)


MAKE = {"cap": cap, "polygon": polygon, "box": box}


def area(name, parts, holes, perimeter):
    """`perimeter` in degrees, rough: it only sets the tolerance."""
    counted = np.any([MAKE[kind](*what) for kind, what in parts], axis=0)
    for kind, what in holes:
        counted &= ~MAKE[kind](*what)
    size = hp.nside2resol(NSIDE) * 180 / np.pi
    border = perimeter / size

    def word(kind, what):
        numbers = np.ravel(what[0]) if kind == "polygon" else what
        return kind + ":" + ",".join(repr(float(x)) for x in numbers)

    return {
        "name": name,
        "parts": [word(*p) for p in parts],
        "holes": [word(*h) for h in holes],
        "areaDeg2": int(counted.sum()) * hp.nside2pixarea(NSIDE, degrees=True),
        "toleranceDeg2": 3 * np.sqrt(border) * size**2,
    }


triangle = [(20, 10), (55, -5), (40, 30)]
quad = [(100, 60), (220, 70), (300, 75), (10, 55)]
areas = [
    area("cap", [("cap", (30, 40, 12))], [], 75),
    area("triangle", [("polygon", (triangle,))], [], 100),
    area("polygon around the pole", [("polygon", (quad,))], [], 130),
    area("two caps that overlap", [("cap", (30, 0, 10)), ("cap", (42, 5, 8))], [], 100),
    area("box across RA 0 with a cap cut into its edge", [("box", (350, 20, -10, 15))], [("cap", (18, 12, 7))], 130),
    area("cap, box and triangle with two holes",
         [("cap", (30, 10, 10)), ("box", (30, 60, 0, 12)), ("polygon", (triangle,))],
         [("cap", (40, 8, 3)), ("box", (20, 35, 5, 7))], 220),
    area("polar cap less a box up to the pole", [("cap", (0, 90, 20))], [("box", (40, 130, 60, 90))], 160),
]

with open("sky-healpy.json", "w") as f:
    table = {"healpy": hp.__version__, "pixels": pixels, "corners": corners, "interiors": interiors, "areas": areas}
    json.dump(table, f)
    f.write("\n")
