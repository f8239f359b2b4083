import { attachment } from "~/services/file-names";

/** A text to be saved under a name that any system takes. */
export function download(text: string, name: string, contentType: string): Response {
  return new Response(text, {
    headers: {
      "Content-Type": contentType,
      "Content-Disposition": attachment(name),
      "X-Content-Type-Options": "nosniff",
      "Cache-Control": "private, no-cache",
    },
  });
}
