import type { IndexAnswer, IndexQuery } from "@/lib/contracts/index-query";

export type ComparableNoteProps = {
  answer: IndexAnswer;
  /** As the address asks, before what can't be asked here was let go. */
  asked: IndexQuery;
};

const needsOneScale = ["equal", "loudness", "leveldba", "deltat"];

/** Says how far the figures of the list may stand side by side, and what of the question had to be let go for it. */
export function ComparableNote({ answer, asked }: ComparableNoteProps) {
  if (answer.total === 0) return null;
  if (answer.comparableOnly) {
    return (
      <p className="small-print mb-3 max-w-3xl">
        All were measured on one bench version, by one protocol, against one baseline unit: levels and ΔT stand side by
        side. Intervals are 95 % coverage for the one printed copy measured; copy-to-copy spread is not included.
      </p>
    );
  }
  const bounds = Object.keys(asked.ranges).some((range) => needsOneScale.includes(range));
  const order =
    asked.q === "" ? asked.sort !== "equal" && needsOneScale.includes(asked.sort) : needsOneScale.includes(asked.sort);
  const columns = asked.columns.some((column) => needsOneScale.includes(column));
  return (
    <p className="small-print mb-3 max-w-3xl">
      These come from more than one bench version, protocol or baseline unit. So no levels or ΔT in K stand here, but
      each entry’s ratio and difference to the baseline of its own session, at its own season’s headline level. Against
      different baseline units they hold only against their own.
      {bounds ? " The bounds in K or sone were let go for the same reason." : null}
      {order ? " The order asked for needs one scale too: ΔT/P orders the list instead." : null}
      {columns ? " Columns asked for in the address that need one scale are left out." : null} Choose a season to see
      levels and ΔT. Intervals are 95 % coverage for the one printed copy measured; copy-to-copy spread is not included.
    </p>
  );
}
