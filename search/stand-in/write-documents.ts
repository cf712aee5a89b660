import { ServiceError } from "./errors";
import { parseJson } from "./json";
import type { Document, Json } from "./paths";
import { isRecord, valuesAt } from "./paths";
import { readCsv } from "./read-csv";
import type { SearchIndex } from "./search-index";

const ID = /^[A-Za-z0-9_-]{1,511}$/;
const FIELDS_MAX = 65_535;
const BAD_ID_HINT =
  "A document identifier can be of type integer or string, only composed of alphanumeric characters (a-z A-Z 0-9), hyphens (-) and underscores (_), and can not be more than 511 bytes.";

/** Adds documents, or merges their top-level fields into those known. One bad identifier refuses all of them. */
export function writeDocuments(
  index: SearchIndex,
  documents: readonly Document[],
  mode: "replace" | "merge",
  askedKey: string | null,
): void {
  const primaryKey = choosePrimaryKey(index, documents, askedKey);
  if (primaryKey === null) return;
  const ids = documents.map((document) => readId(document, primaryKey, index.uid));
  checkFieldCount(index, documents);
  index.primaryKey = primaryKey;
  documents.forEach((document, i) => {
    const id = ids[i] as string;
    const slot = mode === "merge" ? index.slotOf(id) : undefined;
    index.put(id, slot === undefined ? document : { ...index.documents[slot], ...document });
  });
}

function checkFieldCount(index: SearchIndex, documents: readonly Document[]): void {
  const names = new Set(index.fieldDistribution.keys());
  for (const document of documents) for (const name of Object.keys(document)) names.add(name);
  if (names.size <= FIELDS_MAX) return;
  throw new ServiceError(
    "max_fields_limit_exceeded",
    `Index \`${index.uid}\`: A document cannot contain more than 65,535 fields.`,
  );
}

/** The index's key, the asked one, or the only field of the first document whose name ends in "id". */
function choosePrimaryKey(index: SearchIndex, documents: readonly Document[], asked: string | null): string | null {
  if (index.primaryKey !== null) {
    if (asked === null || asked === index.primaryKey) return index.primaryKey;
    throw new ServiceError(
      "index_primary_key_already_exists",
      `Index \`${index.uid}\`: Index already has a primary key: \`${index.primaryKey}\`.`,
    );
  }
  const first = documents[0];
  if (asked !== null || first === undefined) return asked;
  const candidates = Object.keys(first).filter((field) => field.toLowerCase().endsWith("id"));
  const hint = "Please specify the primary key manually using the `primaryKey` query parameter.";
  if (candidates.length > 1) {
    throw new ServiceError(
      "index_primary_key_multiple_candidates_found",
      `Index \`${index.uid}\`: The primary key inference failed as the engine found ${candidates.length} fields ending with \`id\` in their names: '${candidates[0]}' and '${candidates[1]}'. ${hint}`,
    );
  }
  const only = candidates[0];
  if (only !== undefined) return only;
  throw new ServiceError(
    "index_primary_key_no_candidate_found",
    `Index \`${index.uid}\`: The primary key inference failed as the engine did not find any field ending with \`id\` in its name. ${hint}`,
  );
}

function readId(document: Document, primaryKey: string, uid: string): string {
  const [value, ...more] = valuesAt(document, primaryKey);
  if (value === undefined) {
    const text = JSON.stringify(document);
    throw new ServiceError(
      "missing_document_id",
      `Index \`${uid}\`: Document doesn't have a \`${primaryKey}\` attribute: \`${text}\`.`,
    );
  }
  const id = toId(value);
  if (id === undefined || more.length > 0) {
    throw new ServiceError(
      "invalid_document_id",
      `Index \`${uid}\`: Document identifier \`${JSON.stringify(value)}\` is invalid. ${BAD_ID_HINT}`,
    );
  }
  return id;
}

function toId(value: Json): string | undefined {
  if (typeof value === "number" && Number.isInteger(value)) return String(value);
  return typeof value === "string" && ID.test(value) ? value : undefined;
}

/** Identifiers of a delete-batch request, each an integer or a string. */
export function readIds(body: unknown): string[] {
  if (!Array.isArray(body))
    throw new ServiceError("bad_request", "Invalid value type: expected an array of document identifiers");
  return body.map((each: unknown) => {
    const id = typeof each === "string" || typeof each === "number" ? toId(each) : undefined;
    if (id === undefined) {
      throw new ServiceError(
        "invalid_document_id",
        `Document identifier \`${JSON.stringify(each)}\` is invalid. ${BAD_ID_HINT}`,
      );
    }
    return id;
  });
}

/** Documents of an add request: one object, an array of objects, one object a line, or a table. */
export function readDocuments(text: string, contentType: string, delimiter: string): Document[] {
  const name = contentType === "application/x-ndjson" ? "ndjson" : contentType === "text/csv" ? "csv" : "json";
  if (text.trim() === "") throw new ServiceError("missing_payload", `A ${name} payload is missing.`);
  if (name === "csv") return readCsv(text, delimiter);
  const found: unknown[] = [];
  try {
    if (name === "ndjson") {
      for (const line of text.split("\n")) if (line.trim() !== "") found.push(parseJson(line));
    } else {
      const value = parseJson(text);
      found.push(...(Array.isArray(value) ? [] : [value]));
      if (Array.isArray(value)) for (const item of value as unknown[]) found.push(item);
    }
  } catch (error) {
    const said = error instanceof Error ? error.message : String(error);
    throw malformed(name, said);
  }
  return found.map((each) => {
    if (!isRecord(each)) throw malformed(name, "expected a document, an object");
    return each as Document;
  });
}

function malformed(name: string, said: string): ServiceError {
  return new ServiceError(
    "malformed_payload",
    `The \`${name}\` payload provided is malformed. \`Couldn't serialize document value: ${said}\`.`,
  );
}
