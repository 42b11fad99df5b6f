/** Hover on a coil: its valve and side, the steps in which it is live, its interlocks, and what it moves alone. */
import type { Coil } from '@oilway/circuit';
import type { Analysis } from '../analysis.ts';
import { componentOf } from './places.ts';
import { standing } from './rests.ts';
import { literal, list, paragraphs, Show } from './show.ts';
import { conditionText } from './step.ts';
import { unitsOfActuator } from './actuator.ts';

export function hoverCoil(analysis: Analysis, coil: Coil): string {
  const { circuit, studied } = analysis;
  if (!circuit) return '';
  const valve = componentOf(circuit, coil.component);
  const title = `**${literal(coil.id)}** coil${coil.side ? ` ${coil.side}` : ''} of ${literal(coil.component)}${valve?.title ? `, ${literal(valve.title)}` : ''}`;
  const steps = circuit.cycles.flatMap((cycle) =>
    cycle.steps
      .filter((step) => step.actions.some((action) => action.does === 'energise' && action.commands.some((one) => one.coil === coil.id)))
      .map((step) => step.id),
  );
  const standingControl = circuit.whiles
    .filter((one) => one.action.does === 'energise' && one.action.commands.some((command) => command.coil === coil.id))
    .map((one) => `while ${conditionText(analysis, one.when)}`);
  const live = [...steps.map(literal), ...standingControl];
  const interlocks = circuit.interlocks
    .filter((one) => one.coils.includes(coil.id))
    .map((one) => `Needs ${conditionText(analysis, one.needs)}.`);
  const alone = studied?.study.states.find((state) => state.state === 'COIL' && state.of === coil.id);
  const show = studied ? new Show(studied.circuit) : undefined;
  const moves = new Set<string>();
  for (const variant of alone?.variants ?? []) {
    for (const one of variant.moving) {
      const actuator = circuit.components.find((part) => part.id === one.id);
      if (!actuator || !show) continue;
      const units = unitsOfActuator(actuator);
      moves.add(`${literal(one.id)} ${units.words[Math.sign(one.velocity) + 1]}`);
    }
  }
  return paragraphs(
    title,
    live.length > 0 ? `Live in ${list(live)}.` : 'Live in no step.',
    interlocks.join(' '),
    alone ? (moves.size > 0 ? `Alone it moves ${list([...moves])}.` : 'Alone it moves nothing.') : '',
    studied ? '' : standing(analysis),
  );
}
