const months = ["Jan", "Feb", "Mar", "Apr", "May", "Jun", "Jul", "Aug", "Sep", "Oct", "Nov", "Dec"];

type Moment = Date | string | number;

function partsOf(moment: Moment, timeZone: string) {
  const date = new Date(moment);
  if (Number.isNaN(date.getTime())) throw new RangeError("Not a date");
  const format = new Intl.DateTimeFormat("en-GB", {
    timeZone,
    year: "numeric",
    month: "numeric",
    day: "numeric",
    hour: "2-digit",
    minute: "2-digit",
    hourCycle: "h23",
  });
  return Object.fromEntries(format.formatToParts(date).map((part) => [part.type, part.value]));
}

/** A day: "14 Mar 2026", in the zone given (UTC otherwise, so that server and browser agree). Throws on no date. */
export function formatDate(moment: Moment, timeZone = "UTC"): string {
  const parts = partsOf(moment, timeZone);
  return `${Number(parts.day)} ${months[Number(parts.month) - 1] ?? ""} ${parts.year}`;
}

/** A day and time with its zone named: "14 Mar 2026, 18:05 UTC". Throws a RangeError on no date. */
export function formatDateTime(moment: Moment, timeZone = "UTC"): string {
  return `${formatDate(moment, timeZone)}, ${formatTime(moment, timeZone)}${timeZone === "UTC" ? " UTC" : ""}`;
}

/** A time of day: "18:05". Throws a RangeError on no date. */
export function formatTime(moment: Moment, timeZone = "UTC"): string {
  const parts = partsOf(moment, timeZone);
  return `${parts.hour}:${parts.minute}`;
}

/** For `<time dateTime>`: ISO 8601 in UTC. Throws a RangeError on no date. */
export function machineTime(moment: Moment): string {
  return new Date(moment).toISOString();
}
