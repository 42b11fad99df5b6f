/** Numbers with units: dimensions, exact unit table, parse, format. */
export * from './dimension.ts';
export * from './quantity.ts';
