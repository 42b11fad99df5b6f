"""The reference circuits as equations. Each function returns what the program must give for the text of the same name in circuits/."""

from laws import BAR, LPM, area, k_of
from model import Model

MASS = 1e-3  # t: small enough that inertia does not show, large enough to be an equation of motion
G = 9.80665
NET = 0.2  # L of a net whose pipe sizes are not declared (definition of the notation)


def shift(closes, opens, takes=0.05):
    """Closed crossover: old paths close in the first half of `takes`, new ones open in the second."""
    h = takes / 2
    return {closes: f"clamp(1-time/{h})", opens: f"clamp((time-{h})/{h})"}


def chamber(p, a, x, stroke):
    """dp/dt per flow into a cylinder chamber: stiffness over net + 5 % dead + swept volume."""
    return f"stf({p})/({NET}+{0.05 * a * stroke}+{a}*({x}))"


def net(p):
    return f"stf({p})/{NET}"


def pump_flow(cm3, rpm=1450, volumetric=0.92, rated=210):
    q = cm3 * rpm / 1000 * LPM
    return q, (1 - volumetric) * q / (rated * BAR)


def valve(k, a_phase, p="p", a="a", b="b", t="0"):
    """Flows of a 4/2 valve: position a = P-A, B-T; b = P-B, A-T; both with the steady or running floor `fl`."""
    to_a, to_b = "clamp((time-0.025)/0.025)", "clamp(1-time/0.025)"
    ya, yb = (to_a, to_b) if a_phase else (to_b, to_a)
    return [
        ("ya", ya),
        ("yb", yb),
        ("qpa", f"ya*path({k},{p}-{a})+fl*({p}-{a})"),
        ("qpb", f"yb*path({k},{p}-{b})+fl*({p}-{b})"),
        ("qat", f"yb*path({k},{a}-{t})+fl*({a}-{t})"),
        ("qbt", f"ya*path({k},{b}-{t})+fl*({b}-{t})"),
    ]


STOP = "-1e7*min(x,0)"


def relief_flow(set_bar, override, flow, drop, p="p"):
    k = k_of(flow, drop)
    return f"rel({p},0,{set_bar * BAR},{override},{flow * LPM},{k})+fl*({p})"


def with_floor(build):
    """The model with the steady floor and the one with the running floor."""
    return lambda phase: (build(phase, 1e-6), build(phase, 1e-7))


def c01(_, fl):
    q, g = pump_flow(16)
    kf = k_of(60, 2)
    kr = k_of(40, 5)
    given = [("qr", f"rel(p,t,12,0.1,{40 * LPM},{kr})+fl*(p-t)"), ("qf", f"path({kf},t)")]
    states = [("p", f"{net('p')}*({q}-{g}*p-qr)"), ("t", f"{net('t')}*(qr-qf)")]
    return Model({"fl": fl}, given, states, {"p": 12.5, "t": 0.03})


def c02(_, fl):
    q, g = pump_flow(16)
    a = 3.141592653589793 * 1.2**2 / 4 * 1e-6
    q10 = 0.62 * a * (2 * 1e6 / 870) ** 0.5 * 1000  # L/s at 10 bar, sharp-edged orifice
    ko = k_of(q10 / LPM, 10)
    kn = k_of(20, 5)
    given = [("qr", relief_flow(100, 0.08, 40, 5)), ("qo", f"path({ko},p-m)"), ("qn", f"0.4*path({kn},m)")]
    states = [("p", f"{net('p')}*({q}-{g}*p-qr-qo)"), ("m", f"{net('m')}*(qo-qn)")]
    return Model({"fl": fl}, given, states, {"p": 10.2, "m": 0.3})


def single(q, g, relief, given, k, phase, caps, stroke, force, extra=(), start=None, fl=1e-7, return_side="0", more=()):
    """One cylinder on a 4/2 valve: states p, a, b, x, v and what `more` adds."""
    ac, aa = caps
    states = [
        ("p", f"{net('p')}*({q}-{g}*p-qr-qpa-qpb{''.join(extra)})"),
        ("a", f"{chamber('a', ac, 'x', stroke)}*(qpa-qat-{ac}*v)"),
        ("b", f"{chamber('b', aa, f'{stroke}-x', stroke)}*(qpb-qbt+{aa}*v)"),
        *more,
        ("x", "v"),
        ("v", f"({force})/{MASS}"),
    ]
    return Model({"fl": fl}, [("qr", relief), *valve(k, phase, t=return_side), *given], states, start)


def c03(phase, fl):
    q, g = pump_flow(20)
    ac, aa = area(63), area(63, 36)
    kf = k_of(80, 0.4)
    seal = 0.3 * ac
    load = "6*clamp((x-0.1)*1e7)*clamp((0.2-x)*1e7)"
    force = f"a*{ac}-b*{aa}-dry({seal}+0.5,v)-dry({load},max(v,0))+({STOP})"
    return single(q, g, relief_flow(100, 0.1, 40, 4), [("qf", f"path({kf},t)")], k_of(60, 5), phase, (ac, aa), 0.3, force, start={"p": 10.5, "a": 0.0, "b": 10.5, "t": 0.0, "x": 0.0, "v": 0.0}, fl=fl, return_side="t", more=[("t", f"{net('t')}*(qat+qbt-qf)")])


def c04(phase, fl):
    q, g = pump_flow(20)
    ac, aa = area(50), area(50, 28)
    kr = k_of(6, 6)
    seal = 0.3 * ac
    force = f"a*{ac}-r*{aa}-dry({seal}+0.3,v)-8*max(x,0)/0.2+({STOP})"
    model = single(q, g, relief_flow(80, 0.1, 40, 4), [("qc", f"reg({6 * LPM},0.6,{kr},r-b)")], k_of(60, 4), phase, (ac, aa), 0.2, force, start={"p": 8.5, "a": 0.0, "b": 8.5, "r": 8.5, "x": 0.0, "v": 0.0}, fl=fl, more=[("r", f"{chamber('r', aa, '0.2-x', 0.2)}*({aa}*v-qc)")])
    # the valve's B line is a net of its own behind the flow control
    model = Model(model.parameters, model.given, [(n, f"{net('b')}*(qpb-qbt+qc)" if n == "b" else e) for n, e in model.states], model.start)
    return model


def c05(phase, fl):
    q, g = pump_flow(25, 1450, 0.93, 250)
    ac, aa = area(80), area(80, 56)
    kv, ko = k_of(120, 4), k_of(80, 3)
    seal = 0.3 * ac
    given = [
        ("qr", relief_flow(120, 0.1, 50, 5)),
        ("ya", "clamp((time-0.025)/0.025)"),
        ("yb", "clamp(1-time/0.025)"),
        ("qpa", f"ya*path({kv},p-a)+fl*(p-a)"),
        ("qat", f"yb*path({kv},a)+fl*a"),
        ("qo", f"path({ko},b-a)"),
    ]
    force = f"a*{ac}-b*{aa}-dry({seal}+0.8,v)-dry(5,max(v,0))+({STOP})"
    states = [
        ("p", f"{net('p')}*({q}-{g}*p-qr-qpa)"),
        ("a", f"{chamber('a', ac, 'x', 0.4)}*(qpa-qat+qo-{ac}*v)"),
        ("b", f"{chamber('b', aa, '0.4-x', 0.4)}*({aa}*v-qo)"),
        ("x", "v"),
        ("v", f"({force})/{MASS}"),
    ]
    return Model({"fl": fl}, given, states, {"p": 12.8, "a": 0.0, "b": 0.0, "x": 0.0, "v": 0.0})


def c06(phase, fl, lifted=False):
    """phase: True = valve shifts now; None = valve stands in a."""
    q1, g1 = pump_flow(40, 1450, 0.94, 210)
    q2, g2 = pump_flow(8, 1450, 0.93, 250)
    ac, aa = area(100), area(100, 70)
    seal = 0.3 * ac
    kc, ku = k_of(80, 3, 0.5), k_of(80, 3)
    opening = "clamp((p-3.4)/0.4)" if lifted else "clamp((p-4)/0.4)"
    given = [("qc", f"chk({kc},0.05,low-p)+fl*(low-p)"), ("qu", f"{opening}*path({ku},low)+fl*low")]
    load = "60*clamp((x-0.12)*1e7)"
    force = f"a*{ac}-b*{aa}-dry({seal}+2,v)-dry({load},max(v,0))+({STOP})"
    kv = k_of(100, 5)
    model = single(q2, g2, relief_flow(160, 0.08, 30, 6), given, kv, True, (ac, aa), 0.4, force, extra=["+qc"], start={"p": 16.2, "a": 0.0, "b": 16.2, "low": 0.1, "x": 0.0, "v": 0.0}, fl=fl, more=[("low", f"{net('low')}*({q1}-{g1}*low-qc-qu)")])
    if phase is None:
        model = Model(model.parameters, [(n, "1" if n == "ya" else "0" if n == "yb" else e) for n, e in model.given], model.states, model.start)
    return model


def c07(phase, fl):
    q, g = pump_flow(20)
    ac, aa = area(63), area(63, 36)
    kr, kd = k_of(4, 6), k_of(40, 4)
    seal = 0.3 * ac
    given = [("qc", f"reg({4 * LPM},0.6,{kr},r-b)"), ("qd", f"clamp((0.165-x)/0.015)*path({kd},r-b)+fl*(r-b)")]
    force = f"a*{ac}-r*{aa}-dry({seal}+0.25,v)+({STOP})"
    model = single(q, g, relief_flow(70, 0.1, 40, 4), given, k_of(60, 4), phase is not None, (ac, aa), 0.32, force, start={"p": 7.4, "a": 0.0, "b": 7.4, "r": 7.4, "x": 0.0, "v": 0.0}, fl=fl, more=[("r", f"{chamber('r', aa, '0.32-x', 0.32)}*({aa}*v-qc-qd)")])
    states = [(n, f"{net('b')}*(qpb-qbt+qc+qd)" if n == "b" else e) for n, e in model.states]
    given = [(n, "1" if n == "ya" else "0" if n == "yb" else e) for n, e in model.given] if phase is None else model.given
    return Model(model.parameters, given, states, model.start)


def c08(phase, fl):
    q, g = pump_flow(12, 1450, 0.92, 250)
    ac, aa = area(63), area(63, 36)
    kb = k_of(40, 6)
    kfree = k_of(40, 6, 0.5)
    seal = 0.3 * ac
    weight = 1.5 * G
    # V to C free over 0.5 bar; C to V opens by pC + 3 pX - 4 pV against the setting, band 10 % of it
    given = [("qb", f"clamp((c+3*a-4*b-13)/1.3)*path({kb},max(c-b,0))-chk({kfree},0.05,b-c)+fl*(c-b)")]
    force = f"a*{ac}-c*{aa}+{weight}-dry({seal}+0.5,v)+({STOP})"
    model = single(q, g, relief_flow(150, 0.1, 30, 4), given, k_of(40, 4), phase, (ac, aa), 0.5, force, start={"p": 15.8, "a": 0.0, "b": 15.8, "c": 15.7, "x": 0.0, "v": 0.0}, fl=fl, more=[("c", f"{chamber('c', aa, '0.5-x', 0.5)}*({aa}*v-qb)")])
    return Model(model.parameters, model.given, [(n, f"{net('b')}*(qpb-qbt+qb)" if n == "b" else e) for n, e in model.states], model.start)


def c09(_, fl):
    q, g = pump_flow(10)
    k4 = k_of(20, 4)
    given = [
        ("qr", relief_flow(140, 0.1, 20, 4)),
        ("qs", f"clamp((p-8)/0.8)*path({k4},max(p-s,0))+fl*(p-s)"),
        ("qd", f"clamp((5-m)/0.25)*path({k4},max(p-m,0))+fl*(p-m)"),
        ("q1", f"path({k_of(6, 60)},s)"),
        ("q2", f"path({k_of(5, 45)},m)"),
    ]
    states = [("p", f"{net('p')}*({q}-{g}*p-qr-qs-qd)"), ("s", f"{net('s')}*(qs-q1)"), ("m", f"{net('m')}*(qd-q2)")]
    return Model({"fl": fl}, given, states, {"p": 12.2, "s": 12.1, "m": 4.98})


def c10(_, fl):
    """Motor 200 cm3/rev behind a 10:1 gear; w = speed at the gear, rad/s; leakage half A-B, half to the drain."""
    q, g = pump_flow(28, 1450, 0.92, 250)
    kv = k_of(60, 5)
    per_rad = 0.2 / 6.283185307179586 * 10  # L per rad at the gear
    leak = (1 / 0.94 - 1) * (200 * 400 / 1000 * LPM) / 25  # L/s/MPa
    given = [
        ("qr", relief_flow(150, 0.1, 60, 5)),
        ("qpa", f"path({kv},p-a)+fl*(p-a)"),
        ("qpb", "fl*(p-b)"),
        ("qat", "fl*a"),
        ("qbt", f"path({kv},b)+fl*b"),
        ("qab", f"{leak / 2}*(a-b)"),
        ("qal", f"{leak / 2}*max(a,b)"),
    ]
    states = [
        ("p", f"{net('p')}*({q}-{g}*p-qr-qpa-qpb)"),
        ("a", f"{net('a')}*(qpa-qat-qab-qal-{per_rad}*w)"),
        ("b", f"{net('b')}*(qpb+{per_rad}*w+qab-qbt)"),
        ("w", f"(0.9*(a-b)*{per_rad}-0.9)/{MASS}"),
    ]
    return Model({"fl": fl}, given, states, {"p": 3.58, "a": 3.36, "b": 0.22, "w": 2.0})


def c12(phase, fl):
    q, g = pump_flow(12, 1450, 0.92, 250)
    ac, aa = area(63), area(63, 45)
    seal = 0.3 * ac
    kp, kfree, kr = k_of(40, 4), k_of(40, 4, 1.0), k_of(5, 6)
    weight = 0.8 * G
    # f = line between flow control and pilot-operated check; X = b, band 5 bar
    given = [
        ("qc", f"clamp((4*(b-f)-(c-f)-0.1)/0.5)*path({kp},max(c-f,0))-chk({kfree},0.1,f-c)+fl*(c-f)"),
        ("qm", f"reg({5 * LPM},0.6,{kr},f-a)"),
    ]
    force = f"c*{ac}-b*{aa}-{weight}-dry({seal}+0.4,v)+({STOP})"
    model = single(q, g, relief_flow(120, 0.1, 30, 4), given, k_of(40, 4), phase, (ac, aa), 0.4, force, start={"p": 12.9, "a": 0.0, "b": 12.9, "f": 0.0, "c": 0.0, "x": 0.0, "v": 0.0}, fl=fl, more=[("f", f"{net('f')}*(qc-qm)"), ("c", f"{chamber('c', ac, 'x', 0.4)}*(-{ac}*v-qc)")])
    return Model(model.parameters, model.given, [(n, f"{net('a')}*(qpa-qat+qm)" if n == "a" else e) for n, e in model.states], model.start)
