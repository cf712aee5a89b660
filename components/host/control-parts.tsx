import Link from "next/link";
import { BarsTable } from "@/components/ui/bars/bars-table";
import type { BenchControl } from "@/lib/contracts/control";
import { formatDate } from "@/lib/format/dates";

export const kindWords = {
  service: "Service at the bench (paste, fins, clip, sensor)",
  unit: "Baseline unit repaired or replaced",
  bench: "Something of the bench changed",
  other: "Something else",
} as const;

const purposes = { round: "a round", qualification: "qualification", bridge: "a bridge" } as const;

/** Documented changes, the newest first. */
export function ChangeList({ changes }: Pick<BenchControl, "changes">) {
  if (changes.length === 0) return <p className="mt-6">No change was documented on this bench version.</p>;
  return (
    <ul className="mt-6 grid max-w-3xl list-[square] gap-2 pl-5">
      {changes.map((change) => (
        <li key={`${change.from} ${change.reason}`}>
          From {formatDate(change.from)}, {change.serial ? `unit ${change.serial}` : "every unit"}: {change.reason}{" "}
          <span className="docket">
            {kindWords[change.kind].toLowerCase()}, by {change.by ?? "an erased account"}
          </span>
        </li>
      ))}
    </ul>
  );
}

/** Sessions on this bench version with what holds them. */
export function SessionList({ sessions }: Pick<BenchControl, "sessions">) {
  if (sessions.length === 0) return <p>No session ran on this bench version yet.</p>;
  return (
    <BarsTable
      caption="Sessions on this bench version"
      columns={[
        { key: "session", head: "Session" },
        { key: "began", head: "Began" },
        { key: "unit", head: "Unit", tone: "baseline" },
        { key: "purpose", head: "For" },
        { key: "state", head: "State" },
      ]}
      rows={sessions.map((session) => ({
        key: session.id,
        tone: session.held > 0 ? ("wrong" as const) : undefined,
        cells: {
          session: { words: <Link href={`/bench/sessions/${session.id}`}>Session {session.number}</Link> },
          began: { words: formatDate(session.beganAt) },
          unit: { words: session.serial },
          purpose: { words: purposes[session.purpose] },
          state: {
            words:
              session.endedAt === null
                ? "open"
                : session.held > 0
                  ? `held: ${session.held} to lift`
                  : session.out
                    ? "closed; was out of control"
                    : "closed",
          },
        },
      }))}
    />
  );
}
