"""Solves every reference circuit with SciPy and, where there is a run, with ngspice; prints one JSON object.

Steady values: MPa, m/s or rad/s. Times: s from the start of the step. Usage: reference.py [--no-ngspice]
"""

import json
import math
import sys

from scipy.optimize import root

import circuits as c
from laws import BAR, LPM, k_of, path

NGSPICE = "--no-ngspice" not in sys.argv


def settled(build, phase, guess, x=0.0, v=0.15, lifted=None):
    """The steady point with the rod at x, every shift over."""
    kind = {} if lifted is None else {"lifted": lifted}
    model = build(phase, 1e-6, **kind)
    frozen = {"x": x} if "x" in model.names else {}
    return model.steady(frozen, guess=guess | ({"v": v} if "v" in model.names else {}))


def chain(build, phases):
    """Runs the phases one after another; each is (phase, event, stop, kind). Returns times by SciPy and by ngspice."""
    out = []
    for solver in ("scipy_run", "ngspice_run"):
        if solver == "ngspice_run" and not NGSPICE:
            continue
        state, times, pressures = None, [], []
        for phase, event, stop, kind in phases:
            model = build(phase, 1e-7, **kind)
            time, state = getattr(model, solver)(state or model.start, stop, event)
            times.append(time)
            pressures.append({n: value for n, value in state.items() if n not in ("x", "v")})
        out.append({"times": times, "pressures": pressures})
    return out


def lines():
    """Tube and hose by Churchill (1977), oil of grade 46 and index 95 at 45 degC as the program states it (argument of the check)."""

    def solve(nu, rho=870.0):
        def churchill(re, rr):
            a = (2.457 * math.log(1 / ((7 / re) ** 0.9 + 0.27 * rr))) ** 16
            b = (37530 / re) ** 16
            return 8 * ((8 / re) ** 12 + (a + b) ** -1.5) ** (1 / 12)

        def loss(q, bore, length, rough, bends):  # L/s -> MPa
            v = q / 1000 / (math.pi * bore**2 / 4)
            re = v * bore / nu
            return (churchill(re, rough / bore) * length / bore + 0.75 * bends) * rho * v * v / 2 / 1e6

        q, g = c.pump_flow(25)
        kr, kn = k_of(50, 5), k_of(40, 20)

        def residual(y):
            p, i, o = y
            ql = path(kn, i - o)
            relief = max(0.0, min(50 * LPM * (p - 12) / 1.2, path(kr, p)))
            return [q - g * p - relief - ql, p - i - loss(ql, 0.010, 12, 1.5e-6, 6), o - loss(ql, 0.016, 4, 2e-5, 0)]

        y = root(residual, [2.7, 1.65, 0.05], tol=1e-13).x
        return {"p": y[0], "i": y[1], "o": y[2]}

    return solve


def main():
    nu = float(sys.argv[sys.argv.index("--nu") + 1])
    answers = {}
    answers["01"] = {"steady": {"Run": settled(c.c01, None, {})}}
    answers["02"] = {"steady": {"Run": settled(c.c02, None, {})}}
    answers["03"] = {
        "steady": {
            "Out": settled(c.c03, True, {"p": 0.6, "a": 0.5, "b": 0.06, "t": 0.005}),
            "Back": settled(c.c03, False, {"p": 1.2, "a": 0.27, "b": 1.08, "t": 0.014}, x=0.25, v=-0.23),
        },
        "runs": chain(c.c03, [(True, "x-0.25", 5, {}), (False, "0.02-x", 5, {})]),
    }
    answers["04"] = {
        "steady": {"Out": settled(c.c04, True, {"p": 8.4, "a": 8.37, "r": 11.5, "b": 0.01}, v=0.07)},
        "runs": chain(c.c04, [(True, "x-0.15", 6, {})]),
    }
    answers["05"] = {
        "steady": {"Out": settled(c.c05, True, {"p": 3.07, "a": 3.04, "b": 3.1}, v=0.24)},
        "runs": chain(c.c05, [(True, "x-0.3", 5, {})]),
    }
    answers["06"] = {
        "steady": {"Fast": settled(c.c06, None, {"p": 0.83, "a": 0.59, "b": 0.06, "low": 1.0})},
        "runs": chain(c.c06, [(True, "x-0.1", 5, {"lifted": False})]),
    }
    answers["07"] = {
        "steady": {"Rapid": settled(c.c07, None, {"p": 0.56, "a": 0.46, "r": 0.12, "b": 0.04})},
        "runs": chain(c.c07, [(True, "x-0.14", 5, {}), (None, "x-0.22", 20, {})]),
    }
    answers["08"] = {
        "steady": {"Down": settled(c.c08, True, {"p": 1.62, "a": 1.54, "b": 0.035, "c": 8.6}, v=0.09)},
        "runs": chain(c.c08, [(True, "x-0.3", 10, {})]),
    }
    answers["09"] = {"steady": {"Run": settled(c.c09, None, {})}}
    answers["10"] = {"steady": {"Run": settled(c.c10, None, {})}}
    answers["11"] = {"steady": {"Run": lines()(nu)}}
    answers["12"] = {
        "steady": {
            "Up": settled(c.c12, True, {"p": 4.0, "a": 3.9, "b": 0.05, "f": 3.7, "c": 3.6}, v=0.08),
            "Down": settled(c.c12, False, {"p": 12.5, "a": 0.01, "b": 12.5, "f": 5.0, "c": 8.0}, x=0.25, v=-0.027),
        },
        "runs": chain(c.c12, [(True, "x-0.25", 20, {}), (False, "0.05-x", 30, {})]),
    }
    json.dump(answers, sys.stdout, indent=1)


if __name__ == "__main__":
    main()
