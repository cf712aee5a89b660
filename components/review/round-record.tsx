import { Notice } from "@/components/ui/notice";
import type { ReviewRound } from "@/lib/contracts/review";
import { formatDateTime } from "@/lib/format/dates";

/** Sessions with their holds, earlier reviews, and what changed since the newest one. */
export function RoundRecord({ round }: { round: ReviewRound }) {
  const nameOf = (entryId: string | null) => {
    const entry = round.entries.find((each) => each.entryId === entryId);
    return entry ? `${entry.designName} ${entry.letter}` : entryId === null ? "Session" : "An entry taken out";
  };
  return (
    <div className="grid gap-6">
      <div>
        <h3>Sessions</h3>
        <ul className="mt-2 grid gap-1">
          {round.sessions.map((session) => (
            <li key={session.sessionId}>
              Session {session.number}, {formatDateTime(session.beganAt)}, operator{" "}
              {session.operator ?? "former member"}
              {session.endedAt === null ? ", still open at the bench" : ""}
              {session.holds.map((hold) => (
                <Notice
                  key={hold.raisedAt + hold.code}
                  kind={hold.liftNote === null ? "wrong" : "info"}
                  title={hold.code}
                >
                  <p>{hold.reason}</p>
                  <p>
                    {hold.liftNote === null ? "The hold stands: another person lifts it." : `Lifted: ${hold.liftNote}`}
                  </p>
                </Notice>
              ))}
            </li>
          ))}
        </ul>
      </div>
      {round.past.length > 0 ? (
        <div>
          <h3>Earlier reviews</h3>
          <ul className="mt-2 grid gap-2">
            {round.past.map((past) => (
              <li key={past.at}>
                {formatDateTime(past.at)}, {past.reviewer ?? "former member"}:{" "}
                {past.verdict === "signed" ? "signed" : "sent back"}. {past.note}
                <ul className="list-[square] pl-5">
                  {past.entries.map((entry) => (
                    <li key={entry.entryId}>
                      {nameOf(entry.entryId)}: {entry.reason}
                    </li>
                  ))}
                </ul>
              </li>
            ))}
          </ul>
        </div>
      ) : null}
      {round.past.length > 0 ? (
        <div>
          <h3>Changed since the last review</h3>
          {round.changes.length === 0 ? <p>Nothing.</p> : null}
          <ul className="mt-2 list-[square] pl-5">
            {round.changes.map((change, i) => (
              <li key={i}>
                {formatDateTime(change.at)}, {nameOf(change.entryId)}: {change.what}
              </li>
            ))}
          </ul>
        </div>
      ) : null}
    </div>
  );
}
