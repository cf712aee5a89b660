import type { Knex } from "knex";
import { v7 as uuidv7 } from "uuid";
import { insertSpectra, type SpectrumInsert } from "@/db/queries/spectra";
import { createRandom, type Random } from "@/lib/science/statistics/random";
import type { DemoBench } from "./seed-bench";
import type { DemoSeason } from "./seed-seasons";
import { levelDba, referenceFan, resistanceKPerW, secondReferenceFan, type ToyFan } from "./toy-model";
import { toyBackground, toySpectrum, type ToySpectrum } from "./toy-spectrum";

/** Something on the bench: an entry's specimen, or the baseline unit. */
export interface DemoSubject {
  fan: ToyFan;
  entryId?: string;
  specimenId?: string;
  baselineUnitId?: string;
}

export interface DemoSession {
  season: DemoSeason;
  /** Null for a qualification: ten mounts of the baseline and nothing else. */
  roundId: string | null;
  operatorId: string;
  beganAt: Date;
  subjects: readonly DemoSubject[];
  /** Another baseline unit that runs as well, before the last mount of the session's own. */
  bridgeUnitId?: string;
  /** What changed at the bench, in everything read in the session: levels in dB, ΔT/P in K/W. */
  shift?: { levelDb: number; resistanceKpw: number };
  /** False leaves the session open, with the baseline's last mount still to come. */
  closed: boolean;
}

const setSpeeds = [750, 1100, 1450, 1800];
const mounts = 3;
const qualifyingMounts = 10;
const bridgeSeed = 7_002;
/** The mount whose runs have a spectrum, at each set speed. */
const spectraMount = 1;
const round1 = (value: number): number => Math.round(value * 10) / 10;

interface Draft {
  runs: Record<string, unknown>[];
  speeds: Record<string, unknown>[];
  readings: Record<string, unknown>[];
  spectra: SpectrumInsert[];
}

interface Circumstances {
  sessionId: string;
  operatorId: string;
  positions: readonly { id: string; name: string }[];
  levelOffsetDb: number;
  resistanceShiftKpw: number;
  deltaTOffsetK: number;
  ambientC: number;
  minute: number;
  ordinal: number;
  beganAt: Date;
  /** Of its own, so that the rest of the demo is the same with spectra and without. */
  forSpectra: Random;
}

/** A stored spectrum of the toy bench, as bands: no recording was made. */
function spectrum(c: Circumstances, runId: string | null, positionId: string, read: ToySpectrum): SpectrumInsert {
  const at = new Date(c.beganAt.getTime() + c.minute * 60_000);
  const purpose = runId === null ? "background" : "run";
  const of = { sessionId: c.sessionId, runId, positionId, purpose, source: "bands", readerVersion: 1 } as const;
  return { ...of, ...read, durationS: 30, usedS: 30, byPerson: c.operatorId, at };
}

function reading(
  c: Circumstances,
  runId: string | null,
  quantity: string,
  value: number,
  unit: string,
  more: object = {},
) {
  return {
    id: uuidv7(),
    session_id: c.sessionId,
    run_id: runId,
    quantity,
    value,
    unit,
    source: "typed",
    taken_by: c.operatorId,
    taken_at: new Date(c.beganAt.getTime() + c.minute * 60_000),
    position_id: null,
    phase: null,
    rotor_position: null,
    ...more,
  };
}

/** One mount of one subject through all set speeds, with the noise of the toy bench. */
function measureMount(random: Random, c: Circumstances, subject: DemoSubject, mount: number, draft: Draft): void {
  const mountLevelDb = 0.25 * random.normal();
  const mountK = 0.2 * random.normal();
  for (const setSpeed of setSpeeds) {
    const runId = uuidv7();
    c.ordinal += 1;
    c.minute += 12;
    c.ambientC += 0.02 * random.normal();
    const speedRpm = Math.round(setSpeed * (1 + 0.002 * random.normal()));
    const powerW = round1(150 + 0.15 * random.normal());
    const resistance = resistanceKPerW(subject.fan, speedRpm) + c.resistanceShiftKpw;
    const deltaTK = powerW * resistance + c.deltaTOffsetK + mountK + 0.08 * random.normal();
    const ambientC = round1(c.ambientC);
    draft.runs.push({
      id: runId,
      session_id: c.sessionId,
      entry_id: subject.entryId ?? null,
      specimen_id: subject.specimenId ?? null,
      baseline_unit_id: subject.baselineUnitId ?? null,
      set_speed: setSpeed,
      mount_number: mount,
      ordinal: c.ordinal,
      state: "done",
      by_person: c.operatorId,
      began_at: new Date(c.beganAt.getTime() + c.minute * 60_000),
    });
    const speeds = subject.fan.rotors.map((_rotor, i) => speedRpm + (i === 0 ? 0 : Math.round(3 * random.normal())));
    speeds.forEach((rpm, i) => {
      draft.speeds.push({ run_id: runId, rotor_position: i + 1, speed_rpm: rpm, source: "tachometer" });
      draft.readings.push(reading(c, runId, "speed_rpm", rpm, "rpm", { rotor_position: i + 1 }));
    });
    for (const position of c.positions) {
      const aside = position.name === "on axis" ? 0 : -1.1;
      const own = levelDba(subject.fan, speedRpm) + aside + c.levelOffsetDb + mountLevelDb + 0.12 * random.normal();
      const heard = 10 * Math.log10(10 ** (own / 10) + 10 ** (backgroundOf(position.name) / 10));
      const readDba = round1(heard);
      draft.readings.push(reading(c, runId, "level_dba", readDba, "dB(A)", { position_id: position.id }));
      if (mount !== spectraMount || position.name !== "on axis") continue;
      const read = { rpm: speeds, readDba, backgroundDba: backgroundOf(position.name) };
      draft.spectra.push(spectrum(c, runId, position.id, toySpectrum(c.forSpectra, subject.fan, read)));
    }
    draft.readings.push(reading(c, runId, "ambient_c", ambientC, "°C"));
    draft.readings.push(reading(c, runId, "sensor_c", round1(ambientC + deltaTK), "°C"));
    draft.readings.push(reading(c, runId, "power_w", powerW, "W"));
  }
}

const backgroundOf = (position: string): number => (position === "on axis" ? 27.6 : 27.3);

async function insertDraft(db: Knex, draft: Draft): Promise<void> {
  await db.batchInsert("run", draft.runs, 200);
  await db.batchInsert("run_speed", draft.speeds, 500);
  await db.batchInsert("reading", draft.readings, 500);
  await insertSpectra(db, draft.spectra);
}

/** Calibrator and background at the start or the end of a session. */
async function insertChecks(db: Knex, random: Random, c: Circumstances, phase: "before" | "after"): Promise<void> {
  for (const position of c.positions) {
    const calibrator = reading(c, null, "calibrator_db", round1(94 + 0.07 * random.normal()), "dB", {
      position_id: position.id,
      phase,
    });
    const background = reading(
      c,
      null,
      "background_dba",
      round1(backgroundOf(position.name) + 0.15 * random.normal()),
      "dB(A)",
      {
        position_id: position.id,
      },
    );
    await db("reading").insert([calibrator, background]);
    if (phase === "before" && position.name === "on axis") {
      const read = toyBackground(c.forSpectra, background.value);
      await insertSpectra(db, [spectrum(c, null, position.id, read)]);
    }
    await db("calibration_check").insert({
      session_id: c.sessionId,
      position_id: position.id,
      phase,
      calibrator_level_db: 94,
      reading_id: calibrator.id,
    });
    await db("background_level").insert({
      session_id: c.sessionId,
      position_id: position.id,
      heated: false,
      duration_s: 30,
      reading_id: background.id,
    });
  }
}

/**
 * A sitting at the bench: calibrator and background, the baseline's first two mounts, three mounts of each subject, the
 * baseline's last mount, calibrator and background again. A qualification is ten mounts of the baseline. @returns the
 * session's id
 */
export async function seedSession(db: Knex, random: Random, bench: DemoBench, session: DemoSession): Promise<string> {
  const version = bench.versions[session.season.benchIndex];
  if (!version) throw new Error("no such bench version in the demo");
  const sessionId = uuidv7();
  await db("session").insert({
    id: sessionId,
    bench_id: bench.benchId,
    bench_version_id: version.id,
    protocol_version_id: session.season.protocolVersionId,
    budget_version_id: version.budgetId,
    baseline_unit_id: session.season.baselineUnitId,
    round_id: session.roundId,
    purpose: session.roundId === null ? "qualification" : "round",
    operator_id: session.operatorId,
    began_at: session.beganAt,
    checklist: { guard: true, cut_out: true, ear_protection: true, paste: true },
  });
  const c: Circumstances = {
    sessionId,
    operatorId: session.operatorId,
    positions: version.positions,
    levelOffsetDb: 0.2 * random.normal() + (session.shift?.levelDb ?? 0),
    resistanceShiftKpw: session.shift?.resistanceKpw ?? 0,
    deltaTOffsetK: 0.1 * random.normal(),
    ambientC: 21.5 + random.uniform() * 2,
    minute: 5,
    ordinal: 0,
    beganAt: session.beganAt,
    forSpectra: createRandom(session.beganAt.getTime() / 60_000),
  };
  const humidity = reading(c, null, "humidity_percent", Math.round(40 + 10 * random.uniform()), "%");
  const pressure = reading(c, null, "pressure_pa", Math.round(100_200 + 900 * random.normal()), "Pa");
  await db("reading").insert([humidity, pressure]);
  await insertChecks(db, random, c, "before");
  const draft: Draft = { runs: [], speeds: [], readings: [], spectra: [] };
  const baseline: DemoSubject = { fan: referenceFan, baselineUnitId: session.season.baselineUnitId };
  const first = session.roundId === null ? qualifyingMounts : 2;
  for (let mount = 1; mount <= first; mount += 1) measureMount(random, c, baseline, mount, draft);
  for (const subject of session.subjects)
    for (let mount = 1; mount <= mounts; mount += 1) measureMount(random, c, subject, mount, draft);
  if (session.bridgeUnitId) {
    // A draw of its own, so that the rest of the demo is the same with the bridge and without.
    const bridge: DemoSubject = { fan: secondReferenceFan, baselineUnitId: session.bridgeUnitId };
    const aside = createRandom(bridgeSeed);
    for (let mount = 1; mount <= mounts; mount += 1) measureMount(aside, c, bridge, mount, draft);
  }
  if (session.closed && session.roundId !== null) measureMount(random, c, baseline, 3, draft);
  await insertDraft(db, draft);
  if (session.closed) {
    await insertChecks(db, random, c, "after");
    const endedAt = new Date(c.beganAt.getTime() + (c.minute + 10) * 60_000);
    await db("session").where({ id: sessionId }).update({ ended_at: endedAt });
  }
  return sessionId;
}
