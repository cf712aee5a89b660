import { analyseLog } from "@/lib/science/logs/analyse-log";
import type { LogChoice } from "@/lib/science/logs/choice";
import { LogReader } from "@/lib/science/logs/log-reader";

export const bytesOf = (text: string) => new TextEncoder().encode(text);

/** Reads bytes in chunks of a size (whole by default). */
export function readBytes(bytes: Uint8Array, choice: LogChoice = {}, chunk = bytes.length || 1) {
  const reader = new LogReader(choice);
  for (let at = 0; at < bytes.length; at += chunk) reader.push(bytes.subarray(at, at + chunk));
  return reader.finish();
}

export const readText = (text: string, choice: LogChoice = {}, chunk?: number) =>
  readBytes(bytesOf(text), choice, chunk);
export const report = (text: string, choice: LogChoice = {}) => analyseLog(readText(text, choice));
export const list = (values: Float64Array | undefined) => (values ? [...values] : undefined);
