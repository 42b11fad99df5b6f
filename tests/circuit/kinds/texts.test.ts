/** Every kind says what it is; the ports are those of the very component. */
import { KIND_NAMES, KINDS, LINE_PROPERTIES, LOAD_PROPERTIES } from '@oilway/circuit';
import { expect, test } from 'vitest';
import { circuitOf } from '../support/text.ts';

test.each([...KIND_NAMES])('%s: every text is there, and every word is its own', (name) => {
  const kind = KINDS[name];
  expect(kind.name).toBe(name);
  expect(kind.about.length).toBeGreaterThan(10);
  for (const part of [...kind.ports, ...kind.properties]) expect(part.about, `${name} ${part.name}`).toMatch(/^[A-Z`].*\.$/);
  expect(new Set(kind.properties.map((p) => p.name)).size).toBe(kind.properties.length);
  for (const group of kind.groups) for (const member of group.of) expect(kind.properties.some((p) => p.name === member)).toBe(true);
  for (const p of kind.properties) expect(p.example.startsWith(p.name), `${name} ${p.name}: ${p.example}`).toBe(true);
  expect(kind.assemble, `${name} is computed`).toBeDefined();
});

test('lines and loads have texts too', () => {
  for (const p of [...LINE_PROPERTIES, ...LOAD_PROPERTIES]) expect(p.about.length, p.name).toBeGreaterThan(5);
});

const component = (text: string) => {
  const c = circuitOf(`fluid HM46 (grade 46, temperature 45 degC)\n${text}`).components[1];
  if (c === undefined) throw new Error('no component');
  return c;
};
const portsOf = (text: string): readonly string[] => {
  const c = component(text);
  const kind = KINDS[c.kind];
  return (kind.portsOf?.(c) ?? kind.ports).map((p) => p.name);
};

test.each([
  ['directional V1 (2/2, normally open, coil SOL1, passes 5 L/min at 1 bar)', ['P', 'A', 'X', 'Y', 'LS']],
  ['directional V1 (3/2, normally open, coil SOL1, passes 5 L/min at 1 bar)', ['P', 'T', 'A', 'X', 'Y', 'LS']],
  ['directional V1 (4/2, detent, coil a SOL1, coil b SOL2, passes 5 L/min at 1 bar)', ['P', 'T', 'A', 'B', 'X', 'Y', 'LS']],
  ['cylinder C1 (bore 50 mm, rod 28 mm, stroke 100 mm)', ['cap', 'rod']],
  ['cylinder C1 (bore 50 mm, stroke 100 mm)', ['cap']],
  ['cylinder C1 (bore 50 mm, rod 28 mm, single rod, stroke 100 mm)', ['rod']],
  ['gauge G1 (range 0 bar to 250 bar)', ['P']],
  ['switch PS1 (rises 60 bar)', ['P']],
  ['switch START (outside)', []],
  ['sequence SV1 (set 60 bar, internal drain)', ['P', 'A', 'X']],
  ['relief RV1 (set 60 bar, passes 20 L/min at 2 bar)', ['P', 'T', 'Y']],
  ['relief RV1 (set 60 bar, piloted, passes 20 L/min at 2 bar)', ['P', 'T', 'X', 'Y']],
])('%s', (text, ports) => {
  const names = portsOf(text);
  expect([...names].sort()).toEqual([...ports].sort());
});

test('the only port of a single-acting cylinder is its natural one', () => {
  const c = component('cylinder C1 (bore 50 mm, single cap, stroke 100 mm)');
  expect(KINDS.cylinder.chainOf?.(c)).toEqual({ how: 'fixed', port: 'cap' });
  const s = component('switch START (outside)');
  expect(KINDS.switch.chainOf?.(s)).toEqual({ how: 'none' });
});
