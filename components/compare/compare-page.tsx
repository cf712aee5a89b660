import Link from "next/link";
import type { ReactNode } from "react";
import { PrintAddress } from "@/components/shell/print-address";
import { Facts } from "@/components/ui/facts";
import { Notice } from "@/components/ui/notice";
import { Section } from "@/components/ui/sheet";
import { compareAddress, compareMost, type ComparedHead, type ComparedTrait } from "@/lib/contracts/compare";
import { readingLevel, type Comparability } from "@/lib/domain/results/compare-levels";
import { readingDeltaT } from "@/lib/domain/results/equal-cooling-levels";
import { layOver, type LayOverInput } from "@/lib/domain/results/lay-over";
import { listWords } from "@/lib/format/words";
import { DrawingsSection } from "./drawings-section";
import { LayOverView } from "./lay-over-view";
import { nameOf } from "./names";
import { PointsSection } from "./points-section";
import { RanksSection } from "./ranks-section";
import { RatioSection } from "./ratio-section";
import { SpectraSection } from "./spectra-section";
import { TakeAway } from "./take-away";
import { TraitsSection } from "./traits-section";

export type ComparePageProps = {
  heads: readonly ComparedHead[];
  traits: readonly ComparedTrait[];
  laid: LayOverInput;
  comparability: Comparability;
  askedLevelDba: number | undefined;
  /** Of those asked for, how many are not public or not there, and how many were too many. */
  missing: number;
  tooMany: number;
  /** ΔT that the other reading is asked at, K. */
  askedDeltaTK?: number;
  /** Set speed of the spectra. */
  askedSpeed?: number;
  /** Instead of the names, where somebody named it; and what stands under it. */
  title?: string;
  intro?: ReactNode;
  /** What saves it. */
  saver?: ReactNode;
};

const each = (heads: readonly ComparedHead[], read: (head: ComparedHead) => string) =>
  listWords([...new Set(heads.map(read))]);

/** One to four entries over the baseline. */
export function ComparePage(props: ComparePageProps) {
  const { heads, traits, comparability, missing, tooMany } = props;
  const laid = layOver(props.laid);
  const oneAxis = comparability === "same-axis";
  const levelDba = readingLevel(laid, {
    asked: props.askedLevelDba,
    headlineDba: heads[0]?.headlineDba ?? Number.NaN,
  });
  const deltaTK = readingDeltaT(laid, { asked: props.askedDeltaTK, levelDba });
  const tokens = heads.map((head) => head.token);
  // A letter stays beside its name where the title breaks.
  const kept = (head: ComparedHead) => nameOf(head, heads).replace(/ (?=[A-Z]+$)/, "\u00a0");
  const names = `${listWords(heads.map(kept))}, over the baseline`;
  return (
    <>
      <Section
        id="compare"
        title={props.title ?? names}
        level={1}
        aside={<TakeAway tokens={tokens} levelDba={levelDba} />}
      >
        {props.intro}
        {props.title ? <p>{names}.</p> : null}
        <p className="docket">
          {each(heads, (head) => head.seasonTitle)} · {each(heads, (head) => head.bench)} ·{" "}
          {each(heads, (head) => head.baselineUnit)}
        </p>
        <Picks heads={heads} level={props.askedLevelDba} />
        {missing > 0 ? (
          <Notice className="mt-3">
            {missing === 1 ? "One entry of this address is" : `${missing} entries of this address are`} not public, or
            there is none of that name.
          </Notice>
        ) : null}
        {tooMany > 0 ? (
          <Notice className="mt-3">
            Only {compareMost} fit over a baseline; the first {compareMost} are drawn.
          </Notice>
        ) : null}
        {props.saver}
      </Section>
      {oneAxis ? (
        <Section id="over">
          <LayOverView key={tokens.join()} heads={heads} input={props.laid} levelDba={levelDba} deltaTK={deltaTK} />
        </Section>
      ) : (
        <RatioSection heads={heads} laid={laid} comparability={comparability} />
      )}
      <SpectraSection
        heads={heads}
        comparability={comparability}
        askedSpeed={props.askedSpeed}
        askedLevelDba={props.askedLevelDba}
      />
      <DrawingsSection heads={heads} />
      <TraitsSection heads={heads} traits={traits} />
      <RanksSection heads={heads} />
      <Section id="prints" title="Print notes">
        <Facts
          facts={heads.map((head) => ({
            label: <strong>{nameOf(head, heads)}</strong>,
            value: `${head.printNotes || "No notes were sent in."} Licence ${head.licence}.`,
          }))}
        />
        <p className="small-print mt-3 max-w-3xl">
          A printed rotor can burst or shed a blade: guard, eye protection, stand out of its plane, raise the speed in
          steps, stop on vibration.
        </p>
      </Section>
      <PointsSection heads={heads} laid={laid} oneAxis={oneAxis} />
      <PrintAddress methodVersion={`method ${each(heads, (head) => String(head.methodVersion))}`} />
    </>
  );
}

function Picks({ heads, level }: { heads: readonly ComparedHead[]; level: number | undefined }) {
  const tokens = heads.map((head) => head.token);
  return (
    <ul className="screen-only mt-2 flex flex-wrap gap-x-6 gap-y-1">
      {heads.map((head) => {
        const name = nameOf(head, heads);
        return (
          <li key={head.entryId}>
            <Link href={`/designs/${head.slug}?entry=${head.entryId}`}>{name}</Link>
            {head.designers.length > 0 ? ` by ${listWords(head.designers)}` : null}
            {head.corrections > 0 ? ", corrected" : null}
            {heads.length > 1 ? (
              <>
                {" · "}
                <Link
                  href={compareAddress(
                    tokens.filter((token) => token !== head.token),
                    level,
                  )}
                >
                  take out<span className="sr-only"> {name}</span>
                </Link>
              </>
            ) : null}
          </li>
        );
      })}
      {heads.length < compareMost ? (
        <li>
          <Link href={`/designs?clip=${tokens.join(",")}`}>Clip another from the index</Link>
        </li>
      ) : null}
    </ul>
  );
}
