import { ServiceError, notSupported } from "./errors";
import type { SettingName } from "./index-settings";
import { defaultSettings } from "./index-settings";
import { isRecord } from "./paths";
import { tokenise } from "./words";

const RULES = new Set([
  "words",
  "typo",
  "sort",
  "proximity",
  "attribute",
  "attributeRank",
  "wordPosition",
  "exactness",
]);
const STRING_LISTS: readonly string[] = [
  "displayedAttributes",
  "searchableAttributes",
  "sortableAttributes",
  "stopWords",
  "nonSeparatorTokens",
  "separatorTokens",
  "dictionary",
];

function codeOf(name: string): string {
  const last = name.replace(/[A-Z]/g, (letter) => `_${letter.toLowerCase()}`);
  return `invalid_settings_${last}`;
}

/** Refuses a settings object that the service would refuse, or that this server could not honour. */
export function checkSettings(body: unknown): Record<string, unknown> {
  if (!isRecord(body))
    throw new ServiceError("bad_request", `Invalid value type: expected an object, but found ${kind(body)}`);
  const known = Object.keys(defaultSettings());
  for (const [name, value] of Object.entries(body)) {
    if (!known.includes(name)) {
      const list = known.map((each) => `\`${each}\``).join(", ");
      throw new ServiceError("bad_request", `Unknown field \`${name}\`: expected one of ${list}`);
    }
    checkSetting(name as SettingName, value, `.${name}`);
  }
  return body;
}

/** Refuses one setting's value; `path` is where it stands in the request, "" for a sub-route's whole body. */
export function checkSetting(name: SettingName, value: unknown, path: string): void {
  if (value === null || value === undefined) return;
  const wrong = (expected: string, found: unknown = value, at = path): never => {
    const where = at === "" ? "" : ` at \`${at}\``;
    throw new ServiceError(codeOf(name), `Invalid value type${where}: expected ${expected}, but found ${kind(found)}`);
  };
  const list = (found: unknown, at: string): void => {
    if (!Array.isArray(found)) wrong("an array", found, at);
    else found.forEach((item, i) => typeof item === "string" || wrong("a string", item, `${at}[${i}]`));
  };
  const record = (found: unknown, keys: readonly string[], at: string): Record<string, unknown> => {
    if (!isRecord(found)) return wrong("an object", found, at);
    const odd = Object.keys(found).find((key) => !keys.includes(key));
    if (odd === undefined) return found;
    const names = keys.map((each) => `\`${each}\``).join(", ");
    throw new ServiceError(codeOf(name), `Unknown field \`${odd}\` inside \`${at}\`: expected one of ${names}`);
  };
  const count = (found: unknown, at: string): void => {
    if (found === null || found === undefined) return;
    if (typeof found !== "number" || !Number.isInteger(found) || found < 0) wrong("a positive integer", found, at);
  };
  const flag = (found: unknown, at: string): void => {
    if (found !== null && found !== undefined && typeof found !== "boolean") wrong("a boolean", found, at);
  };
  if (STRING_LISTS.includes(name)) list(value, path);
  else if (name === "rankingRules") {
    list(value, path);
    (value as string[]).forEach((rule, i) => checkRule(rule, `${path}[${i}]`));
  } else if (name === "filterableAttributes") checkFilterable(value, path, wrong);
  else if (name === "synonyms") checkSynonyms(value, path, wrong, list);
  else if (name === "distinctAttribute" || name === "proximityPrecision" || name === "prefixSearch") {
    if (typeof value !== "string") wrong("a string");
    const allowed = { proximityPrecision: ["byWord", "byAttribute"], prefixSearch: ["indexingTime", "disabled"] }[
      name as string
    ];
    if (allowed !== undefined && !allowed.includes(value as string)) {
      const names = allowed.map((each) => `\`${each}\``).join(", ");
      throw new ServiceError(
        codeOf(name),
        `Unknown value \`${String(value)}\` at \`${path}\`: expected one of ${names}`,
      );
    }
  } else if (name === "facetSearch") flag(value, path);
  else if (name === "searchCutoffMs") count(value, path);
  else if (name === "pagination") count(record(value, ["maxTotalHits"], path).maxTotalHits, `${path}.maxTotalHits`);
  else if (name === "faceting") {
    const found = record(value, ["maxValuesPerFacet", "sortFacetValuesBy"], path);
    count(found.maxValuesPerFacet, `${path}.maxValuesPerFacet`);
    const by = found.sortFacetValuesBy;
    if (by !== null && by !== undefined && !isRecord(by)) wrong("an object", by, `${path}.sortFacetValuesBy`);
    for (const order of Object.values(isRecord(by) ? by : {})) {
      if (order !== null && order !== "alpha" && order !== "count") {
        throw new ServiceError(
          codeOf(name),
          `Unknown value \`${String(order)}\` at \`${path}.sortFacetValuesBy\`: expected one of \`alpha\`, \`count\``,
        );
      }
    }
  } else if (name === "typoTolerance") {
    const keys = ["enabled", "minWordSizeForTypos", "disableOnWords", "disableOnAttributes", "disableOnNumbers"];
    const found = record(value, keys, path);
    flag(found.enabled, `${path}.enabled`);
    flag(found.disableOnNumbers, `${path}.disableOnNumbers`);
    for (const key of ["disableOnWords", "disableOnAttributes"]) if (found[key]) list(found[key], `${path}.${key}`);
    const sizes = found.minWordSizeForTypos;
    if (sizes !== null && sizes !== undefined) {
      const { oneTypo, twoTypos } = record(sizes, ["oneTypo", "twoTypos"], `${path}.minWordSizeForTypos`);
      count(oneTypo, `${path}.minWordSizeForTypos.oneTypo`);
      count(twoTypos, `${path}.minWordSizeForTypos.twoTypos`);
      if (Number(oneTypo ?? 0) > 255 || Number(twoTypos ?? 0) > 255)
        wrong("an integer up to 255", sizes, `${path}.minWordSizeForTypos`);
      if (typeof oneTypo === "number" && typeof twoTypos === "number" && oneTypo > twoTypos) {
        throw new ServiceError(
          "invalid_settings_typo_tolerance",
          `\`minWordSizeForTypos\` setting is invalid. \`oneTypo\` and \`twoTypos\` fields should be between \`0\` and \`255\`, and \`twoTypos\` should be greater or equals to \`oneTypo\` but found \`oneTypo: ${oneTypo}\` and twoTypos: ${twoTypos}\`.`,
        );
      }
    }
  } else if (name === "embedders" && Object.keys(record(value, Object.keys(value), path)).length > 0) {
    throw notSupported("Vector search (`embedders`)", codeOf(name));
  }
}

type Wrong = (expected: string, found?: unknown, at?: string) => never;

function checkRule(rule: string, at: string): void {
  if (RULES.has(rule) || /^.+:(asc|desc)$/.test(rule)) return;
  throw new ServiceError(
    "invalid_settings_ranking_rules",
    `Invalid value at \`${at}\`: \`${rule}\` ranking rule is invalid. Valid ranking rules are words, typo, sort, proximity, attribute, attributeRank, wordPosition, exactness and custom ranking rules.`,
  );
}

function checkFilterable(value: unknown, path: string, wrong: Wrong): void {
  if (!Array.isArray(value)) return wrong("an array", value, path);
  value.forEach((item: unknown, i) => {
    if (typeof item === "string") return;
    if (!isRecord(item) || !Array.isArray(item.attributePatterns))
      wrong("a string or an object", item, `${path}[${i}]`);
  });
}

/** Synonyms of single words only: a key of several words would have to be found across words of the query. */
function checkSynonyms(value: unknown, path: string, wrong: Wrong, list: (v: unknown, at: string) => void): void {
  if (!isRecord(value)) return wrong("an object", value, path);
  for (const [word, alternatives] of Object.entries(value)) {
    list(alternatives, `${path}.${word}`);
    if (tokenise(word).length > 1) {
      throw notSupported(`A synonym of several words (\`${word}\`)`, "invalid_settings_synonyms");
    }
  }
}

/** A value as the service names it in a message. */
export function kind(value: unknown): string {
  if (value === null || value === undefined) return "null";
  if (Array.isArray(value)) return `an array: \`${JSON.stringify(value)}\``;
  if (typeof value === "object") return `an object: \`${JSON.stringify(value)}\``;
  if (typeof value === "string") return `a string: \`${JSON.stringify(value)}\``;
  if (typeof value === "boolean") return `a boolean: \`${value}\``;
  if (typeof value !== "number") return typeof value;
  return Number.isInteger(value)
    ? `a ${value < 0 ? "negative" : "positive"} integer: \`${value}\``
    : `a number: \`${value}\``;
}
