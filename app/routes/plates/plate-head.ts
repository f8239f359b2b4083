import type { MetaDescriptor } from "react-router";

interface Headed {
  publicId: string;
  number: number;
  title: string;
  address: string;
  madeAt: string;
  madeBy: string;
  people: { name: string }[];
  project: { title: string };
  licence: { address: string | null };
  hasTouchstone: boolean;
  /** In plain words. */
  description: string;
}

/** What other programs read in the head of a plate's page: Open Graph, oEmbed, its forms, and how to cite it. Pure. */
export function plateHead(plate: Headed, origin: string): MetaDescriptor[] {
  const { address, title, number } = plate;
  const name = `Plate ${number}: ${title}`;
  const picture = `${address}.png?width=1280`;
  const oembed = `${origin}/oembed?format=json&url=${encodeURIComponent(address)}`;
  const form = (type: string, path: string, words: string) =>
    link({ rel: "alternate", type, href: `${address}${path}`, title: words });
  return [
    { title: `${name} · Swale` },
    { name: "description", content: plate.description },
    { property: "og:type", content: "article" },
    { property: "og:site_name", content: "Swale" },
    { property: "og:title", content: name },
    { property: "og:description", content: plate.description },
    { property: "og:url", content: address },
    { property: "og:image", content: picture },
    { property: "og:image:type", content: "image/png" },
    { property: "og:image:width", content: "1280" },
    { property: "og:image:alt", content: `Figure of ${name}` },
    { property: "article:published_time", content: plate.madeAt },
    { name: "citation_title", content: name },
    { name: "citation_publication_date", content: plate.madeAt.slice(0, 10).replaceAll("-", "/") },
    ...authorsOf(plate).map((author) => ({ name: "citation_author", content: author })),
    { name: "citation_public_url", content: address },
    { name: "citation_pdf_url", content: `${address}.pdf` },
    link({ rel: "canonical", href: address }),
    link({ rel: "webmention", href: `${origin}/webmention` }),
    link({ rel: "alternate", type: "application/json+oembed", href: oembed, title: name }),
    form("image/svg+xml", ".svg", "The figure as SVG"),
    form("image/png", ".png?width=1280", "The figure as PNG"),
    form("application/pdf", ".pdf", "The plate as PDF"),
    form("text/csv", ".csv", "Its numbers as CSV"),
    form("application/json", ".json", "All it says as JSON"),
    form("application/x-bibtex", ".bib", "How to cite it, BibTeX"),
    form("application/vnd.citationstyles.csl+json", ".csl.json", "How to cite it, CSL-JSON"),
    ...(plate.licence.address ? [link({ rel: "license", href: plate.licence.address })] : []),
  ];
}

/** Who made it first, each once. */
function authorsOf({ madeBy, people }: Headed): string[] {
  return [...new Set([madeBy, ...people.map(({ name }) => name)])];
}

function link(attributes: Record<string, string>): MetaDescriptor {
  return { tagName: "link", ...attributes };
}
