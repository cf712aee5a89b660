import clsx from "clsx";

export type ButtonKind = "outline" | "solid" | "quiet" | "danger";

/** Classes of a button, for elements that are none of ours: a download link, a label. */
export function buttonClass(kind: ButtonKind = "outline", small = false, className?: string): string {
  return clsx("button", kind !== "outline" && `button-${kind}`, small && "button-small", className);
}
