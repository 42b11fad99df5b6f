/**
 * Steady points of twelve circuits against the same equations written apart from the program and solved by SciPy (root). The figures were
 * stored by the command that `equations.json` names; `npm run test:reference` solves them anew, and the runs with ngspice too.
 */
import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { type Steady, steadyDifference } from '../slow/reference/compare.ts';
import { circuits, programOf } from '../slow/reference/program.ts';

const stored = (
  JSON.parse(readFileSync(new URL('./equations.json', import.meta.url), 'utf8')) as {
    readonly circuits: Readonly<Record<string, Readonly<Record<string, Steady>>>>;
  }
).circuits;

describe('steady points as equations give them', () => {
  it('has figures for every circuit, and no others', () => {
    expect(Object.keys(stored).sort()).toEqual(circuits);
  });

  it.each(circuits)('circuit %s within a millionth', (circuit) => {
    const program = programOf(circuit);
    const steps = stored[circuit] ?? {};
    expect(Object.keys(program).sort()).toEqual(Object.keys(steps).sort());
    for (const [step, want] of Object.entries(steps)) {
      const got = program[step];
      if (got === undefined) throw new Error(`no step ${step}`);
      expect(steadyDifference(step, want, got).faults).toEqual([]);
      expect(Object.keys(want.pressures).length).toBeGreaterThan(0);
    }
  });

  it('says which figure is off', () => {
    const want = { pressures: { n: 2 }, speeds: { C1: 0.1 } };
    expect(steadyDifference('S', want, { pressures: { n: 2.00001 }, speeds: { C1: 0.1 } }).faults).toEqual(['S n: 2.00001, reference 2']);
    expect(steadyDifference('S', want, { pressures: { n: 2 }, speeds: {} }).faults).toEqual(['S C1: NaN, reference 0.1']);
  });
});
