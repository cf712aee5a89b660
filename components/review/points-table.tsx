import { BarsTable } from "@/components/ui/bars/bars-table";
import type { Snapshot } from "@/lib/contracts/publication";
import { measuredCell, notReachedWords } from "./figures-table";

/** Figures by set speed, the baseline's below, and against the baseline at each declared level. */
export function PointsTable({ snapshot }: { snapshot: Snapshot }) {
  const row = (point: Snapshot["points"][number], who: "entry" | "baseline") => ({
    key: `${who} ${point.setSpeed}`,
    ...(who === "baseline" && { tone: "baseline" as const }),
    cells: {
      who: { words: `${point.setSpeed}${who === "baseline" ? ", baseline" : ""}` },
      rpm: { words: point.speedsRpm.map((rpm) => Math.round(rpm)).join(" / ") },
      level: measuredCell(point.level, point.level.upperBound ? { bound: "upper" } : {}),
      read: { figure: { value: point.levelReadDba, decimals: 2 } },
      background: { figure: { value: point.backgroundDba, decimals: 1, why: "no background was read" } },
      deltaT: measuredCell(point.deltaT),
      resistance: measuredCell(point.resistance, { decimals: 4 }),
      runs: { words: <span className="whitespace-nowrap">{`${point.runs} in ${point.mounts} mounts`}</span> },
    },
  });
  return (
    <div className="grid gap-6">
      <BarsTable
        caption="Figures by set speed"
        showCaption
        columns={[
          { key: "who", head: "Set speed" },
          { key: "rpm", head: "Measured", unit: "rpm" },
          { key: "level", head: "Level", unit: `dB(A) @ ${snapshot.microphoneDistanceMm} mm` },
          { key: "read", head: "As read", unit: `dB(A) @ ${snapshot.microphoneDistanceMm} mm` },
          { key: "background", head: "Background", unit: `dB(A) @ ${snapshot.microphoneDistanceMm} mm` },
          { key: "deltaT", head: "ΔT", unit: "K" },
          { key: "resistance", head: "ΔT/P", unit: "K/W" },
          { key: "runs", head: "Runs" },
        ]}
        rows={[
          ...snapshot.points.map((point) => row(point, "entry")),
          ...snapshot.baselinePoints.map((point) => row(point, "baseline")),
        ]}
      />
      <BarsTable
        caption="Against the baseline at the declared levels"
        showCaption
        columns={[
          { key: "level", head: "Level", unit: `dB(A) @ ${snapshot.microphoneDistanceMm} mm` },
          { key: "ratio", head: "ΔT/P over the baseline's" },
          { key: "difference", head: "ΔT against baseline", unit: "K" },
        ]}
        rows={snapshot.equalNoise.map((reading) => {
          const none = { figure: { value: null, why: "why" in reading ? notReachedWords[reading.why] : undefined } };
          return {
            key: String(reading.levelDba),
            cells: {
              level: { words: `${reading.levelDba}${reading.levelDba === snapshot.headlineDba ? ", headline" : ""}` },
              ratio: "ratio" in reading ? measuredCell(reading.ratio, { decimals: 4 }) : none,
              difference: "difference" in reading ? measuredCell(reading.difference, { signed: true }) : none,
            },
          };
        })}
      />
      {snapshot.notes.length > 0 ? (
        <ul className="list-[square] pl-5">
          {snapshot.notes.map((note) => (
            <li key={note.code}>{note.message}</li>
          ))}
        </ul>
      ) : null}
    </div>
  );
}
