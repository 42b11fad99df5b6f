/** Hover on a valve, filter, cooler or any part oil passes: where it stands, its opening, pressures, flow and drop by step, and whether it lifts. */
import { KINDS, type Circuit, type Component, type Point } from '@oilway/circuit';
import type { Analysis } from '../analysis.ts';
import { extent, flowInto, greatest, netOf, placesOf, pressureAt, type Place } from './places.ts';
import { notComputed, restsOn, standing } from './rests.ts';
import { meteringOf } from './metering.ts';
import { reliefWorking } from './supply-working.ts';
import { workingText } from './working.ts';
import { literal, paragraphs, Show, table } from './show.ts';

/** Below this a flow is leakage, m3/s (0.005 L/min). */
const LEAKAGE = 0.005 / 60_000;
const noLeak = (flow: number): number => (Math.abs(flow) < LEAKAGE ? 0 : flow);

export function hoverValve(analysis: Analysis, component: Component): string {
  const kind = KINDS[component.kind];
  const shape = component.shape ? `${component.shape.ports}/${component.shape.positions} ` : '';
  const metering = analysis.circuit ? meteringOf(analysis.circuit, component) : undefined;
  const title = paragraphs(
    `**${literal(component.id)}** ${shape}${kind.noun}${component.title ? `, ${literal(component.title)}` : ''}`,
    metering ? `${capital(metering.words)} (${metering.how}); the other way is free.` : '',
  );
  const why = notComputed(analysis, component.id);
  const { studied } = analysis;
  if (why || !studied) return paragraphs(title, why, standing(analysis));
  const show = new Show(studied.circuit);
  const { circuit } = studied;
  const ports = (kind.portsOf?.(component) ?? kind.ports).map((port) => port.name).filter((port) => netOf(circuit, component.id, port));
  const chain = kind.chainOf?.(component) ?? kind.chain;
  const ends = endsOf(component, chain, ports);
  const places = placesOf(studied);
  const head = ['Step', 'Stands', 'Opening', ...(ends ? [`Pressure ${ends[0]}`, `Pressure ${ends[1]}`, 'Drop', 'Flow'] : ports), 'Lifts'];
  const rows = places.map((place) => [
    place.label,
    words(place, (point) => point.positions[component.id]),
    figures(place, show, 'ratio', (point) => point.openings[component.id]),
    ...(ends
      ? throughCells(circuit, component.id, ends, place, show)
      : ports.map((port) => portCell(circuit, component.id, port, place, show))),
    component.kind === 'relief' ? (place.points.some((point) => point.lifting.includes(component.id)) ? 'yes' : 'no') : '',
  ]);
  // A relief's working: where it holds the highest pressure.
  const lifting = places.flatMap((place) =>
    place.points.filter((point) => point.lifting.includes(component.id)).map((point) => ({ place, point })),
  );
  const lifted = greatest(lifting, (one) => pressureAt(circuit, one.point, component.id, 'P'));
  const working = lifted && reliefWorking(circuit, component.id, lifted.point);
  const remarks = [
    ...new Set(
      places.flatMap((place) =>
        place.points.flatMap((point) =>
          point.remarks.filter((one) => one.of === component.id).map((one) => `${place.label}: ${one.words}`),
        ),
      ),
    ),
  ];
  return paragraphs(
    title,
    rows.length > 0 ? table(head, rows) : '',
    working && lifted
      ? paragraphs(`**Working**, ${lifted.place.label} (${lifted.point.label})`, workingText(working, show, 'Pressure at P'))
      : '',
    remarks.slice(0, 4).map(literal).join('  \n'),
    standing(analysis),
    restsOn(analysis, component.id),
  );
}

const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);

/** The two ports that oil passes between; undefined for parts with more ways than one. */
function endsOf(
  component: Component,
  chain: (typeof KINDS)['check']['chain'],
  ports: readonly string[],
): readonly [string, string] | undefined {
  if (component.kind === 'directional' && (component.shape?.ports ?? 4) > 2) return undefined;
  if (component.kind === 'divider' || component.kind === 'shuttle') return undefined;
  if (chain.how === 'through') return [chain.from, chain.to];
  if (chain.how === 'end') return [chain.entry, chain.exit];
  if (component.kind === 'pilotcheck' || component.kind === 'counterbalance' || component.kind === 'burst') return ['V', 'C'];
  return ports.length === 2 && ports[0] && ports[1] ? [ports[0], ports[1]] : undefined;
}

function words(place: Place, value: (point: Point) => string | undefined): string {
  const found = [...new Set(place.points.map(value).filter((one): one is string => one !== undefined))];
  return found.join(', ');
}

function figures(place: Place, show: Show, dimension: 'ratio' | 'pressure' | 'flow', value: (point: Point) => number | undefined): string {
  const span = extent(place.points.filter((point) => point.solved).map(value));
  return span ? show.span(span.low, span.high, dimension) : '—';
}

function throughCells(circuit: Circuit, id: string, ends: readonly [string, string], place: Place, show: Show): string[] {
  const pressure = (point: Point, port: string): number | undefined => pressureAt(circuit, point, id, port);
  return [
    figures(place, show, 'pressure', (point) => pressure(point, ends[0])),
    figures(place, show, 'pressure', (point) => pressure(point, ends[1])),
    figures(place, show, 'pressure', (point) => {
      const a = pressure(point, ends[0]);
      const b = pressure(point, ends[1]);
      return a === undefined || b === undefined ? undefined : Math.abs(a - b);
    }),
    figures(place, show, 'flow', (point) => {
      const flow = flowInto(point, id, ends[0]) ?? flowInto(point, id, ends[1]);
      return flow === undefined ? undefined : Math.abs(noLeak(flow));
    }),
  ];
}

/** `160 bar, 9.2 L/min in` */
function portCell(circuit: Circuit, id: string, port: string, place: Place, show: Show): string {
  const pressure = figures(place, show, 'pressure', (point) => pressureAt(circuit, point, id, port));
  const flows = extent(place.points.map((point) => flowInto(point, id, port)));
  if (!flows) return pressure;
  const largest = Math.abs(flows.low) > Math.abs(flows.high) ? flows.low : flows.high;
  if (noLeak(largest) === 0) return pressure;
  return `${pressure}, ${show.figure(Math.abs(largest), 'flow')} ${largest > 0 ? 'in' : 'out'}`;
}
