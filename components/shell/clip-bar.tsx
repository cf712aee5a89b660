"use client";

import { useEffect } from "react";
import { numberWord } from "@/lib/format/words";
import { Button, LinkButton } from "@/components/ui/button";
import { adoptAddress, clipLimit, useClips, watchTraversal } from "./clips";

export type ClipBarProps = {
  compareHref?: string;
  /** Names for ids that an address brings and this device doesn't know. */
  names?: Readonly<Record<string, string>>;
};

const noNames: Readonly<Record<string, string>> = {};

function ClipMark() {
  return (
    <svg aria-hidden width="26" height="14" viewBox="0 0 26 14" fill="none" stroke="currentColor" strokeWidth="1.7">
      <path d="M1 12h17.5a4.5 4.5 0 0 0 0-9H8a3.2 3.2 0 0 0 0 6.4h10" strokeLinecap="round" />
    </svg>
  );
}

/** What is picked for a comparison, clipped to the sheet's lower edge; nothing while nothing is picked. */
export function ClipBar({ compareHref = "/compare", names = noNames }: ClipBarProps) {
  const { clips, toggle, clear } = useClips();

  useEffect(watchTraversal, []);
  useEffect(() => adoptAddress(names), [names]);

  const left = clipLimit - clips.length;
  const fits = left === 0 ? "no more fit" : `${numberWord(left)} more ${left === 1 ? "fits" : "fit"}`;
  return (
    <div
      role="region"
      aria-label="Clipped for a comparison"
      className={clips.length > 0 ? "clip-bar holes" : undefined}
    >
      {clips.length > 0 ? (
        <>
          <ClipMark />
          <p>
            Clipped:{" "}
            {clips.map((clip, index) => (
              <span key={clip.id}>
                {index > 0 ? ", " : ""}
                <button
                  type="button"
                  className="cursor-pointer font-bold hover:line-through"
                  aria-label={`Unclip ${clip.name}`}
                  onClick={() => toggle(clip)}
                >
                  {clip.name}
                </button>
              </span>
            ))}
          </p>
          <p className="small-print" role="status">
            {fits}
          </p>
          <span className="ml-auto flex flex-wrap gap-3">
            <Button kind="quiet" onClick={clear}>
              Unclip all
            </Button>
            <LinkButton kind="solid" href={`${compareHref}?clip=${clips.map(({ id }) => id).join(",")}`}>
              Lay over the baseline
            </LinkButton>
          </span>
        </>
      ) : null}
    </div>
  );
}
