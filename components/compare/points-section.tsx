import { BarsTable } from "@/components/ui/bars/bars-table";
import type { BarsRow } from "@/components/ui/bars/bars-model";
import { Section } from "@/components/ui/sheet";
import type { ComparedHead } from "@/lib/contracts/compare";
import { formatNumber } from "@/lib/format/numbers";
import { levelUnit } from "@/lib/format/quantities";
import { pointsWithIntervals } from "@/lib/domain/results/compare-figures";
import type { LaidEntry, LaidSubject } from "@/lib/domain/results/lay-over";
import { nameOf } from "./names";

function rowsOf(key: string, name: string, subject: LaidSubject, baseline: boolean): BarsRow[] {
  return pointsWithIntervals(subject).map((point) => ({
    key: `${key} ${point.setSpeedRpm}`,
    ...(baseline && { tone: "baseline" as const }),
    cells: {
      subject: { words: `${name}, ${formatNumber(point.setSpeedRpm)} rpm` },
      level: {
        figure: {
          value: point.levelDba.value,
          uncertainty: point.levelDba.half95,
          decimals: 1,
          bound: point.levelDba.upperBound ? ("upper" as const) : undefined,
        },
      },
      deltaT: { figure: { value: point.deltaTK.value, uncertainty: point.deltaTK.half95, decimals: 1 } },
      power: { figure: { value: point.powerW, decimals: 1 } },
      resistance: {
        figure: { value: point.resistanceKPerW.value, uncertainty: point.resistanceKPerW.half95, decimals: 3 },
      },
      mounts: { figure: { value: point.mounts, decimals: 0 } },
    },
  }));
}

function PointsTable({ caption, distanceMm, rows }: { caption: string; distanceMm: number; rows: BarsRow[] }) {
  return (
    <BarsTable
      caption={caption}
      showCaption
      columns={[
        { key: "subject", head: "At set speed" },
        { key: "level", head: "Level", unit: levelUnit(distanceMm) },
        { key: "deltaT", head: "ΔT", unit: "K" },
        { key: "power", head: "Heat", unit: "W" },
        { key: "resistance", head: "ΔT/P", unit: "K/W" },
        { key: "mounts", head: "Mounts" },
      ]}
      rows={rows}
    />
  );
}

export type PointsSectionProps = { heads: readonly ComparedHead[]; laid: readonly LaidEntry[]; oneAxis: boolean };

/** What was measured at each set speed. One table within one axis; else a table for each entry and its own baseline. */
export function PointsSection({ heads, laid, oneAxis }: PointsSectionProps) {
  const sessions = laid.filter((entry, n) => laid.findIndex(({ sessionId }) => sessionId === entry.sessionId) === n);
  const headOf = (id: string) => heads.find((head) => head.entryId === id);
  const name = (id: string) => {
    const head = headOf(id);
    return head ? nameOf(head, heads) : id;
  };
  const baselineRows = (entry: LaidEntry) =>
    rowsOf(
      `baseline ${entry.id}`,
      sessions.length > 1 ? `Baseline beside ${name(entry.id)}` : "Baseline",
      entry.baseline,
      true,
    );
  const groups = oneAxis
    ? [{ key: "all", caption: "Levels corrected for background; 95 % intervals", entries: laid, baselines: sessions }]
    : laid.map((entry) => ({
        key: entry.id,
        caption: `${name(entry.id)}: ${headOf(entry.id)?.bench ?? ""}. Not on one scale with the others.`,
        entries: [entry],
        baselines: [entry],
      }));
  return (
    <Section id="points" title="Readings by set speed">
      <div className="grid gap-6">
        {groups.map(({ key, caption, entries, baselines }) => (
          <PointsTable
            key={key}
            caption={caption}
            distanceMm={headOf(entries[0]?.id ?? "")?.distanceMm ?? Number.NaN}
            rows={[
              ...entries.flatMap((entry) => rowsOf(entry.id, name(entry.id), entry, false)),
              ...baselines.flatMap(baselineRows),
            ]}
          />
        ))}
      </div>
      <p className="small-print mt-2">
        Each entry’s sheet opens these to their raw runs. The level at a set speed is no verdict by itself: who turns
        slowly is quiet and warm.
      </p>
    </Section>
  );
}
