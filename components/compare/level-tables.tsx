import { BarsTable } from "@/components/ui/bars/bars-table";
import type { BarsRow, Figure } from "@/components/ui/bars/bars-model";
import type { ComparedEntry, Contrast, Estimate } from "@/lib/domain/results/compare-figures";
import { whyWords, type NameById } from "./compare-words";

export type LevelTablesProps = {
  entries: readonly ComparedEntry[];
  name: NameById;
  /** The baseline's own rows: one, or one a session. */
  baselines: readonly { key: string; name: string; deltaTK: Estimate | undefined }[];
};

const cell = (read: Estimate | Contrast | undefined, why: string, more: Partial<Figure> = {}) => ({
  figure: { value: read?.value, uncertainty: read?.half95, decimals: 1, why, ...more },
});

/** At one level: ΔT of each entry and of the baseline, and the difference between them. */
export function EqualNoiseTable({ entries, name, baselines }: LevelTablesProps) {
  const rows: BarsRow[] = entries.map((entry) => {
    const bound = entry.upperBound ? { bound: "upper" as const } : {};
    return {
      key: entry.id,
      cells: {
        name: { words: name(entry.id) },
        deltaT: cell(entry.deltaTK, whyWords(entry), bound),
        against: cell(entry.differenceK, whyWords(entry), { signed: true, ...bound }),
      },
    };
  });
  const below: BarsRow[] = baselines.map((baseline) => ({
    key: baseline.key,
    tone: "baseline",
    cells: {
      name: { words: baseline.name },
      deltaT: cell(baseline.deltaTK, "the baseline was not measured at this level"),
      against: { figure: { value: 0, decimals: 0 } },
    },
  }));
  return (
    <BarsTable
      caption="At equal noise, with 95 % intervals"
      columns={[
        { key: "name", head: "Entry" },
        { key: "deltaT", head: "ΔT", unit: "K" },
        { key: "against", head: "Against baseline", unit: "K", tone: "strong" },
      ]}
      rows={[...rows, ...below]}
    />
  );
}

/** The other way: how much louder or quieter each is where it cools as the baseline does at the level. */
export function EqualCoolingTable({ entries, name }: Pick<LevelTablesProps, "entries" | "name">) {
  const why = "its curve has no one level that cools as the baseline does here";
  return (
    <BarsTable
      caption="At equal ΔT, with 95 % intervals"
      columns={[
        { key: "name", head: "Entry" },
        { key: "level", head: "Level against baseline", unit: "dB", tone: "strong" },
      ]}
      rows={entries.map((entry) => ({
        key: entry.id,
        cells: { name: { words: name(entry.id) }, level: cell(entry.coolingDb, why, { signed: true }) },
      }))}
    />
  );
}

/** Each entry against the baseline of its own session, at its own season's headline level. */
export function RatioTable({
  entries,
  name,
  place,
}: Pick<LevelTablesProps, "entries" | "name"> & { place: (id: string) => string }) {
  return (
    <BarsTable
      caption="Ratios and differences to each session’s own baseline, with 95 % intervals"
      columns={[
        { key: "name", head: "Entry" },
        { key: "place", head: "Season, bench, baseline" },
        { key: "ratio", head: "ΔT/P, of baseline", unit: "%", tone: "strong" },
        { key: "level", head: "Level at equal ΔT, against baseline", unit: "dB" },
      ]}
      rows={entries.map((entry) => ({
        key: entry.id,
        cells: {
          name: { words: name(entry.id) },
          place: { words: place(entry.id) },
          ratio: cell(entry.ratioPercent, whyWords(entry), entry.upperBound ? { bound: "upper" } : {}),
          level: cell(entry.coolingDb, "no one level cools as the baseline does at the headline level", {
            signed: true,
          }),
        },
      }))}
    />
  );
}
