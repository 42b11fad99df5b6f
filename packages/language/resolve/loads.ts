/** Loads: the body, its actuators, and what is needed to know which way its weight points. */
import { type Component, LOAD_PROPERTIES, type Load, type Property } from '@oilway/circuit';
import type { Load as LoadNode } from '../generated/ast.ts';
import type { Context } from './context.ts';
import { readProperties } from './properties.ts';
import { wrongSize } from './sizes.ts';
import type { Values } from './values.ts';

/** One load statement; nothing where no actuator resolves. */
export function resolveLoad(context: Context, values: Values, node: LoadNode): Load | undefined {
  const actuators: Component[] = [];
  for (const ref of node.actuators ?? []) {
    const words = context.wordsOf(ref);
    const name = words[0] ?? '';
    const origin = context.origin(ref);
    const component = words.length === 1 ? context.components.get(name) : undefined;
    const declared = context.names.get(name);
    if (declared?.what === 'unit') {
      context.refer(context.origin(ref.parts?.[0]), declared.id);
      continue;
    }
    if (component === undefined || !['cylinder', 'motor', 'rotary'].includes(component.kind)) {
      if (declared === undefined)
        context.unknownName(name, origin, (d) => d.kind === 'cylinder' || d.kind === 'motor' || d.kind === 'rotary', 'an actuator');
      else
        context.report({
          code: 'NAME',
          what: `A load stands on an actuator: \`${words.join('.')}\` is ${words.length > 1 ? 'a port' : `a ${component?.kind ?? declared.what}`}`,
          origin,
        });
      continue;
    }
    context.refer(origin, component.id);
    actuators.push(component);
  }
  const first = actuators[0];
  if (first === undefined) return undefined;
  const turns = first.kind !== 'cylinder';
  const other = actuators.find((actuator) => (actuator.kind !== 'cylinder') !== turns);
  if (other !== undefined) {
    context.report({
      code: 'VALUE',
      what: `\`${first.id}\` and \`${other.id}\` cannot move as one body: one turns, the other does not`,
      origin: context.origin(node),
    });
    return undefined;
  }
  const specs = LOAD_PROPERTIES.map((spec) =>
    spec.name === 'friction' ? { ...spec, shape: { form: 'quantity', dimensions: [turns ? 'torque' : 'force'] } as const } : spec,
  ).map((spec) => (spec.name === 'speed' && turns ? { ...spec, shape: { form: 'quantity', dimensions: ['rotation'] } as const } : spec));
  const read = readProperties(context, values, node.properties, {
    name: first.id,
    specs,
    shaped: false,
    of: 'a load',
    actuator: first.kind,
  });
  const properties = read.properties.map((property): Property => {
    const what = wrongSize(property);
    if (what === undefined) return property;
    context.report({ code: 'VALUE', what, origin: property.origin, place: first.id });
    return { ...property, value: { type: 'unknown', why: what, origin: property.origin } };
  });
  checkLoad(context, properties, actuators, turns);
  return { actuators: actuators.map((actuator) => actuator.id), properties, origin: context.origin(node) };
}

function checkLoad(context: Context, properties: readonly Property[], actuators: readonly Component[], turns: boolean): void {
  const other: Readonly<Record<string, string>> = turns
    ? { inward: 'backward', outward: 'forward' }
    : { backward: 'inward', forward: 'outward', inertia: 'mass' };
  for (const property of properties) {
    const better = Object.hasOwn(other, property.name) ? other[property.name] : undefined;
    if (better !== undefined) {
      context.report({
        code: 'VALUE',
        what: `\`${property.name}\` is no load of a ${actuators[0]?.kind ?? 'actuator'}: write \`${better}\``,
        origin: property.nameOrigin,
        fixes: [context.replace(property.nameOrigin, better, `Write \`${better}\``)],
        place: actuators[0]?.id,
      });
    }
    if (property.name !== 'mass' && property.name !== 'people') continue;
    if (turns || (property.value.type === 'word' && property.value.word === 'never')) continue;
    for (const actuator of actuators) {
      if (actuator.kind !== 'cylinder' || actuator.properties.some((own) => own.name === 'attitude') || context.isHalfRead(actuator))
        continue;
      context.report({
        code: 'M08',
        what: `\`${actuator.id}\` carries ${property.name === 'mass' ? 'a mass' : 'a load near people'}, but nothing says how it stands: \`attitude\` is missing`,
        why: 'Whether the weight pulls the rod out, pushes it in or does neither decides what holds it.',
        mend: 'Write `attitude rod up`, `rod down`, `level` or an angle at the cylinder.',
        origin: property.origin,
        related: [{ message: `\`${actuator.id}\` is declared here`, origin: actuator.nameOrigin }],
        place: actuator.id,
      });
    }
  }
}
