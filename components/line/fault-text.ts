import type { Fault } from "@/lib/line/types";

export { describeAbout } from "@/lib/line/describe-fault";

type About = Pick<Fault, "message" | "node" | "link">;

/** What to select for it. */
export function idsOf({ node, link }: About): string[] {
  if (node !== undefined) return [node];
  return link ? [`${link.from}>${link.to}`] : [];
}
