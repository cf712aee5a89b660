import { z } from "zod";
import { ENTRY_STATES } from "@/lib/domain/designs/entry-moves";
import { ROUND_STATES } from "@/lib/domain/seasons/round-moves";
import { id, time, wholeText } from "./base";

const words = (most: number) => z.string().trim().max(most);
const positive = z.number({ error: "is no number" }).positive("is not above 0");

/** One printed copy: what is printed, and how. */
export const newSpecimen = z.strictObject({
  entryId: id,
  material: words(60).min(1, "is missing"),
  colour: words(60).default(""),
  layerHeightMm: positive.max(2).nullish(),
  nozzleMm: positive.max(3).nullish(),
  infillPercent: z.number().min(0).max(100).nullish(),
  walls: z.int().min(1).max(50).nullish(),
  layersAcrossAxis: z.boolean().nullish(),
  printTimeMin: positive.max(100_000).nullish(),
  note: words(2000).default(""),
});
export type NewSpecimen = z.infer<typeof newSpecimen>;

/** Mass, balance and spin-up of one rotor of a copy. A part passes behind the guard, in steps, or fails. */
export const partRecord = z.strictObject({
  massG: positive.max(5000).nullish(),
  balanceRecord: words(2000).default(""),
  spinUpSpeedRpm: positive.max(60_000).nullish(),
  spinUpRecord: words(2000).default(""),
  /** Cautions ticked: guard, eye protection, out of the plane, raised in steps, stopped on vibration. */
  cautions: z.record(z.string().max(40), z.boolean()).default({}),
  state: z.enum(["printed", "passed", "failed", "written_off"]),
});
export type PartRecord = z.infer<typeof partRecord>;
export const partParams = z.strictObject({ id, position: wholeText(1, 4) });

/** A move at the bench. `from` is the state as it was seen: another by now is a 409. */
export const benchMove = z.strictObject({
  from: z.enum(["accepted", "printing", "on_the_bench"]),
  to: z.enum(["printing", "on_the_bench", "in_review"]),
  reason: words(1000).nullish(),
});
export type BenchMove = z.infer<typeof benchMove>;

export const specimenPart = z.strictObject({
  rotorPosition: z.int(),
  massG: z.number().nullable(),
  balanceRecord: z.string(),
  spinUpSpeedRpm: z.number().nullable(),
  spinUpRecord: z.string(),
  state: z.enum(["printed", "passed", "failed", "written_off"]),
});
export type SpecimenPart = z.infer<typeof specimenPart>;

export const specimenView = z.strictObject({
  id,
  number: z.int(),
  material: z.string(),
  colour: z.string(),
  layerHeightMm: z.number().nullable(),
  nozzleMm: z.number().nullable(),
  infillPercent: z.number().nullable(),
  walls: z.int().nullable(),
  layersAcrossAxis: z.boolean().nullable(),
  printTimeMin: z.number().nullable(),
  note: z.string(),
  printedAt: time.nullable(),
  parts: z.array(specimenPart),
});
export type SpecimenView = z.infer<typeof specimenView>;

export const queueEntry = z.strictObject({
  entryId: id,
  state: z.enum(ENTRY_STATES),
  since: time,
  name: z.string(),
  letter: z.string(),
  rotors: z.int(),
  seasonTitle: z.string(),
  round: z.strictObject({ id, number: z.int(), state: z.enum(ROUND_STATES) }).nullable(),
  /** The reviewer's reasons, while it is back on the bench for them. */
  sentBack: z.string().nullable(),
  /** The newest session of its round in which it ran. */
  sessionId: id.nullable(),
});
export type QueueEntry = z.infer<typeof queueEntry>;

/** What a session of a round may run on. */
export const roundSetup = z.strictObject({
  roundId: id,
  roundNumber: z.int(),
  roundState: z.enum(ROUND_STATES),
  seasonTitle: z.string(),
  benches: z.array(z.strictObject({ benchVersionId: id, name: z.string(), number: z.int() })),
  baselines: z.array(z.strictObject({ baselineUnitId: id, name: z.string(), serial: z.string() })),
  /** Whether each entry is in review, so that the round may go there. */
  ready: z.boolean(),
});
export type RoundSetup = z.infer<typeof roundSetup>;

export const openSession = z.strictObject({
  sessionId: id,
  number: z.int(),
  benchName: z.string(),
  roundId: id.nullable(),
  operatorHandle: z.string().nullable(),
  beganAt: time,
});

export const benchQueue = z.strictObject({
  entries: z.array(queueEntry),
  rounds: z.array(roundSetup),
  open: z.array(openSession),
  /** Cautions to tick before a session starts, by key. */
  checklist: z.array(z.strictObject({ key: z.string(), words: z.string() })),
});
export type BenchQueue = z.infer<typeof benchQueue>;

/** One entry that is printed or spun up: what to print, and what became of its copies. */
export const printJob = z.strictObject({
  ...queueEntry.shape,
  printNotes: z.string(),
  material: z.string().nullable(),
  printTimeMin: z.number().nullable(),
  rotorMasses: z.array(z.strictObject({ position: z.int(), blades: z.int(), massG: z.number().nullable() })),
  /** The season's highest set speed, rpm; null where speeds are set as drive in %. */
  topSpeedRpm: z.number().nullable(),
  specimens: z.array(specimenView),
});
export type PrintJob = z.infer<typeof printJob>;
export const printJobs = z.strictObject({ items: z.array(printJob) });

export const madeSpecimen = z.strictObject({ specimenId: id, number: z.int() });
export const movedEntry = z.strictObject({ state: z.enum(ENTRY_STATES) });
export const movedRound = z.strictObject({ state: z.enum(ROUND_STATES) });
