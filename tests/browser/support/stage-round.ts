import { randomBytes } from "node:crypto";
import { signInAs, type Session } from "../../setup/session";

export interface StagedEntry {
  entryId: string;
  name: string;
  slug: string;
}

export interface StagedRound {
  seasonSlug: string;
  seasonTitle: string;
  roundId: string;
  benchName: string;
  entries: [StagedEntry, StagedEntry];
}

const spinUpCautions = { guard: true, eyes: true, plane: true, steps: true, vibration: true };

async function ask<T>(session: Session, method: string, path: string, body?: unknown): Promise<T> {
  const answer = await session.send(method, path, body);
  const text = await answer.text();
  if (!answer.ok) throw new Error(`${method} ${path}: ${answer.status} ${text}`);
  return (text === "" ? undefined : JSON.parse(text)) as T;
}

type Made = { id: string };

/** Budget of the staged bench: a standard uncertainty a kind, of a size that such a bench could have. */
const parts = [
  ["level_dba", 0.1, "dB", "own_run"],
  ["level_dba", 0.25, "dB", "own_mount"],
  ["level_dba", 0.3, "dB", "shared_offset"],
  ["delta_t_k", 0.05, "K", "own_run"],
  ["delta_t_k", 0.2, "K", "own_mount"],
  ["delta_t_k", 0.1, "K", "shared_offset"],
  ["delta_t_k", 0.004, "relative", "shared_gain"],
] as const;

const stagedSpeedsRpm = [800, 1200, 1800];

/** Ten remounts of the baseline on the new bench, by its host, without which its season doesn't open. */
async function qualify(
  host: Session,
  benchVersionId: string,
  { positionId, ...of }: Record<"budgetVersionId" | "protocolVersionId" | "baselineUnitId" | "positionId", string>,
): Promise<void> {
  const checklist = { guard: true, eyes: true, cut_out: true, hot: true, hearing: true, mains: true };
  const { sessionId } = await ask<{ sessionId: string }>(
    host,
    "POST",
    `/api/v1/host/bench-versions/${benchVersionId}/sessions`,
    { purpose: "qualification", ...of, checklist },
  );
  const at = `/api/v1/bench/sessions/${sessionId}`;
  const calibrator = { quantity: "calibrator_db", positionId, value: 94 };
  await ask(host, "POST", `${at}/readings`, { ...calibrator, phase: "before" });
  await ask(host, "POST", `${at}/readings`, { quantity: "background_dba", positionId, value: 22, durationS: 20 });
  for (let mountNumber = 1; mountNumber <= 10; mountNumber += 1) {
    for (const setSpeed of stagedSpeedsRpm) {
      const { runId, version } = await ask<{ runId: string; version: number }>(host, "POST", `${at}/runs`, {
        entryId: null,
        setSpeed,
        mountNumber,
        readings: [
          { quantity: "level_dba", positionId, value: 30 + setSpeed / 100 + (mountNumber % 3) / 10 },
          { quantity: "delta_t_k", value: 80 - setSpeed / 50 },
          { quantity: "power_w", value: 150 },
        ],
      });
      await ask(host, "PUT", `/api/v1/bench/runs/${runId}/state`, { version, state: "done" });
    }
  }
  await ask(host, "POST", `${at}/readings`, { ...calibrator, phase: "after" });
  const { findings } = await ask<{ findings: { reason: string }[] }>(host, "POST", `${at}/end`, {});
  // No ambient was read, since ΔT was typed: another person lifts that hold.
  const second = await signInAs("operator");
  const { holds } = await ask<{ holds: { id: string }[] }>(host, "GET", at);
  if (findings.length !== holds.length) throw new Error("a finding of the qualification holds nothing");
  for (const hold of holds)
    await ask(second, "POST", `${at}/holds/${hold.id}/lift`, { note: "The room was at 22 °C." });
}

/** A bench, protocol, baseline and open season of the test's own, made by the host over the API. */
async function stageSeason(host: Session, tag: string, number: number) {
  const bench = await ask<Made>(host, "POST", "/api/v1/host/benches", { slug: `bench-${tag}`, name: `Bench ${tag}` });
  const version = await ask<Made>(host, "POST", `/api/v1/host/benches/${bench.id}/versions`, {
    cooler: "tower",
    heatSource: "resistive block behind a thermal cut-out",
    temperatureSensors: "two thermistors",
    microphone: "class 1, on axis",
    calibrator: "94 dB",
    changeReason: "first",
  });
  const position = await ask<Made>(host, "POST", `/api/v1/host/bench-versions/${version.id}/positions`, {
    name: "on axis",
    distanceMm: 100,
    angleDeg: 0,
  });
  const budget = await ask<Made>(host, "POST", `/api/v1/host/bench-versions/${version.id}/budgets`, { note: "first" });
  for (const [quantity, u, unit, kind] of parts) {
    await ask(host, "POST", `/api/v1/host/budgets/${budget.id}/parts`, {
      quantity,
      name: `${kind} of ${quantity}`,
      u,
      unit,
      evaluation: "B",
      distribution: "normal",
      source: "the test's own",
      kind,
    });
  }
  const protocol = await ask<Made>(host, "POST", "/api/v1/host/protocols", {
    slug: `protocol-${tag}`,
    name: `Protocol ${tag}`,
  });
  const protocolVersion = await ask<Made>(host, "POST", `/api/v1/host/protocols/${protocol.id}/versions`, {
    heatLoadW: 150,
    setSpeeds: stagedSpeedsRpm,
    mounts: 1,
    runsPerMount: 1,
    backgroundGrade: "engineering",
  });
  const baseline = await ask<Made>(host, "POST", "/api/v1/host/baselines", {
    slug: `baseline-${tag}`,
    name: `Plain seven ${tag}`,
  });
  const unit = await ask<Made>(host, "POST", `/api/v1/host/baselines/${baseline.id}/units`, {
    serial: `S-${tag}`,
    inServiceFrom: "2026-01-01T00:00:00Z",
  });
  const setup = await ask<{ rules: { id: string; kind: string }[]; frames: { id: string; key: string }[] }>(
    host,
    "GET",
    "/api/v1/host/benches",
  );
  const rule = setup.rules.find((each) => each.kind === "equal-noise");
  const frame = setup.frames.find((each) => each.key === "120x25");
  if (!rule || !frame) throw new Error("the default rule or the 120x25 frame is missing");
  const season = await ask<Made>(host, "POST", "/api/v1/host/seasons", {
    number,
    title: `Season ${tag}`,
    protocolVersionId: protocolVersion.id,
    scoringRuleVersionId: rule.id,
    levelsDba: [42, 46],
    headlineDba: 46,
    frameIds: [frame.id],
    benchVersionId: version.id,
    budgetVersionId: budget.id,
    baselineUnitId: unit.id,
  });
  await qualify(host, version.id, {
    budgetVersionId: budget.id,
    protocolVersionId: protocolVersion.id,
    baselineUnitId: unit.id,
    positionId: position.id,
  });
  await ask(host, "POST", `/api/v1/host/seasons/${season.id}/moves`, { to: "opened" });
  return { seasonId: season.id, frameId: frame.id };
}

/** A design of the designer's, sent in, accepted, printed and spun up, so that it stands on the bench. */
async function stageEntry(
  people: Record<"host" | "operator" | "designer", Session>,
  of: { name: string; seasonId: string; frameId: string; blades: number },
) {
  const { slug } = await ask<{ slug: string }>(people.designer, "POST", "/api/v1/my/designs", { name: of.name });
  const { letter } = await ask<{ letter: string }>(people.designer, "POST", `/api/v1/my/designs/${slug}/revisions`, {
    licence: "CC-BY-4.0",
    printNotes: "hub down",
    traits: {
      frameId: of.frameId,
      material: "PETG",
      tipGapMm: 0.8,
      rotors: [{ blades: of.blades, hand: "right", hubDiameterMm: 40, tipDiameterMm: 112 }],
    },
  });
  const sent = await ask<{ entryId: string; state: string }>(
    people.designer,
    "POST",
    `/api/v1/my/designs/${slug}/entries`,
    { letter, seasonId: of.seasonId },
  );
  await ask(people.host, "POST", `/api/v1/host/entries/${sent.entryId}/moves`, { from: "sent_in", to: "accepted" });
  return { entryId: sent.entryId, name: of.name, slug };
}

async function toTheBench(operator: Session, entryId: string): Promise<void> {
  await ask(operator, "POST", `/api/v1/bench/entries/${entryId}/moves`, { from: "accepted", to: "printing" });
  const { specimenId } = await ask<{ specimenId: string }>(operator, "POST", "/api/v1/bench/specimens", {
    entryId,
    material: "PETG",
  });
  await ask(operator, "PUT", `/api/v1/bench/specimens/${specimenId}/parts/1`, {
    massG: 25,
    balanceRecord: "rests anywhere",
    spinUpSpeedRpm: 2200,
    spinUpRecord: "in three steps behind the guard",
    cautions: spinUpCautions,
    state: "passed",
  });
  await ask(operator, "POST", `/api/v1/bench/entries/${entryId}/moves`, { from: "printing", to: "on_the_bench" });
}

/** Everything up to the bench; the measuring itself is played on screen. */
export async function stageRound(): Promise<StagedRound> {
  const tag = randomBytes(3).toString("hex");
  const people = {
    host: await signInAs("host"),
    operator: await signInAs("operator"),
    designer: await signInAs("designer"),
  };
  const number = 100 + (Number.parseInt(tag, 16) % 9000);
  const { seasonId, frameId } = await stageSeason(people.host, tag, number);
  const first = await stageEntry(people, { name: `Reed Bell ${tag}`, seasonId, frameId, blades: 9 });
  const second = await stageEntry(people, { name: `Slow Oar ${tag}`, seasonId, frameId, blades: 7 });
  const round = await ask<Made>(people.host, "POST", `/api/v1/host/seasons/${seasonId}/rounds`, {
    title: "Round 1",
    entryIds: [first.entryId, second.entryId],
  });
  await toTheBench(people.operator, first.entryId);
  await toTheBench(people.operator, second.entryId);
  return {
    seasonSlug: `season-${number}`,
    seasonTitle: `Season ${tag}`,
    roundId: round.id,
    benchName: `Bench ${tag}`,
    entries: [first, second],
  };
}
