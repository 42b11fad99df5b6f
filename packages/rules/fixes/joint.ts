/** The mend for a line that joins two named lines straight: a check valve is put between them, in reading direction. */
import type { Circuit, Component, LineStatement, TextChange } from '@oilway/circuit';
import type { Graph } from '../graph/graph.ts';
import type { Fix, RuleContext } from '../rule.ts';
import { writtenAt } from './places.ts';
import { below, freeName, statement, writable } from './sheet.ts';
import { pumpFlow } from '../graph/flow.ts';
import { drop, round } from './values.ts';

const namesLine = (line: LineStatement, name: string): boolean => line.stations.some((s) => s.places.some((p) => p.line === name));

/** The one line that joins the line called `name` to others: `working low to pressure`. */
function jointOf(circuit: Circuit, name: string): LineStatement | undefined {
  const joints = circuit.lines.filter((line) => line.function !== 'pilot' && namesLine(line, name));
  const [joint] = joints;
  if (joint === undefined || joints.length > 1 || joint.origin.uri !== circuit.uri || joint.stations.length !== 2) return undefined;
  const from = joint.stations[0]?.places ?? [];
  // Reading direction is the check's free direction: only where the line begins with `name` alone does it say so.
  return from.length === 1 && from[0]?.line === name ? joint : undefined;
}

/** A check valve that is declared and joined to nothing: what is left where one was taken out of its line. */
const idleCheck = (context: RuleContext): Component | undefined =>
  context.circuit.components.find(
    (c) => c.kind === 'check' && writable(context, c) && ['in', 'out'].every((port) => writtenAt(context.circuit, c.id, port).length === 0),
  );

/**
 * `working low: P1 to UV1` and `working low to pressure`: the check comes into the second line. Undefined where the pump's outlet is
 * joined in any other way.
 */
export function checkInJoint(context: RuleContext, graph: Graph, pump: Component): Fix | undefined {
  const { circuit } = graph;
  const outlets = writtenAt(circuit, pump.id, 'P').filter((w) => w.line.function !== 'pilot');
  const name = outlets[0]?.line.name;
  const flow = pumpFlow(graph, pump);
  if (outlets.length !== 1 || name === undefined || flow === undefined || !writable(context, pump)) return undefined;
  const joint = jointOf(circuit, name);
  const end = joint?.stations[0]?.origin.end;
  if (joint === undefined || end === undefined) return undefined;
  const idle = idleCheck(context);
  const check = idle?.id ?? freeName(circuit, 'CV');
  const into: TextChange = { uri: joint.origin.uri, start: end, end, text: ` to ${check}` };
  if (idle) return { title: `Put check valve ${check} between ${pump.id} and the rest`, safe: false, changes: [into] };
  const size = `passes ${round(circuit, flow, 'flow', 'up').text} at ${drop(circuit, 3)}`;
  const declared = below(context, pump.origin, [
    statement(context, pump.origin, 'check', `${check} (crack ${drop(circuit, 0.5)}, ${size})`),
  ]);
  return { title: `Insert check valve ${check} between ${pump.id} and the rest`, safe: false, changes: [declared, into] };
}
