/** The guard graph by itself: classes of ways, reach, guards, ratings. */
import { KINDS } from '@oilway/circuit';
import { EDGES, graphOf, guardsOf, guardsReached, ifOpened, openAlways, ratingOf, throughValves, waysFrom, wayWords } from '@oilway/rules';
import { describe, expect, it } from 'vitest';
import { check, SOUND } from './support.ts';

/** A pump P1, what is given between it and the net `out`, and a relief RV1 on `out`. */
function between(declared: string, line: string): { readonly sure: boolean; readonly perhaps: boolean } {
  const text = `circuit Bench
fluid HM46 (grade 46, temperature 45 degC)
reservoir R1 (volume 60 L)
drive M1 (power 3 kW, speed 1450 rpm)
pump P1 (displacement 8 cm3/rev, driven by M1)
relief RV1 (set 100 bar, passes 20 L/min at 4 bar)
${declared}
suction R1 to P1
${line}
return RV1 to R1
`;
  const { circuit, language } = check(text);
  expect(language.filter((f) => f.severity === 'error').map((f) => f.what)).toEqual([]);
  const graph = graphOf(circuit);
  const outlet = graph.netAt('P1', 'P')!.id;
  const has = (passing: typeof openAlways) => guardsReached(graph, outlet, passing).some((r) => r.guard.component.id === 'RV1');
  return { sure: has(openAlways), perhaps: has(ifOpened) };
}

describe('classes of ways, in the direction oil would go', () => {
  const through = (declared: string, inlet: string, outlet: string, more = '') =>
    between(declared, `working P1 to ${inlet}\nworking ${outlet} to RV1\n${more}`);
  const SURE = { sure: true, perhaps: true };
  const CLOSABLE = { sure: false, perhaps: true };
  const NEVER = { sure: false, perhaps: false };

  it.each([
    ['check, free direction', 'check CV1', 'CV1.in', 'CV1.out', SURE],
    ['check, against the seat', 'check CV1', 'CV1.out', 'CV1.in', NEVER],
    ['pilot-operated check, V to C', 'pilotcheck PC1 (ratio 3:1)', 'PC1.V', 'PC1.C', SURE],
    ['pilot-operated check, C to V', 'pilotcheck PC1 (ratio 3:1)', 'PC1.C', 'PC1.V', NEVER],
    ['counterbalance, V to C', 'counterbalance CB1 (set 90 bar, ratio 3:1)', 'CB1.V', 'CB1.C', SURE],
    ['counterbalance, C to V', 'counterbalance CB1 (set 90 bar, ratio 3:1)', 'CB1.C', 'CB1.V', NEVER],
    ['shut-off open, locked', 'shutoff BV1 (open, locked)', 'BV1.A', 'BV1.B', SURE],
    ['shut-off open, locked, backwards', 'shutoff BV1 (open, locked)', 'BV1.B', 'BV1.A', SURE],
    ['shut-off open', 'shutoff BV1 (open)', 'BV1.A', 'BV1.B', CLOSABLE],
    ['shut-off closed: could be opened by hand', 'shutoff BV1 (closed)', 'BV1.A', 'BV1.B', CLOSABLE],
    ['filter with bypass', 'filter F1 (passes 60 L/min at 1 bar, bypass 3 bar)', 'F1.in', 'F1.out', SURE],
    ['filter without bypass', 'filter F1 (passes 60 L/min at 1 bar, bypass none)', 'F1.in', 'F1.out', CLOSABLE],
    ['filter backwards', 'filter F1 (passes 60 L/min at 1 bar, bypass 3 bar)', 'F1.out', 'F1.in', CLOSABLE],
    ['cooler', 'cooler K1 (power 0.1 kW/K)', 'K1.in', 'K1.out', SURE],
    ['throttle', 'throttle FC1 (set 5 L/min)', 'FC1.in', 'FC1.out', SURE],
    ['throttle commanded by a coil', 'throttle FC1 (passes 20 L/min at 5 bar, coil SOL1)', 'FC1.in', 'FC1.out', CLOSABLE],
    [
      'throttle with reverse check, backwards',
      'throttle FC1 (passes 20 L/min at 5 bar, coil SOL1, reverse check)',
      'FC1.out',
      'FC1.in',
      SURE,
    ],
    ['quick coupling', 'coupling Q1 (seals both)', 'Q1.A', 'Q1.B', CLOSABLE],
    ['hose-burst valve', 'burst HB1 (closes 20 L/min)', 'HB1.V', 'HB1.C', CLOSABLE],
    [
      'directional valve in its sprung position',
      'directional V1 (2/2, normally open, coil a SOL1, passes 20 L/min at 2 bar)',
      'V1.P',
      'V1.A',
      CLOSABLE,
    ],
    [
      'directional valve, against the drawing',
      'directional V1 (2/2, normally open, coil a SOL1, passes 20 L/min at 2 bar)',
      'V1.A',
      'V1.P',
      CLOSABLE,
    ],
  ] as const)('%s', (_, declared, inlet, outlet, expected) => {
    expect(through(declared, inlet, outlet)).toEqual(expected);
  });

  it.each([
    ['sequence valve', 'sequence SV1 (set 60 bar)', 'SV1.P', 'SV1.A', CLOSABLE],
    ['sequence valve backwards', 'sequence SV1 (set 60 bar)', 'SV1.A', 'SV1.P', NEVER],
    ['sequence valve with reverse check, backwards', 'sequence SV1 (set 60 bar, reverse check)', 'SV1.A', 'SV1.P', SURE],
    ['reducing valve', 'reducing SV1 (set 60 bar, relieving yes)', 'SV1.P', 'SV1.A', CLOSABLE],
    ['reducing valve with reverse check, backwards', 'reducing SV1 (set 60 bar, relieving yes, reverse check)', 'SV1.A', 'SV1.P', SURE],
  ] as const)('%s', (_, declared, inlet, outlet, expected) => {
    expect(through(declared, inlet, outlet, 'drain SV1.Y to R1')).toEqual(expected);
  });

  it('every kind has its line in the table', () => {
    expect(Object.keys(EDGES).sort()).toEqual(Object.keys(KINDS).sort());
  });

  it('ways name only ports of their kind', () => {
    for (const { text } of SOUND) {
      for (const component of check(text).circuit.components) {
        const kind = KINDS[component.kind];
        const ports = (kind.portsOf?.(component) ?? kind.ports).map((p) => p.name);
        for (const edge of EDGES[component.kind](component)) {
          expect([...ports, 'T'], component.id).toContain(edge.from);
          expect([...ports, 'T'], component.id).toContain(edge.to);
          expect(edge.class === 'always' || (edge.words ?? '') !== '', `${component.id} says why`).toBe(true);
        }
      }
    }
  });
});

describe('reach', () => {
  const { circuit } = check(SOUND.find((s) => s.name.startsWith('05'))!.text);
  const graph = graphOf(circuit);
  const outlet = (pump: string) => graph.netAt(pump, 'P')!.id;

  it('the low-pressure pump reaches the high-pressure line, not the other way round', () => {
    expect(waysFrom(graph, outlet('P1'), openAlways).has(outlet('P2'))).toBe(true);
    expect(waysFrom(graph, outlet('P2'), openAlways).has(outlet('P1'))).toBe(false);
    expect(waysFrom(graph, outlet('P2'), throughValves).has(outlet('P1'))).toBe(false);
  });

  it('witness paths name what the oil passes, in its direction', () => {
    const cap = graph.netAt('C1', 'cap')!.id;
    expect(wayWords(waysFrom(graph, outlet('P1'), throughValves).get(cap)!)).toBe('CV1, V1 (P to A)');
  });

  it('a way stands in one position of a valve only, and ends in the reservoir', () => {
    const ways = waysFrom(graph, outlet('P2'), throughValves);
    for (const way of ways.values()) {
      const valves = way.edges.filter((e) => e.kind === 'directional').map((e) => e.component);
      expect(new Set(valves).size).toBe(valves.length);
      for (const edge of way.edges.slice(0, -1)) expect(graph.net(edge.target)!.reservoir).toBeUndefined();
    }
  });
});

describe('guards and ratings', () => {
  it('a relief counts only with a sure way to the reservoir', () => {
    const text = SOUND.find((s) => s.name.startsWith('02'))!.text;
    const sound = graphOf(check(text).circuit);
    expect(guardsOf(sound).guards.map((g) => g.component.id)).toEqual(['RV1']);
    const plugged = graphOf(check(text.replace('return  RV1 to R1', 'plug RV1.T')).circuit);
    expect(guardsOf(plugged).guards).toEqual([]);
    expect(guardsOf(plugged).rejected.map((r) => r.why.cause)).toEqual(['plugged']);
  });

  it('the rating of a net is that of its weakest part: port, component or line', () => {
    const text = SOUND.find((s) => s.name.startsWith('02'))!.text;
    const graph = graphOf(check(text).circuit);
    const rating = (component: string, port: string) => ratingOf(graph, graph.netAt(component, port)!.id);
    expect(rating('C1', 'cap')).toMatchObject({ value: 250e5, of: 'C1' });
    expect(rating('V2', 'T')).toMatchObject({ value: 315e5, of: 'V2.T' });
    expect(rating('F1', 'in')).toBeUndefined();
    const weak = graphOf(
      check(text.replace('working V1.A to C1.cap, PS1 (bore 20 mm, rated 250 bar)', 'working V1.A to C1.cap, PS1 (hose, rated 160 bar)'))
        .circuit,
    );
    expect(ratingOf(weak, weak.netAt('C1', 'cap')!.id)).toMatchObject({ value: 160e5, of: 'the line' });
  });
});
