/**
 * Comma-separated values (RFC 4180) line by line out of a stream of text, whatever the pieces are cut at. Nothing is kept
 * but the line that is under way, and no line may grow past a limit: a file without line ends would else be held whole.
 */
export interface FileLine {
  /** From 1, as an editor counts; a record over several lines has the number of its first. */
  number: number;
  text: string;
  /** Null where it is no record; `fault` says why. */
  cells: string[] | null;
  fault: string | null;
}

export const LONGEST_LINE = 64 * 1024;
export const MOST_COLUMNS = 1000;

export class LineReader {
  private rest = '';
  private restIsTooLong = false;
  private number = 0;
  /** Lines that belong to the record under way, because a quotation mark is open. */
  private open: { number: number; text: string } | null = null;

  constructor(private readonly delimiter: string) {}

  /** @returns lines that ended in this piece, in order */
  push(piece: string): FileLine[] {
    const lines: FileLine[] = [];
    let from = 0;
    for (let end = piece.indexOf('\n'); end >= 0; end = piece.indexOf('\n', from)) {
      this.take(piece.slice(from, end), lines);
      from = end + 1;
    }
    this.grow(piece.slice(from));
    return lines;
  }

  /** The last line, where the file does not end in a line end. */
  end(): FileLine[] {
    const lines: FileLine[] = [];
    if (this.rest !== '' || this.restIsTooLong) this.take('', lines);
    if (this.open !== null) lines.push(faulty(this.open.number, this.open.text, UNCLOSED));
    this.open = null;
    return lines;
  }

  private grow(part: string): void {
    if (this.restIsTooLong) return;
    this.rest += part;
    if (this.rest.length <= LONGEST_LINE) return;
    this.restIsTooLong = true;
    this.rest = this.rest.slice(0, 200);
  }

  private take(part: string, lines: FileLine[]): void {
    this.grow(part);
    const text = this.rest.endsWith('\r') ? this.rest.slice(0, -1) : this.rest;
    const isTooLong = this.restIsTooLong;
    this.rest = '';
    this.restIsTooLong = false;
    this.number += 1;
    if (isTooLong) {
      this.open = null;
      lines.push(faulty(this.number, text, TOO_LONG));
    } else this.record(text, lines);
  }

  private record(text: string, lines: FileLine[]): void {
    const number = this.open?.number ?? this.number;
    const whole = this.open === null ? text : `${this.open.text}\n${text}`;
    this.open = null;
    if (!whole.includes('"')) {
      lines.push(this.checked(number, whole, whole.split(this.delimiter, MOST_COLUMNS + 1)));
      return;
    }
    const cells = quotedCells(whole, this.delimiter);
    if (cells !== null) lines.push(this.checked(number, whole, cells));
    else if (whole.length > LONGEST_LINE) lines.push(faulty(number, whole.slice(0, 200), UNCLOSED));
    else this.open = { number, text: whole };
  }

  private checked(number: number, text: string, cells: string[]): FileLine {
    if (text.includes('\0')) return faulty(number, text, NULS);
    if (cells.length > MOST_COLUMNS) return faulty(number, text, TOO_MANY);
    return { number, text, cells, fault: null };
  }
}

const TOO_LONG = `The line is over ${LONGEST_LINE / 1024} KiB: this is no table of readings, or its lines end otherwise.`;
const UNCLOSED = 'A quotation mark is opened here and not closed; close it, or take it out.';
const NULS =
  'The line holds NUL characters; choose UTF-16 if the file was saved as that, else save it anew as text.';
const TOO_MANY = `The line has over ${MOST_COLUMNS} columns; split the table, or choose another separator.`;

function faulty(number: number, text: string, fault: string): FileLine {
  return { number, text: text.slice(0, 200), cells: null, fault };
}

/** Null while a quotation mark is open. A mark inside an unquoted cell is a mark like any other letter (5" pipe). */
function quotedCells(text: string, delimiter: string): string[] | null {
  const cells: string[] = [];
  let at = 0;
  for (;;) {
    if (text[at] === '"') {
      let cell = '';
      let from = at + 1;
      for (;;) {
        const mark = text.indexOf('"', from);
        if (mark < 0) return null;
        cell += text.slice(from, mark);
        from = mark + 1;
        if (text[from] !== '"') break;
        cell += '"';
        from += 1;
      }
      const next = text.indexOf(delimiter, from);
      cells.push(cell + text.slice(from, next < 0 ? undefined : next));
      if (next < 0) return cells;
      at = next + delimiter.length;
    } else {
      const next = text.indexOf(delimiter, at);
      cells.push(text.slice(at, next < 0 ? undefined : next));
      if (next < 0) return cells;
      at = next + delimiter.length;
    }
    if (cells.length > MOST_COLUMNS) return cells;
  }
}
