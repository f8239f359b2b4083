import type { Browser } from "playwright-core";
import { afterAll, beforeAll, expect, test } from "vitest";
import { codeFor, mailTo, pathIn } from "../web/mails.ts";
import {
  expectAccessible,
  expectFits,
  launch,
  newcomer,
  newProject,
  settled,
  signIn,
  visit,
} from "./browser.ts";

/** Somebody new is invited by mail, signs in by a code, joins, and later closes the account. */

let browser: Browser;
let projectPath = "";
const ada = newcomer("ada");
const guest = `${newcomer("gwen")}@fennmarsh.example`;

beforeAll(async () => {
  browser = await launch();
});
afterAll(() => browser.close());

test("an owner invites by mail and by link", async () => {
  const { page, context, complaints } = await visit(browser);
  await signIn(page, ada);
  projectPath = await newProject(page, "Mast behind the mill");
  await page.goto(`${projectPath}/members`);
  await settled(page);
  await page.getByLabel("E-mail address").fill(guest);
  await page.getByRole("button", { name: "Invite", exact: true }).click();
  await page.getByText(`An invitation is on its way to ${guest}.`).waitFor();
  expect(await page.getByLabel("E-mail address").inputValue()).toBe("");
  await page.getByRole("button", { name: "Invite", exact: true }).click();
  const link = page.getByLabel("The link of the invitation");
  expect(await link.inputValue()).toMatch(/\/invitations\/[\w-]{32}$/);
  const listed = page.getByRole("table", { name: "Invitations" });
  await listed.getByRole("row").nth(2).waitFor();
  await expectAccessible(page);
  await expectFits(page);
  await context.close();
  expect(complaints).toEqual([]);
});

test("somebody new signs in by a code on the way and joins, on a phone in the dark", {
  timeout: 240_000,
}, async () => {
  const { page, context, complaints } = await visit(browser, {
    viewport: { width: 390, height: 844 },
    colorScheme: "dark",
  });
  await page.goto(pathIn(await mailTo(guest), "/invitations/"));
  await page.getByRole("heading", { name: "Mast behind the mill" }).waitFor();
  await settled(page);
  await expectAccessible(page);
  await page.getByRole("link", { name: "Sign in and come back" }).click();
  await page.getByLabel("E-mail address").fill(guest);
  await settled(page);
  await expectAccessible(page);
  await expectFits(page);
  await page.getByRole("button", { name: "Mail me a code" }).click();
  await page.getByText("A mail with a code is on its way").waitFor();
  await settled(page);
  await expectAccessible(page);
  await expectFits(page);
  await page.getByLabel("Code", { exact: true }).fill("00000000");
  await page.getByRole("button", { name: "Go on" }).click();
  await page.getByText("That is not the code. 4 more tries are left.").waitFor();
  await page.getByLabel("Code", { exact: true }).fill(await codeFor(guest, 2));
  await page.getByRole("button", { name: "Go on" }).click();
  await page.getByLabel("Name", { exact: true }).fill("Gwen Guest");
  await page.getByRole("button", { name: "Make my account" }).click();
  await page.getByRole("button", { name: "Join as Gwen Guest" }).click();
  await page.getByText("You are commenter here now.").waitFor();
  expect(new URL(page.url()).pathname).toBe(projectPath);
  for (const path of ["/settings", "/settings/sign-in", "/settings/blocked", "/settings/close"]) {
    await page.goto(path);
    await settled(page);
    await expectAccessible(page);
    await expectFits(page);
  }
  const typed = (await page.getByText(/Type your user name to go on/).textContent()) ?? "";
  await page.getByLabel(/Type your user name/).fill(typed.split(": ")[1]);
  await page.getByRole("button", { name: "Close my account for good" }).click();
  await page.getByText("Your account is closed.").waitFor();
  await page.goto(projectPath);
  await page.getByText("No such project").waitFor();
  await context.close();
  expect(complaints).toEqual([]);
});
