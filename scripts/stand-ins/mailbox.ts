import { existsSync, readdirSync, readFileSync, renameSync, rmSync, writeFileSync } from "node:fs";
import path from "node:path";
import { type ParsedMail, simpleParser } from "mailparser";

/** What the list shows of a mail. */
export interface MailSummary {
  id: string;
  from: string;
  /** Who it was delivered to, blind copies included. */
  to: string[];
  subject: string;
  at: string;
}

export interface Mail extends MailSummary {
  text: string;
  html: string | null;
  attachments: { name: string; type: string; bytes: number }[];
}

const MOST_MAILS = 500;

/** Mails as files, newest last: the message as it came, and a summary beside it. */
export class Mailbox {
  readonly #folder: string;
  #next: number;

  constructor(folder: string) {
    this.#folder = folder;
    this.#next = Number(this.#ids().at(-1) ?? 0) + 1;
  }

  async keep(raw: Buffer, to: string[]): Promise<void> {
    const id = String(this.#next++).padStart(8, "0");
    const parsed = await simpleParser(raw);
    const summary: MailSummary = {
      id,
      from: parsed.from?.text ?? "",
      to,
      subject: parsed.subject ?? "",
      at: new Date().toISOString(),
    };
    writeFileSync(this.#file(id, "eml"), raw);
    // The summary makes the mail appear, so it comes last and whole.
    writeFileSync(this.#file(id, "json.new"), JSON.stringify(summary));
    renameSync(this.#file(id, "json.new"), this.#file(id, "json"));
    for (const old of this.#ids().slice(0, -MOST_MAILS)) this.#remove(old);
  }

  /** Newest first; `to` keeps those delivered to that address. */
  list(to?: string): MailSummary[] {
    const summaries = this.#ids().map(
      (id): MailSummary => JSON.parse(readFileSync(this.#file(id, "json"), "utf8")),
    );
    const wanted = to?.toLowerCase();
    return summaries
      .toReversed()
      .filter((mail) => !wanted || mail.to.some((one) => one.toLowerCase() === wanted));
  }

  async read(id: string): Promise<Mail | undefined> {
    const parsed = await this.#parse(id);
    if (!parsed) return undefined;
    const summary: MailSummary = JSON.parse(readFileSync(this.#file(id, "json"), "utf8"));
    const attachments = parsed.attachments.map(({ filename, contentType, size }) => ({
      name: filename ?? "unnamed",
      type: contentType,
      bytes: size,
    }));
    return { ...summary, text: parsed.text ?? "", html: parsed.html || null, attachments };
  }

  async attachment(id: string, index: number): Promise<{ name: string; content: Buffer } | undefined> {
    const found = (await this.#parse(id))?.attachments[index];
    return found && { name: found.filename ?? "unnamed", content: found.content };
  }

  raw(id: string): Buffer | undefined {
    return existsSync(this.#file(id, "eml")) ? readFileSync(this.#file(id, "eml")) : undefined;
  }

  clear(): void {
    for (const id of this.#ids()) this.#remove(id);
  }

  async #parse(id: string): Promise<ParsedMail | undefined> {
    const raw = this.raw(id);
    return raw && simpleParser(raw);
  }

  #ids(): string[] {
    const names = readdirSync(this.#folder).filter((name) => /^\d{8}\.json$/.test(name));
    return names.map((name) => name.slice(0, 8)).sort();
  }

  #remove(id: string): void {
    rmSync(this.#file(id, "json"), { force: true });
    rmSync(this.#file(id, "eml"), { force: true });
  }

  #file(id: string, extension: string): string {
    return path.join(this.#folder, `${id}.${extension}`);
  }
}
