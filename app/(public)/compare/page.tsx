import type { Metadata } from "next";
import { redirect } from "next/navigation";
import { ComparePage } from "@/components/compare/compare-page";
import { NothingPicked } from "@/components/compare/nothing-picked";
import { SaveComparison } from "@/components/saved/save-comparison";
import { actorFromPage } from "@/lib/auth/actor";
import { compareAddress, compareMost } from "@/lib/contracts/compare";
import { isPerson } from "@/lib/domain/accounts/actor";
import { listWords } from "@/lib/format/words";
import { findEntries } from "@/lib/server/reading/find-entries";
import { readCompare } from "@/lib/server/reading/read-compare";

type Asked = { searchParams: Promise<Record<string, string | string[] | undefined>> };

const list = (value: string | string[] | undefined) =>
  (Array.isArray(value) ? value : [value ?? ""]).flatMap((each) => each.split(",")).filter(Boolean);

function figureOf(value: string | string[] | undefined): number | undefined {
  const text = Array.isArray(value) ? value[0] : value;
  return text && /^\d{1,3}([.,]\d{1,6})?$/.test(text) ? Number(text.replace(",", ".")) : undefined;
}

async function readAsked({ searchParams }: Asked) {
  const params = await searchParams;
  const named = [...new Set([...list(params.entries), ...list(params.clip)])].slice(0, 3 * compareMost);
  const level = figureOf(params.level);
  const deltaTK = figureOf(params.dt);
  const asked = Array.isArray(params.speed) ? undefined : params.speed;
  const speed = asked && /^\d{1,5}(\.\d{1,3})?$/.test(asked) ? Number(asked) : undefined;
  const written = Array.isArray(params.entries) ? undefined : params.entries;
  const { entries: found, missing } = await findEntries({ named });
  return { named, level, deltaTK, speed, opensSave: params.save !== undefined, written, found, missing };
}

export async function generateMetadata(asked: Asked): Promise<Metadata> {
  const { found } = await readAsked(asked);
  const names = found.slice(0, compareMost).map((entry) => `${entry.name} ${entry.letter}`);
  return { title: names.length > 0 ? `${listWords(names)}, over the baseline` : "Compare" };
}

export default async function Page(asked: Asked) {
  const { named, level, deltaTK, speed, opensSave, written, found, missing } = await readAsked(asked);
  if (found.length === 0) return <NothingPicked unknown={named.length > 0} />;
  const tokens = found.map((entry) => entry.token);
  // Ids, picks and other spellings move to the one address that people can read; what was left out is said first.
  const whole = missing === 0 && found.length <= compareMost;
  if (whole && written !== tokens.join(",")) redirect(compareAddress(tokens, level));
  const [sheet, actor] = await Promise.all([
    readCompare({ entryIds: found.map((entry) => entry.entryId) }),
    actorFromPage(),
  ]);
  return (
    <ComparePage
      heads={sheet.entries}
      traits={sheet.traits}
      laid={sheet.laid}
      comparability={sheet.comparability}
      askedLevelDba={level}
      askedDeltaTK={deltaTK}
      askedSpeed={speed}
      missing={missing}
      tooMany={Math.max(0, found.length - compareMost)}
      saver={
        <SaveComparison
          key={tokens.join()}
          signedIn={isPerson(actor)}
          address={compareAddress(tokens.slice(0, compareMost), level)}
          name={listWords(found.slice(0, compareMost).map((entry) => `${entry.name} ${entry.letter}`))}
          open={opensSave}
        />
      }
    />
  );
}
