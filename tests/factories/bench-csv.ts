/** Uniform draws in ±1 from a multiplicative congruential generator (Park and Miller 1988: 16807, 2^31 − 1). */
function draws(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state * 16_807) % 2_147_483_647;
    return (2 * state) / 2_147_483_647 - 1;
  };
}

const clock = (s: number) =>
  [Math.floor(s / 3600), Math.floor(s / 60) % 60, s % 60].map((part) => String(part).padStart(2, "0")).join(":");

export interface RiseLog {
  /** Rise that is approached with τ of 240 s, K, over an ambient of 22 °C. */
  finalK: number;
  lengthS?: number;
  fahrenheit?: boolean;
  /** Semicolons, decimal commas and clock times instead of commas, points and seconds. */
  continental?: boolean;
  /** Rows after the head, by their place, replaced by this text. */
  broken?: Readonly<Record<number, string>>;
}

/** Temperature over time with its ambient, a row every 5 s: ΔT(t) = finalK (1 − exp(−t/240 s)), noise ±0.05 K. */
export function riseCsv({ finalK, lengthS = 3600, fahrenheit, continental, broken = {} }: RiseLog): string {
  const noise = draws(11);
  const write = (c: number) => {
    const text = (fahrenheit ? (c * 9) / 5 + 32 : c).toFixed(3);
    return continental ? text.replace(".", ",") : text;
  };
  const unit = fahrenheit ? "°F" : "°C";
  const split = continental ? ";" : ",";
  const rows = [[continental ? "Uhrzeit" : "time (s)", `heater (${unit})`, `ambient (${unit})`].join(split)];
  for (let i = 0; i * 5 <= lengthS; i += 1) {
    const t = i * 5;
    const ambient = 22 + 0.01 * noise();
    const sensor = 22 + finalK * (1 - Math.exp(-t / 240)) + 0.05 * noise();
    rows.push(broken[i] ?? [continental ? clock(32_400 + t) : String(t), write(sensor), write(ambient)].join(split));
  }
  return `${rows.join("\r\n")}\r\n`;
}

/** A level every 0.5 s that jumps between two values, dB(A). */
export function levelCsv(low: number, high: number, rows: number): string {
  const lines = Array.from(
    { length: rows },
    (_, i) => `${(i * 0.5).toFixed(1)}\t${(i % 2 === 0 ? low : high).toFixed(1)}`,
  );
  return `time (s)\tLAeq (dB(A))\n${lines.join("\n")}\n`;
}

export const csvRequest = (csv: string): Request =>
  new Request("http://bench.example/", { method: "POST", body: csv, headers: { "content-type": "text/csv" } });
