import { checkHealth } from "@/lib/server/health";

export const dynamic = "force-dynamic";

/** Not through the wrapper, which reads a session: a load balancer asks here while the database is down, too. */
export async function GET(): Promise<Response> {
  const health = await checkHealth();
  return Response.json(health, { status: health.ready ? 200 : 503, headers: { "cache-control": "no-store" } });
}
