import { startSearchStandIn } from "./server";

/**
 * Runs the stand-in by itself: MEILI_MASTER_KEY (required), SEARCH_STAND_IN_PORT (7700 when unset) and
 * SEARCH_STAND_IN_DEMO=1 to allow NODE_ENV=production for the demonstration on loopback.
 */
const masterKey = process.env.MEILI_MASTER_KEY ?? "";
const port = Number(process.env.SEARCH_STAND_IN_PORT ?? "7700");
const standIn = await startSearchStandIn({
  port,
  masterKey,
  allowProduction: process.env.SEARCH_STAND_IN_DEMO === "1",
});
process.stdout.write(`search stand-in ready at ${standIn.url}\n`);
for (const signal of ["SIGINT", "SIGTERM"] as const) {
  process.once(signal, () => {
    void standIn.close().then(() => process.exit(0));
  });
}
