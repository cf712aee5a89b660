"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Facts } from "@/components/ui/facts";
import { Field } from "@/components/ui/field";
import { Fold } from "@/components/ui/fold";
import { useMoveEntry } from "@/lib/client/bench-prints";
import type { PrintJob } from "@/lib/contracts/bench-prints";
import { CopyForm } from "./copy-form";
import { CopyParts } from "./copy-parts";
import { Refusal } from "./refusal";

const masses = (job: PrintJob): string =>
  job.rotorMasses
    .map(({ position, blades, massG }) => `${position}: ${blades} blades${massG ? `, ${massG.toFixed(1)} g` : ""}`)
    .join("; ");

/** One entry's ticket: what to print and how, its copies with their balance and spin-up, and its next move. */
export function PrintTicket({ job }: { job: PrintJob }) {
  const name = `${job.name} ${job.letter}`;
  return (
    <article className="grid gap-3 border border-rule p-4" aria-label={`Job ticket ${name}`}>
      <h3>{name}</h3>
      <Facts
        facts={[
          { label: "For", value: `${job.seasonTitle}${job.round ? `, round ${job.round.number}` : ", no round yet"}` },
          { label: "Rotors", value: masses(job) || `${job.rotors}` },
          { label: "Material", value: job.material ?? "not declared" },
          { label: "Print time", value: job.printTimeMin ? `${Math.round(job.printTimeMin)} min` : "not declared" },
          { label: "Designer's notes", value: job.printNotes || "none" },
          { label: "Highest set speed", value: job.topSpeedRpm ? `${job.topSpeedRpm} rpm` : "set as drive in %" },
        ]}
      />
      {job.specimens.map((specimen, i) => (
        <CopyParts
          key={specimen.id}
          specimen={specimen}
          name={name}
          topSpeedRpm={job.topSpeedRpm}
          open={i === 0 && job.state === "printing"}
          writable={job.state === "printing"}
        />
      ))}
      {job.state === "printing" ? (
        <Fold title="Record a printed copy" open={job.specimens.length === 0}>
          <CopyForm job={job} name={name} />
        </Fold>
      ) : null}
      <TicketMoves job={job} name={name} />
    </article>
  );
}

function TicketMoves({ job, name }: { job: PrintJob; name: string }) {
  const [reason, setReason] = useState("");
  const move = useMoveEntry(job.entryId);
  const passed = job.specimens.some(({ parts }) => parts.length > 0 && parts.every((part) => part.state === "passed"));
  const given = { reason: reason.trim() || null };
  const clear = { onSuccess: () => setReason("") };
  return (
    <div className="grid gap-3">
      <div className="flex flex-wrap items-end gap-3">
        {job.state === "accepted" ? (
          <Button
            kind="solid"
            aria-label={`Start printing ${name}`}
            busy={move.isPending}
            onClick={() => move.mutate({ from: "accepted", to: "printing" })}
          >
            Start printing
          </Button>
        ) : null}
        {job.state === "printing" ? (
          <Button
            kind="solid"
            aria-label={`To the bench: ${name}`}
            busy={move.isPending}
            disabled={!passed}
            onClick={() => move.mutate({ from: "printing", to: "on_the_bench" })}
          >
            To the bench
          </Button>
        ) : null}
        {job.state !== "accepted" ? (
          <>
            <Field
              className="w-64"
              label="What became of the copy"
              value={reason}
              onChange={(event) => setReason(event.currentTarget.value)}
              error={move.error?.field("reason")}
            />
            <Button
              kind={job.state === "printing" ? "outline" : "danger"}
              aria-label={job.state === "printing" ? `Copy failed: ${name}` : `Write the copy off: ${name}`}
              busy={move.isPending}
              disabled={reason.trim() === ""}
              onClick={() =>
                move.mutate(
                  { from: job.state === "printing" ? "printing" : "on_the_bench", to: "printing", ...given },
                  clear,
                )
              }
            >
              {job.state === "printing" ? "Copy failed, print again" : "Write the copy off"}
            </Button>
          </>
        ) : null}
      </div>
      <Refusal error={move.error} fields={false} />
    </div>
  );
}
