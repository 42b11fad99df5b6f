/** Places of requirements, loads and allowances: steps, cycles, machine states. */
import type { Ref } from '../generated/ast.ts';
import type { Context } from './context.ts';

export const STATE_NAMES = ['REST', 'OFF', 'IDLE', 'STOP'] as const;
export const isState = (word: string): boolean => (STATE_NAMES as readonly string[]).includes(word);

/** The id of a step or cycle named; `step`: steps only, `place`: steps, cycles and states. Says what does not resolve. */
export function resolvePlace(context: Context, ref: Ref | undefined, want: 'step' | 'place' | 'running'): string | undefined {
  const words = context.wordsOf(ref);
  const name = words.join('.');
  const origin = context.origin(ref);
  if (name === '') return undefined;
  if (want === 'place' && isState(name)) return name;
  const declared = context.names.get(name);
  if (declared?.what === 'step' || (declared?.what === 'cycle' && want !== 'step')) {
    referPath(context, ref, declared.id);
    return declared.id;
  }
  const short = words.length === 1 ? context.stepsByName.get(name) : undefined;
  if (short !== undefined && declared === undefined) {
    if (short.length > 1) {
      context.report({
        code: 'NAME',
        what: `\`${name}\` is a step of several cycles: write ${short.map((id) => `\`${id}\``).join(' or ')}`,
        origin,
        fixes: short.map((id) => context.replace(origin, id, `Write \`${id}\``)),
      });
      return undefined;
    }
    const id = short[0];
    if (id !== undefined) context.refer(origin, id);
    return id;
  }
  if (declared !== undefined && want !== 'running') {
    context.report({
      code: 'NAME',
      what: `\`${name}\` is a ${declared.what}; the name of a step${want === 'step' ? '' : ', cycle or state'} is needed here`,
      origin,
    });
    return undefined;
  }
  const fits = want === 'step' ? 'a step' : want === 'place' ? 'a step or cycle (or REST, OFF, IDLE, STOP)' : 'a step or cycle';
  context.unknownName(name, origin, (d) => d.what === 'step' || (want !== 'step' && d.what === 'cycle'), fits);
  return undefined;
}

/** References of `Drill.Clamp`: the cycle at its word, the step at its own. */
function referPath(context: Context, ref: Ref | undefined, id: string): void {
  const parts = ref?.parts ?? [];
  const first = parts[0];
  const last = parts.at(-1);
  if (parts.length > 1 && first !== undefined) context.refer(context.origin(first), first.text ?? '');
  if (last !== undefined) context.refer(context.origin(last), id);
}
