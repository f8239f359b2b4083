import { useEffect, useRef, useState } from "react";
import { Link, useFetchers, useNavigation, useRevalidator, useRouteLoaderData } from "react-router";
import type { LiveState } from "./feed.ts";
import { concerns, type Here } from "./here.ts";
import { isGone, newNotes, newsWords, ofOthers } from "./words.ts";

/**
 * What is not on the page yet, in a strip over its lower edge: nothing that is read moves. Pressing it loads the page's data
 * anew and goes to the first new note; forms and what is typed in them stay.
 */
export function LiveNews({ projectId, state, here }: { projectId: string; state: LiveState; here: Here }) {
  const revalidator = useRevalidator();
  const busy = useBusy();
  const root = useRouteLoaderData<{ person: { userName: string } | null }>("root");
  const others = ofOthers(state.events, root?.person?.userName ?? "", here);
  const events = others.filter((event) => concerns(event, here));
  const gone = isGone(events, here);
  const words = state.behind && !here.form ? BEHIND : newsWords(events, here);
  const target = useRef<string[] | null>(null);
  const pressed = revalidator.state !== "idle" && target.current !== null;
  useEffect(() => {
    if (revalidator.state !== "idle" || target.current === null) return;
    const notes = target.current;
    target.current = null;
    showFirst(notes);
  }, [revalidator.state]);
  const show = () => {
    target.current = newNotes(events);
    revalidator.revalidate();
  };
  // While something of this person's own is under way, its echo is not news.
  // Who is shut out can't load it.
  const shown = words !== "" && (!busy || pressed) && state.way !== "ended";
  return (
    <div className="live-news no-print" role="status" aria-live="polite">
      {shown && (
        <p className="live-strip">
          <span>{upperFirst(words)}</span>
          {gone ? (
            <Link to={`/projects/${projectId}/${here.kind === "step" ? "steps" : "sweeps"}`}>
              See what is left
            </Link>
          ) : (
            <button type="button" className="live-show" onClick={show} aria-busy={pressed || undefined}>
              Show
            </button>
          )}
        </p>
      )}
      {!shown && <LiveWay way={state.way} />}
    </div>
  );
}

/** Said only where it lasts: a page that is no longer told anything must not look as if nothing happened. */
function LiveWay({ way }: { way: LiveState["way"] }) {
  const [lasts, setLasts] = useState(false);
  const silent = way === "lost" || way === "ended";
  useEffect(() => {
    if (!silent) return setLasts(false);
    const timer = setTimeout(() => setLasts(true), way === "ended" ? 0 : LOST_FOR_MS);
    return () => clearTimeout(timer);
  }, [silent, way]);
  if (!lasts || !silent) return null;
  return <p className="live-strip">{way === "ended" ? ENDED : LOST}</p>;
}

function useBusy(): boolean {
  const navigation = useNavigation();
  const fetchers = useFetchers();
  const revalidator = useRevalidator();
  return (
    navigation.state !== "idle" ||
    revalidator.state !== "idle" ||
    fetchers.some(({ state, formMethod }) => state !== "idle" && formMethod !== undefined)
  );
}

/** The new note is drawn by now; where it stands on another page, this one stays as it is. */
function showFirst(notes: readonly string[]): void {
  const found = notes.map((note) => document.getElementById(`note-${note}`)).find((one) => one !== null);
  // The button that was pressed is gone.
  if (!found) {
    document.getElementById("main")?.focus({ preventScroll: true });
    return;
  }
  const still = window.matchMedia("(prefers-reduced-motion: reduce)").matches;
  found.scrollIntoView({ block: "center", behavior: still ? "auto" : "smooth" });
  found.focus({ preventScroll: true });
}

function upperFirst(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}

const BEHIND = "much happened since this page was loaded";
const LOST_FOR_MS = 4000;
const LOST = "No connection to the server: what others do is not shown until it is back.";
const ENDED =
  "This page is told nothing more: you are signed out, or the project is not open to you any more. Load it again to see.";
