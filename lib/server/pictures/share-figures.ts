import type { Sheet } from "@/lib/contracts/sheet";
import { formatMeasured } from "@/lib/format/measured";
import { formatRange, levelUnit } from "@/lib/format/quantities";
import { formatRank, formatRankRange } from "@/lib/format/ranks";

/** One of the four figures in a picture: what it is, the figure, and what stands small beside it. */
export interface ShareFigure {
  readonly label: string;
  readonly value: string;
  readonly note: string;
}

const missing = "–";

/** The four figures of a sheet, as short as a picture needs them. */
export function shareFigures(sheet: Sheet): ShareFigure[] {
  const distance = sheet.bench.microphoneDistanceMm;
  const headline = sheet.equalNoise.find((each) => each.levelDba === sheet.headlineDba)?.reached;
  const at = `${sheet.headlineDba} ${levelUnit(distance)}`;
  const { low, high, lowIsBound } = sheet.levelRangeDba;
  const rank = sheet.ranks.then;
  const against = (value: number, u95: number, unit: string) => {
    const text = formatMeasured({ value, uncertainty: u95, decimals: 1, signed: true });
    return { value: text.value, unit: `±${text.uncertainty} ${unit}` };
  };
  const noise = headline && against(headline.differenceK.value, headline.differenceK.u95, "K");
  const cooling =
    sheet.equalCooling && against(sheet.equalCooling.differenceDb.value, sheet.equalCooling.differenceDb.u95, "dB");
  const ranked = rank && rank.rank !== null && rank.low !== null && rank.high !== null;
  return [
    {
      label: "ΔT against baseline, equal noise",
      value: noise ? `${headline?.upperBound ? "at most " : ""}${noise.value}` : missing,
      note: noise ? `${noise.unit} at ${at}` : `not reached at ${at}`,
    },
    {
      label: "Level against baseline, equal ΔT",
      value: cooling?.value ?? missing,
      note: cooling ? `${cooling.unit} at the baseline's ΔT` : "not reached",
    },
    {
      label: `Rank in round ${sheet.round}, 95 % range`,
      value: ranked ? formatRank(rank.rank ?? 1) : missing,
      note: ranked ? formatRankRange(rank.low ?? 1, rank.high ?? 1, rank.of) : "not ranked",
    },
    {
      label: "Measured range",
      value: formatRange(low, high),
      note: `${levelUnit(distance)}${lowIsBound ? ", the lowest a bound" : ""}`,
    },
  ];
}
