import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { cache } from "react";
import { SheetView } from "@/components/sheet/sheet-view";
import type { SpectrumAsked } from "@/components/sheet/spectrum-section";
import { LinkButton } from "@/components/ui/button";
import { Section } from "@/components/ui/sheet";
import { GoneState } from "@/components/ui/states";
import type { Sheet } from "@/lib/contracts/sheet";
import { ExpectedError } from "@/lib/domain/expected-error";
import { writeMeasured } from "@/lib/format/measured";
import { formatLevel, formatLevelRange } from "@/lib/format/quantities";
import { formatRank } from "@/lib/format/ranks";
import { sharePictureAddress } from "@/lib/server/pictures/share-picture";
import { SHARE_SIZE } from "@/lib/server/pictures/share-svg";
import { readSheetDrawing } from "@/lib/server/reading/sheet-drawing";
import { readSheetPage } from "@/lib/server/reading/sheet-page";

type Found = { sheet: Sheet } | { gone: string };

/** Once a request, for the page and its metadata alike. An address with nothing public behind it is not found. */
const findSheet = cache(async (slug: string, entryId?: string, letter?: string): Promise<Found> => {
  try {
    return { sheet: await readSheetPage({ slug, entryId, letter }) };
  } catch (error) {
    if (!(error instanceof ExpectedError)) throw error;
    if (error.code === "gone") return { gone: error.detail };
    notFound();
  }
});

/** The four figures in a sentence, for search results and shared links. */
function inShort(sheet: Sheet): string {
  const distance = sheet.bench.microphoneDistanceMm;
  const headline = sheet.equalNoise.find((reading) => reading.levelDba === sheet.headlineDba)?.reached;
  const rank = sheet.ranks.then;
  const parts = [
    headline
      ? `${writeMeasured({ value: headline.differenceK.value, uncertainty: headline.differenceK.u95, decimals: 1, signed: true }, "K")} against the baseline at ${formatLevel(sheet.headlineDba, distance, { decimals: 0 })}`
      : null,
    sheet.equalCooling
      ? `${writeMeasured({ value: sheet.equalCooling.differenceDb.value, uncertainty: sheet.equalCooling.differenceDb.u95, decimals: 1, signed: true }, "dB")} at equal ΔT`
      : null,
    rank && rank.rank !== null ? `${formatRank(rank.rank)} of ${rank.of} in round ${sheet.round}` : null,
    `measured over ${formatLevelRange(sheet.levelRangeDba.low, sheet.levelRangeDba.high, distance)}`,
  ];
  return `${parts.filter(Boolean).join("; ")}. ${sheet.season.title}, method ${sheet.methodVersion}.`;
}

export async function sheetMetadata(slug: string, entryId?: string, letter?: string): Promise<Metadata> {
  const found = await findSheet(slug, entryId, letter);
  if ("gone" in found) return { title: "Withdrawn", robots: { index: false } };
  const { sheet } = found;
  const title = `${sheet.name} ${sheet.letter}`;
  const description = inShort(sheet);
  const picture = sharePictureAddress(sheet);
  return {
    title,
    description,
    openGraph: {
      title,
      description,
      type: "article",
      siteName: "Fanfold",
      images: [{ url: picture, ...SHARE_SIZE, alt: `${title}, the four figures and the fan from the front` }],
    },
    twitter: { card: "summary_large_image", images: [picture] },
    alternates: { canonical: `/designs/${sheet.slug}`, types: { "application/json": `/api/v1/sheets/${sheet.slug}` } },
  };
}

/** The sheet, or what stands in its place where the design was withdrawn. */
export async function ShowSheet({
  slug,
  entryId,
  letter,
  spectrum,
}: {
  slug: string;
  entryId?: string;
  letter?: string;
  spectrum?: SpectrumAsked;
}) {
  const found = await findSheet(slug, entryId, letter);
  if ("sheet" in found) {
    const drawn = await readSheetDrawing({ entryId: found.sheet.entryId });
    return <SheetView sheet={found.sheet} drawn={drawn} spectrum={spectrum} />;
  }
  return (
    <Section id="gone" title="This design was withdrawn" level={1}>
      <GoneState
        title="Its figures are no longer shown"
        action={<LinkButton href="/designs">Find another in the index</LinkButton>}
      >
        <p>{found.gone}</p>
        <p>The standings that it stood in keep its row, so that nobody’s rank changes by it.</p>
      </GoneState>
    </Section>
  );
}
