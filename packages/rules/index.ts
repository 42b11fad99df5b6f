/** The checks: findings over Circuit and Study. One rule is one file in `rules/`; the directed guard graph is in `graph/`. */
export * from './rule.ts';
export { tell, fingerprintOf, type About, type Told } from './finding.ts';
export { RULES, codePages, ruleOf } from './table.ts';
export { runRules, type RulesResult } from './run.ts';
export { EDGES, type EdgeClass, type EdgeSpec } from './graph/edges.ts';
export { type Edge, type Graph, graphOf } from './graph/graph.ts';
export { type Guard, guardsOf, guardsReached } from './graph/guards.ts';
export { type Rating, ratingOf } from './graph/rating.ts';
export { ifOpened, openAlways, throughValves, type Way, waysFrom, waysTo, wayWords } from './graph/reach.ts';
