import { renderToString } from "react-dom/server";
import { createRoutesStub } from "react-router";
import { describe, expect, it } from "vitest";
import { EditConflict } from "../../../app/components/edit-conflict/EditConflict.tsx";

const conflict = {
  asked: [{ name: "title", mine: "The tall pole", theirs: "The <b>short</b> pole" }],
  rest: { takenAt: "2026-05-01T10:00" },
  was: '{"title":"The <b>short</b> pole"}',
};

function Body() {
  return <EditConflict intent="edit" conflict={conflict} labels={{ title: "Title" }} />;
}

describe("the question to the later of two", () => {
  const Page = createRoutesStub([{ path: "*", Component: Body }]);
  const html = renderToString(<Page initialEntries={["/"]} />);

  it("is a whole form without scripts: both values to choose from, mine chosen, the rest along", () => {
    expect(html).toMatch(/<form[^>]*method="post"/);
    expect(html).toContain('type="radio" name="title" checked="" value="The tall pole"');
    expect(html).toContain('type="radio" name="title" value="The &lt;b&gt;short&lt;/b&gt; pole"');
    expect(html).toContain('type="hidden" name="takenAt" value="2026-05-01T10:00"');
    expect(html).toContain('name="intent" value="edit"');
  });

  it("marks what only one of them says, and runs nothing of it", () => {
    expect(html).toContain('<mark class="own-words">tall </mark>');
    expect(html).toContain("&lt;b&gt;short&lt;/b&gt; </mark>");
    expect(html).not.toContain("<b>");
  });
});
