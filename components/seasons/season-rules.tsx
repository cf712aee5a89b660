import Link from "next/link";
import { Facts, type Fact } from "@/components/ui/facts";
import { Section } from "@/components/ui/sheet";
import type { Season } from "@/lib/contracts/seasons";
import { formatDate } from "@/lib/format/dates";
import { formatFrame } from "@/lib/format/frames";
import { formatNumber } from "@/lib/format/numbers";
import { countWords, listWords } from "@/lib/format/words";
import { seasonLevelUnit } from "./season-list";

const gradeWords = { engineering: "engineering (6 dB limit)", survey: "survey (3 dB limit)" } as const;

function rulesFacts(season: Season): Fact[] {
  const unit = seasonLevelUnit(season);
  return [
    { label: "Declared levels", value: `${listWords(season.levelsDba.map((level) => formatNumber(level)))} ${unit}` },
    { label: "Headline level", value: `${formatNumber(season.headlineDba)} ${unit}` },
    {
      label: "Frames",
      value: listWords(
        season.frames.map(
          ({ key, boreMm }) => `${formatFrame(key)} (bore ${formatNumber(boreMm, { decimals: 1 })} mm)`,
        ),
        "or",
      ),
    },
    ...(season.totalDepthMaxMm === null
      ? []
      : [{ label: "Total depth", value: `at most ${formatNumber(season.totalDepthMaxMm)} mm` }]),
    ...(season.inletStackMaxMm === null
      ? []
      : [{ label: "Inlet stack", value: `at most ${formatNumber(season.inletStackMaxMm)} mm` }]),
    {
      label: "Baseline",
      value: listWords(season.baselines.map(({ name, serial }) => `${name}, unit ${serial}`)),
    },
  ];
}

function protocolFacts({ protocol }: Season): Fact[] {
  const unit = protocol.setting === "rpm" ? "rpm" : "% drive";
  return [
    { label: "Protocol", value: `${protocol.name}, version ${protocol.version}` },
    { label: "Heat load", value: `${formatNumber(protocol.heatLoadW)} W` },
    { label: "Set speeds", value: `${listWords(protocol.setSpeeds.map((speed) => formatNumber(speed)))} ${unit}` },
    {
      label: "Repeats",
      value: `${countWords(protocol.mounts, "mount")}, ${countWords(protocol.runsPerMount, "run")} a mount`,
    },
    { label: "Positions", value: listWords(protocol.positions) },
    { label: "Background grade", value: gradeWords[protocol.backgroundGrade] },
    {
      label: "Steady state",
      value: `left to rise or fall: ${formatNumber(protocol.epsilonK, { decimals: 2 })} K at most`,
    },
    {
      label: "Ambient",
      value: `${formatNumber(protocol.ambientMinC)} to ${formatNumber(protocol.ambientMaxC)} °C, drift ${formatNumber(protocol.ambientDriftMaxK, { decimals: 1 })} K at most`,
    },
    { label: "Calibrator drift", value: `${formatNumber(protocol.calibratorDriftMaxDb, { decimals: 1 })} dB at most` },
    { label: "Level averaged over", value: `${formatNumber(protocol.levelAverageS)} s` },
  ];
}

/** The rules, the protocol and the bench versions of a season. */
export function SeasonRules({ season }: { season: Season }) {
  return (
    <>
      <Section id="rules" title="Rules">
        {season.rules ? <p className="mb-3">{season.rules}</p> : null}
        <Facts facts={rulesFacts(season)} />
      </Section>
      <Section id="protocol" title="How it was measured">
        <Facts facts={protocolFacts(season)} />
        {season.benches.map((bench) => (
          <div key={`${bench.name} ${bench.version}`} className="mt-4">
            <h3>
              {bench.name}, version {bench.version}
            </h3>
            <p className="small-print">
              Since {formatDate(bench.from)}. {bench.reason}
            </p>
            <Facts
              facts={[
                { label: "Cooler", value: bench.cooler },
                { label: "Heat source", value: bench.heatSource },
                { label: "Temperature", value: bench.temperatureSensors },
                {
                  label: "Microphone",
                  value: `${bench.microphone}, ${formatNumber(bench.microphoneDistanceMm)} mm from the mounting flange, inlet side`,
                },
                { label: "Calibrator", value: bench.calibrator },
              ]}
            />
          </div>
        ))}
        <p className="mt-4">
          <Link href="/method">How figures are made of this</Link>
        </p>
      </Section>
    </>
  );
}
