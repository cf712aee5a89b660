"use client";

import Link from "next/link";
import { Button } from "@/components/ui/button";
import { ChoicesStrip } from "./choices-strip";
import type { SentencePart } from "./pieces";
import { RangeStrip } from "./range-strip";

export type SentencePanelProps = {
  id: string;
  part: SentencePart;
  found: string;
  countOf: string;
  clearHref?: string;
  /** Scripts run: every choice is asked for at once, and the button only closes. */
  live: boolean;
  onChange: (part: SentencePart) => void;
  onClose: () => void;
};

/** The strip under the sentence (on a phone a sheet from below) with one part's choices. */
export function SentencePanel({ id, part, found, countOf, clearHref, live, onChange, onClose }: SentencePanelProps) {
  const chosen = part.kind === "choices" ? part.selected.length > 0 : part.from !== undefined || part.to !== undefined;
  const clear = () =>
    onChange(part.kind === "choices" ? { ...part, selected: [] } : { ...part, from: undefined, to: undefined });
  return (
    <div id={id} role="group" aria-label={part.label} className="sentence-panel" tabIndex={-1}>
      <div className="sentence-choices">
        <p className="font-bold">{part.label}</p>
        {part.kind === "choices" ? (
          <ChoicesStrip part={part} countOf={countOf} onChoose={(selected) => onChange({ ...part, selected })} />
        ) : (
          <RangeStrip part={part} countOf={countOf} onRange={(to) => onChange({ ...part, ...to })} />
        )}
        <span className="sentence-end">
          {live && chosen ? (
            <Button kind="quiet" small onClick={clear}>
              Clear
            </Button>
          ) : null}
          {!live && clearHref ? <Link href={clearHref}>Clear all</Link> : null}
          {live ? (
            <Button small onClick={onClose}>
              Show {found}
            </Button>
          ) : (
            <button type="submit" className="button button-small">
              Show {countOf}
            </button>
          )}
        </span>
      </div>
    </div>
  );
}
