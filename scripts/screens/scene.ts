/** A drawing as a list of marks, so that several drawing programs make the same picture. Pixel edges are whole numbers. */
export type Mark =
  | { kind: "area"; x: number; y: number; width: number; height: number; fill: string }
  | {
      kind: "line";
      x1: number;
      y1: number;
      x2: number;
      y2: number;
      color: string;
      width: number;
      dash?: number[];
    }
  | {
      kind: "path";
      points: [number, number][];
      color: string;
      width: number;
      dash?: number[];
      clip?: [number, number, number, number];
    }
  | { kind: "shape"; points: [number, number][]; fill: string }
  | {
      kind: "text";
      x: number;
      y: number;
      text: string;
      size: number;
      color: string;
      font: string;
      align: "start" | "middle" | "end";
      turned?: boolean;
    };

export interface Scene {
  width: number;
  height: number;
  marks: Mark[];
  /** Without smoothing of edges. */
  crisp: boolean;
}

export function sceneToSvg({ width, height, marks, crisp }: Scene): string {
  const body = marks.map((mark, i) => markToSvg(mark, i)).join("\n");
  const sharp = crisp ? ' shape-rendering="crispEdges"' : "";
  return `<svg xmlns="http://www.w3.org/2000/svg" width="${width}" height="${height}"${sharp}>\n${body}\n</svg>`;
}

function markToSvg(mark: Mark, index: number): string {
  switch (mark.kind) {
    case "area":
      return `<rect x="${mark.x}" y="${mark.y}" width="${mark.width}" height="${mark.height}" fill="${mark.fill}"/>`;
    case "line":
      return `<line x1="${mark.x1}" y1="${mark.y1}" x2="${mark.x2}" y2="${mark.y2}" stroke="${mark.color}" stroke-width="${mark.width}"${dashes(mark.dash)}/>`;
    case "path": {
      const d = mark.points.map(([x, y]) => `${x.toFixed(2)},${y.toFixed(2)}`).join(" ");
      const line = `<polyline points="${d}" fill="none" stroke="${mark.color}" stroke-width="${mark.width}" stroke-linejoin="round"${dashes(mark.dash)}`;
      if (!mark.clip) return `${line}/>`;
      const [x, y, w, h] = mark.clip;
      return `<clipPath id="c${index}"><rect x="${x}" y="${y}" width="${w}" height="${h}"/></clipPath>${line} clip-path="url(#c${index})"/>`;
    }
    case "shape":
      return `<polygon points="${mark.points.map((p) => p.join(",")).join(" ")}" fill="${mark.fill}"/>`;
    case "text": {
      const turn = mark.turned ? ` transform="rotate(-90 ${mark.x} ${mark.y})"` : "";
      return `<text x="${mark.x}" y="${mark.y}" font-family="${mark.font}" font-size="${mark.size}" fill="${mark.color}" text-anchor="${mark.align}"${turn}>${mark.text.replace(/&/g, "&amp;").replace(/</g, "&lt;")}</text>`;
    }
  }
}

function dashes(dash: number[] | undefined): string {
  return dash ? ` stroke-dasharray="${dash.join(" ")}"` : "";
}
