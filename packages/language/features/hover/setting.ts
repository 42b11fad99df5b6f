/** Hover on a property or constant: what it means, its value, and what depends on it. */
import type { Component, Constant, Property, PropertySpec } from '@oilway/circuit';
import type { Analysis } from '../analysis.ts';
import { propertyAbout } from '../completion/properties.ts';
import { placesOf } from './places.ts';
import { standing } from './rests.ts';
import { literal, list, paragraphs, Show } from './show.ts';
import { conditionNames } from './conditions.ts';

export function hoverSetting(analysis: Analysis, spec: PropertySpec, component?: Component, property?: Property): string {
  const title = `**${spec.name}**${component ? ` of ${literal(component.id)}` : ''}`;
  const from =
    property?.value.type === 'quantity' && property.value.from && property.value.from.length > 0
      ? `Computed from ${list(property.value.from.map(literal))}.`
      : '';
  const part = property?.part ? `Taken from part ${literal(property.part)}.` : '';
  return paragraphs(
    title,
    propertyAbout(spec),
    [from, part].filter(Boolean).join(' '),
    component ? dependsOn(analysis, component, spec.name) : '',
  );
}

/** "Decides: speed of C2 extending in Out" and the like, from the latest study. */
export function dependsOn(analysis: Analysis, component: Component, property: string): string {
  const { studied } = analysis;
  const lines: string[] = [];
  if (studied) {
    const show = new Show(studied.circuit);
    for (const place of placesOf(studied)) {
      const moved = new Map<string, { share: number | undefined; direction: number }>();
      for (const point of place.points) {
        for (const actuator of point.actuators) {
          const limiter = actuator.limitedBy.find((one) => one.of === component.id && names(one.words, property));
          if (limiter && !moved.has(actuator.id)) moved.set(actuator.id, { share: limiter.share, direction: actuator.direction });
        }
      }
      for (const [id, one] of moved) {
        const share =
          one.share === undefined
            ? ''
            : `: 10 % more gives ${show.figure(Math.abs(one.share) * 0.1, 'ratio')} ${one.share < 0 ? 'less' : 'more'}`;
        lines.push(`- speed of ${literal(id)} in ${literal(place.label)}${share}`);
      }
      if (property === 'set' && place.points.some((point) => point.lifting.includes(component.id)))
        lines.push(`- highest pressure in ${literal(place.label)}: it lifts there`);
    }
  }
  if (component.kind === 'switch' || component.kind === 'sensor') {
    for (const cycle of analysis.circuit?.cycles ?? []) {
      for (const step of cycle.steps)
        if (step.until && conditionNames(step.until).includes(component.id)) lines.push(`- end of step ${literal(step.id)}`);
    }
    for (const one of analysis.circuit?.interlocks ?? [])
      if (conditionNames(one.needs).includes(component.id)) lines.push(`- interlock of ${list(one.coils.map(literal))}`);
    for (const one of analysis.circuit?.whiles ?? []) if (conditionNames(one.when).includes(component.id)) lines.push('- a `while` line');
  }
  if (lines.length === 0) return standing(analysis);
  return paragraphs(`What depends on it:\n${[...new Set(lines)].slice(0, 8).join('\n')}`, standing(analysis));
}

/** A limiter's words name the property ("FC1 set"), or no property at all ("pump flow P1"). */
function names(words: string, property: string): boolean {
  const known = words.split(/\W+/);
  return (
    known.includes(property) ||
    !['set', 'passes', 'opening', 'orifice', 'displacement', 'compensator', 'closes'].some((one) => known.includes(one))
  );
}

export function hoverConstant(analysis: Analysis, constant: Constant): string {
  const { circuit } = analysis;
  const show = circuit ? new Show(circuit) : undefined;
  const value =
    constant.value && show ? show.figure(constant.value.si, constant.value.dimension, { unit: constant.value.unit }) : 'not known yet';
  const users = (circuit?.components ?? []).flatMap((component) =>
    component.properties
      .filter((one) => one.value.type === 'quantity' && one.value.from?.includes(constant.name))
      .map((one) => `- ${literal(component.id)} ${one.name}`),
  );
  return paragraphs(`**${literal(constant.name)}** = ${value}`, users.length > 0 ? `Used by:\n${users.slice(0, 10).join('\n')}` : '');
}
