"""Laws of hydraulic elements and a plain integrator on SciPy, written from the published formulas and the notation's definitions.

Units, mutually consistent: MPa, L/s, 1e-3 m2, kN, m, s, t (so that kN = MPa x 1e-3 m2 and L/s = 1e-3 m2 x m/s).
Nothing here is taken from the program under test: a network is a list of functions, solved with scipy.optimize and scipy.integrate.
"""

import math

import numpy as np
from scipy.integrate import solve_ivp
from scipy.optimize import root

BAR = 0.1  # MPa
LPM = 1 / 60  # L/s
DELTA = 0.01  # MPa, laminar blend of a path (definition of the notation: 0.1 bar)
FLOOR = 1e-6  # L/s/MPa across closable elements in steady solutions
FLOOR_TIME = 1e-7
ATM = 0.101325
CREEP = 1e-5  # m/s, scale of Coulomb friction


def k_of(flow, drop, crack=0.0):
    """K of a path through a declared point (L/min, bar)."""
    q, d = flow * LPM, (drop - crack) * BAR
    return q * (d * d + DELTA * DELTA) ** 0.25 / d


def path(k, d, y=1.0):
    return y * k * d / (d * d + DELTA * DELTA) ** 0.25


def check(k, crack, d):
    """Check law: path on (d - crack MPa) when positive."""
    z = d - crack
    return path(k, z) if z > 0 else 0.0


def clamp(z):
    return 0.0 if z < 0 else 1.0 if z > 1 else z


def relief(pp, pt, set_bar, override, flow, drop):
    """Opening at set + back pressure, set + override at the flow of `passes`; the open body is the floor."""
    pe = set_bar * BAR
    linear = flow * LPM * (pp - pe - pt) / max(override * pe, 0.05)
    body = path(k_of(flow, drop), pp - pt)
    return max(0.0, min(linear, body))


def regulator(set_lpm, needs_bar, d):
    """Compensated flow control: the setting, or below `needs` an orifice."""
    q = set_lpm * LPM
    if d <= 0:
        return path(k_of(set_lpm, needs_bar), d)
    return min(q, q * math.sqrt(d / (needs_bar * BAR)))


def pump(cm3, rpm, volumetric, rated_bar, p):
    qth = cm3 * rpm / 1000 * LPM
    return qth - (1 - volumetric) * qth / (rated_bar * BAR) * p


def area(bore_mm, rod_mm=0.0):
    return math.pi * (bore_mm**2 - rod_mm**2) / 4 / 1000  # 1e-3 m2


def coulomb(force, v):
    return force * v / math.sqrt(v * v + CREEP * CREEP)


def stiffness(p, bulk_bar=14000.0, air=0.005, n=1.4):
    """Effective bulk modulus of oil with free air at gauge pressure p (MPa): gas and oil shares compressed from 1 atm, secant as declared."""
    k = bulk_bar * BAR
    pa = max(p + ATM, 0.02)
    gas = air * (ATM / pa) ** (1 / n)
    oil = (1 - air) * math.exp(-(pa - ATM) / k)
    return (gas + oil) / (gas / (n * pa) + oil / k)


def steady(residual, start):
    """Solves residual(y) = 0 to machine accuracy, from a start near the answer."""
    best = None
    for method in ("hybr", "lm"):
        answer = root(residual, start, method=method, options={"xtol": 1e-14} if method == "hybr" else {"xtol": 1e-15, "ftol": 1e-15})
        worst = float(np.max(np.abs(residual(answer.x))))
        if best is None or worst < best[0]:
            best = (worst, answer.x)
    if best[0] > 1e-8:
        raise RuntimeError(f"reference did not converge: residual {best[0]:.2e}")
    return best[1]


def run(rate, y0, t0, t1, events=(), rtol=1e-9, atol=1e-11, max_step=np.inf):
    """Integrates with Radau; events are functions of (t, y) that end the run when they rise through zero."""
    for e in events:
        e.terminal = True
        e.direction = 1
    answer = solve_ivp(rate, (t0, t1), y0, method="Radau", rtol=rtol, atol=atol, events=list(events), max_step=max_step)
    if not answer.success:
        raise RuntimeError(answer.message)
    return answer.t[-1], answer.y[:, -1]
