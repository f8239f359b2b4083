import { effectiveRole, mayInProject } from "~/auth/permissions";
import type { Person } from "~/auth/require.server";
import { onPage } from "~/charts/on-page";
import * as activity from "~/db/activity.server";
import * as plates from "~/db/plates.server";
import * as projects from "~/db/projects.server";
import { env } from "~/env.server";
import { notFound } from "~/errors";
import { plainText, renderNote } from "~/services/markdown.server";
import { copyTexts, sentence } from "~/services/plates/citation";
import { readForm } from "~/services/plates/forms.server";
import { frozenElsewhere } from "~/services/plates/frozen-elsewhere.server";
import { type PlateRecord, parseRecord } from "~/services/plates/record";
import { subjectOf } from "~/services/plates/subject";
import { shownMentions } from "~/services/webmention/shown.server";

/** The plate at an address, with what this person may do with it; 404 where there is none. */
export async function findPlate(
  publicId: string | undefined,
  person: Pick<Person, "id" | "administrator"> | null,
) {
  const plate = await plates.findByPublicId(publicId ?? "");
  if (!plate) throw notFound("plate");
  const project = plate.projectId
    ? await projects.findWithRoleById(plate.projectId, person?.id ?? null)
    : undefined;
  const role = project ? effectiveRole(project.role, project.project.visibility) : null;
  // Of a project that is gone, whoever made the plate answers for it, or who runs the site.
  const mayWithdraw = project
    ? mayInProject(role, "plate.make")
    : person !== null && (plate.createdBy === person.id || person.administrator);
  return { plate, project: project?.project ?? null, role, mayWithdraw };
}
export type FoundPlate = Awaited<ReturnType<typeof findPlate>>;

/** What stays of a plate that was withdrawn: nothing of its figure and numbers. */
export async function loadTombstone({ plate }: FoundPlate) {
  const versions = await plates.findVersions(plate);
  const newer = versions.filter(({ version, withdrawnAt }) => version > plate.version && !withdrawnAt).at(-1);
  return {
    number: plate.number,
    version: plate.version,
    title: plate.title,
    at: plate.withdrawnAt ?? plate.createdAt,
    reason: plate.withdrawnReason,
    newer: newer ? `/plates/${newer.publicId}` : null,
  };
}

export async function loadPlatePage({ plate, project, role, mayWithdraw }: FoundPlate) {
  const record = parseRecord(plate.record);
  const [versions, wide, narrow, touchstone, present, mentions, elsewhere] = await Promise.all([
    plates.findVersions(plate),
    readForm(plate.publicId, "svg-light"),
    readForm(plate.publicId, "svg-light-narrow"),
    readForm(plate.publicId, "s1p"),
    project && role ? presentOf(project.id, record) : new Set<string>(),
    shownMentions({ plateId: plate.id }),
    frozenElsewhere(plate, record),
  ]);
  const newest = versions.at(-1);
  const next = versions.find(({ previousId }) => previousId === plate.id);
  const nextRow = next ? await plates.findByPublicId(next.publicId) : undefined;
  const { figure: _, choices: __, sources, ...said } = record;
  return {
    ...said,
    sources: sources.map(shownSource),
    origin: env.BASE_URL,
    description: plainText(record.caption, DESCRIPTION) || sentence(record),
    publicId: plate.publicId,
    base: `/plates/${plate.publicId}`,
    address: `${env.BASE_URL}/plates/${plate.publicId}`,
    /** The figure has the title in itself. */
    titled: record.figure.show.title,
    /** As it was frozen, for a wide page and for a phone. */
    wide: drawn(wide),
    narrow: drawn(narrow),
    captionHtml: record.caption ? renderNote(record.caption) : null,
    hasTouchstone: touchstone !== undefined,
    cite: { sentence: sentence(record), texts: copyTexts(record) },
    /** Only for who may read it there. */
    projectPath: project && role ? `/projects/${project.publicId}` : null,
    subjectPath: project && role ? subjectPath(project.publicId, record, present) : null,
    present: [...present],
    mentions,
    /** Of a copy that came with a bundle. */
    elsewhere,
    versions: versions.map(({ publicId, version, createdAt, withdrawnAt }) => ({
      publicId,
      version,
      at: createdAt,
      withdrawn: withdrawnAt !== null,
    })),
    newer:
      newest && newest.version > plate.version
        ? {
            publicId: newest.publicId,
            version: newest.version,
            withdrawn: newest.withdrawnAt !== null,
            reason: nextRow ? (parseRecord(nextRow.record).previous?.reason ?? "") : "",
          }
        : null,
    may: {
      withdraw: mayWithdraw,
      mend: project !== null && mayInProject(role, "plate.make") ? `/projects/${project.publicId}` : null,
    },
  };
}
export type PlatePageData = Awaited<ReturnType<typeof loadPlatePage>>;

function drawn(form: Awaited<ReturnType<typeof readForm>>): string | null {
  return form && form !== "withdrawn" ? onPage(form.bytes.toString("utf8")) : null;
}

/** Without the complete choices of its reading and its bench, which the JSON form has. */
function shownSource({ reading, bench, ...source }: PlateRecord["sources"][number]) {
  const { spec: _, ...read } = reading;
  return { ...source, reading: read, bench: bench && { name: bench.name, version: bench.version } };
}
export type ShownSource = ReturnType<typeof shownSource>;

/** Which of its sweeps, dips and trails are still in the project. */
function presentOf(projectId: number, record: PlateRecord): Promise<Set<string>> {
  const ids = [...record.sources.map(({ sweep }) => sweep), ...(subjectOf(record.subject)?.ids ?? [])];
  return activity.findPresent(projectId, [...new Set(ids)]);
}

/** Where what it was made of can be seen as it is now; null for what is gone. */
function subjectPath(project: string, record: PlateRecord, present: ReadonlySet<string>): string | null {
  const subject = subjectOf(record.subject);
  const base = `/projects/${project}`;
  if (!subject?.ids.every((id) => present.has(id))) return null;
  switch (subject.kind) {
    case "strip":
      return base;
    case "compare":
      return `${base}/compare?${subject.ids.map((id) => `sweep=${id}`).join("&")}`;
    case "sweep":
    case "dip":
    case "trail":
      return `${base}/${subject.kind}s/${subject.ids[0]}`;
    case "bench":
      return `${base}/benches/${subject.ids[0]}`;
    default:
      return subject.kind satisfies never;
  }
}

const DESCRIPTION = 300;
