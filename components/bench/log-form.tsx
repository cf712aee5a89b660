"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Select } from "@/components/ui/field";
import { Slot, SlotGroup } from "@/components/ui/slot";
import { useSendLog } from "@/lib/client/bench";
import type { LogAnswer } from "@/lib/contracts/bench-logs";
import type { BenchRunView, BenchSession } from "@/lib/contracts/bench-session";
import { LogReport } from "./log-report";
import { Refusal } from "./refusal";

type Kind = "temperature" | "level";

/** A CSV log for a run: read first, its columns confirmed, then kept as received. */
export function LogForm({ session, run }: { session: BenchSession; run: BenchRunView }) {
  const [file, setFile] = useState<File>();
  const [kind, setKind] = useState<Kind>("temperature");
  const [columns, setColumns] = useState<Record<string, string>>({});
  const [positionId, setPositionId] = useState(session.positions[0]?.id ?? "");
  const [answer, setAnswer] = useState<LogAnswer>();
  const sendLog = useSendLog(session.id);

  const press = (commit: "no" | "yes", chosen: Record<string, string>) => {
    if (!file || sendLog.isPending) return;
    const confirmed = kind === "level" ? { level: chosen.level } : { sensor: chosen.sensor, ambient: chosen.ambient };
    const place = kind === "level" && commit === "yes" ? { positionId } : {};
    const query = { runId: run.id, kind, name: file.name, commit, version: run.version, ...confirmed, ...place };
    sendLog.mutate({ file, query }, { onSuccess: (given) => take(given) });
  };
  const take = (given: LogAnswer) => {
    setAnswer(given);
    const { sensor, ambient, level } = given.chosen;
    setColumns({ ...(sensor && { sensor }), ...(ambient && { ambient }), ...(level && { level }) });
  };
  const again = () => {
    setAnswer(undefined);
    setColumns({});
    sendLog.reset();
  };
  const choose = (role: string, name: string) => {
    const chosen = { ...columns, [role]: name };
    setColumns(chosen);
    press("no", chosen);
  };
  const roles = kind === "level" ? ["level"] : ["sensor", "ambient"];
  const kept = answer?.logFileId != null;
  return (
    <div className="grid gap-4">
      <div className="flex flex-wrap items-end gap-x-6 gap-y-3">
        <label className="grid gap-1">
          <span className="field-label">CSV log</span>
          <input
            type="file"
            accept=".csv,.txt,.tsv,.log,text/csv"
            onChange={(event) => {
              setFile(event.currentTarget.files?.[0]);
              again();
            }}
          />
        </label>
        <SlotGroup legend="The log holds">
          {(["temperature", "level"] as const).map((each) => (
            <Slot
              key={each}
              type="radio"
              name={`kind ${run.id}`}
              label={each === "temperature" ? "Temperature over time" : "Level over time"}
              checked={kind === each}
              onChange={() => {
                setKind(each);
                again();
              }}
            />
          ))}
        </SlotGroup>
        <Button busy={sendLog.isPending} busyWords="Reading …" disabled={!file} onClick={() => press("no", {})}>
          Read the log
        </Button>
      </div>
      <Refusal error={sendLog.error} />
      {answer && !kept ? (
        <div className="flex flex-wrap items-end gap-4">
          {roles.map((role) => (
            <Select
              key={role}
              label={`${role.charAt(0).toUpperCase()}${role.slice(1)} column`}
              value={columns[role] ?? ""}
              onChange={(event) => choose(role, event.currentTarget.value)}
              options={[
                { value: "", label: "not recognised: choose", disabled: true },
                ...answer.columns.map((column) => ({
                  value: column.name,
                  label: column.unit ? `${column.name} [${column.unit}]` : column.name,
                })),
              ]}
            />
          ))}
          {kind === "level" ? (
            <Select
              label="Position of the log"
              value={positionId}
              onChange={(event) => setPositionId(event.currentTarget.value)}
              options={session.positions.map((position) => ({ value: position.id, label: position.name }))}
            />
          ) : null}
          <Button
            kind="solid"
            busy={sendLog.isPending}
            busyWords="Keeping …"
            disabled={roles.some((role) => !columns[role])}
            onClick={() => press("yes", columns)}
          >
            Columns are right: keep the log
          </Button>
        </div>
      ) : null}
      {answer ? <LogReport answer={answer} kind={kind} /> : null}
    </div>
  );
}
