"use client";

import { useMemo, useSyncExternalStore } from "react";

const colours = ["paper", "bar", "rule", "ink", "soft", "ribbon", "carbon", "leaf", "graph", "ochre", "plum"] as const;

export type Palette = Record<(typeof colours)[number], string> & {
  /** Font families for canvas text. */
  figures: string;
  /** The person asked for no motion. */
  still: boolean;
};

/** What the CSS variables come to now, as one string, so that React can tell whether it changed. */
function readPalette(): string {
  const probe = document.createElement("span");
  probe.hidden = true;
  document.body.append(probe);
  const style = getComputedStyle(probe);
  const read = (name: string) => {
    probe.style.color = `var(--${name})`;
    return style.color;
  };
  const found: Record<string, string | boolean> = Object.fromEntries(colours.map((name) => [name, read(name)]));
  probe.style.fontFamily = "var(--figures)";
  found.figures = style.fontFamily;
  found.still = window.matchMedia("(prefers-reduced-motion: reduce)").matches;
  probe.remove();
  return JSON.stringify(found);
}

const queries = ["(prefers-color-scheme: dark)", "(prefers-reduced-motion: reduce)", "print"];
let cached: string | undefined;

function subscribe(onChange: () => void): () => void {
  const repaint = () => {
    cached = undefined;
    onChange();
  };
  const watch = new MutationObserver(repaint);
  watch.observe(document.documentElement, { attributeFilter: ["data-theme"] });
  const lists = queries.map((query) => window.matchMedia(query));
  for (const list of lists) list.addEventListener("change", repaint);
  return () => {
    watch.disconnect();
    for (const list of lists) list.removeEventListener("change", repaint);
  };
}

/** Colours and fonts for canvases, read from the page's CSS; undefined until the page is in a browser. */
export function usePalette(): Palette | undefined {
  const text = useSyncExternalStore(
    subscribe,
    () => (cached ??= readPalette()),
    () => "",
  );
  return useMemo(() => (text === "" ? undefined : (JSON.parse(text) as Palette)), [text]);
}
