import { expect } from "vitest";
import type { Mail, MailSummary } from "../../scripts/stand-ins/mailbox.ts";

/** The inbox of the stand-in that takes every mail. */

/** The newest mail to this address, waited for until there are `count`. */
export async function mailTo(address: string, count = 1): Promise<Mail> {
  let found: MailSummary[] = [];
  await expect
    .poll(
      async () => {
        found = await listTo(address);
        return found.length;
      },
      { timeout: 20_000, interval: 100 },
    )
    .toBeGreaterThanOrEqual(count);
  return (await fetch(`${process.env.SWALE_MAIL_URL}/api/mails/${found[0].id}`)).json();
}

/** All mails to this address so far, in full. */
export async function textsTo(address: string): Promise<string> {
  const mails = (await listTo(address)).map(
    async ({ id }): Promise<Mail> => (await fetch(`${process.env.SWALE_MAIL_URL}/api/mails/${id}`)).json(),
  );
  return (await Promise.all(mails))
    .map(({ subject, text, html }) => `${subject}\n${text}\n${html}`)
    .join("\n");
}

export async function listTo(address: string): Promise<MailSummary[]> {
  const query = new URLSearchParams({ to: address });
  return (await fetch(`${process.env.SWALE_MAIL_URL}/api/mails?${query}`)).json();
}

/** The code in the newest of so many mails to this address. */
export async function codeFor(address: string, count = 1): Promise<string> {
  const { text } = await mailTo(address, count);
  return /^\s*(\d{4} \d{4})$/m.exec(text)?.[1] ?? `no code in: ${text}`;
}

/** The first address of ours with this beginning that a mail holds. */
export function pathIn(mail: Mail, beginning: string): string {
  const at = mail.text.split(/\s+/).find((word) => word.includes(beginning));
  return at ? new URL(at).pathname : `no ${beginning} in: ${mail.text}`;
}
