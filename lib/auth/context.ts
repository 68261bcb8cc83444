import "server-only";
import { headers } from "next/headers";
import { forbidden, notFound, unauthorized } from "next/navigation";
import { cache } from "react";
import { getDb } from "@/db/client";
import type { Ctx } from "@/db/context";
import { findWorkspaceOf, type RowRef } from "@/db/queries/rows";
import { findFirstMembership, findMembership } from "@/db/queries/workspaces";
import { AppError } from "@/lib/errors";
import { can, type Right } from "@/lib/schema/roles";
import { getAuth } from "./instance";

export type { Ctx, RowRef };

const nouns: Record<RowRef["kind"], string> = {
  line: "line",
  scenario: "scenario",
  version: "version",
  result: "result",
  share: "link",
};

const refusals: Record<Right, string> = {
  read: "Your role may not read this.",
  comment: "Your role may not comment.",
  edit: "Your role may read this line but not change it. An owner or engineer can.",
  share: "Your role may not share links. An owner or engineer can.",
  deleteLine: "Only an owner may delete a line.",
  putForward: "Your role may not put a decision forward.",
  decide: "Your role may not decide.",
  manageMembers: "Only an owner may manage members.",
  exportLog: "Only an owner may export the log.",
};

/** Reads the headers first: that marks the route as dynamic, so that a build never comes to the database. */
export const findSession = cache(async () => {
  const asked = await headers();
  return (await getAuth()).api.getSession({ headers: asked });
});

/**
 * Who asks, with the role held in the row's workspace, or in the active workspace where no row is named.
 * @throws AppError unauthenticated without a session; not-found for a row of a workspace that the user is not a member of.
 */
export async function getCtx(row?: RowRef): Promise<Ctx> {
  const session = await findSession();
  if (!session) throw new AppError("unauthenticated", "You are signed out. Sign in and try again.");
  const db = await getDb();
  const { id: userId, name: userName } = session.user;
  const membership = row
    ? await findMembership(db, userId, (await findWorkspaceOf(db, row)) ?? "")
    : ((await findMembership(db, userId, session.session.activeOrganizationId ?? "")) ??
      (await findFirstMembership(db, userId)));
  if (!membership) {
    if (row) throw new AppError("not-found", `This ${nouns[row.kind]} does not exist, or not for you.`);
    throw new AppError("forbidden", "You are not a member of any workspace.");
  }
  return { db, userId, userName, ...membership };
}

/** @throws AppError forbidden, saying what the role may not do. */
export function requireRight(ctx: Ctx, right: Right): void {
  if (!can(ctx.role, right)) throw new AppError("forbidden", refusals[right]);
}

/** For pages: `getCtx`, with Next's 401, 403 and 404 pages in place of errors. */
export async function requireCtx(row?: RowRef, right: Right = "read"): Promise<Ctx> {
  try {
    const ctx = await getCtx(row);
    requireRight(ctx, right);
    return ctx;
  } catch (error) {
    if (!(error instanceof AppError)) throw error;
    if (error.code === "unauthenticated") unauthorized();
    if (error.code === "not-found") notFound();
    forbidden();
  }
}
