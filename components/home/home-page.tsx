import Link from "next/link";
import { Section } from "@/components/ui/sheet";
import { formatDate } from "@/lib/format/dates";
import { countWords } from "@/lib/format/words";
import { LatestRound, type LatestRoundProps } from "./latest-round";

export type HomePageProps = {
  counts: { designs: number; entries: number; seasons: number };
  corrections: readonly { number: number; what: string; publishedAt: Date }[];
  latest: LatestRoundProps | undefined;
};

/** What the site is, who leads, what the figures mean, and why to believe them. */
export function HomePage({ counts, corrections, latest }: HomePageProps) {
  return (
    <>
      <Section id="fanfold" title="Printed cooling fans, measured on one bench" level={1}>
        <p className="max-w-3xl text-lg">
          Designers send in models. Each is printed, spun up behind a guard and run on one air cooler beside the same
          baseline fan: how loud it is, and how warm the cooler gets. Then it is read where both are equally loud.
        </p>
        <form
          role="search"
          aria-label="The whole index"
          action="/designs"
          method="get"
          className="mt-5 flex flex-wrap items-end gap-3"
        >
          <div className="field w-full max-w-md">
            <label className="field-label" htmlFor="home-words">
              Find a design, designer or material
            </label>
            <span className="blank">
              <input id="home-words" name="q" type="search" maxLength={200} autoComplete="off" />
            </span>
          </div>
          <button type="submit" className="button button-solid">
            Find
          </button>
          <p className="w-full">
            Or ask by trait and figure in <Link href="/designs">the index</Link> of{" "}
            {countWords(counts.designs, "design")}, {countWords(counts.entries, "entry", "entries")} in{" "}
            {countWords(counts.seasons, "season")}.
          </p>
        </form>
      </Section>
      {latest ? (
        <LatestRound {...latest} />
      ) : (
        <Section id="latest" title="No round is published yet">
          <p>The first one stands here from the hour on that the host sets.</p>
        </Section>
      )}
      <Section id="figures" title="What the figures mean">
        <ul className="grid max-w-3xl list-[square] gap-1.5 pl-5">
          <li>
            <strong>ΔT, in K:</strong> how much warmer the cooler’s sensor is than the room, at one set heat. Less is
            better.
          </li>
          <li>
            <strong>Level, in dB(A) at the microphone’s distance:</strong> sound as the ear weighs it, the room’s own
            noise taken out. Less is quieter.
          </li>
          <li>
            <strong>At equal noise:</strong> ΔT where fan and baseline are equally loud, less the baseline’s. −2.0 ±0.7
            K is cooler by 1.3 to 2.7 K; where the interval holds 0, call it a tie.
          </li>
        </ul>
      </Section>
      <Section id="believe" title="Why to believe it">
        <ul className="grid max-w-3xl list-[square] gap-1.5 pl-5">
          <li>Every figure on a sheet opens down to the raw readings that it came from, with its uncertainty.</li>
          <li>
            A second person, who took no reading of the round and owns no entry of it, signs it before it is published.
          </li>
          <li>
            Each session runs <Link href="/baselines">the baseline</Link> first and last; when it is out of its limits,
            nothing of the session counts.
          </li>
          <li>
            <Link href="/method">The method</Link> is written down with its sources, and what was measured on different
            benches is never put on one scale.
          </li>
        </ul>
      </Section>
      <Section id="corrections" title="Latest corrections" aside={<Link href="/corrections">The whole ledger</Link>}>
        {corrections.length === 0 ? (
          <p>
            None so far. A published figure changes only by a correction that stands here, signed by a second person.
          </p>
        ) : (
          <ul className="grid max-w-3xl gap-1.5">
            {corrections.map(({ number, what, publishedAt }) => (
              <li key={number}>
                <span className="docket">
                  {number}, {formatDate(publishedAt)}
                </span>{" "}
                {what}
              </li>
            ))}
          </ul>
        )}
      </Section>
    </>
  );
}
