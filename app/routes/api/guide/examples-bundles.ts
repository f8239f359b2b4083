import type { ExampleGroup } from "./example.ts";
import { sampleFile } from "./sample-file.ts";

/** Worked examples of batches and bundles. */

/** What the batch brings in the end; at first a bench in it is not there. */
export const BATCH_TABLE = `file,title,taken at,bench,step
reeds-dry.s1p,Dry ground,2026-05-04 10:00,Bridge in the shed,
reeds-wet.s1p,Wet ground,2026-05-04 16:30,Bridge in the shed,Eight radials in place of four
`;

const OF_BATCH = ["reeds-dry.s1p", "reeds-wet.s1p"].map((name, i) => ({
  field: "files",
  name,
  text: sampleFile(7.06 - 0.03 * i),
}));

export const BATCH_EXAMPLES: ExampleGroup = {
  title: "Many sweeps at once",
  examples: [
    {
      operation: "checkBatch",
      says: "Everything is checked before anything is written. Here the table names a bench that is not there: `problems` says so, row by row.",
      path: "/projects/{project}/batches",
      files: [
        ...OF_BATCH,
        {
          field: "table",
          name: "reeds-first.csv",
          text: BATCH_TABLE.replace("Bridge in the shed,\n", "Bridge in the barn,\n"),
        },
      ],
      until: { where: "phase", is: "checked" },
      keep: { batch: "id" },
    },
    {
      operation: "checkBatch",
      says: "The table once more, mended, for the same batch; files that are there need not come again.",
      path: "/projects/{project}/batches",
      files: [{ field: "table", name: "reeds.csv", text: BATCH_TABLE }],
      fields: { batch: "{batch}" },
      until: { where: "phase", is: "checked" },
    },
    {
      operation: "takeBatchIn",
      says: "Take it in. With `leave-out`, rows that something stands in the way of are left out; with `refuse`, or without a body, nothing is taken in while there are any.",
      path: "/batches/{batch}",
      json: { problems: "refuse" },
      until: { where: "phase", is: "done" },
    },
    { operation: "getBatch", says: "Which sweeps came of it?", path: "/batches/{batch}" },
    { operation: "listBatches", says: "The batches that are kept.", path: "/projects/{project}/batches" },
    {
      operation: "giveBatchUp",
      says: "Forget it. A batch that nobody took in goes by itself after four days.",
      path: "/batches/{batch}",
    },
  ],
};

export const BUNDLE_EXAMPLES: ExampleGroup = {
  title: "Bundles",
  examples: [
    {
      operation: "makeBundle",
      says: "Ask for a project as one file.",
      path: "/projects/{project}/bundles",
      keep: { bundle: "id" },
    },
    {
      operation: "getBundle",
      says: "How far is it?",
      path: "/bundles/{bundle}",
      until: { where: "state", is: "done" },
    },
    {
      operation: "getBundleFile",
      says: "The file. With `-C -` this command goes on where it was broken off.",
      path: "/bundles/{bundle}/file",
      saves: "reed-bank.zip",
    },
    { operation: "listBundles", says: "What was asked for so far.", path: "/projects/{project}/bundles" },
    {
      operation: "takeBundleIn",
      says: "Take a bundle in, here or in another Swale.",
      path: "/bundles/take-in",
      files: [{ field: "bundle", name: "reed-bank.zip" }],
      keep: { taken: "id" },
    },
    {
      operation: "getBundle",
      says: "Of one that was given: the project that came of it; where it was refused, `faults` says why.",
      path: "/bundles/{taken}",
      until: { where: "state", is: "done" },
    },
    { operation: "listTakenIn", says: "The bundles that I gave.", path: "/bundles/take-in" },
    {
      operation: "gatherMyData",
      says: "Everything that is kept of me.",
      path: "/my-data",
      keep: { mine: "id" },
    },
    {
      operation: "getBundle",
      says: "All my data, which is asked for and downloaded as a bundle is.",
      path: "/bundles/{mine}",
      until: { where: "state", is: "done" },
    },
    { operation: "listMyData", says: "When did I ask for it?", path: "/my-data" },
    {
      operation: "removeBundle",
      says: "Remove the file before its time. The project stays as it is.",
      path: "/bundles/{bundle}",
    },
  ],
};
