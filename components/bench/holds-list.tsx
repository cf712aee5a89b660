"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Field } from "@/components/ui/field";
import { useHoldSession, useLiftHold } from "@/lib/client/bench";
import type { BenchSession } from "@/lib/contracts/bench-session";
import { formatDateTime } from "@/lib/format/dates";
import { Refusal } from "./refusal";

type Hold = BenchSession["holds"][number];

/** What holds the session: why, what to do, and the lifting of it by another person. */
export function HoldsList({ session, ownId }: { session: BenchSession; ownId: string }) {
  const hold = useHoldSession(session.id);
  const [reason, setReason] = useState("");
  return (
    <div className="mt-6 grid gap-5">
      {session.holds.map((each) => (
        <HoldItem key={each.id} session={session} hold={each} ownId={ownId} />
      ))}
      <form
        className="flex flex-wrap items-end gap-3"
        onSubmit={(event) => {
          event.preventDefault();
          if (!hold.isPending) hold.mutate({ reason }, { onSuccess: () => setReason("") });
        }}
      >
        <Field
          className="w-80"
          label="Reason to hold the session"
          value={reason}
          onChange={(event) => setReason(event.currentTarget.value)}
          error={hold.error?.field("reason")}
        />
        <Button type="submit" busy={hold.isPending} disabled={reason.trim() === ""}>
          Hold session
        </Button>
        <Refusal error={hold.error} fields={false} />
      </form>
    </div>
  );
}

function HoldItem({ session, hold, ownId }: { session: BenchSession; hold: Hold; ownId: string }) {
  const lift = useLiftHold(session.id, hold.id);
  const [note, setNote] = useState("");
  const mayLift = session.operator.personId !== ownId && hold.raisedBy?.personId !== ownId;
  return (
    <div className="grid max-w-3xl gap-2 border-l-4 border-ribbon pl-4">
      <p>
        <strong>{hold.reason}</strong> <span className="docket">{formatDateTime(hold.raisedAt)}</span>
      </p>
      {hold.whatToDo ? <p>{hold.whatToDo}</p> : null}
      {hold.liftedAt ? (
        <p className="docket">
          Lifted by {hold.liftedBy?.handle ?? "an erased account"}, {formatDateTime(hold.liftedAt)}: {hold.liftNote}
        </p>
      ) : mayLift ? (
        <form
          className="flex flex-wrap items-end gap-3"
          onSubmit={(event) => {
            event.preventDefault();
            if (!lift.isPending) lift.mutate({ note });
          }}
        >
          <Field
            className="w-80"
            label="Note on lifting"
            value={note}
            onChange={(event) => setNote(event.currentTarget.value)}
            error={lift.error?.field("note")}
          />
          <Button type="submit" busy={lift.isPending} disabled={note.trim() === ""}>
            Lift hold
          </Button>
        </form>
      ) : (
        <p className="docket">Another person lifts it: not the session&apos;s operator, nor whoever raised it.</p>
      )}
      <Refusal error={lift.error} fields={false} />
    </div>
  );
}
