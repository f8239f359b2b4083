import type { ReactNode } from "react";
import { Link, useLocation } from "react-router";
import { nextSort, type Sort, sortRows } from "./sort";

export interface Column<Row> {
  key: string;
  label: string;
  /** Numbers stand right-aligned in the mono face. */
  numeric?: boolean;
  /** What to sort by; a column without it is not sortable. Null sorts last both ways. */
  sortBy?: (row: Row) => number | string | null;
  cell: (row: Row) => ReactNode;
}

export interface TableProps<Row> {
  /** Read by screen readers; shown with `showCaption`. */
  caption: string;
  showCaption?: boolean;
  columns: Column<Row>[];
  rows: readonly Row[];
  rowKey: (row: Row) => string;
  rowId?: (row: Row) => string;
  /** The order in force; give it together with the name of the search parameter that keeps it. */
  sort?: Sort;
  sortParam?: string;
}

/** A table sortable by plain links: `?sort=frequency` ascending, `?sort=-frequency` descending. */
export function Table<Row>(props: TableProps<Row>) {
  const { caption, showCaption = false, columns, rows, rowKey, rowId, sort, sortParam = "sort" } = props;
  const by = columns.find((column) => column.key === sort?.key)?.sortBy;
  const ordered = sort && by ? sortRows(rows, by, sort.direction) : rows;
  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: a box that scrolls must be reachable by keyboard
    <section className="table-box" aria-label={caption} tabIndex={0}>
      <table className="table">
        <caption className={showCaption ? undefined : "sr-only"}>{caption}</caption>
        <thead>
          <tr>
            {columns.map((column) => (
              <HeadCell key={column.key} column={column} sort={sort} sortParam={sortParam} />
            ))}
          </tr>
        </thead>
        <tbody>
          {ordered.map((row) => (
            <tr key={rowKey(row)} id={rowId?.(row)}>
              {columns.map((column) => (
                <td
                  key={column.key}
                  className={column.numeric ? "numeric" : undefined}
                  data-label={column.label}
                >
                  <div className="cell">{column.cell(row)}</div>
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </section>
  );
}

interface HeadCellProps<Row> {
  column: Column<Row>;
  sort?: Sort;
  sortParam: string;
}

function HeadCell<Row>({ column, sort, sortParam }: HeadCellProps<Row>) {
  const { search } = useLocation();
  const className = column.numeric ? "numeric" : undefined;
  if (!column.sortBy || !sort) {
    return (
      <th scope="col" className={className}>
        {column.label}
      </th>
    );
  }
  const active = sort.key === column.key;
  const params = new URLSearchParams(search);
  params.set(sortParam, nextSort(column.key, sort));
  return (
    <th scope="col" className={className} aria-sort={active ? sort.direction : undefined}>
      <Link to={`?${params}`} preventScrollReset replace className="sort-link">
        {column.label}
        <span aria-hidden="true" className="sort-mark">
          {active ? (sort.direction === "ascending" ? "▴" : "▾") : ""}
        </span>
      </Link>
    </th>
  );
}
