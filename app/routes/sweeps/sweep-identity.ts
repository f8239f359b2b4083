import type { ProjectAccess } from "~/auth/require.server";
import type { FoundSweep } from "~/db/sweeps.server";

/** What a sweep is and how it came in, and who may do what with it. */
export function identityOf(access: ProjectAccess, { sweep, file, reading, by }: FoundSweep) {
  return {
    project: { publicId: access.project.publicId, title: access.project.title },
    may: {
      edit: access.may("sweep.edit"),
      delete: access.may("sweep.delete"),
      write: access.may("note.write"),
    },
    mayVerdict: { propose: access.may("verdict.propose"), settle: access.may("verdict.settle") },
    sweep: {
      publicId: sweep.publicId,
      title: sweep.title,
      takenAt: sweep.takenAt,
      createdAt: sweep.createdAt,
      by,
      pointCount: sweep.pointCount,
      startHz: sweep.startHz,
      stopHz: sweep.stopHz,
      referenceOhm: sweep.referenceOhm,
      complex: sweep.complex ?? false,
      fileName: file.name,
      sha256: file.sha256,
      format: reading?.reading?.format ?? null,
      quantity: reading?.reading?.quantity ?? null,
      assumed: reading?.reading?.assumed ?? [],
      questions: reading?.reading?.questions.length ?? 0,
      repeatGroup: sweep.repeatGroup,
    },
  };
}
