/** A cell as the page lays it out. */
export interface CellView {
  readonly text: string;
  readonly className: string;
}

export interface TableView {
  readonly caption: string;
  readonly columns: readonly CellView[];
  readonly rows: readonly {
    readonly className: string;
    readonly headClass: string;
    readonly head: string;
    readonly cells: readonly CellView[];
  }[];
}

/**
 * Head of a column with how its cells are set: `num` right-aligned figures, `words` running text,
 * `code` names as in the netlist, `write` an empty field for a pen.
 */
export type Column = readonly [head: string, kind: 'num' | 'words' | 'code' | 'write' | 'short'];

/** Rows of text under their heads; the first column names the row. */
export function tableView(
  caption: string,
  columns: readonly Column[],
  rows: readonly (readonly string[])[],
  rowClass: (index: number) => string = () => '',
): TableView {
  return {
    caption,
    columns: columns.map(([text, className]) => ({ text, className })),
    rows: rows.map(([head = '', ...cells], index) => ({
      className: rowClass(index),
      headClass: columns[0]![1],
      head,
      cells: cells.map((text, cell) => ({ text, className: columns[cell + 1]![1] })),
    })),
  };
}
