import { backgroundCorrection, energyMean } from "@/lib/science/acoustics/levels";
import { combineIndependent, welchSatterthwaite } from "@/lib/science/statistics/uncertainty";
import type { MeasuredPoint } from "../../measured-point";
import type { BudgetPartRecord, ReadingRecord, RunRecord, SessionRecord } from "../../session-record";
import { mountPart, pooledMountSd, type MountMeans, type Sized } from "./mount-spread";
import { METHOD_V1 } from "./parameters";

/** A subject of a session with its points and, by index beside them, the runs and readings they came from. */
export type SessionSubject = {
  readonly key: string;
  readonly entryId: string | null;
  readonly specimenId: string | null;
  readonly baselineUnitId: string | null;
  readonly points: readonly MeasuredPoint[];
  readonly origins: readonly { readonly runId: string; readonly readingIds: readonly string[] }[];
  readonly speedsRpm: ReadonlyMap<number, readonly number[]>;
};

export type LeftOut = { readonly runId: string; readonly why: "no level" | "no temperature rise" | "no power" };

type Raw = {
  readonly run: RunRecord;
  readonly levelDba: number;
  readonly deltaTK: number;
  readonly powerW: number;
  readonly uLogK: number;
  readonly readingIds: string[];
};

const subjectKey = (run: RunRecord): string => run.entryId ?? run.baselineUnitId ?? "";

/**
 * The points of every subject of a session, at the mean of the given microphone positions (energy mean of levels and
 * of backgrounds). Only runs that are done count; one that lacks a level, a rise or a power is left out and named.
 * ΔT is the log's, or sensor less ambient. Own parts: the budget's, and for ΔT from a log its own u and what the gate
 * leaves, a rectangular half-width (JCGM 100:2008, 4.3.7). Mount parts: see `mountPart`. Own and mount parts of a level
 * are of the corrected one: see `correctionSensitivity`.
 */
export function sessionPoints(
  session: SessionRecord,
  positionIds: readonly string[],
): { subjects: SessionSubject[]; leftOut: LeftOut[] } {
  const leftOut: LeftOut[] = [];
  const raws = session.runs
    .filter((run) => run.state === "done")
    .flatMap((run) => {
      const raw = rawOf(run, positionIds);
      if ("why" in raw) leftOut.push({ runId: run.runId, why: raw.why });
      return "why" in raw ? [] : [raw];
    });
  const backgroundDba = backgroundOf(session, positionIds);
  const parts = partsOf(session.budget, raws);
  const keys = [...new Set(raws.map(({ run }) => subjectKey(run)))];
  const subjects = keys.map((key): SessionSubject => {
    const own = raws.filter(({ run }) => subjectKey(run) === key);
    const mounts = [...new Set(own.map(({ run }) => mountKey(run)))];
    const first = own[0]?.run;
    return {
      key,
      entryId: first?.entryId ?? null,
      specimenId: first?.specimenId ?? null,
      baselineUnitId: first?.baselineUnitId ?? null,
      points: own.map((raw) =>
        pointOf(raw, mounts.indexOf(mountKey(raw.run)) + 1, backgroundDba, parts, session.grade),
      ),
      origins: own.map(({ run, readingIds }) => ({ runId: run.runId, readingIds })),
      speedsRpm: speedsOf(own),
    };
  });
  return { subjects, leftOut };
}

const mountKey = (run: RunRecord): string => `${run.specimenId ?? ""} ${run.mountNumber}`;

function rawOf(run: RunRecord, positionIds: readonly string[]): Raw | { why: LeftOut["why"] } {
  const of = (quantity: string): ReadingRecord | undefined => run.readings.find((each) => each.quantity === quantity);
  const levels = run.readings.filter(
    (each) => each.quantity === "level_dba" && each.positionId !== null && positionIds.includes(each.positionId),
  );
  if (levels.length < positionIds.length) return { why: "no level" };
  const levelDba = energyMean(levels.map((each) => each.value));
  const logged = of("delta_t_k");
  const sensor = of("sensor_c");
  const ambient = of("ambient_c");
  const deltaTK = logged?.value ?? (sensor && ambient ? sensor.value - ambient.value : undefined);
  const power = of("power_w");
  if (levelDba === undefined) return { why: "no level" };
  if (deltaTK === undefined || !(deltaTK > 0)) return { why: "no temperature rise" };
  if (!power || !(power.value > 0)) return { why: "no power" };
  const number = (value: unknown): number => (typeof value === "number" && Number.isFinite(value) ? value : 0);
  const uLogK = combineIndependent([
    number(logged?.detail.uDeltaTK),
    number(logged?.detail.residualK) / METHOD_V1.residualDivisor,
  ]);
  const temperatures = logged ? [logged] : [sensor, ambient].flatMap((each) => (each ? [each] : []));
  const readingIds = [...levels, ...temperatures, power].map((each) => each.id);
  return { run, levelDba, deltaTK, powerW: power.value, uLogK, readingIds };
}

function backgroundOf(session: SessionRecord, positionIds: readonly string[]): number | null {
  const means = positionIds.map((id) =>
    energyMean(session.backgrounds.filter((each) => each.positionId === id).map((each) => each.valueDba)),
  );
  const known = means.filter((mean) => mean !== undefined);
  return known.length === positionIds.length ? (energyMean(known) ?? null) : null;
}

type Parts = Record<
  "levelOwn" | "levelMount" | "levelOffset" | "deltaTOwn" | "deltaTMount" | "deltaTOffset" | "deltaTGain",
  Sized
>;

function partsOf(budget: readonly BudgetPartRecord[], raws: readonly Raw[]): Parts {
  const sized = (quantity: BudgetPartRecord["quantity"], kind: BudgetPartRecord["kind"]): Sized => {
    const parts = budget.filter((part) => part.quantity === quantity && part.kind === kind);
    return {
      u: combineIndependent(parts.map((part) => part.u)),
      dof: welchSatterthwaite(parts.map(({ u, dof }) => ({ u, dof: dof ?? Infinity }))),
    };
  };
  const levelOwn = sized("level_dba", "own_run");
  const deltaTOwn = sized("delta_t_k", "own_run");
  const spread = (of: (raw: Raw) => number) => pooledMountSd(mountMeans(raws, of));
  return {
    levelOwn,
    deltaTOwn,
    levelMount: mountPart(
      sized("level_dba", "own_mount"),
      levelOwn,
      spread((raw) => raw.levelDba),
    ),
    deltaTMount: mountPart(
      sized("delta_t_k", "own_mount"),
      deltaTOwn,
      spread((raw) => raw.deltaTK),
    ),
    levelOffset: sized("level_dba", "shared_offset"),
    deltaTOffset: sized("delta_t_k", "shared_offset"),
    deltaTGain: sized("delta_t_k", "shared_gain"),
  };
}

function mountMeans(raws: readonly Raw[], of: (raw: Raw) => number): MountMeans[] {
  const groups = new Map<string, { subject: string; mounts: Map<string, number[]> }>();
  for (const raw of raws) {
    const subject = subjectKey(raw.run);
    const key = `${subject} ${raw.run.setSpeed}`;
    const group = groups.get(key) ?? { subject, mounts: new Map<string, number[]>() };
    groups.set(key, group);
    const mount = mountKey(raw.run);
    group.mounts.set(mount, [...(group.mounts.get(mount) ?? []), of(raw)]);
  }
  return [...groups.values()].map(({ subject, mounts }) => ({
    subject,
    means: [...mounts.values()].map((values) => values.reduce((sum, x) => sum + x, 0) / values.length),
  }));
}

/**
 * ∂L/∂L' of a corrected level by the level as read: 1/(1 − 10^(−ΔL/10)), which is 10^(K₁/10), where the correction is
 * made; 1 where it is not or is held. An offset moves the background too and passes unchanged.
 */
export function correctionSensitivity(
  levelReadDba: number,
  backgroundDba: number | null,
  grade: SessionRecord["grade"],
): number {
  if (backgroundDba === null) return 1;
  const { k1Db, upperBound } = backgroundCorrection({ measuredDb: levelReadDba, backgroundDb: backgroundDba, grade });
  return upperBound ? 1 : 10 ** (k1Db / 10);
}

function pointOf(
  raw: Raw,
  mount: number,
  backgroundDba: number | null,
  parts: Parts,
  grade: SessionRecord["grade"],
): MeasuredPoint {
  const corrected = correctionSensitivity(raw.levelDba, backgroundDba, grade);
  const finite = (dof: number): number | null => (Number.isFinite(dof) ? dof : null);
  return {
    setSpeedRpm: raw.run.setSpeed,
    mount,
    levelReadDba: raw.levelDba,
    backgroundDba,
    uLevelOwnDb: corrected * parts.levelOwn.u,
    uLevelMountDb: corrected * parts.levelMount.u,
    uLevelOffsetDb: parts.levelOffset.u,
    deltaTK: raw.deltaTK,
    uDeltaTOwnK: combineIndependent([parts.deltaTOwn.u, raw.uLogK]),
    uDeltaTMountK: parts.deltaTMount.u,
    uDeltaTOffsetK: parts.deltaTOffset.u,
    uDeltaTGainRel: parts.deltaTGain.u,
    powerW: raw.powerW,
    dof: null,
    dofParts: {
      level_own_run: finite(parts.levelOwn.dof),
      level_own_mount: finite(parts.levelMount.dof),
      delta_t_own_run: finite(parts.deltaTOwn.dof),
      delta_t_own_mount: finite(parts.deltaTMount.dof),
    },
  };
}

function speedsOf(raws: readonly Raw[]): Map<number, number[]> {
  const speeds = new Map<number, number[]>();
  for (const setSpeed of new Set(raws.map(({ run }) => run.setSpeed))) {
    const readings = raws
      .filter(({ run }) => run.setSpeed === setSpeed)
      .flatMap(({ run }) => run.readings.filter((each) => each.quantity === "speed_rpm"));
    const rotors = [...new Set(readings.map((each) => each.rotorPosition ?? 1))].sort((a, b) => a - b);
    speeds.set(
      setSpeed,
      rotors.map((rotor) => {
        const values = readings.filter((each) => (each.rotorPosition ?? 1) === rotor).map((each) => each.value);
        return values.reduce((sum, x) => sum + x, 0) / values.length;
      }),
    );
  }
  return speeds;
}
