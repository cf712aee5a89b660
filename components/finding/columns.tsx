import { Missing } from "@/components/ui/missing";
import type { BarsCell } from "@/components/ui/bars/bars-model";
import {
  absoluteRanges,
  ranges,
  type IndexItem,
  type IndexQuery,
  type RangeKey,
  type SortKey,
} from "@/lib/contracts/index-query";
import { formatFrame } from "@/lib/format/frames";
import { formatNumber } from "@/lib/format/numbers";
import { levelUnit } from "@/lib/format/quantities";
import { whyNoEqualNoise, whyNoRank } from "./missing-words";

/** What the heads need to know of the whole list. */
export type ListFacts = { distanceMm: number | undefined; fullSetSpeed: number | undefined };

export type IndexColumn = {
  key: string;
  head: string | ((facts: ListFacts) => string);
  unit?: string | ((facts: ListFacts) => string);
  sort?: SortKey;
  /** Shown only where all entries share bench version, protocol and baseline unit. */
  absolute?: boolean;
  strong?: boolean;
  /** Its cells hold a word or two. */
  short?: boolean;
  cell: (item: IndexItem) => BarsCell;
};

const words = (key: string, head: string, say: (item: IndexItem) => string): IndexColumn => ({
  key,
  head,
  short: true,
  cell: (item) => ({ words: <span className="whitespace-nowrap">{say(item)}</span> }),
});

const figure = (
  range: RangeKey,
  decimals: number,
  read: (item: IndexItem) => [value: number | null, half95?: number | null],
  why: string | ((item: IndexItem) => string),
  more: Partial<IndexColumn> & { signed?: boolean } = {},
): IndexColumn => {
  const { signed, ...column } = more;
  return {
    key: range,
    head: ranges[range].label,
    unit: ranges[range].unit || undefined,
    sort: range,
    absolute: absoluteRanges.includes(range),
    ...column,
    cell: (item) => {
      const [value, uncertainty] = read(item);
      return { figure: { value, uncertainty, decimals, signed, why: typeof why === "string" ? why : why(item) } };
    },
  };
};

const bladesWords = ({ bladesFirst, bladesSecond }: IndexItem) =>
  bladesSecond === null ? String(bladesFirst) : `${bladesFirst} + ${bladesSecond}`;
const stagesWords = ({ stages, counterRotating }: IndexItem) =>
  stages === 1 ? "1" : `${stages}${counterRotating ? " counter" : " same way"}`;

function rankWords(item: IndexItem): BarsCell {
  const { roundRank, roundRankLow, roundRankHigh, roundOf } = item;
  if (roundRank === null) return { words: <Missing why={whyNoRank(item)} /> };
  return {
    words: (
      <span className="figures whitespace-nowrap">
        {roundRank} ({roundRankLow}–{roundRankHigh}) of {roundOf}
      </span>
    ),
  };
}

const fullSpeed = (quantity: string) => (facts: ListFacts) =>
  facts.fullSetSpeed === undefined
    ? `${quantity}, full speed`
    : `${quantity}, ${formatNumber(facts.fullSetSpeed)}\u00a0rpm`;

/** Every column that the index has beside the design's name, in the order in which they stand:
 * what is sorted by first, so that a phone shows it beside the name. */
export const indexColumns: readonly IndexColumn[] = [
  figure("equal", 1, (item) => [item.equalNoiseK, item.uEqualNoiseK], whyNoEqualNoise, { signed: true, strong: true }),
  figure("ratio", 1, (item) => [item.equalNoisePercent, item.uEqualNoisePercent], whyNoEqualNoise, { strong: true }),
  { key: "designer", head: "Designer", cell: ({ designers }) => ({ words: designers.join(", ") }) },
  words("stages", "Stages", stagesWords),
  words("blades", "Blades", bladesWords),
  words("inlet", "Inlet stack", ({ inletStack }) => inletStack),
  {
    key: "leveldba",
    head: fullSpeed("Level"),
    unit: ({ distanceMm }) => levelUnit(distanceMm ?? Number.NaN),
    sort: "leveldba",
    absolute: true,
    cell: ({ levelFullDba, uLevelFullDb, levelFullBound }) => ({
      figure: {
        value: levelFullDba,
        uncertainty: uLevelFullDb,
        decimals: 1,
        bound: levelFullBound ? "upper" : undefined,
      },
    }),
  },
  {
    key: "deltat",
    head: fullSpeed("ΔT"),
    unit: "K",
    sort: "deltat",
    absolute: true,
    cell: ({ deltaTFullK, uDeltaTFullK }) => ({
      figure: { value: deltaTFullK, uncertainty: uDeltaTFullK, decimals: 1 },
    }),
  },
  figure("cooling", 1, (item) => [item.equalCoolingDb, item.uEqualCoolingDb], "no one level cools like the baseline", {
    signed: true,
  }),
  figure("level", 1, (item) => [item.levelDifferenceDb, item.uLevelDifferenceDb], "not measured", { signed: true }),
  figure("loudness", 1, (item) => [item.loudnessSone], "no recording was analysed"),
  {
    key: "rank",
    head: "Rank in its round, 95\u00a0% range",
    sort: "rank",
    short: true,
    cell: rankWords,
  },
  words("season", "Season, round", (item) => `${item.seasonTitle}, round ${item.roundNumber}`),
  figure("gap", 1, (item) => [item.tipGapMm], "not declared"),
  figure("solidity", 2, (item) => [item.solidityMid], "not declared"),
  figure("pitch", 1, (item) => [item.pitchMidDeg], "not declared"),
  figure("mass", 1, (item) => [item.massG], "not declared"),
  figure("print", 0, (item) => [item.printTimeMin], "not declared"),
  words("hand", "First stage turns", ({ handFirst }) => handFirst),
  words("spacer", "Spacer", ({ spacerMm }) => (spacerMm > 0 ? `${spacerMm} mm` : "none")),
  words("struts", "Struts", ({ struts }) => String(struts)),
  words("shroud", "Shroud ring", ({ shroud }) => (shroud ? "yes" : "no")),
  words("frame", "Frame", ({ frameKey }) => formatFrame(frameKey)),
  words("material", "Material", ({ material }) => material),
  words("licence", "Licence", ({ licence }) => licence),
];

const usual = {
  comparable: ["equal", "designer", "stages", "blades", "inlet", "leveldba", "deltat", "rank"],
  ratios: ["ratio", "designer", "stages", "blades", "inlet", "level", "rank", "season"],
} as const;

/** The columns that may be shown over these entries. A figure that nothing has yet isn't offered. */
export function offeredColumns(comparableOnly: boolean, hasLoudness: boolean): IndexColumn[] {
  return indexColumns.filter(
    (column) => (comparableOnly || !column.absolute) && (column.key !== "loudness" || hasLoudness),
  );
}

/** What the address asks of the columns. */
type AskedColumns = Pick<IndexQuery, "columns" | "sort">;

/**
 * Those asked for in the address, else the usual ones; what may not be shown here is left out. What is sorted by always
 * stands, or nobody could see the order: first where nobody asked for it, so that it is in sight on every screen.
 */
export function shownColumns(
  offered: readonly IndexColumn[],
  { columns: asked, sort }: AskedColumns,
  comparableOnly: boolean,
) {
  const known = asked.filter((key) => indexColumns.some((column) => column.key === key));
  const wanted: readonly string[] = known.length > 0 ? known : usual[comparableOnly ? "comparable" : "ratios"];
  const shown = offered.filter((column) => wanted.includes(column.key));
  const unasked = offered.find((column) => column.sort === sort && !shown.includes(column));
  return unasked ? [unasked, ...shown] : shown;
}

/** The one figure that stands under a drawing: what is sorted by, else that at equal noise. */
export function leadColumn(offered: readonly IndexColumn[], sort: SortKey): IndexColumn | undefined {
  return offered.find((column) => column.sort === sort) ?? offered[0];
}

/** The column in plain words, for choosing it: "ΔT, full speed, K". */
export function columnWords(column: IndexColumn, distanceMm: number | undefined): string {
  const facts: ListFacts = { distanceMm, fullSetSpeed: undefined };
  const head = typeof column.head === "function" ? column.head(facts) : column.head;
  const unit = typeof column.unit === "function" ? column.unit(facts) : column.unit;
  return unit ? `${head}, ${unit}` : head;
}
