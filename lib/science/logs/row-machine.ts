import { Refusal } from "../refusal";
import { splitRecord } from "./cells";
import type { Column } from "./columns";
import { GrowingColumns } from "./growing-columns";
import { isRemark } from "./layout";
import { describeFault, readCell, type ReadColumn } from "./read-cell";
import { RefusedRows } from "./refused-rows";

const LF = 10;
const CR = 13;
const QUOTE = 34;
const LINE_MAX = 1 << 20;
const JOINED_LINES_MAX = 20;
const POWERS = Float64Array.from({ length: 23 }, (_, d) => Number(`1e${d}`));

/**
 * Reads the rows of a log from chunks of bytes (ASCII digits; names were read before) into columns of numbers, one pass,
 * counting physical lines. LF, CRLF and CR end a line, also mixed. A row is refused, with its line and reason, when its
 * cells aren't as many as they should be, its quotes are broken, or a cell that is read isn't a number or a time. Up to
 * 15 digits are read as a whole number over a power of ten, which rounds correctly; anything else goes by Number().
 */
export class RowMachine {
  readonly refused = new RefusedRows();
  private readonly delimiter: number;
  private readonly width: number;
  private readonly firstRowLine: number;
  private readonly delimiterText: string;
  private readonly slots: Int32Array;
  private readonly reads: readonly ReadColumn[];
  private readonly row: Float64Array;
  private readonly table: GrowingColumns;
  private buffer = new Uint8Array(0);
  private filled = 0;
  private line = 0;
  private skipping = false;
  private lastTime = -Infinity;
  private timeBefore = -Infinity;
  private lastLine = 0;
  private dayS = 0;
  missing = 0;
  remarks = 0;

  /** @param read columns to keep, in the order of the table; the first is the time where `timed` */
  constructor(
    layout: { delimiter: string; width: number; firstRowLine: number },
    read: readonly Column[],
    private readonly timed: boolean,
  ) {
    this.delimiterText = layout.delimiter;
    this.delimiter = layout.delimiter === "" ? -1 : layout.delimiter.charCodeAt(0);
    this.width = layout.width;
    this.firstRowLine = layout.firstRowLine;
    this.slots = new Int32Array(layout.width).fill(-1);
    this.reads = read.map((column, slot) => {
      this.slots[column.index] = slot;
      // Where commas divide cells, an unquoted number has no decimal comma.
      const decimal = column.marks.decimal === layout.delimiter ? -1 : column.marks.decimal.charCodeAt(0);
      return { column, decimal, quick: column.kind === "number" };
    });
    this.row = new Float64Array(read.length);
    this.table = new GrowingColumns(read.length);
  }

  /** Takes the next bytes, which may break anywhere. */
  push(chunk: Uint8Array): void {
    if (this.filled + chunk.length > this.buffer.length) {
      const next = new Uint8Array(Math.max(2 * this.buffer.length, this.filled + chunk.length));
      next.set(this.buffer.subarray(0, this.filled));
      this.buffer = next;
    }
    this.buffer.set(chunk, this.filled);
    this.filled += chunk.length;
    this.run(false);
  }

  /** Reads what is left and gives the columns; the table is done. */
  finish(): Float64Array[] {
    this.run(true);
    return this.table.columns();
  }

  get rows(): number {
    return this.table.rows;
  }

  private run(last: boolean): void {
    let end = this.filled;
    if (!last) {
      // A CR at the very end may be half of a CRLF: it waits.
      while (end > 0 && this.buffer[end - 1] !== LF && !(this.buffer[end - 1] === CR && end < this.filled)) end--;
    }
    let position = 0;
    if (this.skipping && end > 0) position = this.skipLine(0, end);
    while (position < end) {
      const next = this.readLine(position, end, last);
      if (next < 0) break;
      position = next;
    }
    if (this.skipping) position = this.filled;
    position = Math.min(position, this.filled);
    this.buffer.copyWithin(0, position, this.filled);
    this.filled -= position;
    if (!last && this.filled > LINE_MAX) {
      this.line += 1;
      this.refused.add(this.line, "the line is longer than 1 MB");
      this.skipping = true;
      this.filled = 0;
    }
  }

  private skipLine(from: number, end: number): number {
    this.skipping = false;
    return this.afterLine(this.lineEnd(from, end), end);
  }

  private lineEnd(from: number, end: number): number {
    let at = from;
    while (at < end && this.buffer[at] !== LF && this.buffer[at] !== CR) at++;
    return at;
  }

  private afterLine(at: number, end: number): number {
    return at < end && this.buffer[at] === CR && this.buffer[at + 1] === LF && at + 1 < this.filled ? at + 2 : at + 1;
  }

  /** Reads one line from `start`; gives where the next begins, or −1 when its quotes need bytes still to come. */
  private readLine(start: number, end: number, last: boolean): number {
    this.line += 1;
    const buffer = this.buffer;
    if (this.line < this.firstRowLine) return this.afterLine(this.lineEnd(start, end), end);
    let at = start;
    let cell = 0;
    let slow = false;
    const first = buffer[start] ?? 0;
    // Letters, blanks, quotes and marks at the start take the careful way; digits, signs and dots the quick one.
    if (!((first >= 48 && first <= 57) || first === 45 || first === 46 || first === 43))
      return this.careful(start, end, last);
    for (;;) {
      const slot = cell < this.width ? (this.slots[cell] ?? -1) : -1;
      const read = slot < 0 ? undefined : this.reads[slot];
      const from = at;
      if (read?.quick) {
        let byte = buffer[at] ?? 0;
        const negative = byte === 45;
        if (negative || byte === 43) byte = buffer[++at] ?? 0;
        let mantissa = 0;
        let digits = 0;
        let decimals = -1;
        for (; at < end; byte = buffer[++at] ?? 0) {
          if (byte >= 48 && byte <= 57) {
            mantissa = mantissa * 10 + (byte - 48);
            digits++;
            if (decimals >= 0) decimals++;
          } else if (byte === read.decimal && decimals < 0) decimals = 0;
          else break;
        }
        const over = at >= end || byte === this.delimiter || byte === LF || byte === CR;
        if (over && digits > 0 && digits <= 15) {
          const value = decimals > 0 ? mantissa / (POWERS[decimals] ?? 1) : mantissa;
          const { unit } = read.column;
          const signed = negative ? -value : value;
          this.row[slot] = unit ? (signed + unit.offset) * unit.scale : signed;
        } else slow = true;
      }
      for (; at < end; at++) {
        const byte = buffer[at] ?? 0;
        if (byte === this.delimiter || byte === LF || byte === CR) break;
        if (byte === QUOTE) return this.careful(start, end, last);
      }
      if (read && (slow || !read.quick)) {
        slow = false;
        const value = readCell(this.text(from, at), read.column);
        if (Number.isNaN(value)) return this.careful(start, end, last);
        this.row[slot] = value;
      }
      cell++;
      if (at >= end || buffer[at] !== this.delimiter) break;
      at++;
    }
    if (cell !== this.width) return this.careful(start, end, last);
    this.commit(this.line);
    return this.afterLine(at, end);
  }

  /** The slow way: splits by text, joins lines of an open quote, and says what is wrong. */
  private careful(start: number, end: number, last: boolean): number {
    let stop = this.lineEnd(start, end);
    const next = this.afterLine(stop, end);
    let text = this.text(start, stop);
    if (text.trim() === "") return next;
    if (isRemark(text, this.delimiterText)) {
      this.remarks += 1;
      return next;
    }
    let split =
      this.delimiterText === ""
        ? { cells: [text.trim().replace(/^"(.*)"$/, "$1")] }
        : splitRecord(text, this.delimiterText);
    const alone = split;
    let lines = 1;
    while ("open" in split && split.open && lines < JOINED_LINES_MAX) {
      const from = this.afterLine(stop, end);
      if (from >= end) {
        if (last || end - start > LINE_MAX) break;
        this.line -= 1;
        return -1;
      }
      stop = this.lineEnd(from, end);
      text += `\n${this.text(from, stop)}`;
      split = splitRecord(text, this.delimiterText);
      lines += 1;
    }
    const whole = "cells" in split && (lines === 1 || split.cells.length === this.width) ? split : alone;
    const fault = this.take(whole);
    // An open quote that swallowed rows costs its own line only: the lines after it are read for themselves.
    if (fault !== undefined && lines > 1) {
      this.refused.add(this.line, "fault" in alone ? alone.fault : fault);
      return next;
    }
    if (fault !== undefined) this.refused.add(this.line, fault);
    const row = this.line;
    if (whole !== alone) this.line += lines - 1;
    if (fault === undefined && "cells" in whole && whole.cells.some((cell) => cell.trim() !== "")) this.commit(row);
    return whole === alone ? next : this.afterLine(stop, end);
  }

  /** Fills the row from split cells; gives the fault, or undefined for a good row or an all-empty one. */
  private take(split: ReturnType<typeof splitRecord>): string | undefined {
    if (!("cells" in split)) return split.fault;
    const { cells } = split;
    if (cells.every((cell) => cell.trim() === "")) return undefined;
    if (cells.length !== this.width)
      return `${cells.length === 1 ? "1 cell" : `${cells.length} cells`} where ${this.width} are expected`;
    let known = 0;
    for (let slot = 0; slot < this.reads.length; slot++) {
      const read = this.reads[slot];
      if (!read) continue;
      const cell = cells[read.column.index] ?? "";
      const value = readCell(cell, read.column);
      const empty = cell.trim() === "" && read.column.sparse;
      if (Number.isNaN(value) && !empty) return describeFault(cell, read.column);
      this.row[slot] = value;
      if (!empty && !(this.timed && slot === 0)) known += 1;
    }
    return known === 0 && this.reads.length > (this.timed ? 1 : 0) ? "every cell that is read is empty" : undefined;
  }

  /** Checks the row as a whole and keeps it. */
  private commit(line: number): void {
    let missing = 0;
    for (let slot = 0; slot < this.row.length; slot++) {
      const value = this.row[slot] ?? Number.NaN;
      if (value < -273.15 && this.reads[slot]?.column.quantity === "temperature") {
        this.refused.add(line, `${this.reads[slot]?.column.name}: below absolute zero`);
        return;
      }
      if (Number.isNaN(value)) missing += 1;
    }
    if (this.timed) {
      const clock = this.reads[0]?.column.kind === "clock";
      let time = (this.row[0] ?? Number.NaN) + this.dayS;
      // A clock that falls by more than half a day has passed midnight.
      if (clock && time < this.lastTime - 43_200) {
        this.dayS += 86_400;
        time += 86_400;
      }
      if (time < this.timeBefore || (time < this.lastTime && this.table.rows < 2)) {
        this.refused.add(line, "the time goes back");
        return;
      }
      // In order with the row before the last, but not with the last: that one had jumped ahead.
      if (time < this.lastTime) {
        this.table.dropLast();
        this.refused.add(this.lastLine, "the time jumps ahead of the rows after it");
      } else this.timeBefore = this.lastTime;
      this.lastTime = time;
      this.lastLine = line;
      this.row[0] = time;
    }
    this.missing += missing;
    this.table.add(this.row);
  }

  private text(from: number, to: number): string {
    if (to - from > LINE_MAX) throw new Refusal("line-too-long", "a line is longer than 1 MB", this.line);
    return decoder.decode(this.buffer.subarray(from, to));
  }
}

const decoder = new TextDecoder("utf-8");
