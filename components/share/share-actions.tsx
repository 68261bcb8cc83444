"use client";

import { createContext, use } from "react";
import type { ActionResult } from "@/lib/errors";
import type { ShareKind, Sweep } from "@/lib/schema/lines";

export type NewShare = { kind: ShareKind; versionIds: string[]; sweep?: Sweep; days?: number };

/** The server actions behind shared links; handed in by the page, since components import no pages. */
export type ShareActions = {
  createShare(input: NewShare): Promise<ActionResult<{ id: string; url: string }>>;
  revokeShare(input: { shareId: string }): Promise<ActionResult<unknown>>;
};

export const ShareActionsContext = createContext<ShareActions | null>(null);

export function useShareActions(): ShareActions {
  const actions = use(ShareActionsContext);
  if (!actions) throw new Error("useShareActions outside ShareActionsContext");
  return actions;
}
