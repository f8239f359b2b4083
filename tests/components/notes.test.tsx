import { createContext, type ReactNode, useContext } from "react";
import { renderToString } from "react-dom/server";
import { createRoutesStub } from "react-router";
import { describe, expect, it } from "vitest";
import { writeNoteSchema } from "../../app/components/notes/notes.schema.ts";
import { Thread, type ThreadProps } from "../../app/components/notes/Thread.tsx";
import { VerdictForm, type VerdictFormProps } from "../../app/components/notes/VerdictForm.tsx";
import { verdictSchema } from "../../app/components/notes/verdict.schema.ts";
import { MAX_NOTE_CHARACTERS, MAX_VERDICT_CHARACTERS } from "../../app/services/note-limits.ts";
import type { ThreadNote } from "../../app/services/note-thread.server.ts";

const Shown = createContext<ReactNode>(null);
const Page = createRoutesStub([{ path: "*", Component: Body }]);

function Body() {
  return useContext(Shown);
}

function draw(shown: ReactNode): string {
  const page = (
    <Shown value={shown}>
      <Page initialEntries={["/projects/p1/dips/d1?x=1"]} />
    </Shown>
  );
  return renderToString(page).replaceAll("<!-- -->", "");
}

function drawThread(props: Partial<ThreadProps>): string {
  return draw(<Thread projectId="p1" place={{ dip: "d1" }} thread={[]} mayWrite {...props} />);
}

function note(publicId: string, more: Partial<ThreadNote> = {}): ThreadNote {
  return {
    publicId,
    author: { name: "Ada", userName: "ada" },
    createdAt: new Date("2026-03-07T12:00:00Z"),
    editedAt: null,
    removed: false,
    html: `<p>said ${publicId}</p>`,
    body: null,
    mayEdit: false,
    mayRemove: false,
    mayRestore: false,
    part: null,
    folded: false,
    mayReport: false,
    revision: "2026-03-07T12:00:00.000Z",
    answers: null,
    replies: [],
    ...more,
  };
}

describe("a thread without scripts", () => {
  it("says that it is empty, and takes the first note", () => {
    const markup = drawThread({});
    expect(markup).toContain("Nobody has said anything here yet");
    expect(markup).toContain('action="/projects/p1/notes"');
    expect(markup).toContain('<input type="hidden" name="dip" value="d1"/>');
    expect(markup).toContain('<input type="hidden" name="returnTo" value="/projects/p1/dips/d1?x=1"/>');
    expect(markup).toContain(`maxLength="${MAX_NOTE_CHARACTERS}"`);
  });

  it("gives each note its anchor, its time in UTC, and what answers it", () => {
    const reply = note("n2", { answers: { publicId: "n9", author: "Bram" } });
    const markup = drawThread({ thread: [note("n1", { replies: [reply] })] });
    expect(markup).toContain('id="note-n1"');
    expect(markup).toContain('href="#note-n1"');
    expect(markup).toContain('title="7 Mar 2026, 12:00 UTC"');
    expect(markup).toContain('aria-label="Answers to Ada"');
    expect(markup).toContain('<a href="#note-n9" class="text-small">in answer to Bram</a>');
    expect(markup.indexOf("said n1")).toBeLessThan(markup.indexOf("said n2"));
  });

  it("answers, changes and removes by plain forms", () => {
    const markup = drawThread({
      thread: [note("n1", { mayEdit: true, mayRemove: true, body: "as *written*" })],
    });
    expect(markup).toContain('<input type="hidden" name="parent" value="n1"/>');
    expect(markup).toContain('action="/projects/p1/notes/n1"');
    expect(markup).toContain('<input type="hidden" name="intent" value="edit"/>');
    expect(markup).toContain('<input type="hidden" name="intent" value="remove"/>');
    expect(markup).toContain(">as *written*</textarea>");
  });

  it("offers nothing to who may not write", () => {
    const markup = drawThread({ thread: [note("n1")], mayWrite: false });
    expect(markup).not.toContain("<form");
    expect(markup).toContain("/sign-in?next=%2Fprojects%2Fp1%2Fdips%2Fd1%3Fx%3D1");
  });

  it("keeps the place of a removed note without its words", () => {
    const markup = drawThread({ thread: [note("n1", { removed: true, html: "", replies: [note("n2")] })] });
    expect(markup).toContain("This note was removed");
    expect(markup).toContain("said n2");
  });
});

describe("a verdict without scripts", () => {
  const drawVerdict = (props: Partial<VerdictFormProps>) => {
    const all: VerdictFormProps = {
      projectId: "p1",
      dipId: "d1",
      verdict: "open",
      verdictText: "",
      verdictBy: null,
      may: { propose: true, settle: false },
      ...props,
    };
    return draw(<VerdictForm {...all} />);
  };
  const buttons = (markup: string) =>
    ["propose", "settle", "reopen"].filter((intent) => markup.includes(`value="${intent}"`));

  it.each([
    ["open", { propose: true, settle: false }, ["propose"]],
    ["open", { propose: true, settle: true }, ["propose", "settle"]],
    ["proposed", { propose: true, settle: true }, ["propose", "settle", "reopen"]],
    ["proposed", { propose: true, settle: false }, ["propose"]],
    ["settled", { propose: true, settle: true }, ["reopen"]],
    ["settled", { propose: true, settle: false }, []],
    ["open", { propose: false, settle: false }, []],
  ] as const)("%s, with %j, offers %j", (verdict, may, offered) => {
    expect(buttons(drawVerdict({ verdict, may }))).toEqual(offered);
  });

  it("says what it is and by whom", () => {
    const markup = drawVerdict({ verdict: "settled", verdictText: "the braid", verdictBy: "Ada" });
    expect(markup).toContain("Settled by Ada");
    expect(markup).toContain("the braid");
    expect(drawVerdict({ verdictText: "it came back", verdictBy: null })).toContain(
      "Opened again by a former member",
    );
  });
});

describe("the forms' schemas", () => {
  const body = (text: unknown) => writeNoteSchema.safeParse({ body: text });

  it("count line ends as a text field does", () => {
    const lines = "x\r\n".repeat(MAX_NOTE_CHARACTERS / 2);
    expect(body(lines).success).toBe(true);
    expect(body(`${lines}x`).success).toBe(false);
  });

  it.each([undefined, "", " \r\n "])("refuse %j with words", (text) => {
    expect(body(text).error?.issues[0].message).toBe("Write something first.");
  });

  it("take public ids only", () => {
    expect(writeNoteSchema.safeParse({ body: "x", dip: "../x" }).success).toBe(false);
    expect(writeNoteSchema.safeParse({ body: "x", dip: "57baagk4hz" }).success).toBe(true);
  });

  it("want a reason for every verdict, of bounded length", () => {
    const verdict = (text: string) =>
      verdictSchema.safeParse({ intent: "settle", was: "open", text }).success;
    expect([
      verdict(""),
      verdict("  "),
      verdict("so"),
      verdict("x".repeat(MAX_VERDICT_CHARACTERS + 1)),
    ]).toEqual([false, false, true, false]);
  });
});
