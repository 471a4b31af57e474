/** One row of a CSV text: its cells without white space around them, and the line on which it begins, counted from 1. */
export type CsvRow = { line: number; cells: string[] };

/** The rows of a CSV text, and where a quoted cell is never closed; `comma` is what parts the cells. */
export type CsvText = { rows: CsvRow[]; comma: string; openQuote: number | null };

/** Spreadsheets part cells with semicolons where the comma is the decimal point, and copy with tabs. */
const COMMAS = [',', ';', '\t'] as const;

/** What parts the cells: of the three the one that is most frequent in the first line that says anything. */
function commaOf(text: string): string {
  const first = text.split(/\r\n|\n|\r/).find((line) => line.trim() !== '') ?? '';
  const count = (comma: string): number => first.split(comma).length;
  return COMMAS.reduce((best, next) => (count(next) > count(best) ? next : best));
}

/**
 * The rows of a CSV text; rows without any text are left out.
 * @param text cells parted by comma, semicolon or tab (the one most frequent in the first line); cells may stand in double quotes, with
 *   quotes doubled inside, and then hold line ends; lines end in LF, CR or CRLF; a byte order mark is passed over
 * Source: RFC 4180.
 */
export function csvRows(text: string): CsvText {
  const body = text.startsWith('\uFEFF') ? text.slice(1) : text;
  const comma = commaOf(body);
  const rows: CsvRow[] = [];
  let [line, began] = [1, 1];
  let [cell, quoted, quoteLine] = ['', false, 0];
  let cells: string[] = [];
  const endCell = () => {
    cells.push(cell.trim());
    cell = '';
  };
  const endRow = () => {
    endCell();
    if (cells.some((one) => one !== '')) rows.push({ line: began, cells });
    cells = [];
  };
  for (let at = 0; at < body.length; at++) {
    const letter = body[at]!;
    const lineEnd = letter === '\n' || letter === '\r';
    if (letter === '\r' && body[at + 1] === '\n') at += 1;
    if (lineEnd) line += 1;
    if (quoted) {
      if (letter !== '"') cell += lineEnd ? '\n' : letter;
      else if (body[at + 1] === '"') {
        cell += '"';
        at += 1;
      } else quoted = false;
    } else if (letter === '"' && cell.trim() === '') [cell, quoted, quoteLine] = ['', true, line];
    else if (letter === comma) endCell();
    else if (lineEnd) {
      endRow();
      began = line;
    } else cell += letter;
  }
  endRow();
  return { rows, comma, openQuote: quoted ? quoteLine : null };
}
