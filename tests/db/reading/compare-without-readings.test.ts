import { beforeAll, describe, expect, it } from "vitest";
import { compareCsv } from "@/lib/server/reading/compare-csv";
import { compareAnswer } from "@/lib/server/reading/compare-answer";
import { setUpDatabase } from "../../setup/database";
import { layOutField } from "../../setup/search-field";

const db = setUpDatabase();

beforeAll(() => layOutField(db.owner, 10));

describe("entries whose readings are not kept", () => {
  it("stand side by side with their traits and ranks, and nothing is read off", async () => {
    const rows: { entry_id: string }[] = await db.owner("published_entry").select("entry_id").limit(2);
    const answer = await compareAnswer({ named: rows.map((row) => row.entry_id), levelDba: undefined });
    expect(answer.entries).toHaveLength(2);
    for (const { points, atLevel } of answer.entries) {
      expect(points).toEqual([]);
      expect(atLevel.why).toBeDefined();
      expect([atLevel.deltaTK, atLevel.ratioPercent, atLevel.differenceK]).toEqual([undefined, undefined, undefined]);
    }
    expect(answer.traits.length).toBeGreaterThan(10);
    expect(compareCsv(answer).split("\r\n")).toHaveLength(4);
  });
});
