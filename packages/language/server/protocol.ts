/** Requests and notifications of our own, beside the language server protocol. */
import { NotificationType, RequestType } from 'vscode-languageserver-protocol';
import type { Circuit, Study } from '@oilway/circuit';
import type { Finding } from '@oilway/rules';

/** Server to client: a file's text, null where there is none. For servers without a disk. */
export const ReadFile = new RequestType<{ readonly uri: string }, string | null, void>('oilway/readFile');

export interface DirectoryEntry {
  readonly uri: string;
  readonly isFile: boolean;
  readonly isDirectory: boolean;
}
/** Server to client: what a folder holds, null where there is none. */
export const ReadDirectory = new RequestType<{ readonly uri: string }, readonly DirectoryEntry[] | null, void>('oilway/readDirectory');

export interface StudyReply {
  /** Version of the text the findings belong to. */
  readonly version: number;
  readonly circuit: Circuit | null;
  readonly study: Study | null;
  /** True where the text has changed since the study. */
  readonly older: boolean;
  readonly findings: readonly Finding[];
}
/** Client to server: the resolved circuit and the latest finished study, for views. */
export const StudyOf = new RequestType<{ readonly uri: string }, StudyReply | null, void>('oilway/study');

/** Client to server: the page of a rule as Markdown, null where there is none. */
export const RulePage = new RequestType<{ readonly code: string }, string | null, void>('oilway/rulePage');

/** Server to client: a study of this version has ended. `ms`: time it took. */
export const Studied = new NotificationType<{ readonly uri: string; readonly version: number; readonly ms: number }>('oilway/studied');

export interface InitializationOptions {
  /** Settings as under `oilway.` of the editor. */
  readonly settings?: unknown;
  /** Address of the study worker's script (web). */
  readonly studyWorker?: string;
  /** Address of a rule's page; `{code}` stands for the code. */
  readonly rulePage?: string;
  /** The client's command that opens the list of proposals: run after a proposal that asks for a second one (`C1.` and its ports). */
  readonly suggestCommand?: string;
}
