import { createHash } from "node:crypto";
import { data } from "react-router";
import { notFound, type PlainError } from "~/errors";
import { formatDate } from "~/services/dates";
import { attachment } from "~/services/file-names";
import { type Publication, plateStates, seek } from "~/services/write-ups/published.server";

/** The published version that is asked for; 404 where there is none, 410 where it was taken back. */
export async function requirePublication(
  request: Request,
  params: { writeUp?: string },
): Promise<Publication> {
  const wanted = new URL(request.url).searchParams.get("version");
  const sought = await seek(params.writeUp, wanted);
  if (sought.kind === "absent") throw notFound("write-up");
  if (sought.kind === "taken-back") throw takenBack(sought.at);
  return sought.publication;
}

export interface MadeForm {
  body: string | Buffer;
  mediaType: string;
  fileName: string;
}

/** A form of a version to take along; not made again for whoever has it already. */
export async function answerForm(
  request: Request,
  publication: Publication,
  form: "html" | "pdf",
  make: () => Promise<MadeForm>,
): Promise<Response> {
  const etag = await etagOf(publication, form);
  // It may be taken back at any time, so it is asked for again each time.
  const headers = { ETag: etag, "Cache-Control": "public, no-cache" };
  if (request.headers.get("If-None-Match")?.includes(etag)) {
    return new Response(null, { status: 304, headers });
  }
  const { body, mediaType, fileName } = await make();
  return new Response(typeof body === "string" ? body : new Uint8Array(body), {
    headers: {
      ...headers,
      "Content-Type": mediaType,
      "Content-Disposition": attachment(fileName),
    },
  });
}

/** A version never changes, but a plate in it may be withdrawn, and what draws it is made better. */
async function etagOf({ version, frozen }: Publication, form: string): Promise<string> {
  const plates = [...(await plateStates(frozen.figures))].map(
    ([id, { withdrawnAt }]) => `${id} ${withdrawnAt}`,
  );
  const parts = [form, FORMS_VERSION, version.id, version.publishedAt.toISOString(), ...plates];
  return `"${createHash("sha256").update(parts.join("\n")).digest("base64url").slice(0, 27)}"`;
}

function takenBack(at: Date) {
  const message = `Its authors took it back on ${formatDate(at)}. It may be published again at this address; ask them for it.`;
  return data<PlainError>({ title: "This write-up was taken back", message }, { status: 410 });
}

/** Raised when a form of the same version comes out otherwise. */
const FORMS_VERSION = 2;
