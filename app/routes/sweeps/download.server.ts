/** A text to be saved under a name that any system takes. */
export function download(text: string, name: string, contentType: string): Response {
  // biome-ignore lint/suspicious/noControlCharactersInRegex: control characters are what must go
  const safe = name.replace(/[\u0000-\u001f\\/:*?"<>|]+/g, "-");
  return new Response(text, {
    headers: {
      "Content-Type": contentType,
      "Content-Disposition": `attachment; filename*=UTF-8''${encodeURIComponent(safe)}`,
      "X-Content-Type-Options": "nosniff",
      "Cache-Control": "private, no-cache",
    },
  });
}
