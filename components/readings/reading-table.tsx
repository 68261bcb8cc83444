import type { ReactNode } from "react";

type Props = {
  title: ReactNode;
  /** Head of the column of names, and of the figures to its right. */
  first: string;
  heads: readonly string[];
  /** Column between the two, where there is one; phones leave it out. */
  bar?: string;
  /** Rows. */
  children: ReactNode;
};

/** Figures of several nodes of one kind, a row each; wide ones scroll, also by keyboard. */
export function ReadingTable({ title, first, heads, bar, children }: Props) {
  return (
    <section className="overflow-x-auto" tabIndex={0}>
      <h2 className="figure-title flex items-baseline gap-3">{title}</h2>
      <table className="sheet-table mt-1">
        <thead>
          <tr>
            <th scope="col">{first}</th>
            {bar && (
              <th scope="col" className="max-sm:hidden">
                {bar}
              </th>
            )}
            {heads.map((head) => (
              <th key={head} scope="col" className="text-right!">
                {head}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>{children}</tbody>
      </table>
    </section>
  );
}

/** Name of the node that a row is of. */
export function RowName({ children }: { children: ReactNode }) {
  return (
    <th scope="row" className="text-left font-text!">
      {children}
    </th>
  );
}
