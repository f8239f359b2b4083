import type { Reading } from "~/readers/reading";

/** The first rows as they stand in the file, the columns that are used marked. */
export function ReadingRows({ reading }: { reading: Reading }) {
  const preview = reading.preview;
  if (!preview) return null;
  const spec = reading.spec.text;
  const use = (column: number) => {
    if (column === spec?.frequencyColumn) return "frequency";
    if (column === spec?.valueColumn) return "value";
    if (column === spec?.secondColumn) return "second";
    return null;
  };
  const width = Math.max(preview.headings.length, ...preview.rows.map((row) => row.length));
  const columns = Array.from({ length: width }, (_, i) => i);
  return (
    <section aria-labelledby="first-rows" className="grid gap-2">
      <h3 id="first-rows">First rows of the file</h3>
      {/* biome-ignore lint/a11y/noNoninteractiveTabindex: a box that scrolls must be reachable by keyboard */}
      <section className="rows-box" aria-label="First rows of the file" tabIndex={0}>
        <table className="table rows-table">
          <thead>
            <tr>
              <th scope="col">Line</th>
              {columns.map((column) => (
                <th key={column} scope="col" className={use(column) ? "used" : undefined}>
                  {column + 1}
                  {preview.headings[column] ? ` ${preview.headings[column]}` : ""}
                  {use(column) && <span className="text-tiny text-fen block">{use(column)}</span>}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {preview.rows.map((row, i) => (
              // biome-ignore lint/suspicious/noArrayIndexKey: rows of a file have no other name than their place
              <tr key={i}>
                <th scope="row">{preview.firstLine + i}</th>
                {columns.map((column) => (
                  <td key={column} className={use(column) ? "used numeric" : "numeric"}>
                    {row[column] ?? ""}
                  </td>
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      </section>
    </section>
  );
}
