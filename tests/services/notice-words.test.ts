import { describe, expect, test } from "vitest";
import { noticePath, noticeWords } from "~/services/notice-words";

const about = { plate: "p1", sweep: "s1", title: "Plate 3: Before the choke" };

describe("a notice of a plate", () => {
  test("says what became of it, and leads to it and not to its sweep", () => {
    const words = (kind: string) => noticeWords({ reason: "follow", kind, about, actor: "Ada Marsh" });
    expect(words("plate.made")).toBe("Ada Marsh made Plate 3: Before the choke");
    expect(words("plate.mended")).toBe("Ada Marsh mended Plate 3: Before the choke");
    expect(words("plate.withdrawn")).toBe("Ada Marsh withdrew Plate 3: Before the choke");
    expect(noticePath("project", about)).toBe("/plates/p1");
  });
});
