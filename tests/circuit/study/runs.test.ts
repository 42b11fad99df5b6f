/** Runs over time on a make-believe machine: ends of steps, limits, waiting for ever, chatter, repetition, push buttons. */
import { type Circuit, study } from '@oilway/circuit';
import { describe, expect, it } from 'vitest';
import { circuitOf, PLAIN } from './support/circuits.ts';
import { fakeMachine, type Rule } from './support/fake-machine.ts';

/** 100 mm/s out, 200 mm/s back. */
const MOVING: Rule = {
  velocity: (stands) => (stands.V1?.position === 'a' ? 0.1 : stands.V1?.position === 'b' ? -0.2 : 0),
};
const run = (text: string, rule: Rule = MOVING, allowErrors = false) => {
  const circuit: Circuit = circuitOf(PLAIN + text, allowErrors);
  const machine = fakeMachine(circuit, rule, { C1: 0.3 });
  return { result: study(circuit, { machine }), machine };
};
const CYCLE = 'cycle Go {\n  step Out energise SOL1 until LS1 on, at most 5 s\n  step Back energise SOL2 until LS2 on, at most 5 s\n}\n';

describe('a cycle', () => {
  it('goes through its steps; times follow from way and speed', () => {
    const { result } = run(CYCLE);
    const [cycle] = result.cycles;
    expect(cycle?.completed).toBe(true);
    // 295 mm at 100 mm/s, then 292 mm at 200 mm/s.
    expect(result.steps.map((one) => [one.id, Number(one.time?.toFixed(2))])).toEqual([
      ['Go.Out', 2.95],
      ['Go.Back', 1.46],
    ]);
    expect(cycle?.time).toBeCloseTo(4.41, 2);
    expect(cycle?.run?.live.SOL1).toHaveLength(1);
    expect(cycle?.run?.live.LS1?.[0]?.from).toBeCloseTo(2.95, 2);
  });
  it('a step already satisfied ends at once', () => {
    const { result } = run('cycle Go {\n  step Home energise SOL2 until LS2 on\n  step Out energise SOL1 until LS1 on\n}\n');
    expect(result.steps[0]?.time).toBe(0);
    expect(result.cycles[0]?.completed).toBe(true);
  });
  it('past its limit a step is a fault that says what it waits for', () => {
    const { result } = run('cycle Go {\n  step Out energise SOL1 until PS1 on, at most 4 s\n  step Back energise SOL2 until LS2 on\n}\n', {
      ...MOVING,
      pressure: () => 95e5,
    });
    const [fault] = result.cycles[0]?.faults ?? [];
    expect(fault?.kind).toBe('time limit');
    expect(fault?.words).toBe('Go.Out is not over after 4.00 s: waits for PS1 at 95.0 of 120 bar');
    expect(fault?.time).toBeCloseTo(4, 6);
    expect(result.cycles[0]?.completed).toBe(false);
    expect(result.steps[0]?.time).toBeUndefined();
  });
  it('without a limit and with nothing moving it waits for ever', () => {
    const { result } = run('cycle Go {\n  step Out energise SOL1 until PS1 on\n}\n', { ...MOVING, pressure: () => 95e5 });
    expect(result.cycles[0]?.faults.map((one) => [one.kind, one.words])).toEqual([
      ['waits for ever', 'Go.Out waits for ever at PS1 at 95.0 of 120 bar'],
    ]);
    expect(result.cycles[0]?.run?.times.at(-1)).toBeLessThan(20);
  });
  it('names the interlock that keeps it waiting', () => {
    const { result } = run(`${CYCLE}interlock SOL1 needs PS1 on\n`);
    expect(result.cycles[0]?.faults[0]?.words).toBe(
      'Go.Out is not over after 5.00 s: waits for LS1, C1 at 0 mm, it switches from 295 mm to 300 mm (SOL1 is held back: PS1 at 0.0 of 120 bar)',
    );
  });
  it('says so where a step ends without its coil ever having been live', () => {
    const { result } = run('cycle Go {\n  step Out energise SOL1 for 2 s\n}\ninterlock SOL1 needs PS1 on\n');
    expect(result.cycles[0]?.faults.map((one) => [one.kind, one.step])).toEqual([['interlock', 'Go.Out']]);
    expect(result.cycles[0]?.completed).toBe(true);
  });
  it('takes outside switches as steps and interlocks need them', () => {
    const { result } = run(
      'cycle Go {\n  step Wait until GUARD on\n  step Out energise SOL1 until LS1 on\n}\ninterlock SOL1 needs GUARD on\n',
    );
    expect(result.cycles[0]?.completed).toBe(true);
    expect(result.steps[0]?.time).toBe(0);
  });
  it('a ring of steps that take no time is an error, not a hang', () => {
    const { result } = run('cycle Go repeat {\n  step Home until LS2 on\n}\n');
    expect(result.cycles[0]?.faults.map((one) => one.kind)).toEqual(['cycle without time']);
  });
  it('says so where two coils of one valve are live', () => {
    const { result } = run('cycle Go {\n  step Both energise SOL1, SOL2 for 1 s\n}\n', MOVING, true);
    expect(result.cycles[0]?.faults.map((one) => one.kind)).toEqual(['two voices']);
    expect(result.cycles[0]?.completed).toBe(true);
  });
  it('a switch that turns over too often chatters, and what rests on it is not decided', () => {
    // The coil lifts the pressure, the switch drops the coil, both at once.
    const rule: Rule = {
      ...MOVING,
      pressure: (_net, stands, _positions, since) => (stands.V1?.position === 'a' ? 90e5 + since * 8e9 : 130e5 - since * 8e9),
    };
    const { result } = run(
      'cycle Go {\n  step Out energise SOL1 for 1 s\n}\ninterlock SOL1 needs PS1 off\nrequire never SOL1 on and PS1 on\n',
      rule,
    );
    expect(result.cycles[0]?.faults.some((one) => one.kind === 'chatters')).toBe(true);
    expect(result.requirements[0]?.verdict).toBe('undecidable');
  });
});

describe('repetition', () => {
  it('goes on until periodic', () => {
    // Begins retracted at 0 mm, comes back to 3 mm only: the second and third runs are alike.
    const { result } = run(CYCLE.replace('cycle Go', 'cycle Go repeat'));
    const [cycle] = result.cycles;
    expect(cycle?.settled).toBe(true);
    expect(cycle?.runs).toBe(3);
    expect(cycle?.firstTime).toBeCloseTo(4.41, 2);
    expect(cycle?.time).toBeCloseTo(4.38, 2);
  });
  it('counted runs are counted', () => {
    expect(run(CYCLE.replace('cycle Go', 'cycle Go repeat 3 times')).result.cycles[0]?.runs).toBe(3);
  });
});

describe('manual functions', () => {
  it('are push buttons: each alone, one after another, dead between', () => {
    const { result } = run('manual Hand {\n  step Out energise SOL1 until LS1 on\n  step Back energise SOL2 until GUARD off\n}\n');
    expect(result.steps.map((one) => Number(one.time?.toFixed(1)))[0]).toBeCloseTo(3, 0);
    // Only the button ends the way back: until nothing moves, looked at every second.
    expect(result.steps[1]?.time).toBeGreaterThan(1.4);
    expect(result.steps[1]?.time).toBeLessThan(5);
    expect(result.cycles[0]?.mode).toBe('manual');
    expect(result.cycles[0]?.faults).toEqual([]);
  });
});

describe('cancelling', () => {
  it('stops early; nothing is passed by it', () => {
    const circuit = circuitOf(`${PLAIN}${CYCLE}require C1 speed in Out at least 50 mm/s\n`);
    let asked = 0;
    const cancelled = () => {
      asked += 1;
      return asked > 3;
    };
    const result = study(circuit, { machine: fakeMachine(circuit, MOVING, { C1: 0.3 }), cancelled });
    expect(result.requirements.map((one) => one.verdict)).toEqual(['undecidable']);
  });
});
