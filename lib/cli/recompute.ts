import { appDb, closeDbs } from "@/db/client/handles";
import { recomputePublications, recomputeStandings } from "@/lib/server/publishing/recompute";

/**
 * `npm run recompute`: computes every current publication and the newest standings again from the raw readings and
 * compares digests with what was published. Exit status 1 where one differs. `recompute -- standings` alone, or
 * `recompute -- publications`.
 */
async function main(): Promise<number> {
  const what = process.argv[2] ?? "all";
  if (!["all", "publications", "standings"].includes(what)) {
    process.stderr.write("usage: npm run recompute [-- publications | standings]\n");
    return 2;
  }
  const reports = [];
  if (what !== "standings") reports.push(await recomputePublications(appDb()));
  if (what !== "publications") reports.push(await recomputeStandings(appDb()));
  for (const report of reports) {
    process.stdout.write(`${report.what}: ${report.same} the same, ${report.differing.length} differing\n`);
    for (const each of report.differing) process.stdout.write(`  differs: ${each}\n`);
  }
  return reports.some((report) => report.differing.length > 0) ? 1 : 0;
}

main()
  .then((status) => (process.exitCode = status))
  .catch((error: unknown) => {
    process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
    process.exitCode = 2;
  })
  .finally(() => closeDbs());
