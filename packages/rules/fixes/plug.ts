/** Mend that takes a port out of its `plug` statement and leads it to the reservoir. */
import type { Component, Origin, TextChange } from '@oilway/circuit';
import type { Fix, RuleContext } from '../rule.ts';
import { reservoirFor, writable } from './sheet.ts';

/** `plug SV1.Y` becomes `drain SV1.Y to R1`; where several ports are plugged in one statement only this one leaves. */
export function unplug(
  context: RuleContext,
  component: Component,
  port: string,
  plugged: Origin,
  head: 'drain' | 'return',
): Fix | undefined {
  const reservoir = reservoirFor(context.circuit);
  if (reservoir === undefined || !writable(context, component) || plugged.uri !== context.circuit.uri) return undefined;
  const text = context.text(plugged.uri);
  const start = text.lastIndexOf('\n', plugged.start - 1) + 1;
  const next = text.indexOf('\n', plugged.start);
  const end = next < 0 ? text.length : next;
  const line = text.slice(start, end);
  const parts = /^(\s*)(plug\s+)([^/\r]*)(.*)$/.exec(line);
  const drain = `${head} ${component.id}.${port} to ${reservoir}`;
  if (parts === null) return undefined;
  const [, indent = '', word = '', ports = '', rest = ''] = parts;
  const left = ports
    .split(',')
    .map((p) => p.trim())
    .filter((p) => p !== `${component.id}.${port}` && p !== '');
  const changed =
    left.length === 0
      ? `${indent}${drain}${rest === '' ? '' : ` ${rest}`}`
      : `${indent}${word}${left.join(', ')}${rest === '' ? '' : ` ${rest}`}\n${indent}${drain}`;
  const change: TextChange = { uri: plugged.uri, start, end, text: changed };
  return { title: `Lead ${component.id}.${port} to ${reservoir} instead`, safe: false, changes: [change] };
}
