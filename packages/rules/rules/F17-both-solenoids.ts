/** F17: both coils of one valve are live together. */
import type { Action, Circuit, Coil, Command, Condition, Origin, Step } from '@oilway/circuit';
import { tell } from '../finding.ts';
import type { Finding, Rule } from '../rule.ts';
import { list } from '../words.ts';

interface Live {
  readonly command: Command;
  /** Where it is asked for: "step Drill.Out", "the while line". */
  readonly by: string;
}

function commands(actions: readonly Action[], by: string): Live[] {
  return actions.flatMap((a) => (a.does === 'energise' ? a.commands.map((command) => ({ command, by })) : []));
}

/** True where a condition holds for certain while these steps run: only "is running" atoms of them, joined as written. */
function certain(condition: Condition, running: ReadonlySet<string>): boolean {
  if (condition.op === 'running') return running.has(condition.of);
  if (condition.op === 'and') return condition.items.every((c) => certain(c, running));
  if (condition.op === 'or') return condition.items.some((c) => certain(c, running));
  return false;
}

/** An interlock of one coil that asks for the other to be dead keeps them apart. */
function keptApart(circuit: Circuit, a: string, b: string): boolean {
  const asks = (c: Condition, coil: string): boolean =>
    (c.op === 'state' && c.of === coil && c.is === 'off') ||
    (c.op === 'and' && c.items.some((i) => asks(i, coil))) ||
    (c.op === 'or' && c.items.every((i) => asks(i, coil)));
  return circuit.interlocks.some((i) => (i.coils.includes(a) && asks(i.needs, b)) || (i.coils.includes(b) && asks(i.needs, a)));
}

/** Coils asked for together in a step, with the lines that run beside it. */
function together(circuit: Circuit, step: Step, steps: readonly Step[]): Live[] {
  const beside = steps.filter((s) => s.beside === step.id);
  const running = new Set([step.id, step.cycle, ...beside.map((s) => s.id)]);
  const lines = [step, ...beside].flatMap((s) => commands(s.actions, `${s.beside === undefined ? 'step' : 'meanwhile'} ${s.id}`));
  const standing = circuit.whiles.filter((w) => certain(w.when, running)).flatMap((w) => commands([w.action], 'a while line'));
  return [...lines, ...standing];
}

function judge(circuit: Circuit, live: readonly Live[], state: string): Finding[] {
  const found: Finding[] = [];
  const byValve = new Map<string, { coil: Coil; live: Live }[]>();
  for (const one of live) {
    const coil = circuit.coils.find((c) => c.id === one.command.coil);
    if (coil?.side === undefined) continue;
    const known = byValve.get(coil.component) ?? [];
    byValve.set(coil.component, [...known, { coil, live: one }]);
  }
  for (const [valve, coils] of byValve) {
    const first = coils[0]!;
    const second = coils.find((c) => c.coil.side !== first.coil.side);
    if (second === undefined || keptApart(circuit, first.coil.id, second.coil.id)) continue;
    const where = [...new Set([first.live.by, second.live.by])];
    found.push(
      tell(F17, {
        what: `${first.coil.id} and ${second.coil.id} of ${valve} are both live in ${list(where)}: where ${valve} then stands is not determined.`,
        origin: second.live.command.origin,
        place: valve,
        state,
        related: [
          related(first.live.command.origin, `${first.coil.id} is live here`),
          related(first.coil.origin, `${first.coil.id} moves ${valve} to ${first.coil.side ?? ''}`),
        ],
      }),
    );
  }
  return found;
}

function related(origin: Origin, message: string) {
  return { message, origin };
}

export const F17: Rule = {
  code: 'F17',
  name: 'both-solenoids',
  title: 'Both coils of one valve live',
  severity: 'error',
  why: 'Two coils pull against each other: an alternating-current coil burns out, and the spool stands where friction leaves it.',
  ground: 'solenoid valve practice; truth table of the directional valve',
  mend: 'Take one of the two out of the step; keep them apart by an interlock.',
  needs: 'topology',
  page: `
For each step with its \`meanwhile\` lines and the \`while\` lines that are true then for certain (their condition names nothing but running steps and
cycles), and for \`emergency\`, the coils asked for are compared: two coils of one valve on different sides is an error.

Stays clean: the two coils in different steps; an interlock that lets one live only while the other is dead; \`while\` lines that depend on
switches (those are judged in the run).`,
  detect({ circuit }) {
    const found = circuit.cycles.flatMap((cycle) =>
      cycle.steps.filter((s) => s.beside === undefined).flatMap((step) => judge(circuit, together(circuit, step, cycle.steps), step.id)),
    );
    const kept = circuit.emergency === undefined ? [] : judge(circuit, commands(circuit.emergency.actions, 'emergency'), 'STOP');
    return [...found, ...kept];
  },
};
