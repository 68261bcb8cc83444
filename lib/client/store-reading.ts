import type { ReadingSummary } from "@/lib/schema/lines";
import { encodeResult } from "@/lib/simulation";
import { fetchJson, scenarioKey } from "./api";
import type { Reading } from "./line-state";

/** Stores a result for a document of this scenario. */
export function postReading(scenarioId: string, { result, digest }: Reading): Promise<ReadingSummary> {
  return fetchJson<ReadingSummary>(`${scenarioKey(scenarioId)}/results`, {
    method: "POST",
    headers: { "content-type": "application/octet-stream", "x-document-digest": digest },
    body: encodeResult(result) as Uint8Array<ArrayBuffer>,
  });
}
