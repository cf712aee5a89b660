import type { SharedComparison } from "@/lib/contracts/saved";
import { findEntries } from "../reading/find-entries";
import { readCompare, type CompareSheet } from "../reading/read-compare";
import { readSharedComparison } from "./comparisons";

export interface SharedPage {
  shared: SharedComparison;
  /** Undefined where none of its entries is public any more. */
  sheet: CompareSheet | undefined;
  levelDba: number | undefined;
  deltaTK: number | undefined;
  missing: number;
}

const figureOf = (text: string | null | undefined) =>
  text && /^\d{1,3}(\.\d{1,6})?$/.test(text) ? Number(text) : undefined;

/**
 * A shared comparison with its figures as they are now.
 *
 * @param asked the key; the level that the reader moved to (that which was saved without one), and the ΔT of the other reading
 * @throws ExpectedError not_found for a key that was taken back as for none
 */
export async function readSharedPage(asked: {
  key: string;
  levelText: string | undefined;
  deltaTText: string | undefined;
}): Promise<SharedPage> {
  const shared = await readSharedComparison(asked);
  const params = new URLSearchParams(shared.address.split("?")[1]);
  const { entries, missing } = await findEntries({ named: (params.get("entries") ?? "").split(",") });
  const entryIds = entries.map((entry) => entry.entryId);
  return {
    shared,
    sheet: entryIds.length > 0 ? await readCompare({ entryIds }) : undefined,
    levelDba: figureOf(asked.levelText) ?? figureOf(params.get("level")),
    deltaTK: figureOf(asked.deltaTText),
    missing,
  };
}
