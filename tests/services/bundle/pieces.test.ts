import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { Sweep } from "~/measurement/sweep";
import { rangeOf } from "~/routes/bundle/send-bundle.server";
import { readBagInfo, readManifest } from "~/services/bundle/bag";
import { LineTooLong, linesOf } from "~/services/bundle/lines";
import { fileOfForm } from "~/services/bundle/multipart";
import { rewriteJson, rewriteText } from "~/services/bundle/new-ids.server";
import { nameOfPerson, placeholderOf } from "~/services/bundle/placeholders";
import { fileName } from "~/services/bundle/plan";
import { pointsFromCsv, pointsToCsv } from "~/services/bundle/points-csv";
import { threadMarkdown } from "~/services/bundle/threads";
import { encodePoints } from "~/services/points.server";

async function* chunked(text: string | Uint8Array, size: number): AsyncGenerator<Uint8Array> {
  const bytes = Buffer.from(text as string);
  for (let i = 0; i < bytes.length; i += size) yield new Uint8Array(bytes.subarray(i, i + size));
}

describe("points as CSV", () => {
  const values = fc.double({ noNaN: false });
  it("come back bit for bit, gaps and signs of zero too", async () => {
    await fc.assert(
      fc.asyncProperty(
        fc.array(fc.tuple(fc.double({ min: 1, max: 1e4, noNaN: true }), values, values, values), {
          minLength: 1,
          maxLength: 30,
        }),
        fc.boolean(),
        async (points, complex) => {
          let hz = 0;
          const sweep: Sweep = {
            frequencyHz: Float64Array.from(points, ([step]) => (hz += step)),
            magnitude: Float64Array.from(points, ([, magnitude]) => magnitude),
            referenceOhm: 50,
            plane: "instrument",
          };
          if (complex) {
            sweep.gammaRe = Float64Array.from(points, ([, , re]) => re);
            sweep.gammaIm = Float64Array.from(points, ([, , , im]) => im);
          }
          const text = [...pointsToCsv(sweep)].join("");
          const back = await pointsFromCsv(linesOf(chunked(text, 7)), 50);
          expect(Buffer.concat(encodePoints(back)).equals(Buffer.concat(encodePoints(sweep)))).toBe(true);
        },
      ),
      { numRuns: 50 },
    );
  });

  it.each([
    ["frequency_hz,gamma_magnitude\r\n2,0.5\r\n1,0.5\r\n", "line 3"],
    ["frequency_hz,gamma_magnitude\r\n1,zero\r\n", "line 2"],
    ["frequency_hz,gamma_magnitude\r\n1\r\n", "line 2"],
    ["frequency_hz,swr\r\n1,2\r\n", "gamma_magnitude"],
    ["frequency_hz,gamma_magnitude\r\n1, \r\n", "line 2"],
    ["frequency_hz,gamma_magnitude\r\n1,0x1\r\n", "line 2"],
    ["frequency_hz,gamma_magnitude\r\nInfinity,0.5\r\n", "line 2"],
    ["frequency_hz,frequency_hz,gamma_magnitude\r\n1,2,0.5\r\n", "two columns"],
    ["frequency_hz,gamma_magnitude\r\n", "no points"],
  ])("are refused with the place: %j", async (text, where) => {
    await expect(pointsFromCsv(linesOf(chunked(text, 100)), 50)).rejects.toThrow(where);
  });
});

describe("a form that is read as a stream", () => {
  const form = (name: string, body: string) =>
    `--b1\r\nContent-Disposition: form-data; name="x"\r\n\r\nfield\r\n--b1\r\nContent-Disposition: form-data; name="bundle"; filename="${name}"\r\nContent-Type: application/zip\r\n\r\n${body}\r\n--b1--\r\n`;
  it.each([1, 3, 10, 1000])("gives the file, cut in pieces of %d", async (size) => {
    const body = "PK\r\n--b\r\n--b0 no end\r\n";
    const file = await fileOfForm(chunked(form("a.zip", body), size), "multipart/form-data; boundary=b1");
    const got: Buffer[] = [];
    for await (const piece of file?.bytes ?? []) got.push(Buffer.from(piece));
    expect(Buffer.concat(got).toString()).toBe(body);
    expect(file?.name).toBe("a.zip");
  });
  it("throws where it is cut short", async () => {
    const file = await fileOfForm(
      chunked(form("a.zip", "PK").slice(0, -12), 5),
      "multipart/form-data; boundary=b1",
    );
    await expect(async () => {
      for await (const _ of file?.bytes ?? []);
    }).rejects.toThrow("cut short");
  });
  it.each([
    [form("", ""), "multipart/form-data; boundary=b1"],
    ["", "multipart/form-data; boundary=b1"],
    ["x", "text/plain"],
  ])("finds no file in %j", async (body, type) => {
    expect(await fileOfForm(chunked(body, 9), type)).toBeNull();
  });
});

describe("ids that were taken", () => {
  const changed = new Map([
    ["k3fk3fk3fk", "new1"],
    ["aaaaaaaaaa", "new2"],
  ]);
  it("are changed where a text names something of ours, and nowhere else", () => {
    const text =
      "See [7 MHz](dip:k3fk3fk3fk), #compare:aaaaaaaaaa,k3fk3fk3fk, [there](/projects/aaaaaaaaaa/dips/k3fk3fk3fk), [more](/write-ups/aaaaaaaaaa), https://swale.example/plates/k3fk3fk3fk and k3fk3fk3fk.";
    expect(rewriteText(text, changed)).toBe(
      "See [7 MHz](dip:new1), #compare:new2,new1, [there](/projects/new2/dips/new1), [more](/write-ups/new2), https://swale.example/plates/k3fk3fk3fk and k3fk3fk3fk.",
    );
  });
  it("are changed in JSON where a value is one", () => {
    const value = { dip: "k3fk3fk3fk", title: "of k3fk3fk3fk", list: [{ id: "aaaaaaaaaa" }, null, 3] };
    expect(rewriteJson(value, changed)).toEqual({
      dip: "new1",
      title: "of k3fk3fk3fk",
      list: [{ id: "new2" }, null, 3],
    });
  });
});

describe("small pieces", () => {
  it("mark persons once and read them back", () => {
    const kept = placeholderOf("Ada Marsh", "xyz");
    expect(kept.name).toBe("Ada Marsh (from a bundle)");
    expect(nameOfPerson(kept)).toBe("Ada Marsh");
    expect(nameOfPerson({ name: "Ada (from a bundle)", userName: "ada" })).toBe("Ada (from a bundle)");
    expect(placeholderOf("x".repeat(200), "y").name.length).toBe(120);
  });
  it.each([
    ["../../etc/passwd", "id-etc-passwd"],
    ["schön ⚙ 1.s1p", "id-scho-n-1.s1p"],
    ["", "id-file"],
    ["con.txt", "id-con.txt"],
  ])("make %j a name that every system takes", (name, wanted) => {
    expect(fileName("id", name)).toBe(wanted);
  });
  it("give a long line that came in many pieces, and break off where it is too long", async () => {
    const lines = [];
    for await (const line of linesOf(chunked(`${"a".repeat(1000)}\r\n\né\r\nb`, 1))) lines.push(line);
    expect(lines).toEqual(["a".repeat(1000), "", "é", "b"]);
    const endless = linesOf(chunked("a".repeat(1000), 10), 500)[Symbol.asyncIterator]();
    await expect(endless.next()).rejects.toThrow(LineTooLong);
  });
  it("put answers behind what they answer, however long the chain", () => {
    const note = (id: number, parent: number | null) => ({
      id: String(id),
      parent: parent === null ? null : String(parent),
      author: "Ada",
      at: new Date(0),
      edited: false,
      removed: false,
      body: `said ${id}`,
    });
    const few = threadMarkdown("x", [note(1, null), note(2, null), note(3, 1), note(4, 3), note(5, 1)]);
    expect(few.match(/said \d/g)).toEqual(["said 1", "said 3", "said 4", "said 5", "said 2"]);
    const chain = Array.from({ length: 20_000 }, (_, i) => note(i, i === 0 ? null : i - 1));
    expect(threadMarkdown("x", chain).match(/said \d+/g)).toHaveLength(20_000);
  });
  it("don't take long over a manifest that nearly is one", () => {
    const sum = "0".repeat(64);
    // Twice the length took four times as long: 200,000 spaces half a minute.
    expect(readManifest(`${sum}${" ".repeat(200_000)}a\u2028`)?.size).toBe(1);
    expect(readManifest(`${sum}${" ".repeat(200_000)}\n`)).toBeNull();
  });
  it("read manifests and refuse what is none", () => {
    const sum = "a".repeat(64);
    expect(readManifest(`${sum}  data/a b.txt\r\n${sum} *data/c%0Ad\n`)).toEqual(
      new Map([
        ["data/a b.txt", sum],
        ["data/c\nd", sum],
      ]),
    );
    expect(readManifest(`${sum}  data/a\n${sum}  data/a\n`)).toBeNull();
    expect(readManifest("hello\n")).toBeNull();
    expect(readBagInfo("A-b: c\n  d\nE: f\n").get("a-b")).toBe("c d");
  });
  it.each([
    [{ Range: "bytes=0-9" }, [0, 9]],
    [{ Range: "bytes=90-" }, [90, 99]],
    [{ Range: "bytes=-10" }, [90, 99]],
    [{ Range: "bytes=50-500" }, [50, 99]],
    [{ Range: "bytes=100-" }, "none"],
    [{ Range: "bytes=0-1,5-6" }, null],
    [{ Range: "bytes=0-9", "If-Range": '"old"' }, null],
    [{ Range: "bytes=0-9", "If-Range": '"tag"' }, [0, 9]],
    [{}, null],
  ])("answer %j of 100 bytes with %j", (headers, wanted) => {
    const request = new Request("http://localhost/", { headers: headers as Record<string, string> });
    expect(rangeOf(request, '"tag"', 100)).toEqual(wanted);
  });
});
