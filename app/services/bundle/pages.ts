import { completeDip, type StoredDip } from "../../measurement/dips/complete.ts";
import { formatFrequency, formatSwr } from "../../measurement/units.ts";
import { formatDate, formatDateTime } from "../dates.ts";
import { escapeHtml } from "../html-text.ts";
import { renderNote } from "../markdown.server.ts";
import type { Rec } from "./records.ts";

/** The pages of a bundle that open from disk: no script, nothing from elsewhere. */

export interface Overview {
  project: Rec;
  people: { name: string; role: string | null }[];
  /** Of each kind what the index names, in the order of the records. */
  records: Map<string, Rec[]>;
  /** Threads: what they are on, and their file's name without ending. */
  threads: { title: string; file: string; notes: number }[];
  figures: Set<string>;
  madeAt: string;
  origin: string;
}

export type ShownNumbers = Pick<
  StoredDip,
  "frequencyHz" | "frequencyUncertaintyHz" | "minimumSwr" | "minimumSwrLow" | "minimumSwrHigh"
>;

export function indexPage(all: Overview): string {
  const { project } = all;
  const of = (kind: string) => all.records.get(kind) ?? [];
  const sweeps = of("sweeps").sort((a, b) => orderOf(a).localeCompare(orderOf(b)));
  return page(
    String(project.title),
    [
      project.demo === 1
        ? "<p><b>Invented data.</b> People, places, call signs and numbers are made up.</p>"
        : "",
      renderNote(String(project.summary)),
      `<p class="soft">A bundle of ${escapeHtml(all.origin)}, made ${formatDateTime(all.madeAt)}. It is a BagIt bag (RFC 8493): <code>manifest-sha256.txt</code> beside this folder has the checksum of every file. What the files hold is written in <a href="README.md">README.md</a>.</p>`,
      section(
        "People",
        list(all.people.map(({ name, role }) => `${escapeHtml(name)}${role ? `, ${role}` : ""}`)),
      ),
      section(
        "Design bands",
        list(
          of("bands").map(
            (band) =>
              `${escapeHtml(String(band.name))}: ${hz(band.lowHz)} to ${hz(band.highHz)}, SWR up to ${band.swrLimit}`,
          ),
        ),
      ),
      section("Sweeps", sweeps.map((sweep) => sweepPart(sweep, all)).join("")),
      section(
        "Trails",
        list(
          of("trails").map(
            (t) =>
              `${escapeHtml(String(t.name || "unnamed"))}: ${hz(t.frequencyHz)}, ${t.verdict}${t.verdictText ? `: ${escapeHtml(String(t.verdictText))}` : ""}`,
          ),
        ),
      ),
      section(
        "Steps",
        of("steps")
          .map(
            (s) =>
              `<h3>${escapeHtml(String(s.title))}</h3><p class="soft">${s.state}${s.at ? `, ${formatDate(String(s.at))}` : ""}</p>${renderNote(String(s.body))}`,
          )
          .join(""),
      ),
      section(
        "Benches",
        of("benches")
          .map((b) => `<h3>${escapeHtml(String(b.name))}</h3>${renderNote(String(b.description))}`)
          .join(""),
      ),
      section(
        "Plates",
        list(
          of("plates").map(
            (p) =>
              `<a href="plates/${p.id}/record.json">Plate ${p.number}, version ${p.version}</a>: ${escapeHtml(String(p.title))}${p.withdrawnAt ? " (withdrawn)" : ""}`,
          ),
        ),
      ),
      section(
        "Write-ups",
        list(of("write-ups").map((w) => `<a href="write-ups/${w.id}.md">${escapeHtml(String(w.title))}</a>`)),
      ),
      section(
        "Photographs",
        of("photographs")
          .map(
            (p) =>
              `<figure><img src="${escapeHtml(String(p.shownPath).slice(5))}" alt="" loading="lazy"><figcaption>${escapeHtml(String(p.caption))}</figcaption></figure>`,
          )
          .join(""),
      ),
      section(
        "Notes",
        list(
          all.threads.map(
            (t) =>
              `<a href="notes/${t.file}.html">On ${escapeHtml(t.title)}</a> (${t.notes}; <a href="notes/${t.file}.md">Markdown</a>)`,
          ),
        ),
      ),
    ].join("\n"),
  );
}

function sweepPart(sweep: Rec, all: Overview): string {
  const id = String(sweep.id);
  const original = all.records.get("originals")?.find((one) => one.id === sweep.file);
  const reading = all.records.get("readings")?.find((one) => one.id === sweep.reading);
  const dips = (all.records.get("dips") ?? []).filter((dip) => dip.sweep === id && dip.present);
  const links = [
    original && `<a href="${href(original.path)}">original</a>`,
    reading?.pointsPath && `<a href="${href(reading.pointsPath)}">points as CSV</a>`,
    reading?.touchstonePath && `<a href="${href(reading.touchstonePath)}">as Touchstone</a>`,
  ].filter(Boolean);
  const rows = dips.map(
    (dip) =>
      `<tr>${numberCells(dip.numbers as ShownNumbers)}<td>${dip.verdict}</td><td>${escapeHtml(String(dip.verdictText))}</td></tr>`,
  );
  const when = sweep.takenAt ? `taken ${formatDate(String(sweep.takenAt))}` : "day not known";
  return `<section id="sweep-${id}"><h3>${escapeHtml(String(sweep.title))}</h3><p class="soft">${when}${sweep.purpose === "reference" ? ", a bench's reference" : ""} · ${links.join(" · ")}</p>${
    all.figures.has(id) ? `<img src="figures/${id}.svg" alt="Return loss over frequency" loading="lazy">` : ""
  }${rows.length > 0 ? `<table><thead><tr><th>Dip</th><th>Lowest SWR (limits)</th><th>Verdict</th><th>Cause</th></tr></thead><tbody>${rows.join("")}</tbody></table>` : ""}</section>`;
}

function numberCells(numbers: ShownNumbers): string {
  const { frequencyHz, frequencyUncertaintyHz, ...dip } = completeDip(numbers as StoredDip);
  const frequency = formatFrequency(frequencyHz, frequencyUncertaintyHz);
  return `<td>${frequency}</td><td>${formatSwr(dip.minimumSwr, dip.minimumSwrLow, dip.minimumSwrHigh)}</td>`;
}

export function page(title: string, body: string): string {
  return `<!doctype html>
<html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width, initial-scale=1">
<meta http-equiv="Content-Security-Policy" content="default-src 'none'; img-src 'self' file: data:; style-src 'unsafe-inline'">
<title>${escapeHtml(title)}</title><style>${STYLE}</style></head>
<body><main><h1>${escapeHtml(title)}</h1>
${body}
</main></body></html>
`;
}

function section(title: string, body: string): string {
  return body === "" ? "" : `<section><h2>${title}</h2>${body}</section>`;
}

function list(items: string[]): string {
  return items.length === 0 ? "" : `<ul>${items.map((item) => `<li>${item}</li>`).join("")}</ul>`;
}

function href(path: unknown): string {
  return escapeHtml(String(path).slice("data/".length));
}

function hz(value: unknown): string {
  return formatFrequency(value as number);
}

function orderOf(sweep: Rec): string {
  return String(sweep.takenAt ?? sweep.createdAt);
}

const STYLE = `:root{color-scheme:light}body{margin:0;background:#fffdf7;color:#1e2a2b;font:16px/1.5 sans-serif}main{max-width:56rem;margin:auto;padding:1rem}
img{max-width:100%;height:auto;border:1px solid #d6cdb6}table{border-collapse:collapse}td,th{text-align:left;padding:.2rem .8rem .2rem 0;border-bottom:1px solid #d6cdb6}
.soft{color:#566061}a{color:#1d5c63}section section,.note{border-top:1px solid #d6cdb6;padding-top:.5rem;margin-top:1rem}pre{overflow-x:auto}figure{margin:0 0 1rem}`;
