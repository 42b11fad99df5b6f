/** The manifest says only what the extension holds. Limits after the editor's published rules for extensions. */
import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { inflateSync } from 'node:zlib';
import { describe, expect, it } from 'vitest';

const folder = fileURLToPath(new URL('../../packages/vscode', import.meta.url));
const json = (file: string) => JSON.parse(readFileSync(join(folder, file), 'utf8'));
const manifest = json('package.json');
const words: Record<string, string> = json('package.nls.json');
const sources = readdirSync(join(folder, 'extension'))
  .filter((name) => name.endsWith('.ts'))
  .map((name) => readFileSync(join(folder, 'extension', name), 'utf8'))
  .join('\n');

/** Every `%key%` of the manifest. */
const keys = [...readFileSync(join(folder, 'package.json'), 'utf8').matchAll(/"%([^%"]+)%"/g)].map((match) => match[1]!);

/** The picture's rows, unpacked: packing may differ from one machine to the next. The one IDAT chunk follows signature and IHDR. */
const pixels = (png: Buffer): Buffer => inflateSync(png.subarray(41, 41 + png.readUInt32BE(33)));

describe('manifest', () => {
  it('has at most five keywords, a licence, a description and a category that exists', () => {
    expect(manifest.keywords.length).toBeLessThanOrEqual(5);
    expect(manifest.license).toBe('MIT');
    // The marketplace's list of categories.
    const known = ['Programming Languages', 'Snippets', 'Linters', 'Formatters', 'Visualization', 'Testing', 'Other'];
    expect(manifest.categories.filter((one: string) => !known.includes(one))).toEqual([]);
  });

  it('is allowed in untrusted and virtual workspaces: nothing of the workspace is executed', () => {
    expect(manifest.capabilities).toEqual({ untrustedWorkspaces: { supported: true }, virtualWorkspaces: true });
  });

  it('has words for every key, and no words without one', () => {
    expect(keys.length).toBeGreaterThan(10);
    expect(keys.filter((key) => words[key] === undefined)).toEqual([]);
    expect(Object.keys(words).filter((key) => !keys.includes(key))).toEqual([]);
  });

  it('registers every command it lists, all under one category', () => {
    const commands: { command: string; category: string }[] = manifest.contributes.commands;
    expect(commands.length).toBeGreaterThan(0);
    for (const { command, category } of commands) {
      expect(category).toBe('Oilway');
      expect(sources).toContain(`'${command}':`);
    }
  });

  it('gives each setting a description, a default of its type and a scope', () => {
    const settings: Record<string, Record<string, unknown>> = manifest.contributes.configuration.properties;
    expect(Object.keys(settings).length).toBeGreaterThan(3);
    for (const [name, setting] of Object.entries(settings)) {
      expect(setting.markdownDescription ?? setting.description, name).toMatch(/^%.+%$/);
      expect(['resource', 'window', 'application', 'machine'], name).toContain(setting.scope);
      expect(typeof setting.default, name).toBe(setting.type === 'integer' ? 'number' : setting.type);
      if (setting.enum) expect(setting.enum as unknown[], name).toContain(setting.default);
    }
  });

  it('names files that are there, and bundles that the build makes', () => {
    const { languages, snippets } = manifest.contributes;
    const media = manifest.contributes.walkthroughs[0].steps.map((step: { media: { image: string } }) => step.media.image);
    const files = [...media, manifest.icon, languages[0].configuration, languages[0].icon.light, languages[0].icon.dark, snippets[0].path];
    for (const file of files) expect(existsSync(join(folder, file)), file).toBe(true);
    const build = readFileSync(join(folder, 'scripts/build.mjs'), 'utf8');
    for (const made of [manifest.main, manifest.browser, manifest.contributes.grammars[0].path]) {
      expect(build, made).toContain(made.replace('./dist/', ''));
    }
  });

  it('has an icon of 256 x 256 pixels, as its script draws it', async () => {
    const icon = readFileSync(join(folder, manifest.icon));
    // PNG (ISO/IEC 15948): width and height stand at bytes 16 and 20.
    expect([icon.readUInt32BE(16), icon.readUInt32BE(20)]).toEqual([256, 256]);
    const script = await import(new URL('../../packages/vscode/scripts/icon.mjs', import.meta.url).href);
    expect(Buffer.compare(pixels(script.icon()), pixels(icon))).toBe(0);
  });
});
