"use client";

import { Button } from "@/components/ui/button";
import { Dialog, DialogAnswers } from "@/components/ui/dialog";
import { useLine } from "@/lib/client/line-state";
import { canConnect, connect } from "@/lib/line/edits";
import type { DraftNode } from "@/lib/line/types";

type Props = { from: DraftNode; isOpen: boolean; onClose(): void };

/** Draws a channel without a pointer: the nodes that can be fed, and why the others cannot. */
export function ConnectDialog({ from, isOpen, onClose }: Props) {
  const { document, apply } = useLine();
  const others = document.nodes
    .filter(({ id }) => id !== from.id)
    .map((node) => ({ node, refusal: canConnect(document, from.id, node.id) }))
    .sort((a, b) => Number(a.refusal !== null) - Number(b.refusal !== null));
  return (
    <Dialog
      open={isOpen}
      onOpenChange={(open) => !open && onClose()}
      title={`What does ${from.name} feed?`}
      description="A buffer is put between two stations, and between a supplier and a station."
      isWide
    >
      <ul className="mt-3 border-t border-ink">
        {others.map(({ node, refusal }) => (
          <li key={node.id} className="border-b border-rule">
            <button
              type="button"
              disabled={refusal !== null}
              className="flex min-h-9 w-full items-baseline gap-3 px-1 py-1.5 text-left hover:enabled:bg-water-50 disabled:text-ink-3"
              onClick={() => {
                apply(connect(from.id, node.id));
                onClose();
              }}
            >
              <b className="font-[560]">{node.name}</b>
              <span className="text-s text-ink-3">{refusal ?? node.kind}</span>
            </button>
          </li>
        ))}
      </ul>
      {others.length === 0 && <p className="mt-3 text-ink-2">There is nothing else on the sheet yet.</p>}
      <DialogAnswers>
        <Button onClick={onClose}>Cancel</Button>
      </DialogAnswers>
    </Dialog>
  );
}
