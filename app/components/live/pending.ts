import type { LiveEvent } from "~/services/live-shape";

/**
 * Which of the events that came in are not on the page yet. The page was drawn at a mark (that of the last event there was
 * when it was asked for); everything up to there is on it, whether it came in before or comes in later.
 */
export class Pending {
  events: readonly LiveEvent[] = [];
  #known = new Set<string>();
  #drawnAt: string;
  /** The page is ahead of what came in: up to this mark, what comes in is on it already. */
  #aheadTo: string | null = null;

  constructor(mark: string) {
    this.#drawnAt = mark;
  }

  /** False for one that came in before. */
  take(event: LiveEvent): boolean {
    if (this.#known.has(event.id)) return false;
    this.#known.add(event.id);
    if (this.#aheadTo === null) this.events = [...this.events, event];
    else if (event.id === this.#aheadTo) this.#aheadTo = null;
    return true;
  }

  /** The page was drawn anew, at this mark. */
  draw(mark: string): void {
    if (mark === this.#drawnAt) return;
    this.#drawnAt = mark;
    if (!this.#known.has(mark)) this.#aheadTo = mark;
    else this.#aheadTo = null;
    const last = this.events.findIndex(({ id }) => id === mark);
    if (last >= 0) this.events = this.events.slice(last + 1);
    else if (this.#aheadTo !== null) this.events = [];
  }

  /** Everything up to the mark was skipped: nothing more comes of it. */
  skipTo(mark: string): void {
    this.events = [];
    this.#known.add(mark);
    this.#aheadTo = null;
  }
}
