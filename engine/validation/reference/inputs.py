"""
What a study gives: its parts with defaults, tables over z, electrode potentials. Units as in the study file.

See engine/MODEL.md, sections 1 to 3, for fields, interpolation and the sources of the constants.
"""

from math import exp, tanh
from types import SimpleNamespace

from scipy.interpolate import PchipInterpolator

NEED = object()  # marks a field without a default
FIELDS = {
    "cell": dict(name=NEED, capacityAh=NEED, massKg=NEED, specificHeatJPerKgK=1000, ocv=NEED, entropicMvPerK=None,
                 r0Milliohm=NEED, rcPairs=[], resistanceShape=None, activationKjPerMol=NEED, anode=None, vMaxV=NEED,
                 vMinV=NEED),
    "pack": dict(name=NEED, series=NEED, parallel=NEED, socWindow=[0, 1], busbarMilliohm=0, chargeCurrentMaxA=NEED,
                 dischargeCurrentMaxA=None, structureJPerK=0, segments=1),
    "thermal": dict(coreToSurfaceWPerK=None, surfaceShare=0.1, plateWPerK=NEED, ambientWPerK=NEED, coolant=NEED,
                    pumpW=0, chiller=None, radiator=None, heater=None),
    "coolant": dict(flowLPerMin=NEED, densityKgPerM3=1065, specificHeatJPerKgK=3400, volumeL=NEED),
    "chiller": dict(ratedW=NEED, onC=NEED, fullC=NEED, minCoolantC=10, cop35=2.2, copPerK=0.03, deratePerKAbove35=0.01),
    "radiator": dict(parkedWPerK=NEED, perMpsWPerK=0, onC=NEED, fullC=NEED),
    "heater": dict(ratedW=NEED, efficiency=0.95, onC=NEED, offC=NEED, maxCoolantC=60),
    "inlet": dict(resistanceMilliohm=0, heatCapacityJPerK=500, ambientWPerK=4, currentMaxA=None, derateFromC=75,
                  derateToC=90),
    "station": dict(name=NEED, powerMaxKw=NEED, currentMaxA=NEED, voltageMinV=150, voltageMaxV=NEED, rampAPerS=20,
                    rectifierEfficiency=0.95, powerSteps=[]),
    "boost": dict(powerMaxKw=NEED, efficiency=0.97),
    "strategy": dict(name=NEED, taper=NEED, cellVoltageCeilingV=NEED, anodeMarginMv=None, hotDerate=NEED,
                     coldLimit=None, cutoffA=0),
    "session": dict(ambientC=NEED, startSoc=NEED, startTempC=NEED, coolantStartC=None, targetSoc=1, maxMin=180,
                    hotelW=300, whPerKm=180),
}


class Refused(Exception):
    """The station cannot start this session, or the study cannot be used."""


def read_part(kind, given):
    """One part of a study with its defaults filled in; unknown and missing fields are errors."""
    fields = FIELDS[kind]
    unknown = [key for key in given if key not in fields]
    missing = [key for key, value in fields.items() if value is NEED and key not in given]
    if unknown or missing:
        raise Refused(f"{kind}: unknown {unknown}, missing {missing}")
    return SimpleNamespace(**{**fields, **given})


def pchip(table, otherwise):
    """Cell property over z, ends held; a constant where the study gives no table."""
    if table is None:
        return lambda z: otherwise
    x, curve = table["x"], PchipInterpolator(table["x"], table["y"])
    return lambda z: float(curve(min(x[-1], max(x[0], z))))


def nmc811_graphite():
    """Full-cell and negative-electrode potential, Chen et al. 2020 (constants from memory, see engine/MODEL.md)."""
    def positive(x):
        return (-0.8090 * x + 4.4875 - 0.0428 * tanh(18.5138 * (x - 0.5542))
                - 17.7326 * tanh(15.7890 * (x - 0.3117)) + 17.5842 * tanh(15.9308 * (x - 0.3120)))

    def negative(x):
        return (1.9793 * exp(-39.3631 * x) + 0.2482 - 0.0909 * tanh(29.8538 * (x - 0.1234))
                - 0.04478 * tanh(14.9159 * (x - 0.2769)) - 0.0205 * tanh(30.4444 * (x - 0.6103)))

    def anode(z):
        return negative(0.0279 + (0.9014 - 0.0279) * z)
    return (lambda z: positive(0.9084 + (0.2661 - 0.9084) * z) - anode(z)), anode


def lfp_graphite():
    """Safari & Delacourt 2011, Afshar et al. 2017, window of Prada et al. 2012 (all from memory)."""
    def positive(y):
        return 3.4077 - 0.020269 * y + 0.5 * exp(-150 * y) - 0.9 * exp(-30 * (1 - y))

    def negative(x):
        return (0.6379 + 0.5416 * exp(-305.5309 * x) + 0.044 * tanh(-(x - 0.1958) / 0.1088)
                - 0.1978 * tanh((x - 1.0571) / 0.0854) - 0.6875 * tanh((x + 0.0117) / 0.0529)
                - 0.0175 * tanh((x - 0.5692) / 0.0875))

    def anode(z):
        return negative(0.0132 + (0.811 - 0.0132) * z)
    return (lambda z: positive(0.74 + (0.035 - 0.74) * z) - anode(z)), anode


PAIRS = {"nmc811-graphite": nmc811_graphite, "lfp-graphite": lfp_graphite}


def potential(given, electrode):
    """Potential over z from a built-in pair (0: full cell, 1: negative electrode) or a table."""
    return PAIRS[given["electrodes"]]()[electrode] if "electrodes" in given else pchip(given, 0.0)
