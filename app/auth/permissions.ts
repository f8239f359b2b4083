/** Who may do what: the only table. Pure, so that the server, the pages and the tests ask the same one. */

export type ProjectRole = "owner" | "experimenter" | "commenter" | "reader";
export type Visibility = "private" | "linked" | "public";

export const PROJECT_ROLES: readonly ProjectRole[] = ["owner", "experimenter", "commenter", "reader"];

const PROJECT_TABLE = {
  "project.read": ["owner", "experimenter", "commenter", "reader"],
  "project.edit": ["owner"],
  "project.delete": ["owner"],
  "project.export": ["owner", "experimenter"],
  "members.manage": ["owner"],
  "sweep.add": ["owner", "experimenter"],
  "sweep.edit": ["owner", "experimenter"],
  "sweep.delete": ["owner", "experimenter"],
  "bench.edit": ["owner", "experimenter"],
  "antenna.edit": ["owner", "experimenter"],
  "step.edit": ["owner", "experimenter"],
  "trail.correct": ["owner", "experimenter"],
  "verdict.propose": ["owner", "experimenter", "commenter"],
  "verdict.settle": ["owner", "experimenter"],
  "note.write": ["owner", "experimenter", "commenter"],
  "note.moderate": ["owner"],
  "plate.make": ["owner", "experimenter"],
  "write-up.edit": ["owner", "experimenter"],
  "mention.moderate": ["owner"],
} as const satisfies Record<string, readonly ProjectRole[]>;

export type ProjectAction = keyof typeof PROJECT_TABLE;
export const PROJECT_ACTIONS = Object.keys(PROJECT_TABLE) as ProjectAction[];

export type SiteRole = "visitor" | "member" | "administrator";

const SITE_TABLE = {
  "site.read": ["visitor", "member", "administrator"],
  "account.own": ["member", "administrator"],
  "project.create": ["member", "administrator"],
  "site.administer": ["administrator"],
} as const satisfies Record<string, readonly SiteRole[]>;

export type SiteAction = keyof typeof SITE_TABLE;

/** May someone with this role in a project do this there? No role, no permission. */
export function mayInProject(role: ProjectRole | null, action: ProjectAction): boolean {
  return role !== null && (PROJECT_TABLE[action] as readonly ProjectRole[]).includes(role);
}

export function mayOnSite(role: SiteRole, action: SiteAction): boolean {
  return (SITE_TABLE[action] as readonly SiteRole[]).includes(role);
}

/**
 * The role that counts: a member's own, else reader of what anyone with the address may read.
 * Whether someone is an administrator does not matter: running a service opens no private project.
 */
export function effectiveRole(membership: ProjectRole | null, visibility: Visibility): ProjectRole | null {
  return membership ?? (visibility === "private" ? null : "reader");
}
