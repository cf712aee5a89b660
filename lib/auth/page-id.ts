import { notFound } from "next/navigation";

const shape = /^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/i;

/** An id from a page's address; anything else has no page. */
export function idOrNotFound(text: string): string {
  if (!shape.test(text)) notFound();
  return text;
}
