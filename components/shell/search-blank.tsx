"use client";

import { useEffect, useRef } from "react";
import { Kbd } from "@/components/ui/kbd";

export type SearchBlankProps = { action?: string; name?: string; label?: string };

function isTyping(target: EventTarget | null): boolean {
  return target instanceof HTMLElement && (target.isContentEditable || target.matches("input, textarea, select"));
}

/** A blank line to fill in. `/` comes here from anywhere; Escape leaves it. A plain form, so it works without scripts. */
export function SearchBlank({
  action = "/designs",
  name = "q",
  label = "Find a design, trait, designer",
}: SearchBlankProps) {
  const input = useRef<HTMLInputElement>(null);

  useEffect(() => {
    const slash = (event: KeyboardEvent) => {
      if (event.key !== "/" || event.ctrlKey || event.metaKey || event.altKey || isTyping(event.target)) return;
      event.preventDefault();
      input.current?.focus();
      input.current?.select();
    };
    document.addEventListener("keydown", slash);
    return () => document.removeEventListener("keydown", slash);
  }, []);

  return (
    <form role="search" action={action} method="get" className="strip-search">
      <label className="sr-only" htmlFor="strip-search">
        {label}
      </label>
      <input
        ref={input}
        id="strip-search"
        type="search"
        name={name}
        placeholder={label}
        autoComplete="off"
        aria-keyshortcuts="/"
        onKeyDown={(event) => {
          if (event.key === "Escape") event.currentTarget.blur();
        }}
      />
      <Kbd>/</Kbd>
    </form>
  );
}
