import type { ProjectAccess } from "~/auth/require.server";
import * as invitations from "~/db/invitations.server";
import * as projects from "~/db/projects.server";
import { stateOf } from "~/services/invitations.server";

/** Who is in it; for owners also the open doors. When somebody was last here is for members only. */
export async function membersPage({ project, may, person, membership }: ProjectAccess) {
  const mayManage = may("members.manage");
  const [rows, doors] = await Promise.all([
    projects.findMembers(project.id),
    mayManage ? invitations.findAllByProject(project.id) : [],
  ]);
  const ownerCount = rows.filter((row) => row.role === "owner").length;
  return {
    title: project.title,
    mayManage,
    isMember: membership !== null,
    members: rows.map((row) => ({
      userName: row.userName,
      name: row.name,
      callSign: row.callSign,
      role: row.role,
      since: row.since.toISOString(),
      lastActiveAt: membership ? (row.lastActiveAt?.toISOString() ?? null) : null,
      self: row.userId === person?.id,
      lastOwner: row.role === "owner" && ownerCount === 1,
    })),
    invitations: doors.map(({ invitation, by, takenBy, takerUserName }) => ({
      id: invitation.publicId,
      email: invitation.email,
      role: invitation.role,
      by: by ?? "a former member",
      expiresAt: invitation.expiresAt.toISOString(),
      uses: invitation.uses,
      state: stateOf(invitation),
      takenBy: takerUserName === null ? null : `${takenBy} (${takerUserName})`,
    })),
  };
}
