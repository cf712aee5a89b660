import { createHash, timingSafeEqual } from "node:crypto";

/** Compares without telling by time how much was right. */
export function isSameSecret(a: string, b: string): boolean {
  const digest = (text: string): Buffer => createHash("sha256").update(text).digest();
  return timingSafeEqual(digest(a), digest(b));
}
