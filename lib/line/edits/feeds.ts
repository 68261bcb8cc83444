import { meanUseADay } from "../mean-use";
import type { DraftLine, DraftNode, DraftOf } from "../types";

type DraftBuffer = DraftOf<"buffer">;
type DraftSupplier = DraftOf<"supplier">;

export function suppliersOf(document: DraftLine, bufferId: string): DraftSupplier[] {
  const ids = new Set(document.links.filter((link) => link.to === bufferId).map((link) => link.from));
  return document.nodes.filter((node): node is DraftSupplier => node.kind === "supplier" && ids.has(node.id));
}

/** How a purchased buffer is replenished until somebody says otherwise: up to a level, once a week. */
export function defaultReplenishment(document: DraftLine): NonNullable<DraftBuffer["replenishment"]> {
  return { rule: "orderUpTo", reviewDays: document.calendar.daysPerWeek, lot: null, minimumOrder: 0, orderMultiple: 1 };
}

/** Mean use over lead time plus review, rounded up; null where the use or the lead time is not known yet. */
export function defaultSize(document: DraftLine, bufferId: string, leadTimeDays: number | null): number | null {
  const use = meanUseADay(document, bufferId);
  const review = document.calendar.daysPerWeek;
  if (use === null || use <= 0 || leadTimeDays === null || review === null) return null;
  return Math.max(1, Math.ceil(use * (leadTimeDays + review)));
}

/**
 * Brings what follows from the links into line with them: a replenishment rule exactly where suppliers feed a buffer,
 * and shares of its suppliers that add up to 1.
 * @param before - The document before the links changed; buffers whose suppliers are the same keep their shares.
 */
export function settleFeeds(document: DraftLine, before: DraftLine): DraftLine {
  const shares = new Map<string, number>();
  const nodes = document.nodes.map((node): DraftNode => {
    if (node.kind !== "buffer") return node;
    const suppliers = suppliersOf(document, node.id);
    const earlier = suppliersOf(before, node.id);
    if (suppliers.map((s) => s.id).join("\n") !== earlier.map((s) => s.id).join("\n"))
      for (const [id, share] of shareOut(suppliers, earlier)) shares.set(id, share);
    if (suppliers.length > 0 && node.replenishment === null)
      return { ...node, replenishment: defaultReplenishment(document) };
    const hasStation = document.links.some((link) => link.to === node.id && !suppliers.some((s) => s.id === link.from));
    if (suppliers.length === 0 && hasStation && node.replenishment !== null) return { ...node, replenishment: null };
    return node;
  });
  return {
    ...document,
    nodes: nodes.map((node) => {
      const share = shares.get(node.id);
      return node.kind === "supplier" && share !== undefined && share !== node.share ? { ...node, share } : node;
    }),
  };
}

/** A newcomer gets an equal part, the others keep their proportions; the parts make exactly 1 after rounding to 0.01 %. */
function shareOut(suppliers: readonly DraftSupplier[], earlier: readonly DraftSupplier[]): [string, number][] {
  if (suppliers.length === 0) return [];
  const known = new Set(earlier.map((s) => s.id));
  const stay = suppliers.filter((s) => known.has(s.id));
  const total = stay.reduce((sum, s) => sum + (s.share ?? 0), 0);
  const newcomer = 1 / suppliers.length;
  const forStay = stay.length * newcomer;
  const parts = suppliers.map((s): [string, number] => {
    const part = known.has(s.id) && total > 0 ? ((s.share ?? 0) / total) * forStay : newcomer;
    return [s.id, Math.round(part * 10_000) / 10_000];
  });
  const rest = 1 - parts.slice(0, -1).reduce((sum, [, part]) => sum + part, 0);
  parts[parts.length - 1] = [parts[parts.length - 1][0], Math.round(rest * 10_000) / 10_000];
  return parts;
}
