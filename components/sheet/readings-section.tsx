import { BarsTable } from "@/components/ui/bars/bars-table";
import type { BarsColumn, BarsRow } from "@/components/ui/bars/bars-model";
import { Section } from "@/components/ui/sheet";
import type { Sheet, SheetPoint } from "@/lib/contracts/sheet";
import { formatNumber } from "@/lib/format/numbers";
import { levelUnit } from "@/lib/format/quantities";
import { RawRunsFold } from "./raw-runs-fold";

const grades = {
  engineering: "engineering grade: from 6 dB above the background a level is corrected, nearer it is a bound",
  survey: "survey grade: from 3 dB above the background a level is corrected, nearer it is a bound",
} as const;

function columns(sheet: Sheet): BarsColumn[] {
  const level = levelUnit(sheet.bench.microphoneDistanceMm);
  const setUnit = sheet.protocol.setting === "rpm" ? "rpm" : "% drive";
  return [
    { key: "set", head: "Set speed", unit: setUnit },
    { key: "measured", head: "Measured", unit: "rpm" },
    { key: "read", head: "Level read", unit: level },
    { key: "background", head: "Background", unit: level },
    { key: "corrected", head: "Corrected", unit: level, tone: "strong" },
    { key: "deltaT", head: "ΔT", unit: "K", tone: "strong" },
    { key: "resistance", head: "ΔT/P", unit: "K/W" },
    { key: "dLevel", head: "Against baseline", unit: "dB", label: "Level against baseline" },
    { key: "dDeltaT", head: "Against baseline", unit: "K", label: "ΔT against baseline" },
    { key: "runs", head: "Runs" },
  ];
}

function row(sheet: Sheet, point: SheetPoint): BarsRow {
  const against = sheet.against.find((each) => each.setSpeed === point.setSpeed);
  const why = "the baseline did not run at this set speed";
  const baselineBound = sheet.baselinePoints.some((each) => each.setSpeed === point.setSpeed && each.upperBound);
  const bound = point.upperBound ? ("upper" as const) : undefined;
  const speeds = point.speedsRpm.map((speed) => formatNumber(speed)).join(" + ");
  return {
    key: String(point.setSpeed),
    cells: {
      set: { figure: { value: point.setSpeed, decimals: 0 } },
      measured:
        point.speedsRpm.length === 1
          ? { figure: { value: point.speedsRpm[0], decimals: 0 } }
          : { words: <span className="figures whitespace-nowrap">{speeds || "–"}</span> },
      read: { figure: { value: point.levelReadDba, decimals: 1 } },
      background: { figure: { value: point.backgroundDba, decimals: 1, why: "no background was read" } },
      corrected: {
        figure: { value: point.levelDba.value, uncertainty: point.levelDba.u95, decimals: 1, bound },
      },
      deltaT: { figure: { value: point.deltaTK.value, uncertainty: point.deltaTK.u95, decimals: 1 } },
      resistance: { figure: { value: point.resistanceKpw.value, decimals: 3 } },
      dLevel: {
        figure: {
          value: baselineBound ? undefined : against?.levelDifferenceDb.value,
          uncertainty: against?.levelDifferenceDb.u95,
          decimals: 1,
          signed: true,
          bound,
          why: baselineBound ? "the baseline’s level here is only an upper bound" : why,
        },
      },
      dDeltaT: {
        figure: {
          value: against?.deltaTDifferenceK.value,
          uncertainty: against?.deltaTDifferenceK.u95,
          decimals: 1,
          signed: true,
          why,
        },
      },
      runs: { figure: { value: point.runs, decimals: 0 } },
    },
  };
}

/** Every set speed with its figures; each opens to the raw readings of its runs. */
export function ReadingsSection({ sheet }: { sheet: Sheet }) {
  return (
    <Section id="readings" title="Readings by set speed" note={grades[sheet.protocol.backgroundGrade]}>
      <BarsTable
        caption="Readings by set speed, with 95 % coverage"
        columns={columns(sheet)}
        rows={sheet.points.map((point) => row(sheet, point))}
      />
      {sheet.points.some((point) => point.upperBound) ? (
        <p className="small-print mt-2">
          ≤ is an upper bound: the background was too near. It is kept, and can’t win by less than its correction.
        </p>
      ) : null}
      {sheet.notes.length > 0 ? (
        <ul className="small-print mt-2 list-[square] pl-5">
          {sheet.notes.map((each) => (
            <li key={each.code}>{each.message}</li>
          ))}
        </ul>
      ) : null}
      {sheet.leftOutRuns.length > 0 ? (
        <ul className="small-print mt-2 list-[square] pl-5">
          {sheet.leftOutRuns.map((each) => (
            <li key={each.runId}>A run was left out: {each.why}</li>
          ))}
        </ul>
      ) : null}
      <h3 className="mt-6 mb-2">Behind each line: its raw runs</h3>
      {sheet.points.map((point) => (
        <RawRunsFold
          key={point.setSpeed}
          slug={sheet.slug}
          entryId={sheet.entryId}
          setSpeed={point.setSpeed}
          unit={sheet.protocol.setting === "rpm" ? "rpm" : "% drive"}
          runs={point.runs}
        />
      ))}
      <RawRunsFold slug={sheet.slug} entryId={sheet.entryId} setSpeed={null} unit="" runs={0} />
    </Section>
  );
}
