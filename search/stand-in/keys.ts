import { createHmac, randomUUID } from "node:crypto";
import { ServiceError } from "./errors";
import { isRecord } from "./paths";
import { isSameSecret } from "./secret";
import { kind } from "./settings-check";
import { coversIndex, readTenantToken, ruleFor } from "./tenant-token";

export type ApiKey = {
  name: string | null;
  description: string | null;
  key: string;
  uid: string;
  actions: string[];
  indexes: string[];
  expiresAt: string | null;
  createdAt: string;
  updatedAt: string;
};
/**
 * What a caller may do: `index` undefined asks for the action on no index in particular. `filterFor` gives the filter
 * that a token ties searches of an index to.
 */
export type Caller = { allows: (action: string, index?: string) => boolean; filterFor?: (index: string) => unknown };

const AREAS: Readonly<Record<string, readonly string[]>> = {
  documents: ["add", "get", "delete"],
  indexes: ["create", "get", "update", "delete", "swap", "compact"],
  tasks: ["cancel", "delete", "get", "compact"],
  settings: ["get", "update"],
  stats: ["get"],
  metrics: ["get"],
  dumps: ["create"],
  snapshots: ["create"],
  keys: ["create", "get", "update", "delete"],
  experimental: ["get", "update"],
  network: ["get", "update"],
  chats: ["get", "delete"],
  chatsSettings: ["get", "update"],
  webhooks: ["get", "update", "delete", "create"],
};
const ACTIONS = [
  "*",
  "*.get",
  "search",
  "version",
  "export",
  "chatCompletions",
  ...Object.entries(AREAS).flatMap(([area, verbs]) => [`${area}.*`, ...verbs.map((verb) => `${area}.${verb}`)]),
];
const UUID = /^[0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12}$/i;
const INDEX_PATTERN = /^(\*|[A-Za-z0-9_-]+\*?)$/;

export class KeyRing {
  private readonly byUid = new Map<string, ApiKey>();

  constructor(private readonly masterKey: string) {
    const none = { indexes: ["*"], expiresAt: null };
    this.create({
      ...none,
      name: "Default Chat API Key",
      description: "Use it to chat and search from the frontend",
      actions: ["chatCompletions", "search"],
    });
    this.create({
      ...none,
      name: "Default Read-Only Admin API Key",
      description:
        "Use it to read information across the whole database. Caution! Do not expose this key on a public frontend",
      actions: ["*.get", "keys.get"],
    });
    this.create({
      ...none,
      name: "Default Admin API Key",
      description: "Use it for anything that is not a search operation. Caution! Do not expose it on a public frontend",
      actions: ["*"],
    });
    this.create({
      ...none,
      name: "Default Search API Key",
      description: "Use it to search from the frontend",
      actions: ["search"],
    });
  }

  /** Who sends this Authorization header. Missing and unknown keys are refused. */
  identify(authorization: string | undefined, nowMs: number): Caller {
    if (authorization === undefined) {
      throw new ServiceError(
        "missing_authorization_header",
        "The Authorization header is missing. It must use the bearer authorization method.",
      );
    }
    const secret = authorization.startsWith("Bearer ") ? authorization.slice(7) : "";
    if (isSameSecret(secret, this.masterKey)) return { allows: () => true };
    const key = [...this.byUid.values()].filter((each) => isSameSecret(secret, each.key))[0];
    if (key !== undefined) return callerOf(key, nowMs);
    const token = readTenantToken(secret, (uid) => this.byUid.get(uid)?.key, nowMs);
    const parent = token === undefined ? undefined : this.byUid.get(token.keyUid);
    if (token === undefined || parent === undefined) throw invalidKey();
    const { allows } = callerOf(parent, nowMs);
    return {
      allows: (action, index) =>
        action === "search" &&
        allows(action, index) &&
        (index === undefined || ruleFor(token.rules, index) !== undefined),
      filterFor: (index) => ruleFor(token.rules, index)?.filter,
    };
  }

  /** Newest first. */
  list(): ApiKey[] {
    return [...this.byUid.values()].reverse();
  }

  get(uidOrKey: string): ApiKey {
    const key = this.byUid.get(uidOrKey) ?? this.list().find((each) => isSameSecret(uidOrKey, each.key));
    if (key === undefined) throw new ServiceError("api_key_not_found", `API key \`${uidOrKey}\` not found.`);
    return key;
  }

  create(body: unknown): ApiKey {
    if (!isRecord(body))
      throw new ServiceError("bad_request", `Invalid value type: expected an object, but found ${kind(body)}`);
    checkFields(body, ["name", "description", "uid", "actions", "indexes", "expiresAt"]);
    for (const field of ["actions", "indexes", "expiresAt"]) {
      if (body[field] !== undefined) continue;
      const code = `missing_api_key_${field.replace("A", "_a")}`;
      throw new ServiceError(code, `Missing field \`${field}\``);
    }
    const uid = body.uid === undefined || body.uid === null ? randomUUID() : String(body.uid);
    if (!UUID.test(uid)) {
      throw new ServiceError("invalid_api_key_uid", `Invalid value at \`.uid\`: \`${uid}\` is not a valid UUID.`);
    }
    if (this.byUid.has(uid)) {
      throw new ServiceError(
        "api_key_already_exists",
        `\`uid\` field value \`${uid}\` is already an existing API key.`,
      );
    }
    const now = new Date().toISOString();
    const key: ApiKey = {
      name: readText(body, "name"),
      description: readText(body, "description"),
      key: createHmac("sha256", this.masterKey).update(uid).digest("hex"),
      uid,
      actions: readList(body, "actions", (each) => ACTIONS.includes(each)),
      indexes: readList(body, "indexes", (each) => INDEX_PATTERN.test(each)),
      expiresAt: readExpiry(body.expiresAt),
      createdAt: now,
      updatedAt: now,
    };
    this.byUid.set(uid, key);
    return key;
  }

  /** Name and description may change; all else is refused as fixed. */
  update(uidOrKey: string, body: unknown): ApiKey {
    if (!isRecord(body))
      throw new ServiceError("bad_request", `Invalid value type: expected an object, but found ${kind(body)}`);
    for (const field of ["uid", "actions", "indexes", "expiresAt", "createdAt", "updatedAt"]) {
      if (body[field] === undefined) continue;
      const code = `immutable_api_key_${field.replace(/[A-Z]/, (letter) => `_${letter.toLowerCase()}`)}`;
      throw new ServiceError(code, `Immutable field \`${field}\`: expected one of \`description\`, \`name\``);
    }
    checkFields(body, ["name", "description"]);
    const key = this.get(uidOrKey);
    if (body.name !== undefined) key.name = readText(body, "name");
    if (body.description !== undefined) key.description = readText(body, "description");
    key.updatedAt = new Date().toISOString();
    return key;
  }

  delete(uidOrKey: string): void {
    this.byUid.delete(this.get(uidOrKey).uid);
  }
}

export function invalidKey(): ServiceError {
  return new ServiceError("invalid_api_key", "The provided API key is invalid.");
}

function grants(actions: readonly string[], wanted: string): boolean {
  const [area, verb] = wanted.split(".");
  return actions.some(
    (each) =>
      each === "*" ||
      each === wanted ||
      each === `${area}.*` ||
      (each === "*.get" && (verb === "get" || wanted === "version") && area !== "keys"),
  );
}

function callerOf(key: ApiKey, nowMs: number): Caller {
  if (key.expiresAt !== null && Date.parse(key.expiresAt) <= nowMs) throw invalidKey();
  const covers = (index: string): boolean => key.indexes.some((pattern) => coversIndex(pattern, index));
  return { allows: (action, index) => grants(key.actions, action) && (index === undefined || covers(index)) };
}

function checkFields(body: Record<string, unknown>, known: readonly string[]): void {
  const odd = Object.keys(body).find((field) => !known.includes(field));
  if (odd === undefined) return;
  const list = known.map((each) => `\`${each}\``).join(", ");
  throw new ServiceError("bad_request", `Unknown field \`${odd}\`: expected one of ${list}`);
}

function readText(body: Record<string, unknown>, field: string): string | null {
  const value = body[field];
  if (value === undefined || value === null) return null;
  if (typeof value === "string") return value;
  throw new ServiceError(
    `invalid_api_key_${field}`,
    `Invalid value type at \`.${field}\`: expected a string, but found ${kind(value)}`,
  );
}

function readList(
  body: Record<string, unknown>,
  field: "actions" | "indexes",
  isKnown: (each: string) => boolean,
): string[] {
  const value = body[field];
  const code = `invalid_api_key_${field}`;
  if (!Array.isArray(value)) {
    throw new ServiceError(code, `Invalid value type at \`.${field}\`: expected an array, but found ${kind(value)}`);
  }
  return value.map((each: unknown, i) => {
    if (typeof each === "string" && isKnown(each)) return each;
    const list = ACTIONS.map((action) => `\`${action}\``).join(", ");
    const said =
      field === "actions"
        ? `Unknown value \`${String(each)}\` at \`.actions[${i}]\`: expected one of ${list}`
        : `Invalid value at \`.indexes[${i}]\`: \`${String(each)}\` is not a valid index uid pattern. Index uid patterns can be an integer or a string containing only alphanumeric characters, hyphens (-), underscores (_), and optionally end with a star (*).`;
    throw new ServiceError(code, said);
  });
}

function readExpiry(value: unknown): string | null {
  if (value === null) return null;
  const at = typeof value === "string" ? Date.parse(value) : NaN;
  if (Number.isNaN(at) || at <= Date.now()) {
    throw new ServiceError(
      "invalid_api_key_expires_at",
      `Invalid value at \`.expiresAt\`: \`${String(value)}\` is not a valid date. It should follow the RFC 3339 format to represents a date or datetime in the future or specified as a null value. e.g. 'YYYY-MM-DD' or 'YYYY-MM-DD HH:MM:SS'.`,
    );
  }
  return new Date(at).toISOString().replace(".000Z", "Z");
}
