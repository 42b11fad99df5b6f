/** What the program says of the reference circuits, in the units of the reference: MPa, m/s or rad/s, s. */
import { readdirSync, readFileSync } from 'node:fs';
import { study } from '@oilway/circuit';
import { analyse } from '@oilway/language';

export interface Stated {
  /** Net -> MPa at the entry of the step. */
  readonly pressures: Readonly<Record<string, number>>;
  /** Actuator -> m/s or rad/s there. */
  readonly speeds: Readonly<Record<string, number>>;
  /** s from the start of the step to its end. */
  readonly time: number;
  /** Net -> MPa at the end of the step in the run. */
  readonly ends: Readonly<Record<string, number>>;
}

const folder = new URL('./circuits/', import.meta.url);
const MPA = 1e6;
const inMPa = (pressures: Readonly<Record<string, number>>): Record<string, number> =>
  Object.fromEntries(Object.entries(pressures).map(([net, p]) => [net, p / MPA]));

export const circuits: readonly string[] = readdirSync(folder)
  .filter((name) => name.endsWith('.oilway'))
  .map((name) => name.slice(0, 2))
  .sort();

/** Step name -> figures. Throws where the text is not understood or a step has no figures: a reference circuit must be computed. */
export function programOf(circuit: string): Readonly<Record<string, Stated>> {
  const uri = `file:///${circuit}.oilway`;
  const text = readFileSync(new URL(`${circuit}.oilway`, folder), 'utf8');
  const document = analyse([{ uri, text }], { study }).documents[0];
  const found = document?.study;
  if (found === undefined) throw new Error(`circuit ${circuit} has no study: ${document?.failed ?? ''}`);
  const run = found.cycles[0]?.run;
  if (run === undefined) throw new Error(`circuit ${circuit} has no run`);
  return Object.fromEntries(
    found.steps.map((step): [string, Stated] => {
      const point = step.points[0];
      const span = run.steps.find((one) => one.id === step.id);
      if (point === undefined || !point.solved || span === undefined || step.faults.length > 0)
        throw new Error(`circuit ${circuit}: ${step.id} is not solved: ${step.faults.map((fault) => fault.words).join('; ')}`);
      // The first sample at this time is the end of the step, before anything of the next.
      const last = run.times.findIndex((time) => time >= span.to - 1e-12);
      return [
        step.id.slice(step.id.indexOf('.') + 1),
        {
          pressures: inMPa(point.pressures),
          speeds: Object.fromEntries(point.actuators.map((one) => [one.id, one.velocity])),
          time: span.to - span.from,
          ends: inMPa(Object.fromEntries(Object.entries(run.pressures).map(([net, values]) => [net, values[last] ?? Number.NaN]))),
        },
      ];
    }),
  );
}
