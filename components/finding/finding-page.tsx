import type { ReactNode } from "react";
import type { DrawnTraitsAnswer } from "@/lib/contracts/compare";
import { ClipBar } from "@/components/shell/clip-bar";
import { LinkButton } from "@/components/ui/button";
import { Pager } from "@/components/ui/pager";
import { Sentence } from "@/components/ui/sentence/sentence";
import { Section } from "@/components/ui/sheet";
import { EmptyState } from "@/components/ui/states";
import {
  indexAddress,
  indexPageSize,
  settledQuery,
  type IndexAnswer,
  type IndexQuery,
} from "@/lib/contracts/index-query";
import { countWords } from "@/lib/format/words";
import { columnWords, leadColumn, offeredColumns, shownColumns } from "./columns";
import { ColumnsForm } from "./columns-form";
import { ComparableNote } from "./comparable-note";
import { DesignTable } from "./design-table";
import { DrawingGrid } from "./drawing-grid";
import { LimitedNotice } from "./limited-notice";
import { sortChoices } from "./sort-choices";
import { SortForm } from "./sort-form";
import { ViewSwitch } from "./view-switch";
import { KeepClips } from "./keep-clips";
import { paramsWithout, sentenceNames } from "./address-parts";
import { furtherParts, sentencePieces } from "./sentence-pieces";
import { WordsForm } from "./words-form";

export type FindingPageProps = {
  /** As the address asks. */
  asked: IndexQuery;
  answer: IndexAnswer;
  seasonTitles: Readonly<Record<string, string>>;
  distanceMm: number | undefined;
  clipNames: Readonly<Record<string, string>>;
  open: string | undefined;
  /** What is drawn in the drawings' view, by entry id. */
  drawings: Readonly<Record<string, DrawnTraitsAnswer>>;
  /** What saves the search as it stands. */
  saver?: ReactNode;
};

/** The index: the sentence, the list that fits it on bars, and what is clipped. */
export function FindingPage(props: FindingPageProps) {
  const { asked, answer, seasonTitles, distanceMm, clipNames, open, drawings, saver } = props;
  const query = settledQuery(asked, answer.comparableOnly);
  // Addresses carry the order as it was asked: one that can't be kept here comes back where it can.
  const standing = { ...query, sort: asked.sort };
  const input = { query: standing, answer, seasonTitles, open };
  const offered = offeredColumns(answer.comparableOnly, (answer.histograms["loudness"] ?? []).length > 0);
  const columns = shownColumns(offered, query, answer.comparableOnly);
  const first = (query.page - 1) * indexPageSize + 1;
  const last = first + answer.items.length - 1;
  const pageHref = (page: number) => indexAddress({ ...asked, page });
  const found = `${answer.total} of ${countWords(answer.ofAll, "entry", "entries")}`;
  const words = (
    <WordsForm
      q={query.q}
      kept={paramsWithout(standing, ["q", "page"])}
      withoutHref={indexAddress({ ...standing, q: "", page: 1 })}
    />
  );
  return (
    <>
      <Section id="designs" title="Designs" level={1} aside={words}>
        <Sentence
          label="Which designs"
          action="/designs"
          pieces={sentencePieces(input)}
          kept={paramsWithout(standing, [...sentenceNames, "page"])}
          found={found}
          countOf="entries"
          more={furtherParts(input)}
          clearHref={indexAddress({ ...standing, q: "", facets: {}, ranges: {}, page: 1 })}
          open={open}
        />
      </Section>
      <Section id="list">
        {answer.from === "database" ? <LimitedNotice query={query} /> : null}
        <ComparableNote answer={answer} asked={asked} />
        {answer.items.length > 0 ? (
          <div className="screen-only mb-4 flex flex-wrap items-end justify-between gap-x-8 gap-y-2">
            <SortForm
              choices={sortChoices(offered, { distanceMm, words: query.q })}
              now={`${query.descending ? "-" : ""}${query.sort}`}
              kept={paramsWithout(asked, ["sort", "page"])}
            />
            <ViewSwitch asked={asked} />
          </div>
        ) : null}
        {answer.items.length === 0 ? (
          <NothingFits answer={answer} query={query} />
        ) : (
          <form action="/compare" method="get" aria-label="Entries to lay over the baseline">
            {query.view === "drawings" ? (
              <DrawingGrid
                items={answer.items}
                drawings={drawings}
                names={namesMarked(answer)}
                lead={leadColumn(offered, query.sort)}
                distanceMm={distanceMm}
              />
            ) : (
              <DesignTable answer={answer} query={query} columns={columns} distanceMm={distanceMm} />
            )}
            <noscript>
              <button type="submit" className="button button-solid mt-3">
                Lay over the baseline
              </button>
            </noscript>
          </form>
        )}
        {answer.items.length > 0 ? (
          <Pager
            words={`${first} to ${last} of ${answer.total}`}
            label="Pages of the list"
            previousHref={query.page > 1 ? pageHref(query.page - 1) : undefined}
            nextHref={query.page < answer.pages ? pageHref(query.page + 1) : undefined}
          />
        ) : null}
        {query.view === "table" ? (
          <ColumnsForm
            options={offered.map((column) => ({ key: column.key, label: columnWords(column, distanceMm) }))}
            shown={columns.map((column) => column.key)}
            sortedBy={columns.find((column) => column.sort === query.sort)?.key}
            kept={paramsWithout(asked, ["columns"])}
          />
        ) : null}
        {saver}
      </Section>
      <KeepClips />
      <ClipBar names={clipNames} />
    </>
  );
}

const namesMarked = ({ highlights = {} }: IndexAnswer) =>
  Object.fromEntries(Object.entries(highlights).map(([entryId, fields]) => [entryId, fields.name]));

function NothingFits({ answer, query }: { answer: IndexAnswer; query: IndexQuery }) {
  if (answer.total > 0) {
    return (
      <EmptyState
        title={`The list has only ${countWords(answer.pages, "page")}`}
        action={<LinkButton href={indexAddress({ ...query, page: answer.pages })}>To its last page</LinkButton>}
      />
    );
  }
  return (
    <EmptyState
      title="Nothing fits the whole sentence"
      action={
        <>
          {query.q ? (
            <LinkButton href={indexAddress({ ...query, q: "", page: 1 })} scroll={false}>
              Without the words “{query.q}”
            </LinkButton>
          ) : null}
          <LinkButton href="/designs" scroll={false}>
            All {countWords(answer.ofAll, "entry", "entries")}
          </LinkButton>
        </>
      }
    >
      Let a part of it go: the counts beside each choice say how many would fit with it.
    </EmptyState>
  );
}
