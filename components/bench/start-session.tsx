"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { Select } from "@/components/ui/field";
import { TickedButton, TickList, type Ticks } from "@/components/ui/tick-list";
import { useStartSession } from "@/lib/client/bench";
import type { BenchQueue, RoundSetup } from "@/lib/contracts/bench-prints";
import { Refusal } from "./refusal";

/** Round, bench and baseline, and each caution ticked by itself: then a session starts. */
export function StartSession({ rounds, checklist }: Pick<BenchQueue, "rounds" | "checklist">) {
  const router = useRouter();
  const [roundId, setRoundId] = useState(rounds[0]?.roundId ?? "");
  const [bench, setBench] = useState("");
  const [baseline, setBaseline] = useState("");
  const [ticked, setTicked] = useState<Ticks>({});
  const start = useStartSession();
  const round = rounds.find((each) => each.roundId === roundId) ?? rounds[0];
  if (!round) return <p>No round is planned or being measured: the host plans one first.</p>;
  const benchVersionId = known(
    bench,
    round.benches.map((each) => each.benchVersionId),
  );
  const baselineUnitId = known(
    baseline,
    round.baselines.map((each) => each.baselineUnitId),
  );
  const press = () =>
    start.mutate(
      { roundId: round.roundId, benchVersionId, baselineUnitId, checklist: ticked },
      { onSuccess: ({ sessionId }) => router.push(`/bench/sessions/${sessionId}`) },
    );
  return (
    <form
      className="grid max-w-3xl gap-4"
      onSubmit={(event) => {
        event.preventDefault();
        if (!start.isPending) press();
      }}
    >
      <div className="grid gap-4 sm:grid-cols-3">
        <Select
          label="Round"
          value={round.roundId}
          onChange={(event) => setRoundId(event.currentTarget.value)}
          options={rounds.map((each) => ({ value: each.roundId, label: roundWords(each) }))}
        />
        <Select
          label="Bench"
          value={benchVersionId}
          onChange={(event) => setBench(event.currentTarget.value)}
          options={round.benches.map((each) => ({
            value: each.benchVersionId,
            label: `${each.name}, version ${each.number}`,
          }))}
        />
        <Select
          label="Baseline"
          value={baselineUnitId}
          onChange={(event) => setBaseline(event.currentTarget.value)}
          options={round.baselines.map((each) => ({
            value: each.baselineUnitId,
            label: `${each.name} ${each.serial}`,
          }))}
        />
      </div>
      <TickList
        title="tick each one when it is so"
        legend="Before the session starts"
        items={checklist}
        ticked={ticked}
        onTick={setTicked}
      />
      <Refusal error={start.error} fields={start.error?.code !== "malformed"} />
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

const known = (chosen: string, ids: readonly string[]): string => (ids.includes(chosen) ? chosen : (ids[0] ?? ""));

const roundWords = ({ seasonTitle, roundNumber }: RoundSetup): string => `${seasonTitle}, round ${roundNumber}`;
