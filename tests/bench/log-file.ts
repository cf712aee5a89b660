import { closeSync, openSync, writeSync } from "node:fs";
import { createRandom } from "@/lib/science/statistics/random";

/** Writes a made-up log of time, two temperatures and a level, CRLF, and gives its size in bytes. */
export function writeLog(path: string, rows: number): number {
  const random = createRandom(2026);
  const file = openSync(path, "w");
  let size = writeSync(file, "time_s,sensor_degC,ambient_degC,LAeq_dB(A)\r\n");
  let block: string[] = [];
  for (let i = 0; i < rows; i++) {
    const t = i * 0.5;
    const ambient = 22 + 0.02 * random.normal();
    const sensor = ambient + 41 - 30 * Math.exp(-t / 300) + 0.05 * random.normal();
    block.push(
      `${t.toFixed(1)},${sensor.toFixed(6)},${ambient.toFixed(6)},${(38 + 0.3 * random.normal()).toFixed(3)}\r\n`,
    );
    if (block.length === 10_000 || i === rows - 1) {
      size += writeSync(file, block.join(""));
      block = [];
    }
  }
  closeSync(file);
  return size;
}
