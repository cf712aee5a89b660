import { BarsTable } from "@/components/ui/bars/bars-table";
import type { BenchSession } from "@/lib/contracts/bench-session";
import { speedWords } from "./words";

/** Levels corrected for background with "≤" where it was too near, ΔT, resistance, and each against the baseline. */
export function FiguresTable({ session }: { session: BenchSession }) {
  const { figures, subjects, protocol, positions } = session;
  const used = positions.filter((position) => position.used);
  const distance = used[0]?.distanceMm ?? 100;
  if (figures.length === 0) {
    return (
      <p>No run is done yet. A run counts once it has a level at each position, a temperature rise and a power.</p>
    );
  }
  const noBaseline = "the baseline has no run at this set speed yet";
  return (
    <>
      <BarsTable
        caption="Figures of this session so far"
        columns={[
          { key: "name", head: "Run of" },
          { key: "speed", head: "At" },
          { key: "mounts", head: "Mounts" },
          { key: "level", head: "Level", unit: `dB(A) @ ${distance} mm` },
          { key: "correction", head: "Correction", unit: "dB" },
          { key: "rise", head: "ΔT", unit: "K" },
          { key: "resistance", head: "ΔT/P", unit: "K/W" },
          { key: "difference", head: "Level to baseline", unit: "dB" },
          { key: "ratio", head: "ΔT/P to baseline", unit: "%" },
        ]}
        rows={figures.map((point) => {
          const isBaseline = point.entryId === null;
          const why = isBaseline ? "this is the baseline" : noBaseline;
          return {
            key: `${point.entryId} ${point.setSpeed}`,
            tone: isBaseline ? ("baseline" as const) : undefined,
            cells: {
              name: { words: subjects.find((each) => each.entryId === point.entryId)?.name ?? "" },
              speed: {
                words: <span className="whitespace-nowrap">{speedWords(point.setSpeed, protocol.setting)}</span>,
              },
              mounts: { figure: { value: point.mounts, decimals: 0 } },
              level: { figure: { value: point.levelDba, decimals: 1, bound: point.atMost ? "upper" : undefined } },
              correction: { figure: { value: point.correctionDb, decimals: 1 } },
              rise: { figure: { value: point.deltaTK, decimals: 1 } },
              resistance: { figure: { value: point.resistanceKPerW, decimals: 3 } },
              difference: { figure: { value: point.levelDifferenceDb, decimals: 1, signed: true, why } },
              ratio: {
                figure: {
                  value: point.resistanceRatio === null ? null : 100 * (point.resistanceRatio - 1),
                  decimals: 1,
                  signed: true,
                  why,
                },
              },
            },
          };
        })}
      />
      <p className="small-print mt-2">
        Background corrected by the {protocol.backgroundGrade} grade; “≤” where the background was too near. Of one
        printed copy: copy-to-copy spread is not included.
      </p>
    </>
  );
}
