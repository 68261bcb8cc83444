"use client";

import { useState } from "react";
import { FieldScope, BoundNumber } from "@/components/forms/field-scope";
import { Button } from "@/components/ui/button";
import { CrossIcon } from "@/components/ui/icons";
import { useLine } from "@/lib/client/line-state";
import { deleteItems, duplicate, linkKey, setField, setLineField, setLinkQuantity } from "@/lib/line/edits";
import type { DraftNode } from "@/lib/line/types";
import { ErrorLine } from "@/components/ui/error-line";
import { BufferForm } from "./buffer-form";
import { CustomerForm } from "./customer-form";
import { LineForm } from "./line-form";
import { StationForm } from "./station-form";
import { SupplierForm } from "./supplier-form";

/** The form of what is selected: a node, a link, several things, or the line itself. */
export function InspectorPanel() {
  const { selection } = useLine();
  const [isOpen, setOpen] = useState(false);
  if (!isOpen && selection.length === 0)
    return (
      <Button size="small" className="absolute top-2 right-20 z-[6]" onClick={() => setOpen(true)}>
        Line settings
      </Button>
    );
  return (
    <aside
      aria-label="Form of what is selected"
      className="w-[316px] shrink-0 overflow-y-auto border-l border-ink bg-paper px-5 py-3"
    >
      <Inspector onClose={() => setOpen(false)} />
    </aside>
  );
}

function Inspector({ onClose }: { onClose(): void }) {
  const { document, notes, selection, select, faults, mayEdit, apply } = useLine();
  const node = selection.length === 1 ? document.nodes.find(({ id }) => id === selection[0]) : undefined;
  const link =
    selection.length === 1 ? document.links.find(({ from, to }) => linkKey(from, to) === selection[0]) : undefined;
  if (selection.length > 1) return <Several />;
  if (node)
    return (
      <Form kind={kindWords(node)} title={node.name} onClose={() => select([])}>
        {faults
          .filter((fault) => fault.node === node.id && !fault.path)
          .map(({ message }) => (
            <ErrorLine key={message}>{message}</ErrorLine>
          ))}
        <FieldScope
          scope={{
            value: node,
            faults,
            nodeId: node.id,
            readOnly: !mayEdit,
            set: (path, value) => apply(setField(node.id, path, value), `${node.id}.${path}`),
          }}
        >
          <NodeForm key={node.id} node={node} />
        </FieldScope>
        {mayEdit && <NodeActions id={node.id} />}
      </Form>
    );
  if (link) {
    const nameOf = (id: string) => document.nodes.find((other) => other.id === id)?.name ?? id;
    const isInput = document.nodes.find(({ id }) => id === link.to)?.kind === "station";
    return (
      <Form kind="Channel" title={`${nameOf(link.from)} to ${nameOf(link.to)}`} onClose={() => select([])}>
        {isInput ? (
          <FieldScope
            scope={{
              value: { quantity: link.quantity === undefined ? 1 : link.quantity },
              faults: faults.filter((fault) => fault.link?.from === link.from && fault.link.to === link.to),
              readOnly: !mayEdit,
              set: (_, value) =>
                apply(setLinkQuantity(link.from, link.to, value as number | null), `quantity ${link.from} ${link.to}`),
            }}
          >
            <BoundNumber path="quantity" label="Quantity per unit made" unit="units" isWhole step={1} />
          </FieldScope>
        ) : (
          <p className="text-ink-2">Only a channel from a buffer to a station has a quantity.</p>
        )}
        {mayEdit && <NodeActions id={linkKey(link.from, link.to)} isLink />}
      </Form>
    );
  }
  if (selection.length === 1 && notes.some(({ id }) => id === selection[0]))
    return (
      <Form kind="Note" title="Remark on the sheet" onClose={() => select([])}>
        <p className="text-ink-2">Double-click the note to change its text.</p>
        {mayEdit && <NodeActions id={selection[0]} isLink />}
      </Form>
    );
  return (
    <Form kind="Line" title={document.name || "Unnamed line"} onClose={onClose}>
      <FieldScope
        scope={{
          value: document,
          faults: faults.filter((fault) => !fault.node && !fault.link),
          readOnly: !mayEdit,
          set: (path, value) => apply(setLineField(path, value), `line.${path}`),
        }}
      >
        <LineForm />
      </FieldScope>
    </Form>
  );
}

function Form({
  kind,
  title,
  onClose,
  children,
}: {
  kind: string;
  title: string;
  onClose(): void;
  children: React.ReactNode;
}) {
  return (
    <>
      <header className="mb-3 flex items-start gap-2">
        <div className="min-w-0 flex-1">
          <p className="text-s text-ink-3">{kind}</p>
          <h2 className="text-xl font-title tracking-[-.01em] [overflow-wrap:anywhere]">{title}</h2>
        </div>
        <Button kind="bare" aria-label="Close the form" onClick={onClose}>
          <CrossIcon />
        </Button>
      </header>
      <div className="space-y-3 pb-4">{children}</div>
    </>
  );
}

function kindWords(node: DraftNode): string {
  if (node.kind === "buffer") return node.replenishment ? "Purchased stock" : "Buffer filled by a station";
  return { supplier: "Supplier", station: "Station", customer: "Customer" }[node.kind];
}

function NodeForm({ node }: { node: DraftNode }) {
  switch (node.kind) {
    case "supplier":
      return <SupplierForm />;
    case "buffer":
      return <BufferForm node={node} />;
    case "station":
      return <StationForm />;
    case "customer":
      return <CustomerForm />;
  }
}

function NodeActions({ id, isLink = false }: { id: string; isLink?: boolean }) {
  const { apply, select } = useLine();
  return (
    <div className="flex gap-2 border-t border-rule pt-3">
      {!isLink && (
        <Button size="small" onClick={() => apply(duplicate([id]))}>
          Duplicate
        </Button>
      )}
      <Button
        size="small"
        kind="stop"
        onClick={() => {
          apply(deleteItems([id]));
          select([]);
        }}
      >
        Delete
      </Button>
    </div>
  );
}

function Several() {
  const { selection, select, apply, mayEdit } = useLine();
  return (
    <Form kind="Selection" title={`${selection.length} things selected`} onClose={() => select([])}>
      {mayEdit ? (
        <div className="flex gap-2">
          <Button size="small" onClick={() => apply(duplicate(selection))}>
            Duplicate all
          </Button>
          <Button
            size="small"
            kind="stop"
            onClick={() => {
              apply(deleteItems(selection));
              select([]);
            }}
          >
            Delete all
          </Button>
        </div>
      ) : (
        <p className="text-ink-2">Select one to read its figures.</p>
      )}
    </Form>
  );
}
