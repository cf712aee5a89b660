import { asPage, hostOnly, nowhere, signedIn, type MatrixRows } from "../support/matrix-row";

/** The address of something of the host's that isn't there. */
const under = (what: string, then?: string) => () => `/api/v1/host/${what}/${nowhere}${then ? `/${then}` : ""}`;
const budgetPart = {
  quantity: "delta_t_k",
  name: "Sensor noise",
  u: 0.05,
  evaluation: "A",
  distribution: "normal",
  source: "ten repeats",
  kind: "own_run",
};

const frame = {
  frameClass: "120",
  outerMm: 120,
  depthMm: 25,
  boreMm: 114,
  holeSpacingMm: 105,
  holeDiameterMm: 4.3,
  toleranceMm: 0.5,
};

/** The host's routes and pages. */
export const hostRows: MatrixRows = {
  "GET /api/v1/people": { expected: hostOnly(200) },
  "PUT /api/v1/people/[id]/role": {
    path: ({ memberId }) => `/api/v1/people/${memberId}/role`,
    body: { role: "member", was: "member" },
    expected: hostOnly(200),
  },
  "GET /api/v1/audit": { expected: hostOnly(200) },
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
  "POST /api/v1/host/bench-versions/[id]/keep-outs": {
    path: under("bench-versions", "keep-outs"),
    body: { name: "Memory", minMm: [62, -70, -45], maxMm: [70, 70, 8] },
    expected: hostOnly(404),
  },
  "POST /api/v1/host/bench-versions/[id]/keep-out-meshes": {
    path: () => `${under("bench-versions", "keep-out-meshes")()}?name=Fins&unit=mm`,
    body: {},
    expected: hostOnly(404),
  },
  "DELETE /api/v1/host/keep-outs/[id]": { path: under("keep-outs"), expected: hostOnly(404) },
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
  "POST /api/v1/host/frames": { body: {}, expected: signedIn(400) },
  "PUT /api/v1/host/frames/[id]": { path: under("frames"), body: frame, expected: hostOnly(404) },
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
  "PAGE /host/frames": { expected: asPage(hostOnly(200)) },
  "PAGE /host/people": { expected: asPage(hostOnly(200)) },
  "PAGE /host/audit": { expected: asPage(hostOnly(200)) },
};
