import type { ComponentChildren } from "preact";

interface CardsProps { caption: ComponentChildren; heads: string[]; isCaptionHidden?: boolean; class?: string; children: ComponentChildren }

/** A table that turns into one card a row on a phone; the roles stay said where the style takes the table apart. */
export function Cards({ caption, heads, isCaptionHidden, children, ...rest }: CardsProps) {
  return (
    <table class={`cards ${rest.class ?? ""}`} role="table">
      <caption class={isCaptionHidden === true ? "hidden" : ""}>{caption}</caption>
      <thead role="rowgroup">
        <tr role="row">
          {heads.map((head) => (
            <th key={head} scope="col" role="columnheader">
              {head}
            </th>
          ))}
        </tr>
      </thead>
      <tbody role="rowgroup">{children}</tbody>
    </table>
  );
}

interface CellProps { head: string; class?: string; isHeader?: boolean; children: ComponentChildren }

/** A cell that carries its column's head along, for the card. */
export function Cell({ head, isHeader, children, ...rest }: CellProps) {
  return isHeader === true ? (
    <th scope="row" role="rowheader" data-head={head} class={rest.class}>
      {children}
    </th>
  ) : (
    <td role="cell" data-head={head} class={rest.class}>
      {children}
    </td>
  );
}
