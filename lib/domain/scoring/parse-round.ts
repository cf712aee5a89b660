import { Refusal } from "@/lib/science/refusal";
import type { MeasuredPoint } from "../results/measured-point";
import {
  choiceField,
  fieldsOf,
  listField,
  numberAt,
  numberField,
  numberOrNullField,
  refuseTwice,
  textField,
  type Fields,
} from "./parse-fields";
import type { Bridge, RoundInput, RoundSession } from "./round-input";
import { RULE_KINDS, type ScoringRule } from "./rules";

const DRAWS_MAX = 1_000_000;
const NOT_NEGATIVE = { min: 0 };
const POSITIVE = { above: 0 };
const WHOLE_FROM_ONE = { min: 1, whole: true };

/**
 * A round from parsed JSON. Fields that scoring doesn't know are let by.
 * @throws Refusal with a code, a message and the path of the field: `missing`, `not-an-object`, `not-a-list`,
 * `not-a-number`, `out-of-range` (ΔT or power not above 0, a negative uncertainty …), `not-whole`, `not-a-text`,
 * `not-a-choice`, `twice`, `empty`, `headline-not-declared`
 */
export function parseRound(json: unknown): RoundInput {
  const root = fieldsOf(json, "");
  const sessions = listField(root, "sessions", session);
  if (sessions.length === 0) throw new Refusal("empty", "A round has one session or more.", "sessions");
  refuseTwice(sessions.map(({ id }, i) => ({ name: id, path: `sessions[${i}].id` })));
  refuseTwice(
    sessions.flatMap((each, s) =>
      each.entries.map(({ id }, e) => ({ name: id, path: `sessions[${s}].entries[${e}].id` })),
    ),
  );
  return {
    sessions,
    rule: rule(root.value.rule),
    grade: choiceField(root, "grade", ["engineering", "survey"]),
    seed: numberField(root, "seed", { min: 0, whole: true }),
    draws: numberField(root, "draws", { ...WHOLE_FROM_ONE, max: DRAWS_MAX }),
    ...(root.value.baselineUnit === undefined ? {} : { baselineUnit: textField(root, "baselineUnit") }),
    ...(root.value.bridges === undefined ? {} : { bridges: listField(root, "bridges", bridge) }),
  };
}

function rule(value: unknown): ScoringRule {
  if (value === undefined) throw new Refusal("missing", "rule is missing.", "rule");
  const fields = fieldsOf(value, "rule");
  const kind = choiceField(fields, "kind", RULE_KINDS);
  const pointRuleWithoutLevels = kind !== "equal-noise" && fields.value.levelsDba === undefined;
  const levelsDba = pointRuleWithoutLevels
    ? []
    : listField(fields, "levelsDba", (level, path) => numberAt(level, path));
  if (kind === "equal-noise" && levelsDba.length === 0)
    throw new Refusal("empty", "Equal noise needs one declared level or more.", "rule.levelsDba");
  refuseTwice(levelsDba.map((level, i) => ({ name: level, path: `rule.levelsDba[${i}]` })));
  const headlineDba = fields.value.headlineDba === undefined ? null : numberOrNullField(fields, "headlineDba");
  if (kind === "equal-noise" && headlineDba !== null && !levelsDba.includes(headlineDba))
    throw new Refusal("headline-not-declared", "The headline level is one of the declared levels.", "rule.headlineDba");
  const needsM = kind === "speed-neutral";
  return {
    kind,
    levelsDba,
    ...(headlineDba === null ? {} : { headlineDba }),
    ...(needsM || typeof fields.value.m === "number" ? { m: numberField(fields, "m", POSITIVE) } : {}),
  };
}

function session(value: unknown, path: string): RoundSession {
  const fields = fieldsOf(value, path);
  const id = textField(fields, "id");
  if (fields.value.baseline === undefined)
    throw new Refusal("missing", `${path}.baseline is missing.`, `${path}.baseline`);
  const baseline = fieldsOf(fields.value.baseline, `${path}.baseline`);
  return {
    id,
    baseline: { unit: textField(baseline, "unit"), points: points(baseline) },
    entries: listField(fields, "entries", (entry, at) => {
      const entryFields = fieldsOf(entry, at);
      return { id: textField(entryFields, "id"), points: points(entryFields) };
    }),
  };
}

function points(fields: Fields): MeasuredPoint[] {
  const list = listField(fields, "points", point);
  if (list.length === 0) throw new Refusal("empty", `${fields.path}.points has no point.`, `${fields.path}.points`);
  return list;
}

function point(value: unknown, path: string): MeasuredPoint {
  const fields = fieldsOf(value, path);
  return {
    setSpeedRpm: numberField(fields, "setSpeedRpm", POSITIVE),
    mount: numberField(fields, "mount", { min: 0, whole: true }),
    levelReadDba: numberField(fields, "levelReadDba"),
    backgroundDba: numberOrNullField(fields, "backgroundDba"),
    uLevelOwnDb: numberField(fields, "uLevelOwnDb", NOT_NEGATIVE),
    uLevelMountDb: numberField(fields, "uLevelMountDb", NOT_NEGATIVE),
    uLevelOffsetDb: numberField(fields, "uLevelOffsetDb", NOT_NEGATIVE),
    deltaTK: numberField(fields, "deltaTK", POSITIVE),
    uDeltaTOwnK: numberField(fields, "uDeltaTOwnK", NOT_NEGATIVE),
    uDeltaTMountK: numberField(fields, "uDeltaTMountK", NOT_NEGATIVE),
    uDeltaTOffsetK: numberField(fields, "uDeltaTOffsetK", NOT_NEGATIVE),
    uDeltaTGainRel: numberField(fields, "uDeltaTGainRel", NOT_NEGATIVE),
    powerW: numberField(fields, "powerW", POSITIVE),
    dof: numberOrNullField(fields, "dof", POSITIVE),
  };
}

function bridge(value: unknown, path: string): Bridge {
  const fields = fieldsOf(value, path);
  return {
    fromUnit: textField(fields, "fromUnit"),
    toUnit: textField(fields, "toUnit"),
    ratio: numberField(fields, "ratio", POSITIVE),
    u: numberField(fields, "u", NOT_NEGATIVE),
    dof: numberOrNullField(fields, "dof", POSITIVE),
  };
}
