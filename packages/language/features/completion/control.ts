/** Proposals in the lines that control: steps, while lines, interlocks, emergency, requirements. */
import { CompletionItemKind } from 'vscode-languageserver-types';
import type { Dimension } from '@oilway/quantity';
import type { Circuit } from '@oilway/circuit';
import type { Token } from '../text/scan.ts';
import { word, type Proposal } from './item.ts';
import { coils, components, conditionNames, constants, cycles, places, STATES, steps } from './names.ts';

export const MEASURES: Readonly<Record<string, { readonly dimension: Dimension; readonly about: string }>> = {
  speed: { dimension: 'velocity', about: 'of an actuator, in its direction of motion' },
  force: { dimension: 'force', about: 'pressed on the load' },
  torque: { dimension: 'torque', about: 'at the gear output' },
  pressure: { dimension: 'pressure', about: 'of a port or a line, gauge' },
  power: { dimension: 'power', about: 'of a drive, pump or actuator; loss of a valve or line' },
  loading: { dimension: 'ratio', about: 'of a drive, over the cycle' },
  flow: { dimension: 'flow', about: 'through a component or line' },
  loss: { dimension: 'pressure', about: 'pressure drop across a component' },
  temperature: { dimension: 'temperature', about: 'of the oil in a reservoir' },
  time: { dimension: 'time', about: 'of a cycle or step' },
  position: { dimension: 'length', about: 'of an actuator' },
  volume: { dimension: 'volume', about: 'of oil in an accumulator or reservoir' },
  drift: { dimension: 'length', about: 'moved by leakage; needs `for`' },
};

const ACTIONS: readonly Proposal[] = [
  word('energise', 'make coils live', 1),
  word('shift', 'move a lever valve', 2),
  word('stop', 'stop drives', 2),
  word('run', 'run another cycle', 2),
];
const CONDITION_VERBS: readonly Proposal[] = ['on', 'off', 'extended', 'retracted', 'at', 'above', 'below'].map((one) => word(one, '', 2));

/** The last word of the statement that opens a part: what follows it decides what may stand here. */
function lastOf(tokens: readonly Token[], words: readonly string[]): { readonly opener: string; readonly rest: readonly Token[] } | undefined {
  for (let i = tokens.length - 1; i >= 0; i -= 1) {
    const token = tokens[i];
    if (token?.type === 'word' && words.includes(token.text)) return { opener: token.text, rest: tokens.slice(i + 1) };
  }
  return undefined;
}

const isName = (token: Token | undefined): boolean => token?.type === 'word';
/** True where a name is expected: nothing written yet, or after a separator. */
function wantsName(rest: readonly Token[], separators: readonly string[]): boolean {
  const last = rest.at(-1);
  return !last || separators.includes(last.text);
}

function condition(circuit: Circuit, rest: readonly Token[], follow: readonly Proposal[]): Proposal[] {
  if (wantsName(rest, ['and', 'or', '('])) return conditionNames(circuit);
  const last = rest.at(-1);
  if (last && ['at', 'above', 'below'].includes(last.text)) return constants(circuit);
  if (last && (['on', 'off', 'extended', 'retracted', ')'].includes(last.text) || last.type === 'unit')) return [word('and'), word('or'), ...follow];
  return isName(last) ? [...CONDITION_VERBS, word('and'), word('or'), ...follow] : [];
}

function actionParts(circuit: Circuit, found: { readonly opener: string; readonly rest: readonly Token[] }, follow: readonly Proposal[]): Proposal[] {
  const { opener, rest } = found;
  const last = rest.at(-1);
  switch (opener) {
    case 'energise':
      if (wantsName(rest, [','])) return coils(circuit);
      return isName(last) ? [word('at', 'command'), word('from', 'ramp'), word('over', 'ramp time'), ...follow] : last?.type === 'unit' ? [word('to'), word('over'), ...follow] : [];
    case 'shift':
      if (wantsName(rest, [','])) return components(circuit, ['directional'], 1);
      if (last?.text === 'to') return ['a', 'b', 'centre'].map((one) => word(one, 'position', 1));
      return rest.some((token) => token.text === 'to') ? [...follow] : [word('to')];
    case 'stop':
      return wantsName(rest, [',']) ? components(circuit, ['drive'], 1) : [...follow];
    case 'run':
      return wantsName(rest, []) ? cycles(circuit, 1) : last?.type === 'number' ? [word('times')] : [...follow];
    default:
      return [];
  }
}

const STEP_FOLLOW: readonly Proposal[] = [word('until', 'ends when'), word('for', 'lasts'), word('at most', 'time limit', 6), ...ACTIONS.map((one) => ({ ...one, rank: 7 }))];

export function step(circuit: Circuit, statement: readonly Token[]): Proposal[] {
  // "step" and its name.
  if (statement.length < 2) return [];
  const inside = statement.slice(2);
  const last = inside.at(-1)?.text ?? '';
  if (inside.length === 0) return [...ACTIONS, word('until', 'ends when', 2), word('for', 'lasts', 2)];
  if (last === ',' && !lastOf(inside, ['energise', 'shift', 'stop'])) return [word('at most', 'time limit', 1)];
  const found = lastOf(inside, ['energise', 'shift', 'stop', 'run', 'until', 'for', 'most']);
  if (!found) return [];
  if (last === ',') {
    const limit: Proposal = word('at most', 'time limit', 4);
    return found.opener === 'until' || found.opener === 'for' ? [limit] : [...actionParts(circuit, found, []), limit];
  }
  if (found.opener === 'until') return condition(circuit, found.rest, [{ ...word('at most', 'time limit', 6), label: ', at most', insert: ', at most ' }]);
  if (found.opener === 'for') return found.rest.at(-1)?.type === 'unit' ? [word('and until'), word('until')] : constants(circuit, ['time']);
  if (found.opener === 'most') return constants(circuit, ['time']);
  return actionParts(circuit, found, STEP_FOLLOW);
}

export function whileLine(circuit: Circuit, statement: readonly Token[]): Proposal[] {
  const found = lastOf(statement.slice(1), ['energise', 'shift', 'stop', 'run']);
  return found ? actionParts(circuit, found, []) : condition(circuit, statement.slice(1), ACTIONS);
}

export function interlock(circuit: Circuit, statement: readonly Token[]): Proposal[] {
  const found = lastOf(statement, ['needs']);
  if (found) return condition(circuit, found.rest, []);
  return wantsName(statement.slice(1), [',']) ? coils(circuit) : [word('needs', 'condition', 1)];
}

export function emergency(circuit: Circuit, statement: readonly Token[]): Proposal[] {
  const found = lastOf(statement, ['energise', 'shift', 'stop', 'run']);
  return found ? actionParts(circuit, found, ACTIONS) : [...ACTIONS];
}

export function requirement(circuit: Circuit, statement: readonly Token[]): Proposal[] {
  const inside = statement.slice(1);
  if (inside.length === 0) return [word('never', 'a condition that must not come about', 2), ...components(circuit, undefined, 3), ...places(circuit).filter((one) => one.kind === CompletionItemKind.Interface), ...cycles(circuit, 3), ...steps(circuit, 4)];
  if (inside[0]?.text === 'never') return condition(circuit, inside.slice(1), []);
  const at = inside.findIndex((token) => token.text === 'still' || token.text in MEASURES);
  if (at < 0) return [...Object.entries(MEASURES).map(([name, one]) => word(name, one.about, 1)), word('still', 'no motion but leakage', 1)];
  const rest = inside.slice(at + 1);
  const last = rest.at(-1);
  const bounds: Proposal[] = [word('at least', '', 2), word('at most', '', 2), word('between', '', 2), word('reaches', 'at some point', 2)];
  const where: Proposal[] = [word('in', 'step, cycle or state', 1), word('from', 'range of the stroke', 3), word('extending', '', 3), word('retracting', '', 3)];
  if (last?.text === 'in' || (last?.text === 'and' && rest.some((token) => token.text === 'in') && !rest.some((token) => token.text === 'between'))) return [...steps(circuit, 1), ...cycles(circuit, 2), ...STATES];
  if (last?.text === 'at') return [word('least'), word('most')];
  if (last && ['least', 'most', 'between', 'reaches', 'from', 'to', 'for', 'within'].includes(last.text)) return constants(circuit);
  const bounded = rest.some((token) => ['least', 'most', 'between', 'reaches'].includes(token.text));
  if (bounded) return last?.type === 'unit' ? (rest.some((token) => token.text === 'between') && !rest.some((token) => token.text === 'and') ? [word('and')] : [word('for', 'held so long'), ...(rest.some((token) => token.text === 'reaches') ? [word('within')] : [])]) : [];
  if (last?.type === 'unit' && rest.some((token) => token.text === 'from') && !rest.some((token) => token.text === 'to')) return [word('to', '', 1)];
  return [...where, ...(inside[at]?.text === 'still' ? [word('and', 'another place'), word('for', 'held so long')] : bounds)];
}

/** Dimension of a number in a control line. */
export function controlDimensions(statement: readonly Token[]): readonly Dimension[] {
  const head = statement[0]?.text;
  if (head === 'require') {
    const opener = lastOf(statement.slice(0, -1), ['from', 'for', 'within', 'least', 'most', 'between', 'reaches', 'above', 'below', 'at']);
    if (opener?.opener === 'for' || opener?.opener === 'within') return ['time'];
    if (opener?.opener === 'from') return ['length', 'angle'];
    const measure = statement.map((token) => token.text).find((text) => text in MEASURES);
    const dimension = measure ? MEASURES[measure]?.dimension : undefined;
    return dimension ? (dimension === 'velocity' ? ['velocity', 'rotation'] : dimension === 'length' ? ['length', 'angle'] : [dimension]) : ['length', 'pressure', 'temperature', 'angle'];
  }
  const opener = lastOf(statement.slice(0, -1), ['for', 'most', 'over', 'at', 'from', 'above', 'below', 'to']);
  if (opener?.opener === 'for' || opener?.opener === 'most' || opener?.opener === 'over') return ['time'];
  if (opener?.opener === 'above' || opener?.opener === 'below') return ['length', 'pressure', 'temperature', 'angle'];
  return lastOf(statement, ['until'])?.rest.some((token) => token.text === 'at') ? ['length', 'angle'] : ['ratio', 'pressure', 'flow'];
}
