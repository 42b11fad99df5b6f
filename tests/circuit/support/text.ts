/** A circuit from its notation; the text must be without errors. */
import { assemble, type BodyLoad, type Circuit, type Machine, type Setting } from '@oilway/circuit';
import { parseText, resolve } from '@oilway/language';

export function circuitOf(text: string): Circuit {
  const { circuit, findings } = resolve(parseText('test.oilway', text));
  const errors = findings.filter((f) => f.severity === 'error');
  if (errors.length > 0) throw new Error(errors.map((f) => f.what).join('\n'));
  return circuit;
}
export const machineOf = (text: string, temperature?: number): Machine =>
  assemble(circuitOf(text), temperature === undefined ? {} : { temperature });

/** Drives on, valves sprung, commands dead, no load, accumulators empty. */
export const blank: Setting = { drives: {}, valves: {}, commands: {}, bits: {}, positions: {}, oil: {}, loads: {} };

/** A constant load. `fixed` N + outward, `resist` N against motion, `friction` N. */
export const load = (fixed: number, resist = 0, friction = 0): BodyLoad => ({
  fixed: fixed === 0 ? [] : [{ at: [0], force: [fixed] }],
  resistOut: resist === 0 ? [] : [{ at: [0], force: [resist] }],
  resistIn: resist === 0 ? [] : [{ at: [0], force: [resist] }],
  friction,
});
