/** The one form of our mails: plain text and HTML of the same, from the same parts. */

export type MailPart =
  | { kind: "text"; text: string }
  /** A page to go to; in plain text the address itself. */
  | { kind: "link"; label: string; href: string }
  /** Something to be typed elsewhere. */
  | { kind: "code"; text: string }
  /** What somebody else wrote, as it is; set apart. */
  | { kind: "quote"; text: string }
  /** Drawn already and safe, e.g. a note's Markdown, with the same in plain text. */
  | { kind: "drawn"; html: string; text: string };

export interface MailWords {
  heading: string;
  parts: MailPart[];
  /** Why this mail came, and how to have no more of them. */
  footer: MailPart[];
}

/** Nothing in it is fetched from anywhere; the colours follow the reader's choice of light or dark. */
export function drawMail({ heading, parts, footer }: MailWords): { text: string; html: string } {
  const text = [heading, ...parts.map(plain), "--", ...footer.map(plain)].join("\n\n");
  const html = `<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<meta name="color-scheme" content="light dark">
<meta name="supported-color-schemes" content="light dark">
<title>${escapeHtml(heading)}</title>
<style>${STYLE}</style>
</head>
<body>
<div class="sheet">
<p class="name">Swale</p>
<h1>${escapeHtml(heading)}</h1>
${parts.map(drawn).join("\n")}
<div class="foot">
${footer.map(drawn).join("\n")}
</div>
</div>
</body>
</html>
`;
  return { text: `${text}\n`, html };
}

export function escapeHtml(text: string): string {
  return text.replace(/[&<>"']/g, (sign) => `&#${sign.charCodeAt(0)};`);
}

function plain(part: MailPart): string {
  switch (part.kind) {
    case "link":
      return `${part.label}:\n${part.href}`;
    case "code":
      return `    ${part.text}`;
    case "quote":
      return part.text.replace(/^/gm, "> ");
    case "text":
    case "drawn":
      return part.text;
    default:
      return part satisfies never;
  }
}

function drawn(part: MailPart): string {
  switch (part.kind) {
    case "link":
      return `<p><a href="${escapeHtml(part.href)}">${escapeHtml(part.label)}</a></p>`;
    case "code":
      return `<p class="code">${escapeHtml(part.text)}</p>`;
    case "quote":
      return `<blockquote>${withBreaks(part.text)}</blockquote>`;
    case "text":
      return `<p>${withBreaks(part.text)}</p>`;
    case "drawn":
      return part.html;
    default:
      return part satisfies never;
  }
}

function withBreaks(text: string): string {
  return escapeHtml(text).replace(/\n/g, "<br>");
}

/** The tokens of the pages, light and dark; programs that know no style show plain black on white. */
const STYLE = `
:root{color-scheme:light dark}
body{margin:0;padding:16px;background:#f6f2e8;color:#1e2a2b;font:16px/1.5 "Atkinson Hyperlegible Next",Verdana,sans-serif}
.sheet{max-width:36rem;margin:0 auto;padding:16px 20px;background:#fffdf7;border:1px solid #d8d0bd}
.name{margin:0;color:#1f6f63;font-weight:700}
h1{margin:4px 0 12px;font-size:20px;line-height:1.3}
p{margin:0 0 12px}
a{color:#1f6f63}
.code{font:700 26px/1.4 "Sometype Mono",Consolas,monospace;letter-spacing:3px}
blockquote{margin:0 0 12px;padding:4px 0 4px 12px;border-left:3px solid #7b4b86}
.foot{margin-top:20px;padding-top:12px;border-top:1px solid #d8d0bd;color:#55615f;font-size:14px}
@media (prefers-color-scheme:dark){
body{background:#171c1a;color:#e9e6da}
.sheet{background:#202723;border-color:#38413c}
.name,a{color:#63c2b0}
blockquote{border-color:#c79ad2}
.foot{border-color:#38413c;color:#a7afa6}
}`;
