import type { Metadata } from "next";
import { redirect } from "next/navigation";
import { ComparePage } from "@/components/compare/compare-page";
import { compareAddress } from "@/components/compare/names";
import { NothingPicked } from "@/components/compare/nothing-picked";
import { compareMost } from "@/lib/contracts/compare";
import { listWords } from "@/lib/format/words";
import { findEntries } from "@/lib/server/reading/find-entries";
import { readCompare } from "@/lib/server/reading/read-compare";

type Asked = { searchParams: Promise<Record<string, string | string[] | undefined>> };

const list = (value: string | string[] | undefined) =>
  (Array.isArray(value) ? value : [value ?? ""]).flatMap((each) => each.split(",")).filter(Boolean);

async function readAsked({ searchParams }: Asked) {
  const params = await searchParams;
  const named = [...new Set([...list(params.entries), ...list(params.clip)])].slice(0, 3 * compareMost);
  const levelText = Array.isArray(params.level) ? params.level[0] : params.level;
  const level =
    levelText && /^\d{1,3}([.,]\d{1,6})?$/.test(levelText) ? Number(levelText.replace(",", ".")) : undefined;
  const written = Array.isArray(params.entries) ? undefined : params.entries;
  const { entries: found, missing } = await findEntries({ named });
  return { named, level, written, found, missing };
}

export async function generateMetadata(asked: Asked): Promise<Metadata> {
  const { found } = await readAsked(asked);
  const names = found.slice(0, compareMost).map((entry) => `${entry.name} ${entry.letter}`);
  return { title: names.length > 0 ? `${listWords(names)}, over the baseline` : "Compare" };
}

export default async function Page(asked: Asked) {
  const { named, level, written, found, missing } = await readAsked(asked);
  if (found.length === 0) return <NothingPicked unknown={named.length > 0} />;
  const tokens = found.map((entry) => entry.token);
  // Ids, picks and other spellings move to the one address that people can read; what was left out is said first.
  const whole = missing === 0 && found.length <= compareMost;
  if (whole && written !== tokens.join(",")) redirect(compareAddress(tokens, level));
  const sheet = await readCompare({ entryIds: found.map((entry) => entry.entryId) });
  return (
    <ComparePage
      heads={sheet.entries}
      traits={sheet.traits}
      laid={sheet.laid}
      comparability={sheet.comparability}
      askedLevelDba={level}
      missing={missing}
      tooMany={Math.max(0, found.length - compareMost)}
    />
  );
}
