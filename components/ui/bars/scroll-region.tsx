"use client";

import { useEffect, useRef, useState, type KeyboardEvent, type ReactNode } from "react";

const rowStop = "a, input, button, summary, [tabindex]";

/** Up and down go to the same cell's stop in the next row (or the row's first); Enter is the stop's own. */
function moveByRows(event: KeyboardEvent<HTMLElement>): void {
  const step = event.key === "ArrowDown" ? 1 : event.key === "ArrowUp" ? -1 : 0;
  const target = event.target;
  if (step === 0 || !(target instanceof HTMLElement) || target.matches("input:not([type=checkbox]), select")) return;
  const row = target.closest("tbody tr");
  if (!row) return;
  const rows = [...event.currentTarget.querySelectorAll("tbody tr")];
  const next = rows[rows.indexOf(row) + step];
  const column = [...row.children].findIndex((cell) => cell.contains(target));
  const stop = next?.children[column]?.querySelector<HTMLElement>(rowStop) ?? next?.querySelector<HTMLElement>(rowStop);
  if (!stop) return;
  event.preventDefault();
  stop.focus();
}

/** Only tables scroll sideways. While one does, the keyboard can reach it; arrows go from row to row. */
export function ScrollRegion({ label, children }: { label: string; children: ReactNode }) {
  const ref = useRef<HTMLDivElement>(null);
  const [scrolls, setScrolls] = useState(false);

  useEffect(() => {
    const region = ref.current;
    if (!region) return;
    const watch = new ResizeObserver(() => setScrolls(region.scrollWidth > region.clientWidth + 1));
    watch.observe(region);
    return () => watch.disconnect();
  }, []);

  return (
    <div
      ref={ref}
      className="bars-scroll"
      role={scrolls ? "region" : undefined}
      aria-label={scrolls ? `${label}: scrolls sideways` : undefined}
      tabIndex={scrolls ? 0 : undefined}
      onKeyDown={moveByRows}
    >
      {children}
    </div>
  );
}
