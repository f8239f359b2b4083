import type { NextFunction, Request, Response } from "express";
import * as plates from "~/db/plates.server";
import { env } from "~/env.server";
import { log } from "../log.server.ts";
import { type Ending, type FormName, formOf, NEGOTIATED } from "./form-names.ts";
import { readForm, type StoredForm } from "./forms.server.ts";
import { oembed } from "./oembed.server.ts";

/**
 * The frozen forms of plates, before anything else is asked: no session, no cookie, no page. `/plates/ID.svg` and its like,
 * `/plates/ID/embed`, `/oembed`, and the plain address for who does not want a page. What is not ours goes on.
 */
export async function servePlates(request: Request, response: Response, next: NextFunction): Promise<void> {
  if (request.method !== "GET" && request.method !== "HEAD") return next();
  try {
    if (request.path === "/oembed") return await oembed(request, response);
    const [, id, ending] = FORM_PATH.exec(request.path) ?? [];
    if (id && ending) {
      return await answer(request, response, id, ending.replace(/^\./, "") as Ending);
    }
    const plain = PLAIN_PATH.exec(request.path)?.[1];
    if (!plain) return next();
    response.vary("Accept");
    const wanted = request.accepts(["text/html", ...NEGOTIATED.keys()]);
    const negotiated = NEGOTIATED.get(wanted || "");
    if (!negotiated) return next();
    response.set("Content-Location", `/plates/${plain}.${negotiated}`);
    await answer(request, response, plain, negotiated);
  } catch (error) {
    log.error({ err: error }, "a form of a plate could not be sent");
    if (!response.headersSent) {
      say(response, 503, "The plate can't be fetched just now. It is not lost: try again in a while.");
    }
  }
}

async function answer(request: Request, response: Response, id: string, ending: Ending): Promise<void> {
  const form = formOf(ending, new URL(request.url, env.BASE_URL).searchParams);
  guard(response, ending);
  if (!form)
    return say(response, 404, "There is no such size or theme of a plate. PNG: width 640, 1280 or 2560.");
  const found = await readForm(id, form);
  if (found === "withdrawn") return sayWithdrawn(response, id);
  if (!found) return sayMissing(response, id, form);
  send(request, response, found);
}

/** Of the stored bytes alone: the same for everybody, for as long as the plate stands. */
function send(request: Request, response: Response, { bytes, gzipped, mediaType, sha256 }: StoredForm): void {
  const packed = gzipped !== null && request.acceptsEncodings("gzip") === "gzip";
  if (gzipped) response.vary("Accept-Encoding");
  const etag = `"${sha256}${packed ? "-gzip" : ""}"`;
  response.set("ETag", etag).set("Cache-Control", CACHED);
  const known = request
    .get("If-None-Match")
    ?.split(",")
    .map((one) => one.trim().replace(/^W\//, ""));
  if (known?.includes(etag) || known?.includes("*")) return void response.status(304).end();
  const body = packed ? gzipped : bytes;
  if (packed) response.set("Content-Encoding", "gzip");
  response.set("Content-Type", mediaType).set("Content-Length", String(body.length));
  response.end(request.method === "HEAD" ? undefined : body);
}

/** Any page may show these, and they themselves can do nothing. */
function guard(response: Response, ending: Ending): void {
  const embed = ending === "/embed";
  response.removeHeader("X-Frame-Options");
  response.set("Content-Security-Policy", POLICIES[ending] ?? PLAIN_POLICY);
  response.set("Cross-Origin-Resource-Policy", "cross-origin");
  if (!embed) response.set("Access-Control-Allow-Origin", "*");
}

async function sayWithdrawn(response: Response, id: string): Promise<void> {
  const plate = await plates.findByPublicId(id);
  const why = plate?.withdrawnReason ? `: ${plate.withdrawnReason}` : "";
  say(response, 410, `This plate was withdrawn${why}. What stays of it: ${env.BASE_URL}/plates/${id}`);
}

async function sayMissing(response: Response, id: string, form: FormName): Promise<void> {
  const there = await plates.findByPublicId(id);
  if (there && form === "s1p") {
    return say(
      response,
      404,
      "This plate has no Touchstone form: its sweep has no phase, or it shows more than one sweep. Its numbers are in the CSV form.",
    );
  }
  say(response, 404, "There is no plate at this address.");
}

function say(response: Response, status: number, words: string): void {
  response.status(status).set("Cache-Control", "no-cache").type("text/plain").send(`${words}\n`);
}

const FORM_PATH = /^\/plates\/([0-9a-z]{6,20})(\.(?:svg|png|pdf|csv|s1p|json|bib|csl\.json)|\/embed)$/;
const PLAIN_PATH = /^\/plates\/([0-9a-z]{6,20})$/;
/** The bytes never change, and a plate can be withdrawn: ten minutes is what a reader may be behind. Then a look at the ETag. */
const CACHED = "public, max-age=600, stale-if-error=86400";
/** Whoever opens one of these alone gets no more than it shows. A PDF takes no more than this: browsers show it by code of theirs. */
const PLAIN_POLICY = "base-uri 'none'; form-action 'none'; frame-ancestors *";
const POLICIES: Partial<Record<Ending, string>> = {
  svg: `default-src 'none'; style-src 'unsafe-inline'; sandbox; ${PLAIN_POLICY}`,
  // The address by name too: in a sandboxed frame nothing is "self".
  "/embed": `default-src 'none'; img-src 'self' ${env.BASE_URL}; style-src 'unsafe-inline'; ${PLAIN_POLICY}`,
};
