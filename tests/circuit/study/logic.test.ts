/** The control: coils live by steps, while lines and interlocks; two voices; outside switches; step chain. */
import { describe, expect, it } from 'vitest';
import { holds, onlyOutside, outsideNeeds, type Situation } from '../../../packages/circuit/study/conditions.ts';
import { commandsOf, decide, demandOf, detentsAfter, NOTHING, standsOf } from '../../../packages/circuit/study/logic.ts';
import { lookup } from '../../../packages/circuit/study/lookup.ts';
import { Sequence } from '../../../packages/circuit/study/sequence.ts';
import { circuitOf, PLAIN } from './support/circuits.ts';

const situation = (on: Record<string, boolean | undefined> = {}, running: string[] = [], live: string[] = []): Situation => ({
  contact: (key) => (key in on ? on[key] : false),
  live: (coil) => live.includes(coil),
  running: (id) => running.includes(id),
});
const CYCLE = 'cycle Go {\n  step Out energise SOL1 until LS1 on\n  step Back energise SOL2 until LS2 on\n}\n';

describe('coils', () => {
  const at = lookup(circuitOf(`${PLAIN}${CYCLE}interlock SOL1 needs GUARD on and PS1 off\n`));
  const out = demandOf(at.step('Go.Out')!.actions, 'Go.Out');
  it('are live when a step lists them and all interlocks hold', () => {
    expect([...decide(at, out, situation({ GUARD: true })).live.keys()]).toEqual(['SOL1']);
    const held = decide(at, out, situation({ GUARD: true, PS1: true }));
    expect(held.live.size).toBe(0);
    expect(held.dropped.map((one) => one.coil)).toEqual(['SOL1']);
  });
  it('stay dead while an interlock is not known', () => {
    expect(decide(at, out, situation({ GUARD: true, PS1: undefined })).live.size).toBe(0);
  });
  it('move the valve, which is sprung without them', () => {
    expect(standsOf(at, decide(at, out, situation({ GUARD: true })), {})).toEqual({ V1: { position: 'a' } });
    expect(standsOf(at, decide(at, NOTHING, situation()), {})).toEqual({ V1: { position: 'centre' } });
  });
  it('are energised by a while line as long as it is true', () => {
    const standing = lookup(circuitOf(`${PLAIN}${CYCLE}while Go and PS1 off energise SOL2\n`));
    expect([...decide(standing, NOTHING, situation({}, ['Go'])).live.keys()]).toEqual(['SOL2']);
    expect(decide(standing, NOTHING, situation({ PS1: true }, ['Go'])).live.size).toBe(0);
    expect(decide(standing, NOTHING, situation({}, [])).live.size).toBe(0);
    expect(decide(standing, NOTHING, situation({}, ['Go']), { whileLines: false }).live.size).toBe(0);
  });
});

describe('two voices', () => {
  it('both coils of one valve leave it sprung', () => {
    const at = lookup(circuitOf(`${PLAIN}cycle Go {\n  step Both energise SOL1, SOL2 for 1 s\n}\n`, true));
    const control = decide(at, demandOf(at.step('Go.Both')!.actions, 'Go.Both'), situation());
    expect(control.twoVoices.map((one) => one.words)).toEqual(['SOL1 and SOL2 of V1 are live together: V1 is computed as sprung']);
    expect(standsOf(at, control, {})).toEqual({ V1: { position: 'centre' } });
  });
  it('different commands of one coil: the first in the text counts', () => {
    const text = PLAIN.replace('4/3, centre tandem', '4/3, proportional, centre tandem');
    const at = lookup(
      circuitOf(
        `${text}cycle Go {\n  step Out energise SOL1 at 40 % until LS1 on\n  meanwhile More energise SOL1 at 60 % for 1 s\n}\n`,
        true,
      ),
    );
    const both = [...at.step('Go.Out')!.actions, ...at.step('Go.More')!.actions];
    const control = decide(at, demandOf(both, 'Go'), situation());
    expect(control.twoVoices).toHaveLength(1);
    expect(control.live.get('SOL1')?.ratio).toBeCloseTo(0.4);
    expect(standsOf(at, control, {})).toEqual({ V1: { position: 'a', opening: 0.4 } });
  });
  it('equal commands of several lines are one', () => {
    const at = lookup(circuitOf(`${PLAIN}${CYCLE}while Go energise SOL1\n`));
    const control = decide(at, demandOf(at.step('Go.Out')!.actions, 'Go.Out'), situation({}, ['Go']));
    expect(control.twoVoices).toEqual([]);
  });
});

describe('valves that remember, settings by coil', () => {
  it('a detented valve stays where the last coil left it', () => {
    const text = PLAIN.replace('4/3, centre tandem, spring to centre', '4/2, detent');
    const at = lookup(circuitOf(`${text}${CYCLE}`));
    const back = decide(at, demandOf(at.step('Go.Back')!.actions, 'Go.Back'), situation());
    const detents = detentsAfter(at, back, { V1: 'a' });
    expect(detents).toEqual({ V1: 'b' });
    expect(standsOf(at, decide(at, NOTHING, situation()), detents)).toEqual({ V1: { position: 'b' } });
  });
  it('the one coil of a normally open valve moves it to the other position, whatever its letter', () => {
    const text = `${PLAIN}directional V0 (2/2, normally open, coil a SOL0, passes 5 L/min at 1 bar)\nplug V0.P, V0.A\ncycle Go {\n  step Load energise SOL0 for 1 s\n}\n`;
    const at = lookup(circuitOf(text));
    const control = decide(at, demandOf(at.step('Go.Load')!.actions, 'Go.Load'), situation());
    expect(standsOf(at, control, {}).V0).toEqual({ position: 'b' });
    expect(standsOf(at, decide(at, NOTHING, situation()), {}).V0).toEqual({ position: 'a' });
  });
  it('a coil on a relief commands its setting, in % or directly', () => {
    const text = `${PLAIN.replace('relief    RV1 (set 150 bar,', 'relief    RV1 (set 150 bar, coil SOL9,')}cycle Go {\n  step Half energise SOL9 at 50 % for 1 s\n  step Direct energise SOL9 at 80 bar for 1 s\n}\n`;
    const at = lookup(circuitOf(text));
    const of = (step: string) => commandsOf(at, decide(at, demandOf(at.step(step)!.actions, step), situation()));
    expect(of('Go.Half').SOL9).toBeCloseTo(75e5);
    expect(of('Go.Direct').SOL9).toBeCloseTo(80e5);
  });
});

describe('conditions', () => {
  const at = lookup(
    circuitOf(
      `${PLAIN}switch STOPPED (outside)\n${CYCLE}interlock SOL1 needs GUARD on and (LS1 on or STOPPED off)\ninterlock SOL2 needs GUARD on or STOPPED on\n`,
    ),
  );
  const [first, second] = at.circuit.interlocks.map((one) => one.needs);
  it('are not known where a part that decides is not known', () => {
    expect(holds(at, first!, situation({ GUARD: undefined, LS1: true }))).toBeUndefined();
    expect(holds(at, first!, situation({ GUARD: false, LS1: undefined }))).toBe(false);
  });
  it('need outside switches only where nothing else can do', () => {
    expect([...outsideNeeds(at, first!)]).toEqual([['GUARD', true]]);
    expect([...outsideNeeds(at, second!)]).toEqual([['GUARD', true]]);
    expect(onlyOutside(at, second!)).toBe(true);
    expect(onlyOutside(at, first!)).toBe(false);
  });
});

describe('the step chain', () => {
  const circuit = circuitOf(
    `${PLAIN}cycle Inner {\n  step Push energise SOL1 for 1 s\n  step Pull energise SOL2 for 1 s\n}\ncycle Go {\n  step Out energise SOL1 for 0.5 s and until PS1 on\n  meanwhile Beside for 2 s\n  step Twice run Inner 2 times\n  step Last for 1 s\n}\n`,
  );
  const at = lookup(circuit);
  const settle = (chain: Sequence, time: number, now: Situation) => {
    const seen: string[] = [];
    for (let change = chain.advance(time, now); change; change = chain.advance(time, now)) {
      seen.push(
        change.did === 'ended'
          ? `ended ${change.line.step.name}`
          : change.did === 'entered'
            ? `entered ${change.lines.map((one) => one.step.name).join('+')}`
            : 'finished',
      );
      if (change.did === 'finished') break;
    }
    return seen;
  };
  it('waits for both the time and the condition, and for every line', () => {
    const chain = new Sequence(at, at.cycle('Go')!);
    expect(settle(chain, 0, situation({ PS1: true }))).toEqual(['entered Out+Beside']);
    expect(settle(chain, 0.4, situation({ PS1: true }))).toEqual([]);
    expect(settle(chain, 0.5, situation({ PS1: true }))).toEqual(['ended Out']);
    expect([...chain.running()].sort()).toEqual(['Go', 'Go.Beside']);
    expect(settle(chain, 2, situation())).toEqual(['ended Beside', 'entered Twice', 'entered Push']);
  });
  it('runs another cycle as often as it says, one change at a time', () => {
    const chain = new Sequence(at, at.cycle('Go')!);
    settle(chain, 0, situation());
    settle(chain, 2, situation({ PS1: true }));
    const times: string[] = [];
    for (let time = 3; time <= 8; time += 1) times.push(`${time}: ${settle(chain, time, situation()).join(', ')}`);
    expect(times).toEqual([
      '3: ended Push, entered Pull',
      '4: ended Pull, entered Push',
      '5: ended Push, entered Pull',
      '6: ended Pull, ended Twice, entered Last',
      '7: ended Last, finished',
      '8: ',
    ]);
    expect(chain.finished).toBe(true);
  });
});
