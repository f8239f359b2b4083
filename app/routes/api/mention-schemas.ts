import { z } from "zod";
import type { MentionState } from "~/db/webmentions.server";

/** The shapes of the API for pages elsewhere that cite a plate or a write-up, and for what ours told others. */

const id = z.string().describe("Short public id");
const time = z.iso.datetime().describe("UTC");

const STATES = [
  "queued",
  "verified",
  "shown",
  "hidden",
  "refused",
  "gone",
] as const satisfies readonly MentionState[];

const mentionState = z
  .enum(STATES)
  .describe(
    "`queued`: not looked up yet; `verified`: links here, and waits for an owner's word; `shown` or `hidden`: what an owner decided; `refused`: does not link here; `gone`: no longer does",
  );

export const mentionShape = z.object({
  id,
  state: mentionState,
  source: z.string().describe("Address of the page elsewhere"),
  title: z.string().nullable().describe("As that page calls itself; null where that is unknown"),
  plate: id.nullable().describe("The plate that it cites; null where it is a write-up"),
  writeUp: id.nullable(),
  citedTitle: z.string(),
  reason: z.string().nullable().describe("Why it does not count; null for none, and for who may not decide"),
  receivedAt: time,
  checkedAt: time.nullable().describe("Last looked up; null where it was not yet"),
  decidedBy: z.string().nullable().describe("Null where nobody did yet, and for who may not decide"),
  links: z.object({ self: z.string(), cited: z.string() }),
});

export const mentionListShape = z.object({
  items: z.array(mentionShape),
  nextCursor: z.string().nullable(),
});

export const mentionQuerySchema = z.object({
  state: z
    .enum(STATES)
    .optional()
    .describe("Only those; who may not decide on them asks for `shown`, and without it gets the same"),
  cursor: z.string().max(100).optional(),
});

export const mentionDecisionSchema = z.strictObject({
  decision: z
    .enum(["show", "hide", "check"])
    .describe("Show it to readers or not; `check` has the page looked up again in a while"),
});

/** What stands under a plate or a write-up for every reader. */
export const shownMentionShape = z.object({
  source: z.string(),
  title: z.string().describe("As the page calls itself, else its host"),
  at: time,
});

export const sentMentionListShape = z.object({
  items: z.array(
    z.object({
      writeUp: id,
      title: z.string(),
      target: z.string().describe("The page that the write-up links to"),
      state: z.enum(["queued", "sent", "failed"]),
      reason: z.string().describe("Why it failed; else empty"),
      at: time,
    }),
  ),
});
