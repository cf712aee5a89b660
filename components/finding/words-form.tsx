"use client";

import Link from "next/link";
import { useRouter } from "next/navigation";
import { useTransition, type FormEvent, type KeyboardEvent } from "react";
import { Button } from "@/components/ui/button";

export type WordsFormProps = {
  q: string;
  /** The rest of the address, to be kept. */
  kept: readonly (readonly [string, string])[];
  withoutHref: string;
};

/** Down goes from the words into the list, Escape leaves them. */
function intoList(event: KeyboardEvent<HTMLInputElement>): void {
  if (event.key === "Escape" && event.currentTarget.value === "") event.currentTarget.blur();
  if (event.key !== "ArrowDown") return;
  const first = document.querySelector<HTMLElement>("#list tbody th a, #list [data-stop] a");
  if (!first) return;
  event.preventDefault();
  first.focus();
}

/** Words to look for among what the sentence leaves. A plain form; where scripts run the list is changed in place. */
export function WordsForm({ q, kept, withoutHref }: WordsFormProps) {
  const router = useRouter();
  const [pending, start] = useTransition();

  const ask = (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const typed = new FormData(event.currentTarget).get("q");
    const words = typeof typed === "string" ? typed.trim() : "";
    const pairs = [...kept.map(([name, value]) => [name, value]), ...(words ? [["q", words]] : [])];
    const query = new URLSearchParams(pairs).toString();
    start(() => router.push(query ? `/designs?${query}` : "/designs", { scroll: false }));
  };

  return (
    <form
      role="search"
      aria-label="Words in name, designer or traits"
      action="/designs"
      method="get"
      className="screen-only grid grid-cols-[minmax(0,1fr)_auto] items-end gap-x-3 gap-y-2"
      aria-busy={pending}
      onSubmit={ask}
    >
      {kept.map(([name, value]) => (
        <input key={`${name} ${value}`} type="hidden" name={name} value={value} />
      ))}
      <div className="field w-full">
        <label className="field-label" htmlFor="index-words">
          Words in name, designer or traits
        </label>
        <span className="blank">
          <input
            key={q}
            id="index-words"
            name="q"
            type="search"
            defaultValue={q}
            maxLength={200}
            autoComplete="off"
            onKeyDown={intoList}
          />
        </span>
      </div>
      <Button type="submit" small busy={pending}>
        Find
      </Button>
      {q ? (
        <Link href={withoutHref} scroll={false} className="justify-self-start">
          Without these words
        </Link>
      ) : null}
    </form>
  );
}
