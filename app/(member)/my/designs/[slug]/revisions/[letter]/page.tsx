import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { RevisionDesk } from "@/components/uploads/revision-desk";
import { orPageState, personForPage } from "@/lib/auth/page";
import { revisionParams } from "@/lib/contracts/revision-files";
import { readRevisionFiles } from "@/lib/server/designs/revision-files";

export const metadata: Metadata = { title: "Files and traits" };

export default async function RevisionPage({ params }: { params: Promise<{ slug: string; letter: string }> }) {
  const name = revisionParams.safeParse(await params);
  if (!name.success) notFound();
  const { slug, letter } = name.data;
  const path = `/my/designs/${slug}/revisions/${letter}`;
  const actor = await personForPage(path);
  const first = await orPageState(readRevisionFiles(actor, name.data), path);
  return <RevisionDesk slug={slug} first={first} />;
}
