"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Select, TextArea } from "@/components/ui/field";
import { useAddRun } from "@/lib/client/bench";
import { readPastedBlock } from "@/lib/client/bench-paste";
import { ApiError } from "@/lib/client/fetcher";
import type { BenchSession, BenchSubject } from "@/lib/contracts/bench-session";
import { RefusedRows } from "./log-report";
import { useDraft } from "./use-draft";

const keyOf = ({ entryId, baselineUnitId }: BenchSubject): string => entryId ?? baselineUnitId ?? "";

/** Several runs at once from a spreadsheet: a row a run. What can't be kept stays in the field, with its reason. */
export function PasteForm({ session }: { session: BenchSession }) {
  const subjects = session.subjects.filter((subject) => subject.closed === null);
  const positions = session.positions.filter((position) => position.used);
  const { draft, type, clear } = useDraft(`bench paste ${session.id}`);
  const [chosen, setChosen] = useState("");
  const subject = subjects.find((each) => keyOf(each) === chosen) ?? subjects[0];
  const [positionId, setPositionId] = useState(positions[0]?.id ?? "");
  const [refused, setRefused] = useState<{ line: number; reason: string }[]>([]);
  const [kept, setKept] = useState<number>();
  const add = useAddRun(session.id);
  const text = draft.block ?? "";
  const block = readPastedBlock(text, positionId, session.protocol.setSpeeds);

  const keep = async () => {
    const failed = [...block.refused];
    let done = 0;
    for (const { line, ...run } of block.runs) {
      try {
        await add.mutateAsync({
          entryId: subject?.entryId ?? null,
          baselineUnitId: subject?.baselineUnitId,
          ...run,
        });
        done += 1;
      } catch (error) {
        const { detail, fields } = error instanceof ApiError ? error : { detail: "not kept", fields: [] };
        failed.push({ line, reason: [detail, ...fields.map((field) => field.message)].join(" ") });
      }
    }
    const lines = text.split(/\r\n|\n|\r/);
    setKept(done);
    setRefused(failed.sort((a, b) => a.line - b.line));
    if (failed.length === 0) clear();
    else
      type(
        "block",
        lines
          .filter(
            (_, i) => !block.runs.some((run) => run.line === i + 1 && !failed.some((each) => each.line === i + 1)),
          )
          .join("\n"),
      );
  };

  return (
    <form
      className="grid max-w-3xl gap-3"
      onSubmit={(event) => {
        event.preventDefault();
        if (!add.isPending && block.runs.length > 0) void keep();
      }}
    >
      <div className="flex flex-wrap gap-4">
        <Select
          label="Runs of"
          value={subject ? keyOf(subject) : ""}
          onChange={(event) => setChosen(event.currentTarget.value)}
          options={subjects.map((each) => ({ value: keyOf(each), label: each.name }))}
        />
        {positions.length > 1 ? (
          <Select
            label="Level read"
            value={positionId}
            onChange={(event) => setPositionId(event.currentTarget.value)}
            options={positions.map((position) => ({ value: position.id, label: position.name }))}
          />
        ) : null}
      </div>
      <TextArea
        label="Block of cells"
        rows={5}
        hint="A row a run: set speed, mount, level, sensor, ambient, power. A first row of names may change the order."
        value={text}
        onChange={(event) => type("block", event.currentTarget.value)}
      />
      <p className="flex flex-wrap items-center gap-3">
        <Button type="submit" busy={add.isPending} busyWords="Adding …" disabled={block.runs.length === 0}>
          {block.runs.length === 1 ? "Add 1 pasted run" : `Add ${block.runs.length} pasted runs`}
        </Button>
        <span className="docket" role="status">
          {block.refused.length > 0 ? `${block.refused.length} rows can't be read. ` : ""}
          {kept === undefined ? "" : `${kept} runs added; open each one to say that it is done.`}
        </span>
      </p>
      {text !== "" && block.refused.length > 0 ? (
        <RefusedRows refused={block.refused} count={block.refused.length} open />
      ) : refused.length > 0 ? (
        <RefusedRows refused={refused} count={refused.length} open />
      ) : null}
    </form>
  );
}
