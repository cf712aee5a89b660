"use client";

import { Button } from "@/components/ui/button";
import { useMoveEntry, useRoundToReview } from "@/lib/client/bench-prints";
import type { RoundSetup } from "@/lib/contracts/bench-prints";
import { Refusal } from "./refusal";

/** Hands one entry over; what it still lacks is said by the answer. */
export function EntryToReview({ entryId, name }: { entryId: string; name: string }) {
  const move = useMoveEntry(entryId);
  return (
    <div className="grid max-w-2xl justify-items-start gap-2">
      <Button
        small
        aria-label={`To review: ${name}`}
        busy={move.isPending}
        busyWords="Trying its gates …"
        onClick={() => move.mutate({ from: "on_the_bench", to: "in_review" })}
      >
        To review
      </Button>
      <Refusal error={move.error} />
    </div>
  );
}

/** Hands a round over once each of its entries is in review. */
export function RoundToReview({ round }: { round: RoundSetup }) {
  const toReview = useRoundToReview(round.roundId);
  const name = `${round.seasonTitle}, round ${round.roundNumber}`;
  return (
    <div className="grid max-w-2xl justify-items-start gap-2">
      <p>
        <strong>{name}</strong>{" "}
        <span className="docket">{round.roundState === "planned" ? "planned" : "being measured"}</span>
      </p>
      {round.ready ? (
        <Button
          kind="solid"
          aria-label={`Round to review: ${name}`}
          busy={toReview.isPending}
          onClick={() => toReview.mutate(undefined)}
        >
          Round to review
        </Button>
      ) : (
        <p className="docket">It goes to review once each of its entries is there.</p>
      )}
      <Refusal error={toReview.error} />
    </div>
  );
}
