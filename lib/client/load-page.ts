/** Goes to a page by a full load: whoever was signed in before leaves nothing behind in memory. */
export function loadPage(path: string): void {
  window.location.assign(path);
}
