/** Mend that changes one setting to another value. */
import type { Component } from '@oilway/circuit';
import type { Fix, RuleContext } from '../rule.ts';
import { valueOrigin, writable } from './sheet.ts';

/** `set 60 bar` becomes `set 105 bar`. Not offered for values from a constant, a part, or with a tolerance: those a person weighs. */
export function setTo(context: RuleContext, component: Component, name: string, value: string): Fix | undefined {
  const property = component.properties.find((p) => p.name === name && p.part === undefined);
  if (property?.value.type !== 'quantity' || property.value.from !== undefined || property.value.plusMinus !== undefined) return undefined;
  if (!writable(context, component)) return undefined;
  const { uri, start, end } = valueOrigin(context, property);
  return { title: `Set ${component.id} to ${value}`, safe: false, changes: [{ uri, start, end, text: value }] };
}
