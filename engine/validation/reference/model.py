"""
Equations of a charging session: cell, pack, heat, inlet, station and the limits on the current.

A second implementation of engine/MODEL.md (sections 1 to 6), written from the equations and not from the engine's
code, so that the two can be held against each other. Everything inside is SI with temperatures in degrees Celsius;
kelvin stands only in the Arrhenius and entropic terms.

State vector y: [soc, loop temperature, inlet temperature, cores (M), surfaces (M, two nodes only), RC voltages
(K*M, pair by pair), running integrals in joule (INTEGRALS)].
"""

from bisect import bisect_right
from collections import namedtuple
from math import exp, sqrt
from types import SimpleNamespace

import numpy as np

from inputs import Refused, pchip, potential, read_part

T25, R_GAS, ZERO_C = 298.15, 8.314462618, 273.15  # K, J/mol/K, K
CODES = ("station-current", "station-power", "station-voltage", "station-ramp", "inlet", "pack-current",
         "cell-voltage", "taper", "anode", "hot", "cold")
INTEGRALS = ("station", "inlet", "boost", "auxiliaries", "busbar", "ohmic", "polarisation", "reversible", "rcPairs",
             "battery", "chiller", "radiator", "ambient", "heater")
# What holds between two restarts: binding limit, taper step in force, station power limit [W], and the intervals of
# tables and controllers' bands the state is in (their edges are kinks, so steps end there).
Mode = namedtuple("Mode", "code step power within")


def clamp01(x):
    return min(1.0, max(0.0, x))


def upper_root(a, b, c):
    """Larger root of a x^2 + b x = c, a >= 0, without cancellation."""
    disc = b * b + 4 * a * c
    if disc < 0:
        raise Refused("the pack cannot feed the auxiliaries")
    return 2 * c / (b + sqrt(disc)) if b > 0 else (sqrt(disc) - b) / (2 * a)


def newton(f, x):
    """Root of a smooth rising f, which returns value and slope, to rounding."""
    for _ in range(50):
        value, slope = f(x)
        step = value / slope
        x -= step
        if abs(step) <= 1e-13 * max(1.0, abs(x)):
            return x
    raise RuntimeError("no current satisfies this station limit")


class SessionModel:
    def __init__(self, study):
        known = {"format", "version", "kind", "title", "cell", "pack", "thermal", "station", "strategy", "session",
                 "inlet", "boost"}
        if study.get("kind") != "session" or set(study) - known:
            raise Refused(f"not a session study, or unknown parts {sorted(set(study) - known)}")
        self.cell, self.pack, self.thermal = (read_part(k, study[k]) for k in ("cell", "pack", "thermal"))
        self.station, self.strategy, self.session = (read_part(k, study[k]) for k in ("station", "strategy", "session"))
        self.inlet = read_part("inlet", study.get("inlet", {}))
        self.boost = read_part("boost", study["boost"]) if "boost" in study else None
        self.coolant = read_part("coolant", self.thermal.coolant)
        self.chiller, self.radiator, self.heater = (
            read_part(k, getattr(self.thermal, k)) if getattr(self.thermal, k) else None
            for k in ("chiller", "radiator", "heater"))
        self._set_cell()
        self._set_heat()
        self._set_taper()
        self._set_kinks()
        self.y0 = self._start()
        self._plug_in()

    def _set_cell(self):
        cell, pack = self.cell, self.pack
        self.ocv = potential(cell.ocv, 0)
        self.anode_ocp = potential(cell.anode["potential"], 1) if cell.anode else None
        self.anode_share = cell.anode["share"] if cell.anode else 0
        self.entropic = pchip(cell.entropicMvPerK, 0.0)  # mV/K
        self.shape = pchip(cell.resistanceShape, 1.0)
        self.M, self.K = pack.segments, len(cell.rcPairs)
        self.n = pack.series / self.M
        self.Q = pack.parallel * cell.capacityAh
        self.z_low, self.z_high = pack.socWindow
        self.tau = np.array([p["tauS"] for p in cell.rcPairs]).reshape(-1, 1)
        self.r0 = self.n / pack.parallel * cell.r0Milliohm * 1e-3
        self.rk = self.n / pack.parallel * 1e-3 * np.array([p["rMilliohm"] for p in cell.rcPairs]).reshape(-1, 1)
        self.Rb = pack.busbarMilliohm * 1e-3
        self.Ri = self.inlet.resistanceMilliohm * 1e-3
        if self.strategy.anodeMarginMv is not None and not cell.anode:
            raise Refused("strategy.anodeMarginMv needs cell.anode")

    def _set_heat(self):
        th, pack = self.thermal, self.pack
        self.two_nodes = th.coreToSurfaceWPerK is not None
        cells = self.cell.massKg * self.cell.specificHeatJPerKgK * pack.series * pack.parallel / self.M
        structure = pack.structureJPerK / self.M
        share = th.surfaceShare
        self.Cc = (1 - share) * cells if self.two_nodes else cells + structure
        self.Cs = share * cells + structure if self.two_nodes else 0.0
        self.Gcs = (th.coreToSurfaceWPerK or 0) / self.M
        self.Ga = th.ambientWPerK / self.M
        heat = self.coolant.densityKgPerM3 * self.coolant.specificHeatJPerKgK * 1e-3  # J/K per litre
        self.W = self.coolant.flowLPerMin / 60 * heat
        self.CL = self.coolant.volumeL * heat
        self.wall = 1 - exp(-th.plateWPerK / self.M / self.W) if self.W > 0 else 0.0

    def _set_taper(self):
        self.taper = self.strategy.taper
        self.steps = self.taper.get("steps", [])
        self.edges = [s["fromSoc"] for s in self.steps] if self.taper["shape"] == "ledges" else []

    def _set_kinks(self):
        """Sorted edges of tables and bands over soc, hottest and coldest surface, inlet temperature."""
        cell, tp, hot = self.cell, self.taper, self.strategy.hotDerate
        tables = [cell.ocv, cell.entropicMvPerK, cell.resistanceShape, cell.anode and cell.anode["potential"]]
        soc = [(x - self.z_low) / (self.z_high - self.z_low) for t in tables if t for x in t.get("x", [])]
        soc += [p["soc"] for p in tp.get("points", [])] + tp.get("soc", [])
        hottest = [hot["fromC"], hot["toC"]] + [e for b in (self.chiller, self.radiator) if b for e in (b.onC, b.fullC)]
        coldest = tp.get("tempC", []) + (self.strategy.coldLimit or {}).get("tempC", [])
        coldest += [self.heater.onC, self.heater.offC] if self.heater else []
        self.kinks = [sorted(k) for k in (soc, hottest, coldest, [self.inlet.derateFromC, self.inlet.derateToC])]

    def within(self, c):
        return tuple(bisect_right(k, x) for k, x in zip(self.kinks, (c.soc, c.Smax, c.Smin, c.inlet)))

    def _start(self):
        s, M = self.session, self.M
        loop = s.startTempC if s.coolantStartC is None else s.coolantStartC
        nodes = [s.startTempC] * (2 * M if self.two_nodes else M)
        return np.array([s.startSoc, loop, s.ambientC] + nodes + [0.0] * (self.K * M + len(INTEGRALS)))

    def _plug_in(self):
        rest, st = self.conditions(self.y0).V0, self.station
        if rest < st.voltageMinV:
            raise Refused(f"pack rests at {rest:.3f} V, below the station's {st.voltageMinV} V")
        if rest > st.voltageMaxV and not self.boost:
            raise Refused(f"pack rests at {rest:.3f} V, above the station's {st.voltageMaxV} V, and there is no boost")
        self.boosted = rest > st.voltageMaxV

    def absolute_tolerance(self, rtol):
        """One percent of soc, one kelvin, 10 mV per pair, 10 kJ in the integrals, each times rtol."""
        nodes = self.M * (2 if self.two_nodes else 1)
        return rtol * np.array([0.01, 1, 1] + [1] * nodes + [0.01 * self.n] * (self.K * self.M)
                               + [1e4] * len(INTEGRALS))

    def conditions(self, y):
        """All that follows from the state without the current: rest voltages, resistances, heat moved, auxiliaries."""
        c, M, s = SimpleNamespace(), self.M, self.session
        c.soc, c.loop, c.inlet = float(y[0]), float(y[1]), float(y[2])
        c.z = self.z_low + c.soc * (self.z_high - self.z_low)
        c.T = y[3:3 + M]
        at = 3 + M * (2 if self.two_nodes else 1)
        c.S = y[3 + M:at] if self.two_nodes else c.T
        c.v = y[at:at + self.K * M].reshape(self.K, M)
        c.TK = c.T + ZERO_C
        c.dUdT = self.entropic(c.z) * 1e-3
        factor = self.shape(c.z) * np.exp(self.cell.activationKjPerMol * 1e3 / R_GAS * (1 / c.TK - 1 / T25))
        c.R0, c.Rk = self.r0 * factor, self.rk * factor
        c.U = self.n * (self.ocv(c.z) + (c.TK - T25) * c.dUdT)
        c.vSum = c.v.sum(axis=0)
        c.V0, c.R = float(c.U.sum() + c.vSum.sum()), float(c.R0.sum()) + self.Rb
        c.Smax, c.Smin = float(c.S.max()), float(c.S.min())
        self._move_heat(c)
        c.aux = s.hotelW + self.thermal.pumpW + c.chillerW + c.heaterW
        return c

    def _move_heat(self, c):
        """Controllers and the coolant's way along the segments: heat moved [W], electricity [W], temperatures."""
        ambient, W = self.session.ambientC, self.W
        c.chill = c.chillerW = c.radiate = c.heat = c.heaterW = 0.0
        if self.chiller and W > 0:
            ch = self.chiller
            rated = ch.ratedW * clamp01(1 - ch.deratePerKAbove35 * max(0, ambient - 35))
            c.chill = min(clamp01((c.Smax - ch.onC) / (ch.fullC - ch.onC)) * rated, W * max(0, c.loop - ch.minCoolantC))
            c.chillerW = c.chill / max(1, ch.cop35 + ch.copPerK * (35 - ambient))
        if self.radiator and W > 0:
            ra = self.radiator
            u = clamp01((c.Smax - ra.onC) / (ra.fullC - ra.onC))
            c.radiate = u * W * (1 - exp(-ra.parkedWPerK / W)) * max(0, c.loop - ambient)
        if self.heater and W > 0:
            he = self.heater
            u = clamp01((he.offC - c.Smin) / (he.offC - he.onC)) * clamp01((he.maxCoolantC - c.loop) / 5)
            c.heaterW, c.heat = u * he.ratedW, he.efficiency * u * he.ratedW
        c.coolantIn = c.loop + ((c.heat - c.chill - c.radiate) / W if W > 0 else 0.0)
        c.H, theta = np.zeros(self.M), c.coolantIn
        for j in range(self.M if W > 0 else 0):
            c.H[j] = W * self.wall * (c.S[j] - theta)
            theta += c.H[j] / W
        c.coolantOut = theta

    # ---- limits: each gives the largest current into the pack it allows [A]

    def at_station_current(self, c, x):
        """Pack current while the station gives x [A] (never below 0)."""
        x = max(0.0, x)
        if not self.boosted:
            return upper_root(c.R, c.V0 - x * c.R, x * c.V0 - c.aux)
        vs = self.station.voltageMaxV
        x = min(x, vs / (2 * self.Ri)) if self.Ri > 0 else x  # beyond, more current brings less power
        return upper_root(c.R, c.V0, self.boost.efficiency * (vs - x * self.Ri) * x - c.aux)

    def at_station_power(self, c, power):
        if self.boosted:
            own = upper_root(c.R, c.V0, self.boost.powerMaxKw * 1e3 - c.aux)
            return min(own, self.at_station_current(c, power / self.station.voltageMaxV))

        def excess(i):
            v = c.V0 + c.R * i
            x = i + c.aux / v
            return v * x + self.Ri * x * x - power, v + c.R * i + 2 * self.Ri * x * (1 - c.aux * c.R / v**2)
        return newton(excess, upper_root(c.R, c.V0, power - c.aux))

    def at_station_voltage(self, c):
        if self.boosted:
            return np.inf

        def excess(i):
            v = c.V0 + c.R * i
            return (v + self.Ri * (i + c.aux / v) - self.station.voltageMaxV, c.R + self.Ri * (1 - c.aux * c.R / v**2))
        return max(newton(excess, (self.station.voltageMaxV - c.V0) / c.R), self.at_station_current(c, 0))

    def taper_current(self, c, step):
        tp, shape = self.taper, self.taper["shape"]
        if shape == "none":
            return np.inf
        if shape == "slope":
            value = float(np.interp(c.soc, [p["soc"] for p in tp["points"]], [p["value"] for p in tp["points"]]))
        elif shape == "map":
            across = [float(np.interp(c.Smin, tp["tempC"], row)) for row in tp["values"]]
            value = float(np.interp(c.soc, tp["soc"], across))
        else:
            value = self.steps[step]["value"]
        if tp["unit"] == "kW":
            return upper_root(c.R, c.V0, value * 1e3)
        return value * (self.Q if tp["unit"] == "C" else 1)

    def allowed(self, code, t, c, mode):
        """Largest pack current [A] under one limit code; infinite where the study does not set it."""
        st, sy, cap = self.station, self.strategy, self.pack.chargeCurrentMaxA
        if code == "station-current":
            return self.at_station_current(c, st.currentMaxA)
        if code == "station-power":
            return self.at_station_power(c, mode.power)
        if code == "station-voltage":
            return self.at_station_voltage(c)
        if code == "station-ramp":
            return self.at_station_current(c, st.rampAPerS * t)
        if code == "inlet":
            il = self.inlet
            if il.currentMaxA is None:
                return np.inf
            derate = clamp01((il.derateToC - c.inlet) / (il.derateToC - il.derateFromC))
            return self.at_station_current(c, il.currentMaxA * derate)
        if code == "pack-current":
            return cap
        if code == "cell-voltage":
            return max(0.0, float(((self.n * sy.cellVoltageCeilingV - c.U - c.vSum) / c.R0).min()))
        if code == "taper":
            return max(0.0, self.taper_current(c, mode.step))
        if code == "anode":
            if sy.anodeMarginMv is None or self.anode_share == 0:
                return np.inf
            room = self.n * (self.anode_ocp(c.z) - sy.anodeMarginMv * 1e-3) / self.anode_share
            return max(0.0, float(((room - c.vSum) / c.R0).min()))
        if code == "hot":
            hot = sy.hotDerate
            return cap * clamp01((hot["toC"] - c.Smax) / (hot["toC"] - hot["fromC"]))
        if sy.coldLimit is None:
            return np.inf
        return float(np.interp(c.Smin, sy.coldLimit["tempC"], sy.coldLimit["cRate"])) * self.Q

    def binding(self, t, c, mode):
        """Code of the smallest limit; of equal ones (to 1e-11) the first listed."""
        allowed = [self.allowed(code, t, c, mode) for code in CODES]
        least = min(allowed)
        return next(code for code, i in zip(CODES, allowed) if i <= least + 1e-11 * max(1.0, abs(least)))

    def power_limit(self, t):
        """Station power limit [W]: the latest power step reached, at most the station's own."""
        latest = [s["powerKw"] for s in self.station.powerSteps if s["atMin"] * 60 <= t][-1:]
        return 1e3 * min([self.station.powerMaxKw] + latest)

    def highest_cell(self, c, i):
        return float((c.U + c.vSum + i * c.R0).max()) / self.n

    def step_reached(self, c, i, step):
        """Has the highest cell voltage reached the end of this voltage ledge (within 1 nV)?"""
        return (self.taper["shape"] == "voltage-ledges" and step < len(self.steps) - 1
                and self.highest_cell(c, i) >= self.steps[step]["untilCellV"] - 1e-9)

    def settle(self, t, y, step):
        """The mode in force at a state: taper step (chained moves of voltage ledges included), power, binding limit."""
        c = self.conditions(y)
        if self.edges:
            step = max(0, bisect_right(self.edges, c.soc) - 1)
        while True:
            mode = Mode(None, step, self.power_limit(t), self.within(c))
            mode = mode._replace(code=self.binding(t, c, mode))
            if not self.step_reached(c, self.allowed(mode.code, t, c, mode), step):
                return mode
            step += 1

    def left_mode(self, t, y, mode):
        """True where the state no longer belongs to the mode, or the session has ended."""
        if self.end_reason(t, y, mode):
            return True
        c = self.conditions(y)
        if self.edges and max(0, bisect_right(self.edges, c.soc) - 1) != mode.step:
            return True
        return (self.within(c) != mode.within or self.binding(t, c, mode) != mode.code
                or self.step_reached(c, self.allowed(mode.code, t, c, mode), mode.step))

    def end_reason(self, t, y, mode):
        if y[0] >= self.session.targetSoc:
            return "target"
        if mode.code in ("cell-voltage", "taper", "anode"):
            if self.allowed(mode.code, t, self.conditions(y), mode) <= self.strategy.cutoffA:
                return "cutoff"
        return "maxMin" if t >= self.session.maxMin * 60 else None

    # ---- rates and rows

    def supply(self, c, i):
        """Pack voltage [V], station current [A], station voltage [V], power into the converter [W]."""
        v = c.V0 + c.R * i
        if not self.boosted:
            x = i + c.aux / v
            return v, x, v + x * self.Ri, 0.0
        into, vs = (v * i + c.aux) / self.boost.efficiency, self.station.voltageMaxV
        return v, 2 * into / (vs + sqrt(vs * vs - 4 * self.Ri * into)), vs, into

    def derivative(self, t, y, mode):
        c = self.conditions(y)
        i = self.allowed(mode.code, t, c, mode)
        v, x, vd, into = self.supply(c, i)
        ambient, M = self.session.ambientC, self.M
        ohmic, polarisation, reversible = i * i * c.R0, (c.v**2 / c.Rk).sum(axis=0), i * c.TK * self.n * c.dUdT
        q, busbar = ohmic + polarisation + reversible, i * i * self.Rb
        lost = self.Ga * (c.S - ambient)
        surface = busbar / M - c.H - lost
        if self.two_nodes:
            across = self.Gcs * (c.T - c.S)
            nodes = [(q - across) / self.Cc, (across + surface) / self.Cs]
        else:
            nodes = [(q + surface) / self.Cc]
        head = [i / (3600 * self.Q * (self.z_high - self.z_low)),
                self.W * (c.coolantOut - c.loop) / self.CL,
                (x * x * self.Ri - self.inlet.ambientWPerK * (c.inlet - ambient)) / self.inlet.heatCapacityJPerK]
        held = float((i * c.v).sum() - polarisation.sum())
        boost_loss = (1 - self.boost.efficiency) * into if self.boosted else 0.0
        integrals = [vd * x, x * x * self.Ri, boost_loss, c.aux, busbar, ohmic.sum(), polarisation.sum(),
                     reversible.sum(), held, v * i, c.chill, c.radiate, lost.sum(), c.heat]
        return np.concatenate([head, *nodes, ((i * c.Rk - c.v) / self.tau).ravel(), integrals])

    def row(self, t, y, mode):
        """One row of the series."""
        c = self.conditions(y)
        i = self.allowed(mode.code, t, c, mode)
        v, x, vd, _ = self.supply(c, i)
        anode = None
        if self.anode_ocp:
            anode = self.anode_ocp(c.z) - self.anode_share * float((i * c.R0 + c.vSum).max()) / self.n
        return dict(tS=t, soc=c.soc, packCurrentA=i, packVoltageV=v, stationVoltageV=vd, stationCurrentA=x,
                    stationPowerKw=vd * x * 1e-3, batteryPowerKw=v * i * 1e-3, highestCellV=self.highest_cell(c, i),
                    lowestAnodeV=anode, hottestCoreC=float(c.T.max()), hottestSurfaceC=c.Smax, coldestSurfaceC=c.Smin,
                    coolantInC=c.coolantIn, coolantOutC=c.coolantOut, loopC=c.loop, inletC=c.inlet, chillerW=c.chill,
                    radiatorW=c.radiate, heaterW=c.heat, auxiliaryW=c.aux, limit=mode.code)
