"""Kinematic viscosity of an oil of ISO 3448 grade 46 and index 95 at a temperature, from the standards alone.

Rows of the table of ASTM D2270 (ISO 2909) about the answer: Y at 100 degC, L and H at 40 degC, mm2/s.
"""

import math

ROWS = [(6.4, 65.18, 42.14), (6.5, 67.12, 43.18), (6.6, 69.16, 44.24), (6.7, 71.29, 45.33), (6.8, 73.48, 46.44)]


def at_100(nu40, index):
    """The Y at which index = 100 (L - nu40)/(L - H), L and H linear between rows: solved segment by segment."""
    for (y0, l0, h0), (y1, l1, h1) in zip(ROWS, ROWS[1:]):
        excess0 = l0 - index / 100 * (l0 - h0) - nu40
        excess1 = l1 - index / 100 * (l1 - h1) - nu40
        if excess0 <= 0 <= excess1:
            return y0 + (y1 - y0) * -excess0 / (excess1 - excess0)
    raise ValueError("outside the rows copied here")


def nu(celsius, nu40=46.0, index=95.0):
    """m2/s by ASTM D341: log10 log10 (nu + 0.7) = a - b log10 T through 40 and 100 degC."""

    def w(value):
        return math.log10(math.log10(value + 0.7))

    def t(c):
        return math.log10(c + 273.15)

    low, high = w(nu40), w(at_100(nu40, index))
    share = (t(celsius) - t(40)) / (t(100) - t(40))
    return (10 ** (10 ** (low + (high - low) * share)) - 0.7) * 1e-6
