/** Mends that add a line: a port to the reservoir, a plug. */
import type { Component } from '@oilway/circuit';
import type { Fix, RuleContext } from '../rule.ts';
import { below, lastLine, reservoirFor, statement, writable } from './sheet.ts';

/** `drain SV1.Y to R1` below the last line. */
export function toReservoirLine(context: RuleContext, component: Component, port: string, head: 'drain' | 'return'): Fix | undefined {
  const reservoir = reservoirFor(context.circuit);
  const last = lastLine(context.circuit);
  if (reservoir === undefined || last === undefined || !writable(context, component)) return undefined;
  return {
    title: `Lead ${component.id}.${port} to ${reservoir}`,
    safe: false,
    changes: [below(context, last.origin, [statement(context, last.origin, head, `${component.id}.${port} to ${reservoir}`)])],
  };
}

/** `plug V1.B` below the last line: says that the port is meant to be closed. */
export function plugPort(context: RuleContext, component: Component, port: string): Fix | undefined {
  const last = lastLine(context.circuit);
  const under = last?.origin ?? component.origin;
  if (!writable(context, component)) return undefined;
  return {
    title: `Plug ${component.id}.${port}: it is meant to be closed`,
    safe: false,
    changes: [below(context, under, [statement(context, under, 'plug', `${component.id}.${port}`)])],
  };
}
