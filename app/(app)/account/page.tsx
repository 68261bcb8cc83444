import type { Metadata } from "next";
import { OuterPage } from "@/components/layout/outer-page";
import { getWorkspaceName } from "@/db/queries/workspaces";
import { findSession, requireCtx } from "@/lib/auth";
import { can, type Right, rightNames, type Role } from "@/lib/schema/roles";

export const metadata: Metadata = { title: "Account" };

const words: Partial<Record<Right, string>> = {
  read: "read lines and results",
  edit: "edit lines and scenarios, save results",
  share: "share links",
  deleteLine: "delete lines",
};

function describeRights(role: Role): string {
  return rightNames
    .filter((right) => can(role, right))
    .flatMap((right) => words[right] ?? [])
    .join("; ");
}

export default async function AccountPage() {
  const ctx = await requireCtx();
  const session = await findSession();
  const workspaceName = await getWorkspaceName(ctx.db, ctx.workspaceId);
  const facts = [
    ["Name", ctx.userName],
    ["E-mail", session?.user.email ?? ""],
    ["Workspace", workspaceName],
    ["Role", ctx.role],
    ["You may", describeRights(ctx.role)],
  ];
  return (
    <OuterPage workspaceName={workspaceName} userName={ctx.userName} current="account">
      <h1 className="text-[30px]/[36px] font-title tracking-[-.015em]">Account</h1>
      <dl className="mt-6 max-w-[640px] border-t border-ink">
        {facts.map(([name, value]) => (
          <div key={name} className="grid grid-cols-[120px_1fr] gap-4 border-b border-rule py-2.5">
            <dt className="text-ink-3">{name}</dt>
            <dd>{value}</dd>
          </div>
        ))}
      </dl>
    </OuterPage>
  );
}
