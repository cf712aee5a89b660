import { parse } from "csv-parse/sync";
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { splitRecord } from "@/lib/science/logs/cells";
import { createRandom } from "@/lib/science/statistics/random";
import { list, readText } from "./reading";

/** What csv-parse makes of one record on its own: its cells, or that it refuses it. */
function oracle(text: string, delimiter: string): string[] | "refused" {
  try {
    const records: string[][] = parse(text, { delimiter, recordDelimiter: ["\r\n"], relaxColumnCount: true });
    return records[0] ?? "refused";
  } catch {
    return "refused";
  }
}

describe("against csv-parse", () => {
  it("splits a record into the same cells, and refuses the same quotes", () => {
    const piece = fc.constantFrom('"', '""', ",", ";", "1.5", "a", "x y", '"a,b"', '"q""q"', "\t");
    fc.assert(
      fc.property(
        fc.array(piece, { minLength: 1, maxLength: 8 }),
        fc.constantFrom(",", ";", "\t"),
        (pieces, delimiter) => {
          const text = pieces.join("");
          const split = splitRecord(text, delimiter);
          expect("cells" in split ? split.cells : "refused").toEqual(oracle(text, delimiter));
        },
      ),
      { numRuns: 500 },
    );
  });
  it("reads the same numbers, to the last digit, from a long log", () => {
    const random = createRandom(8);
    const number = () => (random.normal() * 10 ** random.below(6)).toFixed(random.below(12));
    const rows = Array.from({ length: 4000 }, (_, i) => `${i},${number()},"${number()}",${random.normal()}`);
    const text = `time_s,a (dB),b (W),LAeq dB(A)\r\n${rows.join("\r\n")}\r\n`;
    const records: string[][] = parse(text, { fromLine: 2 });
    const log = readText(text);
    expect(list(log.timeS)).toEqual(records.map((record) => Number(record[0])));
    expect(list(log.levelDb)).toEqual(records.map((record) => Number(record[3]) + 0));
    const other = readText(text, { level: "a (dB)" });
    expect(list(other.levelDb)).toEqual(records.map((record) => Number(record[1]) + 0));
  });
});
