/** What must stand open for oil to take a way, and what stops it: words for A02 and A07. */
import type { Component } from '@oilway/circuit';
import type { Graph } from '../graph/graph.ts';
import type { Reached } from '../graph/guards.ts';
import { positionsOf, positionWords } from '../graph/paths.ts';
import { list } from '../words.ts';

/** "V1 stands in a (P to A)": what must be so for oil to reach the relief. */
export function conditions(
  graph: Graph,
  reached: Reached,
): { readonly only: string; readonly else: string; readonly closing: readonly Component[] } {
  const only: string[] = [];
  const otherwise: string[] = [];
  const closing: Component[] = [];
  for (const edge of reached.way.edges) {
    const component = graph.component(edge.component);
    if (edge.class === 'always' || component === undefined) continue;
    closing.push(component);
    if (edge.kind === 'directional') {
      const open = edge.positions ?? [];
      const shut = positionsOf(component).filter((p) => !open.includes(p));
      only.push(
        `${component.id} joins ${edge.from} to ${edge.to} (position ${list(
          open.map((p) => positionWords(component, p)),
          'or',
        )})`,
      );
      otherwise.push(
        shut.length > 0
          ? `${component.id} in ${list(
              shut.map((p) => positionWords(component, p)),
              'or',
            )}`
          : `${component.id} on its way between two positions`,
      );
    } else if (edge.shut === true) {
      only.push(`${component.id} is opened by hand; it is declared closed`);
      otherwise.push(`${component.id} closed`);
    } else {
      only.push(
        edge.byHand === true
          ? `${component.id} is open`
          : (edge.words ?? component.id).replace(
              / (at its setting only|may be parted|may clog|may have shut|may stand)$/,
              ' lets oil through',
            ),
      );
      otherwise.push(`${component.id} closed`);
    }
  }
  return { only: only.join(' and '), else: list(otherwise, 'or'), closing };
}
