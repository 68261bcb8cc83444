import { getLine } from "@/db/queries/lines";
import { getScenario } from "@/db/queries/scenarios";
import { requireCtx } from "@/lib/auth";
import { LineShell } from "./_components/line-shell";

export async function generateMetadata({ params }: LayoutProps<"/lines/[lineId]">) {
  const { lineId } = await params;
  const ctx = await requireCtx({ kind: "line", id: lineId });
  const { name } = await getLine(ctx, lineId);
  return { title: name };
}

/** Reads the line and its base scenario once for all its views; the scenario in the address is read by the page. */
export default async function LineLayout({ params, children }: LayoutProps<"/lines/[lineId]">) {
  const { lineId } = await params;
  const ctx = await requireCtx({ kind: "line", id: lineId });
  const line = await getLine(ctx, lineId);
  const base = line.scenarios.find(({ isBase }) => isBase) ?? line.scenarios[0];
  const initial = await getScenario(ctx, base.id);
  return (
    <LineShell key={line.id} line={line} initial={initial} userName={ctx.userName}>
      {children}
    </LineShell>
  );
}
