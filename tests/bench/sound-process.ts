import { readFileSync } from "node:fs";
import { spectrumLevels } from "@/lib/science/acoustics/spectrum-levels";
import { welch } from "@/lib/science/acoustics/welch";
import { median } from "@/lib/science/statistics/descriptive";

/** Spectrum, bands and levels by our code, timed after imports; prints one JSON object. */
const [kind, file = "", rate = ""] = process.argv.slice(2);

function levels(samples: Float64Array) {
  const spectrum = welch(samples, { sampleRateHz: Number(rate), blockLength: 32768 });
  if (spectrum === undefined) throw new Error("no spectrum");
  const { levelADba, levelCDb, levelZDb, bandsDb } = spectrumLevels(spectrum, 0);
  return { levelADba, levelCDb, levelZDb, band1kDb: bandsDb[16] };
}

let result: Record<string, number | undefined> = {};
if (kind !== "idle") {
  const { buffer, byteOffset, byteLength } = readFileSync(file);
  const samples = new Float64Array(buffer.slice(byteOffset, byteOffset + byteLength));
  const times = Array.from({ length: 8 }, () => {
    const start = performance.now();
    result = levels(samples);
    return performance.now() - start;
  });
  result = { ...result, firstMs: times[0], warmMs: median(times.slice(1)) };
}
process.stdout.write(JSON.stringify({ ...result, peakKb: process.resourceUsage().maxRSS }));
