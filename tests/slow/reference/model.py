"""One set of equations, solved twice by general-purpose software: SciPy (Radau, root) and ngspice (transient).

A model is a list of named expressions over parameters, states and `time`, in the arithmetic that Python and ngspice share.
Each state is a capacitor of 1 F fed with its rate in ngspice.
"""

import math
import re
import subprocess
import tempfile
from pathlib import Path

import numpy as np
from scipy.integrate import solve_ivp
from scipy.optimize import root

import laws

FUNCTIONS = {
    "path": ("k,d", "(k)*(d)/pow((d)*(d)+1e-4,0.25)"),
    "chk": ("k,c,d", "(d)>(c) ? path(k,(d)-(c)) : 0"),
    "rel": ("pp,pt,set,ovr,q,k", "max(0,min((q)*((pp)-(set)-(pt))/max((ovr)*(set),0.05),path(k,(pp)-(pt))))"),
    "reg": ("q,n,k,d", "(d)>0 ? min(q,(q)*sqrt((d)/(n))) : path(k,d)"),
    "clamp": ("z", "max(0,min(1,z))"),
    "dry": ("f,v", "(f)*(v)/sqrt((v)*(v)+1e-10)"),
    # effective stiffness of oil with 0.5 % free air (n 1.4), bulk 1400 MPa
    "pabs": ("p", "max((p)+0.101325,0.02)"),
    "gas": ("p", "0.005*pow(0.101325/pabs(p),1/1.4)"),
    "oil": ("p", "0.995*exp(-(pabs(p)-0.101325)/1400)"),
    "stf": ("p", "(gas(p)+oil(p))/(gas(p)/(1.4*pabs(p))+oil(p)/1400)"),
}


def _python(expression):
    # the shared arithmetic's `a ? b : c`
    match = re.fullmatch(r"(.+?)\?(.+):(.+)", expression)
    return f"(({match[2]}) if ({match[1]}) else ({match[3]}))" if match else expression


def _namespace():
    space = {"pow": lambda a, b: a**b, "sqrt": math.sqrt, "exp": math.exp, "min": min, "max": max, "abs": abs}
    for name, (arguments, body) in FUNCTIONS.items():
        space[name] = eval(f"lambda {arguments}: {_python(body)}", space)
    return space


class Model:
    def __init__(self, parameters, given, states, start):
        """parameters: name -> number; given: [(name, expression)] in order; states: [(name, rate expression)]; start: name -> value."""
        self.parameters, self.given, self.states, self.start = parameters, given, states, dict(start)
        self.space = _namespace() | parameters
        self.code = [(n, compile(e, n, "eval")) for n, e in given]
        self.rates = [compile(e, n, "eval") for n, e in states]
        self.names = [n for n, _ in states]

    def values(self, time, y):
        local = dict(zip(self.names, y)) | {"time": time}
        for name, code in self.code:
            local[name] = eval(code, self.space, local)
        return local

    def rate(self, time, y):
        local = self.values(time, y)
        return np.array([eval(code, self.space, local) for code in self.rates])

    def steady(self, frozen, time=1e6, guess=None):
        """Rates zero with the states of `frozen` held; time far beyond every shift."""
        free = [n for n in self.names if n not in frozen]
        index = [self.names.index(n) for n in free]
        guess = guess or {}

        def residual(z):
            y = [frozen.get(n, 0.0) for n in self.names]
            for i, value in zip(index, z):
                y[i] = value
            return self.rate(time, y)[index]

        z = [guess.get(n, self.start[n]) for n in free]
        answer = root(residual, z, method="hybr", options={"xtol": 1e-13, "maxfev": 20000})
        if np.max(np.abs(residual(answer.x))) > 1e-6:
            answer = root(residual, answer.x, method="lm", options={"xtol": 1e-15, "ftol": 1e-15, "maxiter": 50000})
        scale = 1e3  # rates carry the stiffness: a rate of 1e-3 is a flow of 1e-7 L/s
        if np.max(np.abs(residual(answer.x))) > 1e-3 * scale:
            raise RuntimeError(f"no steady answer: {residual(answer.x)}")
        return frozen | dict(zip(free, answer.x))

    def scipy_run(self, start, stop, event):
        code = compile(event, "event", "eval")

        def fire(t, y):
            return eval(code, self.space, self.values(t, y))

        fire.terminal, fire.direction = True, 1
        y0 = [start[n] for n in self.names]
        answer = solve_ivp(self.rate, (0, stop), y0, method="Radau", rtol=1e-8, atol=1e-10, events=fire, max_step=0.1)
        if not answer.success or len(answer.t_events[0]) == 0:
            raise RuntimeError(f"event not reached: {answer.message}")
        return answer.t_events[0][0], dict(zip(self.names, answer.y_events[0][0]))

    def ngspice_run(self, start, stop, event):
        lines = ["reference"]
        for name, (arguments, body) in FUNCTIONS.items():
            lines.append(f".func {name}({arguments}) {{{body}}}")
        for name, value in self.parameters.items():
            lines.append(f".param {name}={value!r}")

        def spice(expression):
            names = set(self.names) | {n for n, _ in self.given}
            return re.sub(r"[A-Za-z_]\w*", lambda m: f"V({m[0]})" if m[0] in names else m[0], expression)

        for name, expression in self.given:
            lines.append(f"B_{name} {name} 0 V={spice(expression)}")
        for name, rate in self.states:
            lines.append(f"C_{name} {name} 0 1 IC={start[name]!r}")
            lines.append(f"B_{name}r 0 {name} I={spice(rate)}")
        lines.append(f"B_event event 0 V={spice(event)}")
        lines += [
            ".options reltol=1e-6 abstol=1e-9 vntol=1e-9 chgtol=1e-12 method=gear maxord=2 itl4=200",
            f".tran 1e-3 {stop} 0 5e-4 uic",
            ".control",
            "run",
            "meas tran tev WHEN v(event)=0 RISE=1",
        ]
        lines += [f"meas tran at_{n} FIND v({n}) WHEN v(event)=0 RISE=1" for n in self.names]
        lines += [".endc", ".end"]
        with tempfile.TemporaryDirectory() as folder:
            netlist = Path(folder) / "net.cir"
            netlist.write_text("\n".join(lines) + "\n")
            done = subprocess.run(["ngspice", "-b", str(netlist)], capture_output=True, text=True, timeout=300)
        found = dict(re.findall(r"^(tev|at_\w+)\s*=\s*(\S+)", done.stdout, re.M))
        if "tev" not in found:
            raise RuntimeError(f"ngspice: {done.stdout[-800:]} {done.stderr[-800:]}")
        return float(found["tev"]), {n: float(found[f"at_{n.lower()}"]) for n in self.names}
