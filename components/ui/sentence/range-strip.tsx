"use client";

import { useState } from "react";
import { parseTypedNumber } from "@/lib/format/typed-number";
import { Field } from "@/components/ui/field";
import { SmallHistogram } from "@/components/ui/small-histogram";
import type { SentenceRange } from "./pieces";

export type RangeEnds = { from?: number; to?: number };

export type RangeStripProps = {
  part: SentenceRange;
  countOf: string;
  onRange: (ends: RangeEnds) => void;
};

const writeEnd = (value: number) => String(value).replace("-", "−");

type Ends = { from: string; to: string };

function readEnd(text: string, unit: string): { value?: number; why?: string } {
  return text.trim() === "" ? {} : parseTypedNumber(text, unit);
}

const written = (part: SentenceRange): Ends => ({ from: part.from?.toString() ?? "", to: part.to?.toString() ?? "" });

/** The ends of a range to type, under a small histogram. Asked for when one leaves a field or presses Enter. */
export function RangeStrip({ part, countOf, onRange }: RangeStripProps) {
  const [typed, setTyped] = useState<Ends>(written(part));
  const [over, setOver] = useState({ from: part.from, to: part.to });
  const [checked, setChecked] = useState(false);
  const from = readEnd(typed.from, part.unit);
  const to = readEnd(typed.to, part.unit);
  // Ends changed elsewhere (cleared, the back button) replace the typing; an answer to the typing itself leaves it be.
  if (over.from !== part.from || over.to !== part.to) {
    setOver({ from: part.from, to: part.to });
    if (from.value !== part.from || to.value !== part.to) setTyped(written(part));
  }
  const swapped = from.value !== undefined && to.value !== undefined && from.value > to.value;
  const toError = to.why ?? (swapped ? "This lies below the other end." : undefined);

  const ask = () => {
    setChecked(true);
    const changed = from.value !== part.from || to.value !== part.to;
    if (!from.why && !toError && changed) onRange({ from: from.value, to: to.value });
  };
  const [lowest, highest] = [part.bins[0]?.from, part.bins.at(-1)?.to];
  const total = part.bins.reduce((sum, bin) => sum + bin.count, 0);
  const input = (end: keyof Ends) => ({
    value: typed[end],
    unit: part.unit,
    figures: true,
    inputMode: "decimal" as const,
    autoComplete: "off",
    className: "w-36",
    onChange: (event: { target: { value: string } }) => setTyped({ ...typed, [end]: event.target.value }),
    onBlur: ask,
    onKeyDown: (event: { key: string; preventDefault: () => void }) => {
      if (event.key !== "Enter") return;
      event.preventDefault();
      ask();
    },
  });

  return (
    <div className="grid w-full max-w-md gap-2">
      <SmallHistogram
        bins={part.bins}
        from={from.value}
        to={to.value}
        summary={`${part.label}: ${total} ${countOf} from ${lowest} to ${highest} ${part.unit}`}
      />
      {lowest === undefined ? null : (
        <p aria-hidden className="docket -mt-1 flex justify-between">
          <span>{writeEnd(lowest)}</span>
          <span>
            {writeEnd(highest ?? lowest)} {part.unit}
          </span>
        </p>
      )}
      <div className="flex flex-wrap justify-between gap-4">
        <Field label="from" name={part.fromName} error={checked ? from.why : undefined} {...input("from")} />
        <Field label="to" name={part.toName} error={checked ? toError : undefined} {...input("to")} />
      </div>
    </div>
  );
}
