import { ServiceError, notSupported } from "./errors";
import { parseJson } from "./json";
import { isRecord, ownValue } from "./paths";
import { kind } from "./settings-check";
import type { MatchingStrategy } from "./text-match";

export type SearchParams = {
  q: string | null;
  filter: unknown;
  facets: string[] | null;
  sort: string[];
  offset: number;
  limit: number;
  page: number | null;
  hitsPerPage: number | null;
  attributesToRetrieve: string[];
  attributesToHighlight: string[];
  attributesToCrop: string[];
  attributesToSearchOn: string[] | null;
  cropLength: number;
  cropMarker: string;
  highlightPreTag: string;
  highlightPostTag: string;
  matchingStrategy: MatchingStrategy;
  showMatchesPosition: boolean;
  retrieveVectors: boolean;
  distinct: string | null;
  showRankingScore: boolean;
  showRankingScoreDetails: boolean;
  rankingScoreThreshold: number | null;
};

type Shape = "string" | "count" | "flag" | "strings" | "filter" | "locales" | "share" | "refused";

/** Every parameter of a search, by the shape of its value; `refused` ones are the service's, not this server's. */
const SHAPES: Readonly<Record<string, Shape>> = {
  q: "string",
  vector: "refused",
  media: "refused",
  offset: "count",
  limit: "count",
  page: "count",
  hitsPerPage: "count",
  attributesToRetrieve: "strings",
  retrieveVectors: "flag",
  attributesToCrop: "strings",
  cropLength: "count",
  attributesToHighlight: "strings",
  showMatchesPosition: "flag",
  showRankingScore: "flag",
  showRankingScoreDetails: "flag",
  showPerformanceDetails: "refused",
  useNetwork: "refused",
  filter: "filter",
  sort: "strings",
  distinct: "string",
  facets: "strings",
  highlightPreTag: "string",
  highlightPostTag: "string",
  cropMarker: "string",
  matchingStrategy: "string",
  attributesToSearchOn: "strings",
  hybrid: "refused",
  rankingScoreThreshold: "share",
  locales: "locales",
  personalize: "refused",
};
const FACET_SHAPES: Readonly<Record<string, Shape>> = {
  facetName: "string",
  facetQuery: "string",
  exhaustiveFacetCount: "flag",
};
const STRATEGIES = ["last", "all", "frequency"];

const snake = (name: string): string => name.replace(/[A-Z]/g, (letter) => `_${letter.toLowerCase()}`);
export const searchCode = (name: string): string => `invalid_search_${snake(name)}`;

/** Checks a search body as the service does: unknown names and wrong types are refused with their own codes. */
export function readSearch(body: unknown, extra: Readonly<Record<string, Shape>> = {}): SearchParams {
  if (!isRecord(body))
    throw new ServiceError("bad_request", `Invalid value type: expected an object, but found ${kind(body)}`);
  const shapes = { ...SHAPES, ...extra };
  for (const [name, value] of Object.entries(body)) {
    const shape = ownValue(shapes, name);
    if (shape === undefined) {
      const list = Object.keys(shapes)
        .map((each) => `\`${each}\``)
        .join(", ");
      throw new ServiceError("bad_request", `Unknown field \`${name}\`: expected one of ${list}`);
    }
    if (value !== null && value !== undefined) checkShape(name, value, shape);
  }
  const strategy = body.matchingStrategy ?? "last";
  if (typeof strategy !== "string" || !STRATEGIES.includes(strategy)) {
    throw new ServiceError(
      searchCode("matchingStrategy"),
      `Unknown value \`${String(strategy)}\` at \`.matchingStrategy\`: expected one of \`last\`, \`all\`, \`frequency\``,
    );
  }
  const text = (name: string, fallback: string): string => (typeof body[name] === "string" ? body[name] : fallback);
  const count = (name: string, fallback: number): number => (typeof body[name] === "number" ? body[name] : fallback);
  const list = (name: string): string[] | null => (Array.isArray(body[name]) ? (body[name] as string[]) : null);
  return {
    q: typeof body.q === "string" ? body.q : null,
    filter: body.filter,
    facets: list("facets"),
    sort: list("sort") ?? [],
    offset: count("offset", 0),
    limit: count("limit", 20),
    page: typeof body.page === "number" ? body.page : null,
    hitsPerPage: typeof body.hitsPerPage === "number" ? body.hitsPerPage : null,
    attributesToRetrieve: list("attributesToRetrieve") ?? ["*"],
    attributesToHighlight: list("attributesToHighlight") ?? [],
    attributesToCrop: list("attributesToCrop") ?? [],
    attributesToSearchOn: list("attributesToSearchOn"),
    cropLength: count("cropLength", 10),
    cropMarker: text("cropMarker", "…"),
    highlightPreTag: text("highlightPreTag", "<em>"),
    highlightPostTag: text("highlightPostTag", "</em>"),
    matchingStrategy: strategy as MatchingStrategy,
    showMatchesPosition: body.showMatchesPosition === true,
    retrieveVectors: body.retrieveVectors === true,
    distinct: typeof body.distinct === "string" ? body.distinct : null,
    showRankingScore: body.showRankingScore === true,
    showRankingScoreDetails: body.showRankingScoreDetails === true,
    rankingScoreThreshold: typeof body.rankingScoreThreshold === "number" ? body.rankingScoreThreshold : null,
  };
}

export type FacetSearchParams = SearchParams & { facetName: string; facetQuery: string | null };

export function readFacetSearch(body: unknown): FacetSearchParams {
  if (isRecord(body) && (body.facetName === undefined || body.facetName === null)) {
    throw new ServiceError("missing_facet_search_facet_name", "Missing field `facetName`");
  }
  const params = readSearch(body, FACET_SHAPES);
  const { facetName, facetQuery } = body as Record<string, unknown>;
  return { ...params, facetName: String(facetName), facetQuery: typeof facetQuery === "string" ? facetQuery : null };
}

function checkShape(name: string, value: unknown, shape: Shape): void {
  const code = Object.hasOwn(FACET_SHAPES, name) ? `invalid_facet_search_${snake(name)}` : searchCode(name);
  const wrong = (expected: string, found: unknown, at = ""): never => {
    throw new ServiceError(
      code,
      `Invalid value type at \`.${name}${at}\`: expected ${expected}, but found ${kind(found)}`,
    );
  };
  switch (shape) {
    case "string":
      if (typeof value !== "string") wrong("a string", value);
      break;
    case "count":
      if (!Number.isSafeInteger(value)) wrong("a positive integer", value);
      else if ((value as number) < 0)
        throw new ServiceError(
          code,
          `Invalid value type at \`.${name}\`: expected a positive integer, but found ${kind(value)}`,
        );
      break;
    case "flag":
      if (typeof value !== "boolean") wrong("a boolean", value);
      break;
    case "strings":
    case "locales":
      if (!Array.isArray(value)) wrong("an array", value);
      else value.forEach((item: unknown, i) => typeof item === "string" || wrong("a string", item, `[${i}]`));
      break;
    case "share":
      if (typeof value !== "number") wrong("a number", value);
      else if (value < 0 || value > 1)
        throw new ServiceError(
          code,
          `Invalid value at \`.${name}\`: the value of \`${name}\` is invalid, expected a float between \`0.0\` and \`1.0\`.`,
        );
      break;
    case "refused":
      if (value !== false) throw notSupported(`The search parameter \`${name}\``, code);
      break;
    default:
  }
}

/** A search body out of the address: numbers, booleans and comma lists are read from their texts. */
export function readSearchAddress(query: URLSearchParams): Record<string, unknown> {
  const body: Record<string, unknown> = {};
  for (const [name, text] of query) {
    const shape = ownValue(SHAPES, name);
    if (shape === undefined) {
      const list = Object.keys(SHAPES)
        .map((each) => `\`${each}\``)
        .join(", ");
      throw new ServiceError("bad_request", `Unknown parameter \`${name}\`: expected one of ${list}`);
    }
    if (shape === "count") body[name] = readCount(name, text, searchCode(name));
    else if (shape === "flag" || (shape === "refused" && text === "false"))
      body[name] = readFlag(name, text, searchCode(name));
    else if (shape === "strings" || shape === "locales") body[name] = text === "" ? [] : text.split(",");
    else if (shape === "share") body[name] = Number(text);
    else if (shape === "filter" && text.trimStart().startsWith("[")) body[name] = parseOr(text);
    else body[name] = text;
  }
  return body;
}

export function readCount(name: string, text: string, code: string): number {
  if (/^\d+$/.test(text) && Number.isSafeInteger(Number(text))) return Number(text);
  throw new ServiceError(
    code,
    `Invalid value in parameter \`${name}\`: could not parse \`${text}\` as a positive integer`,
  );
}

export function readFlag(name: string, text: string, code: string): boolean {
  if (text === "true") return true;
  if (text === "false") return false;
  throw new ServiceError(
    code,
    `Invalid value in parameter \`${name}\`: could not parse \`${text}\` as a boolean, expected either \`true\` or \`false\``,
  );
}

function parseOr(text: string): unknown {
  try {
    return parseJson(text);
  } catch {
    return text;
  }
}
