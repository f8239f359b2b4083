import { spawnSync } from "node:child_process";
import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { expect, test } from "vitest";
import { layerFaults } from "../../scripts/layer-faults.mjs";

function inFolder<Result>(files: Record<string, string>, look: (folder: string) => Result): Result {
  const folder = mkdtempSync(path.join(tmpdir(), "swale-layers-"));
  for (const [name, source] of Object.entries(files)) {
    const file = path.join(folder, name.startsWith("/") ? "" : "app", name);
    mkdirSync(path.dirname(file), { recursive: true });
    writeFileSync(file, source);
  }
  try {
    return look(folder);
  } finally {
    rmSync(folder, { recursive: true });
  }
}

const layers = (files: Record<string, string>) => inFolder(files, layerFaults);

test("imports that point down pass", () => {
  const result = layers({
    "measurement/sweep.ts": "export const a = 1;",
    "measurement/fit.ts": "export const c = 2; // not process.env",
    "readers/read.ts": 'import Papa from "papaparse";\nimport { a } from "../measurement/sweep.ts";',
    "db/sweeps.server.ts": 'import { a } from "~/measurement/sweep";\nimport mysql from "mysql2";',
    "services/intake.server.ts": 'import { b } from "~/db/sweeps.server";',
    "routes/page.tsx": 'import { b } from "~/services/intake.server";',
    "components/Thread.tsx":
      'import type { Row } from "~/services/intake.server";\nimport { useState } from "react";',
  });
  expect(result).toEqual([]);
});

test.each([
  ["measurement/a.ts", 'import { b } from "../readers/b.ts";', "imports ../readers/b.ts, which is above it"],
  ["measurement/a.ts", 'export { b } from "~/db/b.server";', "imports ~/db/b.server, which is above it"],
  ["measurement/a.ts", 'import fs from "node:fs";', "is pure code, and imports node:fs"],
  ["readers/screenshot/a.ts", 'import sharp from "sharp";', "is pure code, and imports sharp"],
  ["readers/a.ts", 'const b = await import("react");', "is pure code, and imports react"],
  ["readers/a.ts", "export const now = () => Date.now();", "is pure code, and uses Date.now"],
  ["measurement/a.ts", 'import { b } from "./b";', "imports ./b without its .ts"],
  [
    "db/a.server.ts",
    'import { b } from "~/services/b.server";',
    "imports ~/services/b.server, which is above it",
  ],
  ["services/a.server.ts", 'import {\n  b,\n} from "~/routes/b";', "imports ~/routes/b, which is above it"],
  ["charts/A.tsx", 'import type { B } from "~/db/b.server";', "imports ~/db/b.server, which is above it"],
  ["db/a.server.ts", 'import type { B } from "~/auth/b";', "imports ~/auth/b, which is above it"],
  [
    "auth/a.server.ts",
    'import { b } from "~/services/b.server";',
    "imports ~/services/b.server, which is above it",
  ],
  ["components/A.tsx", 'import type { loader } from "~/root";', "imports ~/root, which is above it"],
  [
    "components/A.tsx",
    'import { b } from "~/services/b.server";',
    "runs in the browser, and imports ~/services/b.server",
  ],
  [
    "routes/x/components/A.tsx",
    'import { b } from "~/db/b.server";',
    "runs in the browser, and imports ~/db/b.server",
  ],
  ["routes/long.ts", "\n".repeat(500), "has 501 lines, and 500 are the most"],
])("%s with %j is a fault", (file, source, fault) => {
  expect(layers({ [file]: source })).toContain(`app/${file} ${fault}`);
});

test.each<[string, Record<string, string>, string]>([
  [
    "two files",
    {
      "measurement/a.ts": 'import { b } from "./b.ts";',
      "measurement/b.ts": 'import { a } from "./a.ts";',
    },
    "app/measurement/a.ts → app/measurement/b.ts, app/measurement/b.ts → app/measurement/a.ts",
  ],
  [
    "a type that goes back",
    {
      "routes/page.tsx": 'import { Part } from "./components/Part";',
      "routes/components/Part.tsx": 'import type { PageData } from "../page";',
    },
    "app/routes/components/Part.tsx → app/routes/page.tsx, app/routes/page.tsx → app/routes/components/Part.tsx",
  ],
  [
    "three files, a re-export and an import that waits",
    {
      "services/a.server.ts": 'export { b } from "~/services/b.server";',
      "services/b.server.ts": 'const c = await import("./c.server.ts");',
      "services/c.server.ts": 'import "./a.server.ts";',
    },
    "app/services/a.server.ts → app/services/b.server.ts, app/services/b.server.ts → app/services/c.server.ts, " +
      "app/services/c.server.ts → app/services/a.server.ts",
  ],
  [
    "a file and itself",
    { "charts/A.tsx": 'import type { B } from "./A";' },
    "app/charts/A.tsx → app/charts/A.tsx",
  ],
  [
    "scripts and the server",
    { "/scripts/bench.mjs": 'import "../server.ts";', "/server.ts": 'import "./scripts/bench.mjs";' },
    "scripts/bench.mjs → server.ts, server.ts → scripts/bench.mjs",
  ],
])("a circle is a fault: %s", (_, files, arrows) => {
  expect(layers(files)).toEqual([`circle of imports: ${arrows}`]);
});

test("files that meet again further down are no circle, nor is one named in a comment", () => {
  const result = layers({
    "routes/a.ts": 'import "./b";\nimport "./c";',
    "routes/b.ts": 'import "./d";',
    "routes/c.ts": 'import "./d";',
    "routes/d.ts": '// import "./a";\n/** import "./b"; */\nimport react from "react";',
  });
  expect(result).toEqual([]);
});

test("the command says each fault and fails; without one it is silent", () => {
  const run = (files: Record<string, string>) =>
    inFolder(files, (folder) =>
      spawnSync(process.execPath, ["scripts/layers.mjs", folder], { encoding: "utf8" }),
    );
  const { status, stderr } = run({ "measurement/a.ts": 'import fs from "node:fs";' });
  expect(status).toBe(1);
  expect(stderr).toContain("app/measurement/a.ts is pure code, and imports node:fs\n1 fault: ");
  expect(run({ "measurement/a.ts": "export const a = 1;" })).toMatchObject({ status: 0, stderr: "" });
});
