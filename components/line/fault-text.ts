import type { DraftLine, Fault } from "@/lib/line/types";

type About = Pick<Fault, "message" | "node" | "link">;

/** A fault or caution with the name of what it is about in front, unless the sentence names it. */
export function describeAbout({ message, node, link }: About, { nodes }: DraftLine): string {
  const nameOf = (id: string): string => nodes.find((candidate) => candidate.id === id)?.name || id;
  const about = node !== undefined ? nameOf(node) : link && `${nameOf(link.from)} to ${nameOf(link.to)}`;
  return about && !message.includes(about) ? `${about}: ${message}` : message;
}

/** What to select for it. */
export function idsOf({ node, link }: About): string[] {
  if (node !== undefined) return [node];
  return link ? [`${link.from}>${link.to}`] : [];
}
