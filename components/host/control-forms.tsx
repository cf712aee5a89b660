"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import type { ActField } from "@/components/ui/act/act-values";
import { Select } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import { TickedButton, TickList, type Ticks } from "@/components/ui/tick-list";
import { useDocumentChange, useStartBenchSession } from "@/lib/client/host";
import type { BenchSetup } from "@/lib/contracts/bench-admin";
import type { BenchControl } from "@/lib/contracts/control";
import { formatDate } from "@/lib/format/dates";
import { kindWords } from "./control-parts";
import { HostForm } from "./host-form";

/** A change at the bench: from which session on, what kind, why. Holds of the charts that it explains are lifted by it. */
export function ChangeForm({ benchVersionId, sessions }: { benchVersionId: string } & Pick<BenchControl, "sessions">) {
  const closed = sessions.filter((session) => session.endedAt !== null);
  const work = useDocumentChange(benchVersionId);
  if (closed.length === 0) return <p>A change is documented from a closed session on; there is none yet.</p>;
  const fields: readonly ActField[] = [
    {
      name: "fromSessionId",
      label: "From which session on",
      kind: "choice",
      options: closed.map((session) => ({
        value: session.id,
        label: `Session ${session.number}, ${formatDate(session.beganAt)}, ${session.serial}${session.held > 0 ? " (held)" : ""}`,
      })),
    },
    {
      name: "kind",
      label: "What changed",
      kind: "choice",
      options: Object.entries(kindWords).map(([value, label]) => ({ value, label })),
    },
    { name: "reason", label: "What was done, and why", kind: "area", hint: "It stands on the charts for everybody." },
    { name: "allUnits", label: "It counts for every unit on this bench version", kind: "tick", defaultValue: "on" },
  ];
  return (
    <HostForm
      label="Document a change"
      fields={fields}
      work={work}
      words="Document the change"
      busyWords="Documenting …"
      doneWords="Documented: a new phase begins there, and sessions that it explains go on."
    />
  );
}

export type StartBenchSessionProps = {
  benchVersionId: string;
  setup: Pick<BenchSetup, "protocols" | "baselines">;
  budgets: BenchSetup["benches"][number]["versions"][number]["budgets"];
  checklist: BenchControl["checklist"];
};

/** Starts a session without a round, each caution ticked by itself. */
export function StartBenchSession({ benchVersionId, setup, budgets, checklist }: StartBenchSessionProps) {
  const router = useRouter();
  const start = useStartBenchSession(benchVersionId);
  const [purpose, setPurpose] = useState<"qualification" | "bridge">("qualification");
  const units = setup.baselines.flatMap((baseline) =>
    baseline.units
      .filter((unit) => unit.retiredAt === null)
      .map((unit) => ({ value: unit.id, label: `${baseline.name} ${unit.serial}` })),
  );
  const protocols = setup.protocols.flatMap((protocol) =>
    protocol.versions.map((version) => ({ value: version.id, label: `${protocol.name}, version ${version.number}` })),
  );
  const [unit, setUnit] = useState(units[0]?.value ?? "");
  const [other, setOther] = useState(units[1]?.value ?? "");
  const [protocol, setProtocol] = useState(protocols.at(-1)?.value ?? "");
  const [budget, setBudget] = useState(budgets.at(-1)?.id ?? "");
  const [ticked, setTicked] = useState<Ticks>({});
  if (units.length === 0 || protocols.length === 0 || budgets.length === 0)
    return (
      <p>It needs a baseline unit in service, a protocol and a budget first: add them under Benches and protocols.</p>
    );
  const error = (path: string) => start.error?.field(path);
  const press = () =>
    start.mutate(
      {
        purpose,
        baselineUnitId: unit,
        ...(purpose === "bridge" ? { bridgeUnitId: other } : {}),
        protocolVersionId: protocol,
        budgetVersionId: budget,
        checklist: ticked,
      },
      { onSuccess: ({ sessionId }) => router.push(`/bench/sessions/${sessionId}`) },
    );
  return (
    <form
      aria-label="Start a session without a round"
      className="grid max-w-3xl gap-4"
      onSubmit={(event) => {
        event.preventDefault();
        if (!start.isPending) press();
      }}
    >
      <div className="grid gap-4 sm:grid-cols-2">
        <Select
          label="For"
          value={purpose}
          onChange={(event) => setPurpose(event.currentTarget.value === "bridge" ? "bridge" : "qualification")}
          options={[
            { value: "qualification", label: "Qualification: ten remounts" },
            { value: "bridge", label: "A bridge between two units" },
          ]}
        />
        <Select
          label="Baseline unit"
          value={unit}
          onChange={(event) => setUnit(event.currentTarget.value)}
          options={units}
          error={error("baselineUnitId")}
        />
        {purpose === "bridge" ? (
          <Select
            label="The other unit"
            value={other}
            onChange={(event) => setOther(event.currentTarget.value)}
            options={units}
            error={error("bridgeUnitId")}
          />
        ) : null}
        <Select
          label="Protocol"
          value={protocol}
          onChange={(event) => setProtocol(event.currentTarget.value)}
          options={protocols}
          error={error("protocolVersionId")}
        />
        <Select
          label="Budget"
          value={budget}
          onChange={(event) => setBudget(event.currentTarget.value)}
          options={budgets.map((each) => ({ value: each.id, label: `Budget ${each.number}` }))}
          error={error("budgetVersionId")}
        />
      </div>
      <TickList
        title="tick each one when it is so"
        legend="Before the session starts"
        items={checklist}
        ticked={ticked}
        onTick={setTicked}
      />
      {start.error ? (
        <Notice kind="wrong" title="not started" live="alert">
          <p>{start.error.detail}</p>
        </Notice>
      ) : null}
      <TickedButton
        items={checklist}
        ticked={ticked}
        words="Start session"
        busy={start.isPending}
        busyWords="Starting …"
      />
    </form>
  );
}
