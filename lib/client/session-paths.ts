/** Where to go after signing in: a path of this site, never another site's address. */
export function pathAfterSignIn(to: string | undefined): string {
  return to !== undefined && /^\/(?![/\\])[^\s\\]*$/.test(to) ? to : "/";
}

/** Goes to a page of this site by loading it anew, so that nothing of the session before stays in memory. */
export function loadAnew(path: string): void {
  window.location.assign(path);
}
