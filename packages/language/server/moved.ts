/** Findings of an earlier text kept in their place while one types: origins follow the edits until the next study speaks. */
import type { Origin } from '@oilway/circuit';
import type { Finding } from '@oilway/rules';

/** One replacement: [start, end) of the old text became `length` characters. */
export interface Edit {
  readonly start: number;
  readonly end: number;
  readonly length: number;
}

/** Where an origin stands after the edit; undefined where its characters are gone. */
export function move(origin: Origin, edit: Edit): Origin | undefined {
  const shift = edit.length - (edit.end - edit.start);
  if (origin.end <= edit.start && !(origin.start === origin.end && origin.start === edit.start)) return origin;
  if (origin.start >= edit.end) return { ...origin, start: origin.start + shift, end: origin.end + shift };
  // The edit lies inside: the origin grows or shrinks with it.
  if (origin.start <= edit.start && edit.end <= origin.end) return { ...origin, end: origin.end + shift };
  return undefined;
}

/** The finding after an edit of `uri`. Its fixes were made for the old text and are dropped. */
export function moveFinding(finding: Finding, uri: string, edit: Edit): Finding | undefined {
  const touches = finding.origin.uri === uri || finding.related.some((one) => one.origin.uri === uri);
  if (!touches) return finding.fixes.length > 0 ? { ...finding, fixes: [] } : finding;
  const origin = finding.origin.uri === uri ? move(finding.origin, edit) : finding.origin;
  if (!origin) return undefined;
  const related = finding.related.flatMap((one) => {
    const place = one.origin.uri === uri ? move(one.origin, edit) : one.origin;
    return place ? [{ ...one, origin: place }] : [];
  });
  return { ...finding, origin, related, fixes: [] };
}

/** The one replacement that turns `before` into `after`. */
export function editBetween(before: string, after: string): Edit | undefined {
  if (before === after) return undefined;
  const most = Math.min(before.length, after.length);
  let start = 0;
  while (start < most && before.charCodeAt(start) === after.charCodeAt(start)) start += 1;
  let behind = 0;
  while (behind < most - start && before.charCodeAt(before.length - 1 - behind) === after.charCodeAt(after.length - 1 - behind))
    behind += 1;
  return { start, end: before.length - behind, length: after.length - behind - start };
}
