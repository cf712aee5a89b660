import { startSearchStandIn } from "@/search/stand-in/server";
import { env, requiredEnv } from "@/lib/env/env";

/** The search stand-in as a process of its own, on the loopback address and with the key that the launcher chose. */
const { port } = new URL(requiredEnv("MEILI_HOST"));
const server = await startSearchStandIn({
  port: Number(port),
  masterKey: requiredEnv("MEILI_API_KEY"),
  allowProduction: env().FANFOLD_DEMO,
});
for (const name of ["SIGTERM", "SIGINT"] as const) {
  process.once(name, () => {
    void server.close().finally(() => process.exit(0));
  });
}
