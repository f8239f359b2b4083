import { MINE_KINDS } from "~/db/bundle-mine.server";
import type { Queryable } from "~/db/client.server";
import { escapeHtml } from "../html-text.ts";
import { page } from "./pages.ts";
import { fileName, type PlanLine, textEntry } from "./plan.ts";

/** All data of one person, each kind as JSON, with the files that the person gave. */
export async function* planMine(userId: number, tx: Queryable): AsyncGenerator<PlanLine> {
  const told: { name: string; rows: number }[] = [];
  for (const kind of MINE_KINDS) {
    const files: PlanLine[] = [];
    let rows = 0;
    yield { path: `data/${kind.name}.json`, from: "text" };
    yield { text: "[\n" };
    for await (const found of kind.read(userId, tx)) {
      const lines = found.map(({ storageKey, ...row }) => {
        if (storageKey === undefined) return JSON.stringify(row);
        const path = `data/files/${fileName(String(row.id), String(row.name))}`;
        files.push({ path, from: "object", key: String(storageKey), sha256: String(row.sha256) });
        return JSON.stringify({ ...row, path });
      });
      if (lines.length > 0) yield { text: `${rows > 0 ? ",\n" : ""}${lines.join(",\n")}` };
      rows += lines.length;
    }
    yield { text: "\n]\n" };
    yield* files;
    told.push({ name: kind.name, rows });
  }
  yield* textEntry("data/index.html", indexOf(told));
}

function indexOf(kinds: { name: string; rows: number }[]): string {
  const items = kinds.map(
    ({ name, rows }) =>
      `<tr><td><a href="${name}.json">${escapeHtml(name.replaceAll("-", " "))}</a></td><td>${rows}</td></tr>`,
  );
  return page(
    "All my data",
    `<p>What is kept of you, a JSON file a kind; files that you gave are under <code>files/</code>. Passwords are not kept, and of tokens and sessions
only hashes, which are not in here. Photographs in <code>files/</code> are as you gave them and may say where they were taken.</p>
<table><thead><tr><th>Kind</th><th>How many</th></tr></thead><tbody>${items.join("")}</tbody></table>`,
  );
}
