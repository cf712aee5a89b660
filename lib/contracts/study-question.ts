import { z } from "zod";
import { outcomeKeys } from "@/lib/domain/study/outcomes";
import { traitKeys, type TraitKey } from "@/lib/domain/study/traits";

const word = z.string().regex(/^[a-z0-9-]{1,80}$/, "is no such choice");

/** The study's question as it stands in the address. Empty lists ask of everything. */
export const studyQuestionSchema = z.strictObject({
  /** Null: every trait. */
  trait: z.enum(traitKeys).nullable(),
  /** The second of two traits; null without a first. */
  by: z.enum(traitKeys).nullable(),
  figure: z.enum(outcomeKeys),
  /** Frames ("120x25") and classes ("120"). */
  frames: z.array(word).max(20),
  rotations: z.array(z.enum(["single", "co", "counter"])).max(3),
  /** "all", "last-1" to "last-3", or a season's slug. */
  season: word,
});
export type StudyQuestion = z.infer<typeof studyQuestionSchema>;

const oneOf = <T extends string>(list: readonly T[], value: string | null): T | undefined =>
  list.find((each) => each === value);

/** A list's readable values, each once, in a fixed order, so that one question has one address. */
function listOf(params: URLSearchParams, name: string): string[] {
  return [...new Set(params.getAll(name).filter((value) => word.safeParse(value).success))].sort().slice(0, 20);
}

/** Reads the address: `?trait=blades&by=inlet&figure=level&frame=120&season=last-2`. What says nothing is left out. */
export function parseStudyQuestion(params: URLSearchParams): StudyQuestion {
  const trait: TraitKey | null = oneOf(traitKeys, params.get("trait")) ?? null;
  const by = oneOf(traitKeys, params.get("by")) ?? null;
  const season = params.get("season") ?? "all";
  return studyQuestionSchema.parse({
    trait: trait ?? by,
    by: trait && by !== trait ? by : null,
    figure: oneOf(outcomeKeys, params.get("figure")) ?? "equal",
    frames: listOf(params, "frame"),
    rotations: listOf(params, "rotation").filter((value) => oneOf(["single", "co", "counter"], value)),
    season: word.safeParse(season).success ? season : "all",
  });
}

/** The question's parameters in a fixed order, without what is the default. */
export function studyParams(question: StudyQuestion): [string, string][] {
  return [
    ...(question.trait ? [["trait", question.trait] as [string, string]] : []),
    ...(question.by ? [["by", question.by] as [string, string]] : []),
    ...(question.figure === "equal" ? [] : [["figure", question.figure] as [string, string]]),
    ...question.frames.map((frame): [string, string] => ["frame", frame]),
    ...question.rotations.map((rotation): [string, string] => ["rotation", rotation]),
    ...(question.season === "all" ? [] : [["season", question.season] as [string, string]]),
  ];
}

/** The page's address of a question; `path` for its JSON or CSV. */
export function studyAddress(
  question: StudyQuestion,
  path = "/traits",
  more: readonly [string, string][] = [],
): string {
  const text = new URLSearchParams([...studyParams(question), ...more]).toString();
  return text ? `${path}?${text}` : path;
}

/** Tables that can be downloaded: what the page shows, and the very entries that it rests on. */
export const studyTables = ["effects", "pairs", "distribution", "entries"] as const;
export type StudyTable = (typeof studyTables)[number];

const many = z.union([word, z.array(word).max(20)]).optional();

/** The question in a program's request: unlike a typed address, a word that says nothing is refused. */
export const studyQuery = z.strictObject({
  trait: z.enum(traitKeys).optional(),
  by: z.enum(traitKeys).optional(),
  figure: z.enum(outcomeKeys).optional(),
  frame: many,
  rotation: z
    .union([z.enum(["single", "co", "counter"]), z.array(z.enum(["single", "co", "counter"])).max(3)])
    .optional(),
  season: word.optional(),
});
export const studyTableQuery = studyQuery.extend({ table: z.enum(studyTables).optional() });
