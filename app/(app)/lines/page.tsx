import type { Metadata } from "next";
import { OuterPage } from "@/components/layout/outer-page";
import { listLines } from "@/db/queries/lines";
import { getWorkspaceName } from "@/db/queries/workspaces";
import { requireCtx } from "@/lib/auth";
import { LinesRegister } from "./_components/lines-register";

export const metadata: Metadata = { title: "Lines" };

export default async function LinesPage() {
  const ctx = await requireCtx();
  const [lines, workspaceName] = await Promise.all([listLines(ctx), getWorkspaceName(ctx.db, ctx.workspaceId)]);
  return (
    <OuterPage workspaceName={workspaceName} userName={ctx.userName} current="lines">
      <LinesRegister lines={lines} role={ctx.role} />
    </OuterPage>
  );
}
