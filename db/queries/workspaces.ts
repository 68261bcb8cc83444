import { and, asc, eq } from "drizzle-orm";
import { AppError } from "@/lib/errors";
import { roleNames, type Role } from "@/lib/schema/roles";
import type { Db } from "../context";
import { member, organization, user } from "../schema";

export type Membership = { workspaceId: string; role: Role };

/** The library may keep several roles as a comma-separated list; the one with most rights counts. */
function readRole(stored: string): Role | undefined {
  const held = stored.split(",").map((part) => part.trim());
  return roleNames.find((name) => held.includes(name));
}

/** @returns Null for a workspace that the user is not a member of, whether or not it exists. */
export async function findMembership(db: Db, userId: string, workspaceId: string): Promise<Membership | null> {
  const [row] = await db
    .select({ workspaceId: member.organizationId, role: member.role })
    .from(member)
    .where(and(eq(member.userId, userId), eq(member.organizationId, workspaceId)));
  const role = row && readRole(row.role);
  return role ? { workspaceId: row.workspaceId, role } : null;
}

/** The user's oldest membership. */
export async function findFirstMembership(db: Db, userId: string): Promise<Membership | null> {
  const rows = await db
    .select({ workspaceId: member.organizationId, role: member.role })
    .from(member)
    .where(eq(member.userId, userId))
    .orderBy(asc(member.createdAt), asc(member.id));
  for (const { workspaceId, role: stored } of rows) {
    const role = readRole(stored);
    if (role) return { workspaceId, role };
  }
  return null;
}

/** Name of a workspace that the caller is known to be a member of. */
export async function getWorkspaceName(db: Db, workspaceId: string): Promise<string> {
  const [row] = await db.select({ name: organization.name }).from(organization).where(eq(organization.id, workspaceId));
  if (!row) throw new AppError("not-found", "This workspace does not exist.");
  return row.name;
}

/** Id of the workspace that a new session works in; somebody without any gets one of their own, as its owner. */
export async function ensureWorkspace(db: Db, userId: string): Promise<string> {
  return db.transaction(async (tx) => {
    // The row lock keeps two first sign-ins from making two workspaces.
    const [person] = await tx.select({ name: user.name }).from(user).where(eq(user.id, userId)).for("update");
    if (!person) throw new Error(`no user has the id ${userId}`);
    const first = await findFirstMembership(tx, userId);
    if (first) return first.workspaceId;
    const workspaceId = crypto.randomUUID();
    const name = `${person.name}'s workspace`;
    await tx.insert(organization).values({ id: workspaceId, name, slug: workspaceId, createdAt: new Date() });
    const id = crypto.randomUUID();
    await tx.insert(member).values({ id, organizationId: workspaceId, userId, role: "owner", createdAt: new Date() });
    return workspaceId;
  });
}
