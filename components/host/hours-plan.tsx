import type { BenchHours } from "@/lib/contracts/seasons-admin";
import { formatNumber } from "@/lib/format/numbers";

const hours = (value: number) => `${formatNumber(value, { decimals: 1 })} h`;

function words(plan: BenchHours | null): string {
  if (plan === null) return "Not one entry goes into a sitting of that length.";
  return (
    `${plan.entries} entries: ${hours(plan.hours)} at the bench in ${plan.sessions} sittings of ${hours(plan.sessionHours)}, ` +
    `${plan.entriesPerSession} entries each, ${hours(plan.hoursPerEntry)} an entry.`
  );
}

/** Hours at the bench that the round asks for now, and with every entry that waits; set-up is not in it. */
export function HoursPlan({ now, withFree }: { now: BenchHours | null; withFree: BenchHours | null }) {
  return (
    <div className="mb-4">
      <p>As it stands, {words(now)}</p>
      {withFree && withFree.entries !== now?.entries ? <p>With all that wait, {words(withFree)}</p> : null}
      <p className="small-print">Set-up, calibrator and background are not in these hours.</p>
    </div>
  );
}
