/** The documents and what is known of each: text at once, resolution after a pause in typing, the study when it is ready. Knows no connection. */
import type { Circuit, Study } from '@oilway/circuit';
import type { Finding } from '@oilway/rules';
import { Analysis } from '../features/analysis.ts';
import type { Analyser, TextAnswer } from './analyser.ts';
import { Coalescer, realTimers, type Timers } from './coalesce.ts';
import { editBetween, moveFinding } from './moved.ts';
import { StudyQueue, type QueuedStudy } from './study-queue.ts';
import type { StudyRunner } from './study-runner.ts';

export interface SessionParts {
  readonly analyser: Analyser;
  readonly runner: StudyRunner;
  /** Text of a file that is not open. */
  readFile(uri: string): Promise<string | undefined>;
  /** Shows the findings of a document. `version` absent: it is not open. */
  publish(uri: string, version: number | undefined, findings: readonly Finding[]): void;
  /** A study ended: hints and views may be drawn again. */
  studied(uri: string, version: number, ms: number): void;
  log(message: string): void;
  readonly timers?: Timers;
}

interface Studied {
  readonly study: Study;
  readonly circuit: Circuit;
  /** What the rules found with it, origins of the studied text. */
  readonly findings: readonly Finding[];
  readonly text: number;
}

interface Document {
  readonly uri: string;
  text: string;
  /** Counts texts: a change of a used file counts too. */
  serial: number;
  version: number | undefined;
  answer: TextAnswer | undefined;
  studied: Studied | undefined;
  /** Computed findings of the latest study, moved along with the edits since. */
  moved: readonly Finding[];
  analysis: Analysis | undefined;
  /** The study of this text broke down. */
  broken: boolean;
  /** Handle of the pause before the next study. */
  pause: unknown;
}

/** While one types, a study would be begun and cut off at every key: it waits for a pause of so many ms. The first one of a document does not. */
const PAUSE = 120;

export class Session {
  readonly #parts: SessionParts;
  readonly #documents = new Map<string, Document>();
  /** Files read for `use`; null = not there. */
  readonly #files = new Map<string, string | null>();
  readonly #reading = new Set<string>();
  readonly #typing: Coalescer;
  readonly #studies: StudyQueue;
  readonly #timers: Timers;
  #compute = true;

  constructor(parts: SessionParts) {
    this.#parts = parts;
    this.#timers = parts.timers ?? realTimers;
    this.#typing = new Coalescer((uri) => this.#analyse(uri), { timers: this.#timers });
    this.#studies = new StudyQueue(parts.runner, this.#timers);
  }

  /** Studies on or off. Off: what was computed is forgotten. */
  set compute(on: boolean) {
    if (this.#compute === on) return;
    this.#compute = on;
    for (const document of this.#documents.values()) {
      document.analysis = undefined;
      if (on) this.#study(document, false);
      else {
        this.#studies.drop(document.uri);
        document.studied = undefined;
        document.moved = [];
        document.analysis = undefined;
        this.#publish(document);
      }
    }
  }

  get uris(): readonly string[] {
    return [...this.#documents.keys()];
  }

  /** A document was opened, changed, or (version absent) read from disk. */
  update(uri: string, version: number | undefined, text: string): void {
    const known = this.#documents.get(uri);
    if (!known) {
      this.#documents.set(uri, {
        uri,
        text,
        serial: 1,
        version,
        answer: undefined,
        studied: undefined,
        moved: [],
        analysis: undefined,
        broken: false,
        pause: undefined,
      });
    } else {
      const edit = editBetween(known.text, text);
      known.version = version;
      known.analysis = undefined;
      if (!edit) {
        if (!this.#typing.waits(uri)) this.#publish(known);
        return;
      }
      known.text = text;
      this.#outdate(known);
      known.moved = known.moved.flatMap((one) => moveFinding(one, uri, edit) ?? []);
    }
    this.#files.delete(uri);
    this.#typing.ask(uri);
    this.#usersAgain(uri);
  }

  /** A document was closed; `keep`: it stays known from its file. */
  close(uri: string): void {
    this.#documents.delete(uri);
    this.#typing.drop(uri);
    this.#studies.drop(uri);
    this.#files.delete(uri);
    this.#usersAgain(uri);
  }

  isOpen(uri: string): boolean {
    return this.#documents.get(uri)?.version !== undefined;
  }

  /** A file changed on disk (or is gone). */
  fileChanged(uri: string): void {
    if (this.isOpen(uri)) return;
    this.#files.delete(uri);
    this.#usersAgain(uri);
  }

  /** What features look at, for the text as it stands. */
  analysis(uri: string): Analysis | undefined {
    this.#typing.now(uri);
    const document = this.#documents.get(uri);
    if (!document) return undefined;
    document.analysis ??= this.#view(document);
    return document.analysis;
  }

  textOf(uri: string): string | undefined {
    return this.#documents.get(uri)?.text ?? this.#files.get(uri) ?? undefined;
  }

  dispose(): void {
    this.#typing.dispose();
    this.#studies.dispose();
  }

  /** What was resolved is of an older text; a study of it is cut off. */
  #outdate(document: Document): void {
    document.serial += 1;
    document.broken = false;
    document.analysis = undefined;
    this.#studies.drop(document.uri);
    if (document.pause !== undefined) this.#timers.clear(document.pause);
    document.pause = undefined;
  }

  #usersAgain(uri: string): void {
    for (const other of this.#documents.values()) {
      if (other.uri === uri || !other.answer?.uses.includes(uri)) continue;
      this.#outdate(other);
      this.#typing.ask(other.uri);
    }
  }

  #analyse(uri: string): void {
    const document = this.#documents.get(uri);
    if (!document) return;
    const missing = new Set<string>();
    document.answer = this.#parts.analyser.analyse(uri, (other) => {
      const text = this.textOf(other);
      if (text === undefined && !this.#files.has(other)) missing.add(other);
      return text;
    });
    document.analysis = undefined;
    if (document.answer.failed) this.#parts.log(`${uri}: ${document.answer.failed}`);
    for (const other of missing) this.#read(other);
    // What is still being read would show as missing: the findings wait for it, a moment.
    if (missing.size === 0) this.#publish(document);
    if (missing.size === 0) this.#study(document, document.version !== undefined);
  }

  #read(uri: string): void {
    if (this.#reading.has(uri)) return;
    this.#reading.add(uri);
    const done = (text: string | undefined): void => {
      this.#reading.delete(uri);
      if (!this.#documents.has(uri)) this.#files.set(uri, text ?? null);
      this.#usersAgain(uri);
    };
    this.#parts.readFile(uri).then(done, (reason: unknown) => {
      this.#parts.log(`cannot read ${uri}: ${reason instanceof Error ? reason.message : String(reason)}`);
      done(undefined);
    });
  }

  #study(document: Document, urgent: boolean): void {
    const circuit = document.answer?.runs ? document.answer.circuit : undefined;
    if (!this.#compute || !circuit) {
      this.#studies.drop(document.uri);
      if (!circuit) {
        document.studied = undefined;
        document.moved = [];
      }
      return;
    }
    const { uri, serial } = document;
    const begin = (): void => this.#studies.ask(this.#queued(document, circuit), urgent);
    if (!document.studied) begin();
    else {
      document.pause = this.#timers.set(() => {
        document.pause = undefined;
        if (this.#documents.get(uri) === document && document.serial === serial) begin();
      }, PAUSE);
    }
  }

  #queued(document: Document, circuit: Circuit): QueuedStudy {
    const { uri, serial } = document;
    const current = (): boolean => this.#documents.get(uri) === document && document.serial === serial;
    return {
      uri,
      job: () => {
        if (!current()) return undefined;
        const texts: Record<string, string> = { [uri]: document.text };
        for (const other of document.answer?.uses ?? []) {
          const text = this.textOf(other);
          if (text !== undefined) texts[other] = text;
        }
        return { circuit, texts };
      },
      done: (answer, ms) => {
        if (!current()) return;
        if (answer.failed) this.#parts.log(`${uri}: ${answer.failed}`);
        document.studied = { study: answer.study, circuit, findings: answer.findings, text: serial };
        document.moved = answer.findings.filter((one) => one.computed);
        document.analysis = undefined;
        this.#publish(document);
        this.#parts.studied(uri, document.version ?? 0, ms);
      },
      failed: (reason) => {
        this.#parts.log(`the study of ${uri} broke down: ${reason}`);
        if (!current()) return;
        document.broken = true;
        document.analysis = undefined;
      },
    };
  }

  /** Fresh study: the language's findings and all the rules'. Older: topology as it is now, computed ones as they were. */
  #findings(document: Document): readonly Finding[] {
    const { answer, studied } = document;
    if (!answer) return [];
    if (studied && studied.text === document.serial) return [...answer.language, ...studied.findings];
    return [...answer.language, ...answer.topology, ...document.moved];
  }

  #publish(document: Document): void {
    if (document.answer) this.#parts.publish(document.uri, document.version, this.#findings(document));
  }

  #view(document: Document): Analysis {
    const { answer, studied } = document;
    return new Analysis({
      uri: document.uri,
      version: document.version ?? 0,
      text: document.text,
      ...(answer?.circuit ? { circuit: answer.circuit } : {}),
      findings: this.#findings(document),
      occurrences: answer?.occurrences ?? [],
      ...(studied ? { studied: { study: studied.study, circuit: studied.circuit, older: studied.text !== document.serial } } : {}),
      figures: answer?.runs === false ? 'shelf' : !this.#compute ? 'off' : document.broken ? 'broken' : 'coming',
      textOf: (uri) => this.textOf(uri),
    });
  }
}
