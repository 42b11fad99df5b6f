/** Parts from other files, assemblies and their units. */
import { describe, expect, it } from 'vitest';
import { circuitText, errors, fixed, read, said } from './support.ts';

const shelf = circuitText('power-unit.oilway');

describe('assemblies', () => {
  it('a body is read with its parameters and ports: what is wrong in it is said in it', () => {
    expect(errors(shelf.replace('set system', 'set sistem'))).toEqual(['NAME `sistem` is not declared: did you mean `system` @ sistem']);
    expect(errors(shelf.replace('power motor_power', 'power displacement'))).toEqual([
      expect.stringContaining('is a displacement; a power is needed here'),
    ]);
    expect(errors(shelf.replace('working CV1 to P', 'working CV1 to Q'))).toEqual([expect.stringContaining('NAME `Q` is not declared')]);
    expect(errors(shelf.replace('SOL0 needs', 'SOL9 needs'))).toEqual([
      expect.stringContaining('NAME `SOL9` is not declared: did you mean `SOL0`'),
    ]);
  });

  it('what a file says of its own parts is said once', () => {
    expect(errors(shelf.replace('crack 0.5 bar', 'crack 0.5 mm')).length).toBe(1);
  });

  it('the names of a body begin with its own', () => {
    const ids = read(shelf).symbols.declarations.map((declaration) => declaration.id);
    expect(ids).toContain('PowerUnit.RV1');
    expect(ids).toContain('PowerUnit.SOL0');
    expect(ids).not.toContain('RV1');
    expect(ids.filter((id) => id === 'NonReturn').length).toBe(1);
  });

  it('a unit is made of an assembly', () => {
    expect(errors(`${shelf}\nunit U1 as PowerUint`)).toEqual(['NAME `PowerUint` is not declared: did you mean `PowerUnit` @ PowerUint']);
    expect(fixed(`${shelf}\nunit U1 as PowerUint`)).toContain('as PowerUnit\n'.trim());
    expect(errors(`${shelf}\nunit U1 as NonReturn`)).toEqual([
      expect.stringContaining('`NonReturn` is a part; a unit is made of an assembly'),
    ]);
  });

  it('what may stand in a file that is used is not called missing', () => {
    expect(
      errors('use "shelf.oilway"\ncheck CV1 as NonReturn\nunit U1 as Power\nrelief RV1 (set system, passes 9 L/min at 1 bar)'),
    ).toEqual([]);
    expect(read('use "shelf.oilway"\ncheck CV1 as NonReturn').circuit.unknown.CV1).toContain('stands in another file');
    expect(errors('check CV1 as NonReturn').length).toBe(1);
  });

  it('that units are not computed is said at each statement', () => {
    expect(said(circuitText('11-two-units.oilway')).map((one) => one.replace(/^NOT-COMPUTED Not resolved yet: /, ''))).toEqual([
      '`use` reads no other file; names that may stand there are not looked for @ use "power-unit.oilway"',
      expect.stringMatching(/^units of an assembly are not computed @ unit +U1 /),
      expect.stringMatching(/^units of an assembly are not computed @ unit +U2 /),
    ]);
    expect(read(circuitText('11-two-units.oilway')).circuit.notComputed).toHaveLength(3);
  });
});
