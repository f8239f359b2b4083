import {
  createContext,
  type ReactNode,
  useContext,
  useEffect,
  useRef,
  useState,
  useSyncExternalStore,
} from "react";
import { Feed, type LiveState } from "./feed.ts";
import { type Here, useHere } from "./here.ts";
import { LiveNews } from "./LiveNews.tsx";
import "./live.css";

const Shared = createContext<{ state: LiveState; here: Here } | null>(null);

export interface LiveProjectProps {
  /** Public id. */
  projectId: string;
  /** How far the page that is drawn knows what happened. */
  mark: string;
  /** Members are shown to one another as looking. */
  member: boolean;
  children: ReactNode;
}

/** Keeps the pages of a project told of what happens there, without moving what is read. */
export function LiveProject({ projectId, mark, member, children }: LiveProjectProps) {
  const path = `/projects/${projectId}`;
  const here = useHere(projectId);
  const feed = useFeed(path, mark);
  const state = useSyncExternalStore(
    feed?.subscribe ?? nothingToHear,
    () => feed?.state ?? SILENT,
    () => SILENT,
  );
  useLooking(path, member && state.way !== "ended", here);
  return (
    <Shared value={{ state, here }}>
      {children}
      <LiveNews projectId={projectId} state={state} here={here} />
    </Shared>
  );
}

/** What came in, and where the person is; null outside a project. */
export function useLive() {
  return useContext(Shared);
}

/** One feed for as long as the person stays in the project; closed while the window is out of sight. */
function useFeed(path: string, mark: string): Feed | null {
  const [feed, setFeed] = useState<Feed | null>(null);
  const first = useRef(mark);
  useEffect(() => {
    // The mark with which the project was entered: later ones go to `drawn`.
    const made = new Feed(path, first.current, { EventSource, fetch: (...args) => fetch(...args) });
    setFeed(made);
    let hiding: ReturnType<typeof setTimeout> | undefined;
    // Browsers allow few connections to one server: windows out of sight leave theirs to others.
    const show = () => {
      clearTimeout(hiding);
      if (document.visibilityState === "visible") made.start();
      else hiding = setTimeout(() => made.stop(), HIDDEN_MS);
    };
    const leave = () => made.stop();
    show();
    document.addEventListener("visibilitychange", show);
    window.addEventListener("pageshow", show);
    window.addEventListener("pagehide", leave);
    return () => {
      clearTimeout(hiding);
      document.removeEventListener("visibilitychange", show);
      window.removeEventListener("pageshow", show);
      window.removeEventListener("pagehide", leave);
      made.stop();
    };
  }, [path]);
  useEffect(() => {
    first.current = mark;
    feed?.drawn(mark);
  }, [feed, mark]);
  return feed;
}

/** Says where this window looks, now and every so often. */
function useLooking(path: string, says: boolean, { kind, subject }: Here): void {
  const key = useRef("");
  useEffect(() => {
    if (!says) return;
    key.current ||= newKey();
    const send = (fields: Record<string, string>) => {
      const body = new URLSearchParams({ window: key.current, ...fields });
      fetch(`${path}/live/looking`, { method: "POST", body, keepalive: true }).catch(() => undefined);
    };
    const say = () => {
      if (document.visibilityState === "visible") send({ kind, subject });
      else send({ away: "yes" });
    };
    const leave = () => send({ away: "yes" });
    say();
    const timer = setInterval(() => document.visibilityState === "visible" && say(), SAY_EVERY_MS);
    document.addEventListener("visibilitychange", say);
    window.addEventListener("pagehide", leave);
    return () => {
      clearInterval(timer);
      document.removeEventListener("visibilitychange", say);
      window.removeEventListener("pagehide", leave);
    };
  }, [path, says, kind, subject]);
  // Left for another part of the site.
  useEffect(() => {
    if (!says) return;
    return () => {
      const body = new URLSearchParams({ window: key.current, away: "yes" });
      fetch(`${path}/live/looking`, { method: "POST", body, keepalive: true }).catch(() => undefined);
    };
  }, [path, says]);
}

function newKey(): string {
  return Array.from(crypto.getRandomValues(new Uint8Array(16)), (byte) =>
    byte.toString(16).padStart(2, "0"),
  ).join("");
}

function nothingToHear() {
  return () => undefined;
}

const SILENT: LiveState = { events: [], looking: null, behind: false, way: "opening" };
const HIDDEN_MS = 10_000;
const SAY_EVERY_MS = 20_000;
