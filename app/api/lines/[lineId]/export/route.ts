import { getLine } from "@/db/queries/lines";
import { getScenario } from "@/db/queries/scenarios";
import { runRoute } from "@/lib/auth/run-route";
import { AppError } from "@/lib/errors";
import { writeLineFile } from "@/lib/line/file";

type Props = { params: Promise<{ lineId: string }> };

/** Letters, digits and dashes only: the name goes into a header. */
const fileNameOf = (...names: string[]) =>
  names
    .join(" ")
    .normalize("NFKD")
    .replace(/[^A-Za-z0-9]+/g, "-")
    .replace(/^-|-$/g, "")
    .toLowerCase()
    .slice(0, 80) || "line";

/** The draft of a scenario (the base where none is named) as a file. */
export async function GET(request: Request, { params }: Props) {
  const { lineId } = await params;
  const asked = new URL(request.url).searchParams.get("scenario");
  return runRoute(request, { right: "read", row: { kind: "line", id: lineId } }, async (ctx) => {
    const line = await getLine(ctx, lineId);
    const chosen = line.scenarios.find(({ id, isBase }) => (asked ? id === asked : isBase));
    if (!chosen) throw new AppError("not-found", "This line has no such scenario.");
    const { draft, name } = await getScenario(ctx, chosen.id);
    return new Response(writeLineFile({ line: draft.document, layout: draft.layout, notes: draft.notes }), {
      headers: {
        "Content-Type": "application/json; charset=utf-8",
        "Content-Disposition": `attachment; filename="${fileNameOf(line.name, name)}.json"`,
        "Cache-Control": "private, no-store",
      },
    });
  });
}
