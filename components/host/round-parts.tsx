import { BarsTable } from "@/components/ui/bars/bars-table";
import { Fold } from "@/components/ui/fold";
import type { HostRound } from "@/lib/contracts/seasons-admin";
import { formatDateTime } from "@/lib/format/dates";
import { EntryMoves } from "./entry-move-form";
import { TakeOutForm } from "./round-forms";

/** Entries with their states, and what the host may do with each. */
export function RoundEntries({ round }: { round: HostRound }) {
  if (round.entries.length === 0) return <p>None yet.</p>;
  return (
    <>
      <BarsTable
        caption="Entries of the round"
        phone="fold"
        columns={[
          { key: "entry", head: "Entry" },
          { key: "state", head: "State" },
          { key: "acts", head: "What to do" },
        ]}
        rows={round.entries.map((entry) => {
          const name = `${entry.designName} ${entry.letter}`;
          return {
            key: entry.entryId,
            cells: {
              entry: { words: `${name}, by ${entry.owners.join(", ")}` },
              state: { words: entry.state.replaceAll("_", " ") },
              acts: {
                words: (
                  <div className="grid gap-1">
                    {round.state === "published" ? null : (
                      <Fold title="Take out …">
                        <TakeOutForm roundId={round.roundId} entryId={entry.entryId} name={name} />
                      </Fold>
                    )}
                    <EntryMoves
                      key={entry.state}
                      entry={{ ...entry, moves: entry.moves.filter((to) => to !== "carried_over") }}
                      seasons={[]}
                    />
                  </div>
                ),
              },
            },
          };
        })}
      />
      {round.takenOut.length > 0 ? (
        <ul className="mt-4 list-[square] pl-5">
          {round.takenOut.map((each) => (
            <li key={each.entryId + each.at}>
              {each.name}, taken out {formatDateTime(each.at)}: {each.reason}
            </li>
          ))}
        </ul>
      ) : null}
    </>
  );
}

export function RoundMoves({ round }: { round: HostRound }) {
  if (round.moves.length === 0) return <p>It is planned, nothing more yet.</p>;
  return (
    <ol className="list-[square] space-y-1 pl-5">
      {round.moves.map((move) => (
        <li key={move.at + move.to}>
          {formatDateTime(move.at)}: {move.from.replaceAll("_", " ")} to {move.to.replaceAll("_", " ")}
          {move.by === null ? "" : `, by ${move.by}`}
          {move.reason === null ? "" : `. ${move.reason}`}
        </li>
      ))}
    </ol>
  );
}
