import type { ServerResponse } from "node:http";

/** Plain pages for the stand-ins: no script, no file beside them. */

export function escapeHtml(text: string): string {
  return text.replace(/[&<>"']/g, (character) => `&#${character.charCodeAt(0)};`);
}

export function page(title: string, body: string): string {
  return `<!doctype html><html lang="en"><head><meta charset="utf-8"><title>${escapeHtml(title)}</title>
<meta name="viewport" content="width=device-width, initial-scale=1"><style>${STYLE}</style></head>
<body><main><h1>${escapeHtml(title)}</h1>${body}</main></body></html>`;
}

export function sendPage(response: ServerResponse, status: number, title: string, body: string): void {
  send(response, status, "text/html; charset=utf-8", page(title, body));
}

export function sendJson(response: ServerResponse, status: number, value: unknown): void {
  send(response, status, "application/json; charset=utf-8", JSON.stringify(value));
}

export function send(response: ServerResponse, status: number, type: string, body: string | Buffer): void {
  response.writeHead(status, {
    "Content-Type": type,
    "Cache-Control": "no-store",
    "X-Content-Type-Options": "nosniff",
  });
  response.end(body);
}

const STYLE = `
:root { color-scheme: light dark; font: 1rem/1.5 system-ui, sans-serif; }
body { margin: 0; } main { max-width: 46rem; margin: 2rem auto; padding: 0 1rem; }
h1 { font-size: 1.4rem; } h2 { font-size: 1.1rem; margin-top: 2rem; }
p.note { opacity: .8; } table { border-collapse: collapse; width: 100%; }
td, th { text-align: left; padding: .4rem .6rem; border-bottom: 1px solid #8886; vertical-align: top; }
button { font: inherit; padding: .5rem .9rem; min-height: 2.6rem; cursor: pointer; width: 100%; text-align: left; }
ul.people { list-style: none; padding: 0; display: grid; gap: .5rem; } label { display: block; margin: .5rem 0; }
input[type=text], input[type=email] { font: inherit; padding: .4rem; width: 100%; box-sizing: border-box; }
iframe { width: 100%; height: 24rem; border: 1px solid #8886; background: white; } pre { white-space: pre-wrap; }`;
