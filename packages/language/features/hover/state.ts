/** Hover on REST, OFF, STOP, IDLE: what the word means, what the pumps do there, what moves, and how many variants were looked at. */
import type { Analysis } from '../analysis.ts';
import { componentOf, extent, pressureAt } from './places.ts';
import { restsOn, standing } from './rests.ts';
import { list, literal, paragraphs, Show, table } from './show.ts';
import { unitsOfActuator } from './actuator.ts';
import { WORD_ABOUT } from './keyword.ts';

const STATES: ReadonlySet<string> = new Set(['REST', 'OFF', 'STOP', 'IDLE']);
export const isState = (word: string): boolean => STATES.has(word);

export function hoverState(analysis: Analysis, word: string): string {
  const title = paragraphs(`**${word}**`, WORD_ABOUT[word]);
  const { studied } = analysis;
  if (!studied) return paragraphs(title, standing(analysis));
  const { circuit } = studied;
  const show = new Show(circuit);
  const states = studied.study.states.filter((one) => one.state === word);
  if (states.length === 0) return paragraphs(title, word === 'IDLE' ? 'Here the same as REST.' : 'Not computed.', standing(analysis));
  const pumps = circuit.components.filter((one) => one.kind === 'pump');
  const rows = states.map((state) => {
    const motions = new Set<string>();
    for (const variant of state.variants) {
      for (const one of variant.moving) {
        const actuator = componentOf(circuit, one.id);
        const how = actuator ? unitsOfActuator(actuator).words[Math.sign(one.velocity) + 1] : '';
        motions.add(`${literal(one.id)} ${how}${one.relaxes === undefined ? '' : ` (relaxes ${show.figure(one.relaxes, 'length')})`}`);
      }
    }
    return [
      state.id,
      motions.size > 0 ? list([...motions]) : 'nothing',
      ...pumps.map((pump) => {
        const span = extent(state.variants.map((variant) => pressureAt(circuit, variant.point, pump.id, 'P')));
        return span ? show.span(span.low, span.high, 'pressure') : '—';
      }),
      state.studied.of === state.studied.all ? `${state.studied.all}` : `${state.studied.of} of ${state.studied.all}`,
    ];
  });
  return paragraphs(
    title,
    table(['State', 'Moves', ...pumps.map((pump) => `Pressure at ${pump.id}`), 'Variants'], rows),
    standing(analysis),
    restsOn(analysis),
  );
}
