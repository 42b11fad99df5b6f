/** The places in line statements where a port is written, and taking them out or putting another in. */
import type { Circuit, LinePlace, LineStatement, TextChange } from '@oilway/circuit';

export interface Written {
  readonly line: LineStatement;
  /** Index of the station in the line, of the place in the station. */
  readonly station: number;
  readonly index: number;
  readonly place: LinePlace;
}

/** Where a port is written in this circuit's own lines, in text order. */
export function writtenAt(circuit: Circuit, component: string, port: string): readonly Written[] {
  const found: Written[] = [];
  for (const line of circuit.lines) {
    if (line.origin.uri !== circuit.uri) continue;
    line.stations.forEach((station, s) => {
      station.places.forEach((place, i) => {
        if (place.line === undefined && place.ports.some((p) => p.component === component && p.port === port))
          found.push({ line, station: s, index: i, place });
      });
    });
  }
  return found.sort((a, b) => a.place.origin.start - b.place.origin.start);
}

export function isMiddle(at: Written): boolean {
  return at.station > 0 && at.station < at.line.stations.length - 1;
}

/** Number of places in the station it stands in. */
export function neighbours(at: Written): number {
  return at.line.stations[at.station]?.places.length ?? 1;
}

export function replace(at: Written, text: string): TextChange {
  const { uri, start, end } = at.place.origin;
  return { uri, start, end, text };
}

/** Takes places out of one station; at least one other must remain there. */
export function takeOut(places: readonly Written[]): TextChange[] {
  const first = places[0];
  if (first === undefined) return [];
  const station = first.line.stations[first.station]?.places ?? [];
  const gone = new Set(places.map((p) => p.index));
  const changes: TextChange[] = [];
  let kept = false;
  station.forEach((place, i) => {
    const { uri, start, end } = place.origin;
    if (!gone.has(i)) {
      kept = true;
      return;
    }
    // Behind a place that stays: with the comma before it. Before the first that stays: with the comma after it.
    const before = station[i - 1];
    const after = station[i + 1];
    if (kept && before !== undefined) changes.push({ uri, start: before.origin.end, end, text: '' });
    else if (after !== undefined) changes.push({ uri, start, end: after.origin.start, text: '' });
  });
  return changes;
}
