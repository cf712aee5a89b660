import { correctionsFeed } from "@/lib/server/reading/corrections-feed";

/** The ledger as an Atom feed; public, so nothing about who asks matters. */
export async function GET(request: Request): Promise<Response> {
  const feed = await correctionsFeed(request.headers.get("host") ?? new URL(request.url).host);
  return new Response(feed, { headers: { "content-type": "application/atom+xml; charset=utf-8" } });
}
