/** The domain: kinds, circuit model, assembly, study. Knows no text, no editor, no rule. */
export * from './model/origin.ts';
export * from './model/value.ts';
export * from './model/circuit.ts';
export { emptyCircuit } from './model/empty.ts';
export * from './kinds/names.ts';
export * from './kinds/kind.ts';
export * from './study/study.ts';
export * from './kinds/index.ts';
export * from './kinds/line-properties.ts';
export * from './assembly/machine.ts';
export * from './fluid/index.ts';
export * as read from './kinds/read.ts';
export { assemble } from './assembly/assemble.ts';
export { areasOf, beginsAt, portOfSingle } from './kinds/cylinder-areas.ts';
export { type Positions, positionsOf, type Side, sideOfCoil } from './kinds/directional-positions.ts';
export { ratedAt } from './kinds/read.ts';
export { study, type StudyOptions } from './study/run-study.ts';
export { type Explained, explain, type ExplainRequest } from './study/working/explain.ts';
