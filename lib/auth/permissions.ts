import { createAccessControl } from "better-auth/plugins/access";
import { defaultStatements, ownerAc } from "better-auth/plugins/organization/access";

/**
 * What the sign-in library itself may let a role do with a workspace: members are the owner's matter alone.
 * What a role may do with lines is `can` of lib/schema/roles.
 */
export const accessControl = createAccessControl(defaultStatements);
const nothing = () => accessControl.newRole({ organization: [], member: [], invitation: [], team: [], ac: [] });

export const workspaceRoles = {
  owner: accessControl.newRole(ownerAc.statements),
  engineer: nothing(),
  manager: nothing(),
  viewer: nothing(),
};
