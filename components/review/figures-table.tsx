import Link from "next/link";
import type { Figure } from "@/components/ui/bars/bars-model";
import { BarsTable } from "@/components/ui/bars/bars-table";
import type { ReviewEntry, ReviewRound } from "@/lib/contracts/review";
import type { Figure as Measured } from "@/lib/contracts/publication";
import { stated } from "@/lib/domain/results/stated";
import { formatRankRange } from "@/lib/format/ranks";

export const notReachedWords: Readonly<Record<string, string>> = {
  "entry-not-reached": "the entry doesn't reach this level",
  "baseline-not-reached": "the baseline doesn't reach this level",
  "baseline-rests-on-bound": "the baseline's curve rests on a bound here",
};

/** A figure as a cell: ± is the half-width of its 95 % interval. */
export function measuredCell(figure: Measured, more: Partial<Figure> = {}): { figure: Figure } {
  return { figure: { value: figure.value, uncertainty: stated(figure).u95, decimals: 2, ...more } };
}

/** The figures of a round's entries as publishing would freeze them; each name opens to its raw readings. */
export function FiguresTable({ round }: { round: ReviewRound }) {
  const [season, naive] = round.standings;
  const distance = round.entries.find((each) => each.snapshot)?.snapshot?.microphoneDistanceMm;
  const at = `${round.headlineDba} dB(A)${distance === undefined ? "" : ` @ ${distance} mm`}`;
  return (
    <BarsTable
      caption="Figures of the round"
      columns={[
        { key: "name", head: "Entry" },
        { key: "noise", head: `ΔT against baseline at ${at}`, unit: "K" },
        { key: "cool", head: "Level against baseline at equal ΔT", unit: "dB" },
        { key: "score", head: "Score" },
        { key: "rank", head: "Rank, 95 % range" },
        { key: "naive", head: "Rank by the plain sum" },
        { key: "state", head: "State" },
      ]}
      rows={round.entries.map((entry) => {
        const place = season?.rows.find((row) => row.entryId === entry.entryId);
        const other = naive?.rows.find((row) => row.entryId === entry.entryId);
        return {
          key: entry.entryId,
          cells: {
            name: { words: <EntryLink roundId={round.roundId} entry={entry} /> },
            ...figureCells(entry, round.headlineDba),
            score: { figure: { value: place?.score, decimals: 4, why: place?.whyNotRanked ?? "not scored" } },
            rank: rankCell(place),
            naive: rankCell(other),
            state: { words: <span className="whitespace-nowrap">{entry.state.replaceAll("_", " ")}</span> },
          },
        };
      })}
    />
  );
}

function EntryLink({ roundId, entry }: { roundId: string; entry: ReviewEntry }) {
  return (
    <Link href={`/review/${roundId}/${entry.entryId}`}>
      {entry.designName} {entry.letter}
    </Link>
  );
}

type Row = NonNullable<ReviewRound["standings"][number]>["rows"][number];

function rankCell(row: Row | undefined) {
  if (!row || row.rank === null) return { figure: { value: null, why: row?.whyNotRanked ?? "not scored" } };
  return { words: `${row.rank} (${formatRankRange(row.rankLow ?? row.rank, row.rankHigh ?? row.rank)})` };
}

function figureCells(entry: ReviewEntry, headlineDba: number) {
  const none = { figure: { value: null, why: entry.whyNone ?? "no figure" } };
  if (!entry.snapshot) return { noise: none, cool: none };
  const reading = entry.snapshot.equalNoise.find((each) => each.levelDba === headlineDba);
  const cooling = entry.snapshot.equalCooling;
  return {
    noise:
      reading && "difference" in reading
        ? measuredCell(reading.difference, { signed: true, ...(reading.upperBound && { bound: "upper" as const }) })
        : { figure: { value: null, why: notReachedWords[reading?.why ?? ""] ?? "no figure" } },
    cool: cooling
      ? measuredCell(cooling.differenceDb, { signed: true })
      : { figure: { value: null, why: "the curves give no level at equal ΔT" } },
  };
}
