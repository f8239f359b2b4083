import { describe, expect, it } from "vitest";
import { matchAgain, matchRows } from "~/services/batch/match";
import { isOfSystem, safePath } from "~/services/batch/paths";
import { type Named, problemsOf } from "~/services/batch/problems";
import { type BatchFile, EMPTY_REPORT, type FileCheck } from "~/services/batch/report";
import { isTable, readTable } from "~/services/batch/table-csv";
import { parseTaken } from "~/services/batch/taken";

const bytes = (text: string) => new TextEncoder().encode(text);
const NOW = new Date("2026-09-20T10:00:00Z");
const READ: FileCheck = { bench: "", kind: "read", points: 401, startHz: 1e6, stopHz: 3e7, dips: 2 };
const file = (path: string, sha256 = path, check: FileCheck | null = READ): BatchFile => ({
  path,
  sizeBytes: 10,
  kept: { key: path, sha256 },
  refused: null,
  check,
});

describe("readTable", () => {
  it("reads quotes, other parting signs, a byte order mark and headings in any order", () => {
    const text = '\ufeffTitle;file;Taken_at\r\n"Wet; ""reed""";a.csv;2026-09-14\r\n\r\n;b.csv;\r\n';
    expect(readTable(bytes(text))).toEqual({
      problem: null,
      remarks: [],
      rows: [
        {
          line: 2,
          file: "a.csv",
          wanted: { title: 'Wet; "reed"', takenAt: "2026-09-14", bench: "", step: "" },
        },
        { line: 4, file: "b.csv", wanted: { title: "", takenAt: "", bench: "", step: "" } },
      ],
    });
  });

  it("counts lines as editors do, with line ends in quotes too", () => {
    const { rows } = readTable(bytes('file,title\n"a.csv","two\nlines"\nb.csv,x'));
    expect(rows.map(({ line, file }) => [line, file])).toEqual([
      [2, "a.csv"],
      [4, "b.csv"],
    ]);
  });

  it("says what is missing, what is there twice and what is not used", () => {
    expect(readTable(bytes("")).problem).toMatch(/empty/);
    expect(readTable(bytes("name,title\na,b")).problem).toMatch(
      /Line 1 .*no column “file”: found “name”, “title”/,
    );
    expect(readTable(bytes("file,file\na,b")).problem).toMatch(/two columns “file”/);
    expect(readTable(bytes("file,weather\na,wet")).remarks).toEqual([
      "The column “weather” of the table is not used.",
    ]);
  });

  it("does not take long over a table that begins with nothing but spaces", () => {
    // Twice the length took four times as long: 200,000 spaces half a minute.
    expect(readTable(bytes(`${" ".repeat(200_000)}\nfile,title\na.csv,x`)).rows).toHaveLength(1);
  });

  it("takes the apostrophe away that guards against formulas", () => {
    expect(readTable(bytes("file,title\na.csv,'=reed")).rows[0].wanted.title).toBe("=reed");
  });

  it("knows a table among sweeps by its headings", () => {
    expect(isTable("sweeps.csv", bytes("file,title,taken at\na.csv,x,"))).toBe(true);
    expect(isTable("sweep.csv", bytes("Frequency (MHz),S11 (dB)\n1,-3"))).toBe(false);
    expect(isTable("list.csv", bytes("file\na.csv"))).toBe(false);
  });
});

describe("parseTaken", () => {
  it.each([
    ["", null],
    ["2026-09-14", "2026-09-14T12:00:00.000Z"],
    ["2026-09-14 17:20", "2026-09-14T17:20:00.000Z"],
    ["2026-09-14T17:20:30Z", "2026-09-14T17:20:30.000Z"],
  ])("reads “%s”", (text, at) => {
    expect(parseTaken(text, NOW)).toEqual({ at: at === null ? null : new Date(at) });
  });

  it.each(["14.09.2026", "2026-02-30", "2026-13-01", "2026-09-14 25:00", "yesterday", "2027-01-01"])(
    "refuses “%s” in words",
    (text) => {
      expect(parseTaken(text, NOW)).toEqual({ problem: expect.stringContaining(text) });
    },
  );
});

describe("safePath", () => {
  it.each([
    "../a.csv",
    "x/../../a.csv",
    "/etc/a.csv",
    "C:\\a.csv",
    "c:/a.csv",
    "..\\a.csv",
    "x\\..\\a.csv",
    "",
    ".",
  ])("refuses “%s”", (name) => expect(safePath(name)).toHaveProperty("refused"));
  it("tidies the others, and knows what systems leave behind", () => {
    expect(safePath("./wet//a..b.csv")).toEqual({ path: "wet/a..b.csv" });
    expect(["__MACOSX/a.csv", "x/.DS_Store", "Thumbs.db"].map(isOfSystem)).toEqual([true, true, true]);
    expect(isOfSystem("x/a.csv")).toBe(false);
  });
});

describe("matchRows", () => {
  const files = [file("wet/a.csv"), file("dry/a.csv"), file("dry/B.csv")];
  const row = (name: string) => ({
    line: 2,
    file: name,
    wanted: { title: "", takenAt: "", bench: "", step: "" },
  });
  it("finds a file by its path or by its last part where that is one, whatever its capitals", () => {
    const found = matchRows(files, [row("dry/a.csv"), row("b.csv"), row("a.csv"), row("c.csv")]);
    expect(found.map(({ name, file, line }) => [name, file, line])).toEqual([
      ["dry/a.csv", 1, 2],
      ["b.csv", 2, 2],
      ["a.csv", null, 2],
      ["c.csv", null, 2],
      ["wet/a.csv", 0, null],
    ]);
  });
  it("finds a name with an accent however its system spells that", () => {
    const table = readTable(bytes("file,title\nGr\u00f6\u00dfe.csv,x")).rows;
    expect(matchRows([file("night/Gro\u0308\u00dfe.csv")], table).map(({ file }) => file)).toEqual([0]);
  });

  it("gives a file that comes later to the row that waits for it", () => {
    const rows = matchRows(files, [row("late.csv")]);
    const again = matchAgain({ files: [...files, file("late.csv")], rows });
    expect(again.map(({ file }) => file)).toEqual([3, 0, 1, 2]);
  });
});

describe("problemsOf", () => {
  const named: Named = {
    benches: [
      { publicId: "bench1", name: "Club bridge" },
      { publicId: "bench2", name: "Twin" },
      { publicId: "bench3", name: "twin" },
    ],
    steps: [
      { publicId: "step1", title: "Choke added", state: "done" },
      { publicId: "step2", title: "Radials", state: "planned" },
    ],
  };
  const codes = (text: string, files: BatchFile[]) => {
    const rows = matchRows(files, readTable(bytes(text)).rows);
    return problemsOf({ ...EMPTY_REPORT, files, rows }, named, NOW).map((found) =>
      found.map(({ code }) => code),
    );
  };
  it("finds nothing against a row that says all of it rightly", () => {
    expect(
      codes("file,title,taken at,bench,step\na.csv,A,2026-09-14,club bridge,Choke added", [file("a.csv")]),
    ).toEqual([[]]);
  });
  it("names what stands in the way, several things at once", () => {
    const table = [
      "file,title,taken at,bench,step",
      `gone.csv,${"x".repeat(161)},30.2.2026,Nobody's,None`,
      "a.csv,,,Twin,Radials",
      "a.csv,,,,",
      "b.csv,,,bench1,step1",
      "c.csv,,,,Choke added",
    ].join("\n");
    const files = [file("a.csv"), file("b.csv"), file("c.csv", "b.csv")];
    expect(codes(table, files)).toEqual([
      ["missing-file", "long-title", "bad-date", "unknown-bench", "unknown-step"],
      ["unknown-bench", "planned-step"],
      ["same-file"],
      [],
      ["same-bytes", "same-step"],
    ]);
  });
  it("says where a file can't be read, unless it is to be kept unread", () => {
    const check: FileCheck = {
      bench: "",
      kind: "unreadable",
      words: "“x” is no number.",
      line: 14,
      column: 3,
      keepable: true,
    };
    const files = [file("a.csv", "a", check)];
    const [row] = matchRows(files, []);
    const of = (keepUnread: boolean) =>
      problemsOf({ ...EMPTY_REPORT, files, rows: [{ ...row, keepUnread }] }, named, NOW)[0];
    expect(of(false)).toEqual([{ code: "unreadable", words: "Line 14, column 3: “x” is no number." }]);
    expect(of(true)).toEqual([]);
  });
});
