"""Reference pixels of the two projections of the sky map, from astropy's WCS (the FITS projections AIT and ZEA,
Calabretta & Greisen 2002, A&A 395, 1077, sections 5.3.4 and 5.1.7).

Run: python3 test/reference/skymap-astropy.py > test/reference/skymap-astropy.json
"""

import json

import astropy
import numpy as np
from astropy.wcs import WCS

PX_PER_RAD = 100.0


def frame(code, ra, dec):
    wcs = WCS(naxis=2)
    wcs.wcs.ctype = [f"RA---{code}", f"DEC--{code}"]
    wcs.wcs.crval = [ra, dec]
    wcs.wcs.crpix = [0, 0]
    # Right ascension grows to the left, pixels grow downward.
    wcs.wcs.cdelt = [-np.degrees(1 / PX_PER_RAD), -np.degrees(1 / PX_PER_RAD)]
    if dec != 0:
        wcs.wcs.lonpole = 180.0
    wcs.wcs.set()
    return wcs


rng = np.random.default_rng(20260801)
rows = []
for code, kind, ra0, dec0 in [
    ("AIT", "hammer", 180.0, 0.0),
    ("AIT", "hammer", 60.0, 0.0),
    ("ZEA", "lambert", 0.0, 90.0),
    ("ZEA", "lambert", 201.3, -31.5),
    ("ZEA", "lambert", 359.9, 12.0),
]:
    ra = rng.uniform(0, 360, 40)
    dec = np.degrees(np.arcsin(rng.uniform(-1, 1, 40)))
    x, y = frame(code, ra0, dec0).wcs_world2pix(ra, dec, 0)
    # crpix 0 counts from one in FITS: origin 0 puts the centre at -1.
    rows.append(
        {
            "kind": kind,
            "centreRaDeg": ra0,
            "centreDecDeg": dec0,
            "raDeg": ra.tolist(),
            "decDeg": dec.tolist(),
            "xPx": (x + 1).tolist(),
            "yPx": (y + 1).tolist(),
        }
    )
print(json.dumps({"madeBy": f"astropy {astropy.__version__}, skymap-astropy.py", "pxPerRad": PX_PER_RAD, "rows": rows}))
