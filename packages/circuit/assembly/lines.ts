/** Pieces of pipe with bore and length: a loss between the two nets at their ends. */
import type { LineSpec, NodeIndex } from '@oilway/engine';
import type { Oil } from '../fluid/oil.ts';
import type { Circuit } from '../model/circuit.ts';

/** Roughness, m: drawn tube (public tables), hose (common practice, from memory). */
const TUBE = 1.5e-6;
const HOSE = 2e-5;
/** Loss of one bend in velocity heads. */
const BEND = 0.75;

/** Pieces of pipe that have no loss because bore or length is not said. */
export const piecesWithoutLoss = (circuit: Circuit): number =>
  circuit.pieces.filter((p) => p.bore === undefined || p.length === undefined).length;

export function addLines(
  circuit: Circuit,
  oil: Oil,
  nodeOf: ReadonlyMap<string, NodeIndex>,
  add: (spec: Omit<LineSpec, 'tag'>, piece: string) => void,
): void {
  for (const piece of circuit.pieces) {
    const [one, other] = piece.nets;
    if (one === other || !(piece.bore !== undefined && piece.bore > 0) || !(piece.length !== undefined && piece.length > 0)) continue;
    const a = nodeOf.get(one);
    const b = nodeOf.get(other);
    if (a === undefined || b === undefined || a === b) continue;
    add(
      {
        type: 'line',
        a,
        b,
        bore: piece.bore,
        length: piece.length,
        roughness: piece.joint === 'hose' ? HOSE : TUBE,
        minor: BEND * (piece.bends ?? 0),
        nu: oil.viscosity,
        rho: oil.density,
      },
      piece.id,
    );
  }
}
