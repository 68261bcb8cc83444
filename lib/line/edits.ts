export type { Edit, SheetState } from "./edits/edit";
export { addNode, deleteItems, duplicate, linkKey, moveNodes, setField, setNode } from "./edits/nodes";
export { canConnect, connect, setLinkQuantity } from "./edits/links";
export { addNote, deleteNote, editNote, replaceAll, setLayout, setLineField } from "./edits/sheet";
export { setFields, type FieldChange } from "./edits/fields";
