import Link from "next/link";
import { BarsTable } from "@/components/ui/bars/bars-table";
import { Fold } from "@/components/ui/fold";
import { Section } from "@/components/ui/sheet";
import { EmptyState } from "@/components/ui/states";
import type { StudyAnswer } from "@/lib/contracts/study";
import { countWords } from "@/lib/format/words";
import { DownloadLink } from "./download-links";
import { PairEffectsTable } from "./pair-effects-table";
import { figureIn, figureWords, valueWords, type Result } from "./study-words";

type Pair = Result["pairs"][number];
type Names = StudyAnswer["names"];

const togetherWords = { round: "in one round", cell: "in one season", no: "in different seasons" } as const;

function changeWords({ trait, fromValue, toValue }: Pair): string {
  return `${valueWords(trait, fromValue)} → ${valueWords(trait, toValue)}`;
}

function PairName({ pair, names }: { pair: Pair; names: Names }) {
  const [from, to] = [names[pair.fromEntryId], names[pair.toEntryId]];
  if (!from || !to) return <>no longer shown</>;
  return (
    <>
      <Link href={`/designs/${to.slug}/${to.letter.toLowerCase()}`}>{to.name}</Link>{" "}
      <span className="figures">
        {from.slug === to.slug ? from.letter : `${from.name} ${from.letter}`} → {to.letter}
      </span>
    </>
  );
}

/** Rows on the page; the file has more. */
const rowsShown = 40;

function PairsTable({
  pairs,
  names,
  figure,
}: {
  pairs: readonly Pair[];
  names: Names;
  figure: keyof typeof figureWords;
}) {
  const { unit, short } = figureWords[figure];
  return (
    <BarsTable
      caption="Pairs of revisions that differ in one trait"
      columns={[
        { key: "pair", head: "Design" },
        { key: "trait", head: "What changed" },
        { key: "change", head: `${short}, change`, unit },
        { key: "together", head: "Measured" },
      ]}
      rows={pairs.slice(0, rowsShown).map((pair) => ({
        key: `${pair.fromEntryId} ${pair.toEntryId}`,
        cells: {
          pair: { words: <PairName pair={pair} names={names} /> },
          trait: { words: changeWords(pair) },
          change: { figure: { value: pair.change, uncertainty: pair.expanded, decimals: 2, signed: true } },
          together: { words: togetherWords[pair.together] },
        },
      }))}
    />
  );
}

function Chain({
  chain,
  pairs,
  names,
  figure,
}: {
  chain: readonly number[];
  pairs: readonly Pair[];
  names: Names;
  figure: keyof typeof figureWords;
}) {
  const steps = chain.flatMap((index) => pairs[index] ?? []);
  const last = names[steps.at(-1)?.toEntryId ?? ""];
  const letters = [steps[0]?.fromEntryId, ...steps.map(({ toEntryId }) => toEntryId)].map(
    (id) => names[id ?? ""]?.letter,
  );
  return (
    <li>
      {last ? <Link href={`/designs/${last.slug}/${last.letter.toLowerCase()}`}>{last.name}</Link> : "A design"}{" "}
      <span className="figures">{letters.join(" → ")}</span>:{" "}
      {steps
        .map((step) => `${changeWords(step)}, ${figureIn(figureWords[figure].unit, step.change, true)}`)
        .join("; then ")}
      .
    </li>
  );
}

/** Why most derivations make no pair, in one line. */
function leftOutWords({
  severalTraits,
  noTrait,
  otherBaseline,
  otherDesigner,
  notReached,
}: Result["pairCounts"]): string {
  const parts = [
    severalTraits > 0 && `${severalTraits} changed several traits`,
    noTrait > 0 && `${noTrait} changed none that is read`,
    otherBaseline > 0 &&
      `${otherBaseline} were measured against another baseline unit, so the two are on no common scale here`,
    otherDesigner > 0 && `${otherDesigner} have another designer`,
    notReached > 0 && `${notReached} didn’t reach the level`,
  ].filter((words) => words !== false);
  return parts.length > 0 ? ` Left out: ${parts.join("; ")}.` : "";
}

/** The strongest evidence, first: a design before and after one change. */
export function PairsSection({ question, result, names }: Pick<StudyAnswer, "question" | "result" | "names">) {
  const { pairs, pairCounts, chains } = result;
  const { figure } = question;
  return (
    <Section
      id="pairs"
      title="Pairs that differ in one trait"
      note="one designer, one change, everything else the same by its model"
      aside={pairs.length > 0 ? <DownloadLink question={question} table="pairs" /> : null}
    >
      {pairs.length === 0 ? (
        <EmptyState title="No pair of this kind yet">
          Of {countWords(pairCounts.derivations, "revision")} made from another one, none changed this and nothing else.
          {leftOutWords(pairCounts)} Change one trait, leave the rest, and send the revision in: it becomes the first.
        </EmptyState>
      ) : (
        <>
          <p className="mb-3 max-w-3xl">
            {countWords(pairCounts.pairs, "pair")} from {countWords(pairCounts.derivations, "revision")} made from
            another one.{leftOutWords(pairCounts)} Each figure is against the baseline of its own session
            {figure === "equal" ? ", at its own season’s headline level" : ""}. Less is better.
          </p>
          <PairEffectsTable effects={result.pairEffects} figure={figure} />
          {chains.length > 0 ? (
            <Fold title={`${countWords(chains.length, "chain")} of changes one after the other`} className="mt-4">
              <ul className="grid list-[square] gap-1 pl-5">
                {chains.map((chain) => (
                  <Chain key={chain.join()} chain={chain} pairs={pairs} names={names} figure={figure} />
                ))}
              </ul>
            </Fold>
          ) : null}
          <Fold title="Pair by pair" className="mt-2">
            <PairsTable pairs={pairs} names={names} figure={figure} />
            <p className="small-print mt-2">
              Change ± half of its 95 % interval, both sessions taken as independent. Those measured together come
              first, then the newest
              {pairCounts.pairs > rowsShown ? `; ${rowsShown} of ${pairCounts.pairs}, more as CSV` : ""}.
            </p>
          </Fold>
        </>
      )}
    </Section>
  );
}
