/** The computing core: a network of elements in, pressures, flows and motion out. Knows no names, no text, no trade. */
export { compile, problemsOf, type CompileProblem, type Network } from './compile.ts';
export { chargeOf, gasOil, gasPressure } from './gas.ts';
export * from './network.ts';
export { nitrogenCurve, nitrogenDensity, nitrogenEntropy, nitrogenPressure } from './nitrogen.ts';
export * from './results.ts';
export { sensitivities } from './sensitivity.ts';
export { solveSteady } from './steady.ts';
export { Transient } from './transient.ts';
export { magnitude } from './smooth.ts';
