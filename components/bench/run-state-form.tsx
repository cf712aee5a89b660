"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Field } from "@/components/ui/field";
import { useRunState } from "@/lib/client/bench";
import type { BenchRunView } from "@/lib/contracts/bench-session";
import { Refusal } from "./refusal";

/** Says that a run is done; or held or discarded, with a reason; or open again. */
export function RunStateForm({ run }: { run: BenchRunView }) {
  const [reason, setReason] = useState("");
  const change = useRunState();
  const to = (state: BenchRunView["state"]) =>
    change.mutate(
      { runId: run.id, version: run.version, state, reason: reason.trim() || null },
      { onSuccess: () => setReason("") },
    );
  return (
    <div className="grid gap-3">
      <p className="flex flex-wrap gap-3">
        {run.state === "open" ? (
          <Button kind="solid" busy={change.isPending} disabled={run.lacks.length > 0} onClick={() => to("done")}>
            Run is done
          </Button>
        ) : null}
        {run.state === "done" || run.state === "held" ? (
          <Button busy={change.isPending} onClick={() => to("open")}>
            Open the run again
          </Button>
        ) : null}
      </p>
      <div className="flex flex-wrap items-end gap-3">
        <Field
          className="w-72"
          label="Reason to hold or discard"
          value={reason}
          onChange={(event) => setReason(event.currentTarget.value)}
          error={change.error?.field("reason")}
        />
        {run.state === "held" ? null : (
          <Button busy={change.isPending} disabled={reason.trim() === ""} onClick={() => to("held")}>
            Hold run
          </Button>
        )}
        <Button kind="danger" busy={change.isPending} disabled={reason.trim() === ""} onClick={() => to("discarded")}>
          Discard run
        </Button>
      </div>
      <Refusal error={change.error} fields={false} />
    </div>
  );
}
