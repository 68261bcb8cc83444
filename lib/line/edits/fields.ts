import { type Edit, replaceNode, setPath, withDocument } from "./edit";

/** One cell: a field of a node by its dotted path. */
export type FieldChange = { nodeId: string; path: string; value: unknown };

/** Sets many fields as one step of undo, as a paste of cells does. */
export function setFields(changes: readonly FieldChange[], label: string): Edit {
  return {
    label,
    apply: (state) =>
      withDocument(
        state,
        changes.reduce(
          (document, { nodeId, path, value }) => replaceNode(document, nodeId, (node) => setPath(node, path, value)),
          state.document,
        ),
      ),
  };
}
