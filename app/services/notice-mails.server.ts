import type { Transaction } from "~/db/client.server";
import * as mailChoices from "~/db/mail-choices.server";
import * as notices from "~/db/notices.server";
import { env } from "~/env.server";
import type { MailPart } from "./mail.server.ts";
import { onceKeyOf } from "./mail-wanted.server.ts";
import { plainText, renderNote } from "./markdown.server.ts";
import { drawDip } from "./notice-figure.server.ts";
import { noticePath, noticeWords, WHY } from "./notice-words.ts";
import { queueMail } from "./outbox.server.ts";
import { makeWayOut } from "./unsubscribe.server.ts";

interface Addressee {
  id: number;
  email: string | null;
}

interface AboutProject {
  id: number;
  publicId: string;
  title: string;
}

/** Who said nothing of mail is mailed each notice at once. */
export const USUAL_MODE: mailChoices.MailMode = "once";

/** Mails new notices, by person, to those who want each at once. */
export async function mailAtOnce(
  project: AboutProject,
  hearers: Addressee[],
  made: Map<number, number>,
  tx: Transaction,
): Promise<void> {
  const modes = await mailChoices.findModes([...made.keys()], project.publicId, tx);
  for (const hearer of hearers) {
    const noticeId = made.get(hearer.id);
    if (noticeId === undefined || (modes.get(hearer.id) ?? USUAL_MODE) !== "once") continue;
    await mailNotices(project, hearer, [noticeId], onceKeyOf("notice", hearer.id, project.id, noticeId), tx);
  }
}

/** One mail of these notices, written in the transaction that marks them as mailed. */
export async function mailNotices(
  project: AboutProject,
  to: Addressee,
  noticeIds: number[],
  onceKey: string,
  tx: Transaction,
): Promise<void> {
  const rows = await notices.findToMail(noticeIds, to.id, tx);
  await notices.setMailed(noticeIds, tx);
  if (!to.email || rows.length === 0) return;
  const { href, headers } = await makeWayOut(to.id, project.id, tx);
  const lines = rows.map(noticeWords);
  const subject =
    rows.length === 1 ? subjectOf(rows[0], project) : `${rows.length} things in ${project.title}`;
  const parts = await Promise.all(
    rows.map((row, i) => partsOf(project, row, rows.length > 1 ? lines[i] : null)),
  );
  const why = [...new Set(rows.map(({ reason }) => WHY[reason]))].join(", ");
  const words = {
    heading: subject,
    parts: [{ kind: "text" as const, text: `In ${project.title}.` }, ...parts.flat()],
    footer: [
      { kind: "text" as const, text: `This came because ${why}.` },
      { kind: "link" as const, label: "No more mails about this project", href },
      { kind: "link" as const, label: "How often mails come", href: `${env.BASE_URL}/settings/mail` },
    ],
  };
  await queueMail({ toAddress: to.email, userId: to.id, subject, words, headers, onceKey }, tx);
}

/** Somebody who was just added does not know yet what "the project" is. */
function subjectOf(row: ToMail, project: AboutProject): string {
  return row.reason === "invited" ? `${noticeWords(row)} ${project.title}` : noticeWords(row);
}

type ToMail = Awaited<ReturnType<typeof notices.findToMail>>[number];

async function partsOf(project: AboutProject, row: ToMail, line: string | null): Promise<MailPart[]> {
  const href = env.BASE_URL + noticePath(project.publicId, row.about);
  const figure = row.dipId && line === null ? await drawDip(row.dipId) : null;
  return [
    ...(line ? [{ kind: "text" as const, text: line }] : []),
    ...(figure ? [{ kind: "drawn" as const, ...figure }] : []),
    ...(row.body
      ? [
          {
            kind: "drawn" as const,
            html: `<blockquote>${renderNote(row.body)}</blockquote>`,
            text: plainText(row.body, MOST_CHARACTERS).replace(/^/gm, "> "),
          },
        ]
      : []),
    { kind: "link", label: row.body ? "Read it there, and answer" : "See it there", href },
  ];
}

const MOST_CHARACTERS = 4000;
