import { expect, it } from "vitest";
import { shownFrames } from "@/db/queries/shown/fit";
import { frameByName, framePresets } from "@/lib/science/geometry/frames";
import { setUpDatabase } from "../setup/database";

const db = setUpDatabase();

it("a new database, the command line and the pages know the same frames", async () => {
  const rows = await shownFrames(db.public);
  expect(rows.map((row) => row.key)).toEqual(framePresets.map((preset) => preset.key));
  for (const { id: _id, key, ...row } of rows) expect(row).toEqual(frameByName(key));
  // Common practice, no source: the hole patterns of the four classes.
  const spacings = Object.fromEntries(rows.map((row) => [row.sizeMm, row.holeSpacingMm]));
  expect(spacings).toEqual({ 80: 71.5, 92: 82.5, 120: 105, 140: 124.5 });
});
