import type { MatrixFacts } from "../support/matrix-facts";
import { all, asPage, nowhere, ownerElse, signedIn, type MatrixRows } from "../support/matrix-row";

const choices = { entry_state: false, questions: false, corrections: false, seasons: false, watched: false };
const ownDesign =
  (then = "") =>
  ({ ownedDesignSlug }: MatrixFacts) =>
    `/api/v1/my/designs/${ownedDesignSlug}${then}`;
const notThis = "this is not the password";

/** Accounts, files, and what members keep of their own. */
export const memberRows: MatrixRows = {
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
  "PAGE /my/comparisons": { expected: asPage(signedIn(200)) },
  "PAGE /my/searches": { expected: asPage(signedIn(200)) },
  "PAGE /my/designs/[slug]/field": {
    path: ({ ownedDesignSlug }) => `/my/designs/${ownedDesignSlug}/field`,
    expected: asPage(ownerElse(200)),
  },
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
};
