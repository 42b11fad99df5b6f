/** Inlay hints from the latest study: speed and force at actuators, duration and peak pressure at steps, margin at requirements, metered motion at throttles. */
import { InlayHintKind, type InlayHint } from 'vscode-languageserver-types';
import type { Component, Origin } from '@oilway/circuit';
import type { Analysis } from './analysis.ts';
import { rowsOf, tightest, unitsOfActuator } from './hover/actuator.ts';
import { meteringOf } from './hover/metering.ts';
import { extent, placesOf, STILL, type Place } from './hover/places.ts';
import { marginText, resultOf } from './hover/requirement.ts';
import { Show } from './hover/show.ts';

export interface HintSettings {
  readonly actuators: boolean;
  readonly steps: boolean;
  readonly requirements: boolean;
  readonly metering: boolean;
}
export const ALL_HINTS: HintSettings = { actuators: true, steps: true, requirements: true, metering: true };

interface Hint {
  readonly at: number;
  readonly label: string;
  readonly tip?: string;
}

export function inlayHints(
  analysis: Analysis,
  range: { readonly start: number; readonly end: number },
  settings: HintSettings = ALL_HINTS,
): InlayHint[] {
  const found: Hint[] = [];
  const add = (origin: Origin, label: string, tip?: string): void => {
    if (origin.uri !== analysis.uri || origin.end < range.start || origin.end > range.end || label === '') return;
    found.push({ at: origin.end, label, ...(tip === undefined ? {} : { tip }) });
  };
  const { circuit, studied } = analysis;
  if (!circuit) return [];
  if (settings.metering) {
    for (const component of circuit.components) {
      const metering = meteringOf(circuit, component);
      if (metering) add(component.nameOrigin, metering.words, `${metering.how}: the other way is free`);
    }
  }
  if (studied) {
    // While the text is newer the figures stay, marked with a tilde: a hint that vanishes at every key is worse than one that says its age.
    const age = studied.older ? '~ ' : '';
    const tip = studied.older ? 'older than the text' : undefined;
    const show = new Show(studied.circuit);
    if (settings.actuators) {
      const places = placesOf(studied);
      for (const component of circuit.components)
        if (isActuator(component)) add(component.nameOrigin, prefix(age, actuatorHint(component, places, show)), tip);
    }
    if (settings.steps) {
      for (const step of circuit.cycles.flatMap((cycle) => cycle.steps)) {
        const result = studied.study.steps.find((one) => one.id === step.id);
        if (!result) continue;
        const peak = extent(Object.values(result.peaks))?.high;
        const parts = [
          result.time === undefined ? 'does not end' : show.figure(result.time, 'time'),
          peak === undefined ? '' : `peak ${show.figure(peak, 'pressure')}`,
        ];
        add(step.nameOrigin, prefix(age, parts.filter(Boolean).join(', ')), tip);
      }
    }
    if (settings.requirements) {
      for (const requirement of circuit.requirements) {
        const result = resultOf(analysis, requirement);
        if (!result) continue;
        const worst = result.worst ? show.figure(result.worst.value, result.worst.dimension) : '';
        const verdict =
          result.verdict === 'undecidable'
            ? 'cannot be decided'
            : [result.verdict, worst, marginText(result, show)].filter(Boolean).join(', ');
        add(requirement.origin, prefix(age, verdict), tip ?? result.words);
      }
    }
  }
  return found
    .sort((a, b) => a.at - b.at)
    .map((hint) => ({
      position: analysis.lines.position(hint.at),
      label: hint.label,
      kind: InlayHintKind.Parameter,
      paddingLeft: true,
      ...(hint.tip ? { tooltip: hint.tip } : {}),
    }));
}

const prefix = (age: string, text: string): string => (text === '' ? '' : `${age}${text}`);
const isActuator = (component: Component): boolean =>
  component.kind === 'cylinder' || component.kind === 'motor' || component.kind === 'rotary';

/** Greatest speed each way, greatest force pressed: `out 371 mm/s, in 112 mm/s, 17.3 kN`. */
export function actuatorHint(component: Component, places: readonly Place[], show: Show): string {
  const units = unitsOfActuator(component);
  const rows = rowsOf(places, component.id);
  const names = component.kind === 'cylinder' ? (['in', 'out'] as const) : (['backward', 'forward'] as const);
  const speed = (direction: -1 | 1): string => {
    const fastest = extent(
      rows.filter((row) => row.direction === direction).flatMap((row) => row.points.map((one) => Math.abs(one.at.velocity))),
    )?.high;
    return fastest === undefined || fastest <= STILL[units.speed]
      ? ''
      : `${names[direction < 0 ? 0 : 1]} ${show.figure(fastest, units.speed)}`;
  };
  const stalled = rows.some((row) => (tightest(row)?.at.shortBy ?? 0) > 0);
  const force = extent(rows.flatMap((row) => row.points.map((one) => Math.abs(one.at.force))))?.high;
  return [speed(1), speed(-1), force === undefined || force < 1 ? '' : show.figure(force, units.force), stalled ? 'stalls' : '']
    .filter(Boolean)
    .join(', ');
}
