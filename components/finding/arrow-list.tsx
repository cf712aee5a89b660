"use client";

import type { ReactNode } from "react";
import { moveByArrows } from "@/components/ui/arrow-keys";

/** A list whose links the arrow keys go through, Home and End to its ends. */
export function ArrowList({ label, className, children }: { label: string; className: string; children: ReactNode }) {
  return (
    <ul aria-label={label} className={className} onKeyDown={(event) => moveByArrows(event, "[data-stop] a")}>
      {children}
    </ul>
  );
}
