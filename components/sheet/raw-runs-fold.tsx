"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { ErrorState, LoadingState } from "@/components/ui/states";
import { useRawRuns } from "@/lib/client/sheets";
import { formatNumber } from "@/lib/format/numbers";
import { countWords } from "@/lib/format/words";
import { RawRunsTable, SessionReadingsTable } from "./raw-runs-table";

export type RawRunsFoldProps = {
  slug: string;
  entryId: string;
  /** Null: the readings of the session itself (calibrator, background, air). */
  setSpeed: number | null;
  unit: string;
  runs: number;
};

/** Opens to every reading of a set speed's runs; they are fetched when first opened. */
export function RawRunsFold({ slug, entryId, setSpeed, unit, runs }: RawRunsFoldProps) {
  const [wanted, setWanted] = useState(false);
  const { data, error, refetch } = useRawRuns(slug, entryId, wanted);
  return (
    <details
      className="fold"
      // Opened before the page could listen: its toggle was never heard.
      ref={(node) => {
        if (node?.open) setWanted(true);
      }}
      onToggle={(event) => {
        if (event.currentTarget.open) setWanted(true);
      }}
    >
      <summary>
        {setSpeed === null
          ? "The session’s own readings: calibrator, background, air"
          : `${formatNumber(setSpeed)} ${unit}: ${countWords(runs, "run")} of this design, and the baseline’s`}
      </summary>
      <div className="fold-body">
        {error ? (
          <ErrorState
            title="The readings didn’t come"
            requestId={error.requestId}
            action={<Button onClick={() => void refetch()}>Try again</Button>}
          >
            {error.detail}
          </ErrorState>
        ) : !data ? (
          <LoadingState label="Reading the raw runs" rows={4} />
        ) : setSpeed === null ? (
          <SessionReadingsTable raw={data} />
        ) : (
          <RawRunsTable raw={data} setSpeed={setSpeed} unit={unit} />
        )}
      </div>
    </details>
  );
}
