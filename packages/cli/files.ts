/** Finding and reading circuit files: what cannot be read is said in one line, never passed over. */
import { readdir, readFile, stat } from 'node:fs/promises';
import { join, relative, resolve } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';

export const ENDING = '.oilway';
/** Largest text read, bytes. */
export const LARGEST = 2 * 1024 * 1024;

export interface SourceFile {
  readonly path: string;
  readonly uri: string;
  readonly text: string;
}

/** A path that cannot be used, and why, as one line. */
export interface Unusable {
  readonly path: string;
  readonly why: string;
}

export type Read = { readonly ok: true; readonly file: SourceFile } | { readonly ok: false; readonly unusable: Unusable };

const CAUSES: Readonly<Record<string, string>> = {
  ENOENT: 'does not exist',
  EACCES: 'may not be read (permission denied)',
  EPERM: 'may not be read (not permitted)',
  EISDIR: 'is a folder',
  ENOTDIR: 'lies in something that is no folder',
  ELOOP: 'is a link that leads back to itself',
  ENAMETOOLONG: 'has too long a name',
  EMFILE: 'cannot be opened: too many open files',
};

function cause(error: unknown): string {
  const code = (error as { code?: unknown }).code;
  return (typeof code === 'string' ? CAUSES[code] : undefined) ?? `cannot be read (${String(code ?? error)})`;
}

/** The path as shown: relative to the working folder where it lies in it. */
export function shownPath(path: string, base = process.cwd()): string {
  const short = relative(base, path);
  return short === '' || short.startsWith('..') ? path : short;
}

export function uriOf(path: string): string {
  return pathToFileURL(resolve(path)).href;
}

export function pathOf(uri: string): string {
  return uri.startsWith('file:') ? shownPath(fileURLToPath(uri)) : uri;
}

/** Reads one text: UTF-8, at most 2 MB, no NUL characters. */
export async function readText(path: string): Promise<Read> {
  const full = resolve(path);
  const fail = (why: string): Read => ({ ok: false, unusable: { path, why } });
  try {
    const about = await stat(full);
    if (about.isDirectory()) return fail('is a folder');
    if (!about.isFile()) return fail('is no plain file');
    if (about.size > LARGEST)
      return fail(`is too large: ${(about.size / 1024 / 1024).toFixed(1)} MB, at most ${LARGEST / 1024 / 1024} MB are read`);
    const bytes = await readFile(full);
    if (bytes.includes(0)) return fail('is not text: it holds NUL characters (a binary file, or UTF-16; circuits are UTF-8)');
    const text = new TextDecoder('utf-8', { fatal: true }).decode(bytes);
    return { ok: true, file: { path: shownPath(full), uri: uriOf(full), text } };
  } catch (error) {
    if (error instanceof TypeError) return fail('is not UTF-8 text');
    return fail(cause(error));
  }
}

async function circuitsIn(folder: string): Promise<string[]> {
  const entries = await readdir(folder, { withFileTypes: true });
  const found: string[] = [];
  for (const entry of entries.sort((a, b) => (a.name < b.name ? -1 : 1))) {
    if (entry.name.startsWith('.') || entry.name === 'node_modules') continue;
    const path = join(folder, entry.name);
    if (entry.isDirectory()) found.push(...(await circuitsIn(path)));
    else if (entry.isFile() && entry.name.endsWith(ENDING)) found.push(path);
  }
  return found;
}

export interface Gathered {
  readonly files: readonly SourceFile[];
  readonly unusable: readonly Unusable[];
}

/** The circuits named: files as they are, folders searched downwards for *.oilway (hidden folders and node_modules left out). */
export async function gather(paths: readonly string[]): Promise<Gathered> {
  const wanted = new Map<string, string>();
  const unusable: Unusable[] = [];
  for (const path of paths) {
    try {
      if ((await stat(path)).isDirectory()) {
        const found = await circuitsIn(path);
        if (found.length === 0) unusable.push({ path, why: `holds no circuit (no file ends in ${ENDING})` });
        for (const one of found) wanted.set(resolve(one), one);
      } else wanted.set(resolve(path), path);
    } catch (error) {
      unusable.push({ path, why: cause(error) });
    }
  }
  const files: SourceFile[] = [];
  for (const path of wanted.values()) {
    const read = await readText(path);
    if (read.ok) files.push(read.file);
    else unusable.push(read.unusable);
  }
  return { files, unusable };
}
