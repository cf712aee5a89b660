"use client";

import Link from "next/link";
import type { ButtonHTMLAttributes, ComponentProps, MouseEvent, ReactNode } from "react";
import { useFormStatus } from "react-dom";
import { buttonClass, type ButtonKind } from "./button-class";

export type ButtonProps = ButtonHTMLAttributes<HTMLButtonElement> & {
  kind?: ButtonKind;
  small?: boolean;
  /** The press is being worked on: it stays focusable, says so, and a second press does nothing. */
  busy?: boolean;
  /** Said instead of the children while busy. */
  busyWords?: ReactNode;
};

/** A button says what happens. Type is "button" unless given, so that none submits by accident. */
export function Button({
  kind,
  small,
  busy,
  busyWords,
  type = "button",
  className,
  onClick,
  children,
  ...rest
}: ButtonProps) {
  const press = (event: MouseEvent<HTMLButtonElement>) => {
    if (busy) {
      event.preventDefault();
      return;
    }
    onClick?.(event);
  };
  return (
    <button
      {...rest}
      type={type}
      aria-disabled={busy || undefined}
      aria-busy={busy || undefined}
      className={buttonClass(kind, small, className)}
      onClick={press}
    >
      {busy && busyWords ? busyWords : children}
    </button>
  );
}

/** Submits the form it stands in and is busy as long as the form's action runs. */
export function SubmitButton({ busy, kind = "solid", ...rest }: Omit<ButtonProps, "type">) {
  const { pending } = useFormStatus();
  return <Button {...rest} kind={kind} type="submit" busy={busy || pending} />;
}

export type LinkButtonProps = ComponentProps<typeof Link> & { kind?: ButtonKind; small?: boolean };

/** A link that looks like a button, for going somewhere. */
export function LinkButton({ kind, small, className, ...rest }: LinkButtonProps) {
  return <Link {...rest} className={buttonClass(kind, small, className)} />;
}
