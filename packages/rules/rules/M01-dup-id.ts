/** M01: one designation on two components. */
import type { Component, Property } from '@oilway/circuit';
import { tell } from '../finding.ts';
import { writable } from '../fixes/sheet.ts';
import type { Fix, Rule, RuleContext } from '../rule.ts';
import { byName } from '../words.ts';
import { relatedTo } from './pump-guard.ts';

interface Coded {
  readonly component: Component;
  readonly property: Property;
  /** With the unit it stands in: a unit's own code stands before it on the drawing. */
  readonly key: string;
  readonly code: string;
}

function coded(context: RuleContext): Coded[] {
  return context.circuit.components.flatMap((component) => {
    const property = component.properties.find((p) => p.name === 'code');
    if (property?.value.type !== 'text') return [];
    const unit = component.id.includes('.') ? component.id.slice(0, component.id.lastIndexOf('.')) : '';
    return [{ component, property, code: property.value.text, key: `${unit}|${property.value.text}` }];
  });
}

/** The next number of the same circuit number: `1.4` where `1.1` to `1.3` are taken. */
function renumber(context: RuleContext, one: Coded, all: readonly Coded[]): Fix | undefined {
  const parts = /^(.*?)(\d+)$/.exec(one.code);
  const shared = all.filter((c) => c.property.origin.start === one.property.origin.start).length > 1;
  if (parts === null || shared || one.property.part !== undefined || !writable(context, one.component)) return undefined;
  const taken = new Set(all.map((c) => c.code));
  let n = Number(parts[2]);
  while (taken.has(`${parts[1]}${n}`)) n++;
  const { uri, start, end } = one.property.value.origin;
  return { title: `Number ${one.component.id} ${parts[1]}${n}`, safe: false, changes: [{ uri, start, end, text: `"${parts[1]}${n}"` }] };
}

export const M01: Rule = {
  code: 'M01',
  name: 'dup-id',
  title: 'Designation used twice',
  severity: 'error',
  why: 'The wrong valve gets wired, set or ordered.',
  ground: 'ISO 1219-2, identification code of components',
  mend: 'Give each component a code of its own.',
  needs: 'topology',
  page: `
The \`code\` of every component is unique in the circuit, and inside each unit (whose own code stands before those inside it). Twins declared in
one statement, and components that take their code from the same \`part\`, share one code and are told too.

Stays clean: the same code in two units; components without a code; a name used twice is an error of the language.`,
  detect(context) {
    // By name, so that the order of statements does not decide which of the two is told.
    const all = coded(context).sort((a, b) => byName(a.component.id, b.component.id));
    const first = new Map<string, Coded>();
    return all.flatMap((one) => {
      const earlier = first.get(one.key);
      if (earlier === undefined) {
        first.set(one.key, one);
        return [];
      }
      const twins = earlier.property.origin.start === one.property.origin.start;
      return [
        tell(M01, {
          what: `Code "${one.code}" stands on ${earlier.component.id} and on ${one.component.id}.`,
          origin: twins ? one.component.nameOrigin : one.property.value.origin,
          place: one.component.id,
          related: [relatedTo(earlier.component, `${earlier.component.id} bears it too`)],
          fixes: [renumber(context, one, all)],
        }),
      ];
    });
  },
};
