/** The one way from text to findings and study, the same the editor takes. */
import type { Circuit, Study } from '@oilway/circuit';
import { analyse } from '@oilway/language';
import type { Finding } from '@oilway/rules';
import { engines } from './engines.ts';
import type { SourceFile } from './files.ts';
import { Texts } from './text/finding.ts';

export interface Opened {
  readonly file: SourceFile;
  /** Absent for a shelf (a file of parts and assemblies without a `circuit` statement). */
  readonly circuit?: Circuit;
  readonly findings: readonly Finding[];
  readonly study?: Study;
}

export interface Session {
  readonly opened: readonly Opened[];
  readonly texts: Texts;
  /** What was not computed: errors of the program itself, or time run out. What they were to find is missing. */
  readonly failures: readonly string[];
}

/** Analyses files, each within `limit` seconds; results in their order. */
export function open(files: readonly SourceFile[], limit?: number): Session {
  const failures: string[] = [];
  const { documents } = analyse(
    files.map(({ uri, text }) => ({ uri, text })),
    engines(failures, limit),
  );
  const byUri = new Map(documents.map((document) => [document.uri, document]));
  const opened = files.map((file): Opened => {
    const document = byUri.get(file.uri);
    if (document === undefined) {
      failures.push(`${file.path}: no answer`);
      return { file, findings: [] };
    }
    const { circuit, findings, study, failed } = document;
    if (failed !== undefined) failures.push(`internal error, please report it: ${file.path}: ${failed}`);
    return { file, findings, ...(circuit.name === undefined ? {} : { circuit }), ...(study === undefined ? {} : { study }) };
  });
  const texts = new Map(files.map((file) => [file.uri, file.text]));
  return { opened, texts: new Texts((uri) => texts.get(uri)), failures };
}
