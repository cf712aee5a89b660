"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";

/** Link, print and downloads; they carry the level that the address has when they are pressed. */
export function TakeAway({ tokens, levelDba }: { tokens: readonly string[]; levelDba: number }) {
  const [said, setSaid] = useState("");
  const query = `entries=${tokens.join(",")}`;
  const atLevel = (path: string) => `${path}?${query}&level=${levelDba}`;
  const copy = async () => {
    try {
      await navigator.clipboard.writeText(window.location.href);
      setSaid("Copied.");
    } catch {
      setSaid("Copy the address from the browser’s own line.");
    }
  };
  const withPresentLevel = (event: { currentTarget: HTMLAnchorElement }) => {
    const level = new URLSearchParams(window.location.search).get("level");
    if (level === null) return;
    const address = new URL(event.currentTarget.href);
    address.searchParams.set("level", level);
    event.currentTarget.href = address.toString();
  };
  return (
    <div className="screen-only -ml-1 flex flex-wrap items-center gap-x-3 gap-y-1">
      <Button kind="quiet" small onClick={() => void copy()}>
        Copy link
      </Button>
      <Button kind="quiet" small onClick={() => window.print()}>
        Print
      </Button>
      <a
        className="button button-quiet button-small"
        href={atLevel("/api/v1/compare/csv")}
        onClick={withPresentLevel}
        download
      >
        CSV
      </a>
      <a className="button button-quiet button-small" href={atLevel("/api/v1/compare")} onClick={withPresentLevel}>
        JSON
      </a>
      <span role="status" className="small-print">
        {said}
      </span>
    </div>
  );
}
