/** Lets a server without a disk (web worker) read the workspace through the editor, whatever file system stands behind it. */
import * as vscode from 'vscode';
import type { BaseLanguageClient } from 'vscode-languageclient';

/** One entry of a directory as the server gets it. */
interface Entry {
  readonly uri: string;
  readonly isFile: boolean;
  readonly isDirectory: boolean;
}

const entry = (uri: vscode.Uri, type: vscode.FileType): Entry => ({
  uri: uri.toString(),
  isFile: (type & vscode.FileType.File) !== 0,
  isDirectory: (type & vscode.FileType.Directory) !== 0,
});

/** Answers are `null` where there is nothing to read: a missing file is no fault of the connection. */
async function orNull<T>(read: Thenable<T>): Promise<T | null> {
  try {
    return await read;
  } catch (error) {
    if (error instanceof vscode.FileSystemError) return null;
    throw error;
  }
}

export function serveFiles(client: BaseLanguageClient): vscode.Disposable {
  const fs = vscode.workspace.fs;
  const parts = [
    client.onRequest('oilway/readFile', async ({ uri }: { uri: string }) => {
      const bytes = await orNull(fs.readFile(vscode.Uri.parse(uri)));
      return bytes === null ? null : new TextDecoder().decode(bytes);
    }),
    client.onRequest('oilway/readDirectory', async ({ uri }: { uri: string }) => {
      const target = vscode.Uri.parse(uri);
      const list = await orNull(fs.readDirectory(target));
      return list === null ? null : list.map(([name, type]) => entry(vscode.Uri.joinPath(target, name), type));
    }),
  ];
  return vscode.Disposable.from(...parts);
}
