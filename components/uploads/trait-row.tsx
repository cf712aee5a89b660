"use client";

import { inletStacks } from "@/lib/contracts/own-designs";
import type { TraitLine } from "@/lib/contracts/revision-files";
import { valueWords, type TraitWords } from "./trait-words";

/** What a person has chosen for one trait so far. */
export interface TraitDraft {
  from: "read" | "declared";
  text: string;
}

type TraitRowProps = {
  name: string;
  words: TraitWords;
  line: TraitLine;
  draft: TraitDraft;
  error: string | undefined;
  onChange: (draft: TraitDraft) => void;
};

const options = { flag: ["no", "yes"], hand: ["left", "right"], stack: inletStacks } as const;

/** One trait: what was read, what is declared, and which holds. */
export function TraitRow({ name, words, line, draft, error, onChange }: TraitRowProps) {
  const label = words.unit === "" ? words.label : `${words.label}, ${words.unit}`;
  const declare = (text: string) => onChange({ from: "declared", text });
  const control = {
    "aria-label": `${label}, declared`,
    "aria-invalid": error ? (true as const) : undefined,
    value: draft.text,
  };
  return (
    <tr>
      <th scope="row" className="text-left font-normal">
        {label}
      </th>
      <td>
        <label className="flex items-center gap-2">
          <input
            type="radio"
            name={name}
            checked={draft.from === "read"}
            disabled={line.read === null}
            onChange={() => onChange({ ...draft, from: "read" })}
          />
          <span className="num">{line.read === null ? "– not read" : valueWords(line.read, words)}</span>
        </label>
      </td>
      <td>
        <div className="flex items-center gap-2">
          <input
            type="radio"
            name={name}
            aria-label={`${label}: the declared value holds`}
            checked={draft.from === "declared"}
            onChange={() => onChange({ ...draft, from: "declared" })}
          />
          <span className="blank blank-figures max-w-32">
            {words.kind === "number" ? (
              <input {...control} inputMode="decimal" size={8} onChange={({ target }) => declare(target.value)} />
            ) : (
              <select {...control} onChange={({ target }) => declare(target.value)}>
                {draft.text === "" ? <option value="">–</option> : null}
                {options[words.kind].map((each) => (
                  <option key={each}>{each}</option>
                ))}
              </select>
            )}
          </span>
        </div>
        {error ? (
          <p role="alert" className="small-print text-ribbon">
            {words.label} {error}
          </p>
        ) : null}
      </td>
    </tr>
  );
}
