"use client";

import { useEffect, useId, useRef, type ReactNode } from "react";
import { Button } from "./button";

export type DialogProps = {
  open: boolean;
  onClose: () => void;
  title: ReactNode;
  closeWords?: string;
  /** Buttons that decide; the closing one stands beside them. */
  actions?: ReactNode;
  children: ReactNode;
};

/** A question over the sheet; on a phone it comes from below. The browser keeps the focus inside and gives it back. */
export function Dialog({ open, onClose, title, closeWords = "Close", actions, children }: DialogProps) {
  const ref = useRef<HTMLDialogElement>(null);
  const titleId = useId();

  useEffect(() => {
    const dialog = ref.current;
    if (!dialog) return;
    if (open && !dialog.open) dialog.showModal();
    if (!open && dialog.open) dialog.close();
  }, [open]);

  return (
    <dialog
      ref={ref}
      aria-labelledby={titleId}
      className="dialog"
      onClose={onClose}
      onClick={(event) => {
        if (event.target === ref.current) onClose();
      }}
    >
      <h2 id={titleId} className="mb-3">
        {title}
      </h2>
      {children}
      <div className="mt-5 flex flex-wrap gap-3">
        {actions}
        <Button onClick={onClose}>{closeWords}</Button>
      </div>
    </dialog>
  );
}
