/** One study at a time: the newest wins, one that is overtaken never speaks, a worker that dies is replaced. */
import { describe, expect, test } from 'vitest';
import type { Circuit, Study } from '@oilway/circuit';
import type { Timers } from '../../packages/language/server/coalesce.ts';
import { StudyQueue, type QueuedStudy } from '../../packages/language/server/study-queue.ts';
import {
  InlineRunner,
  WorkerRunner,
  type StudyAnswer,
  type StudyJob,
  type WorkerLike,
  type WorkerReply,
  type WorkerRequest,
} from '../../packages/language/server/study-runner.ts';

const job = (name: string): StudyJob => ({ circuit: { name } as unknown as Circuit, texts: {} });
const answer = (name: string): StudyAnswer => ({ study: { uri: name } as unknown as Study, findings: [] });

/** A worker that answers when told to. */
class Scripted implements WorkerLike {
  readonly asked: WorkerRequest[] = [];
  ended = false;
  #message: (reply: WorkerReply) => void = () => undefined;
  #error: (reason: string) => void = () => undefined;
  post(message: WorkerRequest): void {
    this.asked.push(message);
  }
  onMessage(listener: (reply: WorkerReply) => void): void {
    this.#message = listener;
  }
  onError(listener: (reason: string) => void): void {
    this.#error = listener;
  }
  terminate(): void {
    this.ended = true;
  }
  reply(index: number): void {
    const request = this.asked[index];
    if (request) this.#message({ id: request.id, answer: answer(request.job.circuit.name ?? '') });
  }
  fail(index: number, failed: string): void {
    const request = this.asked[index];
    if (request) this.#message({ id: request.id, failed });
  }
  die(reason: string): void {
    this.#error(reason);
  }
}

function runner(): { workers: Scripted[]; runner: WorkerRunner } {
  const workers: Scripted[] = [];
  return {
    workers,
    runner: new WorkerRunner(() => {
      const worker = new Scripted();
      workers.push(worker);
      return worker;
    }),
  };
}
/** Lets promises settle. */
const settle = async (): Promise<void> => {
  for (let i = 0; i < 10; i += 1) await Promise.resolve();
};

describe('worker runner', () => {
  test('answers, and keeps its worker warm', async () => {
    const { workers, runner: run } = runner();
    const first = run.run(job('one'));
    await settle();
    workers[0]?.reply(0);
    expect((await first)?.study.uri).toBe('one');
    const second = run.run(job('two'));
    await settle();
    workers[0]?.reply(1);
    expect((await second)?.study.uri).toBe('two');
    expect(workers).toHaveLength(1);
  });

  test('the newest wins: the overtaken study is cut off and answers nothing', async () => {
    const { workers, runner: run } = runner();
    const first = run.run(job('one'));
    await settle();
    const second = run.run(job('two'));
    await settle();
    expect(await first).toBeUndefined();
    expect(workers[0]?.ended).toBe(true);
    workers[0]?.reply(0);
    workers[1]?.reply(0);
    expect((await second)?.study.uri).toBe('two');
  });

  test('a study that breaks down is said, the worker goes on', async () => {
    const { workers, runner: run } = runner();
    const first = run.run(job('one'));
    await settle();
    workers[0]?.fail(0, 'no way out');
    await expect(first).rejects.toThrow('no way out');
    const second = run.run(job('two'));
    await settle();
    workers[0]?.reply(1);
    expect((await second)?.study.uri).toBe('two');
  });

  test('a worker that dies is replaced', async () => {
    const { workers, runner: run } = runner();
    const first = run.run(job('one'));
    await settle();
    workers[0]?.die('out of memory');
    await expect(first).rejects.toThrow('out of memory');
    const second = run.run(job('two'));
    await settle();
    workers[1]?.reply(0);
    expect((await second)?.study.uri).toBe('two');
  });

  test('a worker that cannot be started is said', async () => {
    const run = new WorkerRunner(() => Promise.reject(new Error('refused')));
    await expect(run.run(job('one'))).rejects.toThrow('refused');
  });

  test('disposed: nothing runs, what ran is given up', async () => {
    const { workers, runner: run } = runner();
    const first = run.run(job('one'));
    await settle();
    run.dispose();
    expect(await first).toBeUndefined();
    expect(workers[0]?.ended).toBe(true);
    expect(await run.run(job('two'))).toBeUndefined();
  });
});

test('in the own thread: an overtaken job is never begun', async () => {
  const begun: string[] = [];
  const run = new InlineRunner((one) => {
    begun.push(one.circuit.name ?? '');
    return answer(one.circuit.name ?? '');
  }, 0);
  const first = run.run(job('one'));
  const second = run.run(job('two'));
  expect(await first).toBeUndefined();
  expect((await second)?.study.uri).toBe('two');
  expect(begun).toEqual(['two']);
});

describe('queue of documents', () => {
  function queue(): {
    workers: Scripted[];
    queue: StudyQueue;
    done: string[];
    failed: string[];
    late: () => void;
    study: (uri: string, empty?: boolean) => QueuedStudy;
  } {
    const { workers, runner: run } = runner();
    const done: string[] = [];
    const failed: string[] = [];
    let limit: () => void = () => undefined;
    const timers: Timers = {
      set: (action) => {
        limit = action;
        return action;
      },
      clear: () => undefined,
      now: () => 0,
    };
    return {
      late: () => limit(),
      workers,
      queue: new StudyQueue(run, timers),
      done,
      failed,
      study: (uri, empty = false) => ({
        uri,
        job: () => (empty ? undefined : job(uri)),
        done: (one) => done.push(one.study.uri),
        failed: (reason) => failed.push(`${uri}: ${reason}`),
      }),
    };
  }

  test('one after the other; what is edited goes first and the interrupted one comes back', async () => {
    const { workers, queue: studies, done, study } = queue();
    studies.ask(study('a'), false);
    studies.ask(study('b'), false);
    await settle();
    expect(workers[0]?.asked.map((one) => one.job.circuit.name)).toEqual(['a']);
    studies.ask(study('edited'), true);
    await settle();
    expect(workers[0]?.ended).toBe(true);
    workers[1]?.reply(0);
    await settle();
    expect(done).toEqual(['edited']);
    workers[1]?.reply(1);
    await settle();
    expect(done).toEqual(['edited', 'a']);
    workers[1]?.reply(2);
    await settle();
    expect(done).toEqual(['edited', 'a', 'b']);
    expect(studies.idle).toBe(true);
  });

  test('a second request for the same text replaces the first', async () => {
    const { workers, queue: studies, done, study } = queue();
    studies.ask(study('a'), true);
    await settle();
    studies.ask(study('a'), true);
    await settle();
    workers[0]?.reply(0);
    workers[1]?.reply(0);
    await settle();
    expect(done).toEqual(['a']);
  });

  test('a text with nothing to compute does not hold up the others; a breakdown neither', async () => {
    const { workers, queue: studies, done, failed, study } = queue();
    studies.ask(study('b'), true);
    studies.ask(study('nothing', true), false);
    studies.ask(study('c'), false);
    await settle();
    workers[0]?.fail(0, 'broken');
    await settle();
    expect(failed).toEqual(['b: broken']);
    workers[0]?.reply(1);
    await settle();
    expect(done).toEqual(['c']);
  });

  test('a study that does not end is given up and said; the next one runs', async () => {
    const { workers, queue: studies, done, failed, late, study } = queue();
    studies.ask(study('endless'), true);
    studies.ask(study('b'), false);
    await settle();
    late();
    await settle();
    expect(failed).toEqual(['endless: not over after 120 s']);
    expect(workers[0]?.ended).toBe(true);
    workers[1]?.reply(0);
    await settle();
    expect(done).toEqual(['b']);
  });

  test('a closed document is forgotten', async () => {
    const { workers, queue: studies, done, study } = queue();
    studies.ask(study('a'), true);
    await settle();
    studies.drop('a');
    workers[0]?.reply(0);
    await settle();
    expect(done).toEqual([]);
    expect(studies.idle).toBe(true);
  });
});
