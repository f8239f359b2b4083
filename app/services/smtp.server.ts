import { Readable } from "node:stream";
import nodemailer from "nodemailer";
import SMTPConnection from "nodemailer/lib/smtp-connection";

/** One mail to one server, and what is known of it afterwards. */

export interface LetterToSend {
  messageId: string;
  from: string;
  toAddress: string;
  subject: string;
  text: string;
  html: string;
  headers: Record<string, string>;
  date: Date;
}

/**
 * `sent`: the server took it on. `refused`: it said no to this mail for good. `later`: it was not taken, and may be another
 * time. `unknown`: everything was handed over and no answer came, so that it may have been taken (RFC 1047).
 */
export type Delivery = { kind: "sent" } | { kind: "refused" | "later" | "unknown"; reason: string };

export async function deliver(smtpUrl: string, letter: LetterToSend, waits = WAITS): Promise<Delivery> {
  let built: { envelope: SMTPConnection.Envelope; message: Buffer };
  try {
    built = await build(letter);
  } catch (error) {
    return { kind: "refused", reason: plainReason(error) };
  }
  const progress = { handedOver: false };
  try {
    await hand(smtpUrl, built, progress, waits);
    return { kind: "sent" };
  } catch (error) {
    return judge(error as SMTPConnection.SMTPError, progress.handedOver);
  }
}

function judge(error: SMTPConnection.SMTPError, handedOver: boolean): Delivery {
  const reason = plainReason(error);
  if (error.responseCode === undefined || error.responseCode === 0) {
    if (error.code === "EENVELOPE") return { kind: "refused", reason };
    return { kind: handedOver ? "unknown" : "later", reason };
  }
  // Said of the greeting or of our own password, a 5xx is about this service and not about the mail.
  const aboutMail = ABOUT_MAIL.has(error.command ?? "") && !ABOUT_US.has(error.responseCode);
  return { kind: error.responseCode >= 500 && aboutMail ? "refused" : "later", reason };
}

/** Resolves when the server answered the whole message with 2xx. */
function hand(
  smtpUrl: string,
  { envelope, message }: { envelope: SMTPConnection.Envelope; message: Buffer },
  progress: { handedOver: boolean },
  waits: typeof WAITS,
): Promise<void> {
  const { auth, ...options } = nodemailer.createTransport(smtpUrl).options as SMTPConnection.Options & {
    auth?: { user: string; pass: string };
  };
  const connection = new SMTPConnection({ ...options, ...waits });
  // Read only after the server asked for the message, and to its end before the closing line is written.
  const source = Readable.from(
    (function* () {
      yield message;
      progress.handedOver = true;
    })(),
  );
  return new Promise<void>((resolve, reject) => {
    connection.once("error", reject);
    connection.once("end", () => reject(new Error("The connection ended before the mail was taken.")));
    const send = () =>
      connection.send(envelope, source, (error) => {
        if (error) reject(error);
        else resolve();
      });
    connection.connect((error) => {
      if (error) reject(error);
      else if (!auth) send();
      else connection.login({ credentials: auth }, (refusal) => (refusal ? reject(refusal) : send()));
    });
  }).finally(() => connection.close());
}

async function build(letter: LetterToSend) {
  const info = await COMPOSER.sendMail({
    from: letter.from,
    to: { name: "", address: letter.toAddress },
    subject: letter.subject,
    text: letter.text,
    html: letter.html,
    messageId: letter.messageId,
    date: letter.date,
    headers: { "Auto-Submitted": "auto-generated", ...letter.headers },
    // A drawing in the HTML becomes a part of the mail: readers of mail drop addresses that hold data.
    attachDataUrls: true,
    disableFileAccess: true,
    disableUrlAccess: true,
  });
  return { envelope: info.envelope as SMTPConnection.Envelope, message: info.message as Buffer };
}

function plainReason(error: unknown): string {
  const { message, response } = error as { message?: string; response?: string };
  return String(response || message || error)
    .replace(/\s+/g, " ")
    .slice(0, 500);
}

const COMPOSER = nodemailer.createTransport({ streamTransport: true, buffer: true, newline: "windows" });
const ABOUT_MAIL = new Set(["MAIL FROM", "RCPT TO", "DATA"]);
/** Signing in is asked for or did not work (RFC 4954), or the service is shutting. */
const ABOUT_US = new Set([521, 530, 534, 535, 538]);
/** RFC 5321, section 4.5.3.2: up to ten minutes for the last answer, for hurrying there makes second copies. */
const WAITS = {
  connectionTimeout: 30_000,
  greetingTimeout: 60_000,
  socketTimeout: 600_000,
  dnsTimeout: 30_000,
};
