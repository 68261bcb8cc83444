"use client";

import { useReactFlow } from "@xyflow/react";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import { ChevronIcon } from "@/components/ui/icons";
import { Menu, MenuItem } from "@/components/ui/menu";
import { useLine } from "@/lib/client/line-state";
import { autoLayout } from "@/lib/line/auto-layout";
import { setLayout } from "@/lib/line/edits";
import { BarTools } from "../bar-slot";
import { ConnectDialog } from "./connect-dialog";
import { useAdd } from "./use-add";
import { addKeys } from "./use-canvas-keys";

const words = {
  supplier: "Supplier",
  buffer: "Buffer",
  station: "Station",
  customer: "Customer",
  note: "Note",
} as const;

/** The sheet's tools in the bar: add, connect, arrange. */
export function CanvasTools() {
  const { document, mayEdit, selection, apply } = useLine();
  const { fitView } = useReactFlow();
  const add = useAdd();
  const [isConnecting, setConnecting] = useState(false);
  const from = selection.length === 1 ? document.nodes.find(({ id }) => id === selection[0]) : undefined;
  if (!mayEdit) return null;

  function arrange() {
    apply(setLayout(autoLayout(document)));
    requestAnimationFrame(() => void fitView({ padding: 0.03, maxZoom: 1.1, duration: 160 }));
  }

  return (
    <>
      <BarTools>
        <Menu
          label="Add"
          align="start"
          trigger={
            <Button kind="plain">
              Add <ChevronIcon />
            </Button>
          }
        >
          {Object.entries(addKeys).map(([key, kind]) => (
            <MenuItem key={kind} shortcut={key.toUpperCase()} onSelect={() => add(kind)}>
              {words[kind]}
            </MenuItem>
          ))}
        </Menu>
        {from && from.kind !== "customer" && (
          <Button kind="plain" onClick={() => setConnecting(true)}>
            Connect to
          </Button>
        )}
        <Button kind="plain" disabled={document.nodes.length === 0} onClick={arrange}>
          Arrange
        </Button>
      </BarTools>
      {from && <ConnectDialog from={from} isOpen={isConnecting} onClose={() => setConnecting(false)} />}
    </>
  );
}
