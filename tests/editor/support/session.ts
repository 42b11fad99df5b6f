/** One test, one session: a copy of a sample in a folder of its own, a rig on a free port, a browser with a fresh profile. */
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { expect, type TestContext } from 'vitest';
import { openWindow, picture, type Window } from '../../support/rig/driver.ts';
import { Editor } from '../../support/rig/editor.ts';
import { editorBuild } from '../../support/rig/editor-build.ts';
import { type Rig, startRig } from '../../support/rig/server.ts';

const root = fileURLToPath(new URL('../../..', import.meta.url));
const NAME = 'circuit.oilway';

export interface Session {
  readonly editor: Editor;
  readonly page: Window['page'];
  /** The text as it stands on the disk. */
  saved(): string;
  /** Changes the file behind the editor's back. */
  write(text: string): void;
  /** 1-based line and column of the first place where `text` stands in the saved text. */
  find(text: string): { readonly line: number; readonly column: number };
  /** A picture for the eye, `tests/output/editor/NAME.png`. */
  show(name: string): Promise<void>;
}

export const sample = (name: string): string => readFileSync(join(root, 'samples', name), 'utf8');

export interface SessionOptions {
  readonly settings?: Readonly<Record<string, unknown>>;
  readonly height?: number;
  /** Further files of the workspace by name. */
  readonly others?: Readonly<Record<string, string>>;
}

/** Runs a test in a session and closes it; any request that left this machine fails it. */
export async function inEditor(
  context: TestContext,
  text: string,
  test: (session: Session) => Promise<void>,
  options: SessionOptions = {},
): Promise<void> {
  const workspace = mkdtempSync(join(tmpdir(), 'oilway-editor-'));
  const file = join(workspace, NAME);
  writeFileSync(file, text);
  for (const [name, content] of Object.entries(options.others ?? {})) writeFileSync(join(workspace, name), content);
  let rig: Rig | undefined;
  let window: Window | undefined;
  try {
    rig = await startRig({
      build: editorBuild(root),
      extension: join(root, 'packages/vscode'),
      workspace,
      open: `/${NAME}`,
      settings: { 'editor.minimap.enabled': false, ...options.settings },
    });
    window = await openWindow(rig.address, { width: 1500, height: options.height ?? 1300 });
    const { page, strangers } = window;
    const shot = (name: string): Promise<void> => picture(page, join(root, 'tests/output/editor', `${name}.png`));
    try {
      const editor = new Editor(page);
      await editor.ready();
      const saved = (): string => readFileSync(file, 'utf8');
      const find: Session['find'] = (wanted) => {
        const at = saved().indexOf(wanted);
        if (at < 0) throw new Error(`The text has no ${JSON.stringify(wanted)}.`);
        const before = saved().slice(0, at).split('\n');
        return { line: before.length, column: (before.at(-1) ?? '').length + 1 };
      };
      await test({ editor, page, saved, write: (content) => writeFileSync(file, content), find, show: shot });
    } catch (error) {
      await shot(`failed ${context.task.name}`.replace(/[^\w -]+/g, ' ')).catch(() => {});
      throw error;
    }
    expect(strangers, 'requests that left this machine').toEqual([]);
  } finally {
    await window?.close();
    await rig?.close();
    rmSync(workspace, { recursive: true, force: true });
  }
}
