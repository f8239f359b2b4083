import type { MetaDescriptor } from "react-router";
import type { WriteUpPage } from "./write-up-page.server.ts";

/** What a published write-up tells other programs: its title, its picture, where it is for good, its forms. */
export function headOf(page: WriteUpPage): MetaDescriptor[] {
  const { title, summary, address, origin, picture, project, people } = page;
  const old = page.number !== page.latest;
  const property = (name: string, content: string) => ({ property: name, content });
  const link = (rel: string, href: string, type?: string) => ({
    tagName: "link" as const,
    rel,
    href,
    ...(type ? { type } : {}),
  });
  return [
    { title: `${title} · Swale` },
    { name: "description", content: summary },
    { name: "author", content: people.join(", ") },
    property("og:type", "article"),
    property("og:site_name", "Swale"),
    property("og:title", title),
    property("og:description", summary),
    property("og:url", address),
    ...(picture ? [property("og:image", picture)] : []),
    property("article:published_time", new Date(page.firstAt).toISOString()),
    property("article:modified_time", new Date(page.publishedAt).toISOString()),
    link("canonical", address),
    link("webmention", `${origin}/webmention`),
    link("alternate", `${address}.pdf`, "application/pdf"),
    ...(project.feed ? [link("alternate", `${origin}${project.feed}`, "application/atom+xml")] : []),
    ...(page.licence?.address ? [link("license", page.licence.address)] : []),
    // The newest version is the one to be found.
    ...(old ? [{ name: "robots", content: "noindex" }] : []),
  ];
}
