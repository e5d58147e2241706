function cell(text: string): string {
  // A spreadsheet must not take a text for a formula.
  const safe = /^[=+@\t\r]/.test(text) ? `'${text}` : text;
  return /[",\r\n]/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
}

/** Rows as a CSV text, the lines as spreadsheets expect them. */
export function csvOf(rows: ReadonlyArray<readonly string[]>): string {
  return `${rows.map((row) => row.map(cell).join(',')).join('\r\n')}\r\n`;
}
