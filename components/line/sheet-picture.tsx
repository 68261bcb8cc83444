import { ScaleToFit } from "@/components/ui/scale-to-fit";
import type { DraftLine, Layout, Note } from "@/lib/line/types";
import type { RunResult } from "@/lib/simulation/types";
import { ChannelLayer } from "./drawing/channel-layer";
import { channelsOf } from "./drawing/channels";
import { NodeDrawing } from "./drawing/node-drawing";
import { sizeOf } from "@/lib/line/sheet-sizes";
import { drawingsOf, placesOf } from "./drawing/use-sheet";

type Props = { document: DraftLine; layout: Layout; notes?: readonly Note[]; result?: RunResult | null; label: string };

const margin = 12;

/** A still picture of a line as it stands on the sheet, for pages that only show it. It shrinks with the page, then scrolls sideways. */
export function SheetPicture({ document, layout, notes = [], result = null, label }: Props) {
  const places = placesOf(document, layout);
  const drawings = drawingsOf(document, result);
  const boxes = document.nodes.map((node) => ({ ...places[node.id], ...sizeOf(document, node) }));
  if (boxes.length === 0) return <p className="text-ink-2">Nothing is drawn on this line.</p>;
  const noteBoxes = notes.map(({ x, y }) => ({ x, y, width: 240, height: 90 }));
  const all = [...boxes, ...noteBoxes];
  const left = Math.min(...all.map(({ x }) => x)) - margin;
  const top = Math.min(...all.map(({ y }) => y)) - margin;
  const width = Math.max(...all.map((box) => box.x + box.width)) + margin - left;
  const height = Math.max(...all.map((box) => box.y + box.height)) + margin - top;
  return (
    <ScaleToFit width={width} height={height} label={label}>
      <svg
        className="absolute inset-0"
        width={width}
        height={height}
        viewBox={`${left} ${top} ${width} ${height}`}
        aria-hidden
      >
        <ChannelLayer channels={channelsOf(document, places)} />
      </svg>
      {document.nodes.map((node) => {
        const drawing = drawings.get(node.id);
        const { width: w, height: h } = sizeOf(document, node);
        return (
          drawing && (
            <div
              key={node.id}
              className="absolute"
              style={{ left: places[node.id].x - left, top: places[node.id].y - top, width: w, height: h }}
            >
              <NodeDrawing {...drawing} />
            </div>
          )
        );
      })}
      {notes.map((note) => (
        <div
          key={note.id}
          className="absolute w-60 border-l-2 border-ink pl-3"
          style={{ left: note.x - left, top: note.y - top }}
        >
          <p className="text-s font-[620]">{note.author}</p>
          <p className="text-s text-ink-2">{note.text}</p>
        </div>
      ))}
    </ScaleToFit>
  );
}
