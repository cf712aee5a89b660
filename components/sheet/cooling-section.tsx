import { CoolingChart } from "@/components/charts/cooling-chart";
import type { CoolingSeries } from "@/components/charts/cooling-model";
import { Section } from "@/components/ui/sheet";
import type { Sheet, SheetPoint } from "@/lib/contracts/sheet";
import { writeMeasured } from "@/lib/format/measured";
import { formatLevel } from "@/lib/format/quantities";
import { copiesAndMounts } from "./sheet-words";

function series(key: string, name: string, points: readonly SheetPoint[]): CoolingSeries {
  return {
    key,
    name,
    points: points.map((point) => ({
      levelDba: point.levelDba.value,
      levelU95Db: point.levelDba.u95,
      cooling: point.deltaTK.value,
      coolingU95: point.deltaTK.u95,
      speedRpm: point.setSpeed,
      upperBound: point.upperBound,
    })),
  };
}

/** ΔT against level over the session's own baseline, error bars both ways. */
export function CoolingSection({ sheet }: { sheet: Sheet }) {
  const headline = sheet.equalNoise.find((reading) => reading.levelDba === sheet.headlineDba);
  const difference = headline?.reached?.differenceK;
  const level = formatLevel(sheet.headlineDba, sheet.bench.microphoneDistanceMm, { decimals: 0 });
  const said = difference
    ? `At ${level} this design runs ${writeMeasured({ value: difference.value, uncertainty: difference.u95, decimals: 1, signed: true }, "K")} against the baseline.`
    : `At ${level} the two can’t be compared.`;
  const baselineName = sheet.baseline ? `baseline ${sheet.baseline.serial}` : "baseline";
  return (
    <Section id="cooling" title="Cooling against noise" note="over the session’s own baseline">
      <CoolingChart
        series={[series("entry", `${sheet.name} ${sheet.letter}`, sheet.points)]}
        baseline={series("baseline", baselineName, sheet.baselinePoints)}
        distanceMm={sheet.bench.microphoneDistanceMm}
        equalNoiseDba={sheet.headlineDba}
        fileName={`${sheet.slug}-cooling`}
        caption={
          <>
            Left and low is better. {said} Bars: 95 % coverage, {copiesAndMounts(sheet)}. Heat load{" "}
            {sheet.protocol.heatLoadW} W; {sheet.bench.name}, version {sheet.bench.version}. The bars of the two hold
            what both share; against each other that part cancels.
          </>
        }
      />
    </Section>
  );
}
