import { describe, expect, it } from "vitest";
import { readPastedBlock } from "@/lib/client/bench-paste";

const read = (text: string) => readPastedBlock(text, "axis", [1100, 1450]);

describe("a block pasted from a spreadsheet", () => {
  it("is read in the usual order, with decimal commas, points and units", () => {
    expect(read("1100\t1\t38,4\t62.1 °C\t22\t150\r\n1450 rpm\t2\t46.0 dB(A)\t52,2\t22,1\t150,2 W\r\n").runs).toEqual([
      {
        line: 1,
        setSpeed: 1100,
        mountNumber: 1,
        readings: [
          { quantity: "level_dba", value: 38.4, positionId: "axis", source: "pasted" },
          { quantity: "sensor_c", value: 62.1, source: "pasted" },
          { quantity: "ambient_c", value: 22, source: "pasted" },
          { quantity: "power_w", value: 150, source: "pasted" },
        ],
      },
      expect.objectContaining({ line: 2, setSpeed: 1450, mountNumber: 2 }),
    ]);
  });

  it("may name its columns in another order, some of them unknown", () => {
    const { runs, refused } = read("Mount\tNote\tSet speed\tAmbient\tHeater\n1\tfirst\t1450\t71.6 °F\t125.6 °F");
    expect(refused).toEqual([]);
    // 71.6 °F = 22 °C and 125.6 °F = 52 °C, exactly (NIST SP 811 (2008), B.8).
    expect(runs[0]?.readings.map(({ quantity, value }) => [quantity, Math.round(value * 1e9) / 1e9])).toEqual([
      ["ambient_c", 22],
      ["sensor_c", 52],
    ]);
  });

  it("refuses rows by line and reason and keeps the rest", () => {
    const { runs, refused } = read("1100\t1\t38.4\n\n999\t1\t38.4\n1100\tx\t38.4\n1450\t1\n1450\t1,5\t46\n1450\t1\t46");
    expect(runs.map(({ line }) => line)).toEqual([1, 7]);
    expect(refused.map(({ line }) => line)).toEqual([3, 4, 5, 6]);
    expect(refused[0]?.reason).toBe("the set speed is none of 1100, 1450");
  });

  it("gives nothing for nothing", () => {
    expect(read(" \n\t\n")).toEqual({ runs: [], refused: [] });
  });
});
