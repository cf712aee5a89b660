import { siteOrigin } from "@/lib/env/site";
import { readCorrections } from "./read-corrections";

const escapes: Readonly<Record<string, string>> = {
  "&": "&amp;",
  "<": "&lt;",
  ">": "&gt;",
  '"': "&quot;",
  "'": "&apos;",
};
const xmlText = (text: string): string =>
  // XML 1.0, 2.2: control characters but tab, line feed and carriage return can't be written at all.
  [...text]
    .filter((c) => c >= " " || "\t\n\r".includes(c))
    .join("")
    .replace(/[&<>"']/g, (c) => escapes[c] ?? c);

type Item = { key: string; title: string; at: string; text: string };

function entry(origin: string, { key, title, at, text }: Item): string {
  return [
    "  <entry>",
    `    <id>${xmlText(`${origin}/corrections#${key}`)}</id>`,
    `    <title>${xmlText(title)}</title>`,
    `    <updated>${at}</updated>`,
    `    <link href="${xmlText(`${origin}/corrections#${key}`)}"/>`,
    `    <content type="text">${xmlText(text)}</content>`,
    "  </entry>",
  ].join("\n");
}

/** The ledger as an Atom feed (RFC 4287), the newest first. */
export async function correctionsFeed(): Promise<string> {
  const origin = siteOrigin();
  const { corrections, questions } = await readCorrections();
  const items: Item[] = [
    ...corrections.map((each) => ({
      key: `correction-${each.number}`,
      title: `Correction ${each.number}: ${each.what}`,
      at: each.publishedAt,
      text: `${each.what} ${each.why}`,
    })),
    ...questions.map((each) => ({
      key: `question-${each.entry.entryId}-${Date.parse(each.answeredAt)}`,
      title: `Answered: ${each.figure} of ${each.entry.name ?? "a design"} ${each.entry.letter ?? ""}`.trim(),
      at: each.answeredAt,
      text: `${each.body} ${each.answer}`,
    })),
  ].sort((a, b) => (a.at < b.at ? 1 : -1));
  return [
    '<?xml version="1.0" encoding="utf-8"?>',
    '<feed xmlns="http://www.w3.org/2005/Atom">',
    "  <title>Fanfold: corrections and answered questions</title>",
    `  <id>${xmlText(`${origin}/corrections`)}</id>`,
    `  <link rel="self" href="${xmlText(`${origin}/corrections/feed.xml`)}"/>`,
    `  <link href="${xmlText(`${origin}/corrections`)}"/>`,
    "  <author><name>The bench host</name></author>",
    `  <updated>${items[0]?.at ?? "1970-01-01T00:00:00.000Z"}</updated>`,
    ...items.map((item) => entry(origin, item)),
    "</feed>",
    "",
  ].join("\n");
}
