/** What the positions of a directional valve join: declared, or as the shape has it. */
import { type Component, read } from '@oilway/circuit';

export type Position = 'a' | 'b' | 'centre';
export interface ValvePath {
  readonly from: string;
  readonly to: string;
}

const NAMED: Readonly<Record<string, readonly ValvePath[]>> = {
  closed: [],
  open: [
    { from: 'P', to: 'T' },
    { from: 'P', to: 'A' },
    { from: 'P', to: 'B' },
    { from: 'A', to: 'T' },
    { from: 'B', to: 'T' },
    { from: 'A', to: 'B' },
  ],
  tandem: [{ from: 'P', to: 'T' }],
  float: [
    { from: 'A', to: 'T' },
    { from: 'B', to: 'T' },
    { from: 'A', to: 'B' },
  ],
};

export function positionsOf(valve: Component): readonly Position[] {
  return valve.shape?.positions === 3 ? ['a', 'centre', 'b'] : ['a', 'b'];
}

/** Paths of one position, in the direction written. An undeclared centre joins nothing. */
export function pathsIn(valve: Component, position: Position): readonly ValvePath[] {
  const declared = read.position(valve, position);
  if (declared !== undefined) {
    if (declared.paths.length === 0 && declared.word !== undefined) return NAMED[declared.word] ?? [];
    return declared.paths.map((p) => ({ from: p.from, to: p.to }));
  }
  const ports = valve.shape?.ports ?? 4;
  if (position === 'centre') return [];
  if (ports === 2) return position === 'a' ? [{ from: 'P', to: 'A' }] : [];
  if (ports === 3) return position === 'a' ? [{ from: 'P', to: 'A' }] : [{ from: 'A', to: 'T' }];
  return position === 'a'
    ? [
        { from: 'P', to: 'A' },
        { from: 'B', to: 'T' },
      ]
    : [
        { from: 'P', to: 'B' },
        { from: 'A', to: 'T' },
      ];
}

/** The position without current; undefined for a detent, which stays where it was. */
export function sprungPosition(valve: Component): Position | undefined {
  const normally = read.word(valve, 'normally');
  if (normally === 'open') return 'a';
  if (normally === 'closed') return 'b';
  const spring = read.word(valve, 'spring');
  return spring === 'a' || spring === 'b' || spring === 'centre' ? spring : undefined;
}

/** The position a live coil moves its valve to. */
export function positionOfCoil(valve: Component, side: Position | undefined): Position {
  const rest = sprungPosition(valve);
  if (valve.shape?.positions === 2) {
    if (read.has(valve, 'normally') || side === undefined) return rest === 'a' ? 'b' : 'a';
    return side;
  }
  return side ?? 'a';
}

/** How a position is called: a 2/2 valve is open or closed, others stand in a, b or centre. */
export function positionWords(valve: Component, position: Position): string {
  if (valve.shape?.ports === 2) return pathsIn(valve, position).length > 0 ? 'open' : 'closed';
  return position;
}
