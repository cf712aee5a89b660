import { publicDb } from "@/db/client/handles";
import { entriesByIds } from "@/db/queries/shown/entries";
import { indexPageSize, type IndexAnswer, type IndexQuery } from "@/lib/contracts/index-query";
import { createSearchClient, isTimeOut, searchAccess } from "@/search/client";
import { searchDesigns, type Found } from "@/search/query";
import { log } from "../log";
import { indexItem, listDesigns, withoutAbsoluteRanges, withoutAbsolutes } from "./list-designs";

/** A reader waits this long for the search service before the database answers. */
const patienceMs = 2_000;
/** After one that got no answer the service is let be for so long: whoever goes on choosing doesn't wait at each choice. */
const restMs = 5_000;
let restsUntil = 0;

/**
 * Answers the index's question by the search service; by the database, with `from: "database"`, while the service is
 * down, its index is missing, empty or made for older settings. Rows are read from the public view by id, so what is
 * no longer published isn't shown however late the index hears of it.
 */
export async function findDesigns(query: IndexQuery): Promise<IndexAnswer> {
  const found = await askService(query);
  if (!found) return listDesigns(query);
  const rows = await entriesByIds(publicDb(), { entryIds: found.entryIds });
  const items = rows.map(indexItem);
  const shown = new Set(items.map((item) => item.entryId));
  const total = found.total - (found.entryIds.length - items.length);
  return {
    items: found.oneScale ? items : items.map(withoutAbsolutes),
    total,
    ofAll: found.ofAll,
    page: query.page,
    pages: Math.max(1, Math.ceil(total / indexPageSize)),
    comparableOnly: found.oneScale,
    facets: found.facets,
    histograms: found.oneScale ? found.histograms : withoutAbsoluteRanges(found.histograms),
    from: "search",
    highlights: Object.fromEntries(Object.entries(found.highlights).filter(([entryId]) => shown.has(entryId))),
  };
}

async function askService(query: IndexQuery): Promise<Found | undefined> {
  if (Date.now() < restsUntil) return undefined;
  try {
    const found = await searchDesigns(createSearchClient(searchAccess(), patienceMs), query);
    return found.ofAll > 0 ? found : undefined;
  } catch (error) {
    if (isTimeOut(error)) restsUntil = Date.now() + restMs;
    log().warn({ err: error }, "limited search: the database answers");
    return undefined;
  }
}
