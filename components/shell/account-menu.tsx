"use client";

import Link from "next/link";
import { useEffect, useRef, type ReactNode } from "react";
import { moveByArrows } from "@/components/ui/arrow-keys";

export type AccountLink = { href: string; word: string };

export type AccountMenuProps = {
  /** Undefined when signed out. */
  handle?: string;
  links?: readonly AccountLink[];
  /** A form or button that signs out, made by the page that knows how. */
  signOut?: ReactNode;
  signInHref?: string;
};

/** "Sign in", or the handle with what belongs to the person under it. */
export function AccountMenu({ handle, links = [], signOut, signInHref = "/sign-in" }: AccountMenuProps) {
  const menu = useRef<HTMLDetailsElement>(null);

  useEffect(() => {
    const shut = (event: Event) => {
      if (event.target instanceof Node && !menu.current?.contains(event.target)) menu.current?.removeAttribute("open");
    };
    document.addEventListener("pointerdown", shut);
    document.addEventListener("focusin", shut);
    return () => {
      document.removeEventListener("pointerdown", shut);
      document.removeEventListener("focusin", shut);
    };
  }, []);

  if (!handle) return <Link href={signInHref}>Sign in</Link>;
  return (
    <details
      ref={menu}
      className="account"
      onKeyDown={(event) => {
        if (event.key === "Escape" && menu.current?.open) {
          menu.current.open = false;
          menu.current.querySelector("summary")?.focus();
        }
        moveByArrows(event, "summary, .account-list a, .account-list button");
      }}
      onClick={(event) => {
        if (event.target instanceof HTMLAnchorElement && menu.current) menu.current.open = false;
      }}
    >
      <summary>
        <span className="sr-only">Your account: </span>
        {handle}
      </summary>
      <div className="account-list">
        {links.map(({ href, word }) => (
          <Link key={href} href={href}>
            {word}
          </Link>
        ))}
        {signOut}
      </div>
    </details>
  );
}
