import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { Refusal } from "@/lib/science/refusal";
import { bytesOf, list, readBytes, readText, report } from "./reading";

const head = "time_s,sensor_c,ambient_c\n";
const good = (from: number, to: number) =>
  Array.from({ length: to - from }, (_, i) => `${from + i},50.5,20.5\n`).join("");
const codeOf = (run: () => unknown) => {
  try {
    run();
  } catch (error) {
    if (error instanceof Refusal) return error.code;
    throw error;
  }
  return "none";
};

describe("refused rows", () => {
  const faults: [string, string, RegExp][] = [
    ["text in a number column", "9,ERR,20.5", /"ERR" is not a number/],
    ["an empty cell", "9,,20.5", /empty/],
    ["NaN and infinity in words", "9,NaN,20.5", /not a number/],
    ["a value beyond double precision", "9,1e999,20.5", /not a number/],
    ["too few cells", "9,50.5", /2 cells where 3/],
    ["too many cells", "9,50.5,20.5,7", /4 cells where 3/],
    ["a decimal comma where commas divide", "9,50,5,20,5", /5 cells/],
    ["a stray quote", '9,50"5,20.5', /quote stands inside/],
    ["text after a closing quote", '9,"50.5"x,20.5', /after a closing quote/],
    ["a quote that never closes", '9,"50.5,20.5', /quote isn't closed/],
    ["a hexadecimal number", "9,0x20,20.5", /not a number/],
    ["two points", "9,5.0.5,20.5", /not a number/],
    ["a time that goes back", "2,50.5,20.5", /time goes back/],
    ["below absolute zero", "9,-300,20.5", /absolute zero/],
    ["a sentence", "operator moved the microphone", /1 cell where 3/],
  ];
  it.each(faults)("%s: by its line, and only that row", (_, row, reason) => {
    const log = readText(`${head}${good(0, 9)}${row}\n${good(10, 15)}`);
    expect(log.refused).toEqual([{ line: 11, reason: expect.stringMatching(reason) }]);
    expect(log.rows).toBe(14);
  });
  it("counts physical lines over quoted line ends, blank lines, remarks and mixed ends", () => {
    const text = `# one\r\n"time_s","note","sensor_c","ambient_c"\r0,"two\nlines",50,20\r\n\n# six\n1,"a",x,20\n2,b,51,20\r`;
    const log = readText(text);
    expect(log.refused).toEqual([{ line: 7, reason: 'sensor_c: "x" is not a number' }]);
    expect(list(log.sensorC)).toEqual([50, 51]);
  });
  it("refuses the one row whose time jumps ahead, not all that follow", () => {
    const log = readText(`${head}${good(0, 5)}99999,50.5,20.5\n${good(5, 9)}`);
    expect(log.refused).toEqual([{ line: 7, reason: "the time jumps ahead of the rows after it" }]);
    expect(list(log.timeS)).toEqual([0, 1, 2, 3, 4, 5, 6, 7, 8]);
  });
  it("lets no refused row speak for the order of time", () => {
    const log = readText(`${head}${good(0, 5)}99,-400,20.5\n${good(5, 9)}`);
    expect(log.refused).toEqual([{ line: 7, reason: "sensor_c: below absolute zero" }]);
    expect(log.rows).toBe(9);
  });
  it("keeps the first thousand and counts all", () => {
    const log = readText(`${head}${good(0, 20)}${"bad,row,here\n".repeat(2500)}`);
    expect(log.refusedCount).toBe(2500);
    expect(log.refused).toHaveLength(1000);
    expect(log.refused[999]?.line).toBe(1021);
  });
  it("doesn't refuse a row for a column that isn't read", () => {
    const log = readText("time_s,sensor_c,ambient_c,LAeq dB(A)\n0,50,20,38\n1,51,20,--\n2,52,20,39\n", {
      sensor: "sensor_c",
      ambient: "ambient_c",
    });
    expect([log.rows, log.refusedCount]).toEqual([3, 0]);
  });
  it("leaves out the empty cells of a column that runs on another clock", () => {
    const rows = Array.from({ length: 40 }, (_, i) => `${i},50,20,${i % 10 === 0 ? 38 : ""}\n`).join("");
    const result = report(`time_s,sensor_c,ambient_c,LAeq dB(A)\n${rows}`);
    expect(result.refusedCount).toBe(0);
    expect(result.level).toMatchObject({ n: 4, laeqDba: 38 });
    expect(result.warnings.map(({ code }) => code)).toContain("empty-cells");
  });
});

describe("files that are no log", () => {
  it.each([
    ["an empty file", "", "empty-file"],
    ["names only", head, "no-rows"],
    ["prose", "It was a dark night.\nThe fan hummed.\n", "no-rows"],
    ["zero bytes", "a\0b\n", "not-text"],
  ])("%s", (_, text, code) => {
    expect(codeOf(() => readText(text))).toBe(code);
  });
  it("refuses columns that aren't there, hold words or another quantity", () => {
    const text = "time_s,state,sensor_c,LAeq dB(A)\n0,on,50,38\n1,on,51,38\n";
    expect(codeOf(() => readText(text, { sensor: "nope" }))).toBe("unknown-column");
    expect(codeOf(() => readText(text, { sensor: "state" }))).toBe("not-numbers");
    expect(codeOf(() => readText(text, { ambient: "LAeq dB(A)" }))).toBe("wrong-quantity");
  });
  it("reads on after a line longer than a megabyte, and holds memory to it", () => {
    const bytes = bytesOf(`${head}${good(0, 9000)}${"7".repeat(3_000_000)}\n${good(9000, 9005)}`);
    const log = readBytes(bytes, {}, 65_536);
    expect(log.refused).toEqual([{ line: 9002, reason: "the line is longer than 1 MB" }]);
    expect(log.rows).toBe(9005);
  });
  it("never throws anything but a refusal, and loses no line, whatever the bytes", () => {
    fc.assert(
      fc.property(
        fc.string({ unit: fc.constantFrom(...'0123456789.,;\t\r\n"#-eT: °'), maxLength: 200 }),
        fc.integer({ min: 1, max: 50 }),
        (noise, chunk) => {
          const bytes = bytesOf(`${head}${good(0, 30)}${noise}\n${good(1e6, 1e6 + 5)}`);
          const log = readBytes(bytes, {}, chunk);
          const whole = readBytes(bytes);
          expect([log.rows, log.refused]).toEqual([whole.rows, whole.refused]);
          expect(log.rows).toBeGreaterThanOrEqual(30);
        },
      ),
      { numRuns: 60 },
    );
  });
});
