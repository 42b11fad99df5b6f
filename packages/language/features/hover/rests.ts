/** The last lines of a hover: what the figures rest on, and whether they are of the text as it stands. */
import type { Assumption } from '@oilway/circuit';
import type { Analysis } from '../analysis.ts';
import { literal } from './show.ts';

/** "rests on 3 assumptions: P1 volumetric 92 % ..": those of the component first. */
export function restsOn(analysis: Analysis, component?: string): string {
  const all = analysis.studied?.study.assumptions ?? [];
  if (all.length === 0) return '';
  const own = all.filter((one) => one.component === component);
  const ordered = [...own, ...all.filter((one) => one.component !== component)];
  const shown = ordered.slice(0, 3).map(words);
  const more = ordered.length > shown.length ? ` and ${ordered.length - shown.length} more` : '';
  return `_Rests on ${all.length} assumption${all.length === 1 ? '' : 's'}: ${shown.map(literal).join('; ')}${more}._`;
}

function words(one: Assumption): string {
  const what = `${one.component} ${one.property}`;
  if (one.source === 'not counted') return `${what} not counted`;
  return `${what} ${one.value} (${one.source === 'memory' ? 'from memory of common practice' : one.source})`;
}

/** Says why there are no figures, or that they belong to an older text. */
export function standing(analysis: Analysis): string {
  if (!analysis.circuit) return '';
  const { studied, figures } = analysis;
  if (studied && !studied.older) return '';
  if (figures === 'shelf') return '_Nothing is computed in a file without a `circuit` line._';
  if (figures === 'off') return '_Computing is switched off (`oilway.compute.enabled`)._';
  const older = studied ? 'These figures are older than the text; ' : '';
  if (figures === 'broken') return `_${older}${older ? 'the' : 'The'} study of this text broke down: the log of the server says why._`;
  return older ? `_${older}new ones are being computed._` : '_Figures are being computed._';
}

/** "not computed: V2 has no `passes`" for a component or net, where that is so. */
export function notComputed(analysis: Analysis, ...ids: readonly (string | undefined)[]): string {
  for (const id of ids) {
    if (id === undefined) continue;
    const why = analysis.circuit?.unknown[id] ?? analysis.studied?.study.notComputed[id];
    if (why) return `**Not computed**: ${why}`;
  }
  return '';
}
