"""One set of equations, solved twice by general-purpose software: SciPy (root, Radau) and ngspice (transient).

A model is a list of named expressions over parameters, states and `time`, in the arithmetic that Python and ngspice share.
Each state is a capacitor of 1 F fed with its rate in ngspice.

A moving body has no inertia: its forces balance at every instant. In steady points its speed `v` is an unknown and friction has the
notation's slope at rest (creep 1e-5 m/s). In runs a balance with so steep a friction is as stiff as a rigid stop and, with a small mass
instead, rings undamped at some 1 kHz and more; so there the speed follows from the force beyond friction through a film of SLIP
kN s/m: v = (force - friction)/SLIP. The film costs SLIP x v = 1.5e-4 kN at 0.15 m/s, 0.5 Pa x 1e2 on the areas here: under 1e-4 MPa.
"""

import math
import re
import subprocess
import tempfile
from pathlib import Path

import numpy as np
from scipy.integrate import solve_ivp
from scipy.optimize import root

SLIP = 1e-3

FUNCTIONS = {
    "path": ("k,d", "(k)*(d)/pow((d)*(d)+1e-4,0.25)"),
    "pos": ("z", "max(0,z)"),
    "chk": ("k,c,d", "path(k,pos((d)-(c)))"),
    "rel": ("pp,pt,set,ovr,q,k", "pos(min((q)*((pp)-(set)-(pt))/max((ovr)*(set),0.05),path(k,(pp)-(pt))))"),
    # a compensated control is an orifice through its point of least drop, and constant above
    "reg": ("q,k,d", "min(q,path(k,d))"),
    "clamp": ("z", "max(0,min(1,z))"),
    "slide": ("f,out,in", "(pos((f)-(out))-pos(0-(f)-(in)))*1000"),
    # effective stiffness of oil with 0.5 % free air (n 1.4), bulk 1400 MPa
    "pabs": ("p", "max((p)+0.101325,0.02)"),
    "gas": ("p", "0.005*pow(0.101325/pabs(p),1/1.4)"),
    "oil": ("p", "0.995*exp(-(pabs(p)-0.101325)/1400)"),
    "stf": ("p", "(gas(p)+oil(p))/(gas(p)/(1.4*pabs(p))+oil(p)/1400)"),
}


def _python(text):
    return re.sub(r"\bin\b", "back", text)


def _namespace():
    space = {"pow": math.pow, "sqrt": math.sqrt, "exp": math.exp, "min": min, "max": max}
    for name, (arguments, body) in FUNCTIONS.items():
        space[name] = eval(f"lambda {_python(arguments)}: {_python(body)}", space)
    return space


class Model:
    def __init__(self, parameters, given, states, start, body=None):
        """parameters: name -> number; given: [(name, expression)] in order; states: [(name, rate expression)]; start: name -> value.

        body of the one body that moves at v along the state x: force without friction, friction both ways, more of it outward, sum of its
        faces (1e-3 m2), full speed (m/s, rad/s).
        """
        self.parameters, self.given, self.states, self.start, self.body = parameters, given, states, dict(start), body
        self.names = [n for n, _ in states]
        force, dry, out, faces, full = body or ("0", "0", "0", 0, 1)
        # Losses in the ports of a body (definition of the program): 0.0001 bar at full speed, growing with the square, and a hundredth of
        # a millibar in proportion to it, on all faces. Some 1e-7 MPa: seen by the comparison of steady points only.
        ports = f"{faces}*(1e-6+1e-5*max(v,-v)/{full * full})"
        lines = [f"  {n} = {e}" for n, e in given]
        rates = ", ".join(e for _, e in states)
        names = ", ".join(self.names)
        # At the retracted stop nothing moves a rod inward.
        self.speed = f"slide({force},({dry})+({out}),({dry})+1e6*clamp(1-1e6*x))"
        slide = [f"  v = {self.speed}"] if body else []
        source = [
            "def rate(time, y):",
            f"  {names}, = y",
            *slide,
            *lines,
            f"  return [{rates}]",
            "def balance(time, y, v):",
            f"  {names}, = y",
            *lines,
            f"  return [{rates}], ({force}) - ({dry})*v/sqrt(v*v+1e-10) - (({out}) if v > 0 else 0) - ({ports})*v",
        ]
        space = _namespace() | parameters
        exec("\n".join(source), space)
        self.rate, self.balance, self.space = space["rate"], space["balance"], space

    def steady(self, guess, x=0.0, v=None):
        """Rates and the body's balance zero with the body held at x; time far beyond every shift. v: first guess of its speed, or None: it stands."""
        free = [n for n in self.names if n != "x"]
        index = [self.names.index(n) for n in free]

        def residual(z):
            values = dict(zip(free, z)) | {"x": x}
            rates, force = self.balance(1e6, [values[n] for n in self.names], z[-1] if v is not None else 0.0)
            # a rate over 1000 MPa/L is a flow
            return [rates[i] * 1e-3 for i in index] + ([force] if v is not None else [])

        z = [guess.get(n, self.start[n]) for n in free] + ([v] if v is not None else [])
        best = None
        for method, options in (("hybr", {"xtol": 1e-13, "maxfev": 20000}), ("lm", {"xtol": 1e-15, "ftol": 1e-15, "maxiter": 50000})) * 3:
            z = root(residual, z, method=method, options=options).x
            worst = float(np.max(np.abs(residual(z))))
            if best is None or worst < best[0]:
                best = (worst, z)
            if worst < 1e-10:
                break
        if best[0] > 1e-8:
            raise RuntimeError(f"no steady answer: {dict(zip(free, best[1]))} {residual(best[1])}")
        values = dict(zip(free + (["v"] if v is not None else []), map(float, best[1])))
        return values | ({"x": x} if "x" in self.names else {})

    def scipy_run(self, start, stop, event, rtol=1e-7):
        code = compile(event, "event", "eval")

        def fire(t, y):
            return eval(code, self.space, dict(zip(self.names, y)))

        fire.terminal, fire.direction = True, 1
        y0 = [start[n] for n in self.names]
        answer = solve_ivp(self.rate, (0, stop), y0, method="Radau", rtol=rtol, atol=1e-2 * rtol, events=fire, max_step=0.1, first_step=1e-6)
        if not answer.success or len(answer.t_events[0]) == 0:
            raise RuntimeError(f"event not reached: {answer.message} {dict(zip(self.names, answer.y[:, -1]))}")
        return float(answer.t_events[0][0]), dict(zip(self.names, map(float, answer.y_events[0][0])))

    def ngspice_run(self, start, stop, event):
        lines = ["reference"]
        for name, (arguments, body) in FUNCTIONS.items():
            lines.append(f".func {name}({arguments}) {{{body}}}")
        for name, value in self.parameters.items():
            lines.append(f".param {name}={value!r}")
        names = set(self.names) | {n for n, _ in self.given} | {"v"}

        def spice(expression):
            return re.sub(r"[A-Za-z_]\w*", lambda m: f"V({m[0]})" if m[0] in names else m[0], expression)

        if self.body:
            lines.append(f"B_v v 0 V={spice(self.speed)}")
        for name, expression in self.given:
            lines.append(f"B_{name} {name} 0 V={spice(expression)}")
        for name, rate in self.states:
            lines.append(f"C_{name} {name} 0 1 IC={start[name]!r}")
            lines.append(f"B_{name}r 0 {name} I={spice(rate)}")
        lines.append(f"B_event event 0 V={spice(event)}")
        lines += [
            ".options reltol=1e-6 abstol=1e-9 vntol=1e-9 chgtol=1e-12 method=gear maxord=2 itl4=200",
            f".tran 1e-3 {stop} 0 1e-3 uic",
            ".control",
            "run",
            "meas tran tev WHEN v(event)=0 RISE=1",
        ]
        lines += [f"meas tran at_{n} FIND v({n}) WHEN v(event)=0 RISE=1" for n in self.names]
        lines += [".endc", ".end"]
        with tempfile.TemporaryDirectory() as folder:
            netlist = Path(folder) / "net.cir"
            netlist.write_text("\n".join(lines) + "\n")
            done = subprocess.run(["ngspice", "-b", str(netlist)], capture_output=True, text=True, timeout=120)
        found = dict(re.findall(r"^(tev|at_\w+)\s*=\s*(\S+)", done.stdout, re.M))
        if "tev" not in found:
            raise RuntimeError(f"ngspice: {done.stdout[-800:]} {done.stderr[-800:]}")
        return float(found["tev"]), {n: float(found[f"at_{n.lower()}"]) for n in self.names}
