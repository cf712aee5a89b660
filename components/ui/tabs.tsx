"use client";

import { useId, useState, type ReactNode } from "react";
import { moveByArrows } from "./arrow-keys";

export type Tab = { key: string; label: ReactNode; content: ReactNode };

/** Several views of one thing; arrows move, the shown one is underlined twice. */
export function Tabs({ label, tabs, start }: { label: string; tabs: readonly Tab[]; start?: string }) {
  const id = useId();
  const [shown, setShown] = useState(start ?? tabs[0]?.key);
  return (
    <div>
      <div
        role="tablist"
        aria-label={label}
        className="tab-list"
        onKeyDown={(event) => moveByArrows(event, "[role=tab]")}
      >
        {tabs.map((tab) => (
          <button
            key={tab.key}
            type="button"
            role="tab"
            id={`${id}-${tab.key}`}
            aria-controls={`${id}-${tab.key}-panel`}
            aria-selected={tab.key === shown}
            tabIndex={tab.key === shown ? 0 : -1}
            className="tab"
            onClick={() => setShown(tab.key)}
            onFocus={() => setShown(tab.key)}
          >
            {tab.label}
          </button>
        ))}
      </div>
      {tabs.map((tab) => (
        <div
          key={tab.key}
          role="tabpanel"
          id={`${id}-${tab.key}-panel`}
          aria-labelledby={`${id}-${tab.key}`}
          hidden={tab.key !== shown}
        >
          {tab.content}
        </div>
      ))}
    </div>
  );
}
