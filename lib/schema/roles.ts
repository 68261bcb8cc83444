export const roleNames = ["owner", "engineer", "manager", "viewer"] as const;
export type Role = (typeof roleNames)[number];

/** What a member may do; the table of rights is `rightsOf`. */
export const rightNames = [
  "read",
  "comment",
  "edit",
  "share",
  "deleteLine",
  "putForward",
  "decide",
  "manageMembers",
  "exportLog",
] as const;
export type Right = (typeof rightNames)[number];

const rights: Record<Role, readonly Right[]> = {
  owner: rightNames,
  engineer: ["read", "comment", "edit", "share", "putForward"],
  manager: ["read", "comment", "decide"],
  viewer: ["read"],
};

/** The single table of rights, used by the server to decide and by the page to hide what a role may not use. */
export function can(role: Role, right: Right): boolean {
  return rights[role].includes(right);
}
