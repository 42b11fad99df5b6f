/** Slips of the keyboard that once were told badly, or not at all. */
import { describe, expect, it } from 'vitest';
import { said } from './support.ts';

const PUMP = 'drive M1 (power 3 kW, speed 1450 rpm)\npump P1 (displacement 8 cm3/rev, driven by M1)\n';
const findings = (text: string) => said(text).filter((one) => !/H14|NAME `C1`/.test(one));

describe('slips', () => {
  it('a unit that goes on behind its stroke is a unit that is none, also beside `use`', () => {
    const line = 'check CV1 (passes 30 L/mn at 3 bar)';
    const told = expect.stringMatching(/^M07 `L\/mn` is no unit: did you mean `L\/min` @ L\/mn$/);
    expect(findings(line)).toEqual(expect.arrayContaining([told]));
    expect(findings(`use "shelf.oilway"\n${line}`)).toEqual(expect.arrayContaining([told]));
  });

  it('a division by a constant stays a division', () => {
    expect(findings('let n = 2\nlet half = 160 bar/n')).toEqual([]);
  });

  it('a size asked for is said to be not computed yet', () => {
    expect(findings(PUMP.replace('power 3 kW', 'power ?'))).toEqual([
      expect.stringContaining('NOT-COMPUTED Not computed yet: `power ?` of M1'),
    ]);
  });

  it('a misspelt word of the control has its neighbour', () => {
    const text = 'cylinder C1 (bore 63 mm, stroke 200 mm)\ncycle Go {\n  step Out for 1 s and until C1 extnded\n}';
    expect(said(text)).toEqual(expect.arrayContaining([expect.stringContaining('did you mean `extended` @ extnded')]));
  });

  it('a decimal comma is named', () => {
    const text = 'cylinder C1 (bore 63 mm, stroke 200 mm)\nrequire C1 speed at least 0,5 m/s';
    expect(said(text)).toEqual(expect.arrayContaining([expect.stringContaining('SYNTAX A number has a decimal point, not a comma')]));
  });
});
