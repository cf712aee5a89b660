import clsx from "clsx";
import type { ReactNode } from "react";

export type NoticeProps = {
  kind?: "info" | "caution" | "wrong";
  title?: ReactNode;
  /** Read out when it appears by itself: "alert" for what is wrong now, "status" for news. */
  live?: "alert" | "status";
  className?: string;
  children?: ReactNode;
};

const kindWords = { info: null, caution: "Caution", wrong: "Wrong" } as const;

/** Something to know. Ribbon red only where something is wrong or dangerous, and never by colour alone. */
export function Notice({ kind = "info", title, live, className, children }: NoticeProps) {
  const word = kindWords[kind];
  return (
    <div role={live} className={clsx("notice", kind !== "info" && `notice-${kind}`, className)}>
      {title || word ? (
        <p className="notice-title">
          {word && title ? `${word}: ` : word}
          {title}
        </p>
      ) : null}
      {children}
    </div>
  );
}

/** The cautions that belong to an act, one a line, where the act is. */
export function CautionList({ title = "before you start", items }: { title?: ReactNode; items: readonly ReactNode[] }) {
  if (items.length === 0) return null;
  return (
    <Notice kind="caution" title={title}>
      <ul className="mt-1 list-[square] space-y-1 pl-5">
        {items.map((item, index) => (
          <li key={index}>{item}</li>
        ))}
      </ul>
    </Notice>
  );
}
