import { describe, expect, it } from "vitest";
import {
  effectiveRole,
  mayInProject,
  mayOnSite,
  PROJECT_ACTIONS,
  PROJECT_ROLES,
  type ProjectAction,
} from "~/auth/permissions";

/** As the product's description of roles says, written out a second time. */
const MAY: Record<(typeof PROJECT_ROLES)[number], ProjectAction[]> = {
  owner: [...PROJECT_ACTIONS],
  experimenter: [
    "project.read",
    "project.export",
    "sweep.add",
    "sweep.edit",
    "sweep.delete",
    "bench.edit",
    "antenna.edit",
    "step.edit",
    "trail.correct",
    "verdict.propose",
    "verdict.settle",
    "note.write",
    "plate.make",
    "write-up.edit",
  ],
  commenter: ["project.read", "verdict.propose", "note.write"],
  reader: ["project.read"],
};

describe("the permission table", () => {
  it.each(PROJECT_ROLES)("gives %s what the role is for and no more", (role) => {
    expect(PROJECT_ACTIONS.filter((action) => mayInProject(role, action))).toEqual(
      PROJECT_ACTIONS.filter((action) => MAY[role].includes(action)),
    );
  });

  it("gives nothing to who has no role", () => {
    expect(PROJECT_ACTIONS.filter((action) => mayInProject(null, action))).toEqual([]);
  });

  it("lends reading, and only reading, where a project is linked or public", () => {
    expect(effectiveRole(null, "private")).toBeNull();
    expect(effectiveRole(null, "linked")).toBe("reader");
    expect(effectiveRole(null, "public")).toBe("reader");
    for (const role of PROJECT_ROLES) {
      for (const visibility of ["private", "linked", "public"] as const) {
        expect(effectiveRole(role, visibility)).toBe(role);
      }
    }
  });

  it("keeps visitors to reading and administration to administrators", () => {
    expect(mayOnSite("visitor", "site.read")).toBe(true);
    expect(mayOnSite("visitor", "account.own")).toBe(false);
    expect(mayOnSite("visitor", "project.create")).toBe(false);
    expect(mayOnSite("member", "project.create")).toBe(true);
    expect(mayOnSite("member", "site.administer")).toBe(false);
    expect(mayOnSite("administrator", "site.administer")).toBe(true);
    expect(mayOnSite("administrator", "account.own")).toBe(true);
  });
});
