/** Numbers with units: dimensions, exact unit table, parse, convert, compute, format, preferred number series. */
export * from './dimension.ts';
export * from './quantity.ts';
export * from './units.ts';
export * from './spelling.ts';
export * from './convert.ts';
export * from './arithmetic.ts';
export * from './format.ts';
export * from './preferred.ts';
