import { parse } from "csv-parse/sync";
import { describe, expect, test } from "vitest";
import { writeCsv } from "@/lib/format/csv";

describe("CSV", () => {
  // csv-parse, an independent reader, is the judge of quotes (RFC 4180).
  test("comes back from an independent reader as it went in, whatever stands in the cells", () => {
    const rows = [
      ["plain", 'a "quoted" word', "a,comma", "two\nlines"],
      ["", " edge ", "é – ΔT", "3;4"],
    ];
    const text = writeCsv(["a", "b", "c", "d"], rows);
    expect(parse(text)).toEqual([["a", "b", "c", "d"], ...rows]);
    expect(text.endsWith("\r\n")).toBe(true);
  });

  // OWASP, CSV Injection: the characters that spreadsheets take for the beginning of a formula.
  test.each(["=1+1", "+1", "-1", "@SUM(A1)", "\tx", "\rx"])(
    "a text that begins like a formula is prefixed: %j",
    (cell) => {
      expect(parse(writeCsv(["h"], [[cell]]))[1]).toEqual([`'${cell}`]);
    },
  );

  test("numbers are never prefixed, missing values leave the cell empty, NaN is refused", () => {
    expect(writeCsv(["n", "m"], [[-2.5, null]])).toBe("n,m\r\n-2.5,\r\n");
    expect(() => writeCsv(["n"], [[Number.NaN]])).toThrow(RangeError);
  });
});
