import type { ExampleGroup } from "./example.ts";

/** Worked examples of plates, write-ups, and who cites them. */

export const PLATE_EXAMPLES: ExampleGroup = {
  title: "Plates",
  examples: [
    {
      operation: "makePlate",
      says: "Freeze a figure with its numbers. Anyone who has its address reads it from then on.",
      path: "/projects/{project}/plates",
      json: { from: "sweep:{sweep}", title: "Before the radials", clientKey: "reeds-plate-1" },
      keep: { plate: "id" },
    },
    {
      operation: "makePlate",
      says: "Mend a mistake: a new version, which says what was wrong; the one before stays and points to it.",
      path: "/projects/{project}/plates",
      json: {
        from: "sweep:{sweep}",
        title: "Before the radials, as SWR",
        quantity: "swr",
        mends: "{plate}",
        wrong: "The text speaks of SWR, and the figure showed return loss.",
      },
      keep: { newer: "id" },
    },
    { operation: "listPlates", says: "The plates of a project.", path: "/projects/{project}/plates" },
    {
      operation: "getPlate",
      says: "One plate with all that it rests on, its versions, and the pages that cite it.",
      path: "/plates/{plate}",
    },
    {
      operation: "checkPlate",
      says: "Do its originals still give the same numbers? What differs would be listed, with the reason.",
      path: "/plates/{plate}/check",
    },
    {
      operation: "withdrawPlate",
      says: "Withdraw one for good. What stays at its address is the reason.",
      path: "/plates/{newer}/withdrawal",
      json: { reason: "The sweep was taken with the wrong bridge." },
    },
  ],
};

export const WRITE_UP_EXAMPLES: ExampleGroup = {
  title: "Write-ups",
  examples: [
    {
      operation: "makeWriteUp",
      says: "Begin a write-up, with a dip as a figure. It is a draft until somebody publishes it.",
      path: "/projects/{project}/write-ups",
      json: { title: "What eight radials did", body: "## The dip\n\n![Before the radials](#dip:{dip})\n" },
      keep: { writeUp: "id", revision: "revision" },
    },
    {
      operation: "changeWriteUp",
      says: "Change the draft. The revision says which text this is a change of.",
      path: "/write-ups/{writeUp}",
      json: { title: "What eight radials did to the dip", revision: "{revision}" },
      keep: { lookedAt: "revision" },
    },
    {
      operation: "publishWriteUp",
      says: "Publish what was looked at: `revision` says which text that was.",
      path: "/write-ups/{writeUp}/publication",
      json: { revision: "{lookedAt}", remark: "The first version" },
    },
    {
      operation: "getWriteUp",
      says: "Its text as it is being written; without `draft=yes` as it is published.",
      path: "/write-ups/{writeUp}?draft=yes",
    },
    {
      operation: "makeWriteUp",
      says: "One that is not wanted after all, without a text yet.",
      path: "/projects/{project}/write-ups",
      json: { title: "A false start" },
      keep: { falseStart: "id" },
    },
    {
      operation: "deleteWriteUp",
      says: "A draft that never was published can be deleted.",
      path: "/write-ups/{falseStart}",
    },
    {
      operation: "listWriteUps",
      says: "The write-ups of a project.",
      path: "/projects/{project}/write-ups",
    },
  ],
};

/** Behind the forms: what is taken back has none. */
export const TAKING_BACK: ExampleGroup = {
  title: "Taking a write-up back",
  examples: [
    {
      operation: "takeWriteUpBack",
      says: "Its address says from now on that it was taken back. It can be published again.",
      path: "/write-ups/{writeUp}/publication",
    },
  ],
};

export const MENTION_EXAMPLES: ExampleGroup = {
  title: "Cited elsewhere",
  examples: [
    {
      operation: "listMentions",
      says: "Which pages say that they cite a plate or a write-up, and wait for an owner's word?",
      path: "/projects/{project}/mentions?state=verified",
      keep: { mention: "items.0.id" },
    },
    {
      operation: "decideOnMention",
      says: "Show one under what it cites.",
      path: "/mentions/{mention}",
      json: { decision: "show" },
    },
    { operation: "getMention", says: "One of them.", path: "/mentions/{mention}" },
    {
      operation: "listSentMentions",
      says: "Whom did the project's own write-ups tell that they cite them? Nobody yet.",
      path: "/projects/{project}/mentions/sent",
    },
  ],
};
