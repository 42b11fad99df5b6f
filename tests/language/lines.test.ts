/** Lines: natural ports, chains, nets, open ports, plugs, functions of lines. */
import { describe, expect, it } from 'vitest';
import { errors, fixed, read } from './support.ts';

const BASE = `reservoir R1 (volume 40 L)
drive M1 (power 3 kW, speed 1450 rpm)
pump P1, P2 (displacement 8 cm3/rev, driven by M1)
relief RV1, RV2 (set 125 bar, passes 20 L/min at 4 bar)
check CV1, CV2 (crack 0.5 bar)
throttle FC1 (set 5 L/min)
deceleration DV1 (closed by C1 from 10 mm to 20 mm, passes 9 L/min at 1 bar)
filter F1 (passes 40 L/min at 0.3 bar, bypass 1.7 bar)
pilotcheck PC1 (ratio 4:1)
gauge G1, G2 (range 0 bar to 250 bar)
cylinder C1 (bore 80 mm, rod 50 mm, stroke 1200 mm)
directional V1 (4/3, centre closed, spring to centre, coil a SOL1, coil b SOL2, passes 9 L/min at 1 bar)
`;
const nets = (lines: string) =>
  read(BASE + lines)
    .circuit.nets.filter((net) => net.pieces.length > 0)
    .map(
      (net) =>
        `${net.id}: ${net.ports.map((port) => `${port.component}.${port.port}`).join(' ')}${net.reservoir === undefined ? '' : ` ${net.reservoir}`}`,
    );
const wrong = (lines: string) => errors(BASE + lines);

describe('natural ports', () => {
  it('exit at the start, entrance at the end, passed through in the middle, in reading direction', () => {
    expect(nets('working P1 to CV1 to FC1 to V1.P')).toEqual(['P1.P: P1.P CV1.in', 'CV1.out: CV1.out FC1.in', 'FC1.out: FC1.out V1.P']);
  });

  it('A1: several in the middle are in parallel', () => {
    expect(nets('working C1.rod to FC1, DV1 to V1.B')).toEqual(['C1.rod: C1.rod FC1.in DV1.in', 'FC1.out: FC1.out DV1.out V1.B']);
  });

  it('a relief is P where a line comes to it and T where one starts', () => {
    expect(nets('working P1 to RV1\nreturn RV1 to R1')).toEqual(['P1.P: P1.P RV1.P', 'RV1.T: RV1.T R1']);
  });

  it('what cannot be passed through is said', () => {
    expect(wrong('return V1.T to R1 to F1')).toEqual([expect.stringContaining('CHAIN The reservoir `R1` cannot be passed through')]);
    expect(wrong('working P1 to RV1 to V1.P')).toEqual([expect.stringContaining('`RV1` cannot be passed through')]);
    expect(wrong('working P1 to V1.P to C1.cap')).toEqual([expect.stringContaining('The port `V1.P` cannot be passed through')]);
    expect(wrong('working low: P1 to V1.P\nworking P2 to low to C1.cap')).toEqual([
      expect.stringContaining('The line `low` cannot be passed through'),
    ]);
  });

  it('S13: kinds with a load side are never passed through: both sides are written', () => {
    expect(wrong('working V1.A to PC1 to C1.cap')).toEqual([
      expect.stringContaining('`PC1` is never passed through: write the ports on both sides, `PC1.V`'),
    ]);
    expect(wrong('working V1.A to PC1')).toEqual([expect.stringContaining('PORT `PC1` has no natural port: write `PC1.V`')]);
    expect(fixed(`${BASE}working V1.A to PC1`, 'Write `PC1.C`')).toContain('V1.A to PC1.C');
  });

  it('A3: each natural port once; a second time needs the port or the name of the line', () => {
    expect(wrong('working P1 to RV1\nworking P1 to V1.P')).toEqual([
      'PORT `P1.P` is taken already: without a port, `P1` stands for it once @ P1',
    ]);
    expect(fixed(`${BASE}working P1 to RV1\nworking P1 to V1.P`)).toContain('working P1.P to V1.P');
    expect(wrong('working P1 to RV1\nworking P1.P to V1.P')).toEqual([]);
    expect(wrong('working out: P1 to RV1\nworking out to V1.P')).toEqual([]);
  });

  it('the cap of a single-acting cylinder is natural', () => {
    expect(
      errors('pump P1\ncylinder C9 (bore 80 mm, single cap, stroke 1 m)\nworking P1 to C9').filter((line) => line.startsWith('PORT')),
    ).toEqual([]);
  });

  it('what has no ports, what is no component, what is not there', () => {
    expect(wrong('working P1 to M1')).toEqual([expect.stringContaining('`M1` has no ports')]);
    expect(wrong('let x = 5 bar\nworking P1 to x')).toEqual([
      expect.stringContaining('`x` is a constant: a line joins components and lines'),
    ]);
    expect(wrong('working P1 to RV1, PC2.V')).toEqual(['NAME `PC2` is not declared: did you mean `PC1` @ PC2']);
    expect(wrong('working P1 to V1.Q')).toEqual([expect.stringContaining('PORT `V1` has no port `Q`: it has `P`, `T`, `A`, `B`')]);
    expect(wrong('working P1 to V1.')).toEqual([expect.stringContaining('A port of `V1` is missing after the dot')]);
    expect(wrong('working P1')).toEqual([expect.stringContaining('This line leads nowhere')]);
  });

  it('after a dot any word is a port', () => {
    expect(nets('suction R1 to CV1.in')).toEqual(['CV1.in: CV1.in R1']);
  });
});

describe('nets', () => {
  it('every pipe to a reservoir is a net of its own', () => {
    expect(nets('suction R1 to P1\nsuction R1 to P2\nreturn RV1, RV2 to R1')).toEqual([
      'P1.S: P1.S R1',
      'P2.S: P2.S R1',
      'RV1.T: RV1.T RV2.T R1',
    ]);
  });

  it('a named line is one net with what names it, before or after', () => {
    expect(nets('pilot low to V1.X\nworking low: P1 to RV1')).toEqual(['low: V1.X P1.P RV1.P']);
  });

  it('the name of a chain names its first piece', () => {
    expect(nets('return low: V1.T to F1 to R1\nreturn low to CV1')).toEqual(['low: V1.T F1.in CV1.in', 'F1.out: F1.out R1']);
  });

  it('a piece with bore and length lies between two nets, one with bore alone in one', () => {
    expect(nets('working V1.A to C1.cap (bore 12 mm, length 2 m)')).toEqual(['V1.A: V1.A', 'C1.cap: C1.cap']);
    expect(nets('working V1.A to C1.cap (bore 12 mm)')).toEqual(['V1.A: V1.A C1.cap']);
    const { pieces } = read(`${BASE}working V1.A to C1.cap (hose, bore 12 mm, length 2 m, rated 210 bar, bends 4, shielded)`).circuit;
    expect(pieces).toMatchObject([
      { id: 'line:0.0', nets: ['V1.A', 'C1.cap'], joint: 'hose', bore: 0.012, length: 2, rated: 21e6, bends: 4, shielded: true },
    ]);
  });

  it('A2: length needs one piece with two ends', () => {
    expect(wrong('working P1 to RV1, V1.P (bore 12 mm, length 2 m)')).toEqual([
      expect.stringContaining('`length` needs one piece with two ends'),
    ]);
    expect(wrong('return V1.T to F1 to R1 (bore 12 mm, length 2 m)')).toEqual([
      expect.stringContaining('`length` needs one piece with two ends'),
    ]);
  });

  it('a pipe to a reservoir with a loss of its own', () => {
    expect(nets('suction R1 to P1 (bore 30 mm, length 1 m)')).toEqual([
      expect.stringMatching(/^R1 line:0\.0: R1$|^R1 line:0.0: {2}R1$/),
      'P1.S: P1.S',
    ]);
  });

  it('a required port that nothing joins is an open net; an optional one is none', () => {
    const open = read(`${BASE}working P1 to RV1`)
      .circuit.nets.filter((net) => net.open === true)
      .map((net) => net.id);
    expect(open).toContain('P1.S');
    expect(open).toContain('V1.P');
    expect(open).not.toContain('P1.P');
    expect(open).not.toContain('P1.LS');
  });

  it('a plug says that it is meant', () => {
    const { nets: all } = read(`${BASE}plug V1.P, C1.rod`).circuit;
    expect(all.find((net) => net.id === 'V1.P')).toMatchObject({ plugged: expect.anything() });
    expect(all.find((net) => net.id === 'V1.P')).not.toHaveProperty('open');
    expect(wrong('plug P1.P\nworking P1 to RV1')).toEqual([expect.stringContaining('`P1.P` is plugged, but a line leads to it')]);
    expect(wrong('plug V1')).toEqual([expect.stringContaining('A plug closes one port')]);
  });
});

describe('functions of lines', () => {
  it('pilot ports on pilot, drains on drain, suction ports on suction', () => {
    expect(wrong('working P1 to PC1.X')).toEqual(['PORT `PC1.X` is a pilot port; it stands on a `working` line @ PC1.X']);
    expect(wrong('working R1 to P1')).toEqual([expect.stringContaining('`P1.S` is a suction port')]);
    expect(wrong('return P1.L to R1')).toEqual([expect.stringContaining('`P1.L` is a drain port')]);
    expect(wrong('relief RV9 (set 9 bar, piloted, passes 9 L/min at 1 bar)\npilot RV9.X to V1.P')).toEqual([]);
  });

  it('T may stand on a working line (regeneration, cross-port)', () => expect(wrong('working V1.T to C1.rod')).toEqual([]));

  it('S17: a check or prefill valve in a suction line is no error', () => expect(wrong('suction R1 to CV1, PC1.V')).toEqual([]));
});
