/** Hover on a line: flow, velocity, Reynolds number, loss by step, and the highest pressure against the rating. */
import { oilOf, ratedAt, type Circuit, type LineStatement, type Piece, type Point, type PortRef } from '@oilway/circuit';
import type { Analysis } from '../analysis.ts';
import { componentOf, extent, greatest, placesOf, type Place } from './places.ts';
import { notComputed, restsOn, standing } from './rests.ts';
import { literal, paragraphs, Show, table } from './show.ts';

const NO_FLOW: ReadonlySet<string> = new Set(['gauge', 'sensor', 'switch']);
const key = (port: PortRef): string => `${port.component}.${port.port}`;

/**
 * Flow through a piece, m3/s, from its first side to its second: by continuity, what the ports behind one side give and take.
 * Undefined where the pieces form a ring, or where neither side's ports are all known.
 */
export function flowThrough(circuit: Circuit, piece: Piece, point: Point): number | undefined {
  // A piece with a loss of its own is solved with its flow.
  const solved = point.flows[piece.id];
  if (solved !== undefined) return solved;
  const group = (side: 0 | 1): ReadonlySet<string> | undefined => {
    const seen = new Set(piece.sides[side].map(key));
    // A side that is only the name of a line branches off somewhere in it: what stands behind is not told.
    if (seen.size === 0) return undefined;
    let grown = true;
    while (grown) {
      grown = false;
      for (const other of circuit.pieces) {
        if (other.id === piece.id) continue;
        const ports = [...other.sides[0], ...other.sides[1]].map(key);
        if (!ports.some((one) => seen.has(one))) continue;
        // It leads on to a reservoir or to the name of a line: what passes there is not among the ports.
        if (other.sides[0].length === 0 || other.sides[1].length === 0) return undefined;
        if (ports.every((one) => seen.has(one))) continue;
        for (const one of ports) seen.add(one);
        grown = true;
      }
    }
    const opposite = piece.sides[side === 0 ? 1 : 0];
    return opposite.some((port) => seen.has(key(port))) ? undefined : seen;
  };
  const sum = (ports: ReadonlySet<string> | undefined): number | undefined => {
    if (!ports) return undefined;
    let total = 0;
    for (const port of ports) {
      const flow = point.flows[port];
      if (flow !== undefined) total += flow;
      else if (!NO_FLOW.has(componentOf(circuit, port.slice(0, port.lastIndexOf('.')))?.kind ?? '')) return undefined;
    }
    return total;
  };
  const behind = sum(group(1));
  if (behind !== undefined) return behind;
  const before = sum(group(0));
  return before === undefined ? undefined : -before;
}

/** Lowest declared rating on a net, Pa: of its ports' components and its pieces. */
export function ratingOf(circuit: Circuit, netId: string): { readonly rating: number; readonly of: string } | undefined {
  const net = circuit.nets.find((one) => one.id === netId);
  let best: { rating: number; of: string } | undefined;
  const take = (rating: number | undefined, of: string): void => {
    if (rating !== undefined && (!best || rating < best.rating)) best = { rating, of };
  };
  for (const id of net?.pieces ?? []) take(circuit.pieces.find((one) => one.id === id)?.rated, 'line');
  for (const { component, port } of net?.ports ?? []) {
    const owner = componentOf(circuit, component);
    if (owner) take(ratedAt(owner, port), `${component}.${port}`);
  }
  return best;
}

export function hoverLine(analysis: Analysis, line: LineStatement, pieceId?: string): string {
  const title = `**${line.name ? literal(line.name) : line.function}** ${line.name ? `${line.function} ` : ''}line`;
  const { studied } = analysis;
  if (!studied || !analysis.circuit) return paragraphs(title, standing(analysis));
  // The study's own circuit has the same pieces as long as the lines before this one stand.
  const { circuit } = studied;
  const wanted = pieceId ? [pieceId] : line.pieces;
  const pieces = circuit.pieces.filter((piece) => wanted.includes(piece.id));
  const show = new Show(circuit);
  const why = notComputed(analysis, ...pieces.flatMap((piece) => piece.nets));
  return paragraphs(
    title,
    ...pieces.map((piece) => pieceText(circuit, piece, placesOf(studied), show, pieces.length > 1)),
    why,
    standing(analysis),
    restsOn(analysis),
  );
}

function pieceText(circuit: Circuit, piece: Piece, places: readonly Place[], show: Show, several: boolean): string {
  const { oil } = oilOf(circuit);
  const area = piece.bore === undefined ? undefined : (Math.PI / 4) * piece.bore ** 2;
  const flows = (place: Place): (number | undefined)[] =>
    place.points.filter((point) => point.solved).map((point) => flowThrough(circuit, piece, point));
  const highest = (place: Place): number | undefined => {
    const peaks = piece.nets.map((net) => place.step?.peaks[net]);
    return extent([...peaks, ...place.points.flatMap((point) => piece.nets.map((net) => point.pressures[net]))])?.high;
  };
  const rows = places.map((place) => {
    const span = extent(flows(place).map((flow) => (flow === undefined ? undefined : Math.abs(flow))));
    const velocity = span && area ? span.high / area : undefined;
    const loss =
      piece.nets[0] === piece.nets[1]
        ? undefined
        : extent(
            place.points.map((point) => {
              const a = point.pressures[piece.nets[0]];
              const b = point.pressures[piece.nets[1]];
              return a === undefined || b === undefined ? undefined : Math.abs(a - b);
            }),
          )?.high;
    const peak = highest(place);
    return [
      place.label,
      span ? show.span(span.low, span.high, 'flow') : '—',
      velocity === undefined ? '—' : `${velocity.toFixed(2)} m/s`,
      velocity === undefined || piece.bore === undefined ? '—' : reynolds((velocity * piece.bore) / oil.viscosity),
      loss === undefined ? '—' : show.figure(loss, 'pressure'),
      peak === undefined ? '—' : show.figure(peak, 'pressure'),
    ];
  });
  const worst = greatest(
    places.map((place) => ({ place, peak: highest(place) })),
    (one) => one.peak,
  );
  const rating = piece.nets
    .map((net) => ratingOf(circuit, net))
    .filter((one) => one !== undefined)
    .sort((a, b) => a.rating - b.rating)[0];
  const against =
    worst?.peak === undefined
      ? ''
      : rating
        ? `Highest ${show.of(worst.peak, rating.rating, 'pressure')} rated (${rating.of}), in ${worst.place.label}.`
        : `Highest ${show.figure(worst.peak, 'pressure')} in ${worst.place.label}; no rating is declared here.`;
  const notCounted = piece.nets[0] === piece.nets[1] ? 'Loss not counted: bore and length are not both given.' : '';
  const name = several
    ? `${side(piece, 0)} to ${side(piece, 1)}${piece.bore ? `, bore ${show.figure(piece.bore, 'length')}` : ''}`
    : piece.bore
      ? `Bore ${show.figure(piece.bore, 'length')}`
      : '';
  return paragraphs(
    name,
    table(['Step', 'Flow', 'Velocity', 'Reynolds number', 'Loss', 'Highest pressure'], rows),
    [against, notCounted].filter(Boolean).join(' '),
  );
}

const reynolds = (value: number): string =>
  `${Math.round(value)}${value < 2300 ? ' (laminar)' : value < 4000 ? ' (between)' : ' (turbulent)'}`;
const side = (piece: Piece, index: 0 | 1): string => piece.sides[index].map(key).join(', ') || 'the line';
