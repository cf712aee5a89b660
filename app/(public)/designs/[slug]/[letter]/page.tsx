import type { Metadata } from "next";
import { sheetMetadata, ShowSheet } from "../show-sheet";

type Props = { params: Promise<{ slug: string; letter: string }> };

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  const { slug, letter } = await params;
  return sheetMetadata(slug, undefined, letter.toUpperCase());
}

/** The sheet of one revision: its newest public entry. */
export default async function RevisionSheetPage({ params }: Props) {
  const { slug, letter } = await params;
  return <ShowSheet slug={slug} letter={letter.toUpperCase()} />;
}
