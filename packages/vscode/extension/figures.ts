/** Turns the Markdown of a hover into plain text whose tables are tab-separated. */

const isRule = (line: string): boolean => /^\s*\|?[\s:|-]+\|[\s:|-]*$/.test(line) && line.includes('-');

const isRow = (line: string): boolean => line.trim().startsWith('|');

function plain(text: string): string {
  return text
    .replace(/\[([^\]]*)\]\([^)]*\)/g, '$1')
    .replace(/(\*\*|__|`)/g, '')
    .replace(/(^|\s)[*_](\S[^*_]*)[*_](?=\s|$|[.,;:])/g, '$1$2')
    .replace(/\\([\\`*_{}[\]()#+.!|<>~-])/g, '$1')
    .replaceAll('&nbsp;', ' ')
    .replaceAll('&lt;', '<')
    .replaceAll('&gt;', '>')
    .replaceAll('&amp;', '&')
    .trim();
}

/** Cells of a Markdown table row; `\|` inside a cell is no border. */
const cells = (row: string): string[] =>
  row
    .trim()
    .replace(/^\||(?<!\\)\|$/g, '')
    .split(/(?<!\\)\|/)
    .map(plain);

export function plainTables(markdown: string): string {
  const lines = markdown.split(/\r?\n/).filter((line) => !/^\s*```/.test(line));
  return lines
    .filter((line) => !isRule(line))
    .map((line) => (isRow(line) ? cells(line).join('\t') : plain(line.replace(/^#+\s*/, ''))))
    .join('\n')
    .replace(/\n{3,}/g, '\n\n')
    .trim();
}
