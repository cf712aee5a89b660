/** Runs once in every server process, before its first request. */
export async function register(): Promise<void> {
  if (process.env.NEXT_RUNTIME !== "nodejs") return;
  const { notePeers } = await import("@/lib/http/peer");
  notePeers();
}
