import { placeName } from "./place.ts";
import { Thread, type ThreadProps } from "./Thread.tsx";

/** A thread as a part of the page of what it stands on. */
export function ThreadSection(props: ThreadProps) {
  return (
    <section id="thread" aria-labelledby="thread-title" className="grid gap-4 max-w-[72ch]">
      <h2 id="thread-title">Notes on {placeName(props.place)}</h2>
      <Thread {...props} />
    </section>
  );
}
