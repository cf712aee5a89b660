import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { SessionScreen } from "@/components/bench/session-screen";
import { orPageState, personForPage } from "@/lib/auth/page";
import { idParams } from "@/lib/contracts/base";
import { readSession } from "@/lib/server/bench/read-session";

export const metadata: Metadata = { title: "Session at the bench" };

export default async function SessionPage({ params }: { params: Promise<{ id: string }> }) {
  const parsed = idParams.safeParse(await params);
  if (!parsed.success) notFound();
  const path = `/bench/sessions/${parsed.data.id}`;
  const actor = await personForPage(path);
  const session = await orPageState(readSession(actor, { sessionId: parsed.data.id }), path);
  return <SessionScreen initial={session} ownId={actor.personId} />;
}
