import { SpectraChart } from "@/components/charts/spectra-chart";
import { chartBands } from "@/components/charts/spectrum-marks";
import { BarsTable } from "@/components/ui/bars/bars-table";
import type { BarsRow } from "@/components/ui/bars/bars-model";
import { ChoiceLinks } from "@/components/ui/choice-links";
import { Section } from "@/components/ui/sheet";
import { compareAddress, type ComparedHead } from "@/lib/contracts/compare";
import type { Comparability } from "@/lib/domain/results/compare-levels";
import { formatNumber } from "@/lib/format/numbers";
import { bandUnit } from "@/lib/format/quantities";
import { prominentSentence } from "@/lib/format/tones";
import { nameOf } from "./names";
import { againstOwnBaseline, commonSpeeds, loudnessPercent, spectraAt, type SpectrumPair } from "./spectra-model";

export type SpectraSectionProps = {
  heads: readonly ComparedHead[];
  comparability: Comparability;
  askedSpeed: number | undefined;
  askedLevelDba: number | undefined;
};

const noLoudness = "a band that the method needs was not measured";

function soundRow(key: string, name: string, pair: SpectrumPair, oneAxis: boolean): BarsRow {
  const { entry, head } = pair;
  return {
    key,
    cells: {
      name: { words: name },
      ...(oneAxis
        ? {
            sone: { figure: { value: entry.loudness?.sone, decimals: 1, why: noLoudness } },
            phon: { figure: { value: entry.loudness?.phon, decimals: 1, why: noLoudness } },
          }
        : { percent: { figure: { value: loudnessPercent(pair), decimals: 0, why: noLoudness } } }),
      tones: { words: prominentSentence(entry.tones, head.stages) },
    },
  };
}

/**
 * Spectra over each other at one set speed. Levels stand on one axis only within one bench version, protocol and
 * baseline; elsewhere each is shown against its own session's baseline, and nothing where baselines have no bridge.
 */
export function SpectraSection({ heads, comparability, askedSpeed, askedLevelDba }: SpectraSectionProps) {
  const speeds = commonSpeeds(heads);
  const setSpeed = speeds.find((speed) => speed === askedSpeed) ?? speeds.at(-1);
  if (setSpeed === undefined) return null;
  if (comparability === "not-comparable") {
    return (
      <Section id="spectra" title="Spectra over each other">
        <p>Not comparable: the baselines differ and no session ran both. Each sheet shows its own spectrum.</p>
      </Section>
    );
  }
  const oneAxis = comparability === "same-axis";
  const pairs = spectraAt(heads, setSpeed);
  const without = heads.filter((head) => !pairs.some((pair) => pair.head === head));
  const distance = heads[0]?.distanceMm ?? Number.NaN;
  const lines = pairs.map((pair) => ({
    key: pair.head.entryId,
    name: nameOf(pair.head, heads),
    bands: oneAxis ? chartBands(pair.entry.bands) : againstOwnBaseline(pair),
  }));
  const first = pairs.find((pair) => pair.baseline);
  const sessions = new Set(pairs.map(({ head }) => head.sessionId)).size;
  const baselineName = sessions > 1 && first ? `baseline beside ${nameOf(first.head, heads)}` : "baseline";
  const baseline =
    oneAxis && first?.baseline
      ? { key: "baseline", name: "baseline", bands: chartBands(first.baseline.bands) }
      : undefined;
  const speed = `${formatNumber(setSpeed)} rpm`;
  const address = compareAddress(
    heads.map((head) => head.token),
    askedLevelDba,
  );
  const rows = pairs.map((pair) => soundRow(pair.head.entryId, nameOf(pair.head, heads), pair, oneAxis));
  return (
    <Section id="spectra" title="Spectra over each other" note={`${pairs[0]?.entry.position ?? ""}, at ${speed}`}>
      <ChoiceLinks
        label="Set speed"
        items={speeds.map((each) => ({
          words: `${formatNumber(each)} rpm`,
          href: `${address}&speed=${each}#spectra`,
          shown: each === setSpeed,
        }))}
      />
      <SpectraChart
        lines={lines}
        baseline={baseline}
        unit={oneAxis ? bandUnit(distance) : "dB against own baseline"}
        fileName="compared-spectra"
        caption={
          oneAxis
            ? `Unweighted levels with the background taken out${baseline ? `; dashed with squares: ${baselineName}` : ""}. A band too near the background is drawn at its bound, and the table says ≤.`
            : "Each band is the level less that of its own session’s baseline, since these were not measured on one bench version, protocol and baseline. A band too near the background is left out."
        }
      />
      <div className="mt-5">
        <BarsTable
          caption={`Loudness, read at the microphone, and prominent tones at ${speed}`}
          showCaption
          phone="fold"
          columns={[
            { key: "name", head: "Design" },
            ...(oneAxis
              ? [
                  { key: "sone", head: "Loudness", unit: "sone" },
                  { key: "phon", head: "Loudness level", unit: "phon" },
                ]
              : [{ key: "percent", head: "Loudness", unit: "% of own baseline’s" }]),
            { key: "tones", head: "Prominent tones" },
          ]}
          rows={[
            ...rows,
            ...(oneAxis && first?.baseline
              ? [
                  {
                    ...soundRow("baseline", baselineName, { ...first, entry: first.baseline }, true),
                    tone: "baseline" as const,
                  },
                ]
              : []),
          ]}
        />
        <p className="small-print mt-2">
          Loudness is of the bands as read where the microphone stood, not where somebody sits (ISO 532-1, stationary,
          free field).
          {without.length > 0
            ? ` Without a spectrum at this set speed: ${without.map((head) => nameOf(head, heads)).join(", ")}.`
            : ""}
        </p>
      </div>
    </Section>
  );
}
