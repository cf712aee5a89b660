const LF = 10;
const CR = 13;
const TAB = 9;
const BLANK = 32;

/** What divides the cells of a log that is laid out by blanks alone: runs of blanks and tabs, once squeezed to one. */
export const BLANKS = " ";

/**
 * Makes one blank of every run of blanks and tabs, and none of those at either end of a line, so that a log laid out in
 * columns reads like one with a delimiter. Line ends stay, so lines count alike. Chunks may break anywhere.
 */
export class BlankSqueezer {
  private atStart = true;
  private waiting = false;

  /** @returns the bytes so far; a blank at the end waits for what follows it */
  push(bytes: Uint8Array): Uint8Array {
    const out = new Uint8Array(bytes.length + 1);
    let count = 0;
    for (const byte of bytes) {
      if (byte === BLANK || byte === TAB) {
        this.waiting = !this.atStart;
        continue;
      }
      const ends = byte === LF || byte === CR;
      if (this.waiting && !ends) out[count++] = BLANK;
      out[count++] = byte;
      this.waiting = false;
      this.atStart = ends;
    }
    return out.subarray(0, count);
  }
}

/** Cells of a line laid out by blanks; a unit in brackets stays with its name. */
export const blankCells = (text: string): string[] => text.trim().split(/[ \t]+/);

/** Names above rows of `width` cells: parted by two blanks or more where that fits, else by any, units kept beside. */
export function blankNames(text: string, width: number): string[] | undefined {
  const wide = text.trim().split(/\t+| {2,}/);
  if (wide.length === width) return wide;
  const words = text.trim().match(/\S+(?:[ \t]+[([][^)\]]*[)\]])*/g) ?? [];
  return words.length === width ? words : undefined;
}
