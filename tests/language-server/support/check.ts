/** Texts with marks: `|` is the cursor, `«` and `»` hold the places expected. No mark is a character of the notation. */
import { Analysis, type Studied } from '../../../packages/language/features/analysis.ts';
import { languageAnalyser } from '../../../packages/language/server/language-analyser.ts';

export const URI = 'file:///test/circuit.oilway';

export interface Marked {
  readonly text: string;
  readonly cursor: number;
  readonly places: readonly string[];
  readonly spans: readonly { readonly start: number; readonly end: number }[];
}

export function unmark(marked: string): Marked {
  let text = '';
  let cursor = -1;
  const open: number[] = [];
  const spans: { start: number; end: number }[] = [];
  for (const letter of marked) {
    if (letter === '|') cursor = text.length;
    else if (letter === '«') open.push(text.length);
    else if (letter === '»') spans.push({ start: open.pop() ?? 0, end: text.length });
    else text += letter;
  }
  return { text, cursor, spans: spans.sort((a, b) => a.start - b.start), places: spans.map((span) => text.slice(span.start, span.end)) };
}

const analyser = languageAnalyser();

export function analyseText(text: string, studied?: Studied): Analysis {
  const answer = analyser.analyse(URI, (uri) => (uri === URI ? text : undefined));
  if (answer.failed) throw new Error(answer.failed);
  return new Analysis({
    uri: URI,
    version: 1,
    text,
    circuit: answer.circuit,
    findings: [...answer.language, ...answer.topology],
    occurrences: answer.occurrences,
    ...(studied ? { studied } : {}),
  });
}

/** Analyses a marked text and hands over analysis and cursor. */
export function check<T>(marked: string, feature: (analysis: Analysis, cursor: number) => T): T {
  const { text, cursor } = unmark(marked);
  return feature(analyseText(text), cursor);
}

/** Rows of `kind: text between the marks` as the document has them. */
export const sliced = (analysis: Analysis, origins: readonly { readonly start: number; readonly end: number }[]): string[] =>
  origins.map((one) => analysis.text.slice(one.start, one.end));

/** A circuit that the tests put lines into. */
export const BENCH = `circuit Bench "Test bench"
let system = 120 bar
fluid     HM46 (grade 46, temperature 45 degC)
reservoir R1 (volume 60 L)
drive     M1 (power 3 kW, speed 1450 rpm)
pump      P1 (displacement 8 cm3/rev, driven by M1, rated 210 bar)
relief    RV1 (set system, passes 20 L/min at 4 bar)
directional V1 (4/3, centre closed, spring to centre, coil a SOL1, coil b SOL2, passes 30 L/min at 3 bar) "Table"
throttle  FC1 (set 6 L/min, compensated, reverse check)
cylinder  C1 (bore 63 mm, rod 36 mm, stroke 200 mm, attitude level) "Slide"
switch    LS1 (on C1, from 195 mm to 200 mm)
switch    LS2 (on C1, from 0 mm to 2 mm)
suction R1 to P1
working pressure: P1 to RV1, V1.P
working V1.A to C1.cap
working C1.rod to FC1 to V1.B
return  V1.T, RV1 to R1
load C1 (friction 200 N, resist 4 kN extending)
cycle Part {
  step Out  energise SOL1 until LS1 on, at most 8 s
  step Back energise SOL2 until LS2 on, at most 8 s
}
`;
