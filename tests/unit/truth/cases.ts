import cases from "./published.json";

/** Published and exactly computed cases; each carries its source and whether the citation is from memory. */
export type Case = {
  id: string;
  title: string;
  basis: string;
  source: string;
  fromMemory: boolean;
  inputs: unknown;
  expected: unknown;
  exact: unknown;
};

/** The exact numbers of one case. */
export function exactOf<T>(id: string): T {
  const found = (cases as Case[]).find((one) => one.id === id);
  if (!found) throw new Error(`no case ${id}`);
  return found.exact as T;
}

/** "A02, Bernoulli 2 machines p=(0.9,0.8), N=3 [source, value from memory]": the name of a test. */
export function nameOf(id: string): string {
  const found = (cases as Case[]).find((one) => one.id === id);
  if (!found) throw new Error(`no case ${id}`);
  return `${id}, ${found.title} [${found.source}${found.fromMemory ? "; citation from memory" : ""}]`;
}
