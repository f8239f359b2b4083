import { type RouterContextProvider, redirect } from "react-router";
import * as people from "~/db/people.server";
import * as projects from "~/db/projects.server";
import * as sessions from "~/db/sessions.server";
import { notFound, refused } from "~/errors";
import {
  effectiveRole,
  mayInProject,
  mayOnSite,
  type ProjectAction,
  type ProjectRole,
  type SiteAction,
  type SiteRole,
} from "./permissions.ts";
import { readSessionId } from "./session.server.ts";

export interface Person extends people.User {
  sessionId: string;
}

export interface ProjectAccess {
  project: projects.Project;
  role: ProjectRole;
  /** Own membership, not what visibility lends. */
  membership: ProjectRole | null;
  person: Person | null;
  /** Row id of the project's last event when the page was asked for, 0 for none. */
  lastEventId: number;
  may: (action: ProjectAction) => boolean;
}

/** What every loader and action is called with, as far as access needs it. */
export interface AccessArgs {
  request: Request;
  params: Record<string, string | undefined>;
  context: Readonly<RouterContextProvider>;
}

/** Who is signed in, asked once a request however many loaders want to know. */
export function findPerson({ request, context }: Pick<AccessArgs, "request" | "context">) {
  const cache = cacheOf(context);
  cache.person ??= loadPerson(request);
  return cache.person;
}

/** The signed-in person; a visitor is sent to sign in and then back here. */
export async function requirePerson(args: AccessArgs, action: SiteAction = "account.own"): Promise<Person> {
  const person = await findPerson(args);
  if (!person) throw signInInstead(args.request);
  if (!mayOnSite(siteRole(person), action)) {
    throw refused("This page is for administrators of the site. Nothing was changed.");
  }
  return person;
}

/**
 * The project at `params.project` for someone who may do `action` there.
 * 404 where the project is absent or hidden, 403 (or signing in first) where it is visible but the action is not allowed.
 */
export async function requireProject(args: AccessArgs, action: ProjectAction): Promise<ProjectAccess> {
  const access = await findProjectAccess(args);
  if (!access) throw notFound("project", (await findPerson(args)) === null);
  if (!access.may(action)) {
    if (!access.person && args.request.method === "GET") throw signInInstead(args.request);
    throw refused(
      access.person
        ? `Your role in this project (${access.role}) does not include this. Nothing was changed; an owner can change roles.`
        : "Sign in first. Nothing was changed.",
      access.person === null,
    );
  }
  return access;
}

async function findProjectAccess(args: AccessArgs): Promise<ProjectAccess | null> {
  const cache = cacheOf(args.context);
  const publicId = args.params.project ?? "";
  let found = cache.projects.get(publicId);
  if (!found) {
    found = loadProjectAccess(publicId, findPerson(args));
    cache.projects.set(publicId, found);
  }
  return found;
}

async function loadProjectAccess(
  publicId: string,
  whose: Promise<Person | null>,
): Promise<ProjectAccess | null> {
  const person = await whose;
  const found = await projects.findWithRole(publicId, person?.id ?? null);
  const role = found ? effectiveRole(found.role, found.project.visibility) : null;
  if (!found || !role) return null;
  if (person && found.role && Date.now() - (found.lastActiveAt?.getTime() ?? 0) > SEEN_EVERY_MS) {
    await projects.setActive(found.project.id, person.id);
  }
  return {
    project: found.project,
    role,
    membership: found.role,
    person,
    lastEventId: found.lastEventId,
    may: (action) => mayInProject(role, action),
  };
}

async function loadPerson(request: Request): Promise<Person | null> {
  const sessionId = await readSessionId(request);
  if (!sessionId) return null;
  const found = await sessions.findById(sessionId);
  if (!found?.user || found.user.suspendedAt || found.user.closedAt) return null;
  if (Date.now() - found.session.lastSeenAt.getTime() > SEEN_EVERY_MS) {
    const now = new Date();
    await sessions.update(sessionId, { lastSeenAt: now });
    await people.update(found.user.id, { lastSeenAt: now });
  }
  return { ...found.user, sessionId };
}

function siteRole(person: Person | null): SiteRole {
  if (!person) return "visitor";
  return person.administrator ? "administrator" : "member";
}

function signInInstead(request: Request) {
  if (request.method !== "GET") return refused("Sign in first. Nothing was changed.", true);
  const url = new URL(request.url);
  const here = url.pathname.replace(/\.data$/, "") + url.search;
  return redirect(`/sign-in?next=${encodeURIComponent(here)}`);
}

interface AccessCache {
  person?: Promise<Person | null>;
  projects: Map<string, Promise<ProjectAccess | null>>;
}

/** One cache a request: every loader of a request is handed the same context. */
const caches = new WeakMap<object, AccessCache>();

function cacheOf(context: object): AccessCache {
  let cache = caches.get(context);
  if (!cache) {
    cache = { projects: new Map() };
    caches.set(context, cache);
  }
  return cache;
}

const SEEN_EVERY_MS = 5 * 60 * 1000;
