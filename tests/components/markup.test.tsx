import { createContext, type ReactNode, useContext } from "react";
import { renderToString } from "react-dom/server";
import { createRoutesStub } from "react-router";
import { describe, expect, it } from "vitest";
import { ErrorPage } from "../../app/components/ErrorPage.tsx";
import { Footer } from "../../app/components/Footer.tsx";
import { Header } from "../../app/components/Header.tsx";
import { Button } from "../../app/components/ui/Button.tsx";
import { Dialog } from "../../app/components/ui/Dialog.tsx";
import { EmptyState } from "../../app/components/ui/EmptyState.tsx";
import { CheckboxField, InputField, SelectField, TextareaField } from "../../app/components/ui/Field.tsx";
import { Table } from "../../app/components/ui/Table.tsx";
import { ToastProvider } from "../../app/components/ui/Toast.tsx";

const Shown = createContext<ReactNode>(null);
const Page = createRoutesStub([{ path: "*", Component: Body }]);

function Body() {
  return useContext(Shown);
}

function draw(node: ReactNode, at = "/"): string {
  const page = (
    <Shown value={node}>
      <Page initialEntries={[at]} />
    </Shown>
  );
  return renderToString(page).replaceAll("<!-- -->", "");
}

describe("fields without scripts", () => {
  it("tie label, hint and error to their control", () => {
    const errors = ["Write a title."];
    for (const Field of [InputField, TextareaField, CheckboxField]) {
      const markup = draw(<Field label="Title" hint="Short." errors={errors} id="f1" name="title" />);
      expect(markup).toContain('<label for="f1">Title</label>');
      expect(markup).toContain('aria-describedby="f1-description f1-error"');
      expect(markup).toContain('aria-invalid="true"');
      expect(markup).toContain('id="f1-error"');
    }
  });

  it("say nothing of errors where there are none", () => {
    const markup = draw(<InputField label="Title" name="title" errors={[]} />);
    expect(markup).not.toContain("aria-invalid");
    expect(markup).not.toContain("aria-describedby");
    expect(markup).toMatch(/<label for="([^"]+)">.*<input[^>]*id="\1"/);
  });

  it("keep the chosen option", () => {
    const options = [
      { value: "rl", label: "Return loss" },
      { value: "swr", label: "SWR" },
    ];
    const markup = draw(<SelectField label="Curve" name="curve" defaultValue="swr" options={options} />);
    expect(markup).toContain('<option value="swr" selected="">SWR</option>');
  });
});

describe("Table", () => {
  const columns = [
    {
      key: "frequency",
      label: "Frequency",
      sortBy: (row: number) => row,
      cell: (row: number) => `${row} MHz`,
    },
    { key: "verdict", label: "Verdict", cell: () => "open" },
  ];

  it("sorts by the address with plain links that keep the rest of it", () => {
    const table = (
      <Table
        caption="Dips"
        columns={columns}
        rows={[3, 1, 2]}
        rowKey={String}
        sort={{ key: "frequency", direction: "ascending" }}
      />
    );
    const markup = draw(table, "/x?view=swr&sort=frequency");
    expect(markup).toContain('href="/x?view=swr&amp;sort=-frequency"');
    expect(markup).toContain('aria-sort="ascending"');
    expect([...markup.matchAll(/(\d) MHz/g)].map((match) => match[1])).toEqual(["1", "2", "3"]);
    expect(markup.match(/sort-link/g)).toHaveLength(1);
  });

  it("puts a second line under the first, with a head that sorts by it", () => {
    const under = {
      key: "depth",
      label: "Depth",
      sortBy: (row: number) => -row,
      cell: (row: number) => `${row} dB`,
    };
    const markup = draw(
      <Table
        caption="Dips"
        columns={columns.map((column) => (column.key === "frequency" ? { ...column, under } : column))}
        rows={[1, 3, 2]}
        rowKey={String}
        sort={{ key: "depth", direction: "ascending" }}
      />,
      "/x?sort=depth",
    );
    expect(markup).toContain('href="/x?sort=-depth"');
    expect(markup).toContain('href="/x?sort=frequency"');
    expect(markup.match(/aria-sort/g)).toHaveLength(1);
    expect([...markup.matchAll(/(\d) dB/g)].map((match) => match[1])).toEqual(["3", "2", "1"]);
  });
});

describe("the shell without scripts", () => {
  it("offers a visitor to sign in and the three choices of colours, as forms", () => {
    const markup = draw(<Header person={null} theme="dark" />, "/projects?page=2");
    expect(markup).toContain('href="/sign-in"');
    expect(markup).toMatch(
      /<form[^>]*method="post"[^>]*action="\/theme"|<form[^>]*action="\/theme"[^>]*method="post"/,
    );
    expect(markup).toContain('name="returnTo" value="/projects?page=2"');
    expect(markup).toContain('value="dark" aria-pressed="true"');
  });

  it("offers a person their settings and to sign out; administration to administrators only", () => {
    const person = { name: "Ada Marsh", userName: "ada" };
    const markup = draw(<Header person={person} theme="system" />);
    expect(markup).toContain("Ada Marsh");
    expect(markup).toContain('action="/sign-out"');
    expect(markup).not.toContain('href="/admin"');
    expect(draw(<Header person={{ ...person, administrator: true }} theme="system" />)).toContain(
      'href="/admin"',
    );
  });

  it("says the cautions at the foot", () => {
    expect(draw(<Footer />)).toContain("a dip outside your bands is a finding, not a permission");
  });

  it("shows a message kept across a redirect", () => {
    const markup = draw(
      <ToastProvider flash={{ id: "1", text: "Kept." }}>
        <p>Page</p>
      </ToastProvider>,
    );
    expect(markup).toMatch(/role="status"[^>]*>.*Kept\./);
  });
});

describe("a dialog without scripts", () => {
  it("unfolds its question under its label", () => {
    const markup = draw(
      <Dialog label="Delete" variant="danger" title="Delete this sweep?">
        <Button variant="danger">Delete it</Button>
      </Dialog>,
    );
    expect(markup).toMatch(/<details[^>]*><summary[^>]*>Delete<\/summary>/);
    expect(markup).toContain("Delete this sweep?");
  });
});

describe("ErrorPage", () => {
  const response = (status: number, data: unknown = "") => ({
    status,
    statusText: "",
    internal: false,
    data,
  });

  it("says what happened and what to do, for each kind", () => {
    expect(draw(<ErrorPage error={response(404)} />)).toContain("There is nothing at this address");
    expect(draw(<ErrorPage error={response(403)} />)).toContain("You may not do that here");
    expect(draw(<ErrorPage error={response(418)} />)).toContain("could not be understood");
    expect(draw(<ErrorPage error={response(503)} />)).toContain("Something went wrong on our side");
  });

  it("passes on what a page said to a person, but nothing of a fault inside", () => {
    expect(draw(<ErrorPage error={response(403, "Sign in first.")} />)).toContain("Sign in first.");
    const inside = draw(<ErrorPage error={new Error("password=hunter2")} />);
    expect(inside).not.toContain("hunter2");
    expect(inside).toContain("500");
  });
});

describe("EmptyState", () => {
  it("shows a drawing, a title and the next action", () => {
    const markup = draw(
      <EmptyState drawing="notes" title="No notes yet" action={<Button>Write one</Button>} />,
    );
    expect(markup).toContain("<svg");
    expect(markup).toContain("Write one");
  });
});
