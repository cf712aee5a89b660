import { correctionsFeed } from "@/lib/server/reading/corrections-feed";

/** The ledger as an Atom feed; public, so nothing about who asks matters. */
export async function GET(): Promise<Response> {
  const feed = await correctionsFeed();
  return new Response(feed, { headers: { "content-type": "application/atom+xml; charset=utf-8" } });
}
