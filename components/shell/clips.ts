"use client";

import { useCallback, useMemo, useSyncExternalStore } from "react";

/** What is clipped to the sheet's lower edge: an id that stands in addresses, and what to call it. */
export type Clip = { id: string; name: string };

export const clipLimit = 4;
const storageKey = "clips";
const changed = "clips-changed";

function read(): string {
  try {
    return window.localStorage.getItem(storageKey) ?? "[]";
  } catch {
    return "[]";
  }
}

function parse(text: string): Clip[] {
  try {
    const stored: unknown = JSON.parse(text);
    if (!Array.isArray(stored)) return [];
    return stored
      .filter((each): each is Clip => typeof each?.id === "string" && typeof each?.name === "string")
      .slice(0, clipLimit);
  } catch {
    return [];
  }
}

/** Kept on this device and in the address (`clip=a,b`), so that a shared address carries the picks. */
export function storeClips(clips: readonly Clip[]): void {
  try {
    window.localStorage.setItem(storageKey, JSON.stringify(clips));
  } catch {
    // A device that keeps nothing still has the address.
  }
  const address = new URL(window.location.href);
  if (clips.length > 0) address.searchParams.set("clip", clips.map(({ id }) => id).join(","));
  else address.searchParams.delete("clip");
  // No state of ours: the router adds its own, and takes the new address for true only then.
  window.history.replaceState(null, "", address.toString().replaceAll("%2C", ","));
  window.dispatchEvent(new Event(changed));
}

let traversed = false;

/** Hears of the back and forward buttons, see `adoptAddress`. @returns what stops it */
export function watchTraversal(): () => void {
  const note = () => {
    traversed = true;
  };
  window.addEventListener("popstate", note);
  return () => window.removeEventListener("popstate", note);
}

/**
 * Takes over the picks of a shared address, which win over what this device had; the same picks change nothing. An
 * address that comes back by the back or forward button is an old one: what was picked since stays, and is written there.
 */
export function adoptAddress(names: Readonly<Record<string, string>>): void {
  const old = traversed;
  traversed = false;
  const asked = new URLSearchParams(window.location.search).get("clip");
  if (!asked) return;
  const now = parse(read());
  const ids = [...new Set(asked.split(",").filter(Boolean))].slice(0, clipLimit);
  const clips = ids.map((id) => ({
    id,
    name: (Object.hasOwn(names, id) ? names[id] : undefined) ?? now.find((clip) => clip.id === id)?.name ?? id,
  }));
  if (JSON.stringify(clips) !== JSON.stringify(now)) storeClips(old ? now : clips);
}

function subscribe(onChange: () => void): () => void {
  window.addEventListener(changed, onChange);
  window.addEventListener("storage", onChange);
  return () => {
    window.removeEventListener(changed, onChange);
    window.removeEventListener("storage", onChange);
  };
}

export type Clips = {
  clips: readonly Clip[];
  isClipped: (id: string) => boolean;
  isFull: boolean;
  toggle: (clip: Clip) => void;
  clear: () => void;
};

/** The clipped designs; empty on the server. A fifth is refused: `toggle` then changes nothing. */
export function useClips(): Clips {
  const text = useSyncExternalStore(subscribe, read, () => "[]");
  const clips = useMemo(() => parse(text), [text]);
  const toggle = useCallback((clip: Clip) => {
    const now = parse(read());
    const without = now.filter(({ id }) => id !== clip.id);
    if (without.length < now.length) storeClips(without);
    else if (now.length < clipLimit) storeClips([...now, clip]);
  }, []);
  const clear = useCallback(() => storeClips([]), []);
  return {
    clips,
    isClipped: (id) => clips.some((clip) => clip.id === id),
    isFull: clips.length >= clipLimit,
    toggle,
    clear,
  };
}
