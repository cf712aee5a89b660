"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { useEndSession } from "@/lib/client/bench";
import type { BenchSession } from "@/lib/contracts/bench-session";
import { Refusal } from "./refusal";

/** What would hold the session if it ended now, and its end. A closed session takes no more readings. */
export function EndSession({ session }: { session: BenchSession }) {
  const end = useEndSession(session.id);
  const [asking, setAsking] = useState(false);
  if (session.endedAt !== null) {
    return session.holds.length === 0 ? (
      <p>Nothing was found: calibrator, background, ambient and baseline are in.</p>
    ) : null;
  }
  const missing = session.subjects.reduce((sum, each) => sum + each.missing.reduce((n, { runs }) => n + runs, 0), 0);
  const open = session.runs.filter((run) => run.state === "open").length;
  return (
    <div className="grid max-w-3xl justify-items-start gap-3">
      {session.gates.length > 0 ? (
        <>
          <p>If it ended now, it would be held:</p>
          <Gates session={session} />
        </>
      ) : (
        <p>As it stands, nothing would hold it.</p>
      )}
      <Button kind="solid" onClick={() => setAsking(true)}>
        End session
      </Button>
      <Refusal error={end.error} />
      <Dialog
        open={asking}
        onClose={() => setAsking(false)}
        title="End this session?"
        closeWords="Go on measuring"
        actions={
          <Button
            kind="solid"
            busy={end.isPending}
            busyWords="Ending …"
            onClick={() => end.mutate(undefined, { onSettled: () => setAsking(false) })}
          >
            End it now
          </Button>
        }
      >
        <p>It takes no more readings then. Switch the heater off and let the cooler cool.</p>
        {missing + open > 0 ? (
          <p className="mt-2 font-bold">
            {missing} runs are missing{open > 0 ? ` and ${open} are open` : ""}.
          </p>
        ) : null}
        <Gates session={session} />
      </Dialog>
    </div>
  );
}

function Gates({ session }: { session: BenchSession }) {
  if (session.gates.length === 0) return null;
  return (
    <ul className="mt-2 list-[square] space-y-1 pl-5">
      {session.gates.map((gate) => (
        <li key={gate.reason}>{gate.reason}</li>
      ))}
    </ul>
  );
}
