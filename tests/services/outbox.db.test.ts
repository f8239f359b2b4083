import { describe, expect, it } from "vitest";
import { inTransaction } from "~/db/client.server";
import { newPublicId } from "~/db/ids.server";
import * as outbox from "~/db/outbox.server";
import { queueMail, sendDue, waitMs } from "~/services/outbox.server";
import { startHostileServer } from "../../scripts/trials/hostile-mail.ts";
import { MAIL_TRIALS, tryMail } from "../../scripts/trials/mail.ts";

const words = { heading: "A trial", parts: [{ kind: "text" as const, text: "Invented." }], footer: [] };

describe("a mail whose server goes wrong", () => {
  it.each(MAIL_TRIALS)("$name: arrives $promise once", { timeout: 60_000 }, async ({ promise, ...trial }) => {
    const outcome = await tryMail(trial);
    if (promise === "never") {
      expect(outcome).toMatchObject({ taken: 0, attempts: 1, state: "failed" });
      expect(outcome.reason).toMatch(/^55\d /);
      return;
    }
    expect(outcome.messageIds).toBe(1);
    if (promise === "exactly") expect(outcome).toMatchObject({ taken: 1, state: "sent" });
    else expect(outcome.taken).toBeGreaterThan(1);
  });

  it("is not sent over and over where the server never says that it took it", async () => {
    const faults = Array.from({ length: 30 }, () => "drops before the reply, kept" as const);
    const outcome = await tryMail({ name: "no end", faults });
    expect(outcome).toMatchObject({ taken: 5, messageIds: 1, state: "failed" });
    expect(outcome.reason).toContain("may have arrived");
  });

  it("is given up after twenty attempts, and can be tried again under its Message-ID", async () => {
    const outcome = await tryMail({ name: "down for good", faults: [], down: 20 });
    expect(outcome).toMatchObject({ taken: 0, attempts: 20, state: "failed" });
    const [row] = await outbox.findPage(["failed"]);
    expect(await outbox.retry(row.publicId)).toBe(true);
    expect((await outbox.findPage(["waiting"]))[0]).toMatchObject({ publicId: row.publicId, attempts: 0 });
  });
});

describe("queueMail", () => {
  it("writes nothing where the transaction is rolled back", async () => {
    const before = (await outbox.countByState()).waiting;
    await expect(
      inTransaction(async (tx) => {
        await queueMail({ toAddress: "x@fennmarsh.example", subject: "no", words }, tx);
        throw new Error("not after all");
      }),
    ).rejects.toThrow("not after all");
    expect((await outbox.countByState()).waiting).toBe(before);
  });

  it("writes once what may be mailed only once, also at the same moment", async () => {
    const mail = { toAddress: "x@fennmarsh.example", subject: "once", words, onceKey: newPublicId() };
    const written = await Promise.all([1, 2, 3].map(() => inTransaction((tx) => queueMail(mail, tx))));
    expect(written.filter(Boolean)).toHaveLength(1);
  });

  it("lets no line end into a header, and keeps no text once it is sent", async () => {
    const server = await startHostileServer();
    const toAddress = `${newPublicId()}@fennmarsh.example`;
    const subject = "A title\r\nBcc: everybody@fennmarsh.example";
    await inTransaction((tx) => queueMail({ toAddress, subject, words, headers: { "X-About": "a" } }, tx));
    while ((await sendDue({ smtpUrl: server.url })) > 0);
    await server.close();
    const taken = await Promise.all(server.taken.map((id) => outbox.findByMessageId(id)));
    const row = taken.find((one) => one?.toAddress === toAddress);
    expect(row).toMatchObject({ toAddress, state: "sent", text: "", html: "" });
    expect(row?.subject).toBe("A titleBcc: everybody@fennmarsh.example");
  });
});

it("tries again within two days, ever more seldom", () => {
  const waits = Array.from({ length: 19 }, (_, i) => waitMs(i + 1, 0.5));
  expect(waits[0]).toBe(30_000);
  expect(waits.every((wait, i) => i === 0 || wait >= waits[i - 1])).toBe(true);
  const hours = waits.reduce((sum, wait) => sum + wait, 0) / 3.6e6;
  expect(hours).toBeGreaterThan(40);
  expect(hours).toBeLessThan(50);
});
