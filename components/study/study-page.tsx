import { LinkButton } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { Sentence } from "@/components/ui/sentence/sentence";
import { Section } from "@/components/ui/sheet";
import { EmptyState } from "@/components/ui/states";
import type { StudyAnswer, StudyChoices } from "@/lib/contracts/study";
import { studyAddress } from "@/lib/contracts/study-question";
import { formatNumber } from "@/lib/format/numbers";
import { countWords } from "@/lib/format/words";
import { DownloadLink } from "./download-links";
import { EffectsSection } from "./effects-section";
import { PairsSection } from "./pairs-section";
import { studyPieces } from "./sentence-parts";
import { SpreadSection } from "./spread-section";
import { TwoSection } from "./two-section";

export type StudyPageProps = { answer: StudyAnswer; choices: StudyChoices; open: string | undefined };

/** The trait study: the question as a sentence, pairs first, then effects over all, then how entries are spread. */
export function StudyPage({ answer, choices, open }: StudyPageProps) {
  const { question, result, names } = answer;
  const found = `${countWords(result.entries, "entry", "entries")} by ${countWords(result.designers, "designer")}`;
  return (
    <>
      <Section id="traits" title="Traits" level={1} note="which features scored well, and how sure one can be">
        <Sentence
          label="What to study"
          action="/traits"
          pieces={studyPieces(question, choices)}
          found={found}
          countOf="entries"
          clearHref="/traits"
          open={open}
        />
        <div className="mt-4 grid max-w-3xl gap-2">
          <p>
            <strong>Correlation is not cause.</strong> Designers choose their traits: whoever takes care over an inlet
            may take care over everything, and no table of entries tells the two apart. A design before and after one
            change comes closest to an experiment, so such pairs stand first. To know, change one trait and send it in.
          </p>
        </div>
        {answer.current ? null : (
          <Notice live="status" title="The newest publication is being worked in" className="mt-3">
            These figures are those from before it. Load the page again in a moment.
          </Notice>
        )}
      </Section>
      {result.entries === 0 ? (
        <Section id="nothing">
          <EmptyState
            title="No published entry fits the question"
            action={
              <LinkButton href={studyAddress({ ...question, frames: [], rotations: [], season: "all" })}>
                Ask it of all entries
              </LinkButton>
            }
          >
            Let a part of the sentence go: a frame, a number of stages or a season.
          </EmptyState>
        </Section>
      ) : (
        <>
          <PairsSection question={question} result={result} names={names} />
          <EffectsSection question={question} result={result} />
          <TwoSection question={question} result={result} />
          <SpreadSection question={question} result={result} />
          <Section id="take" title="Check it yourself">
            <p className="mb-3 max-w-3xl">
              Every table of this page can be taken, and so can the {formatNumber(result.entries)} entries behind them,
              with their cells and designers numbered as the regression takes them.
            </p>
            <div className="flex flex-wrap gap-3">
              <DownloadLink question={question} table="entries" />
              <a href={studyAddress(question, "/api/v1/traits")} className="button button-small">
                This page as JSON
              </a>
            </div>
          </Section>
        </>
      )}
    </>
  );
}
