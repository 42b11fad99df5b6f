/** What the positions of a directional valve join, in the words of the rules. */
import { type Component, positionsOf as declared, type Side, sideOfCoil } from '@oilway/circuit';

export type Position = Side;

export function positionsOf(valve: Component): readonly Position[] {
  return declared(valve).sides;
}

/** Paths of one position, in the direction written. */
export function pathsIn(valve: Component, position: Position): readonly { readonly from: string; readonly to: string }[] {
  return declared(valve).paths[position];
}

/** The position without current; undefined for a detent, which stays where it was. */
export function sprungPosition(valve: Component): Position | undefined {
  const { rest, detent } = declared(valve);
  return detent ? undefined : rest;
}

/** The position a live coil moves its valve to. */
export function positionOfCoil(valve: Component, side: Position | undefined): Position {
  return sideOfCoil(valve, side);
}

/** How a position is called: a 2/2 valve is open or closed, others stand in a, b or centre. */
export function positionWords(valve: Component, position: Position): string {
  if (valve.shape?.ports === 2) return pathsIn(valve, position).length > 0 ? 'open' : 'closed';
  return position;
}
