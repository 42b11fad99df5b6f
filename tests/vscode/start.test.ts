/** The parts of `npm start`: when it installs, and which editor it takes. */
import { chmodSync, mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';

const part = (name: string) => import(new URL(`../../packages/vscode/scripts/parts/${name}.mjs`, import.meta.url).href);
const { whyInstall } = await part('install');
const { desktopArguments, findDesktop } = await part('desktop');

let folder = '';
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'oilway-start-'));
});
afterEach(() => rmSync(folder, { recursive: true, force: true }));

describe('installation', () => {
  const lock = (file: string, packages: object): void => writeFileSync(join(folder, file), JSON.stringify({ packages }));
  const locked = { '': {}, 'packages/a': {}, 'node_modules/a': { link: true }, 'node_modules/b': { version: '1.2.0' } };

  it('is needed where nothing is installed', () => {
    lock('package-lock.json', locked);
    expect(whyInstall(folder)).toMatch(/not installed/);
  });

  it('is needed where a package is missing or of another version, and says which', () => {
    mkdirSync(join(folder, 'node_modules'));
    lock('package-lock.json', locked);
    lock('node_modules/.package-lock.json', {});
    expect(whyInstall(folder)).toBe('b is missing');
    lock('node_modules/.package-lock.json', { 'node_modules/b': { version: '1.1.9' } });
    expect(whyInstall(folder)).toBe('b is 1.1.9, locked is 1.2.0');
  });

  it('is not needed where all is there, optional packages of other systems apart', () => {
    mkdirSync(join(folder, 'node_modules'));
    lock('package-lock.json', { ...locked, 'node_modules/c': { version: '3.0.0', optional: true } });
    lock('node_modules/.package-lock.json', { 'node_modules/b': { version: '1.2.0' } });
    expect(whyInstall(folder)).toBeUndefined();
  });
});

describe.runIf(process.platform !== 'win32')('the editor on the PATH', () => {
  const withCode = (script: string) => {
    const file = join(folder, 'code');
    writeFileSync(file, `#!/bin/sh\n${script}\n`);
    chmodSync(file, 0o755);
    return { PATH: `${folder}:/usr/bin:/bin`, DISPLAY: ':0' };
  };

  it('is taken if it is new enough', () => {
    expect(findDesktop(withCode('echo 1.101.2; echo abc; echo x64'))).toEqual({ version: '1.101.2' });
  });

  it('is refused if it is too old, and the reason is told', () => {
    expect(findDesktop(withCode('echo 1.99.3')).why).toMatch(/1\.99\.3 is older than 1\.101\.0/);
  });

  it('is refused if it is something else, fails or is missing', () => {
    expect(findDesktop(withCode('echo hello')).why).toMatch(/no `code`/);
    expect(findDesktop(withCode('exit 3')).why).toMatch(/no `code`/);
    expect(findDesktop({ PATH: folder, DISPLAY: ':0' }).why).toBeDefined();
  });

  it('is not taken in a remote terminal or without a screen', () => {
    const env = withCode('echo 1.101.2');
    expect(findDesktop({ ...env, VSCODE_IPC_HOOK_CLI: '/tmp/x.sock' }).why).toMatch(/remote/);
    if (process.platform === 'linux') expect(findDesktop({ PATH: env.PATH }).why).toMatch(/screen/);
  });

  it('gets a profile of its own and the extension from its folder', () => {
    const args: string[] = desktopArguments();
    expect(args.some((arg) => /^--extensionDevelopmentPath=.*packages.vscode$/.test(arg))).toBe(true);
    expect(args.some((arg) => /^--user-data-dir=.*\.cache.vscode-profile$/.test(arg))).toBe(true);
    expect(args.at(-1)).toMatch(/\.oilway$/);
  });
});
