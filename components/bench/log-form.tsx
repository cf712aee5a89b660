"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Select } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import { Progress } from "@/components/ui/progress";
import { Slot, SlotGroup } from "@/components/ui/slot";
import { useSendLog } from "@/lib/client/bench";
import type { FoundLog } from "@/lib/client/bench-reader/messages";
import { useBenchReader } from "@/lib/client/bench-reader/use-bench-reader";
import type { LogAnswer } from "@/lib/contracts/bench-logs";
import type { BenchRunView, BenchSession } from "@/lib/contracts/bench-session";
import { LogReport } from "./log-report";
import { Refusal } from "./refusal";

type Kind = "temperature" | "level";

const megabytes = (bytes: number): string => `${(bytes / 1_000_000).toFixed(1)} MB`;
type Columns = Readonly<Partial<Record<"sensor" | "ambient" | "level", string>>>;

/** A CSV log for a run: read in this browser first, its columns confirmed, then sent and kept as received. */
export function LogForm({ session, run }: { session: BenchSession; run: BenchRunView }) {
  const [file, setFile] = useState<File>();
  const [kind, setKind] = useState<Kind>("temperature");
  /** What was chosen here; what was recognised stands beside it in the preview. */
  const [chosen, setChosen] = useState<Columns>({});
  const [positionId, setPositionId] = useState(session.positions[0]?.id ?? "");
  const [kept, setKept] = useState<LogAnswer>();
  const reader = useBenchReader("log");
  const sendLog = useSendLog(session.id);
  const { state } = reader;

  const read = (choice: Columns) => {
    if (!file) return;
    setKept(undefined);
    const { epsilonK, ambientDriftMaxK, levelAverageS } = session.protocol;
    reader.read(file, { kind, choice: choiceOf(kind, choice), epsilonK, ambientDriftMaxK, levelAverageS });
  };
  const keep = () => {
    if (!file || sendLog.isPending) return;
    const place = kind === "level" ? { positionId } : {};
    const { version, id: runId } = run;
    const query = { runId, kind, name: file.name, commit: "yes", version, ...choiceOf(kind, columns), ...place };
    sendLog.mutate(
      { file, query },
      {
        onSuccess: (answer) => {
          setKept(answer);
          reader.clear();
        },
      },
    );
  };
  const again = () => {
    setKept(undefined);
    setSeen(undefined);
    setChosen({});
    reader.clear();
    sendLog.reset();
  };
  const choose = (role: keyof Columns, name: string) => {
    const next = { ...columns, [role]: name };
    setChosen(next);
    read(next);
  };
  const [seen, setSeen] = useState<FoundLog>();
  const now = state.step === "found" ? state.found.found : undefined;
  if (now && now !== seen) setSeen(now);
  // While it is read again with other columns, what was found before stays on screen.
  const found = now ?? (state.step === "reading" ? seen : undefined);
  const columns: Columns = { ...(found && recognised(found.chosen)), ...chosen };
  const answer = kept ?? (found && { ...found, logFileId: null, readingIds: [] });
  const roles: readonly (keyof Columns)[] = kind === "level" ? ["level"] : ["sensor", "ambient"];
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
        <Button busy={state.step === "reading"} busyWords="Reading …" disabled={!file} onClick={() => read({})}>
          Read the log
        </Button>
      </div>
      {state.step === "reading" ? (
        <Progress
          label="Reading in this browser"
          done={state.done}
          of={state.of}
          words={`${megabytes(state.done)} of ${megabytes(state.of)} read`}
          onCancel={reader.clear}
        />
      ) : null}
      {state.step === "refused" ? (
        <Notice kind="wrong" title="this log can’t be read" live="alert">
          <p>
            {state.refused.message}
            {state.refused.at ? ` (at ${state.refused.at})` : ""}. Nothing was sent.
          </p>
        </Notice>
      ) : null}
      <Refusal error={sendLog.error} />
      {found ? (
        <div className="flex flex-wrap items-end gap-4">
          {roles.map((role) => (
            <Select
              key={role}
              label={`${role.charAt(0).toUpperCase()}${role.slice(1)} column`}
              value={columns[role] ?? ""}
              onChange={(event) => choose(role, event.currentTarget.value)}
              options={[
                { value: "", label: "not recognised: choose", disabled: true },
                ...found.columns.map((column) => ({
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
            onClick={keep}
          >
            Columns are right: keep the log
          </Button>
        </div>
      ) : null}
      {answer ? <LogReport answer={answer} kind={kind} /> : null}
    </div>
  );
}

const choiceOf = (kind: Kind, { sensor, ambient, level }: Columns): Columns =>
  kind === "level" ? { ...(level && { level }) } : { ...(sensor && { sensor }), ...(ambient && { ambient }) };

const recognised = ({ sensor, ambient, level }: LogAnswer["chosen"]): Columns => ({
  ...(sensor && { sensor }),
  ...(ambient && { ambient }),
  ...(level && { level }),
});
