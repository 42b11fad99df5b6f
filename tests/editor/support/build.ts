/** Before the suite: fetches the editor where it is missing, builds the extension; after it: fails a run in which no test ran. */
import { fileURLToPath } from 'node:url';
import type { TestProject } from 'vitest/node';
import { editorBuild } from '../../support/rig/editor-build.ts';

export default async function setup(project: TestProject): Promise<() => void> {
  const root = fileURLToPath(new URL('../../..', import.meta.url));
  editorBuild(root, console.log);
  const builder: { buildExtension(): Promise<void> } = await import(
    new URL('../../../packages/vscode/scripts/build.mjs', import.meta.url).href
  );
  await builder.buildExtension();
  return () => {
    const ran = project.vitest.state.getFiles().flatMap((file) => file.tasks).length;
    if (ran === 0 && !project.vitest.config.testNamePattern) throw new Error('The editor suite ran no test.');
  };
}
