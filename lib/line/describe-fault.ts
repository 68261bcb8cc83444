import type { DraftLine, Fault } from "./types";

/** A fault or caution with the name of what it is about in front, unless the sentence names it. */
export function describeAbout(
  { message, node, link }: Pick<Fault, "message" | "node" | "link">,
  { nodes }: Pick<DraftLine, "nodes">,
): string {
  const nameOf = (id: string): string => nodes.find((candidate) => candidate.id === id)?.name || id;
  const about = node !== undefined ? nameOf(node) : link && `${nameOf(link.from)} to ${nameOf(link.to)}`;
  return about && !message.includes(about) ? `${about}: ${message}` : message;
}
