/** Hover on parts that are neither actuator, pump nor valve: reservoir, accumulator, switch, sensor, gauge, fluid. */
import { KINDS, oilOf, read, type Component, type Point } from '@oilway/circuit';
import type { Analysis } from '../analysis.ts';
import { extent, placesOf, pressureAt, type Place } from './places.ts';
import { notComputed, restsOn, standing } from './rests.ts';
import { dependsOn } from './setting.ts';
import { literal, paragraphs, Show, table } from './show.ts';

export function hoverPart(analysis: Analysis, component: Component): string {
  const kind = KINDS[component.kind];
  const title = `**${literal(component.id)}** ${kind.noun}${component.title ? `, ${literal(component.title)}` : ''}`;
  const why = notComputed(analysis, component.id);
  const { studied, circuit } = analysis;
  if (component.kind === 'fluid' && circuit) return paragraphs(title, fluid(circuit));
  if (why || !studied) return paragraphs(title, why, standing(analysis));
  const show = new Show(studied.circuit);
  const places = placesOf(studied);
  const span = (place: Place, value: (point: Point) => number | undefined): { low: number; high: number } | undefined =>
    extent(place.points.map(value));
  if (component.kind === 'reservoir') {
    const all = Object.entries(studied.study.heat);
    const own = all.filter(([id]) => id.endsWith(` ${component.id}`));
    const heat = (own.length > 0 ? own : all).map(
      ([id, one]) =>
        `${literal(id)}: ${show.figure(one.heat, 'power')} of heat, oil settles at ${show.figure(one.temperature.value, 'temperature')}`,
    );
    return paragraphs(title, heat.join('  \n'), standing(analysis), restsOn(analysis, component.id));
  }
  if (component.kind === 'accumulator') {
    const rows = places.map((place) => {
      const oil = span(place, (point) => point.oil[component.id]);
      const pressure = span(place, (point) => pressureAt(studied.circuit, point, component.id, 'P'));
      return [
        place.label,
        oil ? show.span(oil.low, oil.high, 'volume') : '—',
        pressure ? show.span(pressure.low, pressure.high, 'pressure') : '—',
      ];
    });
    return paragraphs(title, table(['Step', 'Oil', 'Pressure'], rows), standing(analysis), restsOn(analysis, component.id));
  }
  const onPort = read.reference(component, 'on') === undefined;
  const rows = onPort
    ? places.map((place) => {
        const pressure = span(place, (point) => pressureAt(studied.circuit, point, component.id, 'P'));
        return [place.label, pressure ? show.span(pressure.low, pressure.high, 'pressure') : '—'];
      })
    : [];
  const shown = rows.some((row) => row[1] !== '—') ? table(['Step', 'Pressure'], rows) : '';
  const depends = component.kind === 'switch' || component.kind === 'sensor' ? dependsOn(analysis, component, 'rises') : standing(analysis);
  return paragraphs(title, shown, depends);
}

function fluid(circuit: Parameters<typeof oilOf>[0]): string {
  const { oil, assumptions } = oilOf(circuit);
  const show = new Show(circuit);
  const assumed = assumptions.length > 0 ? `_Assumed: ${assumptions.map((one) => `${one.property} ${one.value}`).join('; ')}._` : '';
  return paragraphs(
    `At ${show.figure(oil.temperature, 'temperature')}: viscosity ${show.figure(oil.viscosity, 'viscosity')}, density ${show.figure(oil.density, 'density')}.`,
    assumed,
  );
}
