import { AppError, errorCodes, type ErrorCode } from "@/lib/errors";
import type { Draft } from "@/lib/schema/lines";

/** SWR keys: the address is the key. */
export const lineKey = (lineId: string) => `/api/lines/${lineId}`;
export const scenarioKey = (scenarioId: string) => `/api/scenarios/${scenarioId}`;
export const resultKey = (resultId: string) => `/api/results/${resultId}`;

/** JSON of one of our own routes; failures are AppErrors with the server's words. */
export async function fetchJson<T>(url: string, init?: RequestInit): Promise<T> {
  const response = await request(url, init);
  return (await response.json()) as T;
}

export async function fetchBytes(url: string): Promise<Uint8Array<ArrayBuffer>> {
  const response = await request(url);
  return new Uint8Array(await response.arrayBuffer());
}

/** @throws AppError for an answer that says what is wrong, TypeError where there is no connection. */
async function request(url: string, init?: RequestInit): Promise<Response> {
  const response = await fetch(url, init);
  if (!response.ok) throw await readFailure(response);
  return response;
}

export type DraftToSave = Pick<Draft, "revision" | "document" | "layout" | "notes" | "options">;
export type DraftAnswer =
  | { status: "saved"; revision: number; updatedAt: string; updatedBy: string }
  | { status: "stale"; current: Draft; differs: string[] };

/** Saves a draft; `isLeaving` lets the request outlive the page. */
export async function putDraft(scenarioId: string, draft: DraftToSave, isLeaving = false): Promise<DraftAnswer> {
  const response = await fetch(`${scenarioKey(scenarioId)}/draft`, {
    method: "PUT",
    headers: { "content-type": "application/json" },
    body: JSON.stringify(draft),
    keepalive: isLeaving,
  });
  if (response.status === 409) {
    const { current, differs } = (await response.clone().json()) as { current?: Draft; differs?: string[] };
    if (current) return { status: "stale", current, differs: differs ?? [] };
  }
  if (!response.ok) throw await readFailure(response);
  return {
    status: "saved",
    ...((await response.json()) as { revision: number; updatedAt: string; updatedBy: string }),
  };
}

async function readFailure(response: Response): Promise<AppError> {
  let body: { code?: unknown; message?: unknown; fields?: Record<string, string> } = {};
  try {
    body = await response.json();
  } catch (error) {
    if (!(error instanceof SyntaxError)) throw error;
  }
  const isKnown = errorCodes.includes(body.code as ErrorCode);
  const message = typeof body.message === "string" ? body.message : describeStatus(response.status);
  return new AppError(isKnown ? (body.code as ErrorCode) : codeOfStatus(response.status), message, body.fields);
}

function codeOfStatus(status: number): ErrorCode {
  if (status === 401) return "unauthenticated";
  if (status === 403) return "forbidden";
  if (status === 404) return "not-found";
  if (status === 413) return "too-large";
  if (status === 429) return "too-many";
  return "invalid";
}

function describeStatus(status: number): string {
  if (status >= 500) return `The server could not answer (${status}). Try again in a moment.`;
  return `The server refused this (${status}).`;
}

/** What to show for anything that was thrown. */
export function describeError(error: unknown): string {
  if (error instanceof TypeError) return "No connection to the server.";
  return error instanceof Error ? error.message : String(error);
}
