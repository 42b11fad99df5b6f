/** Looks through plain data for figures that are no numbers, and words made of them. */

/** Paths and values of all that is no number: `states.0.variants.1.point.power.P1=Infinity`. */
export function notNumbers(data: unknown, path = ''): readonly string[] {
  if (typeof data === 'number') return Number.isFinite(data) ? [] : [`${path}=${data}`];
  if (typeof data === 'string') return /\bNaN\b|\bundefined\b|\[object|\bInfinity\b/.test(data) ? [`${path}: ${data}`] : [];
  if (data === null || typeof data !== 'object') return [];
  return Object.entries(data).flatMap(([key, value]) => notNumbers(value, path === '' ? key : `${path}.${key}`));
}

/** How many numbers there are in it. */
export function looked(data: unknown): number {
  if (typeof data === 'number') return 1;
  if (data === null || typeof data !== 'object') return 0;
  return Object.values(data).reduce((sum: number, value) => sum + looked(value), 0);
}
