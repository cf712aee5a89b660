import type { FacetKey, RangeKey } from "@/lib/contracts/index-query";

/** Where a facet stands in the sentence: words before it, what it says when nothing is chosen, words after it. */
export type FacetPlace = { facet: FacetKey; before: string; any: string; after: string };
export type RangePlace = { range: RangeKey; before: string; after: string };

/** Always there, in this order; they read as one sentence. */
export const alwaysThere: readonly FacetPlace[] = [
  { facet: "rotation", before: "Designs with ", any: "any number of", after: " stages" },
  { facet: "blades1", before: " and ", any: "any number of", after: " blades in the first" },
  { facet: "inlet", before: ", ", any: "any", after: " inlet stack" },
  { facet: "material", before: ", printed in ", any: "any material", after: "" },
  { facet: "frame", before: ", for a frame of ", any: "any size", after: "" },
  { facet: "season", before: ", measured in ", any: "any season", after: "" },
];

/** Added when asked for. */
export const addedFacets: readonly FacetPlace[] = [
  { facet: "stages", before: ", with ", any: "any number of", after: " stages in all" },
  { facet: "blades2", before: ", ", any: "any number of", after: " blades in the second" },
  { facet: "hand", before: ", the first turning ", any: "either way", after: "" },
  { facet: "spacer", before: ", ", any: "with or without", after: " a spacer" },
  { facet: "struts", before: ", ", any: "any number of", after: " struts" },
  { facet: "shroud", before: ", ", any: "with or without", after: " a shroud ring" },
  { facet: "designer", before: ", by ", any: "anybody", after: "" },
  { facet: "licence", before: ", under ", any: "any licence", after: "" },
  { facet: "tone", before: ", ", any: "with or without", after: " a prominent tone" },
];

export const addedRanges: readonly RangePlace[] = [
  { range: "equal", before: ", ΔT at equal noise against the baseline of ", after: "" },
  { range: "ratio", before: ", at equal noise ", after: " of the baseline’s ΔT/P" },
  { range: "cooling", before: ", a level at equal ΔT against the baseline of ", after: "" },
  { range: "level", before: ", a level at full speed against the baseline of ", after: "" },
  { range: "loudness", before: ", a loudness of ", after: "" },
  { range: "gap", before: ", a tip gap of ", after: "" },
  { range: "solidity", before: ", a solidity at mid-span of ", after: "" },
  { range: "pitch", before: ", a pitch at mid-span of ", after: "" },
  { range: "mass", before: ", a rotor mass of ", after: "" },
  { range: "print", before: ", a print time of ", after: "" },
];
