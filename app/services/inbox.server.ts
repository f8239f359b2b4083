import * as notices from "~/db/notices.server";
import { subjectOf } from "./activity-lines.ts";
import { plainText } from "./markdown.server.ts";
import { noticePath, noticeWords } from "./notice-words.ts";

export interface InboxItem {
  publicId: string;
  words: string;
  line: string;
  at: Date;
  unread: boolean;
}

export interface InboxThread {
  /** The newest notice: what "open" opens. */
  publicId: string;
  title: string;
  project: { publicId: string; title: string };
  unread: number;
  items: InboxItem[];
}

/** What came to a person, by thread: threads with something unread first, then the newest. */
export async function inboxOf(userId: number, page: { cursor?: string; project?: string }) {
  const { rows, nextCursor } = await notices.findPage(userId, { ...page, limit: A_PAGE });
  const threads = new Map<string, InboxThread>();
  for (const row of rows) {
    const key = `${row.project.publicId} ${subjectOf(row.about)}`;
    const thread = threads.get(key) ?? {
      publicId: row.publicId,
      title: (row.reason !== "invited" && row.about.title) || row.project.title,
      project: row.project,
      unread: 0,
      items: [],
    };
    threads.set(key, thread);
    thread.items.push(itemOf(row));
    if (row.readAt === null) thread.unread += 1;
  }
  const ordered = [...threads.values()].sort((a, b) => Number(b.unread > 0) - Number(a.unread > 0));
  return { threads: ordered, nextCursor };
}

/** Marks the whole thread of a notice as read, and says where it leads; undefined for what is not the person's. */
export async function openNotice(userId: number, publicId: string): Promise<string | undefined> {
  const row = await notices.findOne(userId, publicId);
  if (!row) return undefined;
  const { rows } = await notices.findPage(userId, { project: row.project, limit: A_PAGE });
  const alike = rows.filter(({ about }) => subjectOf(about) === subjectOf(row.about));
  await notices.setRead(userId, { publicIds: [publicId, ...alike.map((one) => one.publicId)] });
  return noticePath(row.project, row.about);
}

function itemOf(row: notices.InboxRow): InboxItem {
  return {
    publicId: row.publicId,
    words: noticeWords(row),
    line: row.body && !row.removedAt ? plainText(row.body, LINE) : "",
    at: row.at,
    unread: row.readAt === null,
  };
}

const A_PAGE = 100;
const LINE = 160;
