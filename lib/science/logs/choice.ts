import { Refusal } from "../refusal";
import type { Column } from "./columns";
import { plain, type Quantity } from "./units";

/** Columns that a person named or confirmed; what is left out is recognised. */
export interface LogChoice {
  readonly sensor?: string;
  readonly ambient?: string;
  readonly level?: string;
}

/** A remark on how a log was read; codes are stable. */
export interface LogWarning {
  readonly code: string;
  readonly message: string;
}

/** The columns that are read, and what had to be taken as understood. */
export interface Chosen {
  readonly time: Column | undefined;
  readonly sensor: Column | undefined;
  readonly ambient: Column | undefined;
  readonly level: Column | undefined;
  readonly speed: Column | undefined;
  readonly warnings: readonly LogWarning[];
}

const NO_PAIR: { sensor: Column | undefined; ambient: Column | undefined } = { sensor: undefined, ambient: undefined };

/**
 * Picks time, temperatures, level and speed. With sensor or ambient named only temperatures are read, with level named
 * only the level, with both kinds both.
 * @throws Refusal for a name that no column has, or a column that holds something else
 */
export function chooseColumns(columns: readonly Column[], choice: LogChoice): Chosen {
  const warnings: LogWarning[] = [];
  const named = {
    sensor: find(columns, choice.sensor, "temperature", "sensor"),
    ambient: find(columns, choice.ambient, "temperature", "ambient"),
    level: find(columns, choice.level, "level", "level"),
  };
  const free = choice.sensor === undefined && choice.ambient === undefined && choice.level === undefined;
  const time = pickTime(
    columns.filter((column) => !Object.values(named).includes(column)),
    warnings,
  );
  const thermal = free || named.sensor !== undefined || named.ambient !== undefined;
  const pair = thermal ? pickTemperatures(columns, named.sensor, named.ambient, warnings) : NO_PAIR;
  const level = named.level ?? (free ? pickLevel(columns) : undefined);
  const speed =
    pair.sensor && columns.find((column) => column.quantity === "speed" && column.kind === "number" && !column.sparse);
  for (const column of [pair.sensor, pair.ambient]) {
    if (column && !column.unit)
      warnings.push({ code: "unit-assumed", message: `"${column.name}" has no unit: read as °C` });
  }
  if (!pair.sensor && !level) {
    warnings.push({ code: "nothing-recognised", message: "no column was recognised as a temperature or a level" });
  }
  return { time, sensor: pair.sensor, ambient: pair.ambient, level, speed, warnings };
}

function find(
  columns: readonly Column[],
  name: string | undefined,
  quantity: Quantity,
  at: string,
): Column | undefined {
  if (name === undefined) return undefined;
  const bare = (text: string) => plain(text).replace(/\s+/g, " ");
  const short = (text: string) => bare(text).replace(/\s*[([<{].*$/, "");
  const found =
    columns.find((column) => column.name === name) ??
    columns.find((column) => bare(column.name) === bare(name)) ??
    columns.find((column) => short(column.name) === bare(name));
  if (!found)
    throw new Refusal(
      "unknown-column",
      `no column is named "${name}"; there are: ${columns.map((c) => `"${c.name}"`).join(", ")}`,
      at,
    );
  if (found.kind !== "number") throw new Refusal("not-numbers", `the column "${found.name}" holds no numbers`, at);
  if (found.unit && found.unit.quantity !== quantity)
    throw new Refusal("wrong-quantity", `the column "${found.name}" is in ${found.unit.symbol}, not a ${quantity}`, at);
  return found;
}

function pickTime(columns: readonly Column[], warnings: LogWarning[]): Column | undefined {
  const timed = columns.filter((column) => column.quantity === "time" && column.kind !== "date");
  const rank = (column: Column) =>
    column.kind === "number" && column.unit ? 0 : column.kind === "timestamp" ? 1 : column.kind === "clock" ? 2 : 3;
  const best = [...timed].sort((a, b) => rank(a) - rank(b))[0];
  if (best) return best;
  const rising = columns.find((column) => column.kind === "number" && column.rising && column.quantity === undefined);
  if (rising) warnings.push({ code: "time-assumed", message: `"${rising.name}" only rises: read as the time` });
  return rising;
}

function pickTemperatures(
  columns: readonly Column[],
  sensor: Column | undefined,
  ambient: Column | undefined,
  warnings: LogWarning[],
) {
  const free = columns.filter((column) => column.kind === "number" && column !== sensor && column !== ambient);
  const known = free.filter((column) => column.quantity === "temperature");
  const open = known.length > 0 || sensor || ambient ? known : pairOfUnknown(free);
  const hotFirst = [...open].sort((a, b) => b.sampleMean - a.sampleMean);
  const air =
    ambient ??
    open.find((column) => column.role === "ambient") ??
    (sensor || open.length > 1 ? coldest(hotFirst, sensor) : undefined);
  const rest = hotFirst.filter((column) => column !== air);
  const hot = sensor ?? open.find((column) => column.role === "sensor" && column !== air) ?? rest[0];
  const guessed = (column: Column | undefined, given: Column | undefined, role: string) =>
    column !== undefined && given === undefined && column.role !== role;
  if (hot && air && (guessed(hot, sensor, "sensor") || guessed(air, ambient, "ambient"))) {
    warnings.push({
      code: "columns-assumed",
      message: `"${hot.name}" is read as the sensor and "${air.name}" as the ambient`,
    });
  }
  return { sensor: hot, ambient: air };
}

const COUNTER = /^\W*(no|nr|num|index|id|sample|row|count|record|seq|line)\b/i;

/** Two columns of unknown name that could be temperatures by their values, when there are just two. */
function pairOfUnknown(free: readonly Column[]): readonly Column[] {
  const could = free.filter(
    (column) =>
      column.quantity === undefined &&
      !column.unit &&
      !COUNTER.test(column.name) &&
      Math.abs(column.sampleMean - 75) < 75,
  );
  return could.length === 2 && could[0]?.sampleMean !== could[1]?.sampleMean ? could : [];
}

function coldest(hotFirst: readonly Column[], sensor: Column | undefined): Column | undefined {
  const left = hotFirst.filter((column) => column.role !== "sensor" || hotFirst.length > 1);
  const last = left[left.length - 1];
  return last && (sensor !== undefined || hotFirst.length > 1) ? last : undefined;
}

/** dB(A) before plain dB; an equivalent level before maxima and peaks. */
function pickLevel(columns: readonly Column[]): Column | undefined {
  const levels = columns.filter((column) => column.quantity === "level" && column.kind === "number");
  const rank = (column: Column) => {
    const weighting = column.unit?.symbol === "dB(A)" ? 0 : column.unit?.symbol === "dB" || !column.unit ? 1 : 3;
    return 2 * weighting + (/max|min|peak|spitze|l\d\d/i.test(column.name) ? 3 : /eq/i.test(column.name) ? 0 : 1);
  };
  return [...levels].sort((a, b) => rank(a) - rank(b))[0];
}
