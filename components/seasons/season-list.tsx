import Link from "next/link";
import { BarsTable } from "@/components/ui/bars/bars-table";
import type { SeasonLine } from "@/lib/contracts/seasons";
import { formatDate } from "@/lib/format/dates";
import { formatNumber } from "@/lib/format/numbers";
import { levelUnit } from "@/lib/format/quantities";
import { listWords } from "@/lib/format/words";

/** "running until 1 Jan 2027", "closed 1 Jul 2026". */
export function seasonState({ closedAt, closesAt }: SeasonLine): string {
  if (closedAt) return `closed ${formatDate(closedAt)}`;
  return closesAt ? `running until ${formatDate(closesAt)}` : "running";
}

/** "40, 46 and 52 dB(A) @ 100 mm, headline 46". */
export function levelsWords(season: Pick<SeasonLine, "levelsDba" | "headlineDba" | "microphoneDistanceMm">): string {
  const levels = listWords(season.levelsDba.map((level) => formatNumber(level)));
  return `${levels} ${seasonLevelUnit(season)}, headline ${formatNumber(season.headlineDba)}`;
}

/** The unit of a season's levels with their distance, where all its bench versions have the same. */
export function seasonLevelUnit({ microphoneDistanceMm }: Pick<SeasonLine, "microphoneDistanceMm">): string {
  return microphoneDistanceMm === null ? "dB(A) at each bench’s microphone" : levelUnit(microphoneDistanceMm);
}

/** Every season with its published rounds. */
export function SeasonList({ seasons }: { seasons: readonly SeasonLine[] }) {
  return (
    <BarsTable
      caption="Seasons, the newest first"
      phone="fold"
      columns={[
        { key: "season", head: "Season" },
        { key: "state", head: "State" },
        { key: "opened", head: "Opened" },
        { key: "entries", head: "Entries published" },
        { key: "levels", head: "Declared levels" },
        { key: "rounds", head: "Rounds published" },
      ]}
      rows={seasons.map((season) => ({
        key: season.slug,
        cells: {
          season: { words: <Link href={`/seasons/${season.slug}`}>{season.title}</Link> },
          state: { words: seasonState(season) },
          opened: {
            words: <span className="whitespace-nowrap">{season.opensAt ? formatDate(season.opensAt) : "–"}</span>,
          },
          entries: { figure: { value: season.entries, decimals: 0 } },
          levels: { words: levelsWords(season) },
          rounds: {
            words:
              season.rounds.length === 0 ? (
                "none yet"
              ) : (
                <span className="inline-flex flex-wrap gap-x-1.5">
                  {season.rounds.map((round) => (
                    <Link
                      key={round.number}
                      href={`/seasons/${season.slug}/rounds/${round.number}`}
                      className="inline-block min-h-6 min-w-6 text-center"
                    >
                      <span className="sr-only">{season.title}, round </span>
                      {round.number}
                    </Link>
                  ))}
                </span>
              ),
          },
        },
      }))}
    />
  );
}
