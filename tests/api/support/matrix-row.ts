import type { MatrixFacts } from "./matrix-facts";
import type { MatrixRole } from "./matrix-roles";

export type Statuses = Readonly<Record<MatrixRole, number>>;

export interface MatrixRow {
  /** The address asked, where the route has changing parts or needs a query. */
  path?: (facts: MatrixFacts) => string;
  /** What is sent. It changes nothing that another row counts on: the state as it is, or a fault after the right. */
  body?: unknown | ((facts: MatrixFacts) => unknown);
  expected: Statuses;
}

export type MatrixRows = Readonly<Record<string, MatrixRow>>;

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

/** The id of nothing. */
export const nowhere = "00000000-0000-7000-8000-000000000000";
export const noId = "00000000-0000-0000-0000-000000000000";
