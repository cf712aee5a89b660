"use client";

import { useEffect, useMemo, useState } from "react";
import { CoolingChart } from "@/components/charts/cooling-chart";
import { EqualNoiseSlider } from "@/components/charts/equal-noise-slider";
import { FigureSlider } from "@/components/charts/figure-slider";
import { Button } from "@/components/ui/button";
import type { ComparedHead } from "@/lib/contracts/compare";
import { formatNumber } from "@/lib/format/numbers";
import { formatLevel } from "@/lib/format/quantities";
import { compareFigures } from "@/lib/domain/results/compare-figures";
import { sliderEnds } from "@/lib/domain/results/compare-levels";
import { baselineLevelAt, coolingEnds } from "@/lib/domain/results/equal-cooling-levels";
import { layOver, type LaidEntry, type LayOverInput } from "@/lib/domain/results/lay-over";
import { seriesOf } from "./chart-series";
import { equalCoolingWords, equalNoiseWords, type NameById } from "./compare-words";
import { EqualCoolingTable, EqualNoiseTable } from "./level-tables";
import { nameOf } from "./names";

export type LayOverViewProps = {
  heads: readonly ComparedHead[];
  input: LayOverInput;
  levelDba: number;
  /** Where the other reading stands, K; undefined where it has no place. */
  deltaTK: number | undefined;
};

/** Waits until the slider rests: browsers refuse too many changes of an address. */
const addressAfterMs = 250;

function useInAddress(name: "level" | "dt", moved: number | undefined) {
  useEffect(() => {
    if (moved === undefined) return;
    const wait = setTimeout(() => {
      const address = new URL(window.location.href);
      address.searchParams.set(name, String(moved));
      window.history.replaceState(null, "", address.toString().replaceAll("%2C", ","));
    }, addressAfterMs);
    return () => clearTimeout(wait);
  }, [name, moved]);
}

/** Curves over the baseline with a slider of the common level; every figure is read anew where the slider stands. */
export function LayOverView({ heads, input, levelDba, deltaTK }: LayOverViewProps) {
  const [moved, setMoved] = useState<number>();
  const level = moved ?? levelDba;
  const laid = useMemo(() => layOver(input), [input]);
  const ends = useMemo(() => sliderEnds(laid), [laid]);
  const figures = useMemo(() => compareFigures(laid, () => level), [laid, level]);
  const drawn = useMemo(
    () => ({
      entries: laid.map((entry) => seriesOf(entry.id, entry.id, entry)),
      baseline: laid[0] && seriesOf("baseline", "Baseline", laid[0].baseline),
    }),
    [laid],
  );
  useInAddress("level", moved);

  const name = (id: string) => {
    const head = heads.find((each) => each.entryId === id);
    return head ? nameOf(head, heads) : id;
  };
  const sessions = laid.filter((entry, n) => laid.findIndex(({ sessionId }) => sessionId === entry.sessionId) === n);
  const baselines = sessions.map((entry) => ({
    key: entry.sessionId,
    name: sessions.length === 1 ? "Baseline" : `Baseline beside ${name(entry.id)}`,
    deltaTK: figures.entries.find(({ id }) => id === entry.id)?.baselineDeltaTK,
  }));
  const distanceMm = heads[0]?.distanceMm ?? Number.NaN;
  const headline = heads[0]?.headlineDba ?? Number.NaN;
  return (
    <div className="grid gap-x-10 gap-y-6 lg:grid-cols-[minmax(0,3fr)_minmax(0,2fr)]">
      {/* Stays beside the sliders while they are read down. */}
      <div className="min-w-0 self-start lg:sticky lg:top-4">
        <CoolingChart
          series={drawn.entries.map((series) => ({ ...series, name: name(series.key) }))}
          baseline={drawn.baseline}
          distanceMm={distanceMm}
          equalNoiseDba={level}
          fileName={`compare-${heads.map((head) => head.token).join("-")}`}
          caption={
            <>
              Lower and further left is better. Error bars both ways, and the tint along each curve: 95 % coverage, for
              the one printed copy measured; remounts are in, copy-to-copy spread is not.
              {sessions.length > 1
                ? ` The baseline drawn is the one run beside ${name(sessions[0]?.id ?? "")}; each entry’s figures use the baseline of its own session.`
                : null}
            </>
          }
        />
      </div>
      <div className="grid content-start gap-4">
        <h2>At equal noise</h2>
        {ends ? (
          <>
            <EqualNoiseSlider
              levelDba={level}
              fromDba={ends.low}
              toDba={ends.high}
              distanceMm={distanceMm}
              onLevel={setMoved}
            />
            {level === headline ? (
              <p className="small-print">This is the season’s headline level.</p>
            ) : headline >= ends.low && headline <= ends.high ? (
              <p className="screen-only">
                <Button kind="quiet" small onClick={() => setMoved(headline)}>
                  To the headline level, {formatLevel(headline, distanceMm, { decimals: 0 })}
                </Button>
              </p>
            ) : null}
          </>
        ) : (
          <p>No entry shares a level with its baseline, so nothing can be read off at equal noise.</p>
        )}
        <EqualNoiseTable entries={figures.entries} name={name} baselines={baselines} />
        <Words said={equalNoiseWords(figures.pairs, name, true)} pairs={figures.pairs.length} />
        <EqualCoolingPart laid={laid} name={name} deltaTK={deltaTK} />
      </div>
    </div>
  );
}

/** The other way: a ΔT of the baseline, and how much louder or quieter each entry is where it cools like that. */
function EqualCoolingPart(props: { laid: readonly LaidEntry[]; name: NameById; deltaTK: number | undefined }) {
  const { laid, name, deltaTK } = props;
  const [moved, setMoved] = useState<number>();
  const ends = useMemo(() => coolingEnds(laid), [laid]);
  const wanted = moved ?? deltaTK;
  const figures = useMemo(() => {
    const levels = new Map(laid.map((entry) => [entry.id, baselineLevelAt(entry, wanted ?? Number.NaN)]));
    return compareFigures(laid, (id) => levels.get(id) ?? Number.NaN);
  }, [laid, wanted]);
  useInAddress("dt", moved);
  return (
    <>
      <h2 className="mt-2">At equal ΔT</h2>
      {ends && wanted !== undefined ? (
        <>
          <FigureSlider label="Equal ΔT at" unit="K" value={wanted} from={ends.low} to={ends.high} onValue={setMoved} />
          <p className="small-print">
            Each entry’s level where it cools as the baseline of its session does when that rises by{" "}
            {formatNumber(wanted, { decimals: 1 })} K, less the baseline’s level there.
          </p>
          <EqualCoolingTable entries={figures.entries} name={name} />
          <Words said={equalCoolingWords(figures.pairs, name)} pairs={figures.pairs.length} />
        </>
      ) : (
        <p>No entry shares a level with its baseline, so nothing can be read off at equal ΔT.</p>
      )}
    </>
  );
}

function Words({ said, pairs }: { said: readonly string[]; pairs: number }) {
  if (said.length === 0) return null;
  return (
    <div aria-live="polite" className="grid gap-1">
      {said.map((sentence) => (
        <p key={sentence}>{sentence}</p>
      ))}
      {pairs > 1 ? (
        <p className="small-print">Each interval holds for its own pair, not for all {pairs} pairs at once.</p>
      ) : null}
    </div>
  );
}
