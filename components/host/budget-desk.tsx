"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Field } from "@/components/ui/field";
import { Fold } from "@/components/ui/fold";
import { Notice } from "@/components/ui/notice";
import { useAddBudget } from "@/lib/client/host";
import type { BenchSetup } from "@/lib/contracts/bench-admin";
import { formatDate } from "@/lib/format/dates";
import { draftOf, newPart, readDraft, type PartDraft } from "./budget-draft";
import { PartFields } from "./budget-part-fields";
import { BudgetChanges, BudgetTotals, PartsTable } from "./budget-words";

type Budget = BenchSetup["benches"][number]["versions"][number]["budgets"][number];

/** Budget versions of a bench version to read, each against the one before, and a new one written from the newest. */
export function BudgetDesk({ benchVersionId, budgets }: { benchVersionId: string; budgets: readonly Budget[] }) {
  const newest = budgets.at(-1);
  const [drafts, setDrafts] = useState<PartDraft[]>();
  return (
    <div className="grid gap-4">
      {budgets.length === 0 ? <p>No budget yet: write the first one below.</p> : null}
      {budgets.map((budget, i) => {
        const before = budgets[i - 1];
        const name = `Budget ${budget.number}${budget.frozenAt ? `, frozen ${formatDate(budget.frozenAt)}` : ""}`;
        return (
          <Fold key={budget.id} title={name}>
            <div className="grid gap-4">
              {budget.note ? <p>{budget.note}</p> : null}
              <PartsTable caption={name} parts={budget.parts} />
              <BudgetTotals parts={budget.parts} before={before?.parts} />
              {before ? (
                <BudgetChanges before={before.parts} after={budget.parts} since={`budget ${before.number}`} />
              ) : null}
            </div>
          </Fold>
        );
      })}
      {drafts === undefined ? (
        <p>
          <Button
            onClick={() => setDrafts(newest && newest.parts.length > 0 ? newest.parts.map(draftOf) : [newPart()])}
          >
            {newest ? `Write a new version from budget ${newest.number}` : "Write the first budget"}
          </Button>
        </p>
      ) : (
        <BudgetEditor
          benchVersionId={benchVersionId}
          before={newest}
          drafts={drafts}
          onChange={setDrafts}
          onClose={() => setDrafts(undefined)}
        />
      )}
    </div>
  );
}

type EditorProps = {
  benchVersionId: string;
  before: Budget | undefined;
  drafts: readonly PartDraft[];
  onChange: (drafts: PartDraft[]) => void;
  onClose: () => void;
};

function BudgetEditor({ benchVersionId, before, drafts, onChange, onClose }: EditorProps) {
  const router = useRouter();
  const save = useAddBudget(benchVersionId);
  const [note, setNote] = useState("");
  const read = drafts.map(readDraft);
  const parts = read.flatMap(({ part }) => part ?? []);
  const wrong = read.length - parts.length;
  const put = (at: number, change: Partial<PartDraft>) =>
    onChange(drafts.map((draft, i) => (i === at ? { ...draft, ...change } : draft)));
  return (
    <form
      aria-label="A new budget version"
      className="grid gap-5 border border-rule p-4"
      onSubmit={(event) => {
        event.preventDefault();
        if (save.isPending || wrong > 0) return;
        save.mutate(
          { note, parts },
          {
            onSuccess: () => {
              onClose();
              router.refresh();
            },
          },
        );
      }}
    >
      <h3>A new version{before ? ` from budget ${before.number}` : ""}</h3>
      <p className="small-print">Nothing old changes: figures keep the version that they were measured under.</p>
      {drafts.map((draft, i) => (
        <PartFields
          key={draft.key}
          draft={draft}
          problems={read[i]?.problems ?? {}}
          onChange={(change) => put(i, change)}
          onRemove={() => onChange(drafts.filter((_, at) => at !== i))}
        />
      ))}
      <p>
        <Button kind="quiet" small onClick={() => onChange([...drafts, newPart()])}>
          Add a part
        </Button>
      </p>
      <div aria-live="polite" className="grid gap-4">
        <h4>What it would do</h4>
        <BudgetTotals parts={parts} before={before?.parts} />
        {before ? <BudgetChanges before={before.parts} after={parts} since={`budget ${before.number}`} /> : null}
      </div>
      <Field label="Why it changes" value={note} onChange={(event) => setNote(event.currentTarget.value)} />
      {save.error ? (
        <Notice kind="wrong" title="not saved" live="alert">
          <p>{save.error.detail}</p>
          <ul className="list-[square] pl-5">
            {save.error.fields.map(({ path, message }) => (
              <li key={path}>
                {path}: {message}
              </li>
            ))}
          </ul>
        </Notice>
      ) : null}
      <p className="flex flex-wrap items-center gap-3">
        <Button type="submit" kind="solid" busy={save.isPending} busyWords="Saving …" disabled={wrong > 0}>
          Save as a new version
        </Button>
        <Button kind="quiet" onClick={onClose}>
          Leave it
        </Button>
        <span className="docket" role="status">
          {wrong > 0 ? `${wrong} of ${drafts.length} parts still to fill in` : null}
        </span>
      </p>
    </form>
  );
}
