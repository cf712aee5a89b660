import Link from "next/link";
import { BarsTable } from "@/components/ui/bars/bars-table";
import type { BarsCell, BarsColumn, BarsRow } from "@/components/ui/bars/bars-model";
import { Section } from "@/components/ui/sheet";
import type { BaselineSession } from "@/lib/contracts/baselines";
import { formatDate } from "@/lib/format/dates";
import { formatNumber } from "@/lib/format/numbers";
import { levelUnit } from "@/lib/format/quantities";

/** So many of the newest on each bench version stand on the page unless all are asked for. */
const shownAtFirst = 12;

function columns(speeds: readonly number[], distanceMm: number): BarsColumn[] {
  return [
    { key: "session", head: "Session" },
    { key: "unit", head: "Unit", tone: "baseline" },
    { key: "round", head: "For" },
    ...speeds.flatMap((speed): BarsColumn[] => [
      { key: `level-${speed}`, head: `Level, ${formatNumber(speed)} rpm`, unit: levelUnit(distanceMm) },
      { key: `resistance-${speed}`, head: `ΔT/P, ${formatNumber(speed)} rpm`, unit: "K/W" },
    ]),
  ];
}

function sessionRow(each: BaselineSession): BarsRow {
  const figures = each.points.flatMap((point): [string, BarsCell][] => [
    [
      `level-${point.setSpeed}`,
      { figure: { value: point.levelDba.value, decimals: 1, bound: point.upperBound ? "upper" : undefined } },
    ],
    [`resistance-${point.setSpeed}`, { figure: { value: point.resistanceKpw.value, decimals: 3 } }],
  ]);
  return {
    key: String(each.session),
    cells: {
      session: { words: `${each.session}, ${formatDate(each.beganAt)}` },
      unit: { words: each.serial },
      round: {
        words: (
          <Link href={`/seasons/${each.season}/rounds/${each.round}`}>
            {each.seasonTitle}, round {each.round}
          </Link>
        ),
      },
      ...Object.fromEntries(figures),
    },
  };
}

export type SessionsSectionProps = { sessions: readonly BaselineSession[]; path: string; all: boolean };

/** What every published session read of the baseline: a table a bench version, a row a session, the newest first. */
export function SessionsSection({ sessions, path, all }: SessionsSectionProps) {
  const benches = [...new Set(sessions.map((each) => each.bench))];
  const cut = !all && benches.some((bench) => sessions.filter((each) => each.bench === bench).length > shownAtFirst);
  return (
    <Section id="sessions" title="What published sessions read of it">
      {sessions.length === 0 ? <p>No session with it has been published yet.</p> : null}
      {benches.map((bench) => {
        const here = sessions.filter((each) => each.bench === bench);
        const speeds = [...new Set(here.flatMap((each) => each.points.map((point) => point.setSpeed)))];
        const [first] = here;
        if (!first) return null;
        const shown = all ? here : here.slice(0, shownAtFirst);
        return (
          <div key={bench} className="mt-4">
            <h3 className="mb-1">{bench}</h3>
            <BarsTable
              caption={`Baseline readings on ${bench}, the newest of ${here.length} sessions first`}
              showCaption
              columns={columns(
                speeds.sort((a, b) => a - b),
                first.microphoneDistanceMm,
              )}
              rows={shown.map(sessionRow)}
            />
          </div>
        );
      })}
      {cut ? (
        <p className="mt-3">
          <Link href={`${path}?sessions=all#sessions`}>Show all {formatNumber(sessions.length)} sessions</Link>
        </p>
      ) : null}
    </Section>
  );
}
