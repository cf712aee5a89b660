import { ControlChart } from "@/components/charts/control-chart";
import { ChoiceLinks } from "@/components/ui/choice-links";
import { Section } from "@/components/ui/sheet";
import type { Baseline } from "@/lib/contracts/baselines";
import { formatDate } from "@/lib/format/dates";
import { formatNumber } from "@/lib/format/numbers";
import {
  breakWords,
  controlSeries,
  individuals,
  movingRanges,
  seriesSummary,
  weightedMeans,
  type ControlSeries,
} from "./control-series";

export type ChecksSectionProps = {
  baseline: Pick<Baseline, "checks" | "phases">;
  path: string;
  /** Key of the chosen chart. */
  chosen: string | undefined;
  /** Sessions that aren't published are among them. */
  all: boolean;
};

/** The baseline and the calibrator on control charts, one unit, bench version, quantity and set speed at a time. */
export function ChecksSection({ baseline, path, chosen, all }: ChecksSectionProps) {
  const every = controlSeries(baseline);
  const series = every.find(({ key }) => key === chosen) ?? every[0];
  if (!series) return null;
  const places = [...new Map(every.map((each) => [`${each.serial} ${each.bench}`, each])).values()];
  const isHere = (each: ControlSeries) => each.serial === series.serial && each.bench === series.bench;
  const hrefOf = ({ key }: ControlSeries) => `${path}?chart=${key}`;
  const name = `${series.words}, unit ${series.serial}`;
  const shared = { unit: series.unit, decimals: series.decimals };
  return (
    <Section
      id="checks"
      title="Control charts"
      note={all ? "every closed session: what isn't published is seen by the host alone" : "of published sessions"}
    >
      <ChoiceLinks
        label="Unit and bench version"
        items={places.map((each) => ({
          words: `${each.serial} on ${each.bench}`,
          href: hrefOf(
            every
              .filter((one) => one.serial === each.serial && one.bench === each.bench)
              .find(({ words }) => words === series.words) ?? each,
          ),
          shown: isHere(each),
        }))}
      />
      <ChoiceLinks
        label="Quantity and set speed"
        items={every.filter(isHere).map((each) => ({ words: each.words, href: hrefOf(each), shown: each === series }))}
      />
      <p className="my-4 max-w-3xl">{seriesSummary(series)}</p>
      <div className="grid gap-8">
        <div>
          <h3 className="mb-2">Session by session</h3>
          <ControlChart
            points={individuals(series)}
            quantity={name}
            summary={seriesSummary(series)}
            fileName={`control-${series.key}`}
            {...shared}
          />
        </div>
        <div>
          <h3 className="mb-2">Moving range</h3>
          <ControlChart points={movingRanges(series)} quantity={`Moving range, ${name}`} {...shared} />
        </div>
        <div>
          <h3 className="mb-2">Weighted mean</h3>
          <ControlChart points={weightedMeans(series)} quantity={`Weighted mean, ${name}`} {...shared} />
        </div>
      </div>
      <PhaseList series={series} />
      <HeldList series={series} />
      <p className="small-print mt-3">
        A square is a session, the mean over its mounts; a red cross broke a rule. Until twenty sessions of a phase its
        limits are called trial: 95 % prediction for the next, over all charts of a session together. Then they are
        frozen: centre ± 3 sigma, sigma = mean moving range ÷ 1.128 (NIST/SEMATECH e-Handbook, 6.3.2.2); weighted mean
        with λ = 0.2 (6.3.2.4). A session that was out is drawn and counts towards no limit.
      </p>
    </Section>
  );
}

function PhaseList({ series }: { series: ControlSeries }) {
  const figure = (value: number) => formatNumber(value, { decimals: series.decimals });
  return (
    <>
      <h3 className="mt-6 mb-2">Phases</h3>
      <ul className="grid max-w-3xl list-[square] gap-1 pl-5">
        {series.phases.map((phase) => (
          <li key={`${phase.from} ${phase.trial}`}>
            {formatDate(phase.from)}: {phase.kind ? `${breakWords[phase.kind]}. ` : ""}
            {phase.trial
              ? phase.reason
              : `Limits frozen${
                  phase.centre === null || phase.sigma === null
                    ? "."
                    : ` at ${figure(phase.centre - 3 * phase.sigma)} to ${figure(phase.centre + 3 * phase.sigma)} ${series.unit}.`
                }`}
          </li>
        ))}
      </ul>
    </>
  );
}

function HeldList({ series }: { series: ControlSeries }) {
  const held = series.checks.filter((check) => check.holdReason !== null);
  if (held.length === 0) return null;
  return (
    <>
      <h3 className="mt-6 mb-2">Sessions that were held</h3>
      <ul className="grid max-w-3xl list-[square] gap-2 pl-5">
        {held.map((check) => (
          <li key={check.session}>
            Session {check.session}, {formatDate(check.at)}
            {check.out.length > 0 ? `: ${check.out.join(", ")}` : ""}. {check.liftNote ?? "Not lifted yet."}
          </li>
        ))}
      </ul>
    </>
  );
}
