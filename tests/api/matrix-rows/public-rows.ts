import type { MatrixFacts } from "../support/matrix-facts";
import { all, nowhere, type MatrixRows } from "../support/matrix-row";

const kit =
  (then: string) =>
  ({ seasonSlug }: MatrixFacts) =>
    `/api/v1/seasons/${seasonSlug}/kit${then}`;

/** What everybody may read. */
export const publicRows: MatrixRows = {
  "GET /api/v1/health": { expected: all(200) },
  "GET /api/v1/sheets/[slug]": {
    path: ({ publishedDesignSlug }) => `/api/v1/sheets/${publishedDesignSlug}`,
    expected: all(200),
  },
  "GET /api/v1/sheets/[slug]/readings": {
    path: ({ publishedDesignSlug }) => `/api/v1/sheets/${publishedDesignSlug}/readings`,
    expected: all(200),
  },
  "GET /api/v1/session-files/[id]": { path: () => `/api/v1/session-files/${nowhere}`, expected: all(404) },
  "GET /api/v1/sheets/[slug]/readings.csv": {
    path: ({ publishedDesignSlug }) => `/api/v1/sheets/${publishedDesignSlug}/readings.csv`,
    expected: all(200),
  },
  "GET /api/v1/traits": { path: () => "/api/v1/traits?trait=blades&by=inlet", expected: all(200) },
  "GET /api/v1/traits/csv": { path: () => "/api/v1/traits/csv?table=pairs", expected: all(200) },
  "PAGE /traits": { expected: all(200) },
  "GET /api/v1/sheets/[slug]/picture.png": {
    path: ({ publishedDesignSlug }) => `/api/v1/sheets/${publishedDesignSlug}/picture.png`,
    expected: all(200),
  },
  "GET /api/v1/seasons": { expected: all(200) },
  "GET /api/v1/seasons/[slug]": { path: ({ seasonSlug }) => `/api/v1/seasons/${seasonSlug}`, expected: all(200) },
  "GET /api/v1/seasons/[slug]/kit": { path: kit(""), expected: all(200) },
  "GET /api/v1/seasons/[slug]/kit/frames/[frame]/drawing.svg": {
    path: kit("/frames/120x25/drawing.svg"),
    expected: all(200),
  },
  "GET /api/v1/seasons/[slug]/kit/frames/[frame]/drawing.pdf": {
    path: kit("/frames/120x25/drawing.pdf"),
    expected: all(200),
  },
  "GET /api/v1/seasons/[slug]/kit/keep-outs.stl": { path: kit("/keep-outs.stl"), expected: all(200) },
  "GET /api/v1/seasons/[slug]/kit/keep-outs/[id]": {
    path: ({ seasonSlug, keepOutId }) => `/api/v1/seasons/${seasonSlug}/kit/keep-outs/${keepOutId}`,
    expected: all(200),
  },
  "PAGE /seasons/[slug]/kit": { path: ({ seasonSlug }) => `/seasons/${seasonSlug}/kit`, expected: all(200) },
  "GET /api/v1/seasons/[slug]/rounds/[number]": {
    path: ({ seasonSlug }) => `/api/v1/seasons/${seasonSlug}/rounds/1?rule=plain-sum`,
    expected: all(200),
  },
  "GET /api/v1/rounds": { expected: all(200) },
  "PAGE /seasons": { expected: all(200) },
  "PAGE /seasons/[slug]": { path: ({ seasonSlug }) => `/seasons/${seasonSlug}`, expected: all(200) },
  "PAGE /seasons/[slug]/rounds/[number]": {
    path: ({ seasonSlug }) => `/seasons/${seasonSlug}/rounds/1`,
    expected: all(200),
  },
  "GET /api/v1/baselines": { expected: all(200) },
  "GET /api/v1/baselines/[slug]": { path: () => "/api/v1/baselines/alder-reference-seven", expected: all(200) },
  "PAGE /baselines": { expected: all(200) },
  "PAGE /baselines/[slug]": { path: () => "/baselines/alder-reference-seven", expected: all(200) },
  "GET /api/v1/methods": { expected: all(200) },
  "GET /api/v1/corrections": { expected: all(200) },
  "GET /corrections/feed.xml": { expected: all(200) },
  "PAGE /method": { expected: all(200) },
  "PAGE /corrections": { expected: all(200) },
  "PAGE /designs/[slug]": {
    path: ({ publishedDesignSlug }) => `/designs/${publishedDesignSlug}`,
    expected: all(200),
  },
  "PAGE /designs/[slug]/[letter]": {
    path: ({ publishedDesignSlug }) => `/designs/${publishedDesignSlug}/a`,
    expected: all(200),
  },
  "PAGE /fit": { expected: all(200) },
  "GET /api/v1/designs": { expected: all(200) },
  "GET /api/v1/compare": {
    path: ({ publishedEntryId }) => `/api/v1/compare?entries=${publishedEntryId}`,
    expected: all(200),
  },
  "GET /api/v1/compare/csv": {
    path: ({ publishedEntryId }) => `/api/v1/compare/csv?entries=${publishedEntryId}`,
    expected: all(200),
  },
  "GET /api/v1/shared-comparisons/[key]": {
    path: () => `/api/v1/shared-comparisons/${"x".repeat(22)}`,
    expected: all(404),
  },
  "PAGE /compare/shared/[key]": { path: () => `/compare/shared/${"x".repeat(22)}`, expected: all(404) },
  "PAGE /": { expected: all(200) },
  "PAGE /designs": { expected: all(200) },
  "PAGE /compare": { expected: all(200) },
  "PAGE /demo/mail": { expected: all(200) },
};
