"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { TextArea } from "@/components/ui/field";
import { RefusedRows } from "./log-report";
import { useEditSession } from "@/lib/client/bench";
import type { BenchSession } from "@/lib/contracts/bench-session";
import { Refusal } from "./refusal";

/** The session's note; another operator's change in between is shown beside the typing, which stays. */
export function SessionNote({ session }: { session: BenchSession }) {
  const edit = useEditSession(session.id);
  const [text, setText] = useState(session.note);
  const [base, setBase] = useState({ version: session.version, note: session.note });
  const other = session.version !== base.version && session.note !== text;
  const keep = (version: number) =>
    edit.mutate({ version, note: text }, { onSuccess: (saved) => setBase({ version: saved.version, note: text }) });
  return (
    <div className="grid content-start gap-3">
      <h3>Note and logs</h3>
      {session.endedAt === null ? (
        <>
          <TextArea label="Note on the session" value={text} onChange={(event) => setText(event.currentTarget.value)} />
          {other ? (
            <div className="border-l-4 border-ribbon pl-3">
              <p>Somebody else wrote in between:</p>
              <p className="whitespace-pre-wrap">“{session.note}”</p>
              <Button small onClick={() => keep(session.version)}>
                Keep mine instead
              </Button>
            </div>
          ) : null}
          <p>
            <Button busy={edit.isPending} disabled={text === base.note} onClick={() => keep(base.version)}>
              Keep note
            </Button>
          </p>
          <Refusal error={edit.error} />
        </>
      ) : (
        <p className="whitespace-pre-wrap">{session.note || "No note."}</p>
      )}
      {session.logs.map((log) => {
        const ordinal = session.runs.find((run) => run.id === log.runId)?.ordinal;
        return (
          <div key={log.id}>
            <p>
              {log.name}{" "}
              <span className="docket">
                ({log.kind}
                {ordinal === undefined ? "" : `, run ${ordinal}`}): {log.rowsRead}{" "}
                {log.kind === "recording" ? "samples" : "rows"}
              </span>
            </p>
            {log.refusedCount > 0 ? <RefusedRows refused={log.refused} count={log.refusedCount} /> : null}
          </div>
        );
      })}
    </div>
  );
}
