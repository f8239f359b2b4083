import { describe, expect, it } from "vitest";
import { isHarmlessPage, isHarmlessSvg } from "~/services/bundle/svg-check";
import { drawFigure } from "~/services/plates/draw.server";
import { embedPage } from "~/services/plates/embed";
import { materialOf, materialSweep, recordOf, sweepOf } from "../plates/sample.ts";

describe("what is ours", () => {
  it("passes, whatever words people put into it", () => {
    const words = 'C:\\ <b> url(x) "a" & javascript:';
    const made = recordOf(
      materialOf([materialSweep("sweepaaaaa", words, sweepOf([{ hz: 7.1e6, ohm: 100, q: 12 }]))]),
    );
    const record = {
      ...made,
      title: words,
      id: "k3f9w2k3f9",
      number: 1,
      address: "https://swale.example/plates/x",
    };
    for (const theme of ["light", "dark"] as const) {
      expect(isHarmlessSvg(drawFigure(record as never, { theme }))).toBe(true);
    }
    const size = { width: 960, height: 600 };
    expect(isHarmlessPage(embedPage(record as never, { wide: size, narrow: size }))).toBe(true);
  });
});

const inside = (body: string) => `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 1 1">${body}</svg>`;

describe("a drawing from elsewhere", () => {
  it.each([
    inside('<title>x &amp; "y"</title><g clip-path="url(#c)"><path d="M0 0"/><text x="1">7 MHz</text></g>'),
    inside(
      "<style>@font-face{font-family:A;src:url(data:font/woff2;base64,AA)} text{fill:var(--color-ink)}</style>",
    ),
    inside('<a href="https://swale.example/plates/x"><use href="#p"/></a>'),
    inside('<title>C:\\ and url(x) and javascript:</title><g aria-label="C:\\ javascript:"/>'),
    inside('<image href="data:image/png;base64,AA"/>'),
    `<?xml version="1.0"?>\n${inside("")}`,
  ])("passes: %s", (svg) => {
    expect(isHarmlessSvg(svg)).toBe(true);
  });

  it.each([
    inside("<script>alert(1)</script>"),
    inside("<SCRIPT>alert(1)</SCRIPT>"),
    '<svg onload="alert(1)"></svg>',
    "<svg/onload=alert(1)>",
    inside('<path OnClick="x()"/>'),
    inside('<a href="javascript:alert(1)">x</a>'),
    inside('<a xlink:href="java&#115;cript:alert(1)">x</a>'),
    inside('<a href="data:text/html,x">x</a>'),
    inside('<a href="//elsewhere.example/">x</a>'),
    inside("<foreignObject><p>x</p></foreignObject>"),
    inside('<animate attributeName="href" to="javascript:x"/>'),
    inside('<set attributeName="onclick" to="x"/>'),
    inside("<iframe></iframe>"),
    inside("<!--<script>-->"),
    inside("<![CDATA[<script>alert(1)</script>]]>"),
    inside("<style>@import 'https://elsewhere.example/x.css'</style>"),
    inside('<rect style="fill:url(https://elsewhere.example/x)"/>'),
    inside('<image href="https&#58;x"/>'),
    inside('<image href="https://elsewhere.example/who-reads.png"/>'),
    inside('<use href="https://elsewhere.example/x.svg#a"/>'),
    inside('<a href="/\\elsewhere.example/">x</a>'),
    inside("<style>rect{fill:u&#114;l(https://elsewhere.example/x)}</style>"),
    inside("<style>@im&#112;ort 'https://elsewhere.example/x.css'</style>"),
    inside("<style>rect{fill:u\\72l(https://elsewhere.example/x)}</style>"),
    inside("<style>@\\69mport 'https://elsewhere.example/x.css'</style>"),
    inside("<style>rect{background:image-set('https://elsewhere.example/x' 1x)}</style>"),
    // A title holds HTML in a page, and its style is text there to the end of it.
    inside('<title><style><a title="</style><img src=x onerror=alert(1)>"></a></style></title>'),
    inside('<title><style><a title="</style><b>"/></style></title><p'),
    inside("<title><img src=x onerror=alert(1)></title>"),
    '<!DOCTYPE svg [<!ENTITY x "y">]><svg></svg>',
    "<html><svg></svg></html>",
  ])("is refused: %s", (svg) => {
    expect(isHarmlessSvg(svg)).toBe(false);
  });
});

describe("a page that shows a figure", () => {
  const page = (body: string, head = "") =>
    `<!DOCTYPE html>\n<html lang="en"><head><meta charset="utf-8"><title>x</title>${head}</head><body>${body}</body></html>`;
  const figure =
    '<a href="https://swale.example/plates/x" target="_top"><picture><source media="m" srcset="/plates/x.svg?theme=dark"><img src="/plates/x.svg" alt="x"></picture></a>';

  it("passes with its figure", () => {
    expect(
      isHarmlessPage(
        page(
          figure,
          '<link rel="canonical" href="https://swale.example/plates/x"><style>body{margin:0}</style>',
        ),
      ),
    ).toBe(true);
  });

  it.each([
    page("<script>x</script>"),
    page('<img src="x" onerror="y">'),
    page(figure, '<meta http-equiv="refresh" content="0;url=https://elsewhere.example">'),
    page(figure, '<link rel="stylesheet" href="https://elsewhere.example/x.css">'),
    page(figure, "<base href='https://elsewhere.example/'>"),
    page("<form action='/sign-out'></form>"),
    page("<iframe src='/'></iframe>"),
    page('<a href="javascript:x">y</a>'),
    page('<img src="https://elsewhere.example/who-reads.png">'),
    page('<picture><source srcset="/a.png 1x, https://elsewhere.example/x 2x"></picture>'),
    page('<p title="</title><script src=/x></script>">y</p>'),
    "<p>no page</p>",
  ])("is refused: %s", (html) => {
    expect(isHarmlessPage(html)).toBe(false);
  });
});
