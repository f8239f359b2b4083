import type * as projects from "~/db/projects.server";
import * as writeUps from "~/db/write-ups.server";
import { env } from "~/env.server";
import { escapeXml, uuidOf } from "../feed.server.ts";
import { peopleOf } from "./cite.ts";
import { summaryOf } from "./published.server.ts";

/** The published write-ups of a project as an Atom feed (RFC 4287), the last published first. */
export async function drawWriteUpFeed(project: projects.Project): Promise<string> {
  const rows = await writeUps.findPublished(project.id, ENTRIES);
  const page = `${env.BASE_URL}/projects/${project.publicId}`;
  const entries = rows.map((row) => {
    const address = `${env.BASE_URL}/write-ups/${row.publicId}`;
    const authors = peopleOf(row)
      .map((name) => `<author><name>${escapeXml(name)}</name></author>`)
      .join("");
    const remark = row.number > 1 && row.remark ? `Version ${row.number}: ${row.remark}. ` : "";
    return `<entry>
<id>urn:uuid:${uuidOf(["write-up", row.publicId])}</id>
<title>${escapeXml(row.title)}</title>
<published>${row.firstAt.toISOString()}</published>
<updated>${row.publishedAt.toISOString()}</updated>
${authors}
<link rel="alternate" type="text/html" href="${address}"/>
<summary>${escapeXml(`${remark}${summaryOf(row.body)}`)}</summary>
</entry>`;
  });
  return `<?xml version="1.0" encoding="utf-8"?>
<feed xmlns="http://www.w3.org/2005/Atom" xml:lang="en">
<id>urn:uuid:${uuidOf(["write-ups", project.publicId])}</id>
<title>${escapeXml(`${project.title}: write-ups`)}</title>
<updated>${(rows[0]?.publishedAt ?? project.createdAt).toISOString()}</updated>
<author><name>Swale</name></author>
<link rel="alternate" href="${page}/write-ups"/>
<link rel="self" href="${page}/write-ups.atom"/>
${entries.join("\n")}
</feed>
`;
}

const ENTRIES = 50;
