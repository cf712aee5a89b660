import { appDb, closeDbs } from "@/db/client/handles";
import { READER_VERSION } from "@/lib/science/geometry/reader-version";
import { recomputeGeometry } from "@/lib/server/designs/recompute-geometry";
import { recomputePublications, recomputeStandings } from "@/lib/server/publishing/recompute";
import { adoptRunningDemo } from "./launch/running-demo";

/**
 * `npm run recompute`: computes every current publication and the newest standings again from the raw readings and
 * compares digests with what was published. Exit status 1 where one differs. What `npm run demo` filled in has no
 * readings and is counted apart. `recompute -- standings` or `recompute -- publications` does one alone.
 * `recompute -- geometry` reads every stored model again by the reader as it is now and tells what changed; a change
 * between versions of the reader is no fault, one within a version is.
 */
async function main(): Promise<number> {
  adoptRunningDemo();
  const what = process.argv[2] ?? "all";
  if (what === "geometry") return geometry();
  if (!["all", "publications", "standings"].includes(what)) {
    process.stderr.write("usage: npm run recompute [-- publications | standings | geometry]\n");
    return 2;
  }
  const reports = [];
  if (what !== "standings") reports.push(await recomputePublications(appDb()));
  if (what !== "publications") reports.push(await recomputeStandings(appDb()));
  for (const report of reports) {
    const filled = report.filled > 0 ? `, ${report.filled} filled for the demo, nothing to recompute` : "";
    process.stdout.write(`${report.what}: ${report.same} the same, ${report.differing.length} differing${filled}\n`);
    for (const each of report.differing) process.stdout.write(`  differs: ${each}\n`);
  }
  return reports.some((report) => report.differing.length > 0) ? 1 : 0;
}

async function geometry(): Promise<number> {
  const { stored, same, differing, refused } = await recomputeGeometry(appDb());
  const counts = `${same} the same, ${differing.length} differing, ${refused.length} refused`;
  process.stdout.write(`geometry, reader ${READER_VERSION}: ${counts}; ${stored} readings stored\n`);
  for (const each of differing) process.stdout.write(`  changed: ${each}\n`);
  for (const each of refused) process.stdout.write(`  refused: ${each}\n`);
  const within = differing.some((each) => each.includes(`version ${READER_VERSION} → ${READER_VERSION}`));
  return within || refused.length > 0 ? 1 : 0;
}

main()
  .then((status) => (process.exitCode = status))
  .catch((error: unknown) => {
    process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
    process.exitCode = 2;
  })
  .finally(() => closeDbs());
