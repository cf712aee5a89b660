import { BarsTable } from "@/components/ui/bars/bars-table";
import type { FitSeason } from "@/lib/contracts/fit-limits";
import type { Comparison } from "@/lib/client/fit/compare-model";
import { formatNumber } from "@/lib/format/numbers";
import { listWords } from "@/lib/format/words";

const point = (at: readonly number[]) => at.map((value) => formatNumber(value, { decimals: 1 })).join(", ");

/** Keep-out solids around the cooler, each with its smallest clearance, what comes closest and where. */
export function KeepOutTable({ comparison, season }: { comparison: Comparison; season: FitSeason }) {
  return (
    <div className="grid gap-2">
      <BarsTable
        caption={`Keep-out solids of ${season.benchName ?? "the bench"}`}
        showCaption
        columns={[
          { key: "name", head: "Solid" },
          { key: "clearance", head: "Clearance", unit: "mm" },
          { key: "by", head: "Closest" },
          { key: "at", head: "Where x, y, z", unit: "mm" },
          { key: "frame", head: "Of the frame", unit: "mm" },
        ]}
        rows={comparison.keepOuts.map((solid, index) => ({
          key: solid.name,
          tone: solid.meets ? "wrong" : undefined,
          cells: {
            name: { words: solid.name },
            clearance: solid.meets
              ? { words: "none: it meets" }
              : { figure: { value: solid.clearanceMm, decimals: 1 } },
            by: { words: solid.by },
            at: { words: point(solid.atMm) },
            frame: { figure: { value: comparison.frameClearancesMm[index], decimals: 1 } },
          },
        }))}
      />
      <p className="small-print max-w-3xl">
        In cooler coordinates: 0 is where the fan’s axis meets the mounting face, z points away from the cooler, x and y
        are as in the file. Tolerances are not taken off here.
        {comparison.notCompared.length > 0
          ? ` ${listWords(comparison.notCompared)} could not be fetched and is not compared: choose the season again.`
          : ""}
      </p>
    </div>
  );
}
