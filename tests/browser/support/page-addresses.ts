import { signedOut, signInAs, type DemoPerson } from "../../setup/session";

export type Reader = DemoPerson | "signed out";

export interface PageAddress {
  /** The page as the tree has it: /designs/[slug]. */
  pattern: string;
  path: string;
  as: Reader;
}

/** Where each reader starts; every other page is reached from here by links. */
const starts: readonly [Reader, readonly string[]][] = [
  [
    "signed out",
    [
      "/",
      "/designs",
      "/compare",
      "/traits",
      "/seasons",
      "/baselines",
      "/method",
      "/corrections",
      "/fit",
      "/sign-in",
      "/sign-up",
      "/reset",
      "/reset/new?token=x",
      "/verify",
      "/verify/email?token=x",
      "/demo/mail",
    ],
  ],
  ["designer", ["/my/designs", "/my/searches", "/my/designs/new", "/my/account", "/my/comparisons"]],
  ["operator", ["/bench", "/bench/prints"]],
  ["reviewer", ["/review"]],
  ["host", ["/host", "/host/seasons", "/host/seasons/new", "/host/benches", "/host/people", "/host/entries"]],
];

/** Pages whose filled state differs much from the one that links lead to, and one that only who shared it links to. */
export const filledPatterns = ["/designs, searched", "/compare, filled"] as const;

/** Their addresses, and a comparison that the demo's member shared just now. */
export async function filledPages(): Promise<PageAddress[]> {
  const member = await signInAs("member");
  const listed = (await (await member.fetch("/api/v1/designs?season=season-4")).json()) as {
    items: { slug: string; letter: string; seasonSlug: string }[];
  };
  const keys = listed.items.slice(0, 2).map(({ slug, letter, seasonSlug }) => `${slug}.${letter}.${seasonSlug}`);
  const address = `/compare?entries=${keys.join(",").toLowerCase()}`;
  const kept = await member.send("POST", "/api/v1/my/comparisons", { name: "Two", note: "", address, shared: true });
  const { sharedAddress } = (await kept.json()) as { sharedAddress: string };
  return [
    { pattern: "/designs, searched", path: "/designs?q=mill", as: "signed out" },
    { pattern: "/compare, filled", path: address, as: "signed out" },
    { pattern: "/compare/shared/[key]", path: sharedAddress, as: "signed out" },
  ];
}

/** So many pages of one pattern are read for links: a round in work leads elsewhere than one in review. */
const readOfEach = 3;

/** The addresses that `patterns` of the tree have in the demo, found by following links as far as `depth` pages. */
export async function pageAddresses(patterns: readonly string[], depth = 4): Promise<PageAddress[]> {
  const found = new Map<string, PageAddress[]>();
  for (const [as, hubs] of starts) {
    const session = as === "signed out" ? signedOut() : await signInAs(as);
    let paths: readonly string[] = hubs;
    for (let step = 0; step < depth && paths.length > 0; step += 1) {
      const links: string[] = [];
      for (const path of new Set(paths)) {
        const pattern = patternOf(path, patterns);
        const known = found.get(pattern ?? "") ?? [];
        if (pattern === undefined || known.length >= readOfEach || known.some((each) => each.path === path)) continue;
        const answer = await session.fetch(path);
        // Who is sent to sign in hasn't reached it.
        if (answer.status === 200) found.set(pattern, [...known, { pattern, path, as }]);
        links.push(...linksIn(await answer.text()));
      }
      paths = links;
    }
  }
  return [...found.values()].flatMap(([first]) => first ?? []);
}

function patternOf(path: string, patterns: readonly string[]): string | undefined {
  const { pathname } = new URL(path, "http://x");
  const matches = (pattern: string) => new RegExp(`^${pattern.replaceAll(/\[[^\]]+\]/g, "[^/]+")}/?$`).test(pathname);
  // A page with a name of its own goes before one with a changing part.
  return patterns.find((pattern) => pattern === pathname) ?? patterns.find(matches);
}

const linksIn = (html: string): string[] =>
  [...html.matchAll(/href="(\/[^"#]*)/g)].map(([, href = ""]) => href.replaceAll("&amp;", "&"));
