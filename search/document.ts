import { createHash } from "node:crypto";
import type { FacetKey, RangeKey } from "@/lib/contracts/index-query";
import { facetKeys, rangeKeys, ranges } from "@/lib/contracts/index-query";
import { INDEX_SETTINGS, binField, binStart } from "./settings";

/** What the public view says of one entry, as far as the index needs it. */
export interface SearchSource {
  entryId: string;
  name: string;
  letter: string;
  designers: string[] | null;
  seasonTitle: string;
  facets: Record<FacetKey, string | string[] | null>;
  ranges: Record<RangeKey, number | null>;
  inletStackMm: number;
  publishedAt: Date;
  roundRank: number | null;
  levelFullDba: number;
  deltaTFullK: number;
  benchVersionId: string;
  protocolVersionId: string;
  baselineUnitId: string;
}

export type SearchDocument = { id: string; rev: string } & Record<string, string | number | string[]>;

/** Changes when documents are made in another way, so that the index is filled anew. */
const documentVersion = 1;

/** Names the settings and the making of documents; an index that was filled under another one is filled anew. */
export function indexDigest(): string {
  return sha256(JSON.stringify([documentVersion, INDEX_SETTINGS]));
}

/** The marks around highlighted words are private-use characters; what people typed may not hold them. */
const withoutMarks = (text: string): string => text.replace(/[\uE000\uE001]/gu, "");

/** What a builder would type for a trait: "two stages counter-rotating 7 + 5 blades bellmouth 20 mm PETG". */
function traitWords({ facets, inletStackMm }: SearchSource): string {
  const text = (key: FacetKey): string => String(facets[key] ?? "");
  const stages = { "1": "one single stage", "2": "two stages", "3": "three stages", "4": "four stages" };
  const rotation = { single: "", counter: "counter-rotating", co: "co-rotating" };
  const yes = (key: FacetKey, words: string): string => (facets[key] === "true" ? words : "");
  return [
    stages[text("stages") as keyof typeof stages] ?? "",
    rotation[text("rotation") as keyof typeof rotation] ?? "",
    `${[facets.blades1, facets.blades2].filter((blades) => blades !== null).join(" ")} blades`,
    `${text("hand")}-handed`,
    facets.inlet === "none" ? "" : `${text("inlet")} inlet stack ${inletStackMm} mm`,
    yes("spacer", "spacer"),
    facets.struts === "0" ? "no struts" : `${text("struts")} struts`,
    yes("shroud", "shroud ring"),
    yes("tone", "prominent tone"),
    text("frame"),
    text("material"),
    text("licence"),
  ]
    .filter((part) => part !== "")
    .join(" ");
}

/**
 * The index's document of a published entry. What has no value is left out, so that it counts nowhere and sorts last;
 * `rev` is a digest of all the rest, by which index and database are compared.
 */
export function searchDocument(source: SearchSource): SearchDocument {
  const fields: Record<string, string | number | string[]> = {
    id: source.entryId,
    name: withoutMarks(source.name),
    letter: source.letter,
    seasonTitle: withoutMarks(source.seasonTitle),
    traitWords: traitWords(source),
    published: source.publishedAt.getTime(),
    leveldba: source.levelFullDba,
    deltat: source.deltaTFullK,
    scale: `${source.benchVersionId} ${source.protocolVersionId} ${source.baselineUnitId}`,
  };
  if (source.roundRank !== null) fields.rank = source.roundRank;
  for (const key of facetKeys) {
    const value = key === "designer" ? source.designers : source.facets[key];
    if (value !== null) fields[key] = value;
  }
  for (const key of rangeKeys) {
    const value = source.ranges[key];
    if (value === null) continue;
    fields[key] = value;
    fields[binField(key)] = binStart(value, ranges[key].step);
  }
  return { ...fields, id: source.entryId, rev: sha256(JSON.stringify(fields)).slice(0, 24) };
}

const sha256 = (text: string): string => createHash("sha256").update(text).digest("hex");
