/** Values, units, settings, valves, parts: what the text says and what is said about it. */
import { describe, expect, it } from 'vitest';
import { errors, fixed, read } from './support.ts';

const component = (text: string, id = 'X1') => read(text).circuit.components.find((candidate) => candidate.id === id);
const value = (text: string, name: string, id = 'X1') => component(text, id)?.properties.find((property) => property.name === name)?.value;
const si = (text: string, name: string) => {
  const found = value(text, name);
  return found?.type === 'quantity' ? found.q.si : undefined;
};

describe('numbers and units', () => {
  // 1 in = 0.0254 m exactly (international inch, 1959).
  it('fractions are lengths with a unit and shapes without one', () => {
    expect(si('cylinder X1 (bore 3/4 in)', 'bore')).toBeCloseTo(0.01905, 12);
    expect(si('cylinder X1 (bore 1 1/2 in)', 'bore')).toBeCloseTo(0.0381, 12);
    expect(component('directional X1 (4/3, centre closed)')?.shape).toMatchObject({ ports: 4, positions: 3 });
    expect(si('relief X1 (set 160 bar/2)', 'set')).toBeCloseTo(8e6, 3);
  });

  it('units with and without space, superscripts, degree sign', () => {
    expect(si('pump X1 (displacement 40cm³/rev)', 'displacement')).toBeCloseTo(40e-6 / (2 * Math.PI), 15);
    expect(si('fluid X1 (temperature 45°C)', 'temperature')).toBeCloseTo(318.15, 9);
    expect(si('fluid X1 (cold -10 degC)', 'cold')).toBeCloseTo(263.15, 9);
    expect(si('relief X1 (set 1000 psi)', 'set')).toBeCloseTo(6_894_757.29, 0);
  });

  it('absolute pressures convert by 1.01325 bar', () => expect(si('relief X1 (set 11.01325 bara)', 'set')).toBeCloseTo(1e6, 3));

  it('a tolerance in its own unit, in %, and written `+-`', () => {
    expect(value('relief X1 (set 160 bar ± 3 bar)', 'set')).toMatchObject({ plusMinus: 3e5 });
    expect(value('relief X1 (set 160 bar +- 5 %)', 'set')).toMatchObject({ plusMinus: 8e5 });
  });

  it('a missing unit, a wrong dimension, an unknown unit: at the characters, with a fix', () => {
    expect(errors('cylinder X1 (bore 63, stroke 5 bar, rod 36 mn)')).toEqual([
      'M07 `63` has no unit; a length is needed here @ 63',
      'M07 `5 bar` is a pressure; a length is needed here @ 5 bar',
      'M07 `mn` is no unit: did you mean `mm` @ mn',
    ]);
    expect(fixed('cylinder X1 (bore 63, stroke 5 mm)')).toBe('cylinder X1 (bore 63 mm, stroke 5 mm)');
    expect(fixed('cylinder X1 (bore 63 mn, stroke 5 mm)')).toBe('cylinder X1 (bore 63 mm, stroke 5 mm)');
    expect(errors('fluid X1 (grade 46, temperature 45 K)')).toEqual([
      'M07 `45 K` is a difference; a temperature is written in degC or degF @ 45 K',
    ]);
  });

  it('a decimal comma is said where it stands and mended', () => {
    expect(errors('check X1 (crack 0,5 bar)')).toEqual(['SYNTAX A comma ends a setting: write the decimal point @ ,5 bar']);
    expect(fixed('check X1 (crack 0,5 bar)')).toBe('check X1 (crack 0.5 bar)');
    expect(fixed('gauge X1 (range 0 bar to 3,000 psi)', 'Remove the comma')).toBe('gauge X1 (range 0 bar to 3000 psi)');
  });

  it('numbers beyond reason are refused', () => {
    expect(errors(`cylinder X1 (bore ${'9'.repeat(400)} mm, stroke 5 mm)`)).toEqual([
      expect.stringContaining('larger than any figure of the trade'),
    ]);
    expect(errors('let x = 1/0 bar')).toEqual([expect.stringContaining('fraction over zero')]);
    expect(errors('let x = 5 bar / (2 - 2)')).toEqual([expect.stringContaining('ivision by zero')]);
  });
});

describe('constants', () => {
  it('may be defined after use; sums, min, max, sqrt', () => {
    const text = 'relief X1 (set system - 10 bar)\nlet system = max(160 bar, base) + 5 bar\nlet base = 100 bar * sqrt(4)';
    expect(errors(text).filter((line) => !line.startsWith('M08'))).toEqual([]);
    expect(si(text, 'set')).toBeCloseTo(195e5, 3);
    expect(value(text, 'set')).toMatchObject({ from: ['system', 'base'] });
  });

  it('a sign after a word is a difference, after a small word or first in a setting it is a sign', () => {
    const text =
      'let hold = 180 bar\nswitch X1 (rises hold, falls hold - 15 bar)\npump X2 (inlet -0.15 bar)\nreservoir X3 (ambient -10 degC to 35 degC)';
    expect(si(text, 'falls')).toBeCloseTo(165e5, 3);
    expect(value(text, 'inlet', 'X2')).toMatchObject({ q: { si: -15000 } });
    expect(value(text, 'ambient', 'X3')).toMatchObject({ from: { si: 263.15 }, to: { si: 308.15 } });
  });

  it('a ring is one error, and what needs it is not known', () => {
    const text = 'let a1 = b1 + 1 bar\nlet b1 = a1\nrelief X1 (set a1, passes 5 L/min at 1 bar)';
    expect(errors(text)).toEqual([expect.stringContaining('in a ring')]);
    expect(read(text).circuit.unknown).toHaveProperty('X1');
  });

  it('an unknown constant has the nearest as its fix', () => {
    expect(fixed('let system = 160 bar\nrelief X1 (set sistem, passes 5 L/min at 1 bar)')).toContain('set system,');
  });
});

describe('settings', () => {
  it('unknown, doubled and missing ones', () => {
    expect(errors('relief X1 (sett 160 bar, passes 90 L/min at 6 bar, passes 9 L/min at 6 bar)')).toEqual([
      'M08 `X1` has no `set` @ X1',
      'VALUE `sett` is no setting of a pressure-relief valve: did you mean `set` @ sett',
      'VALUE `passes` is given twice @ passes',
    ]);
  });

  it('the fix for a missing setting writes it into the brackets', () => {
    expect(fixed('filter X1 (passes 9 L/min at 1 bar)')).toBe('filter X1 (passes 9 L/min at 1 bar, bypass 1.7 bar)');
    expect(fixed('coupling X1 "House"')).toBe('coupling X1 (seals both) "House"');
  });

  it('a required choice is exactly one', () => {
    expect(errors('divider X1 (gear, spool)')).toEqual([
      'VALUE `X1` has `gear` and `spool`: only one of `gear` or `spool` can hold @ spool',
    ]);
    expect(errors('divider X1')).toEqual(['M08 `X1` needs one of `gear` or `spool` @ X1']);
  });

  it('S1: what brings the spool back is required', () => {
    expect(errors('directional X1 (4/3, centre closed, coil a SOL1, passes 9 L/min at 1 bar)')).toEqual([
      expect.stringContaining('nothing says where the spool goes without current'),
    ]);
  });

  it('S10, S11, S12: gas and its temperature, relieving or not, bypass or none are required', () => {
    expect(errors('accumulator X1 (bladder, volume 1 L, precharge 90 bar, gas nitrogen)')).toEqual([
      expect.stringContaining('needs its gas temperature'),
    ]);
    expect(errors('reducing X1 (set 70 bar)')).toEqual(['M08 `X1` has no `relieving` @ X1']);
    expect(errors('filter X1 (passes 9 L/min at 1 bar)')).toEqual(['M08 `X1` has no `bypass` @ X1']);
    expect(value('filter X1 (passes 9 L/min at 1 bar, bypass none)', 'bypass')).not.toHaveProperty('crack');
  });

  it('a lost comma is said before the next setting, and both are read', () => {
    const text = 'cylinder X1 (bore 63 mm rod 36 mm, stroke 60 mm)';
    expect(errors(text)).toEqual(['SYNTAX A comma is missing before `rod` @ rod']);
    expect(si(text, 'rod')).toBeCloseTo(0.036, 12);
    expect(fixed(text)).toBe('cylinder X1 (bore 63 mm, rod 36 mm, stroke 60 mm)');
  });

  it('`?` is a value to be found: the component waits for it', () => {
    const text = 'cylinder X1 (bore ?, stroke 60 mm)';
    expect(errors(text)).toEqual([]);
    expect(value(text, 'bore')).toMatchObject({ type: 'wanted', dimension: 'length' });
    expect(read(text).circuit.unknown.X1).toContain('to be found');
    expect(read('drive X1 (power ?, speed 1450 rpm)').circuit.unknown).toEqual({});
  });

  it('impossible figures: rod as thick as the bore, drop below cracking, nothing at all', () => {
    expect(errors('cylinder X1 (bore 36 mm, rod 36 mm, stroke 60 mm)')).toEqual([expect.stringContaining('as thick as the bore')]);
    expect(errors('check X1 (crack 3 bar, passes 9 L/min at 2 bar)')).toEqual([expect.stringContaining('cracking included')]);
    expect(errors('cylinder X1 (bore 0 mm, stroke 60 mm)')).toEqual([expect.stringContaining('must be above zero')]);
  });

  it('the opening of a throttle is a part of what it passes', () => {
    expect(errors('throttle X1 (orifice 1 mm, opening 40 %)')).toEqual([expect.stringContaining('it needs `passes`')]);
    expect(errors('throttle X1 (passes 20 L/min at 5 bar, opening 40 %)')).toEqual([]);
  });

  it('rated may name a port', () => {
    const rated = component(
      'directional X1 (3/2, spring to b, passes 9 L/min at 1 bar, rated 315 bar, rated T 160 bar)',
    )?.properties.filter((property) => property.name === 'rated');
    expect(rated?.map((property) => property.port)).toEqual([undefined, 'T']);
    expect(errors('check X1 (rated in 160 bar)')).toEqual([]);
    expect(errors('check X1 (rated Q 160 bar)')).toEqual([expect.stringContaining('no port `Q`')]);
  });
});

describe('directional valves', () => {
  const paths = (text: string, name: string) => {
    const found = value(text, name);
    return found?.type === 'position' ? found.paths.map((path) => `${path.from}${path.to}`) : undefined;
  };

  it('usual positions by shape', () => {
    const four = 'directional X1 (4/3, centre tandem, spring to centre, passes 9 L/min at 1 bar)';
    expect([paths(four, 'a'), paths(four, 'b'), paths(four, 'centre')]).toEqual([['PA', 'BT'], ['PB', 'AT'], ['PT']]);
    const three = 'directional X1 (3/2, normally closed, coil a S1, passes 9 L/min at 1 bar)';
    expect([paths(three, 'a'), paths(three, 'b')]).toEqual([['PA'], ['AT']]);
    const two = 'directional X1 (2/2, normally open, coil a S1, passes 9 L/min at 1 bar)';
    expect([paths(two, 'a'), paths(two, 'b')]).toEqual([['PA'], []]);
  });

  it('own positions, paths with their own loss, float and open centres', () => {
    expect(paths('directional X1 (3/2, spring to b, a (A to P), b (A to T), passes 9 L/min at 1 bar)', 'a')).toEqual(['AP']);
    expect(paths('directional X1 (4/3, centre float, spring to centre, passes 9 L/min at 1 bar)', 'centre')).toEqual(['AT', 'BT']);
    expect(paths('directional X1 (4/3, centre (), spring to centre, passes 9 L/min at 1 bar)', 'centre')).toEqual([]);
    expect(paths('directional X1 (4/3, centre open, spring to centre, passes 9 L/min at 1 bar)', 'centre')).toContain('PT');
    expect(
      value('directional X1 (4/3, centre (A to T passes 2 L/min at 5 bar), spring to centre, passes 9 L/min at 1 bar)', 'centre'),
    ).toMatchObject({ paths: [{ passes: { drop: { si: 5e5 } } }] });
  });

  it('a centre where there is none, and none where there is one', () => {
    expect(errors('directional X1 (4/2, centre closed, detent, passes 9 L/min at 1 bar)')).toEqual([
      expect.stringContaining('two positions has no centre'),
    ]);
    expect(errors('directional X1 (4/3, spring to centre, passes 9 L/min at 1 bar)')).toEqual([
      expect.stringContaining('nothing says what the centre joins'),
    ]);
    expect(errors('directional X1 (4/2, spring to centre, passes 9 L/min at 1 bar)')).toEqual([
      expect.stringContaining('no centre to spring to'),
    ]);
    expect(errors('directional X1 (4/2, normally open, passes 9 L/min at 1 bar)')).toEqual([
      expect.stringContaining('words for 2/2 and 3/2'),
    ]);
    expect(errors('directional X1 (5/9, detent, passes 9 L/min at 1 bar)')[0]).toContain('There is no valve `5/9`');
  });

  it('coils: side, voltage, signed command, one a side', () => {
    expect(
      read('directional X1 (4/3, centre closed, spring to centre, coil a SOL1 24 V, coil b SOL2, passes 9 L/min at 1 bar)').circuit.coils,
    ).toMatchObject([
      { id: 'SOL1', component: 'X1', side: 'a', voltage: 24 },
      { id: 'SOL2', side: 'b' },
    ]);
    expect(
      read('directional X1 (4/3, proportional, centre closed, spring to centre, coil Y1, passes 9 L/min at 1 bar)').circuit.coils[0],
    ).not.toHaveProperty('side');
    expect(errors('directional X1 (4/3, centre closed, spring to centre, coil Y1, passes 9 L/min at 1 bar)')).toEqual([
      expect.stringContaining('needs the side its coil shifts to'),
    ]);
    expect(errors('directional X1 (4/3, centre closed, spring to centre, coil a Y1, coil a Y2, passes 9 L/min at 1 bar)')).toEqual([
      expect.stringContaining('coil on side `a` already'),
    ]);
  });

  it('only ports of the shape in paths', () => {
    expect(errors('directional X1 (3/2, spring to b, a (P to B), passes 9 L/min at 1 bar)')[0]).toContain('no port `B`');
  });
});

describe('parts and twins', () => {
  it('own settings override, a choice of the part gives way as a whole', () => {
    const text =
      'part directional Four (4/3, centre closed, spring to centre, passes 80 L/min at 5 bar)\ndirectional X1 as Four (detent, passes 40 L/min at 7 bar, coil a S1)';
    expect(errors(text)).toEqual([]);
    const names = component(text)?.properties.map((property) => property.name) ?? [];
    expect(names.filter((name) => name === 'spring' || name === 'passes')).toEqual(['passes']);
    expect(value(text, 'passes')).toMatchObject({ drop: { si: 7e5 } });
    expect(component(text)?.properties.find((property) => property.name === 'centre')?.part).toBe('Four');
    expect(component(text)).toMatchObject({ part: 'Four', shape: { ports: 4 } });
  });

  it('a part of another kind, a missing part, a part of itself', () => {
    expect(errors('part check NR (crack 1 bar)\nrelief X1 as NR (set 5 bar, passes 9 L/min at 1 bar)')).toEqual([
      expect.stringContaining('is a part of the kind `check`'),
    ]);
    expect(fixed('part check NonReturn (crack 1 bar)\ncheck X1 as NonRetrun')).toContain('check X1 as NonReturn');
    expect(errors('part check P1 as P1\ncheck X1 as P1')).toEqual([expect.stringContaining('defined through itself')]);
  });

  it('A17: twins are alike, and cannot share a coil', () => {
    expect(read('relief X1, X2 (set 5 bar, passes 9 L/min at 1 bar)').circuit.components.map((each) => each.id)).toEqual(['X1', 'X2']);
    expect(errors('directional X1, X2 (2/2, normally open, coil a S1, passes 9 L/min at 1 bar)')[0]).toContain(
      'would be the coil of 2 valves',
    );
  });

  it('L7, L12: names after the older ISO 1219 code; words of the notation are no names', () => {
    expect(component('gauge 1S3', '1S3')).toBeDefined();
    expect(errors('working a: X1 to X2\ngauge X1\ngauge X2')[0]).toBe('NAME `a` is a word of the notation and cannot be a name @ a');
    expect(errors('gauge step')[0]).toContain('cannot be a name');
    expect(errors('gauge at')[0]).toContain('cannot be a name');
  });

  it('one name stands for one thing', () => {
    expect(errors('gauge X1\nlet X1 = 5 bar')).toEqual(['NAME The name `X1` is given twice: it is a component already @ X1']);
  });
});
