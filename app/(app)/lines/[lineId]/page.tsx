import type { Route } from "next";
import { redirect } from "next/navigation";

export default async function LinePage({ params, searchParams }: PageProps<"/lines/[lineId]">) {
  const { lineId } = await params;
  const { scenario } = await searchParams;
  const query = typeof scenario === "string" ? `?scenario=${encodeURIComponent(scenario)}` : "";
  redirect(`/lines/${lineId}/sketch${query}` as Route);
}
