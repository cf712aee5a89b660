/** How a text of date or time reads. */
export type TimeKind = "clock" | "timestamp" | "date";

/** Order of the first two numbers of a date with slashes. */
export type DateOrder = "day-first" | "month-first";

const CLOCK = /^(?:(\d+)[ d.]\s?)?(\d{1,3}):(\d{2})(?::(\d{2})(?:[.,:](\d{1,9}))?)?\s*([ap])?\.?(?:m\.?)?$/i;
const DATE = /^(\d{1,4})([-./])(\d{1,2})\2(\d{1,4})\.?$/;
const ZONE = /\s*(?:z|utc|gmt|([+-])(\d{2}):?(\d{2})?)$/i;

/** Whether a cell is a clock time, a date with a time, or a date alone; undefined for none of them. */
export function timeKind(text: string): TimeKind | undefined {
  const parts = splitDate(text.trim());
  if (!parts) return CLOCK.test(text.trim()) ? "clock" : undefined;
  if (parts.clock === "") return "date";
  return CLOCK.test(parts.clock) ? "timestamp" : undefined;
}

/**
 * Seconds of a clock time ("12:03:04.5", "1:02:03 PM", "12:03"), from midnight; NaN when it isn't one or out of range.
 * Two numbers are hours and minutes unless `minutesFirst` says minutes and seconds.
 */
export function clockSeconds(text: string, minutesFirst = false): number {
  const found = CLOCK.exec(text.trim());
  if (!found) return Number.NaN;
  const [, days, first, second, third, fraction, half] = found;
  const short = third === undefined && minutesFirst;
  let hours = short ? 0 : Number(first);
  const minutes = Number(short ? first : second);
  const seconds = Number((short ? second : third) ?? 0) + (fraction === undefined ? 0 : Number(`0.${fraction}`));
  if (half !== undefined) {
    if (hours < 1 || hours > 12) return Number.NaN;
    hours = (hours % 12) + (half.toLowerCase() === "p" ? 12 : 0);
  }
  if ((minutes > 59 && !short) || seconds >= 61) return Number.NaN;
  return Number(days ?? 0) * 86_400 + hours * 3600 + minutes * 60 + seconds;
}

/**
 * Seconds from 1970-01-01 (UTC, or local where no zone is written: only differences are used) of "2026-02-03T04:05:06.7Z",
 * "03.02.2026 04:05:06", "2/3/2026 4:05 PM". NaN for anything else or a date that isn't one.
 */
export function timestampSeconds(text: string, order: DateOrder): number {
  const parts = splitDate(text.trim());
  if (!parts) return Number.NaN;
  const [year, month, day] = yearMonthDay(parts, order);
  if (!(month >= 1 && month <= 12 && day >= 1 && day <= 31)) return Number.NaN;
  const clock = parts.clock === "" ? 0 : clockSeconds(parts.clock);
  return daysFromCivil(year, month, day) * 86_400 + clock - parts.zoneS;
}

/** The order that a column of slashed dates shows, or the one assumed; the first two numbers of each. */
export function dateOrder(texts: readonly string[], assumed: DateOrder): DateOrder {
  for (const text of texts) {
    const parts = splitDate(text.trim());
    if (!parts || parts.a > 31) continue;
    if (parts.a > 12) return "day-first";
    if (parts.b > 12) return "month-first";
    if (parts.separator === ".") return "day-first";
  }
  return assumed;
}

interface DateParts {
  a: number;
  b: number;
  c: number;
  separator: string;
  clock: string;
  zoneS: number;
}

/** First letters of the months' names in English, German, French, Spanish and Italian. */
const MONTHS = [
  "jan|ene|gen|jän",
  "feb|fév|fev",
  "mar|mär|mrz",
  "apr|avr|abr",
  "ma[iyg]",
  "jun|juin|giu",
  "jul|juil|lug",
]
  .concat(["aug|ago|aoû|aou", "sep|set", "oct|okt|ott", "nov", "dec|dez|déc|dic"])
  .map((names) => new RegExp(`^(${names})`, "i"));
const DAY_NAMED = /^(\d{1,2})\.?[-. /](\p{L}{3,10})\.?[-. /](\d{2,4})(?![\d:])/u;
const NAMED_DAY = /^(\p{L}{3,10})\.?[-. ](\d{1,2}),? (\d{4})(?!\d)/u;

/** Dates with a month's name, and those of Chinese and Japanese, as year-month-day; any other text as it is. */
function numbered(text: string): string {
  if (/[年月日時时]/u.test(text)) {
    return text
      .replace(/(\d{4})年(\d{1,2})月(\d{1,2})日/u, "$1-$2-$3")
      .replace(/(\d{1,2})[時时](\d{1,2})分(?:(\d{1,2})秒)?/u, (_, h: string, m: string, s = "00") => `${h}:${m}:${s}`);
  }
  if (!/^\d{0,2}\.?[-. /]?\p{L}{3}/u.test(text)) return text;
  const [whole, day, month, year] = DAY_NAMED.exec(text) ?? swapped(NAMED_DAY.exec(text));
  const number = MONTHS.findIndex((names) => names.test(month ?? "")) + 1;
  if (whole === undefined || day === undefined || year === undefined || number === 0) return text;
  return `${year.length === 2 ? `20${year}` : year}-${number}-${day}${text.slice(whole.length)}`;
}

const swapped = (found: RegExpExecArray | null) => (found ? [found[0], found[2], found[1], found[3]] : []);

function splitDate(written: string): DateParts | undefined {
  const text = numbered(written);
  const cut = text.search(/[T\s]/i);
  const found = DATE.exec(cut < 0 ? text : text.slice(0, cut).replace(/,$/, ""));
  if (!found) return undefined;
  let clock = cut < 0 ? "" : text.slice(cut + 1).trim();
  const zone = ZONE.exec(clock);
  let zoneS = 0;
  if (zone) {
    clock = clock.slice(0, zone.index).trim();
    zoneS = (zone[1] === "-" ? -60 : 60) * (Number(zone[2] ?? 0) * 60 + Number(zone[3] ?? 0));
  }
  return { a: Number(found[1]), b: Number(found[3]), c: Number(found[4]), separator: found[2] ?? "", clock, zoneS };
}

function yearMonthDay({ a, b, c, separator }: DateParts, order: DateOrder): [number, number, number] {
  if (a > 31) return [a, b, c];
  const year = c < 100 ? 2000 + c : c;
  return order === "day-first" || separator === "." ? [year, b, a] : [year, a, b];
}

/** Days from 1970-01-01 in the Gregorian calendar, by whole 400-year eras. */
function daysFromCivil(year: number, month: number, day: number): number {
  const y = month <= 2 ? year - 1 : year;
  const era = Math.floor(y / 400);
  const yearOfEra = y - era * 400;
  const dayOfYear = Math.floor((153 * (month + (month > 2 ? -3 : 9)) + 2) / 5) + day - 1;
  return (
    era * 146_097 + yearOfEra * 365 + Math.floor(yearOfEra / 4) - Math.floor(yearOfEra / 100) + dayOfYear - 719_468
  );
}
