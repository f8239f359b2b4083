import { mkdirSync } from "node:fs";
import { SMTPServer } from "smtp-server";
import { LOOPBACK } from "../stack/ports.ts";
import { startInbox } from "./inbox.ts";
import { Mailbox } from "./mailbox.ts";

const LARGEST_BYTES = 25 * 1024 * 1024;

/** Takes every mail, sends none on, and shows them on a page. */
export async function startMail(
  folder: string,
  mailPort: number,
  inboxPort: number,
): Promise<() => Promise<void>> {
  mkdirSync(folder, { recursive: true });
  const mailbox = new Mailbox(folder);
  const server = new SMTPServer({
    banner: "Swale's local inbox",
    size: LARGEST_BYTES,
    authOptional: true,
    disabledCommands: ["AUTH", "STARTTLS"],
    disableReverseLookup: true,
    logger: false,
    onData(stream, session, done) {
      const chunks: Buffer[] = [];
      stream.on("data", (chunk: Buffer) => chunks.push(chunk));
      stream.on("end", () => {
        if (stream.sizeExceeded) {
          done(Object.assign(new Error("The mail is larger than 25 MB"), { responseCode: 552 }));
          return;
        }
        const to = session.envelope.rcptTo.map((recipient) => recipient.address);
        mailbox.keep(Buffer.concat(chunks), to).then(() => done(), done);
      });
    },
  });
  await new Promise<void>((resolve, reject) => {
    server.on("error", reject);
    server.listen(mailPort, LOOPBACK, resolve);
  });
  server.removeAllListeners("error");
  server.on("error", (error) => console.error(error));
  const stopInbox = await startInbox(mailbox, inboxPort);
  return async () => {
    await Promise.all([new Promise<void>((resolve) => server.close(resolve)), stopInbox()]);
  };
}
