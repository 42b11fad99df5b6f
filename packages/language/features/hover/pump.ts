/** Hover on a pump or a drive: flow, pressure, hydraulic and shaft power by step, and how the drive is loaded. */
import { KINDS, read, type Component, type Point } from '@oilway/circuit';
import type { Analysis } from '../analysis.ts';
import { componentOf, extent, flowInto, greatest, placesOf, pressureAt, type Place } from './places.ts';
import { notComputed, restsOn, standing } from './rests.ts';
import { literal, paragraphs, Show, table } from './show.ts';
import { flowWorking, shaftWorking } from './supply-working.ts';
import { workingText } from './working.ts';

const delivered = (point: Point, id: string): number | undefined => {
  const flow = flowInto(point, id, 'P');
  return flow === undefined ? undefined : -flow;
};

function spanOf(
  place: Place,
  show: Show,
  dimension: 'flow' | 'pressure' | 'power' | 'ratio',
  value: (point: Point) => number | undefined,
): string {
  const span = extent(place.points.filter((point) => point.solved).map(value));
  return span ? show.span(span.low, span.high, dimension) : '—';
}

export function hoverPump(analysis: Analysis, pump: Component): string {
  const title = `**${literal(pump.id)}** ${KINDS.pump.noun}${pump.title ? `, ${literal(pump.title)}` : ''}`;
  const why = notComputed(analysis, pump.id);
  const { studied } = analysis;
  if (why || !studied) return paragraphs(title, why, standing(analysis));
  const show = new Show(studied.circuit);
  const { circuit } = studied;
  const drive = componentOf(circuit, read.reference(pump, 'driven')?.id ?? '');
  const power = drive ? read.si(drive, 'power') : undefined;
  const places = placesOf(studied);
  const rest = studied.study.states.find((state) => state.state === 'REST');
  const all =
    rest && places.every((place) => place.label !== 'REST')
      ? [...places, { label: 'REST', points: rest.variants.map((one) => one.point) }]
      : places;
  const rows = all.map((place) => [
    place.label,
    spanOf(place, show, 'flow', (point) => delivered(point, pump.id)),
    spanOf(place, show, 'pressure', (point) => pressureAt(circuit, point, pump.id, 'P')),
    spanOf(place, show, 'power', (point) => {
      const flow = delivered(point, pump.id);
      const outlet = pressureAt(circuit, point, pump.id, 'P');
      return flow === undefined || outlet === undefined ? undefined : flow * (outlet - (pressureAt(circuit, point, pump.id, 'S') ?? 0));
    }),
    spanOf(place, show, 'power', (point) => point.power[pump.id]),
    drive && power
      ? spanOf(place, show, 'ratio', (point) => (point.power[drive.id] === undefined ? undefined : (point.power[drive.id] ?? 0) / power))
      : '—',
  ]);
  const points = all.flatMap((place) => place.points.filter((point) => point.solved).map((point) => ({ place, point })));
  const hardest = greatest(points, (one) => one.point.power[pump.id] ?? 0);
  const flow = hardest && flowWorking(circuit, pump.id, hardest.point);
  const shaft = hardest && shaftWorking(circuit, pump.id, hardest.point);
  return paragraphs(
    title,
    table(['Step', 'Flow', 'Pressure', 'Hydraulic power', 'Shaft power', drive ? `Load of ${drive.id}` : 'Load of drive'], rows),
    hardest && (flow || shaft) ? `**Working**, ${hardest.place.label} (${hardest.point.label})` : '',
    flow ? workingText(flow, show, 'Flow') : '',
    shaft ? workingText(shaft, show, 'Shaft power') : '',
    standing(analysis),
    restsOn(analysis, pump.id),
  );
}

export function hoverDrive(analysis: Analysis, drive: Component): string {
  const title = `**${literal(drive.id)}** ${KINDS.drive.noun}${drive.title ? `, ${literal(drive.title)}` : ''}`;
  const why = notComputed(analysis, drive.id);
  const { studied } = analysis;
  if (why || !studied) return paragraphs(title, why, standing(analysis));
  const show = new Show(studied.circuit);
  const power = read.si(drive, 'power');
  const rows = placesOf(studied).map((place) => [
    place.label,
    spanOf(place, show, 'power', (point) => point.power[drive.id]),
    power
      ? spanOf(place, show, 'ratio', (point) => (point.power[drive.id] === undefined ? undefined : (point.power[drive.id] ?? 0) / power))
      : '—',
  ]);
  const duty = studied.study.cycles.flatMap((cycle) => {
    const one = cycle.duty[drive.id];
    if (!one) return [];
    const share = power ? ` (${show.figure(one.rms / power, 'ratio')} of ${show.figure(power, 'power')})` : '';
    return [
      `${cycle.id}: mean ${show.figure(one.mean, 'power')}, rms ${show.figure(one.rms, 'power')}${share}, highest ${show.figure(one.highest, 'power')}`,
    ];
  });
  return paragraphs(
    title,
    table(['Step', 'Shaft power', 'Load'], rows),
    duty.join('  \n'),
    standing(analysis),
    restsOn(analysis, drive.id),
  );
}
