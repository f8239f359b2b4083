import { execFileSync } from "node:child_process";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { afterAll, describe, expect, it } from "vitest";
import { writeDirectory, writeEntry, type ZipState } from "~/services/bundle/zip-writer";

/** Read back by Python's zipfile, an implementation of its own. */
const folder = mkdtempSync(path.join(tmpdir(), "zip-writer-"));
afterAll(() => rmSync(folder, { recursive: true, force: true }));
const at = new Date("2026-05-03T10:20:30Z");

function readBack(bytes: Buffer): Record<string, { text: string; packed: boolean; at: number[] }> {
  const file = path.join(folder, "t.zip");
  writeFileSync(file, bytes);
  const code = `
import json, sys, zipfile
z = zipfile.ZipFile(sys.argv[1])
assert z.testzip() is None
print(json.dumps({i.filename: {"text": z.read(i).decode()[:50], "packed": i.compress_type == 8, "at": list(i.date_time)} for i in z.infolist()}))`;
  return JSON.parse(
    execFileSync("/usr/bin/python3", ["-c", code, file], { encoding: "utf8", maxBuffer: 2 ** 28 }),
  );
}

async function written(entries: [string, string, boolean][], state: ZipState = { offset: 0, entries: [] }) {
  const chunks: Buffer[] = [];
  const sink = async (bytes: Buffer) => void chunks.push(Buffer.from(bytes));
  for (const [name, text, packed] of entries) {
    await writeEntry(state, { path: name, packed, at }, [Buffer.from(text)], sink);
  }
  await writeDirectory(state, at, sink);
  return Buffer.concat(chunks);
}

describe("a ZIP", () => {
  it("is read by another implementation, packed or not, empty or not, with names beyond ASCII", async () => {
    const back = readBack(
      await written([
        ["a/empty.txt", "", true],
        ["a/stored", "as it is", false],
        ["a/schön ⚙.txt", "x".repeat(100_000), true],
      ]),
    );
    expect(back["a/empty.txt"].text).toBe("");
    expect(back["a/stored"]).toEqual({ text: "as it is", packed: false, at: [2026, 5, 3, 10, 20, 30] });
    expect(back["a/schön ⚙.txt"].packed).toBe(true);
  });

  it("goes on from its state in another process", async () => {
    const first: Buffer[] = [];
    const state: ZipState = { offset: 0, entries: [] };
    const sink = async (bytes: Buffer) => void first.push(Buffer.from(bytes));
    await writeEntry(state, { path: "one", packed: true, at }, [Buffer.from("1")], sink);
    const rest = await written([["two", "2", true]], JSON.parse(JSON.stringify(state)));
    expect(Object.keys(readBack(Buffer.concat([...first, rest])))).toEqual(["one", "two"]);
  });

  it("has more entries than 16 bits count", async () => {
    const chunks: Buffer[] = [];
    const sink = async (bytes: Buffer) => void chunks.push(Buffer.from(bytes));
    const state: ZipState = { offset: 0, entries: [] };
    await writeEntry(state, { path: "0", packed: false, at }, [Buffer.from("x")], sink);
    // The list alone: all of them are the same bytes.
    state.entries = Array.from({ length: 66_000 }, (_, i) => ({ ...state.entries[0], path: `${i}` }));
    await writeDirectory(state, at, sink);
    const file = path.join(folder, "many.zip");
    writeFileSync(file, Buffer.concat(chunks));
    const code = "import sys, zipfile; print(len(zipfile.ZipFile(sys.argv[1]).infolist()))";
    expect(execFileSync("/usr/bin/python3", ["-c", code, file], { encoding: "utf8" }).trim()).toBe("66000");
  });

  it("lists an entry that begins beyond 4 GB", async () => {
    // Only the list is looked at: what lies before is not made.
    const state: ZipState = { offset: 5 * 2 ** 30, entries: [] };
    const chunks: Buffer[] = [];
    const sink = async (bytes: Buffer) => void chunks.push(Buffer.from(bytes));
    await writeEntry(state, { path: "far", packed: false, at }, [Buffer.from("away")], sink);
    const start = state.offset;
    await writeDirectory(state, at, sink);
    const all = Buffer.concat(chunks);
    const list = all.subarray(start - 5 * 2 ** 30);
    expect(list.readUInt32LE(42)).toBe(0xffffffff);
    expect(list.readBigUInt64LE(46 + 3 + 4)).toBe(BigInt(5 * 2 ** 30));
    expect(list.includes(Buffer.from([0x50, 0x4b, 6, 6]))).toBe(true);
  });

  it("fails where its source fails", async () => {
    const bad = (async function* () {
      yield Buffer.from("1");
      throw new Error("The source broke.");
    })();
    const state: ZipState = { offset: 0, entries: [] };
    await expect(writeEntry(state, { path: "x", packed: true, at }, bad, async () => {})).rejects.toThrow(
      "broke",
    );
    expect(state.entries).toEqual([]);
  });
});
