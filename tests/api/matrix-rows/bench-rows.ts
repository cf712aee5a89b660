import type { MatrixFacts } from "../support/matrix-facts";
import { asPage, noId, nowhere, only, signedIn, staff, type MatrixRows } from "../support/matrix-row";

const power = { quantity: "power_w", value: 150 };

/** Routes and pages of the bench and of review. */
export const benchRows: MatrixRows = {
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
  "PAGE /review": { expected: asPage(signedIn(200)) },
  "PAGE /review/[roundId]": {
    path: ({ roundInReviewId }) => `/review/${roundInReviewId}`,
    expected: asPage(only(200, "operator", "host", "borrower")),
  },
  "PAGE /review/[roundId]/[entryId]": {
    path: ({ roundInReviewId, entryInReviewId }) => `/review/${roundInReviewId}/${entryInReviewId}`,
    expected: asPage(only(200, "operator", "host", "borrower")),
  },
  "PAGE /bench": { expected: asPage(staff(200)) },
  "PAGE /bench/prints": { expected: asPage(staff(200)) },
  "PAGE /bench/sessions/[id]": {
    path: ({ openSessionId }) => `/bench/sessions/${openSessionId}`,
    expected: asPage(staff(200)),
  },
};
