"""Solves every reference circuit with SciPy and, where there is a run, with ngspice; prints one JSON object.

{circuit: {step: {pressures: {net: MPa}, speeds: {actuator: m/s or rad/s}, runs: [{by, time (s from the start of the step), pressures}]}}}
Nets and actuators have the names that the program gives them. Usage: reference.py [--stored | --steady] [--no-ngspice] [--rtol 1e-7] [circuit ...]
--stored: steady points only, as tests/reference/equations.json keeps them.
"""

import json
import sys
import time

from scipy.optimize import root

import circuits as c
from laws import DENSITY, FLOOR, FLOOR_TIME, LPM, churchill, k_of, path
from viscosity import nu

NETS = {
    "01": {"p": "P1.P", "t": "RV1.T"},
    "02": {"p": "P1.P", "m": "mid"},
    "03": {"p": "P1.P", "a": "V1.A", "b": "V1.B", "t": "V1.T"},
    "04": {"p": "P1.P", "a": "V1.A", "r": "C1.rod", "b": "FC1.out"},
    "05": {"p": "P1.P", "a": "head", "b": "C1.rod"},
    "06": {"p": "pressure", "a": "V1.A", "b": "V1.B", "low": "low"},
    "07": {"p": "P1.P", "a": "V1.A", "r": "C1.rod", "b": "FC1.out"},
    "08": {"p": "P1.P", "a": "V1.A", "b": "V1.B", "c": "CB1.C"},
    "09": {"p": "P1.P", "s": "second", "m": "reduced"},
    "10": {"p": "P1.P", "a": "V1.A", "b": "V1.B"},
    "11": {"p": "P1.P", "i": "N1.in", "o": "N1.out"},
    "12": {"p": "P1.P", "a": "V1.A", "b": "V1.B", "f": "FC1.in", "c": "PC1.C"},
}

# circuit: (equations, [(step, phase, first guess of pressures and speed, parts, longest time)]). A part is what ends it, and what the
# equations are told; where a load range begins or ends another part does, so that no steep edge has to be integrated.
STEPS = {
    "01": (c.c01, [("Run", None, {}, [], 0)]),
    "02": (c.c02, [("Run", None, {}, [], 0)]),
    "03": (
        c.c03,
        [
            ("Out", True, {"p": 0.6, "a": 0.5, "b": 0.06, "t": 0.005, "v": 0.15}, [("x-0.1", {}), ("x-0.2", {"load": 6}), ("x-0.25", {})], 5),
            ("Back", False, {"p": 1.2, "a": 0.27, "b": 1.08, "t": 0.014, "v": -0.23}, [("0.02-x", {})], 5),
        ],
    ),
    "04": (c.c04, [("Out", True, {"p": 8.4, "a": 8.37, "r": 11.5, "b": 0.01, "v": 0.07}, [("x-0.15", {})], 6)]),
    "05": (c.c05, [("Out", True, {"p": 3.07, "a": 3.04, "b": 3.1, "v": 0.24}, [("x-0.3", {})], 5)]),
    "06": (
        c.c06,
        [
            ("Fast", True, {"p": 0.83, "a": 0.59, "b": 0.06, "low": 1.0, "v": 0.147}, [("x-0.1", {"lifted": True})], 5),
            ("Slow", None, {"p": 0.83, "a": 0.59, "b": 0.06, "low": 1.0, "v": 0.147}, [("x-0.12", {}), ("x-0.18", {"load": 60})], 10),
        ],
    ),
    "07": (
        c.c07,
        [
            ("Rapid", True, {"p": 0.56, "a": 0.46, "r": 0.12, "b": 0.04, "v": 0.155}, [("x-0.14", {})], 5),
            ("Feed", None, {"p": 0.56, "a": 0.46, "r": 0.12, "b": 0.04, "v": 0.155}, [("x-0.22", {})], 20),
        ],
    ),
    "08": (c.c08, [("Down", True, {"p": 1.62, "a": 1.54, "b": 0.035, "c": 8.6, "v": 0.09}, [("x-0.3", {})], 10)]),
    "09": (c.c09, [("Run", None, {}, [], 0)]),
    "10": (c.c10, [("Run", None, {"v": 2.0}, [], 0)]),
    "12": (
        c.c12,
        [
            ("Up", True, {"p": 10.0, "a": 9.9, "b": 0.02, "f": 3.1, "c": 2.95, "v": 0.09}, [("x-0.25", {})], 20),
            ("Down", False, {"p": 12.5, "a": 0.01, "b": 12.5, "f": 8.2, "c": 8.25, "v": -0.027}, [("0.05-x", {})], 30),
        ],
    ),
}


def named(circuit, values):
    return {name: values[own] for own, name in NETS[circuit].items()}


def lines():
    """Tube (roughness 1.5 um, six bends of 0.75 each) and hose (20 um): losses by Churchill's friction factor."""

    def loss(q, bore, length, rough, bends):  # L/s -> MPa
        v = q / 1000 / (c.math.pi * bore**2 / 4)
        return (churchill(v * bore / nu(45), rough / bore) * length / bore + 0.75 * bends) * DENSITY * v * v / 2 / 1e6

    q, g = c.pump_flow(25)
    kr, kn = k_of(50, 5), k_of(40, 20)

    def residual(y):
        p, i, o = y
        ql = path(kn, i - o) + FLOOR * (i - o)
        relief = max(0.0, min(50 * LPM * (p - 12) / 1.2, path(kr, p))) + FLOOR * p
        return [q - (g + FLOOR) * p - relief - ql, p - i - loss(ql, 0.010, 12, 1.5e-6, 6), o - loss(ql, 0.016, 4, 2e-5, 0)]

    return dict(zip("pio", map(float, root(residual, [2.7, 1.65, 0.05], tol=1e-14).x)))


def place(event):
    """The position at which an event fires: `x-0.25` or `0.02-x`."""
    return float(event.replace("x", "").strip("-"))


def solved(circuit, solvers, rtol):
    if circuit == "11":
        return {"Run": {"pressures": named(circuit, lines()), "speeds": {}, "runs": []}}
    build, steps = STEPS[circuit]
    actuator = "HM1" if circuit == "10" else "C1"
    # REST: the valve sprung to b, the rod at its retracted stop
    runs = any(parts for _, _, _, parts, _ in steps)
    rest = build(False, FLOOR, **steps[0][3][0][1]).steady({}) if runs else {"x": 0.0}
    at = {by: rest for by in solvers}
    answer, x = {}, 0.0
    for step, phase, guess, parts, longest in steps:
        found = build(phase, FLOOR, **(parts[0][1] if parts else {})).steady(guess, x, guess.get("v"))
        answer[step] = {"pressures": named(circuit, found), "speeds": {actuator: found["v"]} if "v" in found else {}, "runs": []}
        for by in solvers if parts else []:
            begun, total = time.time(), 0.0
            for k, (event, more) in enumerate(parts):
                # the valve has long shifted when a load range begins
                model = build(phase if k == 0 else None, FLOOR_TIME, **more)
                if by == "scipy":
                    spent, at[by] = model.scipy_run(at[by], longest, event, rtol)
                else:
                    spent, at[by] = model.ngspice_run(at[by], longest, event)
                total += spent
            print(f"{circuit} {step} {by}: {time.time() - begun:.1f} s", file=sys.stderr)
            answer[step]["runs"].append({"by": by, "time": total, "pressures": named(circuit, at[by])})
        # the next step begins where this one ends
        x = place(parts[-1][0]) if parts else 0.0
    return answer


def main():
    words = sys.argv[1:]
    rtol = float(words[words.index("--rtol") + 1]) if "--rtol" in words else 1e-7
    stored = "--stored" in words
    solvers = [] if stored or "--steady" in words else ["scipy"] if "--no-ngspice" in words else ["scipy", "ngspice"]
    answers = {n: solved(n, solvers, rtol) for n in NETS if n in words or not any(n in words for n in NETS)}
    if stored:
        answers = {
            "produced": "by root of SciPy: python3 tests/slow/reference/reference.py --stored > tests/reference/equations.json",
            "units": "pressures MPa gauge, speeds m/s (motor rad/s)",
            "circuits": {n: {k: {"pressures": s["pressures"], "speeds": s["speeds"]} for k, s in steps.items()} for n, steps in answers.items()},
        }
    json.dump(answers, sys.stdout, indent=2)
    print()


if __name__ == "__main__":
    main()
