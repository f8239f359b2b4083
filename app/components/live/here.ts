import { useMatches } from "react-router";
import type { LiveEvent } from "~/services/live-shape";

/** What a page of a project shows, as far as it matters for what is told there. */
export interface Here {
  /** What presence says: the thing, or the project where the page is of no one thing. */
  kind: "project" | "sweep" | "dip" | "trail" | "step" | "bench";
  /** Public id; of a page of no one thing its area, "story" for the first. */
  subject: string;
  /** The folder under the project: "", "sweeps", "dips"… */
  area: string;
  /** A form, rather than something to read. */
  form: boolean;
  /** Of a dip's page: the sweep that it was found in. */
  sweep?: string;
  /** Of a dip's page: the trail that it is on. */
  trail?: string;
}

/** Where in the project the person is. */
export function useHere(projectId: string): Here {
  const page = useMatches().at(-1);
  const data = page?.loaderData as DipPage | undefined;
  return hereOf(projectId, page?.pathname ?? "", {
    sweep: data?.sweep?.publicId,
    trail: data?.trail?.publicId,
  });
}

export function hereOf(projectId: string, pathname: string, ofDip: Pick<Here, "sweep" | "trail"> = {}): Here {
  const [area = "", id, more] = pathname.replace(`/projects/${projectId}`, "").split("/").filter(Boolean);
  const kind = KIND_OF[area];
  const form = FORMS.has(id ?? "") || FORMS.has(more ?? "") || FORMS.has(area);
  if (!kind || !id || FORMS.has(id)) {
    return { kind: "project", subject: area || "story", area, form };
  }
  return { kind, subject: id, area, form, ...(kind === "dip" ? ofDip : {}) };
}

/** What the data of a dip's page says of where the dip belongs. */
interface DipPage {
  sweep?: { publicId?: string } | null;
  trail?: { publicId?: string } | null;
}

/** Whether what happened shows on this page. */
export function concerns({ kind, about }: LiveEvent, here: Here): boolean {
  if (here.form) return false;
  const [noun] = kind.split(".");
  switch (here.kind) {
    case "sweep":
      return about.sweep === here.subject;
    case "dip":
      if (about.dip) return about.dip === here.subject;
      if (about.trail) return about.trail === here.trail && noun !== "note";
      return noun === "sweep" && about.sweep !== undefined && about.sweep === here.sweep;
    case "trail":
      return about.trail === here.subject || noun === "sweep" || kind === "verdict.given";
    case "step":
      return about.step === here.subject || kind === "sweep.added" || kind === "sweep.deleted";
    case "bench":
      return about.bench === here.subject;
    case "project":
      if (noun === "photograph" && here.area === "antenna") return !about.step && !about.bench;
      return (NOUNS_OF[here.area] ?? []).includes(noun);
    default:
      return here.kind satisfies never;
  }
}

const KIND_OF: Record<string, Exclude<Here["kind"], "project">> = {
  sweeps: "sweep",
  dips: "dip",
  trails: "trail",
  steps: "step",
  benches: "bench",
};
/** Ends of addresses where something is filled in. */
const FORMS = new Set(["new", "edit", "publish", "rebuild", "reading", "settings"]);
/** By area, what its page lists. */
const NOUNS_OF: Record<string, readonly string[]> = {
  "": ["note", "sweep", "verdict", "trail", "step", "member", "project"],
  sweeps: ["sweep"],
  compare: ["sweep"],
  steps: ["step"],
  benches: ["bench"],
  plates: ["plate"],
  "write-ups": ["write-up"],
  antenna: ["antenna", "project"],
  members: ["member"],
  activity: [
    "note",
    "sweep",
    "verdict",
    "trail",
    "step",
    "antenna",
    "bench",
    "photograph",
    "plate",
    "write-up",
    "member",
    "project",
  ],
};
