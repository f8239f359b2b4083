import type { EventAbout } from "~/db/schema";
import type { EventKind } from "./event-kinds.ts";

/** What open pages are told, over a stream of events and over the polling that stands in for it. */

export interface LiveEvent {
  /** A mark of the project's own: "everything up to here". Told apart by it; it says nothing of how many there are. */
  id: string;
  kind: EventKind;
  /** ISO, UTC. */
  at: string;
  by: { name: string; userName: string } | null;
  about: EventAbout;
}

/** A member who has a page of the project open, and of what. */
export interface Looker {
  name: string;
  userName: string;
  /** "project", "sweep", "dip"… */
  kind: string;
  /** Public id; of the project for its own pages. */
  subject: string;
}

export interface LiveAnswer {
  events: LiveEvent[];
  /** Null for who is not a member. */
  looking: Looker[] | null;
  /** What to go on from. */
  mark: string;
  /** There is more already: ask again at once. */
  more: boolean;
  /** So much happened, or the mark was none of ours, that it is not told one by one: load the page again. */
  behind: boolean;
}
