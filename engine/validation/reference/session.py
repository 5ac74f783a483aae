"""
Run one session study with SciPy's integrators and print its result as JSON.

    /usr/bin/python3 session.py study.json [--every 10] [--rtol 1e-10] [--method Radau] > result.json

Between two restarts the binding limit, the taper step and the station's power limit are held, so the integrand is
smooth where the current is a minimum of several limits. After every step the state is looked at; where it has left
its mode the moment is found on the dense output and integration starts again there. Power steps are step bounds.
The ledgers' integrals are states of their own.
"""

import argparse
import json
import sys
from bisect import bisect_right

import numpy as np
from scipy.integrate import DOP853, LSODA, RK45, Radau, fixed_quad
from scipy.optimize import brentq, minimize_scalar

sys.dont_write_bytecode = True  # leaves nothing beside the sources
from inputs import Refused  # noqa: E402
from model import CODES, INTEGRALS, T25, SessionModel  # noqa: E402

METHODS = {"Radau": Radau, "DOP853": DOP853, "LSODA": LSODA, "RK45": RK45}
LOOKS = (0.25, 0.5, 0.75, 1.0)  # where a step is looked at, as shares of it


class Piece:
    """One accepted step (or its part up to a restart) with its dense output and mode."""

    def __init__(self, t0, t1, dense, mode):
        self.t0, self.t1, self.dense, self.mode = t0, t1, dense, mode


def first_leaving(model, dense, t0, t1, mode):
    """First moment in a step at which its mode is left (upper end of a bracket one rounding wide), or None."""
    low = t0
    for share in LOOKS:
        high = t1 if share == 1 else t0 + share * (t1 - t0)
        if model.left_mode(high, dense(high), mode):
            while high - low > 4e-16 * max(1.0, high):
                mid = 0.5 * (low + high)
                if not low < mid < high:
                    break
                low, high = (low, mid) if model.left_mode(mid, dense(mid), mode) else (mid, high)
            return high
        low = high
    return None


def integrate(model, method, rtol):
    """Pieces of the whole session, the state at its end, the reason, and the events."""
    t, y, pieces, mode = 0.0, model.y0, [], None
    bounds = [s["atMin"] * 60.0 for s in model.station.powerSteps] + [model.session.maxMin * 60.0]
    events = [{"tS": 0.0, "event": "boost"}] if model.boosted else []
    atol = model.absolute_tolerance(rtol)
    while True:
        before, mode = mode, model.settle(t, y, mode.step if mode else 0)
        events += changes(t, before, mode)
        reason = model.end_reason(t, y, mode)
        if reason:
            events.append({"tS": t, "event": "end:" + reason})
            return pieces, t, y, mode, reason, events
        bound = min(b for b in bounds if b > t)
        solver = METHODS[method](lambda t, y: model.derivative(t, y, mode), t, y, bound, rtol=rtol, atol=atol)
        while solver.status == "running":
            message = solver.step()
            if solver.status == "failed":
                raise RuntimeError(f"integration failed at {solver.t} s: {message}")
            dense = solver.dense_output()
            left = first_leaving(model, dense, solver.t_old, solver.t, mode)
            t, y = (solver.t, solver.y) if left is None else (left, dense(left))
            pieces.append(Piece(solver.t_old, t, dense, mode))
            if left is not None:
                break


def changes(t, before, after):
    """Events of a restart; ledges are counted from 1, power is the limit now in force."""
    found = []
    if before and after.power != before.power:
        found.append({"tS": t, "event": f"power:{after.power / 1e3:g}"})
    if before and after.step > before.step:
        found += [{"tS": t, "event": f"ledge:{k + 1}"} for k in range(before.step + 1, after.step + 1)]
    if not before or after.code != before.code:
        found.append({"tS": t, "event": "limit:" + after.code})
    return found


class Run:
    """A session that has been integrated: state and rows at any moment, series, metrics and ledgers."""

    def __init__(self, model, method, rtol):
        self.model = model
        self.pieces, self.end, self.y_end, self.last_mode, self.reason, self.events = integrate(model, method, rtol)
        self.starts = [p.t0 for p in self.pieces]

    def state(self, t):
        """State at t, held after the end."""
        if not self.pieces or t >= self.end:
            return self.y_end
        piece = self.pieces[max(0, bisect_right(self.starts, t) - 1)]
        return piece.dense(t)

    def piece_row(self, piece, t):
        return self.model.row(t, piece.dense(t), piece.mode)

    def integral(self, name, t):
        return float(self.state(t)[INTEGRALS.index(name) - len(INTEGRALS)])

    def series(self, every):
        """Rows on the grid and on both sides of every jump and change of limit."""
        rows, k = [], 0
        for before, piece in zip([None] + self.pieces[:-1], self.pieces):
            if before is None or before.mode != piece.mode:
                first = self.piece_row(piece, piece.t0)
                last = self.piece_row(before, before.t1) if before else None
                jump = last and abs(first["packCurrentA"] - last["packCurrentA"]) > 1e-6
                if not last or jump or first["limit"] != last["limit"]:
                    rows += ([last] if last else []) + [first]
                    k = k + 1 if abs(k * every - piece.t0) < 1e-9 else k
            while k * every < piece.t1:
                rows.append(self.piece_row(piece, k * every))
                k += 1
        rows.append(self.model.row(self.end, self.y_end, self.pieces[-1].mode if self.pieces else self.last_mode))
        return {key: [row[key] for row in rows] for key in rows[0]}

    def samples(self):
        """Rows at the start, middle and end of every piece, each with its piece."""
        for p in self.pieces:
            for t in (p.t0, 0.5 * (p.t0 + p.t1), p.t1):
                yield p, self.piece_row(p, t)

    def extreme(self, samples, key, sign=1.0, scale=1.0):
        """Largest value of sign*scale*key, and the first row within 1e-6 of it, in the unit reported."""
        if not samples:
            row = self.model.row(0.0, self.y_end, self.last_mode)
            return scale * row[key], row

        def value(piece, t):
            return sign * scale * self.piece_row(piece, t)[key]
        top = max(range(len(samples)), key=lambda k: sign * samples[k][1][key])
        inside = []
        for piece in {id(p): p for p, _ in samples[max(0, top - 3):top + 4]}.values():
            found = minimize_scalar(lambda t: -value(piece, t), bounds=(piece.t0, piece.t1), method="bounded",
                                    options={"xatol": 1e-9})
            inside.append((piece, self.piece_row(piece, float(found.x))))
        samples = sorted(samples + inside, key=lambda s: s[1]["tS"])
        values = [sign * scale * row[key] for _, row in samples]
        best = max(values)
        first = next(k for k, v in enumerate(values) if v >= best - 1e-6)
        piece, row = samples[first]
        if first and samples[first - 1][0] is piece:
            t = brentq(lambda t: value(piece, t) - best + 1e-6, samples[first - 1][1]["tS"], row["tS"], xtol=1e-12)
            row = self.piece_row(piece, t)
        return sign * best, row

    def reach(self, soc):
        """First moment [s] at which soc is reached; None below the start or where it is not."""
        if soc < self.model.session.startSoc or soc > self.y_end[0]:
            return None
        if soc == self.model.session.startSoc:
            return 0.0
        for p in self.pieces:
            if p.dense(p.t1)[0] >= soc:
                return float(brentq(lambda t: p.dense(t)[0] - soc, p.t0, p.t1, xtol=1e-12))
        return self.end

    def metrics(self):
        s, start = self.model.session, self.model.session.startSoc
        reach = {x: self.reach(x / 100) for x in range(0, 101, 10)}

        def span(a, b):
            return None if reach[a] is None or reach[b] is None else (reach[b] - reach[a]) / 60

        def mean(name):
            if span(10, 80) is None:
                return None
            return (self.integral(name, reach[80]) - self.integral(name, reach[10])) / (reach[80] - reach[10]) * 1e-3
        out = dict(endReason=self.reason, endMin=self.end / 60, endSoc=float(self.y_end[0]),
                   minutesToSoc={str(x): None if reach[x] is None else reach[x] / 60 for x in range(10, 101, 10)},
                   minutes0To50=span(0, 50), minutes10To80=span(10, 80), minutes0To100=span(0, 100))
        samples = list(self.samples())

        def look(*asked, **how):
            return self.extreme(samples, *asked, **how)
        for name, key in (("peakStationPower", "stationPowerKw"), ("peakBatteryPower", "batteryPowerKw")):
            best, row = look(key)
            out.update({name + "Kw": best, name + "Min": row["tS"] / 60, name + "Soc": row["soc"]})
        out.update(meanStationPower10To80Kw=mean("station"), meanBatteryPower10To80Kw=mean("battery"))
        kwh = {str(m): self.integral("battery", min(m * 60.0, self.end)) / 3.6e6 for m in (10, 15, 20, 30)}
        out.update(batteryKwhAfterMin=kwh, kmAfterMin={m: e * 1e3 / s.whPerKm for m, e in kwh.items()})
        best, row = look("hottestCoreC")
        out.update(hottestCoreC=best, hottestCoreMin=row["tS"] / 60, lowestAnodeMv=None, lowestAnodeMin=None)
        if self.model.anode_ocp:
            best, row = look("lowestAnodeV", sign=-1.0, scale=1e3)
            out.update(lowestAnodeMv=best, lowestAnodeMin=row["tS"] / 60)
        limit = dict.fromkeys(CODES, 0.0)
        for p in self.pieces:
            limit[p.mode.code] += (p.t1 - p.t0) / 60
        return dict(out, limitMinutes=limit)

    def stored(self):
        """Energy stored [J], from z alone: the quadrature runs between the knots of the tables."""
        m = self.model
        z0, z1 = (m.z_low + soc * (m.z_high - m.z_low) for soc in (m.session.startSoc, self.y_end[0]))
        knots = [x for t in (m.cell.ocv, m.cell.entropicMvPerK or {}) for x in t.get("x", [])]
        cuts = sorted({z0, z1, *(x for x in [*knots, *np.linspace(0, 1, 101)] if min(z0, z1) < x < max(z0, z1))})
        density = np.vectorize(lambda z: m.ocv(z) - T25 * m.entropic(z) * 1e-3)
        area = sum(fixed_quad(density, a, b, n=12)[0] for a, b in zip(cuts, cuts[1:]))
        return float(area) * m.pack.series * 3600 * m.Q * (1 if z1 >= z0 else -1)

    def energy_ledger(self):
        kwh = {name: self.integral(name, self.end) / 3.6e6 for name in INTEGRALS}
        grid = kwh["station"] / self.model.station.rectifierEfficiency
        parts = {name + "Kwh": kwh[name] for name in ("auxiliaries", "busbar", "ohmic", "polarisation", "reversible")}
        parts = dict(inletKwh=kwh["inlet"], boostLossKwh=kwh["boost"], **parts, storedKwh=self.stored() / 3.6e6,
                     rcPairsKwh=kwh["rcPairs"])
        return dict(gridKwh=grid, rectifierLossKwh=grid - kwh["station"], stationKwh=kwh["station"], **parts,
                    remainderKwh=kwh["station"] - sum(parts.values()))

    def thermal_ledger(self):
        m, got = self.model, {name: self.integral(name, self.end) / 1e3 for name in INTEGRALS}
        a, b = m.conditions(m.y0), m.conditions(self.y_end)
        cells = got["ohmic"] + got["polarisation"] + got["reversible"]
        parts = dict(coresKj=m.Cc * float((b.T - a.T).sum()) / 1e3, surfacesKj=m.Cs * float((b.S - a.S).sum()) / 1e3,
                     loopKj=m.CL * (b.loop - a.loop) / 1e3, chillerKj=got["chiller"], radiatorKj=got["radiator"],
                     ambientKj=got["ambient"])
        return dict(cellsKj=cells, busbarKj=got["busbar"], **parts, heaterKj=got["heater"],
                    remainderKj=cells + got["busbar"] + got["heater"] - sum(parts.values()))


def result_of(study, every=10.0, rtol=1e-10, method="Radau"):
    """The result of a session study; raises Refused where the session cannot start."""
    run = Run(SessionModel(study), method, rtol)
    return dict(format="voltiplano/result", version=1, kind="session", title=study.get("title"), metrics=run.metrics(),
                energyLedger=run.energy_ledger(), thermalLedger=run.thermal_ledger(), events=run.events,
                series=run.series(every))


def printed(value, indent=""):
    """JSON text with twelve significant digits; every list and every event on one line."""
    if isinstance(value, dict) and "event" not in value:
        inner = indent + " "
        rows = (f"{inner}{json.dumps(k)}: {printed(v, inner)}" for k, v in value.items())
        return "{\n" + ",\n".join(rows) + "\n" + indent + "}"
    if isinstance(value, dict):
        return "{ " + ", ".join(f"{json.dumps(k)}: {printed(v)}" for k, v in value.items()) + " }"
    if isinstance(value, list):
        return "[" + ", ".join(printed(v) for v in value) + "]"
    return json.dumps(float(f"{value:.12g}") if isinstance(value, float) else value, ensure_ascii=False)


def main():
    parser = argparse.ArgumentParser(description=__doc__.strip().splitlines()[0])
    parser.add_argument("study")
    parser.add_argument("--every", type=float, default=10.0, help="output grid [s]")
    parser.add_argument("--rtol", type=float, default=1e-10)
    parser.add_argument("--method", choices=METHODS, default="Radau")
    asked = parser.parse_args()
    with open(asked.study, encoding="utf-8") as file:
        study = json.load(file)
    try:
        result = result_of(study, asked.every, asked.rtol, asked.method)
    except Refused as refusal:
        print(refusal, file=sys.stderr)
        sys.exit(2)
    print(printed(result))


if __name__ == "__main__":
    main()
