import type { Example, ExampleGroup } from "./example.ts";
import { BATCH_EXAMPLES, BUNDLE_EXAMPLES } from "./examples-bundles.ts";
import { FORM_EXAMPLES } from "./examples-forms.ts";
import { MENTION_EXAMPLES, PLATE_EXAMPLES, TAKING_BACK, WRITE_UP_EXAMPLES } from "./examples-plates.ts";
import { sampleFile } from "./sample-file.ts";

/**
 * Worked examples of the API, in an order in which they can be run: each names what it takes from the answers before it.
 * tests/web/api-examples.test.ts runs them against the server and holds what it answers against example-answers.json; with
 * EXAMPLES=write it writes that file anew.
 */

export type { Example, ExampleGroup };

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
      {
        operation: "changeProject",
        says: "Under which licence are its new plates and write-ups?",
        path: "/projects/{project}",
        json: { licence: "CC-BY-SA-4.0" },
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
        operation: "listDips",
        says: "All dips of the project, the lowest frequency first; here those under an SWR of 1.5 in one band.",
        path: "/projects/{project}/dips?under=1.5&band=in:40%20m&sort=frequency",
      },
      {
        operation: "listDips",
        says: "The same for a spreadsheet: all of them at once.",
        path: "/projects/{project}/dips?under=1.5&sort=frequency",
        accept: "text/csv",
        saves: "dips.csv",
      },
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
  PLATE_EXAMPLES,
  WRITE_UP_EXAMPLES,
  MENTION_EXAMPLES,
  BATCH_EXAMPLES,
  BUNDLE_EXAMPLES,
  FORM_EXAMPLES,
  TAKING_BACK,
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
