/** Hover on a cylinder, motor or semi-rotary actuator: a table by step and direction, then the working of the tightest row. */
import type { Dimension } from '@oilway/quantity';
import { KINDS, type ActuatorPoint, type Component, type Point } from '@oilway/circuit';
import type { Analysis } from '../analysis.ts';
import { actuatorAt, extent, flowInto, greatest, placesOf, pressureAt, STILL, type Place } from './places.ts';
import { notComputed, restsOn, standing } from './rests.ts';
import { literal, paragraphs, Show, table } from './show.ts';
import { forceWorking, speedWorking, torqueWorking, workingText } from './working.ts';

interface Row {
  readonly place: Place;
  readonly direction: -1 | 0 | 1;
  readonly points: readonly { readonly point: Point; readonly at: ActuatorPoint }[];
}

export interface ActuatorUnits {
  readonly force: Dimension;
  readonly speed: 'velocity' | 'rotation';
  readonly position: Dimension;
  readonly words: readonly [backward: string, stands: string, forward: string];
  readonly ports: readonly [string, string];
}
export function unitsOfActuator(component: Component): ActuatorUnits {
  if (component.kind === 'cylinder')
    return { force: 'force', speed: 'velocity', position: 'length', words: ['retracting', 'stands', 'extending'], ports: ['cap', 'rod'] };
  return { force: 'torque', speed: 'rotation', position: 'angle', words: ['backward', 'stands', 'forward'], ports: ['A', 'B'] };
}

/** The wanted direction; without one the direction it moves in, creeping not counted: leakage is no motion. */
const wayOf = (at: ActuatorPoint): number => at.direction || (Math.abs(at.velocity) > STILL.velocity ? Math.sign(at.velocity) : 0);

/** Share of the greatest force below which a standing rod presses with nothing worth a row. */
const PRESSING = 0.01;

/** Points of a place by direction; those that only stand are kept where they press. */
export function rowsOf(places: readonly Place[], id: string): Row[] {
  const rows: Row[] = [];
  const most = Math.max(1, ...places.flatMap((place) => place.points.map((point) => Math.abs(actuatorAt(point, id)?.force ?? 0))));
  for (const place of places) {
    const points = place.points.flatMap((point) => {
      const at = actuatorAt(point, id);
      return at && point.solved ? [{ point, at }] : [];
    });
    const of = (direction: -1 | 0 | 1): Row => ({
      place,
      direction,
      points: points.filter((one) => wayOf(one.at) === direction),
    });
    const moving = [of(1), of(-1)].filter((row) => row.points.length > 0);
    const standing = of(0);
    rows.push(...moving);
    if (moving.length === 0 && standing.points.some((one) => Math.abs(one.at.force) > PRESSING * most)) rows.push(standing);
  }
  return rows;
}

/** Force needed of what is available; undefined where nothing is needed or asked for. */
const strain = (at: ActuatorPoint | undefined): number | undefined =>
  at?.available !== undefined && at.needed > 0 ? at.needed / at.available : undefined;

/** The point with the least of force available against needed; without such, the one that presses most. */
export function tightest(row: Row): Row['points'][number] | undefined {
  return greatest(row.points, (one) => strain(one.at)) ?? greatest(row.points, (one) => Math.abs(one.at.force));
}

export function limits(row: Row): string {
  const words: string[] = [];
  for (const { at } of row.points) for (const one of at.limitedBy) if (!words.includes(one.words)) words.push(one.words);
  return words.slice(0, 2).join(', ');
}

export function hoverActuator(analysis: Analysis, component: Component): string {
  const kind = KINDS[component.kind];
  const title = `**${literal(component.id)}** ${kind.noun}${component.title ? `, ${literal(component.title)}` : ''}`;
  const why = notComputed(analysis, component.id);
  const { studied } = analysis;
  if (why || !studied) return paragraphs(title, why, standing(analysis));
  const show = new Show(studied.circuit);
  const units = unitsOfActuator(component);
  const rows = rowsOf(placesOf(studied), component.id);
  if (rows.length === 0) return paragraphs(title, 'Does not move in any step.', standing(analysis), restsOn(analysis, component.id));

  const cells = rows.map((row) => cellsOf(row, studied.circuit, component.id, units, show));
  const head = [
    'Step',
    units.force === 'force' ? 'Force available / needed' : 'Torque available / needed',
    'Speed',
    `Pressure ${units.ports[0]}`,
    `Pressure ${units.ports[1]}`,
    'Flow in',
    'Time',
    'Limited by',
  ];
  return paragraphs(
    title,
    table(head, cells),
    working(rows, studied.circuit, component.id, units, show),
    standing(analysis),
    restsOn(analysis, component.id),
  );
}

function cellsOf(row: Row, circuit: Parameters<typeof pressureAt>[0], id: string, units: ActuatorUnits, show: Show): string[] {
  const worst = tightest(row);
  const speeds = row.place.step?.speeds[id];
  const own = extent(row.points.map((one) => Math.abs(one.at.velocity)).filter((v) => v > STILL[units.speed]));
  const speed = speeds && speeds.direction === row.direction ? { low: speeds.low, high: speeds.high } : own;
  const inlet = row.direction < 0 ? units.ports[1] : units.ports[0];
  const flow = extent(row.points.map((one) => flowInto(one.point, id, inlet)).map((q) => (q === undefined ? undefined : Math.abs(q))));
  const pressure = (port: string): string => {
    const span = extent(row.points.map((one) => pressureAt(circuit, one.point, id, port)));
    return span ? show.span(span.low, span.high, 'pressure') : '—';
  };
  const force = worst ? forceText(worst.at, row.direction, units.force, show) : '—';
  return [
    `${row.place.label} ${units.words[row.direction + 1]}`,
    force,
    row.direction === 0 ? '—' : speed ? show.span(speed.low, speed.high, units.speed) : 'stands',
    pressure(units.ports[0]),
    pressure(units.ports[1]),
    row.direction !== 0 && flow ? show.span(flow.low, flow.high, 'flow') : '—',
    row.place.step?.time === undefined ? '—' : show.figure(row.place.step.time, 'time'),
    limits(row),
  ];
}

/** `22.4 / 9.25 kN`, how short a stalled one is, what a standing one presses with. */
function forceText(at: ActuatorPoint, direction: -1 | 0 | 1, force: Dimension, show: Show): string {
  if (at.shortBy !== undefined && at.shortBy > 0) return `stalled, short by ${show.figure(at.shortBy, force)}`;
  if (at.available === undefined || direction === 0) return `presses ${show.figure(Math.abs(at.force), force)}`;
  if (at.needed < 0) return `${show.figure(at.available, force)}, the load drives with ${show.figure(-at.needed, force)}`;
  return show.against(at.available, at.needed, force);
}

function working(rows: readonly Row[], circuit: Parameters<typeof pressureAt>[0], id: string, units: ActuatorUnits, show: Show): string {
  const moving = rows.filter((row) => row.direction !== 0);
  const choice = moving.length > 0 ? moving : rows;
  const row = greatest(choice, (one) => strain(tightest(one)?.at)) ?? choice[0];
  const worst = row && tightest(row);
  if (!row || !worst) return '';
  const force = forceWorking(circuit, id, worst.point) ?? torqueWorking(circuit, id, worst.point);
  const speed = speedWorking(circuit, id, worst.point);
  if (!force && !speed) return '';
  // A label that names the place needs no second one; a motor has no place.
  const named = /\d/.test(worst.point.label) || units.force === 'torque';
  const where = named ? worst.point.label : `${show.position(worst.at.position, units.position)} (${worst.point.label})`;
  return paragraphs(
    `**Working**, ${row.place.label} ${units.words[row.direction + 1]}, ${where}`,
    force ? workingText(force, show, units.force === 'force' ? 'Force on the load' : 'Torque on the load') : '',
    speed ? workingText(speed, show, 'Speed') : '',
  );
}
