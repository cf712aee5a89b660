import type { MatrixFacts } from "./support/matrix-facts";
import type { MatrixRole } from "./support/matrix-roles";

export type Statuses = Readonly<Record<MatrixRole, number>>;

export interface MatrixRow {
  /** The address asked, where the route has changing parts or needs a query. */
  path?: (facts: MatrixFacts) => string;
  /** What is sent. It changes nothing that another row counts on: the state as it is, or a fault after the right. */
  body?: unknown | ((facts: MatrixFacts) => unknown);
  expected: Statuses;
}

/** The same for everybody. */
export const all = (status: number): Statuses => ({
  signedOut: status,
  member: status,
  owner: status,
  operator: status,
  host: status,
  borrower: status,
  closed: status,
});

/** 401 for those signed out and closed accounts, `status` for the roles named, 403 for the rest. */
export const only = (status: number, ...roles: MatrixRole[]): Statuses => {
  const may = (role: MatrixRole) => (roles.includes(role) ? status : 403);
  return {
    signedOut: 401,
    member: may("member"),
    owner: may("owner"),
    operator: may("operator"),
    host: may("host"),
    borrower: may("borrower"),
    closed: 401,
  };
};

export const signedIn = (status: number): Statuses => only(status, "member", "owner", "operator", "host", "borrower");
export const staff = (status: number): Statuses => only(status, "operator", "host");
export const hostOnly = (status: number): Statuses => only(status, "host");

/** `status` for the owner, 404 for everybody else who is signed in. */
export const ownerElse = (status: number): Statuses => ({ ...signedIn(404), owner: status });

/** Pages send those signed out to sign in (307) instead of answering 401. */
export const asPage = (statuses: Statuses): Statuses => ({ ...statuses, signedOut: 307, closed: 307 });

const choices = { entry_state: false, questions: false, corrections: false, seasons: false, watched: false };
/** The id of nothing. */
const nowhere = "00000000-0000-7000-8000-000000000000";
const noId = "00000000-0000-0000-0000-000000000000";
const power = { quantity: "power_w", value: 150 };
/** The address of something of the host's that isn't there. */
const under = (what: string, then?: string) => () => `/api/v1/host/${what}/${nowhere}${then ? `/${then}` : ""}`;
const ownDesign =
  (then = "") =>
  ({ ownedDesignSlug }: MatrixFacts) =>
    `/api/v1/my/designs/${ownedDesignSlug}${then}`;
const budgetPart = {
  quantity: "delta_t_k",
  name: "Sensor noise",
  u: 0.05,
  evaluation: "A",
  distribution: "normal",
  source: "ten repeats",
  kind: "own_run",
};
const kit =
  (then: string) =>
  ({ seasonSlug }: MatrixFacts) =>
    `/api/v1/seasons/${seasonSlug}/kit${then}`;
const notThis = "this is not the password";

/** Every route × every role. A route that isn't here, or is here and not in the tree, fails the test. */
export const matrix: Readonly<Record<string, MatrixRow>> = {
  "GET /api/auth/[...nextauth]": { path: () => "/api/auth/csrf", expected: all(200) },
  "POST /api/auth/[...nextauth]": { path: () => "/api/auth/callback/credentials", body: {}, expected: all(415) },
  // Other people's uploads and files are answered like none.
  "GET /api/v1/uploads": { path: () => `/api/v1/uploads?subject=${nowhere}`, expected: signedIn(200) },
  "POST /api/v1/uploads": { body: {}, expected: signedIn(400) },
  "GET /api/v1/uploads/[id]": { path: () => `/api/v1/uploads/${nowhere}`, expected: signedIn(404) },
  "DELETE /api/v1/uploads/[id]": { path: () => `/api/v1/uploads/${nowhere}`, expected: signedIn(404) },
  "HEAD /api/v1/uploads/tus/[key]": { path: () => "/api/v1/uploads/tus/nothing", expected: signedIn(404) },
  "PATCH /api/v1/uploads/tus/[key]": { path: () => "/api/v1/uploads/tus/nothing", expected: signedIn(404) },
  "GET /api/v1/files/[id]": { path: () => `/api/v1/files/${nowhere}`, expected: all(404) },
  "DELETE /api/v1/files/[id]": { path: () => `/api/v1/files/${nowhere}`, expected: signedIn(404) },
  "GET /api/v1/my/designs/[slug]/revisions/[letter]/files": {
    path: () => "/api/v1/my/designs/nobodys/revisions/A/files",
    expected: signedIn(404),
  },
  "PUT /api/v1/my/designs/[slug]/revisions/[letter]/traits": {
    path: () => "/api/v1/my/designs/nobodys/revisions/A/traits",
    body: {},
    expected: signedIn(400),
  },
  "PAGE /my/designs/[slug]/revisions/[letter]": {
    path: () => "/my/designs/nobodys/revisions/A",
    expected: asPage(signedIn(404)),
  },
  "GET /api/v1/health": { expected: all(200) },
  "GET /api/v1/account": { expected: signedIn(200) },
  "POST /api/v1/account": { body: {}, expected: all(400) },
  "PATCH /api/v1/account": { body: { handle: "-" }, expected: signedIn(400) },
  "POST /api/v1/account/verify": { body: { token: "x".repeat(43) }, expected: all(410) },
  "POST /api/v1/account/verification": { body: {}, expected: all(400) },
  "POST /api/v1/account/reset": { body: {}, expected: all(400) },
  "POST /api/v1/account/reset/confirm": {
    body: { token: "x".repeat(43), password: "herons stand in shallow water" },
    expected: all(410),
  },
  "POST /api/v1/account/password": {
    body: { currentPassword: notThis, password: "herons stand in shallow water" },
    expected: signedIn(400),
  },
  "POST /api/v1/account/email": {
    body: { email: "new@people.example", currentPassword: notThis },
    expected: signedIn(400),
  },
  "POST /api/v1/account/email/confirm": { body: { token: "x".repeat(43) }, expected: all(410) },
  "PUT /api/v1/account/mail-choices": { body: choices, expected: signedIn(204) },
  "POST /api/v1/account/close": { body: { currentPassword: notThis }, expected: signedIn(400) },
  "POST /api/v1/account/erase": { body: { currentPassword: notThis, handle: "nobody" }, expected: signedIn(400) },
  "GET /api/v1/people": { expected: hostOnly(200) },
  "PUT /api/v1/people/[id]/role": {
    path: ({ memberId }) => `/api/v1/people/${memberId}/role`,
    body: { role: "member", was: "member" },
    expected: hostOnly(200),
  },
  "GET /api/v1/audit": { expected: hostOnly(200) },

  "GET /api/v1/review/rounds": { expected: signedIn(200) },
  "GET /api/v1/review/rounds/[id]": {
    path: ({ roundInReviewId }) => `/api/v1/review/rounds/${roundInReviewId}`,
    expected: only(200, "operator", "host", "borrower"),
  },
  "GET /api/v1/review/rounds/[id]/entries/[entryId]": {
    path: ({ roundInReviewId, entryInReviewId }) =>
      `/api/v1/review/rounds/${roundInReviewId}/entries/${entryInReviewId}`,
    expected: only(200, "operator", "host", "borrower"),
  },
  // The operator took the readings; for those who may sign, the digest is not that of what stands.
  "POST /api/v1/review/rounds/[id]/sign": {
    path: ({ roundInReviewId }) => `/api/v1/review/rounds/${roundInReviewId}/sign`,
    body: { expectedSha256: "0".repeat(64) },
    expected: only(409, "host", "borrower"),
  },
  "POST /api/v1/review/rounds/[id]/send-back": {
    path: ({ roundInReviewId }) => `/api/v1/review/rounds/${roundInReviewId}/send-back`,
    body: { note: "Look again.", entries: [{ entryId: nowhere, reason: "The background is missing." }] },
    expected: only(400, "host", "borrower"),
  },

  "GET /api/v1/sheets/[slug]": {
    path: ({ publishedDesignSlug }) => `/api/v1/sheets/${publishedDesignSlug}`,
    expected: all(200),
  },
  "GET /api/v1/sheets/[slug]/readings": {
    path: ({ publishedDesignSlug }) => `/api/v1/sheets/${publishedDesignSlug}/readings`,
    expected: all(200),
  },
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

  "GET /api/v1/bench/queue": { expected: staff(200) },
  "GET /api/v1/bench/prints": { expected: staff(200) },
  "GET /api/v1/bench/sessions": { expected: staff(200) },
  "POST /api/v1/bench/sessions": {
    body: { roundId: noId, benchVersionId: noId, baselineUnitId: noId, checklist: {} },
    expected: staff(400),
  },
  "GET /api/v1/bench/sessions/[id]": {
    path: ({ openSessionId }) => `/api/v1/bench/sessions/${openSessionId}`,
    expected: staff(200),
  },
  "PATCH /api/v1/bench/sessions/[id]": {
    path: ({ openSessionId }) => `/api/v1/bench/sessions/${openSessionId}`,
    body: { version: 0, note: "" },
    expected: staff(409),
  },
  "POST /api/v1/bench/sessions/[id]/end": {
    path: ({ closedSessionId }) => `/api/v1/bench/sessions/${closedSessionId}/end`,
    body: {},
    expected: staff(409),
  },
  "POST /api/v1/bench/sessions/[id]/readings": {
    path: ({ closedSessionId }) => `/api/v1/bench/sessions/${closedSessionId}/readings`,
    body: { quantity: "humidity_percent", value: 40 },
    expected: staff(409),
  },
  "POST /api/v1/bench/sessions/[id]/runs": {
    path: ({ closedSessionId }) => `/api/v1/bench/sessions/${closedSessionId}/runs`,
    body: { entryId: null, setSpeed: 1100, mountNumber: 1 },
    expected: staff(409),
  },
  "POST /api/v1/bench/sessions/[id]/logs": {
    path: ({ openSessionId, openRunId }) =>
      `/api/v1/bench/sessions/${openSessionId}/logs?runId=${openRunId}&kind=temperature`,
    body: {},
    expected: staff(415),
  },
  "GET /api/v1/bench/sessions/[id]/recordings": {
    path: ({ openSessionId }) => `/api/v1/bench/sessions/${openSessionId}/recordings`,
    expected: staff(200),
  },
  "POST /api/v1/bench/sessions/[id]/recordings": {
    path: ({ closedSessionId }) => `/api/v1/bench/sessions/${closedSessionId}/recordings`,
    body: { purpose: "background", uploadId: noId, positionId: noId, calibration: { fullScaleDb: 120 } },
    expected: staff(409),
  },
  "GET /api/v1/bench/recordings/[id]": { path: () => `/api/v1/bench/recordings/${nowhere}`, expected: staff(404) },
  "DELETE /api/v1/bench/recordings/[id]": { path: () => `/api/v1/bench/recordings/${nowhere}`, expected: staff(404) },
  "POST /api/v1/bench/recordings/[id]/keep": {
    path: () => `/api/v1/bench/recordings/${nowhere}/keep`,
    body: {},
    expected: staff(404),
  },
  "PUT /api/v1/bench/recordings/[id]/listened": {
    path: () => `/api/v1/bench/recordings/${nowhere}/listened`,
    body: { noVoices: true },
    expected: staff(404),
  },
  "GET /api/v1/bench/recordings/[id]/file": {
    path: () => `/api/v1/bench/recordings/${nowhere}/file`,
    expected: staff(404),
  },
  "POST /api/v1/bench/sessions/[id]/holds": {
    path: () => `/api/v1/bench/sessions/${noId}/holds`,
    body: { reason: "a door was open" },
    expected: staff(404),
  },
  "POST /api/v1/bench/sessions/[id]/holds/[holdId]/lift": {
    path: ({ closedSessionId }) => `/api/v1/bench/sessions/${closedSessionId}/holds/${noId}/lift`,
    body: { note: "measured again" },
    expected: staff(404),
  },
  "POST /api/v1/bench/runs/[id]/readings": {
    path: ({ openRunId }) => `/api/v1/bench/runs/${openRunId}/readings`,
    body: { version: 0, readings: [power] },
    expected: staff(409),
  },
  "PUT /api/v1/bench/runs/[id]/state": {
    path: ({ openRunId }) => `/api/v1/bench/runs/${openRunId}/state`,
    body: { version: 0, state: "held", reason: "belt slipped" },
    expected: staff(409),
  },
  "POST /api/v1/bench/readings/[id]/supersede": {
    path: ({ closedReadingId }) => `/api/v1/bench/readings/${closedReadingId}/supersede`,
    body: { value: 50, reason: "typing error" },
    expected: staff(409),
  },
  "POST /api/v1/bench/entries/[id]/moves": {
    path: ({ entryOnBenchId }) => `/api/v1/bench/entries/${entryOnBenchId}/moves`,
    body: { from: "accepted", to: "printing" },
    expected: staff(409),
  },
  "POST /api/v1/bench/specimens": {
    body: ({ entryOnBenchId }: MatrixFacts) => ({ entryId: entryOnBenchId, material: "PETG" }),
    expected: staff(409),
  },
  "PUT /api/v1/bench/specimens/[id]/parts/[position]": {
    path: ({ specimenOnBenchId }) => `/api/v1/bench/specimens/${specimenOnBenchId}/parts/1`,
    body: { state: "printed" },
    expected: staff(409),
  },
  "POST /api/v1/bench/rounds/[id]/to-review": {
    path: ({ roundInWorkId }) => `/api/v1/bench/rounds/${roundInWorkId}/to-review`,
    body: {},
    expected: staff(409),
  },

  "PAGE /fit": { expected: all(200) },
  "GET /api/v1/host/benches": { expected: hostOnly(200) },
  "POST /api/v1/host/benches": { body: {}, expected: signedIn(400) },
  "POST /api/v1/host/benches/[id]/versions": { path: under("benches", "versions"), body: {}, expected: signedIn(400) },
  "POST /api/v1/host/bench-versions/[id]/sessions": {
    path: under("bench-versions", "sessions"),
    body: {},
    expected: signedIn(400),
  },
  "POST /api/v1/host/bench-versions/[id]/changes": {
    path: under("bench-versions", "changes"),
    body: { fromSessionId: nowhere, kind: "service", reason: "paste renewed" },
    expected: hostOnly(400),
  },
  "POST /api/v1/host/bench-versions/[id]/positions": {
    path: under("bench-versions", "positions"),
    body: { name: "on axis", distanceMm: 100, angleDeg: 0 },
    expected: hostOnly(404),
  },
  "POST /api/v1/host/bench-versions/[id]/budgets": {
    path: under("bench-versions", "budgets"),
    body: { note: "" },
    expected: hostOnly(404),
  },
  "POST /api/v1/host/budgets/[id]/parts": {
    path: under("budgets", "parts"),
    body: { ...budgetPart, unit: "K" },
    expected: hostOnly(404),
  },
  "POST /api/v1/host/protocols": { body: {}, expected: signedIn(400) },
  "POST /api/v1/host/protocols/[id]/versions": {
    path: under("protocols", "versions"),
    body: { heatLoadW: 150, setSpeeds: [900], mounts: 3, runsPerMount: 1, backgroundGrade: "survey" },
    expected: hostOnly(404),
  },
  "POST /api/v1/host/baselines": { body: {}, expected: signedIn(400) },
  "POST /api/v1/host/baselines/[id]/units": {
    path: under("baselines", "units"),
    body: { serial: "X-1", inServiceFrom: "2026-01-01T00:00:00Z" },
    expected: hostOnly(404),
  },
  "GET /api/v1/host/seasons": { expected: hostOnly(200) },
  "POST /api/v1/host/seasons": { body: {}, expected: signedIn(400) },
  "GET /api/v1/host/seasons/levels": {
    path: () => "/api/v1/host/seasons/levels?levels=40,46",
    expected: hostOnly(200),
  },
  "GET /api/v1/host/seasons/[id]": { path: under("seasons"), expected: hostOnly(404) },
  "PUT /api/v1/host/seasons/[id]": { path: under("seasons"), body: {}, expected: signedIn(400) },
  "POST /api/v1/host/seasons/[id]/moves": {
    path: under("seasons", "moves"),
    body: { to: "opened" },
    expected: hostOnly(404),
  },
  "POST /api/v1/host/seasons/[id]/rounds": { path: under("seasons", "rounds"), body: {}, expected: hostOnly(404) },
  "GET /api/v1/host/rounds/[id]": {
    path: ({ roundInReviewId }) => `/api/v1/host/rounds/${roundInReviewId}`,
    expected: hostOnly(200),
  },
  "POST /api/v1/host/rounds/[id]/entries": {
    path: ({ roundInReviewId }) => `/api/v1/host/rounds/${roundInReviewId}/entries`,
    body: { entryIds: [nowhere] },
    expected: hostOnly(409),
  },
  "POST /api/v1/host/rounds/[id]/entries/[entryId]/take-out": {
    path: ({ roundInReviewId }) => `/api/v1/host/rounds/${roundInReviewId}/entries/${nowhere}/take-out`,
    body: { reason: "It isn't of this round." },
    expected: hostOnly(409),
  },
  "PUT /api/v1/host/rounds/[id]/loan": {
    path: ({ roundInReviewId }) => `/api/v1/host/rounds/${roundInReviewId}/loan`,
    body: { handle: "nobody-of-that-name" },
    expected: hostOnly(400),
  },
  "DELETE /api/v1/host/rounds/[id]/loan": { path: under("rounds", "loan"), expected: hostOnly(404) },
  // A host owns none of its entries; the operator's role doesn't publish.
  "POST /api/v1/host/rounds/[id]/publish": {
    path: ({ roundInReviewId }) => `/api/v1/host/rounds/${roundInReviewId}/publish`,
    body: { publishAt: null },
    expected: hostOnly(409),
  },
  "GET /api/v1/host/entries": { expected: hostOnly(200) },
  "POST /api/v1/host/entries/[id]/moves": {
    path: under("entries", "moves"),
    body: { from: "sent_in", to: "accepted" },
    expected: hostOnly(404),
  },

  "GET /api/v1/designs": { expected: all(200) },
  "GET /api/v1/compare": {
    path: ({ publishedEntryId }) => `/api/v1/compare?entries=${publishedEntryId}`,
    expected: all(200),
  },
  "GET /api/v1/compare/csv": {
    path: ({ publishedEntryId }) => `/api/v1/compare/csv?entries=${publishedEntryId}`,
    expected: all(200),
  },

  "GET /api/v1/my/comparisons": { expected: signedIn(200) },
  "POST /api/v1/my/comparisons": { body: {}, expected: signedIn(400) },
  // Another's saved comparison is as little there as none.
  "GET /api/v1/my/comparisons/[id]": { path: () => `/api/v1/my/comparisons/${nowhere}`, expected: signedIn(404) },
  "PUT /api/v1/my/comparisons/[id]": {
    path: () => `/api/v1/my/comparisons/${nowhere}`,
    body: { name: "Somebody else's", note: "", shared: true },
    expected: signedIn(404),
  },
  "DELETE /api/v1/my/comparisons/[id]": { path: () => `/api/v1/my/comparisons/${nowhere}`, expected: signedIn(404) },
  "GET /api/v1/my/searches": { expected: signedIn(200) },
  "POST /api/v1/my/searches": { body: {}, expected: signedIn(400) },
  "DELETE /api/v1/my/searches/[id]": { path: () => `/api/v1/my/searches/${nowhere}`, expected: signedIn(404) },
  "GET /api/v1/shared-comparisons/[key]": {
    path: () => `/api/v1/shared-comparisons/${"x".repeat(22)}`,
    expected: all(404),
  },
  "PAGE /compare/shared/[key]": { path: () => `/compare/shared/${"x".repeat(22)}`, expected: all(404) },
  "PAGE /my/comparisons": { expected: asPage(signedIn(200)) },
  "PAGE /my/searches": { expected: asPage(signedIn(200)) },
  "PAGE /my/designs/[slug]/field": {
    path: ({ ownedDesignSlug }) => `/my/designs/${ownedDesignSlug}/field`,
    expected: asPage(ownerElse(200)),
  },

  "PAGE /": { expected: all(200) },
  "PAGE /designs": { expected: all(200) },
  "PAGE /compare": { expected: all(200) },
  "GET /api/v1/my/designs": { expected: signedIn(200) },
  "POST /api/v1/my/designs": { body: {}, expected: signedIn(400) },
  // Another's design is as little there as none.
  "GET /api/v1/my/designs/[slug]": { path: ownDesign(), expected: ownerElse(200) },
  "POST /api/v1/my/designs/[slug]/revisions": { path: ownDesign("/revisions"), body: {}, expected: signedIn(400) },
  "POST /api/v1/my/designs/[slug]/entries": {
    path: ownDesign("/entries"),
    body: { letter: "ZZ", seasonId: nowhere },
    expected: signedIn(404),
  },
  "POST /api/v1/my/designs/[slug]/entries/[entryId]/moves": {
    path: ownDesign(`/entries/${nowhere}/moves`),
    body: { from: "returned", to: "sent_in" },
    expected: signedIn(404),
  },

  "PAGE /sign-in": { expected: { ...all(307), signedOut: 200, closed: 200 } },
  "PAGE /sign-up": { expected: all(200) },
  "PAGE /verify": { expected: all(200) },
  "PAGE /verify/email": { path: () => "/verify/email?token=x", expected: all(200) },
  "PAGE /reset": { expected: all(200) },
  "PAGE /reset/new": { path: () => "/reset/new?token=x", expected: all(200) },
  "PAGE /my/designs": { expected: asPage(signedIn(200)) },
  "PAGE /my/designs/new": { expected: asPage(signedIn(200)) },
  "PAGE /my/designs/[slug]": {
    path: ({ ownedDesignSlug }) => `/my/designs/${ownedDesignSlug}`,
    expected: asPage(ownerElse(200)),
  },
  "PAGE /my/account": { expected: asPage(signedIn(200)) },
  "PAGE /review": { expected: asPage(signedIn(200)) },
  "PAGE /review/[roundId]": {
    path: ({ roundInReviewId }) => `/review/${roundInReviewId}`,
    expected: asPage(only(200, "operator", "host", "borrower")),
  },
  "PAGE /review/[roundId]/[entryId]": {
    path: ({ roundInReviewId, entryInReviewId }) => `/review/${roundInReviewId}/${entryInReviewId}`,
    expected: asPage(only(200, "operator", "host", "borrower")),
  },
  "PAGE /host": { expected: asPage(hostOnly(200)) },
  "PAGE /host/seasons": { expected: asPage(hostOnly(200)) },
  "PAGE /host/seasons/new": { expected: asPage(hostOnly(200)) },
  "PAGE /host/seasons/[id]": { path: () => `/host/seasons/${nowhere}`, expected: asPage(hostOnly(404)) },
  "PAGE /host/rounds/[id]": {
    path: ({ roundInReviewId }) => `/host/rounds/${roundInReviewId}`,
    expected: asPage(hostOnly(200)),
  },
  "PAGE /host/entries": { expected: asPage(hostOnly(200)) },
  "PAGE /host/benches": { expected: asPage(hostOnly(200)) },
  "PAGE /host/benches/[id]": {
    path: ({ benchVersionId }) => `/host/benches/${benchVersionId}`,
    expected: asPage(hostOnly(200)),
  },
  "PAGE /host/people": { expected: asPage(hostOnly(200)) },
  "PAGE /host/audit": { expected: asPage(hostOnly(200)) },
  "PAGE /bench": { expected: asPage(staff(200)) },
  "PAGE /bench/prints": { expected: asPage(staff(200)) },
  "PAGE /bench/sessions/[id]": {
    path: ({ openSessionId }) => `/bench/sessions/${openSessionId}`,
    expected: asPage(staff(200)),
  },
  "PAGE /demo/mail": { expected: all(200) },
};
