"use client";

import { useState, type FormEvent } from "react";
import type { ActField } from "@/components/ui/act/act-values";
import { Slot, SlotGroup } from "@/components/ui/slot";
import { useChangeSeason, useMakeSeason, useMoveSeason, usePlanRound } from "@/lib/client/host";
import type { BenchSetup } from "@/lib/contracts/bench-admin";
import type { HostSeason } from "@/lib/contracts/seasons-admin";
import { RULES } from "@/lib/domain/scoring/rules";
import { formatFrame } from "@/lib/format/frames";
import { HostForm } from "./host-form";
import { LevelsTry } from "./levels-try";

/** Levels as they are typed so far; empty while they can't be read. */
function typedLevels(text: string): number[] {
  const levels = text.split(/[;\s]+/).filter((part) => part !== "");
  const numbers = levels.map((part) => Number(part.replace(",", ".")));
  return numbers.every((level) => Number.isFinite(level) && level > 0) ? numbers : [];
}

function fieldsOf(setup: BenchSetup, season: HostSeason | undefined, nextNumber: number): ActField[] {
  const given = (value: string | number | null | undefined) => (value == null ? undefined : String(value));
  return [
    ...(season ? [] : [{ name: "number", label: "Number", kind: "number" as const, defaultValue: String(nextNumber) }]),
    { name: "title", label: "Title", defaultValue: season?.title ?? `Season ${nextNumber}` },
    { name: "summary", label: "Summary", kind: "area", optional: true, defaultValue: season?.summary },
    { name: "rules", label: "Rules for entries", kind: "area", optional: true, defaultValue: season?.rules },
    {
      name: "protocolVersionId",
      label: "Protocol version",
      kind: "choice",
      defaultValue: season?.protocolVersionId,
      options: setup.protocols.flatMap((protocol) =>
        protocol.versions.map((version) => ({
          value: version.id,
          label: `${protocol.name}, version ${version.number}`,
        })),
      ),
    },
    {
      name: "scoringRuleVersionId",
      label: "Scoring rule",
      kind: "choice",
      defaultValue: season?.scoringRuleVersionId,
      options: setup.rules.map((rule) => ({
        value: rule.id,
        label: `${RULES[rule.kind].label}, version ${rule.number}`,
      })),
    },
    {
      name: "levelsDba",
      label: "Declared levels",
      kind: "numbers",
      unit: "dB(A)",
      hint: "At the bench's microphone. Several, with blanks between.",
      defaultValue: season?.levelsDba.join(" "),
    },
    {
      name: "headlineDba",
      label: "Headline level",
      kind: "number",
      unit: "dB(A)",
      hint: "One of the declared levels.",
      defaultValue: given(season?.headlineDba),
    },
    {
      name: "benchVersionId",
      label: "Bench version",
      kind: "choice",
      defaultValue: given(season?.benchVersionId),
      options: setup.benches.flatMap((bench) =>
        bench.versions.map((version) => ({ value: version.id, label: `${bench.name}, version ${version.number}` })),
      ),
    },
    {
      name: "budgetVersionId",
      label: "Budget version",
      kind: "choice",
      defaultValue: given(season?.budgetVersionId),
      options: setup.benches.flatMap((bench) =>
        bench.versions.flatMap((version) =>
          version.budgets.map((budget) => ({
            value: budget.id,
            label: `${bench.name}, version ${version.number}, budget ${budget.number}`,
          })),
        ),
      ),
    },
    {
      name: "baselineUnitId",
      label: "Baseline unit",
      kind: "choice",
      defaultValue: given(season?.baselineUnitId),
      options: setup.baselines.flatMap((baseline) =>
        baseline.units
          .filter((unit) => unit.retiredAt === null || unit.id === season?.baselineUnitId)
          .map((unit) => ({ value: unit.id, label: `${baseline.name}, ${unit.serial}` })),
      ),
    },
    {
      name: "totalDepthMaxMm",
      label: "Depth at most",
      kind: "number",
      unit: "mm",
      optional: true,
      defaultValue: given(season?.totalDepthMaxMm),
    },
    {
      name: "inletStackMaxMm",
      label: "Inlet stack at most",
      kind: "number",
      unit: "mm",
      optional: true,
      defaultValue: given(season?.inletStackMaxMm),
    },
  ];
}

/** Makes a season, or changes one; what a choice of levels does to past entries stands beside it while it is typed. */
export function SeasonForm(props: { setup: BenchSetup; season?: HostSeason; nextNumber: number }) {
  const { setup, season, nextNumber } = props;
  const make = useMakeSeason();
  const change = useChangeSeason(season?.seasonId ?? "");
  const [levels, setLevels] = useState<number[]>(season?.levelsDba ?? []);
  const [frames, setFrames] = useState<readonly string[]>(season?.frameIds ?? []);
  const watch = (event: FormEvent<HTMLElement>) => {
    const { target } = event;
    if (target instanceof HTMLInputElement && target.name === "levelsDba") setLevels(typedLevels(target.value));
  };
  const tick = (id: string, on: boolean) => setFrames(on ? [...frames, id] : frames.filter((each) => each !== id));
  return (
    <div onInput={watch}>
      <HostForm
        label={season ? "Change the season" : "Make a season"}
        wide
        fields={fieldsOf(setup, season, nextNumber)}
        work={season ? change : make}
        more={{ frameIds: frames }}
        words={season ? "Change the season" : "Make the season"}
        busyWords="Keeping …"
        doneWords="Kept."
      >
        <SlotGroup legend="Frames">
          {setup.frames.map((frame) => (
            <Slot
              key={frame.id}
              label={`${formatFrame(frame.key)} mm`}
              checked={frames.includes(frame.id)}
              onChange={(event) => tick(frame.id, event.currentTarget.checked)}
            />
          ))}
        </SlotGroup>
        <LevelsTry levels={levels} />
      </HostForm>
    </div>
  );
}

export function MoveSeasonForm({ seasonId, to }: { seasonId: string; to: "opened" | "closed" }) {
  const words = to === "opened" ? "Open the season" : "Close the season";
  return (
    <HostForm label={words} fields={[]} work={useMoveSeason(seasonId)} more={{ to }} words={words} busyWords="…" />
  );
}

export function PlanRoundForm({ seasonId }: { seasonId: string }) {
  return (
    <HostForm
      label="Plan a round"
      fields={[{ name: "title", label: "Title of the round", optional: true }]}
      work={usePlanRound(seasonId)}
      words="Plan a round"
      busyWords="Planning …"
    />
  );
}
