import type { Example } from "./example.ts";

/** An example as a command for a shell. Pure. `base` is the address of the API. */
export function curlOf(example: Example, base: string, method = "GET"): string {
  const { path, json, file, files = [], fields = {}, form, accept, saves } = example;
  const lines = ["curl"];
  if (!example.open) lines.push('-H "Authorization: Bearer $SWALE_TOKEN"');
  if (accept) lines.push(`-H ${quoted(`Accept: ${accept}`)}`);
  if (saves) lines.push(`-o ${saves}`);
  // Without a body the method is to be said.
  if (method !== "GET" && !file && files.length === 0 && json === undefined && !form)
    lines.push(`-X ${method}`);
  for (const { field, name } of files) lines.push(`-F ${field}=@${name}`);
  for (const [name, value] of Object.entries(fields)) lines.push(`-F ${quoted(`${name}=${value}`)}`);
  if (file) {
    lines.push(`-F file=@${file.name}`);
    for (const [name, value] of Object.entries(file.fields)) lines.push(`-F ${quoted(`${name}=${value}`)}`);
  }
  if (json !== undefined) {
    lines.push('-H "Content-Type: application/json"', `-d ${quoted(JSON.stringify(json))}`);
  }
  for (const [name, value] of Object.entries(form ?? {})) {
    lines.push(`--data-urlencode ${quoted(`${name}=${value}`)}`);
  }
  lines.push(quoted((example.open ? base.replace(API, "") : base) + path));
  return lines.join(" \\\n  ");
}

/** Bare where that is safe, else in single quotes. */
function quoted(text: string): string {
  return /^[\w@%+=:,./-]+$/.test(text) ? text : `'${text.replaceAll("'", "'\\''")}'`;
}

const API = /\/api\/v1$/;
