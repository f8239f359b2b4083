import { describe, expect, it } from "vitest";
import { checkBag } from "~/services/bundle/check-bag.server";
import { openBag } from "~/services/bundle/open-zip.server";
import { checkRecords } from "~/services/bundle/read-records.server";
import { Refused } from "~/services/bundle/refused";
import { bagOf, type Files, fileOf, payload, zipOf } from "./bags.ts";

/** What becomes of a ZIP before anything of it is written: "taken", or the first sentence of why not. */
async function judge(bytes: Buffer): Promise<string> {
  try {
    const bag = await openBag(fileOf(bytes));
    try {
      await checkRecords(bag, await checkBag(bag, async () => {}));
      return "taken";
    } finally {
      bag.close();
    }
  } catch (error) {
    if (error instanceof Refused) return error.faults[0];
    throw error;
  }
}

const entriesOf = (files: Files) => Object.entries(files);
const good = () => bagOf(payload());
const withFile = (name: string, bytes: string | Buffer = "x") => zipOf([...entriesOf(good()), [name, bytes]]);

describe("a bundle that is whole", () => {
  it("is taken, in a folder or at the top", async () => {
    expect(await judge(await zipOf(entriesOf(good())))).toBe("taken");
    expect(await judge(await zipOf(entriesOf(good()), ""))).toBe("taken");
  });
});

describe("a ZIP with a name or an entry that does harm", () => {
  it.each(["../evil", "data/../../evil", "a//b", "./x", "data/..", "C:/x", "c:x", "data\\x", "a\u0000b"])(
    "is refused for the name %j",
    async (name) => {
      expect(await judge(await zipOf([...entriesOf(good()), [name, "x"]], ""))).toMatch(
        /^The name .* leads out/,
      );
    },
  );
  it("is refused for an absolute name", async () => {
    expect(await judge(await zipOf([...entriesOf(good()), ["/etc/x", "x"]], ""))).toMatch(/leads out/);
  });
  it("is refused for a link or a device", async () => {
    for (const type of [0o120777, 0o020666, 0o010644]) {
      const bytes = await withFile("data/link", "/etc/passwd");
      // The mode of the last entry of the list, 14 bytes before the end of its fixed part.
      const at = bytes.lastIndexOf(Buffer.from([0x50, 0x4b, 1, 2]));
      bytes.writeUInt32LE((type << 16) >>> 0, at + 38);
      expect(await judge(bytes)).toMatch(/is a link or a device/);
    }
  });
  it("is refused for the same name twice, or but for its case", async () => {
    expect(await judge(await withFile("data/records/notes.json"))).toMatch(/there twice/);
    expect(await judge(await withFile("data/records/NOTES.json"))).toMatch(/there twice/);
    const accents = await zipOf([...entriesOf(good()), ["data/\u00e9", "x"], ["data/e\u0301", "x"]]);
    expect(await judge(accents)).toMatch(/there twice/);
  });
  it("is refused for what unpacks to far more than it is", async () => {
    expect(await judge(await withFile("data/zeros", Buffer.alloc(64 * 2 ** 20)))).toMatch(
      /would unpack to \d+ times/,
    );
  });
  it("is refused where a false size hides that", async () => {
    const bytes = await withFile("data/zeros", Buffer.alloc(64 * 2 ** 20));
    const at = bytes.lastIndexOf(Buffer.from([0x50, 0x4b, 1, 2]));
    bytes.writeUInt32LE(1000, at + 24);
    const manifest = bagOf({ ...payload(), "data/zeros": Buffer.alloc(1000) });
    expect(await judge(bytes)).toMatch(/named in manifest|not named in/);
    const named = await zipOf([
      ...entriesOf(manifest).filter(([name]) => name !== "data/zeros"),
      ["data/zeros", Buffer.alloc(64 * 2 ** 20)],
    ]);
    named.writeUInt32LE(1000, named.lastIndexOf(Buffer.from([0x50, 0x4b, 1, 2])) + 24);
    expect(await judge(named)).toMatch(/can't be unpacked/);
  });
  it("is refused where entries share their bytes", async () => {
    const bytes = await zipOf([
      ...entriesOf(good()),
      ["data/a", "x".repeat(500)],
      ["data/b", "y".repeat(500)],
    ]);
    const mark = Buffer.from([0x50, 0x4b, 1, 2]);
    const last = bytes.lastIndexOf(mark);
    const before = bytes.lastIndexOf(mark, last - 1);
    bytes.writeUInt32LE(bytes.readUInt32LE(before + 42), last + 42);
    expect(await judge(bytes)).toMatch(/share the same bytes/);
  });
  it("is refused for a file beside the bundle's folder", async () => {
    const both = await zipOf(
      [...entriesOf(good()).map(([n, b]): [string, string | Buffer] => [`bag/${n}`, b]), ["other", "x"]],
      "",
    );
    expect(await judge(both)).toMatch(/beside the bundle's folder/);
  });
});

describe("what is no whole ZIP", () => {
  it("is refused", async () => {
    const bytes = await zipOf(entriesOf(good()));
    expect(await judge(Buffer.from("hello"))).toMatch(/^This is not a ZIP file/);
    expect(await judge(Buffer.alloc(0))).toMatch(/^This is not a ZIP file/);
    for (const share of [0.2, 0.5, 0.9, 0.999]) {
      expect(await judge(bytes.subarray(0, Math.floor(bytes.length * share)))).toMatch(
        /^This is not a ZIP file/,
      );
    }
    expect(await judge(await zipOf([["a.txt", "x"]]))).toMatch(/no bagit.txt/);
  });
});

describe("a bag that is not what it says", () => {
  const changed = (change: (files: Files) => void) => {
    const files = good();
    change(files);
    return zipOf(entriesOf(files));
  };
  it.each([
    ["a changed byte", "data/records/notes.json", / is not what it was when the bundle was made/],
    ["another bag-info", "bag-info.txt", /is not what it was/],
  ] as const)("is refused for %s", async (_, name, words) => {
    expect(await judge(await changed((files) => (files[name] += " ")))).toMatch(words);
  });
  it.each([
    ["manifest-sha256.txt", /no manifest-sha256.txt/],
    ["tagmanifest-sha256.txt", /no tagmanifest-sha256.txt/],
    ["bag-info.txt", /no bag-info.txt/],
    ["data/records/dips.json", /is named in manifest-sha256.txt and is not there/],
  ])("is refused without %s", async (name, words) => {
    expect(await judge(await changed((files) => delete files[name]))).toMatch(words);
  });
  it("is refused for a file that no manifest names", async () => {
    expect(await judge(await withFile("data/extra"))).toMatch(/is there and not named in manifest/);
    expect(await judge(await withFile("extra.txt"))).toMatch(/is there and named nowhere/);
    expect(await judge(await withFile("fetch.txt", "https://x.example/ 1 data/x\n"))).toMatch(
      /fetched from elsewhere/,
    );
  });
  it("is refused for a format of later", async () => {
    expect(await judge(await zipOf(entriesOf(bagOf(payload(), "Swale-Bundle-Format: 2\n"))))).toMatch(
      /later version/,
    );
    expect(await judge(await zipOf(entriesOf(bagOf(payload(), "A: b\n"))))).toMatch(
      /not a bundle of a project/,
    );
  });
});

describe("records that don't fit together", () => {
  const withRecords = (kind: string, lines: unknown[]) => {
    const files = payload();
    const text = lines.map((line) => (typeof line === "string" ? line : JSON.stringify(line))).join(",\n");
    files[`data/records/${kind}.json`] = `{"kind":"${kind}","format":1,"records":[\n${text}\n]}\n`;
    return zipOf(entriesOf(bagOf(files)));
  };
  const at = "2026-05-03T00:00:00.000Z";
  const trail = {
    id: "aaa",
    name: "",
    frequencyHz: 7e6,
    verdict: "open",
    verdictText: "",
    verdictBy: null,
    verdictAt: null,
    createdAt: at,
  };
  const source = {
    plate: "p",
    role: "sweep",
    sweep: "s",
    name: "a.csv",
    sizeBytes: 1,
    sha256: "0".repeat(64),
    recipe: '{"given":{},"analysis":null,"bench":null}',
    path: "data/no",
  };
  it.each([
    ["trails", [{ ...trail, verdictBy: "nobody" }], /names people nobody, which is not in the bundle/],
    ["trails", [trail, trail], /have the id aaa/],
    ["trails", [{ ...trail, frequencyHz: "7" }], /^Line 2 of data\/records\/trails.json .*frequencyHz/],
    ["trails", [{ ...trail, more: 1 }], /^Line 2 .*more/],
    ["trails", ["{"], /is not JSON/],
    ["trail-dips", [{ dip: "d", trail: "t" }], /names dips d/],
    ["plate-sources", [{ ...source, recipe: "{" }], /^Line 2 .*recipe: no recipe/],
    ["plate-sources", [{ ...source, recipe: '{"given":{},"analysis":{"settings":7}}' }], /recipe: no recipe/],
    ["plate-sources", [source], /names plates p/],
    ["project", [], /which one project/],
    [
      "originals",
      [
        {
          id: "o",
          name: "a",
          sizeBytes: 1,
          sha256: "0".repeat(64),
          uploadedBy: null,
          createdAt: at,
          path: "data/no",
        },
      ],
      /where nothing is/,
    ],
    [
      "originals",
      [
        {
          id: "o",
          name: "a",
          sizeBytes: 1,
          sha256: "0".repeat(64),
          uploadedBy: null,
          createdAt: at,
          path: "data/records/people.json",
        },
      ],
      /is not the file that its record/,
    ],
  ])("are refused with their place: %s, case %#", async (kind, lines, words) => {
    expect(await judge(await withRecords(kind, lines))).toMatch(words);
  });
});
