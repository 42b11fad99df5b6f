"""Constants and laws of hydraulic elements from the published formulas and the notation's definitions.

Units, mutually consistent: MPa, L/s, 1e-3 m2, kN, m, s (so that kN = MPa x 1e-3 m2 and L/s = 1e-3 m2 x m/s).
Nothing here is taken from the program under test.
"""

import math

BAR = 0.1  # MPa
LPM = 1 / 60  # L/s
DELTA = 0.01  # MPa, laminar blend of a path (definition of the notation: 0.1 bar)
FLOOR = 1e-6  # L/s/MPa across closable elements in steady solutions (definition)
FLOOR_TIME = 1e-7  # the same in runs
DENSITY = 870.0  # kg/m3


def k_of(flow, drop, crack=0.0):
    """K of a path through a declared point (L/min, bar)."""
    q, d = flow * LPM, (drop - crack) * BAR
    return q * (d * d + DELTA * DELTA) ** 0.25 / d


def path(k, d):
    return k * d / (d * d + DELTA * DELTA) ** 0.25


def area(bore_mm, rod_mm=0.0):
    return math.pi * (bore_mm**2 - rod_mm**2) / 4 / 1000  # 1e-3 m2


def churchill(re, roughness):
    """Darcy friction factor for all regimes (Churchill, Chemical Engineering, 7 Nov 1977)."""
    a = (2.457 * math.log(1 / ((7 / re) ** 0.9 + 0.27 * roughness))) ** 16
    b = (37530 / re) ** 16
    return 8 * ((8 / re) ** 12 + (a + b) ** -1.5) ** (1 / 12)
