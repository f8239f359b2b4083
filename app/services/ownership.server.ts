import { inTransaction } from "~/db/client.server";
import * as people from "~/db/people.server";
import * as projects from "~/db/projects.server";
import { env } from "~/env.server";
import { record } from "./events.server.ts";
import { queueMail } from "./outbox.server.ts";

export interface HandOver {
  project: { id: number; publicId: string; title: string };
  from: people.User;
  toUserName: string;
  /** What the one who hands over is afterwards; null leaves. */
  afterwards: "owner" | "experimenter" | null;
}

/** Makes a member owner in place of another, in one write; the new owner is told by mail. */
export function handOver({
  project,
  from,
  toUserName,
  afterwards,
}: HandOver): Promise<"done" | "not-a-member"> {
  return inTransaction(async (tx) => {
    await projects.lock(project.id, tx);
    await projects.lockOwners(project.id, tx);
    const to = await people.findByUserName(toUserName, tx);
    const role = to && (await projects.lockMember(project.id, to.id, tx));
    const own = await projects.lockMember(project.id, from.id, tx);
    if (!to || !role || to.id === from.id || own !== "owner") return "not-a-member";
    const event = { projectId: project.id, actorId: from.id };
    await projects.updateMember(project.id, to.id, "owner", tx);
    await record({ ...event, kind: "member.changed", about: { title: to.name } }, tx);
    if (afterwards === null) {
      await projects.deleteMember(project.id, from.id, tx);
      await record({ ...event, kind: "member.left", about: { title: from.name } }, tx);
    } else if (afterwards !== "owner") {
      await projects.updateMember(project.id, from.id, afterwards, tx);
    }
    if (to.email) {
      const heading = `You are owner of “${project.title}”`;
      const words = {
        heading,
        parts: [
          {
            kind: "text" as const,
            text: `${from.name} handed the project over to you: you may invite and remove members, change its settings and delete it.`,
          },
          {
            kind: "link" as const,
            label: "The project",
            href: `${env.BASE_URL}/projects/${project.publicId}`,
          },
        ],
        footer: [{ kind: "text" as const, text: "This mail comes because what you may do has changed." }],
      };
      await queueMail({ toAddress: to.email, userId: to.id, subject: heading, words }, tx);
    }
    return "done";
  });
}
