/** Tables in plain text: columns as wide as their content, numbers to the right. */

export interface Column {
  readonly title: string;
  readonly align?: 'left' | 'right';
}

/** Lines of a table with a head and a rule under it; trailing blanks are cut. */
export function table(
  columns: readonly Column[],
  rows: readonly (readonly string[])[],
  head: (text: string) => string = (text) => text,
): string[] {
  const widths = columns.map((column, i) => Math.max(column.title.length, ...rows.map((row) => (row[i] ?? '').length)));
  const line = (cells: readonly string[]) =>
    columns
      .map((column, i) => (column.align === 'right' ? (cells[i] ?? '').padStart(widths[i] ?? 0) : (cells[i] ?? '').padEnd(widths[i] ?? 0)))
      .join('  ')
      .trimEnd();
  return [head(line(columns.map((column) => column.title))), line(widths.map((width) => '-'.repeat(width))), ...rows.map(line)];
}

/** One field of comma-separated values (RFC 4180). */
export function csvField(text: string): string {
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}
