/** Oil held in a net besides the chambers, and what hoses give. SI. */
import type { Net, Piece } from '../model/circuit.ts';

/** Where bore or length is not said: a net, and a pilot or drain net, m3. */
export const UNSAID_NET = 0.2e-3;
export const UNSAID_PILOT = 0.01e-3;
/** Share of a chamber's full volume that is dead (ports, end caps). */
export const DEAD_SHARE = 0.05;
/** Stiffness of a hose's wall, Pa: 4000 bar (common practice, from memory). */
export const HOSE_STIFFNESS = 4e8;

export interface NetVolume {
  /** m3 */
  readonly volume: number;
  /** m3/Pa */
  readonly walls: number;
  /** True where nothing was declared. */
  readonly assumed: boolean;
}

const volumeOf = (piece: Piece): number | undefined =>
  piece.bore === undefined || piece.length === undefined ? undefined : ((Math.PI * piece.bore ** 2) / 4) * piece.length;

/** Declared pieces count with their volume (a piece between two nets with half); with none declared the usual figure. */
export function netVolume(net: Net, pieces: ReadonlyMap<string, Piece>): NetVolume {
  let volume = 0;
  let walls = 0;
  let declared = false;
  for (const piece of pieces.values()) {
    const sides = piece.nets.filter((n) => n === net.id).length;
    if (sides === 0) continue;
    const v = volumeOf(piece);
    if (v === undefined) continue;
    declared = true;
    volume += (v * sides) / 2;
    if (piece.joint === 'hose') walls += (v * sides) / 2 / HOSE_STIFFNESS;
  }
  if (declared) return { volume, walls, assumed: false };
  const small = net.functions.length > 0 && net.functions.every((f) => f === 'pilot' || f === 'drain');
  return { volume: small ? UNSAID_PILOT : UNSAID_NET, walls: 0, assumed: true };
}
