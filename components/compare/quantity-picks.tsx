import { Pick } from "@/components/ui/pick";
import type { Line } from "@/lib/line/types";
import { type Quantity, quantitiesOf, variedNodes } from "@/lib/sizing/quantities";

/** A node (null: the whole line) and the path of one of its numbers; an empty path is its first, or its size. */
export type Chosen = { node: string | null; path: string };

export const wholeLine = "whole line";

/** Which number of which node. */
export function QuantityPicks({
  line,
  chosen,
  onChoose,
  label,
}: {
  line: Line;
  chosen: Quantity;
  onChoose(chosen: Chosen): void;
  label: string;
}) {
  const nodes = variedNodes(line).filter(({ id }) => quantitiesOf(line, id).length > 0);
  const quantities = quantitiesOf(line, chosen.node);
  return (
    <>
      <Pick
        label={label}
        value={chosen.node ?? wholeLine}
        options={nodes.map(({ id, name }) => ({ value: id ?? wholeLine, label: name, hint: kindName(line, id) }))}
        onChange={(id) => onChoose({ node: id === wholeLine ? null : id, path: "" })}
      />
      <Pick
        label="the"
        value={chosen.path}
        options={quantities.map(({ path, name }) => ({ value: path, label: name }))}
        onChange={(path) => onChoose({ node: chosen.node, path })}
      />
    </>
  );
}

const kindName = (line: Line, id: string | null) => line.nodes.find((node) => node.id === id)?.kind ?? "";

/** The quantity asked for, or the first of its node; without a node that is there, the size of the first buffer. */
export function chooseQuantity(line: Line, chosen: Chosen | null): Quantity | null {
  if (chosen) {
    const own = quantitiesOf(line, chosen.node);
    const found = own.find(({ path }) => path === chosen.path) ?? own.find(({ path }) => path === "size") ?? own[0];
    if (found) return found;
  }
  const [first] = variedNodes(line).filter(({ id }) => quantitiesOf(line, id).length > 0);
  return first ? (quantitiesOf(line, first.id)[0] ?? null) : null;
}

/** What to vary beside a quantity at first: all demand, or the first buffer where that is varied already. */
export function otherThan(line: Line, { node }: Quantity): Chosen {
  return node === null ? { node: variedNodes(line)[0].id, path: "" } : { node: null, path: "" };
}
