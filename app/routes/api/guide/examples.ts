import { sampleFile } from "./sample-file.ts";

/**
 * Worked examples of the API, in an order in which they can be run: each names what it takes from the answers before it.
 * tests/web/api-examples.test.ts runs them against the server and holds what it answers against example-answers.json; with
 * EXAMPLES=write it writes that file anew.
 */

export interface Example {
  /** As the OpenAPI document calls what is asked. */
  operation: string;
  says: string;
  /** Under /api/v1; `{name}` is taken from an earlier answer. */
  path: string;
  json?: unknown;
  file?: { name: string; text: string; fields: Record<string, string> };
  /** Several of them; one without a text is what an earlier answer was saved as. */
  files?: { field: string; name: string; text?: string }[];
  /** The answer is bytes, kept in a file of this name. */
  saves?: string;
  /** Work goes on behind the answer: its `links.self` is asked for until `where` is `is`, and that is what is shown. */
  until?: { where: string; is: string };
  /** What later examples take from the answer: name → where it is. */
  keep?: Record<string, string>;
}

export interface ExampleGroup {
  title: string;
  examples: Example[];
}

export const EXAMPLE_GROUPS: ExampleGroup[] = [
  {
    title: "Projects",
    examples: [
      {
        operation: "listProjects",
        says: "Which projects am I a member of?",
        path: "/projects",
        keep: { project: "items.0.id" },
      },
      {
        operation: "getProject",
        says: "What is this one about, and which bands is its antenna meant for?",
        path: "/projects/{project}",
      },
    ],
  },
  {
    title: "Sweeps",
    examples: [
      {
        operation: "takeSweepIn",
        says: "Its dips, with their limits as far as they are known, are in the answer.",
        path: "/projects/{project}/sweeps",
        file: {
          name: "reeds.s1p",
          text: sampleFile(7.1),
          fields: { title: "Before the radials", takenAt: "2026-05-02T09:30:00Z" },
        },
        keep: { sweep: "id", dip: "dips.0.id" },
      },
      {
        operation: "takeSweepIn",
        says: "A second one, taken after something was changed.",
        path: "/projects/{project}/sweeps",
        file: {
          name: "reeds-after.s1p",
          text: sampleFile(7.04),
          fields: { title: "With eight radials", takenAt: "2026-05-03T16:00:00Z" },
        },
        keep: { later: "id" },
      },
      {
        operation: "listSweeps",
        says: "What is there already?",
        path: "/projects/{project}/sweeps",
      },
      {
        operation: "getSweep",
        says: "What was found in this one?",
        path: "/sweeps/{sweep}",
      },
      {
        operation: "getPoints",
        says: "Its points between two frequencies, thinned so that dips stay.",
        path: "/sweeps/{sweep}/points?fromHz=7000000&toHz=7200000&max=8",
      },
      {
        operation: "getBands",
        says: "What it shows of every band that it touches.",
        path: "/sweeps/{sweep}/bands?limit=2",
      },
      {
        operation: "compareSweeps",
        says: "Two sweeps side by side.",
        path: "/projects/{project}/compare?sweep={sweep}&sweep={later}",
      },
    ],
  },
  {
    title: "Dips and notes",
    examples: [
      {
        operation: "writeNote",
        says: "Say something on a dip, in Markdown. Sent again with the same key, nothing is written twice.",
        path: "/dips/{dip}/notes",
        json: { body: "Deeper than last week. The ground was **wet**.", clientKey: "reeds-note-1" },
      },
      { operation: "listNotes", says: "What was said on it, oldest first.", path: "/dips/{dip}/notes" },
      {
        operation: "getCauses",
        says: "What may be behind it, and every verdict that was given.",
        path: "/dips/{dip}/causes",
      },
    ],
  },
  {
    title: "The experiment's story",
    examples: [
      {
        operation: "getAntenna",
        says: "The antenna as it was on a day.",
        path: "/projects/{project}/antenna?on=2026-05-02",
      },
      {
        operation: "makeStep",
        says: "Write down what was changed between two sweeps. A part of the antenna is changed with it.",
        path: "/projects/{project}/steps",
        json: {
          title: "Eight radials in place of four",
          state: "done",
          at: "2026-05-03T12:00:00Z",
          quantities: [{ part: "radials", field: "count", to: 8 }],
        },
        keep: { step: "id" },
      },
      { operation: "listSteps", says: "Every step, in order of time.", path: "/projects/{project}/steps" },
      { operation: "getStep", says: "One step, with the sweeps beside it.", path: "/steps/{step}" },
      {
        operation: "listTrails",
        says: "Every dip followed from sweep to sweep.",
        path: "/projects/{project}/trails",
        keep: { trail: "items.0.id" },
      },
      { operation: "getTrail", says: "One of them.", path: "/trails/{trail}" },
      {
        operation: "listBenches",
        says: "The set-ups that sweeps were taken with.",
        path: "/projects/{project}/benches",
      },
    ],
  },
  {
    title: "Plates",
    examples: [
      {
        operation: "makePlate",
        says: "Freeze a figure with its numbers. Anyone who has its address reads it from then on.",
        path: "/projects/{project}/plates",
        json: { from: "sweep:{sweep}", title: "Before the radials", clientKey: "reeds-plate-1" },
        keep: { plate: "id" },
      },
      { operation: "listPlates", says: "The plates of a project.", path: "/projects/{project}/plates" },
      { operation: "getPlate", says: "One plate with all that it rests on.", path: "/plates/{plate}" },
    ],
  },
  {
    title: "Write-ups",
    examples: [
      {
        operation: "makeWriteUp",
        says: "Begin a write-up, with a dip as a figure. It is a draft until somebody publishes it on its page.",
        path: "/projects/{project}/write-ups",
        json: { title: "What eight radials did", body: "## The dip\n\n![Before the radials](#dip:{dip})\n" },
        keep: { writeUp: "id", revision: "revision" },
      },
      {
        operation: "changeWriteUp",
        says: "Change the draft. The revision says which text this is a change of.",
        path: "/write-ups/{writeUp}",
        json: { title: "What eight radials did to the dip", revision: "{revision}" },
      },
      {
        operation: "getWriteUp",
        says: "Its text as it is being written; without `draft=yes` as it is published.",
        path: "/write-ups/{writeUp}?draft=yes",
      },
      {
        operation: "listWriteUps",
        says: "The write-ups of a project.",
        path: "/projects/{project}/write-ups",
      },
    ],
  },
];

/** What an example is kept under among the answers: its operation, and its place among those of it. */
export function keyOf(example: Example): string {
  const alike = EXAMPLE_GROUPS.flatMap(({ examples }) => examples).filter(
    ({ operation }) => operation === example.operation,
  );
  const at = alike.indexOf(example);
  return at > 0 ? `${example.operation} ${at + 1}` : example.operation;
}

/** Puts what earlier answers gave into a text or into every text of a value. */
export function filledIn<T>(value: T, kept: Record<string, string>): T {
  const text = JSON.stringify(value).replace(/\{([a-z]\w*)\}/gi, (whole, name) => kept[name] ?? whole);
  return JSON.parse(text);
}
