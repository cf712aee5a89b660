import { createHash } from "node:crypto";
import { canonicalJson } from "@/lib/domain/canonical-json";

/** SHA-256, in hexadecimal, over the canonical JSON of some data. */
export function digestOf(value: unknown): string {
  return createHash("sha256").update(canonicalJson(value)).digest("hex");
}
