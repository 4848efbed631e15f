"""Distances, times and volumes of random universes by astropy (5.2.1).

Makes cosmology-astropy.json beside it:
    python3 cosmology-astropy.py && npm run format
with a python3 that has astropy and scipy. The convention is astropy's and ours: Om0 is baryons plus cold dark
matter, neutrinos are added from their masses.

Four kinds of radiation: none; massless neutrinos; "fitted", massive ones whose density astropy takes from the fit of
Komatsu et al. 2011; "integrated", where that method of astropy is replaced by the Fermi-Dirac integral done by
scipy, so that the comparison is not limited by the fit.
"""

import json
import pathlib
import warnings

import numpy as np
from astropy import __version__
from astropy import units as u
from astropy.cosmology import FlatLambdaCDM, Flatw0waCDM, FlatwCDM, LambdaCDM, w0waCDM, wCDM
from scipy.integrate import quad
from scipy.interpolate import CubicSpline

warnings.filterwarnings("error")
REDSHIFTS = [1e-4, 0.01, 0.1, 0.5, 1.0, 2.0, 3.5, 8.0, 20.0, 1100.0]
FLAT = {"FlatLambdaCDM": FlatLambdaCDM, "FlatwCDM": FlatwCDM, "Flatw0waCDM": Flatw0waCDM}
CURVED = {"LambdaCDM": LambdaCDM, "wCDM": wCDM, "w0waCDM": w0waCDM}
rng = np.random.default_rng(20260)


def fermi_dirac(y):
    """Density of a species of mass y k T over that of a massless one."""
    f = lambda x: x * x * np.sqrt(x * x + y * y) / (np.exp(x) + 1)
    pieces = np.unique(np.clip([0, y / 3, y, 3 * y, 5, 15, 60], 0, 60))
    whole = sum(quad(f, a, b, epsabs=0, epsrel=1e-13)[0] for a, b in zip(pieces[:-1], pieces[1:]))
    return whole * 120 / (7 * np.pi**4)


LN_Y = np.linspace(np.log(1e-3), np.log(1e5), 3000)
SPLINE = CubicSpline(LN_Y, [np.log(fermi_dirac(y)) for y in np.exp(LN_Y)])


class Integrated:
    """Put before one of astropy's classes: neutrinos by the integral."""

    def nu_relative_density(self, z):
        y = np.expand_dims(self._nu_y / 1.0, 0) / (1 + np.expand_dims(np.asarray(z, float), -1))
        sum_ = np.exp(SPLINE(np.log(y))).sum(-1) + self._nmasslessnu
        return (7 / 8 * (4 / 11) ** (4 / 3) * self._neff_per_nu * sum_).reshape(np.shape(z))[()]


INTEGRATED = {name: type("Integrated" + name, (Integrated, base), {}) for name, base in {**FLAT, **CURVED}.items()}


def draw(name, radiation):
    """Parameters rounded to four places, so that the file holds exactly what was computed."""
    number = lambda low, high: round(float(rng.uniform(low, high)), 4)
    h0, om = number(50, 90), number(0.1, 0.6)
    arguments = {"H0": h0, "Om0": om}
    if name in CURVED:
        arguments["Ode0"] = number(0.2, 0.95)
    w0, wa = -1.0, 0.0
    if "w" in name:
        w0 = number(-1.4, -0.6)
        arguments["w0"] = w0
    if "wa" in name:
        wa = number(-0.6, 0.4)
        arguments["wa"] = wa
    tcmb, neff, masses = 0.0, 0.0, []
    if radiation != "none":
        tcmb, neff = number(2.5, 2.9), number(3.0, 3.9)
        masses = [0.0, 0.0, 0.0]
    if radiation == "fitted":
        tcmb, neff, masses = 2.7255, 3.046, [0.0, 0.0, number(0.05, 0.1)]
    if radiation == "integrated":
        masses = [number(0, 0.03), number(0, 0.05), number(0.05, 0.5)]
    model = (INTEGRATED if radiation == "integrated" else {**FLAT, **CURVED})[name](
        **arguments, Tcmb0=tcmb * u.K, **({"Neff": neff, "m_nu": masses * u.eV} if masses else {})
    )
    if radiation == "integrated":
        model._inv_efunc_scalar, model._inv_efunc_scalar_args = model.inv_efunc, ()
    ours = {
        "h0KmSMpc": h0,
        "omegaM0": om,
        "omegaDe0": arguments.get("Ode0", "flat"),
        "w0": w0,
        "wa": wa,
        "tCmbK": tcmb,
        "nEff": neff,
        "neutrinoMassesEv": masses,
    }
    return model, ours


COLUMNS = {
    "hubbleKmSMpc": lambda model, z: model.H(z).value,
    "comovingMpc": lambda model, z: model.comoving_distance(z).value,
    "transverseComovingMpc": lambda model, z: model.comoving_transverse_distance(z).value,
    "angularDiameterMpc": lambda model, z: model.angular_diameter_distance(z).value,
    "luminosityMpc": lambda model, z: model.luminosity_distance(z).value,
    "distanceModulus": lambda model, z: model.distmod(z).value,
    "lookbackGyr": lambda model, z: model.lookback_time(z).to_value(u.Gyr),
    "ageGyr": lambda model, z: model.age(z).to_value(u.Gyr),
    "comovingVolumeMpc3": lambda model, z: model.comoving_volume(z).value,
    "differentialVolumeMpc3PerSr": lambda model, z: model.differential_comoving_volume(z).value,
}

rows = []
for radiation in ("none", "massless", "fitted", "integrated"):
    for name in [*FLAT, *CURVED]:
        for _ in range(4):
            model, parameters = draw(name, radiation)
            rows.append(
                {
                    "model": name,
                    "radiation": radiation,
                    "parameters": parameters,
                    "omegaGamma0": float(model.Ogamma0),
                    "omegaNu0": float(model.Onu0),
                    "omegaK0": float(model.Ok0),
                    # A line a redshift: z, then the columns
                    "values": [[z, *(float(f(model, z)) for f in COLUMNS.values())] for z in REDSHIFTS],
                }
            )

ratios = [[y, float(fermi_dirac(y))] for y in [1e-4, 0.001, 0.01, 0.1, 0.5, 1, 3, 10, 50, 299, 301, 1e4]]
out = pathlib.Path(__file__).with_suffix(".json")
table = {
    "madeBy": f"astropy {__version__}, {pathlib.Path(__file__).name}",
    "fermiDirac": ratios,
    "columns": ["z", *COLUMNS],
    "rows": rows,
}
out.write_text(json.dumps(table, indent=1) + "\n")
