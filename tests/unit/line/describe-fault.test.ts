import { expect, it } from "vitest";
import { describeAbout } from "@/lib/line/describe-fault";
import { exampleLine } from "@/lib/line/example";

it.each([
  [
    "puts the node's name in front",
    { node: "wind", message: "Scrap is a share." },
    "Stator winding: Scrap is a share.",
  ],
  ["says a name once", { node: "wind", message: "Stator winding has no input." }, "Stator winding has no input."],
  [
    "names both ends of a link",
    { link: { from: "lam", to: "wind" }, message: "Quantity is missing." },
    "Lamination stacks to Stator winding: Quantity is missing.",
  ],
  ["falls back on the id", { node: "ghost", message: "Gone." }, "ghost: Gone."],
  ["leaves what is about the line as it is", { message: "The line has no customer." }, "The line has no customer."],
])("%s", (_, fault, text) => expect(describeAbout(fault, exampleLine)).toBe(text));
