"""The reference circuits as equations, one function for each text in circuits/. `fl` is the leakage floor in force (steady or running).

phase of a valve: True = it begins to shift to a at time 0, False = to b, None = it stands in a.
"""

import math

from laws import BAR, DENSITY, LPM, area, k_of
from model import Model

G = 9.80665
NET = 0.2  # L of a net whose pipe sizes are not declared (definition of the notation)
SEAL = 0.3  # MPa on the bore area, friction of seals (definition of the notation)


def chamber(p, a, x, stroke):
    """dp/dt per flow into a cylinder chamber: stiffness over net + 5 % dead + swept volume."""
    return f"stf({p})/({NET}+{0.05 * a * stroke}+{a}*({x}))"


def net(p):
    return f"stf({p})/{NET}"


def pump_flow(cm3, rpm=1450, volumetric=0.92, rated=210):
    """Flow at no pressure and leak per pressure, the floor from P to S in the leak's expression."""
    q = cm3 * rpm / 1000 * LPM
    return q, (1 - volumetric) * q / (rated * BAR)


def shift(phase):
    """Openings of positions a and b: closed crossover, old paths close in the first half of 50 ms, new ones open in the second."""
    if phase is None:
        return [("ya", "1"), ("yb", "0")]
    opens, closes = "clamp((time-0.025)/0.025)", "clamp(1-time/0.025)"
    return [("ya", opens), ("yb", closes)] if phase else [("ya", closes), ("yb", opens)]


def valve(k, phase, p="p", a="a", b="b", t="0"):
    """Flows of a 4/2 valve: position a = P-A, B-T; b = P-B, A-T."""
    return [
        *shift(phase),
        ("qpa", f"ya*path({k},{p}-{a})+fl*({p}-{a})"),
        ("qpb", f"yb*path({k},{p}-{b})+fl*({p}-{b})"),
        ("qat", f"yb*path({k},{a}-{t})+fl*({a}-{t})"),
        ("qbt", f"ya*path({k},{b}-{t})+fl*({b}-{t})"),
    ]


def relief_flow(set_bar, override, flow, drop, p="p", t="0"):
    k = k_of(flow, drop)
    return f"rel({p},{t},{set_bar * BAR},{override},{flow * LPM},{k})+fl*({p}-{t})"


def c01(_, fl):
    q, g = pump_flow(16)
    given = [("qr", relief_flow(120, 0.1, 40, 5, t="t")), ("qf", f"path({k_of(60, 2)},t)+fl*t")]
    states = [("p", f"{net('p')}*({q}-{g}*p-fl*p-qr)"), ("t", f"{net('t')}*(qr-qf)")]
    return Model({"fl": fl}, given, states, {"p": 12.5, "t": 0.03})


def c02(_, fl):
    q, g = pump_flow(16)
    # sharp-edged orifice, Cd 0.62, as a path through its flow at 10 bar
    at_10 = 0.62 * math.pi * 1.2e-3**2 / 4 * math.sqrt(2 * 1e6 / DENSITY) * 1000
    given = [
        ("qr", relief_flow(100, 0.08, 40, 5)),
        ("qo", f"path({k_of(at_10 / LPM, 10)},p-m)+fl*(p-m)"),
        ("qn", f"0.4*path({k_of(20, 5)},m)+fl*m"),
    ]
    states = [("p", f"{net('p')}*({q}-{g}*p-fl*p-qr-qo)"), ("m", f"{net('m')}*(qo-qn)")]
    return Model({"fl": fl}, given, states, {"p": 10.2, "m": 0.3})


def cylinder(pump, relief, areas, stroke, forces, k, phase, fl, start, given=(), nets=(), chambers=("a", "b"), inflow="", lines=None, t="0"):
    """One cylinder on a 4/2 valve.

    pump: flow and leak; forces: (beside pressures, friction of the load, resisting load outward); start: a first guess of REST;
    inflow: more flow into the pump net; nets: further states; chambers: names of the pressures at the cap and the rod side;
    lines: flow from elsewhere into the valve's A or B line where it is a net of its own; given comes after the valve's flows.
    """
    q, g = pump
    cap, rod = areas
    c, r = chambers
    beside, dry, out = forces
    lines = lines or {}

    def side(name, own, swept, moves):
        """A valve line that is the chamber's own net, or a net of its own."""
        if chambers[0 if name == "a" else 1] == name:
            return (name, f"{chamber(name, own, swept, stroke)}*({ports[name]}{moves})")
        return (name, f"{net(name)}*({ports[name]}+{lines[name]})")

    ports = {"a": "qpa-qat", "b": "qpb-qbt"}
    states = [
        ("p", f"{net('p')}*({q}-{g}*p-fl*p-qr-qpa-qpb{inflow})"),
        side("a", cap, "x", f"-{cap}*v"),
        side("b", rod, f"{stroke}-x", f"+{rod}*v"),
        *nets,
        ("x", "v"),
    ]
    body = (f"{c}*{cap}-{r}*{rod}{beside}", f"{SEAL * cap + dry}", out, cap + rod, 1)
    return Model({"fl": fl}, [("qr", relief), *valve(k, phase, t=t), *given], states, start | {"a": 0.0, "x": 0.0}, body)


def c03(phase, fl, load=0):
    """load: kN against the rod going out, in force from 100 mm to 200 mm."""
    return cylinder(
        pump_flow(20), relief_flow(100, 0.1, 40, 4), (area(63), area(63, 36)), 0.3,
        ("", 0.5, f"{load}"), k_of(60, 5), phase, fl, {"p": 10.7, "b": 10.7, "t": 0.0},
        [("qf", f"path({k_of(80, 0.4)},t)+fl*t")], [("t", f"{net('t')}*(qat+qbt-qf)")], t="t",
    )  # fmt: skip


def c04(phase, fl):
    rod = area(50, 28)
    return cylinder(
        pump_flow(20), relief_flow(80, 0.1, 40, 4), (area(50), rod), 0.2,
        ("-40*max(x,0)", 0.3, "0"), k_of(60, 4), phase, fl, {"p": 8.5, "b": 8.5, "r": 8.5},
        [("qc", f"reg({6 * LPM},{k_of(6, 6)},r-b)+fl*(r-b)")], [("r", f"{chamber('r', rod, '0.2-x', 0.2)}*({rod}*v-qc)")],
        ("a", "r"), lines={"b": "qc"},
    )  # fmt: skip


def c05(phase, fl):
    q, g = pump_flow(25, 1450, 0.93, 250)
    cap, rod = area(80), area(80, 56)
    kv = k_of(120, 4)
    given = [
        ("qr", relief_flow(120, 0.1, 50, 5)),
        *shift(phase),
        ("qpa", f"ya*path({kv},p-a)+fl*(p-a)"),
        ("qat", f"yb*path({kv},a)+fl*a"),
        ("qo", f"path({k_of(80, 3)},b-a)+fl*(b-a)"),
    ]
    states = [
        ("p", f"{net('p')}*({q}-{g}*p-fl*p-qr-qpa)"),
        ("a", f"{chamber('a', cap, 'x', 0.4)}*(qpa-qat+qo-{cap}*v)"),
        ("b", f"{chamber('b', rod, '0.4-x', 0.4)}*({rod}*v-qo)"),
        ("x", "v"),
    ]
    body = (f"a*{cap}-b*{rod}", f"{SEAL * cap + 0.8}", "5", cap + rod, 1)
    return Model({"fl": fl}, given, states, {"p": 12.8, "a": 0.0, "b": 0.0, "x": 0.0}, body)


def c06(phase, fl, lifted=False, load=0):
    """load: kN against the rod going out, in force from 120 mm on; lifted: the unloading valve opens from its closing pressure on; else from its setting."""
    q1, g1 = pump_flow(40, 1450, 0.94, 210)
    opening = "clamp((p-3.4)/0.4)" if lifted else "clamp((p-4)/0.4)"
    given = [
        ("qc", f"chk({k_of(80, 3, 0.5)},0.05,low-p)+fl*(low-p)"),
        ("qu", f"{opening}*path({k_of(80, 3)},low)"),
    ]
    return cylinder(
        pump_flow(8, 1450, 0.93, 250), relief_flow(160, 0.08, 30, 6), (area(100), area(100, 70)), 0.4,
        ("", 2, f"{load}"), k_of(100, 5), phase, fl, {"p": 16.4, "b": 16.4, "low": 0.16},
        given, [("low", f"{net('low')}*({q1}-{g1}*low-fl*low-qc-qu)")], inflow="+qc",
    )  # fmt: skip


def c07(phase, fl):
    rod = area(63, 36)
    given = [
        ("qc", f"reg({4 * LPM},{k_of(4, 6)},r-b)+fl*(r-b)"),
        ("qd", f"clamp((0.165-x)/0.015)*path({k_of(40, 4)},r-b)+fl*(r-b)"),
    ]
    return cylinder(
        pump_flow(20), relief_flow(70, 0.1, 40, 4), (area(63), rod), 0.32,
        ("", 0.25, "0"), k_of(60, 4), phase, fl, {"p": 7.5, "b": 7.5, "r": 7.5},
        given, [("r", f"{chamber('r', rod, '0.32-x', 0.32)}*({rod}*v-qc-qd)")], ("a", "r"), lines={"b": "qc+qd"},
    )  # fmt: skip


def c08(phase, fl):
    rod = area(63, 36)
    # V to C free over 0.5 bar; C to V opens by pC + 3 pX - 4 pV against the setting, band 10 % of it
    given = [("qb", f"clamp((c+3*a-4*b-13)/1.3)*path({k_of(40, 6)},pos(c-b))-chk({k_of(40, 6, 0.5)},0.05,b-c)+fl*(c-b)")]
    return cylinder(
        pump_flow(12, 1450, 0.92, 250), relief_flow(150, 0.1, 30, 4), (area(63), rod), 0.5,
        (f"+{1.5 * G}", 0.5, "0"), k_of(40, 4), phase, fl, {"p": 15.8, "b": 15.8, "c": 15.8},
        given, [("c", f"{chamber('c', rod, '0.5-x', 0.5)}*({rod}*v-qb)")], ("a", "c"), lines={"b": "qb"},
    )  # fmt: skip


def c09(_, fl):
    q, g = pump_flow(10)
    k = k_of(20, 4)
    given = [
        ("qr", relief_flow(140, 0.1, 20, 4)),
        ("qs", f"clamp((p-8)/0.8)*path({k},pos(p-s))"),
        ("qd", f"clamp((5-m)/0.25)*path({k},pos(p-m))"),
        ("q1", f"path({k_of(6, 60)},s)+fl*s"),
        ("q2", f"path({k_of(5, 45)},m)+fl*m"),
    ]
    states = [("p", f"{net('p')}*({q}-{g}*p-fl*p-qr-qs-qd)"), ("s", f"{net('s')}*(qs-q1)"), ("m", f"{net('m')}*(qd-q2)")]
    return Model({"fl": fl}, given, states, {"p": 12.2, "s": 12.1, "m": 4.98})


def c10(phase, fl):
    """Motor 200 cm3/rev behind a 10:1 gear; v = speed at the gear, rad/s; leakage half A-B, half from the higher port (h) to the drain.

    Mechanical efficiency: friction is a tenth of the pressure's torque. NO_LOSS of the way to the drain: 600 L/min at 0.1 bar.
    """
    q, g = pump_flow(28, 1450, 0.92, 250)
    per_rad = 0.2 / (2 * math.pi) * 10  # L per rad at the gear
    leak = (1 / 0.94 - 1) * (200 * 400 / 1000 * LPM) / 25  # L/s/MPa
    given = [
        ("qr", relief_flow(150, 0.1, 60, 5)),
        *valve(k_of(60, 5), phase),
        # floors: across the leak, and across the valve that finds the higher port
        ("qab", f"({leak / 2}+2*fl)*(a-b)"),
        ("qah", f"path({k_of(600, 0.1)},pos(a-h))+fl*(a-h)"),
        ("qhl", f"({leak / 2}+fl)*h"),
    ]
    states = [
        ("p", f"{net('p')}*({q}-{g}*p-fl*p-qr-qpa-qpb)"),
        ("a", f"{net('a')}*(qpa-qat-qab-qah-{per_rad}*v)"),
        ("b", f"{net('b')}*(qpb+{per_rad}*v+qab-qbt)"),
        ("h", f"{net('h')}*(qah-qhl)"),
        ("x", "v"),
    ]
    return Model({"fl": fl}, given, states, {"p": 3.58, "a": 3.36, "b": 0.22, "h": 3.36, "x": 0.0}, (f"0.9*(a-b)*{per_rad}", "0", "0.9", 2 * per_rad, 1000))


def c12(phase, fl):
    cap = area(63)
    # f = line between flow control and pilot-operated check; X = b, band 5 bar
    given = [
        ("qc", f"clamp((4*(b-f)-(c-f)-0.1)/0.5)*path({k_of(40, 4)},pos(c-f))-chk({k_of(40, 4, 1.0)},0.1,f-c)+fl*(c-f)"),
        ("qm", f"reg({5 * LPM},{k_of(5, 6)},f-a)+fl*(f-a)"),
    ]
    nets = [("f", f"{net('f')}*(qc-qm)"), ("c", f"{chamber('c', cap, 'x', 0.4)}*(-{cap}*v-qc)")]
    return cylinder(
        pump_flow(12, 1450, 0.92, 250), relief_flow(120, 0.1, 30, 4), (cap, area(63, 45)), 0.4,
        (f"-{0.8 * G}", 0.4, "0"), k_of(40, 4), phase, fl, {"p": 12.7, "b": 12.7, "f": 0.0, "c": 0.0},
        given, nets, ("c", "b"), lines={"a": "qm"},
    )  # fmt: skip
