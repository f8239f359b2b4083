import type { Request, Response } from "express";
import * as plates from "~/db/plates.server";
import { env } from "~/env.server";
import { NARROW_FRAME_PX, text } from "./embed.ts";
import { readForm } from "./forms.server.ts";
import { sizeOf } from "./make-forms.server.ts";
import { type PlateRecord, parseRecord } from "./record.ts";

/**
 * `/oembed?url=…&format=json&maxwidth=…&maxheight=…` for plates. Source: oEmbed 1.0, https://oembed.com, section 2 (from memory,
 * not seen): 404 where there is nothing for the address, 501 for a format that is not offered.
 */
export async function oembed(request: Request, response: Response): Promise<void> {
  const search = new URL(request.url, env.BASE_URL).searchParams;
  response.set("Access-Control-Allow-Origin", "*").set("Cross-Origin-Resource-Policy", "cross-origin");
  response.vary("Accept-Encoding");
  const format = search.get("format") ?? "json";
  if (format !== "json") return refuse(response, 501, "Only the format json is offered.");
  const id = plateIdOf(search.get("url") ?? "");
  const plate = id ? await plates.findByPublicId(id) : undefined;
  if (!plate || plate.withdrawnAt)
    return refuse(response, 404, "There is no plate to embed at that address.");
  const record = parseRecord(plate.record);
  const drawing = async (form: "svg-light" | "svg-light-narrow") => {
    const found = await readForm(plate.publicId, form);
    return found && found !== "withdrawn" ? sizeOf(found.bytes.toString("utf8", 0, 400)) : null;
  };
  const [wide, narrow] = await Promise.all([drawing("svg-light"), drawing("svg-light-narrow")]);
  if (!wide || !narrow) return refuse(response, 404, "There is no plate to embed at that address.");
  const size = fitted({ wide, narrow }, mostOf(search.get("maxwidth")), mostOf(search.get("maxheight")));
  response
    .status(200)
    .set("Cache-Control", "public, max-age=600")
    .json(framed(plate.publicId, record, wide, size));
}

/** A frame of this site, whatever address the record gives: a plate that was taken in from elsewhere keeps the one it had there. */
export function framed(
  publicId: string,
  { number, title, madeBy }: Pick<PlateRecord, "number" | "title" | "madeBy">,
  wide: Size,
  size: Size,
) {
  const address = `${env.BASE_URL}/plates/${publicId}`;
  return {
    version: "1.0",
    type: "rich",
    title,
    author_name: madeBy,
    provider_name: "Swale",
    provider_url: env.BASE_URL,
    cache_age: 600,
    thumbnail_url: `${address}.png?width=640`,
    thumbnail_width: 640,
    thumbnail_height: Math.round((640 * wide.height) / wide.width),
    html: `<iframe src="${text(address)}/embed" width="${size.width}" height="${size.height}" title="${text(`Plate ${number}: ${title}`)}" style="border:0;max-width:100%" loading="lazy"></iframe>`,
    ...size,
  };
}

interface Size {
  width: number;
  height: number;
}

/** The largest frame inside what is asked for that shows the whole figure; narrow frames get the figure for phones. */
export function fitted(
  { wide, narrow }: { wide: Size; narrow: Size },
  mostWidth: number,
  mostHeight: number,
): Size {
  const width = Math.floor(Math.min(wide.width, mostWidth));
  const shown = width <= NARROW_FRAME_PX ? narrow : wide;
  const height = Math.ceil((width * shown.height) / shown.width);
  if (height <= mostHeight) return { width, height };
  // Lower than the figure at that width: narrower, by the drawing that is shown there.
  const less = Math.max(1, Math.floor((mostHeight * shown.width) / shown.height));
  const other = less <= NARROW_FRAME_PX ? narrow : wide;
  const lower = Math.min(less, Math.floor((mostHeight * other.width) / other.height));
  return {
    width: Math.max(1, lower),
    height: Math.min(mostHeight, Math.ceil((lower * other.height) / other.width)),
  };
}

/** Of this server only. */
function plateIdOf(url: string): string | null {
  if (!URL.canParse(url)) return null;
  const { origin, pathname } = new URL(url);
  return origin === env.BASE_URL ? (/^\/plates\/([0-9a-z]{6,20})$/.exec(pathname)?.[1] ?? null) : null;
}

function mostOf(given: string | null): number {
  const most = Number(given ?? Number.NaN);
  return most >= 1 ? most : Number.POSITIVE_INFINITY;
}

function refuse(response: Response, status: number, words: string): void {
  response.status(status).set("Cache-Control", "no-cache").json({ error: words });
}
