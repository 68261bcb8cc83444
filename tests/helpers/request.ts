import { setHeaders } from "./next-headers";

export const origin = "http://localhost:3000";

/** A request of a page of ours, with the session of `session`. */
export function makeRequest(path: string, session: Headers, init: RequestInit = {}): Request {
  const headers = new Headers(init.headers);
  headers.set("cookie", session.get("cookie") ?? "");
  headers.set("host", "localhost:3000");
  if (init.method && !headers.has("origin")) headers.set("origin", origin);
  setHeaders(headers);
  return new Request(`${origin}${path}`, { ...init, headers });
}

export const json = (method: string, value: unknown): RequestInit => ({
  method,
  headers: { "content-type": "application/json" },
  body: JSON.stringify(value),
});

export const octets = (bytes: Uint8Array, digest: string): RequestInit => ({
  method: "POST",
  headers: { "content-type": "application/octet-stream", "x-document-digest": digest },
  body: bytes as Uint8Array<ArrayBuffer>,
});
