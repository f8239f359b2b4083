import { beforeAll, describe, expect, it } from "vitest";
import {
  effectiveRole,
  mayInProject,
  mayOnSite,
  type ProjectAction,
  type ProjectRole,
  type SiteRole,
  type Visibility,
} from "~/auth/permissions";
import { askForBundle } from "~/services/bundle/runs.server";
import { askApi, Browser } from "./browser.ts";
import { type Ask, type Case, EXPECTATIONS } from "./expectations.ts";
import { copyPlate, freezePlate, waitingMention } from "./in-a-place.ts";
import { flattenSiteMap, layoutFiles, type SiteRoute } from "./site-map.ts";
import {
  type Crew,
  makeCrew,
  makePerson,
  makePlace,
  type Place,
  type Someone,
  signIn,
  tokenOf,
} from "./world.ts";

/** Every route of the site map × every role, over HTTP, against the one table of permissions. */

const ACTORS = [
  "visitor",
  "stranger",
  "reader",
  "commenter",
  "experimenter",
  "owner",
  "administrator",
] as const;
type Actor = (typeof ACTORS)[number];
const VISIBILITIES: Visibility[] = ["private", "linked", "public"];

/** What a person meets: `sign-in` is being sent to sign in first, `no-token` the API's word for it. */
type Answer = "allowed" | "refused" | "hidden" | "sign-in" | "no-token" | `status ${number}`;

const routes = flattenSiteMap();
let crew: Crew;
let others: { stranger: Someone; administrator: Someone };
let bystander: Someone;
let places: Record<Visibility, Place>;
const tokens = new Map<Actor, string>();
/** Places to be destroyed, which stand until somebody who may has done so. */
const spares = new Map<string, Place>();

beforeAll(async () => {
  crew = await makeCrew();
  others = {
    stranger: await makePerson("stranger"),
    administrator: await makePerson("administrator", { administrator: true }),
  };
  bystander = await makePerson("bystander");
  places = {
    private: await makePlace(crew, "private"),
    linked: await makePlace(crew, "linked"),
    public: await makePlace(crew, "public"),
  };
  for (const actor of ACTORS) {
    const person = personOf(actor);
    if (person) tokens.set(actor, await tokenOf(person));
  }
});

describe("the table of expectations", () => {
  it("names every route of the site map and no other", () => {
    expect(Object.keys(EXPECTATIONS).sort()).toEqual(routes.map((route) => route.file).sort());
  });

  it("names every method that a route answers", () => {
    const answered = routes.map((route) => [route.file, ...route.methods]);
    const expected = routes.map((route) => {
      const { GET, POST } = EXPECTATIONS[route.file] ?? {};
      return [route.file, ...(GET ? ["GET"] : []), ...(POST ? ["POST"] : [])];
    });
    expect(expected).toEqual(answered);
  });
});

describe.each(routes)("$path ($file)", (route) => {
  for (const method of route.methods) {
    for (const one of EXPECTATIONS[route.file]?.[method] ?? []) {
      it(`${method} ${one.name ?? ""}`.trim(), async () => {
        const visibilities = route.path.includes(":") ? VISIBILITIES : VISIBILITIES.slice(0, 1);
        // Each has a project of its own, so they are asked side by side.
        await Promise.all(
          visibilities.map(async (visibility) => {
            const seen: string[] = [];
            for (const actor of ACTORS)
              seen.push(`${actor}: ${await ask(route, method, one, actor, visibility)}`);
            const wanted = ACTORS.map((actor) => `${actor}: ${expected(one.ask, method, actor, visibility)}`);
            expect(seen, visibility).toEqual(wanted);
          }),
        );
      });
    }
  }
});

describe("a page's data asked for without its layouts", () => {
  const pages = routes.filter((route) => /^\/projects\/:project(\/|$)/.test(route.path));
  it.each([...pages.map(({ file, path }) => ({ file, path })), ...layouts()])(
    "tells nobody of a private project: $file",
    async ({ file, path }) => {
      const id = file.replace(/\.tsx?$/, "");
      for (const actor of ["visitor", "stranger", "administrator"] as const) {
        const browser = await browserOf(actor);
        const response = await browser.get(`${fill(path, places.private)}.data?_routes=${id}`);
        expect(await response.text()).not.toContain(places.private.title);
      }
    },
  );

  function layouts() {
    return layoutFiles().map((file) => ({ file, path: "/projects/:project" }));
  }
});

async function ask(
  route: SiteRoute,
  method: "GET" | "POST",
  one: Case,
  actor: Actor,
  visibility: Visibility,
): Promise<Answer> {
  const place = await placeFor(route, one, visibility);
  const response = await send(route, method, one, actor, place);
  const answer = one.answers === response.status ? "allowed" : answerOf(response);
  if (answer === "allowed") spares.delete(spareOf(one, visibility));
  const text = await response.text();
  if (answer === "hidden") expect(text).not.toContain(place.title);
  return answer;
}

async function placeFor({ path }: SiteRoute, { destroys }: Case, visibility: Visibility): Promise<Place> {
  const place = places[visibility];
  if (path.includes(":plate")) place.plate ||= await freezePlate(place, crew.owner);
  if (path.includes(":bundle"))
    place.bundle ||= (await askForBundle(place.projectId, crew.owner.id)).run.publicId;
  if (path.includes(":mention")) place.mention = await waitingMention(place);
  if (!destroys) return place;
  const key = spareOf({ destroys }, visibility);
  const spare =
    spares.get(key) ??
    (destroys === "plate"
      ? { ...place, plate: await copyPlate(place.plate) }
      : await makePlace(crew, visibility, destroys === "project"));
  spares.set(key, spare);
  return spare;
}

function spareOf({ destroys }: Pick<Case, "destroys">, visibility: Visibility): string {
  return `${destroys} ${visibility}`;
}

async function send(
  route: SiteRoute,
  method: "GET" | "POST",
  one: Case,
  actor: Actor,
  place: Place,
): Promise<Response> {
  const path = fill(route.path, place);
  const known = personOf(actor);
  const administrator = actor === "administrator";
  const self = known && one.asNewcomer ? await makePerson("newcomer", { administrator }) : known;
  const about = { place, crew, self, bystander, prepared: "" };
  const prepared = (await one.prepare?.(about)) ?? "";
  const form = one.form?.({ ...about, prepared }) ?? {};
  if (!("api" in one.ask)) {
    const browser = self ? await signIn(self) : new Browser();
    return method === "GET" ? browser.get(path) : browser.post(path, form);
  }
  const init: RequestInit = { method };
  if (one.json) {
    init.body = JSON.stringify(one.json({ ...about, prepared }));
    init.headers = { "Content-Type": "application/json" };
  } else if (method === "POST") {
    const body = new FormData();
    for (const [name, value] of Object.entries(form)) body.set(name, value);
    init.body = body;
  }
  return askApi(path.replace("/api/v1", ""), tokens.get(actor) ?? null, init);
}

function answerOf(response: Response): Answer {
  const { status } = response;
  const to = response.headers.get("Location") ?? "";
  if (status === 302 && to.startsWith("/sign-in?next=")) return "sign-in";
  if (status >= 200 && status < 400) return "allowed";
  if (status === 401) return "no-token";
  if (status === 403) return "refused";
  return status === 404 ? "hidden" : `status ${status}`;
}

/** What the table of permissions says. */
function expected(ask: Ask, method: string, actor: Actor, visibility: Visibility): Answer {
  if ("status" in ask) return ask.status === 404 ? "hidden" : `status ${ask.status}`;
  const withoutSession = method === "GET" ? "sign-in" : "refused";
  if ("site" in ask) {
    const role: SiteRole = actor === "visitor" || actor === "administrator" ? actor : "member";
    if (mayOnSite(role, ask.site)) return "allowed";
    return role === "visitor" ? withoutSession : "refused";
  }
  const membership = actor in crew ? (actor as ProjectRole) : null;
  const role = effectiveRole(membership, visibility);
  if ("api" in ask) {
    if (actor === "visitor") return "no-token";
    if (ask.api === "any-member") return "allowed";
    if (!role) return ask.open ? "refused" : "hidden";
    return mayInProject(role, ask.api) ? "allowed" : "refused";
  }
  if ("plate" in ask) {
    if (role && mayInProject(role, ask.plate)) return "allowed";
    return "refused";
  }
  if (!role) return "hidden";
  if ("signedIn" in ask) {
    return actor === "visitor" ? withoutSession : mayInProject(role, ask.signedIn) ? "allowed" : "refused";
  }
  if (allows(ask, actor, membership, role)) return "allowed";
  return actor === "visitor" ? withoutSession : "refused";
}

function allows(
  ask: { project: ProjectAction } | { membership: true } | { authorOr: ProjectAction | null },
  actor: Actor,
  membership: ProjectRole | null,
  role: ProjectRole,
): boolean {
  if ("project" in ask) return mayInProject(role, ask.project);
  if ("membership" in ask) return membership !== null;
  if (actor === "commenter") return mayInProject(role, "note.write");
  return ask.authorOr !== null && mayInProject(role, ask.authorOr);
}

function fill(path: string, place: Place): string {
  return path
    .replace(":project", place.project)
    .replace(":sweep", place.sweep)
    .replace(":dip", place.dip)
    .replace(":note", place.note)
    .replace(":bench", place.bench)
    .replace(":photograph", place.photograph)
    .replace(":attachment/:size", `${place.attachment}/file`)
    .replace(":attachment", place.attachment)
    .replace(":step", place.step)
    .replace(":trail", place.trail)
    .replace(":plate", place.plate)
    .replace(":writeUp", place.writeUp)
    .replace(":batch", place.batch)
    .replace(":bundle", place.bundle)
    .replace(":mention", place.mention)
    .replace(":token", place.invitation)
    .replace(":size", "small")
    .replace("*", "no/such/thing");
}

function personOf(actor: Actor): Someone | null {
  if (actor === "visitor") return null;
  return actor in crew ? crew[actor as ProjectRole] : others[actor as keyof typeof others];
}

async function browserOf(actor: Actor): Promise<Browser> {
  const person = personOf(actor);
  return person ? signIn(person) : new Browser();
}
