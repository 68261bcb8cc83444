"use client";

import type { EdgeChange, NodeChange } from "@xyflow/react";
import { useCallback, useEffect, useMemo, useRef, useState } from "react";
import { useLine } from "@/lib/client/line-state";
import { linkKey, moveNodes } from "@/lib/line/edits";
import { channelsOf } from "../drawing/channels";
import { describeNode } from "../drawing/node-reading";
import { inletOf, outletOf, type Point, sizeOf } from "@/lib/line/sheet-sizes";
import { placesOf, useDrawings } from "../drawing/use-sheet";
import type { ChannelEdge } from "./flow-edge";
import type { PlateData, SheetNode } from "./flow-nodes";
import { useShownResult } from "./use-shown-result";

type Measured = Record<string, { width?: number; height?: number }>;

/** The line as nodes and edges of the canvas, and the way back: what is moved or chosen there becomes edits and selection. */
export function useFlow() {
  const { document, layout, notes, faults, scenario, selection, select, apply, mayEdit } = useLine();
  const result = useShownResult();
  const [dragged, setDragged] = useState<Record<string, Point>>({});
  const [measured, setMeasured] = useState<Measured>({});
  const drawings = useDrawings(document, result, faults, scenario.kept.document);
  const settled = useMemo(() => placesOf(document, layout), [document, layout]);
  const places = useMemo(() => ({ ...settled, ...dragged }), [settled, dragged]);
  const channels = useMemo(() => channelsOf(document, places), [document, places]);

  const plates = useMemo(() => {
    const data = new Map<string, PlateData>();
    for (const node of document.nodes) {
      const drawing = drawings.get(node.id);
      if (!drawing) continue;
      data.set(node.id, {
        drawing,
        size: sizeOf(document, node),
        inlet: inletOf(document, node),
        outlet: outletOf(document, node),
      });
    }
    return data;
  }, [document, drawings]);

  const nodes = useMemo((): SheetNode[] => {
    const chosen = new Set(selection);
    const plateNodes = [...plates].map(([id, data]): SheetNode => {
      const { node, reading, fault } = data.drawing;
      return {
        id,
        type: "plate",
        position: places[id],
        data,
        selected: chosen.has(id),
        measured: measured[id],
        ariaLabel: describeNode(node, reading, fault),
      };
    });
    const noteNodes = notes.map((note): SheetNode => ({
      id: note.id,
      type: "note",
      position: dragged[note.id] ?? { x: note.x, y: note.y },
      data: { note },
      selected: chosen.has(note.id),
      measured: measured[note.id],
      ariaLabel: `Note by ${note.author}: ${note.text}`,
    }));
    return [...plateNodes, ...noteNodes];
  }, [plates, places, notes, dragged, measured, selection]);

  const edges = useMemo((): ChannelEdge[] => {
    const chosen = new Set(selection);
    const links = new Map(document.links.map((link) => [linkKey(link.from, link.to), link]));
    const nameOf = (id: string) => drawings.get(id)?.node.name ?? id;
    return channels.map(({ from, to, path, middle }) => {
      const key = linkKey(from, to);
      const quantity = links.get(key)?.quantity;
      return {
        id: key,
        type: "channel",
        source: from,
        target: to,
        selected: chosen.has(key),
        data: { path, middle, quantity: quantity === undefined ? 1 : quantity },
        ariaLabel: `Channel from ${nameOf(from)} to ${nameOf(to)}`,
      };
    });
  }, [channels, document.links, drawings, selection]);

  // The canvas tells of nodes and of links one after the other within one event: the second must see the first.
  const latest = useRef(selection);
  useEffect(() => {
    latest.current = selection;
  }, [selection]);
  const choose = useCallback(
    (changes: readonly SelectChange[]) => {
      const next = chosenAfter(latest.current, changes);
      if (!next) return;
      latest.current = next;
      select(next);
    },
    [select],
  );

  const onNodesChange = useCallback(
    (changes: NodeChange<SheetNode>[]) => {
      const moves: Record<string, Point> = {};
      let isDragging = false;
      for (const change of changes) {
        if (change.type === "position" && change.position) {
          moves[change.id] = roundPoint(change.position);
          isDragging ||= change.dragging === true;
        }
        if (change.type === "dimensions" && change.dimensions)
          setMeasured((last) => ({ ...last, [change.id]: change.dimensions ?? {} }));
      }
      if (Object.keys(moves).length > 0 && mayEdit) {
        if (isDragging) setDragged((last) => ({ ...last, ...moves }));
        else {
          // Keyboard moves come one by one: those of one selection are one step of undo.
          apply(moveNodes({ ...moves }), `move ${Object.keys(moves).join(" ")}`);
          setDragged({});
        }
      }
      choose(changes);
    },
    [apply, mayEdit, choose],
  );

  const onEdgesChange = useCallback((changes: EdgeChange<ChannelEdge>[]) => choose(changes), [choose]);

  return { nodes, edges, channels, places, onNodesChange, onEdgesChange };
}

type SelectChange = { type: string; id?: string; selected?: boolean };

const roundPoint = ({ x, y }: Point): Point => ({ x: Math.round(x), y: Math.round(y) });

/** The selection after the canvas's own changes to it, or null when there are none. */
function chosenAfter(selection: readonly string[], changes: readonly SelectChange[]): string[] | null {
  const next = new Set(selection);
  let isChanged = false;
  for (const { type, id, selected } of changes) {
    if (type !== "select" || id === undefined || next.has(id) === selected) continue;
    isChanged = true;
    if (selected) next.add(id);
    else next.delete(id);
  }
  return isChanged ? [...next] : null;
}
