"""Times of general-purpose software on reference circuit 07, rapid traverse and feed, with the same equations: one JSON object.

others.py FOLDER ROUNDS: {solver: {seconds: [one a round], ends: [s, s]} or {why: words}}. Processor time of the
integration alone: of ngspice without its start, of SciPy and CVODE around the solver. A file of C with the equations is written to FOLDER for CVODE.
"""

import json
import re
import resource
import shutil
import subprocess
import sys
import time
from pathlib import Path

HERE = Path(__file__).resolve().parent
sys.path.insert(0, str(HERE.parent / "slow" / "reference"))

import circuits  # noqa: E402
import model as equations  # noqa: E402
from laws import FLOOR, FLOOR_TIME  # noqa: E402

RTOL = 1e-4
# (phase of the valve, event that ends the part, longest time)
PARTS = [(True, "x-0.14", 5.0), (None, "x-0.22", 20.0)]


def models():
    return [(circuits.c07(phase, FLOOR_TIME), event, longest) for phase, event, longest in PARTS]


def timed(rounds, once):
    seconds, ends = [], []
    for _ in range(rounds):
        spent, ends = once()
        seconds.append(spent)
    return {"seconds": seconds, "ends": ends}


def scipy_once(rest):
    at, ends, begun = rest, [], time.process_time()
    for one, event, longest in models():
        end, at = one.scipy_run(at, longest, event, RTOL)
        ends.append(end)
    return time.process_time() - begun, ends


def processor_time(command, **options):
    """What the command says, and its processor time, s."""
    before = resource.getrusage(resource.RUSAGE_CHILDREN)
    done = subprocess.Popen(command, stdout=subprocess.PIPE, stderr=subprocess.PIPE, text=True)
    out, err = done.communicate(timeout=options.get("timeout"))
    after = resource.getrusage(resource.RUSAGE_CHILDREN)
    spent = after.ru_utime + after.ru_stime - before.ru_utime - before.ru_stime
    return subprocess.CompletedProcess(command, done.returncode, out, err), spent


def start_of_ngspice(folder):
    """Its own start, s: a netlist of one resistor; least of five."""
    netlist = folder / "nothing.cir"
    netlist.write_text("nothing\nV1 a 0 1\nR1 a 0 1\n.op\n.end\n")
    return min(processor_time(["ngspice", "-b", str(netlist)])[1] for _ in range(5))


def ngspice_once(rest, start):
    """The netlist of the reference with the tolerance of the others and steps as long as the program chooses."""
    own, spent = subprocess.run, []

    def at_this_tolerance(command, **options):
        netlist = Path(command[-1])
        text = netlist.read_text().replace("reltol=1e-6", f"reltol={RTOL}")
        netlist.write_text(re.sub(r"^\.tran 1e-3 (\S+) 0 1e-3 uic", r".tran 1e-2 \1 0 1e-1 uic", text, flags=re.M))
        done, seconds = processor_time(command, **options)
        spent.append(seconds - start)
        return done

    equations.subprocess.run = at_this_tolerance
    try:
        at, ends = rest, []
        for one, event, _ in models():
            # It has no end by an event: it runs a tenth longer than the step takes.
            end, at = one.ngspice_run(at, 1.1 * REACHED[len(ends)], event)
            ends.append(end)
    finally:
        equations.subprocess.run = own
    return sum(spent), ends


def ngspice(rest, folder, rounds):
    if shutil.which("ngspice") is None:
        return {"why": "no ngspice"}
    start = start_of_ngspice(folder)
    return timed(rounds, lambda: ngspice_once(rest, start))


REACHED = []


def c_of(parts, rest):
    """The same expressions as C functions: arithmetic that Python, ngspice and C share."""
    lines = ["#define max fmax", "#define min fmin"]
    for name, (arguments, body) in equations.FUNCTIONS.items():
        lines.append(f"static double {name}({', '.join('double ' + a for a in arguments.split(','))}) {{ return {body}; }}")
    names = parts[0][0].names
    for k, (one, event, _) in enumerate(parts):
        lines.append(f"static double rate{k}(double time, const double *y, double *f) {{")
        lines += [f"  const double {n} = {v!r};" for n, v in one.parameters.items()]
        lines += [f"  const double {n} = y[{i}];" for i, n in enumerate(names)]
        lines.append(f"  const double v = {one.speed};")
        lines += [f"  const double {n} = {e};" for n, e in one.given]
        lines += [f"  f[{i}] = {e};" for i, (_, e) in enumerate(one.states)]
        lines += [f"  return {event};", "}"]
    lines.append(f"#define STATES {len(names)}")
    lines.append(f"#define PARTS {len(parts)}")
    lines.append("static double (*const rates[])(double, const double *, double *) = {" + ", ".join(f"rate{k}" for k in range(len(parts))) + "};")
    lines.append("static const double longest[] = {" + ", ".join(repr(t) for _, _, t in parts) + "};")
    lines.append("static const double rest[] = {" + ", ".join(repr(rest[n]) for n in names) + "};")
    return "\n".join(lines) + "\n"


def cvode(rest, folder, rounds):
    compiler = next((c for c in ("cc", "gcc", "clang") if shutil.which(c)), None)
    if compiler is None:
        return {"why": "no compiler of C"}
    (folder / "equations.h").write_text(c_of(models(), rest))
    program = folder / "cvode"
    words = [compiler, "-O2", f"-I{folder}", str(HERE / "cvode.c"), "-o", str(program)]
    words += ["-lsundials_cvode", "-lsundials_nvecserial", "-lsundials_sunmatrixdense", "-lsundials_sunlinsoldense", "-lm"]
    # Since version 7 the core is a library of its own.
    for more in (["-lsundials_core"], []):
        made = subprocess.run(words + more, capture_output=True, text=True)
        if made.returncode == 0:
            break
    else:
        return {"why": "no SUNDIALS to compile with: " + made.stderr.strip().splitlines()[0][:120]}
    done = subprocess.run([str(program), str(rounds), repr(RTOL)], capture_output=True, text=True, timeout=60)
    if done.returncode != 0:
        return {"why": "the integration failed: " + done.stderr.strip()[-120:]}
    return json.loads(done.stdout)


def main():
    folder, rounds = Path(sys.argv[1]), int(sys.argv[2])
    folder.mkdir(parents=True, exist_ok=True)
    rest = circuits.c07(False, FLOOR).steady({})
    answers = {"Radau": timed(rounds, lambda: scipy_once(rest))}
    REACHED.extend(answers["Radau"]["ends"])
    for name, solve in (
        ("ngspice", lambda: ngspice(rest, folder, rounds)),
        ("CVODE", lambda: cvode(rest, folder, 20 * rounds)),
    ):
        try:
            answers[name] = solve()
        except Exception as error:  # a solver that cannot is a row of the table
            answers[name] = {"why": str(error).replace("\n", " ")[:160]}
    json.dump(answers, sys.stdout)


main()
