import type { Metadata } from "next";
import { sheetQuery } from "@/lib/contracts/raw-runs";
import type { SpectrumAsked } from "@/components/sheet/spectrum-section";
import { sheetMetadata, ShowSheet } from "./show-sheet";

type Props = {
  params: Promise<{ slug: string }>;
  searchParams: Promise<Record<string, string | string[] | undefined>>;
};

/** The entry asked for in the address; one that is no id is as good as none. */
async function asked({ params, searchParams }: Props) {
  const entry = sheetQuery.shape.entry.safeParse((await searchParams).entry);
  return { slug: (await params).slug, entryId: entry.success ? entry.data : undefined };
}

export async function generateMetadata(props: Props): Promise<Metadata> {
  const { slug, entryId } = await asked(props);
  return sheetMetadata(slug, entryId);
}

/** What the address asks of the spectrum; what is nonsense is as good as not asked. */
async function askedOfSpectrum({ searchParams }: Props): Promise<SpectrumAsked> {
  const { speed, position } = await searchParams;
  return {
    speed: typeof speed === "string" && /^\d+(\.\d+)?$/.test(speed) ? Number(speed) : undefined,
    position: typeof position === "string" ? position : undefined,
  };
}

export default async function SheetPage(props: Props) {
  return <ShowSheet {...await asked(props)} spectrum={await askedOfSpectrum(props)} />;
}
