import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import nodemailer, { type SendMailOptions } from "nodemailer";
import { afterAll, beforeAll, beforeEach, expect, test } from "vitest";
import { freePort } from "../../scripts/stack/ports.ts";
import { startMail } from "../../scripts/stand-ins/mail.ts";

const folder = mkdtempSync(path.join(tmpdir(), "swale-mail-"));
let inbox = "";
let smtpUrl = "";
let stop: () => Promise<void>;

beforeAll(async () => {
  const [mailPort, inboxPort] = [await freePort(), await freePort()];
  smtpUrl = `smtp://127.0.0.1:${mailPort}`;
  inbox = `http://127.0.0.1:${inboxPort}`;
  stop = await startMail(folder, mailPort, inboxPort);
});
beforeEach(() => fetch(`${inbox}/api/mails`, { method: "DELETE" }));
afterAll(async () => {
  await stop();
  rmSync(folder, { recursive: true });
});

async function send(mail: SendMailOptions): Promise<void> {
  const transport = nodemailer.createTransport(smtpUrl);
  await transport.sendMail({ from: "Swale <swale@localhost>", ...mail });
  transport.close();
}

async function json(where: string): Promise<Record<string, unknown>[] & Record<string, unknown>> {
  return (await fetch(`${inbox}${where}`)).json() as never;
}

const CONTENT = Buffer.from([0, 1, 2, 253, 254, 255]);

test("a mail arrives as it was sent: subject, both bodies, attachment", async () => {
  await send({
    to: "ada-marsh@fennmarsh.example",
    subject: "Dip at 7,08 MHz: ¿größer?",
    text: "Grüße – 7.0812 MHz\n",
    html: "<p>7.0812 <b>MHz</b><script>alert(1)</script></p>",
    attachments: [{ filename: "swéep.bin", content: CONTENT }],
  });
  const [summary] = await json("/api/mails");
  expect(summary).toMatchObject({
    subject: "Dip at 7,08 MHz: ¿größer?",
    to: ["ada-marsh@fennmarsh.example"],
  });
  const mail = await json(`/api/mails/${summary.id}`);
  expect(mail.text).toBe("Grüße – 7.0812 MHz\n");
  expect(mail.html).toContain("<b>MHz</b>");
  expect(mail.attachments).toMatchObject([{ name: "swéep.bin", bytes: CONTENT.length }]);
  const attachment = await fetch(`${inbox}/mails/${summary.id}/attachments/0`);
  expect(Buffer.from(await attachment.arrayBuffer())).toEqual(CONTENT);
  const raw = await (await fetch(`${inbox}/mails/${summary.id}/raw`)).text();
  expect(raw).toMatch(/^From: Swale <swale@localhost>/m);
});

test("the pages list it, show it, and let nothing in it run", async () => {
  await send({
    to: "bram-sedge@fennmarsh.example",
    subject: "<img src=x>",
    html: "<script>alert(1)</script>",
  });
  const list = await (await fetch(`${inbox}/`)).text();
  expect(list).toContain("&#60;img src=x&#62;");
  const id = (await json("/api/mails"))[0].id;
  const page = await (await fetch(`${inbox}/mails/${id}`)).text();
  expect(page).toContain(`<iframe title="The mail as sent" sandbox src="/mails/${id}/html">`);
  const html = await fetch(`${inbox}/mails/${id}/html`);
  expect(html.headers.get("content-security-policy")).toMatch(/^sandbox; default-src 'none'/);
});

test("the list is newest first, and can be narrowed to one address, blind copies included", async () => {
  await send({ to: "ada-marsh@fennmarsh.example", subject: "one", text: "1" });
  await send({
    to: "bram-sedge@fennmarsh.example",
    bcc: "ada-marsh@fennmarsh.example",
    subject: "two",
    text: "2",
  });
  await send({ to: "cleo-reed@fennmarsh.example", subject: "three", text: "3" });
  const subjects = async (query: string) => (await json(`/api/mails${query}`)).map((mail) => mail.subject);
  expect(await subjects("")).toEqual(["three", "two", "one"]);
  expect(await subjects("?to=ADA-marsh@fennmarsh.example")).toEqual(["two", "one"]);
});

test("what is not there is said so", async () => {
  expect((await fetch(`${inbox}/mails/00009999`)).status).toBe(404);
  expect((await fetch(`${inbox}/../../etc/passwd`)).status).toBe(404);
  expect((await fetch(`${inbox}/`, { method: "POST" })).status).toBe(405);
  expect(await json("/api/mails")).toEqual([]);
});
