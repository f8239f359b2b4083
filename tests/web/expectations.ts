import type { ProjectAction, SiteAction } from "~/auth/permissions";
import { newPublicId } from "~/db/ids.server";
import { SERVER } from "./browser.ts";
import { openReport, rewriteDraft, waitingMail, waitingMention } from "./in-a-place.ts";
import { type Crew, onePixel, type Place, type Someone, touchstone, unique } from "./world.ts";

/** What each route asks for, and the smallest form that it takes. One line a case; the walk does the rest. */

export type Ask =
  | { site: SiteAction }
  | { project: ProjectAction }
  /** The same, for whoever has an account only. */
  | { signedIn: ProjectAction }
  /** Of what anybody may read whatever the project is: refused, but never hidden. */
  | { plate: ProjectAction }
  /** The API: the same table, asked by token; `open`: of what anybody may read, so refused but never hidden. */
  | { api: ProjectAction | "any-member"; open?: true }
  /** Members only, whatever their role: leaving. */
  | { membership: true }
  /** The commenter who wrote the note, and who else may do it. */
  | { authorOr: ProjectAction | null }
  /** The same answer for everybody. */
  | { status: number };

/** Whom and what a form may name. */
export interface About {
  place: Place;
  crew: Crew;
  /** Who sends it; null for a visitor. */
  self: Someone | null;
  /** Takes no other part in the walk. */
  bystander: Someone;
  /** What `prepare` answered; else empty. */
  prepared: string;
}

export interface Case {
  ask: Ask;
  /** Distinguishes the forms of one page. */
  name?: string;
  /** Makes what the form names; its answer is `prepared`. */
  prepare?: (about: About) => Promise<string>;
  form?: (about: About) => Record<string, string | Blob>;
  json?: (about: About) => unknown;
  /** The case destroys what it is asked of: it gets a project of its own for each role, empty or with a sweep, or a plate of its own. */
  destroys?: "project" | "sweep" | "plate";
  /** What who may ask is answered, where nothing is there to be done; else it is to succeed. */
  answers?: 400 | 409 | 422;
  /** The case ends the account that asks: somebody new asks in place of each. */
  asNewcomer?: boolean;
}

interface Expectation {
  GET?: Case[];
  POST?: Case[];
}

const read: Case[] = [{ ask: { project: "project.read" } }];
const anybody: Case[] = [{ ask: { site: "site.read" } }];
const apiRead: Case[] = [{ ask: { api: "project.read" } }];
const notHere: Case[] = [{ ask: { status: 405 } }];
const plateForm = (place: Place) => ({
  from: `sweep:${place.sweep}`,
  title: "A walk",
  licence: "CC-BY-4.0",
  scale: "linear",
  quantity: "return-loss",
});
const sweepFile = () => new File([touchstone()], "walk.s1p");

export const EXPECTATIONS: Record<string, Expectation> = {
  "routes/home/home.tsx": { GET: anybody },
  "routes/methods/methods.tsx": { GET: anybody },
  "routes/api/guide/guide.tsx": { GET: anybody },
  "routes/home/missing.tsx": { GET: [{ ask: { status: 404 } }], POST: [{ ask: { status: 404 } }] },

  "routes/account/sign-in.tsx": { GET: anybody },
  "routes/account/github.ts": { GET: anybody },
  "routes/account/github-callback.ts": { GET: anybody },
  "routes/account/email.tsx": {
    GET: anybody,
    POST: [
      {
        name: "ask",
        ask: { site: "site.read" },
        form: () => ({ intent: "ask", email: `${unique("walk")}@fennmarsh.example` }),
      },
      {
        name: "add",
        ask: { site: "account.own" },
        form: () => ({ intent: "ask", add: "yes", email: `${unique("walk")}@fennmarsh.example` }),
      },
      { name: "code", ask: { site: "site.read" }, form: () => ({ intent: "code", code: "0000 0000" }) },
      { name: "name", ask: { site: "site.read" }, form: () => ({ intent: "name", name: "Nobody yet" }) },
      { name: "again", ask: { site: "site.read" }, form: () => ({ intent: "again" }) },
    ],
  },
  "routes/account/sign-out.ts": { GET: anybody, POST: anybody },
  "routes/account/settings.tsx": {
    GET: [{ ask: { site: "account.own" } }],
    POST: [
      {
        name: "profile",
        ask: { site: "account.own" },
        form: ({ self }) => ({
          intent: "profile",
          name: "New name",
          userName: self?.userName ?? "nobody",
          timeZone: "UTC",
        }),
      },
      {
        name: "lengths",
        ask: { site: "account.own" },
        form: () => ({ intent: "lengths", lengthUnit: "ft" }),
      },
      {
        name: "revoke-session",
        ask: { site: "account.own" },
        form: () => ({ intent: "revoke-session", session: "0".repeat(64) }),
      },
      { name: "revoke-others", ask: { site: "account.own" }, form: () => ({ intent: "revoke-others" }) },
    ],
  },
  "routes/account/ways.tsx": {
    GET: [{ ask: { site: "account.own" } }],
    POST: [
      { name: "add-github", ask: { site: "account.own" }, form: () => ({ intent: "add-github" }) },
      {
        name: "remove",
        ask: { site: "account.own" },
        form: () => ({ intent: "remove", provider: "github", subject: "none" }),
      },
      { name: "mails-to", ask: { site: "account.own" }, form: () => ({ intent: "mails-to", subject: "no" }) },
    ],
  },
  "routes/account/blocked.tsx": {
    GET: [{ ask: { site: "account.own" } }],
    POST: (["block", "unblock"] as const).map((intent) => ({
      name: intent,
      ask: { site: "account.own" as const },
      form: ({ bystander }: About) => ({ intent, userName: bystander.userName }),
    })),
  },
  "routes/account/close.tsx": {
    GET: [{ ask: { site: "account.own" } }],
    // Signed in as somebody of their own for each, for the account goes.
    POST: [
      {
        ask: { site: "account.own" },
        asNewcomer: true,
        form: ({ self }) => ({ notes: "stay", userName: self?.userName ?? "nobody" }),
      },
    ],
  },
  "routes/bundle/my-data.tsx": {
    GET: [{ ask: { site: "account.own" } }],
    POST: [{ name: "make", ask: { site: "account.own" }, form: () => ({ intent: "make" }) }],
  },
  "routes/bundle/my-download.ts": { GET: [{ ask: { site: "account.own" } }] },
  "routes/bundle/take-in.tsx": {
    GET: [{ ask: { site: "project.create" } }],
    POST: [
      {
        ask: { site: "project.create" },
        form: () => ({ bundle: new File(["no ZIP"], "walk.zip") }),
      },
    ],
  },
  "routes/bundle/bundle.tsx": {
    GET: [{ ask: { project: "project.export" } }],
    POST: [{ name: "make", ask: { project: "project.export" }, form: () => ({ intent: "make" }) }],
  },
  "routes/bundle/download.ts": { GET: [{ ask: { project: "project.export" } }] },
  "routes/account/tokens.tsx": {
    GET: [{ ask: { site: "account.own" } }],
    POST: [
      {
        name: "make",
        ask: { site: "account.own" },
        form: () => ({ intent: "make", label: "walk", scope: "read" }),
      },
      { name: "revoke", ask: { site: "account.own" }, form: () => ({ intent: "revoke", token: "nothing" }) },
    ],
  },
  "routes/account/theme.ts": {
    GET: anybody,
    POST: [{ ask: { site: "site.read" }, form: () => ({ theme: "dark", returnTo: "/" }) }],
  },
  "routes/account/caution.ts": {
    GET: anybody,
    POST: [{ ask: { site: "account.own" }, form: () => ({ caution: "first-sweep", returnTo: "/" }) }],
  },

  "routes/invitations/invitation.tsx": {
    GET: anybody,
    POST: [{ ask: { site: "account.own" }, destroys: "project" }],
  },

  "routes/projects/list.tsx": { GET: [{ ask: { site: "account.own" } }] },
  "routes/projects/new.tsx": {
    GET: [{ ask: { site: "project.create" } }],
    POST: [
      { ask: { site: "project.create" }, form: () => ({ title: unique("Walked"), visibility: "private" }) },
    ],
  },
  "routes/projects/project.tsx": { GET: read },
  "routes/projects/members.tsx": {
    GET: read,
    POST: [
      {
        name: "add",
        ask: { project: "members.manage" },
        form: ({ crew }) => ({ intent: "add", userName: crew.reader.userName, role: "reader" }),
      },
      {
        name: "invite",
        ask: { project: "members.manage" },
        form: () => ({ intent: "invite", role: "reader", days: "7" }),
      },
      {
        name: "revoke",
        ask: { project: "members.manage" },
        form: () => ({ intent: "revoke", invitation: "nothing" }),
      },
      {
        name: "hand-over",
        ask: { project: "members.manage" },
        form: ({ crew, place }) => ({
          intent: "hand-over",
          userName: crew.reader.userName,
          afterwards: "owner",
          title: place.title,
        }),
        destroys: "project",
      },
      {
        name: "change",
        ask: { project: "members.manage" },
        form: ({ crew }) => ({ intent: "change", userName: crew.reader.userName, role: "reader" }),
      },
      {
        name: "remove",
        ask: { project: "members.manage" },
        form: ({ crew }) => ({ intent: "remove", userName: crew.reader.userName }),
        destroys: "project",
      },
      { name: "leave", ask: { membership: true }, form: () => ({ intent: "leave" }), destroys: "project" },
    ],
  },
  "routes/projects/settings.tsx": {
    GET: [{ ask: { project: "project.edit" } }],
    POST: [
      {
        name: "about",
        ask: { project: "project.edit" },
        form: ({ place }) => ({ intent: "about", title: place.title, visibility: place.visibility }),
      },
      {
        name: "bands",
        ask: { project: "project.edit" },
        form: () => ({
          intent: "bands",
          "bands[0].name": "40 m",
          "bands[0].lowMhz": "7",
          "bands[0].highMhz": "7,2",
          "bands[0].swrLimit": "2",
        }),
      },
      {
        name: "licence",
        ask: { project: "project.edit" },
        form: () => ({ intent: "licence", licence: "CC0-1.0" }),
      },
      {
        name: "delete",
        ask: { project: "project.delete" },
        form: ({ place }) => ({ intent: "delete", title: place.title }),
        destroys: "project",
      },
    ],
  },

  "routes/sweeps/list.tsx": { GET: read },
  "routes/sweeps/new.tsx": {
    GET: [{ ask: { project: "sweep.add" } }],
    POST: [{ ask: { project: "sweep.add" }, form: () => ({ files: sweepFile() }) }],
  },
  "routes/sweeps/upload.ts": {
    POST: [{ ask: { project: "sweep.add" }, form: () => ({ files: sweepFile() }) }],
  },
  "routes/sweeps/sweep.tsx": {
    GET: read,
    POST: [
      { name: "edit", ask: { project: "sweep.edit" }, form: () => ({ intent: "edit", title: "Another" }) },
      {
        name: "settings",
        ask: { project: "sweep.edit" },
        form: () => ({ intent: "settings", swrLimit: "2", minimumProminenceDb: "3" }),
      },
      { name: "bench", ask: { project: "sweep.edit" }, form: () => ({ intent: "bench", bench: "" }) },
      {
        name: "feedline",
        ask: { project: "sweep.edit" },
        form: () => ({
          intent: "feedline",
          cable: "values",
          lengthM: "10",
          velocityFactor: "0.66",
          k1: "0.01",
        }),
      },
      { name: "no-feedline", ask: { project: "sweep.edit" }, form: () => ({ intent: "no-feedline" }) },
      { name: "anew", ask: { project: "sweep.edit" }, form: () => ({ intent: "anew" }) },
      {
        name: "delete",
        ask: { project: "sweep.delete" },
        form: () => ({ intent: "delete" }),
        destroys: "sweep",
      },
    ],
  },
  "routes/sweeps/reading.tsx": {
    GET: read,
    POST: [{ ask: { project: "sweep.edit" }, form: () => ({ intent: "afresh" }) }],
  },
  "routes/sweeps/reading-try.ts": {
    POST: [{ ask: { project: "sweep.edit" }, form: () => ({ port: "1" }) }],
  },
  "routes/sweeps/original.ts": { GET: read },
  "routes/sweeps/picture.ts": { GET: read },
  "routes/sweeps/points.ts": { GET: read },
  "routes/sweeps/csv.ts": { GET: read },
  "routes/sweeps/touchstone.ts": { GET: read },

  "routes/batch/new.tsx": {
    GET: [{ ask: { project: "sweep.add" } }],
    POST: [{ ask: { project: "sweep.add" }, form: () => ({ batch: newPublicId(), files: sweepFile() }) }],
  },
  "routes/batch/upload.ts": {
    POST: [{ ask: { project: "sweep.add" }, form: () => ({ batch: newPublicId(), files: sweepFile() }) }],
  },
  "routes/batch/template.ts": { GET: [{ ask: { project: "sweep.add" } }] },
  "routes/batch/filled.ts": { GET: [{ ask: { project: "sweep.add" } }] },
  "routes/batch/run.tsx": {
    GET: [{ ask: { project: "sweep.add" } }],
    POST: [
      { name: "mend", ask: { project: "sweep.add" }, form: () => ({ intent: "mend" }) },
      { name: "leave-out", ask: { project: "sweep.add" }, form: () => ({ intent: "leave-out" }) },
      // An empty batch: those who may are told that nothing can be taken in.
      { name: "take", ask: { project: "sweep.add" }, form: () => ({ intent: "take" }), answers: 400 },
      {
        name: "add",
        ask: { project: "sweep.add" },
        form: () => ({ intent: "add", files: sweepFile() }),
      },
      {
        name: "give-up",
        ask: { project: "sweep.add" },
        form: () => ({ intent: "give-up" }),
        destroys: "sweep",
      },
    ],
  },

  "routes/sweeps/repeats.tsx": {
    GET: read,
    POST: [{ ask: { project: "sweep.edit" }, form: () => ({ intent: "leave" }) }],
  },
  "routes/cables/cables.tsx": {
    GET: read,
    POST: [
      {
        name: "add",
        ask: { project: "bench.edit" },
        form: () => ({ intent: "add", name: unique("cable"), points: "10 2", velocityFactor: "0.66" }),
      },
    ],
  },
  "routes/compare/compare.tsx": { GET: read },
  "routes/dips-table/table.tsx": { GET: read },
  "routes/dips-table/csv.ts": { GET: read },
  "routes/dips/dip.tsx": { GET: read },
  "routes/dips/verdict.ts": {
    GET: read,
    POST: (["propose", "settle", "reopen"] as const).map((intent) => ({
      name: intent,
      ask: { project: intent === "propose" ? ("verdict.propose" as const) : ("verdict.settle" as const) },
      form: () => ({ intent, was: "open", text: "The second element." }),
    })),
  },
  "routes/trails/trail.tsx": {
    GET: read,
    POST: [
      ...(["propose", "settle", "reopen"] as const).map((intent) => ({
        name: intent,
        ask: { project: intent === "propose" ? ("verdict.propose" as const) : ("verdict.settle" as const) },
        form: () => ({ intent, was: "open", text: "The second element." }),
      })),
      {
        name: "name",
        ask: { project: "trail.correct" },
        form: () => ({ intent: "name", name: "The second element" }),
      },
      ...(["part", "take-back"] as const).map((intent) => ({
        name: intent,
        ask: { project: "trail.correct" as const },
        form: ({ place }: About) => ({ intent, one: place.dip, other: place.dip }),
      })),
      {
        name: "join",
        ask: { project: "trail.correct" },
        form: ({ place }) => ({ intent: "join", other: place.trail }),
      },
      {
        name: "join-dip",
        ask: { project: "trail.correct" },
        form: ({ place }) => ({ intent: "join-dip", dip: place.dip }),
      },
    ],
  },
  "routes/benches/list.tsx": { GET: read },
  "routes/benches/new.tsx": {
    GET: [{ ask: { project: "bench.edit" } }],
    POST: [
      {
        ask: { project: "bench.edit" },
        form: () => ({ name: unique("Bridge"), validFrom: "2026-05-03", open: sweepFile() }),
      },
    ],
  },
  "routes/benches/bench.tsx": {
    GET: read,
    POST: [
      { name: "retire", ask: { project: "bench.edit" }, form: () => ({ intent: "retire" }) },
      { name: "resume", ask: { project: "bench.edit" }, form: () => ({ intent: "resume" }) },
      {
        name: "delete",
        ask: { project: "bench.edit" },
        form: () => ({ intent: "delete" }),
        destroys: "sweep",
      },
    ],
  },
  "routes/benches/edit.tsx": {
    GET: [{ ask: { project: "bench.edit" } }],
    POST: [
      {
        name: "bench",
        ask: { project: "bench.edit" },
        form: () => ({ intent: "bench", name: unique("So") }),
      },
    ],
  },
  "routes/benches/rebuild.tsx": {
    GET: [{ ask: { project: "bench.edit" } }],
    POST: [
      {
        ask: { project: "bench.edit" },
        form: () => ({ validFrom: "2026-05-04", remark: "Another arm", load: sweepFile() }),
      },
    ],
  },
  "routes/benches/compare.tsx": { GET: read },

  "routes/write-ups/list.tsx": { GET: read },
  "routes/write-ups/new.tsx": {
    GET: [{ ask: { project: "write-up.edit" } }],
    POST: [{ ask: { project: "write-up.edit" }, form: () => ({ title: unique("Walked") }) }],
  },
  "routes/write-ups/edit.tsx": {
    GET: [{ ask: { project: "write-up.edit" } }],
    POST: [
      {
        name: "keep",
        ask: { project: "write-up.edit" },
        form: () => ({ intent: "keep", title: "Where it comes from", body: unique("Once more") }),
      },
      { name: "look", ask: { project: "write-up.edit" }, form: () => ({ intent: "look", body: "So" }) },
      { name: "delete", ask: { project: "write-up.edit" }, form: () => ({ intent: "delete" }) },
    ],
  },
  "routes/write-ups/publish.tsx": {
    GET: [{ ask: { project: "write-up.edit" } }],
    // What is taken back is published again, for the routes that come after.
    POST: [
      { name: "take back", ask: { project: "write-up.edit" }, form: () => ({ intent: "take-back" }) },
      {
        name: "publish",
        ask: { project: "write-up.edit" },
        prepare: ({ place }) => rewriteDraft(place),
        form: ({ prepared }) => ({ intent: "publish", revision: prepared, remark: "" }),
      },
    ],
  },
  "routes/write-ups/preview.ts": {
    GET: [{ ask: { project: "write-up.edit" } }],
    POST: [{ ask: { project: "write-up.edit" }, form: () => ({ body: "So" }) }],
  },
  "routes/write-ups/feed.ts": { GET: read },
  "routes/write-ups/write-up.tsx": { GET: anybody },
  "routes/write-ups/html.ts": { GET: anybody },
  "routes/write-ups/pdf.ts": { GET: anybody },

  "routes/webmention/endpoint.tsx": {
    GET: anybody,
    POST: [
      {
        ask: { site: "site.read" },
        form: ({ place }) => ({
          source: `https://notes.example/${unique("page")}`,
          target: `${SERVER}/write-ups/${place.writeUp}`,
        }),
      },
    ],
  },
  "routes/webmention/mentions.tsx": {
    GET: [{ ask: { project: "mention.moderate" } }],
    POST: (["show", "hide", "check"] as const).map((intent) => ({
      name: intent,
      ask: { project: "mention.moderate" as const },
      prepare: ({ place }: About) => waitingMention(place),
      form: ({ prepared }: About) => ({ intent, mention: prepared }),
    })),
  },

  "routes/photographs/photographs.ts": {
    POST: [
      {
        name: "add to the antenna",
        ask: { project: "antenna.edit" },
        form: () => ({ intent: "add", photographs: new File([onePixel()], "mast.png") }),
      },
      {
        name: "add to a bench",
        ask: { project: "bench.edit" },
        form: ({ place }) => ({
          intent: "add",
          bench: place.bench,
          photographs: new File([onePixel()], "bridge.png"),
        }),
      },
      {
        name: "caption",
        ask: { project: "bench.edit" },
        form: ({ place }) => ({ intent: "caption", photograph: place.photograph, caption: "The bridge" }),
      },
      {
        name: "delete",
        ask: { project: "bench.edit" },
        form: ({ place }) => ({ intent: "delete", photograph: place.photograph }),
        destroys: "sweep",
      },
    ],
  },
  "routes/photographs/photograph.ts": { GET: read },

  "routes/antenna/antenna.tsx": { GET: read },
  "routes/antenna/edit.tsx": {
    GET: [{ ask: { project: "antenna.edit" } }],
    POST: [
      {
        name: "keep",
        ask: { project: "antenna.edit" },
        form: () => ({
          intent: "keep",
          since: "2026-01-02T10:00",
          "elements[0].kind": "vertical",
          "elements[0].length": "33 ft 6 in",
        }),
      },
      { name: "another", ask: { project: "antenna.edit" }, form: () => ({ intent: "another" }) },
      { name: "bands", ask: { project: "antenna.edit" }, form: () => ({ intent: "bands" }) },
    ],
  },

  "routes/steps/list.tsx": { GET: read },
  "routes/steps/new.tsx": {
    GET: [{ ask: { project: "step.edit" } }],
    POST: [
      {
        name: "keep",
        ask: { project: "step.edit" },
        form: () => ({ intent: "keep", title: "Cut the pole", state: "done", at: "2026-01-03T10:00" }),
      },
      { name: "another", ask: { project: "step.edit" }, form: () => ({ intent: "another" }) },
    ],
  },
  "routes/steps/edit.tsx": {
    GET: [{ ask: { project: "step.edit" } }],
    POST: [{ ask: { project: "step.edit" }, form: () => ({ intent: "another" }) }],
  },
  "routes/steps/step.tsx": {
    GET: read,
    POST: [
      {
        name: "done",
        ask: { project: "step.edit" },
        form: () => ({ intent: "done", at: "2026-01-04T10:00" }),
      },
      {
        name: "sweeps",
        ask: { project: "step.edit" },
        form: ({ place }) => ({ intent: "sweeps", before: place.sweep, after: "" }),
      },
      {
        name: "delete",
        ask: { project: "step.edit" },
        form: () => ({ intent: "delete" }),
        destroys: "sweep",
      },
    ],
  },

  "routes/plates/list.tsx": { GET: read },
  "routes/plates/new.tsx": {
    GET: [{ ask: { project: "plate.make" } }],
    POST: [
      {
        name: "show",
        ask: { project: "plate.make" },
        form: ({ place }) => ({ ...plateForm(place), intent: "show" }),
      },
      {
        name: "freeze",
        ask: { project: "plate.make" },
        form: ({ place }) => ({ ...plateForm(place), intent: "freeze" }),
      },
    ],
  },
  "routes/plates/preview.ts": {
    POST: [{ ask: { project: "plate.make" }, form: ({ place }) => plateForm(place) }],
  },
  "routes/plates/plate.tsx": {
    GET: anybody,
    POST: [
      { name: "check", ask: { site: "site.read" }, form: () => ({ intent: "check" }) },
      {
        name: "withdraw",
        ask: { plate: "plate.make" },
        form: () => ({ intent: "withdraw", reason: "A walk." }),
        destroys: "plate",
      },
    ],
  },

  "routes/live/stream.ts": { GET: read },
  "routes/live/poll.ts": { GET: read },
  "routes/live/looking.ts": {
    POST: [{ ask: { membership: true }, form: () => ({ window: "0123456789abcdef" }) }],
  },
  "routes/notes/notes.ts": {
    GET: read,
    POST: (["dip", "sweep", "trail", "step", "bench"] as const).map((kind) => ({
      name: kind,
      ask: { project: "note.write" as const },
      form: ({ place }: About) => ({ body: "A note.", [kind]: place[kind] }),
    })),
  },
  "routes/notes/note.tsx": {
    GET: read,
    POST: [
      { name: "edit", ask: { authorOr: null }, form: () => ({ intent: "edit", body: "A second thought." }) },
      {
        name: "remove",
        ask: { authorOr: "note.moderate" },
        form: () => ({ intent: "remove" }),
        destroys: "sweep",
      },
      { name: "restore", ask: { project: "note.write" }, form: () => ({ intent: "restore" }) },
    ],
  },
  "routes/notes/history.tsx": { GET: read },
  "routes/notes/report.tsx": {
    GET: [{ ask: { signedIn: "project.read" } }],
    POST: [{ ask: { signedIn: "project.read" }, form: () => ({ reason: "A walk." }) }],
  },
  "routes/attachments/attachments.ts": {
    POST: [{ ask: { project: "note.write" }, form: () => ({ file: sweepFile() }) }],
  },
  "routes/attachments/attachment.ts": { GET: read },
  "routes/attachments/sweep.tsx": {
    GET: [{ ask: { project: "sweep.add" } }],
    POST: [{ ask: { project: "sweep.add" }, form: () => ({}) }],
  },
  "routes/notes/suggest.ts": { GET: [{ ask: { project: "note.write" } }] },
  "routes/notes/preview.ts": {
    GET: anybody,
    POST: [{ ask: { site: "account.own" }, form: () => ({ body: "*so*" }) }],
  },

  "routes/search/search.tsx": { GET: anybody },
  "routes/activity/activity.tsx": {
    GET: read,
    POST: [
      { name: "seen", ask: { membership: true }, form: () => ({ intent: "seen", mark: "none" }) },
      { name: "make-feed", ask: { membership: true }, form: () => ({ intent: "make-feed" }) },
      {
        name: "revoke-feed",
        ask: { membership: true },
        form: () => ({ intent: "revoke-feed", feed: "nothing" }),
      },
    ],
  },
  "routes/activity/feed.ts": { GET: read },
  "routes/inbox/inbox.tsx": {
    GET: [{ ask: { site: "account.own" } }],
    POST: [
      { name: "read", ask: { site: "account.own" }, form: () => ({ intent: "read", notice: "none" }) },
      { name: "read-all", ask: { site: "account.own" }, form: () => ({ intent: "read-all" }) },
    ],
  },
  "routes/inbox/mail.tsx": {
    GET: [{ ask: { site: "account.own" } }],
    POST: [{ ask: { site: "account.own" }, form: () => ({ scope: "all", mode: "daily" }) }],
  },
  "routes/inbox/unsubscribe.tsx": { GET: [{ ask: { status: 404 } }], POST: [{ ask: { status: 404 } }] },
  "routes/inbox/follow.tsx": {
    GET: [{ ask: { membership: true } }],
    POST: [
      { name: "follow", ask: { membership: true }, form: () => ({ intent: "follow", kind: "project" }) },
      { name: "mute", ask: { membership: true }, form: () => ({ intent: "mute", kind: "project" }) },
      { name: "neither", ask: { membership: true }, form: () => ({ intent: "neither", kind: "project" }) },
      { name: "mail", ask: { membership: true }, form: () => ({ intent: "mail", mode: "daily" }) },
    ],
  },

  "routes/admin/admin.tsx": {
    GET: [{ ask: { site: "site.administer" } }],
    POST: (["suspend", "restore", "promote", "demote"] as const).map((intent) => ({
      name: intent,
      ask: { site: "site.administer" as const },
      form: ({ bystander }: About) => ({ intent, user: bystander.publicId }),
    })),
  },

  "routes/admin/reports.tsx": {
    GET: [{ ask: { site: "site.administer" } }],
    POST: [
      {
        ask: { site: "site.administer" },
        prepare: ({ place, bystander }) => openReport(place, bystander),
        form: ({ prepared }) => ({ intent: "leave", report: prepared }),
      },
    ],
  },
  "routes/admin/mail.tsx": {
    GET: [{ ask: { site: "site.administer" } }],
    // A mail made up for each who asks, so that there is one to be tried again.
    POST: [
      {
        ask: { site: "site.administer" },
        prepare: waitingMail,
        form: ({ prepared }) => ({ intent: "retry", mail: prepared }),
      },
    ],
  },

  "routes/api/openapi.ts": { GET: anybody, POST: notHere },
  "routes/api/projects.ts": { GET: [{ ask: { api: "any-member" } }], POST: notHere },
  "routes/api/project.ts": {
    GET: apiRead,
    POST: [{ ask: { api: "project.edit" }, json: () => ({ licence: "CC-BY-4.0" }) }],
  },
  "routes/api/dips.ts": { GET: apiRead, POST: notHere },
  "routes/api/mentions.ts": { GET: apiRead, POST: notHere },
  "routes/api/mentions-sent.ts": { GET: [{ ask: { api: "mention.moderate" } }], POST: notHere },
  "routes/api/mention.ts": {
    GET: [{ ask: { api: "mention.moderate" } }],
    POST: (["show", "hide", "check"] as const).map((decision) => ({
      name: decision,
      ask: { api: "mention.moderate" as const },
      json: () => ({ decision }),
    })),
  },
  "routes/api/sweeps.ts": {
    GET: apiRead,
    POST: [{ ask: { api: "sweep.add" }, form: () => ({ file: sweepFile() }) }],
  },
  "routes/api/sweep.ts": { GET: apiRead, POST: notHere },
  "routes/api/points.ts": { GET: apiRead, POST: notHere },
  "routes/api/bands.ts": { GET: apiRead, POST: notHere },
  "routes/api/plates.ts": {
    GET: apiRead,
    // Of nothing: those who may are told so. A plate takes seconds; tests/web/plates.test.ts makes some.
    POST: [{ ask: { api: "plate.make" }, json: () => ({ from: "nothing" }), answers: 422 }],
  },
  "routes/api/batches.ts": {
    GET: [{ ask: { api: "sweep.add" } }],
    POST: [{ ask: { api: "sweep.add" }, form: () => ({ files: sweepFile() }) }],
  },
  "routes/api/batch.ts": {
    GET: [{ ask: { api: "sweep.add" } }],
    // An empty batch: those who may are told that it is not ready.
    POST: [{ ask: { api: "sweep.add" }, json: () => ({}), answers: 409 }],
  },
  "routes/api/bundles.ts": {
    GET: [{ ask: { api: "project.export" } }],
    POST: [{ ask: { api: "project.export" } }],
  },
  "routes/api/bundle.ts": { GET: [{ ask: { api: "project.export" } }], POST: notHere },
  // While it is not made yet, those who may are told so.
  "routes/api/bundle-file.ts": { GET: [{ ask: { api: "project.export" }, answers: 409 }], POST: notHere },
  "routes/api/bundle-take-in.ts": {
    GET: [{ ask: { api: "any-member" } }],
    POST: [{ ask: { api: "any-member" }, form: () => ({ bundle: new File(["no ZIP"], "walk.zip") }) }],
  },
  "routes/api/my-data.ts": {
    GET: [{ ask: { api: "any-member" } }],
    POST: [{ ask: { api: "any-member" } }],
  },
  "routes/api/plate.ts": { GET: [{ ask: { api: "any-member" } }], POST: notHere },
  "routes/api/plate-check.ts": { GET: [{ ask: { api: "any-member" } }], POST: notHere },
  "routes/api/plate-withdrawal.ts": {
    GET: notHere,
    POST: [
      {
        ask: { api: "plate.make", open: true },
        json: () => ({ reason: "A walk." }),
        destroys: "plate",
      },
    ],
  },
  "routes/api/publication.ts": {
    GET: notHere,
    POST: [
      {
        ask: { api: "write-up.edit" },
        prepare: ({ place }) => rewriteDraft(place),
        json: ({ prepared }) => ({ revision: prepared }),
      },
    ],
  },
  "routes/api/compare.ts": { GET: apiRead, POST: notHere },
  "routes/api/notes.ts": {
    GET: apiRead,
    POST: [{ ask: { api: "note.write" }, json: () => ({ body: "From a script." }) }],
  },
  "routes/api/antenna.ts": { GET: apiRead, POST: notHere },
  "routes/api/steps.ts": {
    GET: apiRead,
    POST: [
      {
        ask: { api: "step.edit" },
        json: () => ({ title: "From a script", state: "done", at: "2026-05-01T10:00:00Z" }),
      },
    ],
  },
  "routes/api/write-ups.ts": {
    GET: apiRead,
    POST: [{ ask: { api: "write-up.edit" }, json: () => ({ title: unique("By script") }) }],
  },
  // Published, so that every token reads it.
  "routes/api/write-up.ts": {
    GET: [{ ask: { api: "any-member" } }],
    POST: [
      {
        ask: { api: "write-up.edit" },
        prepare: ({ place }) => rewriteDraft(place),
        json: ({ prepared }) => ({ title: "So", revision: prepared }),
      },
    ],
  },
  "routes/api/step.ts": { GET: apiRead, POST: notHere },
  "routes/api/trails.ts": { GET: apiRead, POST: notHere },
  "routes/api/trail.ts": { GET: apiRead, POST: notHere },
  "routes/api/benches.ts": { GET: apiRead, POST: notHere },
  "routes/api/causes.ts": { GET: apiRead, POST: notHere },
  "routes/api/missing.ts": { GET: [{ ask: { status: 404 } }], POST: [{ ask: { status: 404 } }] },
};
