import { performance } from "node:perf_hooks";

export interface Quantiles {
  p50: number;
  p95: number;
}

/** Half and 95 % of the times, in milliseconds, that asking takes, one question after the other, some asked before. */
export async function quantiles<T>(
  asked: readonly T[],
  ask: (question: T) => Promise<unknown>,
  warmUps = 5,
): Promise<Quantiles> {
  for (const question of asked.slice(0, warmUps)) await ask(question);
  const times: number[] = [];
  for (const question of asked) {
    const start = performance.now();
    await ask(question);
    times.push(performance.now() - start);
  }
  times.sort((a, b) => a - b);
  const at = (part: number): number => times[Math.min(times.length - 1, Math.floor(part * times.length))] ?? Number.NaN;
  return { p50: at(0.5), p95: at(0.95) };
}
