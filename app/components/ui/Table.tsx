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
  /** What stands on the second line of the same cell, named on the second line of its head. */
  under?: Pick<Column<Row>, "key" | "label" | "sortBy" | "cell">;
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
  const by = columns.flatMap(linesOf).find((line) => line.key === sort?.key)?.sortBy;
  const ordered = sort && by ? sortRows(rows, by, sort.direction) : rows;
  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: a box that scrolls must be reachable by keyboard
    <section className="table-box" aria-label={caption} tabIndex={0}>
      <table className={columns.some(({ under }) => under) ? "table table-pairs" : "table"}>
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
                  data-label={linesOf(column)
                    .map(({ label }) => label)
                    .join(", ")}
                >
                  {boxed(column.cell(row))}
                  {column.under && <div className="cell-under">{column.under.cell(row)}</div>}
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </section>
  );
}

type Line<Row> = Pick<Column<Row>, "key" | "label" | "sortBy">;

function linesOf<Row>(column: Column<Row>): Line<Row>[] {
  return column.under ? [column, column.under] : [column];
}

/** Words alone need no box of their own to stand beside their label: a long table has half the elements. */
function boxed(content: ReactNode): ReactNode {
  return typeof content === "object" ? <div className="cell">{content}</div> : content;
}

interface HeadCellProps<Row> {
  column: Column<Row>;
  sort?: Sort;
  sortParam: string;
}

function HeadCell<Row>({ column, sort, sortParam }: HeadCellProps<Row>) {
  const lines = linesOf(column);
  const active = sort && lines.some(({ key, sortBy }) => sortBy && key === sort.key);
  return (
    <th
      scope="col"
      className={column.numeric ? "numeric" : undefined}
      aria-sort={active ? sort.direction : undefined}
    >
      {lines.map((line) => (
        <HeadLine key={line.key} line={line} sort={sort} sortParam={sortParam} />
      ))}
    </th>
  );
}

interface HeadLineProps<Row> {
  line: Line<Row>;
  sort?: Sort;
  sortParam: string;
}

function HeadLine<Row>({ line, sort, sortParam }: HeadLineProps<Row>) {
  const { search } = useLocation();
  if (!line.sortBy || !sort) return <div>{line.label}</div>;
  const active = sort.key === line.key;
  const params = new URLSearchParams(search);
  params.set(sortParam, nextSort(line.key, sort));
  return (
    <div>
      <Link to={`?${params}`} preventScrollReset replace className="sort-link">
        {line.label}
        <span aria-hidden="true" className="sort-mark">
          {active ? (sort.direction === "ascending" ? "▴" : "▾") : ""}
        </span>
      </Link>
    </div>
  );
}
