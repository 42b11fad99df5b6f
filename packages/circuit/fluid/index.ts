/** The fluid: viscosity, density, stiffness over temperature and pressure. */
export * from './density.ts';
export * from './gas.ts';
export * from './nitrogen.ts';
export * from './oil.ts';
export * from './viscosity.ts';
export { viscosityAt100, viscosityIndex } from './viscosity-index.ts';
