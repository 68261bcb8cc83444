/** Where to go after signing in: a path of this site, or the lines. Anything that a browser could read as another site is refused. */
export function safeNextPath(next: unknown): string {
  if (typeof next !== "string" || !/^\/(?![/\\])[^\\\x00-\x1f]*$/.test(next)) return "/lines";
  return next;
}
