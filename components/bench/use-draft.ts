"use client";

import { useState } from "react";

export type Draft = Readonly<Record<string, string>>;

/** What was typed into a form, kept in this browser tab under a key until it is cleared, also over a reload. */
export function useDraft(key: string): { draft: Draft; type: (name: string, text: string) => void; clear: () => void } {
  const [draft, setDraft] = useState<Draft>(() => stored(key));
  const write = (next: Draft) => {
    setDraft(next);
    try {
      if (Object.keys(next).length === 0) sessionStorage.removeItem(key);
      else sessionStorage.setItem(key, JSON.stringify(next));
    } catch {
      // Without storage the typing still stands on the screen.
    }
  };
  return { draft, type: (name, text) => write({ ...draft, [name]: text }), clear: () => write({}) };
}

function stored(key: string): Draft {
  if (typeof sessionStorage === "undefined") return {};
  try {
    const parsed: unknown = JSON.parse(sessionStorage.getItem(key) ?? "{}");
    const entries = Object.entries(parsed ?? {}).filter(([, value]) => typeof value === "string");
    return Object.fromEntries(entries) as Draft;
  } catch {
    return {};
  }
}
