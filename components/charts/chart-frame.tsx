"use client";

import type { Chart } from "chart.js";
import { useRef, type ReactNode, type RefObject } from "react";
import { BarsTable, type BarsTableProps } from "@/components/ui/bars/bars-table";
import { Button } from "@/components/ui/button";
import { Fold } from "@/components/ui/fold";

export type ChartFrameProps = {
  /** One sentence that says what the chart shows; heard in its place. */
  summary: string;
  /** Under the chart: coverage, copies and mounts. */
  caption?: ReactNode;
  /** The same figures. */
  table: Pick<BarsTableProps, "caption" | "columns" | "rows">;
  /** Name of the picture, without its ending; no picture is offered without one. */
  fileName?: string;
  height?: "long" | "tall" | "middle" | "low";
  children: (chart: RefObject<Chart | null>) => ReactNode;
};

function savePicture(chart: Chart | null, fileName: string): void {
  chart?.canvas.toBlob((blob) => {
    if (!blob) return;
    const link = document.createElement("a");
    link.href = URL.createObjectURL(blob);
    link.download = `${fileName}.png`;
    link.click();
    URL.revokeObjectURL(link.href);
  }, "image/png");
}

/** A canvas with what belongs to it: a sentence for those who hear it, its caption, its figures as a table, a picture. */
export function ChartFrame({ summary, caption, table, fileName, height = "middle", children }: ChartFrameProps) {
  const chart = useRef<Chart>(null);
  return (
    <figure className="chart">
      <p className="sr-only">{summary}</p>
      <div aria-hidden className={`chart-canvas chart-${height}`}>
        {children(chart)}
      </div>
      {caption ? <figcaption className="chart-caption">{caption}</figcaption> : null}
      <div className="chart-below screen-only">
        <Fold title="The same figures as a table">
          <BarsTable {...table} />
        </Fold>
        {fileName ? (
          <Button kind="quiet" small onClick={() => savePicture(chart.current, fileName)}>
            Save as PNG
          </Button>
        ) : null}
      </div>
    </figure>
  );
}
