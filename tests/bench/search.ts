import { DESIGNS_INDEX, DOCUMENT_KEY, FACET_FIELDS, INDEX_SETTINGS, RANGE_FIELDS, binField } from "@/search/settings";
import { openSearchService } from "../setup/search-service";
import { inventedDocument, inventedWord, seeded } from "./search-documents";

const SIZES = (process.env.BENCH_SIZES ?? "1000,10000,100000").split(",").map(Number);
const QUERIES = Number(process.env.BENCH_QUERIES ?? "60");
const BATCH = 1000;

type Quantiles = { p50Ms: number; p95Ms: number; cpuMs: number };

function quantiles(timesMs: number[], cpuMs: number): Quantiles {
  const sorted = [...timesMs].sort((a, b) => a - b);
  const at = (part: number): number => sorted[Math.min(sorted.length - 1, Math.floor(part * sorted.length))] ?? NaN;
  return { p50Ms: at(0.5), p95Ms: at(0.95), cpuMs };
}

async function measure(run: (turn: number) => Promise<unknown>): Promise<Quantiles> {
  for (let turn = 0; turn < 5; turn += 1) await run(turn);
  const timesMs: number[] = [];
  const cpu = process.cpuUsage();
  for (let turn = 0; turn < QUERIES; turn += 1) {
    const start = performance.now();
    await run(turn);
    timesMs.push(performance.now() - start);
  }
  const used = process.cpuUsage(cpu);
  return quantiles(timesMs, (used.user + used.system) / 1000 / QUERIES);
}

/** A word as people type it: a third with one letter wrong, a third cut short, else as it is. */
function typed(random: () => number): string {
  const word = inventedWord(random);
  const kind = random();
  if (kind < 0.33 && word.length >= 5) return `${word.slice(0, 2)}x${word.slice(3)}`;
  return kind < 0.66 && word.length > 4 ? word.slice(0, -2) : word;
}

/** The index page's question: words, two choices, every facet, the histograms, a sort, one page. */
async function benchSize(size: number): Promise<void> {
  const service = await openSearchService();
  const index = service.client.index(`${DESIGNS_INDEX}-bench-${process.pid}`);
  const random = seeded(size);
  await index.updateSettings(INDEX_SETTINGS as never).waitTask();
  const start = performance.now();
  const cpuBefore = process.cpuUsage();
  for (let from = 0; from < size; from += BATCH) {
    const documents = Array.from({ length: Math.min(BATCH, size - from) }, (_, i) =>
      inventedDocument(from + i, random),
    );
    await index.addDocuments(documents, { primaryKey: DOCUMENT_KEY }).waitTask();
  }
  await index.search("");
  const indexMs = performance.now() - start;
  const indexCpu = process.cpuUsage(cpuBefore);
  const facets = [...FACET_FIELDS.slice(0, 12)];
  const histograms = RANGE_FIELDS.map(({ field }) => binField(field));
  const common = { sort: ["level:asc"], page: 1, hitsPerPage: 20, matchingStrategy: "all" as const };
  const filter = (): string[] => [
    `stages = "stages-${Math.floor(random() * 6)}"`,
    `gap >= ${(random() * 3).toFixed(2)}`,
  ];
  const words = (): string => Array.from({ length: 1 + Math.floor(random() * 2) }, () => typed(random)).join(" ");
  const rows: Record<string, Quantiles> = {
    "health, for the cost of a request": await measure(() => service.client.health()),
    "browse, 12 facets": await measure(() => index.search("", { ...common, facets })),
    "browse, all facets and histograms": await measure(() =>
      index.search("", { ...common, facets: [...FACET_FIELDS, ...histograms] }),
    ),
    "filter, 12 facets": await measure(() => index.search("", { ...common, facets, filter: filter() })),
    "words, filter, 12 facets": await measure(() => index.search(words(), { ...common, facets, filter: filter() })),
    "words, no facets": await measure(() => index.search(words(), common)),
    "multi-search of three with words": await measure(() => {
      const q = words();
      const query = (group: string) => ({ indexUid: index.uid, q, filter: filter(), facets: [group], hitsPerPage: 0 });
      return service.client.multiSearch({ queries: [{ ...query("frame"), facets }, query("hand"), query("material")] });
    }),
  };
  process.stdout.write(
    `${size} documents, indexed in ${Math.round(indexMs)} ms (${Math.round((indexCpu.user + indexCpu.system) / 1000)} ms of CPU, client and server), ${Math.round(process.memoryUsage().rss / 2 ** 20)} MB\n`,
  );
  for (const [name, { p50Ms, p95Ms, cpuMs }] of Object.entries(rows)) {
    process.stdout.write(
      `  ${name.padEnd(38)} p50 ${p50Ms.toFixed(1).padStart(7)} ms   p95 ${p95Ms.toFixed(1).padStart(7)} ms   cpu ${cpuMs.toFixed(1).padStart(6)} ms\n`,
    );
  }
  await index.delete().waitTask();
  await service.close();
}

for (const size of SIZES) await benchSize(size);
