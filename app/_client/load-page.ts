/**
 * Goes to a page of this site by a full load, where that is the point: after signing in or out, so that nothing of
 * the session before stays in memory, or out of a page that failed.
 */
export function loadPage(path: string): void {
  window.location.assign(path);
}
