/** The one way from text to findings and study, the same the editor takes. */
import { analyse } from '@oilway/language';
import type { Circuit, Study } from '@oilway/circuit';
import type { Finding } from '@oilway/rules';
import { shelvesOf, type SourceFile } from './files.ts';
import { Texts } from './text/finding.ts';

export interface Opened {
  readonly file: SourceFile;
  /** Absent for a shelf (a file of parts and assemblies without a circuit). */
  readonly circuit?: Circuit;
  readonly findings: readonly Finding[];
  readonly study?: Study;
}

export interface Session {
  readonly opened: readonly Opened[];
  /** Texts of all documents, shelves included. */
  readonly texts: Texts;
}

/** Analyses files together with the shelves they use; results in the order of the files. */
export async function open(files: readonly SourceFile[]): Promise<Session> {
  const all = [...files, ...(await shelvesOf(files))];
  const result = await analyse(all.map(({ uri, text }) => ({ uri, text })));
  const byUri = new Map(result.documents.map((document) => [document.uri, document]));
  const opened = files.map((file): Opened => {
    const document = byUri.get(file.uri);
    if (document === undefined) throw new Error(`no answer for ${file.path}`);
    const { circuit, findings, study } = document;
    return { file, findings, ...(circuit === undefined ? {} : { circuit }), ...(study === undefined ? {} : { study }) };
  });
  const texts = new Map(all.map((file) => [file.uri, file.text]));
  return { opened, texts: new Texts((uri) => texts.get(uri)) };
}
