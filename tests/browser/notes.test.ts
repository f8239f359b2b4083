import type { Browser, Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { EVASIONS, MARKDOWN_EVASIONS } from "../fixtures/hostile/evasions.ts";
import { launch, newcomer, newProject, settled, signIn, type Visitor, visit } from "./browser.ts";

let browser: Browser;
beforeAll(async () => {
  browser = await launch();
});
afterAll(() => browser.close());

/** A project of somebody's own, open on its page. */
async function begin({ page }: Visitor, login: string, title: string): Promise<string> {
  await signIn(page, login);
  const path = await newProject(page, title);
  await settled(page);
  return path;
}

const fieldOf = (page: Page) => page.getByLabel("Write a note on the project");
const store = (page: Page) => page.getByRole("button", { name: "Store the note" }).last().click();

describe("a note that is being written", () => {
  it("survives a reload, an expired session and a lost connection, and is stored once", async () => {
    const visitor = await visit(browser);
    const { page, context } = visitor;
    const login = newcomer("drafts");
    const path = await begin(visitor, login, "Drafts");
    await fieldOf(page).fill("begun before the reload");
    await page.reload();
    await settled(page);
    await expect.poll(() => fieldOf(page).inputValue(), PATIENT).toBe("begun before the reload");

    await fieldOf(page).fill("written while signed out");
    await context.clearCookies();
    await store(page);
    await page.getByRole("link", { name: "Sign in again and come back here" }).click();
    await page.getByRole("button", { name: "Sign in with" }).click();
    await page.getByRole("button", { name: `(${login})` }).click();
    await page.waitForURL(`**${path}*`);
    await settled(page);
    await expect.poll(() => fieldOf(page).inputValue(), PATIENT).toBe("written while signed out");
    await store(page);
    await page.getByRole("article").getByText("written while signed out").waitFor();

    await fieldOf(page).fill("written without a connection");
    await context.setOffline(true);
    await store(page);
    await page.getByText("sent by itself, once").waitFor();
    expect(await fieldOf(page).inputValue()).toBe("written without a connection");
    await context.setOffline(false);
    await page.getByRole("article").getByText("written without a connection").waitFor();
    expect(await page.getByRole("article").count()).toBe(2);
    await expect.poll(() => fieldOf(page).inputValue(), PATIENT).toBe("");
    await context.close();
  });

  it("is brought back for ten seconds after it was removed", async () => {
    const visitor = await visit(browser);
    const { page, context } = visitor;
    await begin(visitor, newcomer("undo"), "Undone");
    await fieldOf(page).fill("taken back");
    await store(page);
    const note = page.getByRole("article").getByText("taken back");
    await note.waitFor();
    await page.getByText("Remove your note").click();
    await page.getByRole("button", { name: "Remove the note" }).click();
    await page.getByRole("button", { name: "Undo" }).click();
    await note.waitFor();
    await context.close();
  });
});

describe("nothing that a person gives runs", () => {
  it("in notes, names, titles and file names", async () => {
    const visitor = await visit(browser);
    const { page, context, complaints } = visitor;
    const ran: string[] = [];
    await page.exposeFunction("told", (what: string) => ran.push(what));
    await context.addInitScript(() => {
      for (const name of ["alert", "prompt", "confirm", "print"] as const) {
        window[name] = (() => (window as unknown as { told: (what: string) => void }).told(name)) as never;
      }
    });
    page.on("dialog", (dialog) => {
      ran.push(dialog.message());
      void dialog.dismiss();
    });
    page.on("request", (request) => {
      if (request.url().includes("fennmarsh.example")) ran.push(request.url());
    });
    const hostile = '"><img src=x onerror=alert(1)><svg/onload=alert(2)>';
    const path = await begin(visitor, newcomer("hostile"), `Title ${hostile}`);
    const texts = [...EVASIONS.map(([, text]) => text.replaceAll("\u0000", "")), ...MARKDOWN_EVASIONS];
    const own = "form:has(textarea[name=body]) input[type=file]";
    const file = { name: "x<img src=x onerror=alert(3)>.s1p", mimeType: "text/plain" };
    await page
      .locator(own)
      .setInputFiles({ ...file, buffer: Buffer.from("# MHz S RI R 50\n7 0 0\n8 0 0\n") });
    await expect.poll(() => fieldOf(page).inputValue(), PATIENT).toContain("attachment:");
    const attached = await fieldOf(page).inputValue();
    await fieldOf(page).fill(`${attached}\n\n${texts.join("\n\n")}`);
    await page.getByRole("button", { name: "Preview" }).click();
    await page.getByRole("region", { name: "Preview" }).locator("p").first().waitFor();
    await store(page);
    await page.getByRole("article").first().waitFor();
    for (const visited of [path, "/projects", `${path}/sweeps`]) {
      await page.goto(visited);
      await settled(page);
    }
    await page.goto(path);
    await settled(page);
    for (const link of await page.getByRole("article").locator("a, .reference").all())
      await link.hover({ force: true });
    expect(ran).toEqual([]);
    expect(complaints).toEqual([]);
    await context.close();
  });
});

/** A busy machine takes a while to bring a page to life. */
const PATIENT = { timeout: 20_000 };
