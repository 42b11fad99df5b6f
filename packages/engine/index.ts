/** The computing core: a network of elements in, pressures, flows and motion out. Knows no names, no text, no trade. */
export * from './network.ts';
export * from './results.ts';
