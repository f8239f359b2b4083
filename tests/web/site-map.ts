import { readFileSync } from "node:fs";
import routes from "~/routes";

type Entry = (typeof routes)[number];

export interface SiteRoute {
  file: string;
  path: string;
  methods: ("GET" | "POST")[];
}

/** Every route of the site map that has a page, a loader or an action; layouts apart. */
export function flattenSiteMap(entries: readonly Entry[] = routes, above = ""): SiteRoute[] {
  return entries.flatMap((entry) => {
    const path = entry.path ? `${above}/${entry.path}` : above;
    if (entry.children) return flattenSiteMap(entry.children, path);
    return [{ file: entry.file, path: path || "/", methods: methodsOf(entry.file) }];
  });
}

export function layoutFiles(entries: readonly Entry[] = routes): string[] {
  return entries.flatMap((entry) => (entry.children ? [entry.file, ...layoutFiles(entry.children)] : []));
}

/** What the module answers, by its exports. */
function methodsOf(file: string): SiteRoute["methods"] {
  const source = readFileSync(new URL(`../../app/${file}`, import.meta.url), "utf8");
  const exportsIt = (name: string) =>
    new RegExp(`^export (async )?(function|const) ${name}\\b`, "m").test(source);
  const page = /^export default /m.test(source);
  return [
    ...(exportsIt("loader") || page ? (["GET"] as const) : []),
    ...(exportsIt("action") ? (["POST"] as const) : []),
  ];
}
