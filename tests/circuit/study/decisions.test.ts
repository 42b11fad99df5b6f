/** Verdicts, `never`, variants and contacts: the decisions that need no pressures. */
import { analyseText } from '@oilway/language';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Contact } from '../../../packages/circuit/study/contacts.ts';
import { closed } from '../../../packages/circuit/study/contacts.ts';
import { value } from '../../../packages/circuit/study/measures/observed.ts';
import { assignmentsOf, searchLogic } from '../../../packages/circuit/study/never.ts';
import { plantOf } from '../../../packages/circuit/study/scene.ts';
import { pairs } from '../../../packages/circuit/study/variants.ts';
import { judge, marginOf } from '../../../packages/circuit/study/verdict.ts';
import { circuitOf, PLAIN } from './support/circuits.ts';
import { fakeMachine } from './support/fake-machine.ts';

const q = (si: number) => ({ si, dimension: 'pressure' as const, unit: 'bar' });
const seen = (...amounts: number[]) => [
  { place: 'Go.Out', values: amounts.map((one, index) => value(`at ${index}`, one, { time: index, since: index })), problems: [] },
];

describe('a bound', () => {
  it('is met within 0.1 % of itself and missed beyond', () => {
    const most = (amount: number) => judge({ is: 'most', value: q(100e5) }, seen(amount), 'pressure', true, undefined).verdict;
    expect(most(100.09e5)).toBe('met');
    expect(most(100.11e5)).toBe('missed');
    expect(judge({ is: 'least', value: q(100e5) }, seen(99.91e5), 'pressure', true, undefined).verdict).toBe('met');
    expect(judge({ is: 'least', value: q(100e5) }, seen(99.8e5), 'pressure', true, undefined).verdict).toBe('missed');
  });
  it('is judged by its worst value', () => {
    const found = judge({ is: 'between', low: q(80e5), high: q(120e5) }, seen(100e5, 115e5, 84e5), 'pressure', true, undefined);
    expect(found.verdict).toBe('met');
    expect(found.worst?.at).toBe('at 1');
    expect(found.margin).toBeCloseTo(5 / 120);
  });
  it('is not decided by a range of pressures that straddles it, but missed where even the good end misses', () => {
    const trapped = [{ place: 'OFF', values: [{ ...value('OFF', 150e5), low: 0 }], problems: [] }];
    expect(judge({ is: 'most', value: q(100e5) }, trapped, 'pressure', true, undefined).verdict).toBe('undecidable');
    expect(judge({ is: 'most', value: q(160e5) }, trapped, 'pressure', true, undefined).verdict).toBe('met');
    expect(judge({ is: 'least', value: q(160e5) }, trapped, 'pressure', true, undefined).verdict).toBe('missed');
  });
  it('is reached from whichever side the place begins, in time', () => {
    const up = judge({ is: 'reaches', value: q(100e5) }, seen(10e5, 60e5, 101e5), 'pressure', true, undefined);
    expect(up.verdict).toBe('met');
    expect(judge({ is: 'reaches', value: q(100e5), within: 1 }, seen(10e5, 60e5, 101e5), 'pressure', true, undefined).verdict).toBe(
      'missed',
    );
    expect(judge({ is: 'reaches', value: q(10e5) }, seen(100e5, 50e5, 9e5), 'pressure', true, undefined).verdict).toBe('met');
    expect(judge({ is: 'reaches', value: q(10e5) }, seen(100e5, 50e5, 12e5), 'pressure', true, undefined).verdict).toBe('missed');
  });
  it('for a time is held without break', () => {
    const least = { is: 'least' as const, value: q(50e5) };
    expect(judge(least, seen(60e5, 60e5, 60e5, 10e5), 'pressure', true, 2).verdict).toBe('met');
    expect(judge(least, seen(60e5, 60e5, 10e5, 60e5), 'pressure', true, 2).verdict).toBe('missed');
  });
  it('that nothing decides is never passed', () => {
    const problems = fc.array(fc.string({ minLength: 1 }), { minLength: 1, maxLength: 3 });
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: -1e7, max: 1e7, noNaN: true }), { maxLength: 4 }),
        problems,
        fc.double({ min: 1, max: 1e7, noNaN: true }),
        (amounts, list, bound) => {
          const observed = [{ place: 'x', values: amounts.map((one, i) => value(`${i}`, one, { since: i })), problems: list }];
          for (const is of ['least', 'most', 'reaches'] as const) {
            if (judge({ is, value: q(bound) }, observed, 'pressure', true, undefined).verdict === 'met') return false;
          }
          return judge({ is: 'most', value: q(bound) }, [], 'pressure', true, undefined).verdict === 'undecidable';
        },
      ),
    );
  });
  it('of a temperature counts its margin in degrees of the bound', () => {
    expect(marginOf(273.15 + 54, 273.15 + 60, 'most', 'temperature')).toBeCloseTo(0.1);
  });
});

const above = (key: string, rises: number, falls: number): Contact => ({
  key,
  source: { what: 'pressure', net: 'n', head: 0 },
  test: { is: 'above', rises, falls, atStart: false },
  inverted: false,
});

describe('contacts', () => {
  const circuit = circuitOf(PLAIN);
  const plant = plantOf(circuit, fakeMachine(circuit, {}, { C1: 0.3 }));
  const at = (p: number) => ({
    ...plant.machine.solve({ drives: {}, valves: {}, commands: {}, bits: {}, positions: {}, oil: {}, loads: {} }),
    pressures: { n: p },
  });
  it('hold their state between the two thresholds', () => {
    const one = above('PS', 120e5, 100e5);
    expect(closed(plant, one, at(110e5), undefined)).toBe(false);
    expect(closed(plant, one, at(110e5), true)).toBe(true);
    expect(closed(plant, one, at(110e5), false)).toBe(false);
    expect(closed(plant, one, at(120e5), false)).toBe(true);
    expect(closed(plant, one, at(100e5), true)).toBe(false);
  });
  it('turned over at a threshold they do not turn back there', () => {
    fc.assert(
      fc.property(fc.double({ min: 1e5, max: 3e7, noNaN: true }), (threshold) => {
        const one = above('PS', threshold, threshold);
        const on = closed(plant, one, at(threshold), false);
        return on === true && closed(plant, one, at(threshold), on) === true;
      }),
    );
  });
  it('opened by the quantity where the switch is broken', () => {
    const one = { ...above('PS', 120e5, 100e5), inverted: true };
    expect(closed(plant, one, at(130e5), undefined)).toBe(false);
    expect(closed(plant, one, at(90e5), undefined)).toBe(true);
  });
});

describe('stands of switches that can be together', () => {
  it('take two switches of one pressure from its intervals', () => {
    const all = assignmentsOf([above('LOW', 50e5, 40e5), above('HIGH', 120e5, 100e5)])!.map((one) => [one.get('LOW'), one.get('HIGH')]);
    expect(all).toContainEqual([true, true]);
    expect(all).toContainEqual([false, false]);
    expect(all).toContainEqual([true, false]);
    // Nobody is above 100 bar and below 50 at once.
    expect(all).not.toContainEqual([false, true]);
  });
});

describe('never', () => {
  const search = (more: string) => {
    const circuit = circuitOf(PLAIN + more, true);
    const plant = plantOf(circuit, fakeMachine(circuit, {}, { C1: 0.3 }));
    const [requirement] = circuit.requirements;
    return searchLogic(
      plant,
      requirement?.form === 'never' ? requirement.condition : { op: 'unknown', origin: circuit.components[0]!.origin },
    );
  };
  const CYCLE = 'cycle Go {\n  step Out energise SOL1 until LS1 on\n}\n';
  it('finds the stand of switches that breaks it, and none where an interlock holds', () => {
    expect(search(`${CYCLE}require never SOL1 on and PS1 off\n`).found?.at).toBe('in Go.Out with PS1 off');
    expect(search(`${CYCLE}interlock SOL1 needs PS1 on\nrequire never SOL1 on and PS1 off\n`)).toEqual({ searched: 'all' });
  });
  it('looks at while lines and push buttons too', () => {
    expect(search(`${CYCLE}while PS1 off energise SOL2\nrequire never SOL1 on and SOL2 on\n`).found?.at).toBe('in Go.Out with PS1 off');
  });
  it('says that positions are looked for in the runs only', () => {
    expect(search(`${CYCLE}require never C1 above 200 mm and PS1 off\n`)).toEqual({
      searched: 'runs only',
      why: 'it names positions or sensors',
    });
  });
});

describe('variants', () => {
  it('above the limit are the base, each factor alone, then pairs, never more than 256, never twice', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: 1, max: 30 }), { minLength: 1, maxLength: 5 }), (sizes) => {
        const rows = pairs(sizes);
        const unique = new Set(rows.map((one) => one.join(',')));
        return (
          rows.length <= 256 &&
          unique.size === rows.length &&
          rows.every(
            (row) =>
              row.length === sizes.length && row.every((one, i) => one >= 0 && one < sizes[i]!) && row.filter((one) => one > 0).length <= 2,
          )
        );
      }),
    );
  });
});

describe('texts of these tests', () => {
  it('resolve without errors', () => {
    expect(
      analyseText({ uri: 'test:/plain.oilway', text: PLAIN }).findings.filter((one) => one.severity === 'error' && !one.computed),
    ).toEqual([]);
  });
});
