import { createHmac } from "node:crypto";
import { ServiceError } from "./errors";
import { isRecord, ownValue } from "./paths";
import { isSameSecret } from "./secret";

/** What a token lets its holder search: patterns of index names, each with a filter that is always applied. */
export type SearchRules = ReadonlyMap<string, unknown>;
export type TenantToken = { keyUid: string; rules: SearchRules };

const HASHES: Readonly<Record<string, string>> = { HS256: "sha256", HS384: "sha384", HS512: "sha512" };

/**
 * A token that a key's holder made for somebody else: JSON Web Token (RFC 7519) signed with the key itself.
 * Undefined for what isn't one or isn't rightly signed. @throws ServiceError when it has run out
 */
export function readTenantToken(
  text: string,
  keyOf: (uid: string) => string | undefined,
  nowMs: number,
): TenantToken | undefined {
  const [head = "", body = "", signature = "", ...more] = text.split(".");
  const hash = ownValue(HASHES, String(readPart(head)?.alg));
  const claims = readPart(body);
  if (hash === undefined || claims === undefined || more.length > 0) return undefined;
  const keyUid = String(claims.apiKeyUid);
  const key = keyOf(keyUid);
  const rules = readRules(claims.searchRules);
  if (key === undefined || rules === undefined) return undefined;
  const right = createHmac(hash, key).update(`${head}.${body}`).digest("base64url");
  if (!isSameSecret(signature, right)) return undefined;
  const now = Math.floor(nowMs / 1000);
  if (typeof claims.exp === "number" && now > claims.exp) {
    throw new ServiceError(
      "invalid_api_key",
      `Tenant token expired. Was valid up to \`${claims.exp}\` and we're now \`${now}\`.`,
    );
  }
  return { keyUid, rules };
}

/** The filter of the narrowest rule that covers an index: its own name, else the longest pattern; null for none. */
export function ruleFor(rules: SearchRules, index: string): { filter: unknown } | undefined {
  const covering = [...rules.keys()].filter((pattern) => coversIndex(pattern, index));
  const isExact = (pattern: string): number => Number(!pattern.endsWith("*"));
  const [narrowest] = covering.sort((a, b) => isExact(b) - isExact(a) || b.length - a.length);
  return narrowest === undefined ? undefined : { filter: rules.get(narrowest) ?? null };
}

/** A search's filter and a rule's, both to be met. */
export function bothFilters(asked: unknown, rule: unknown): unknown {
  if (rule === null || rule === undefined) return asked;
  if (asked === null || asked === undefined) return rule;
  const list = (filter: unknown): unknown[] => (Array.isArray(filter) ? (filter as unknown[]) : [filter]);
  return [...list(asked), ...list(rule)];
}

/** Whether a name, or a pattern that ends in a star, covers an index. */
export function coversIndex(pattern: string, index: string): boolean {
  return pattern.endsWith("*") ? index.startsWith(pattern.slice(0, -1)) : pattern === index;
}

function readRules(value: unknown): SearchRules | undefined {
  if (Array.isArray(value)) return new Map(value.map((pattern: unknown) => [String(pattern), null]));
  if (!isRecord(value)) return undefined;
  return new Map(
    Object.entries(value).map(([pattern, rule]): [string, unknown] => [pattern, isRecord(rule) ? rule.filter : null]),
  );
}

function readPart(part: string): Record<string, unknown> | undefined {
  try {
    const value: unknown = JSON.parse(Buffer.from(part, "base64url").toString("utf8"));
    return isRecord(value) ? value : undefined;
  } catch {
    return undefined;
  }
}
