import { and, desc, eq, isNotNull } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import { analyses, projects, sweeps } from "./schema/index.ts";

/** The newest sweep that anybody may look at, demonstrations before all others. */
export async function findPublicExample(tx: Queryable = db) {
  // Chosen by its id first: sorting must not carry the drawings along.
  const newest = tx
    .select({ id: sweeps.id })
    .from(sweeps)
    .innerJoin(projects, eq(projects.id, sweeps.projectId))
    .where(
      and(
        eq(projects.visibility, "public"),
        eq(sweeps.purpose, "antenna"),
        isNotNull(sweeps.analysisId),
        isNotNull(sweeps.preview),
      ),
    )
    .orderBy(desc(projects.demo), desc(sweeps.createdAt))
    .limit(1)
    .as("newest");
  const rows = await tx
    .select({
      sweep: {
        id: sweeps.id,
        publicId: sweeps.publicId,
        title: sweeps.title,
        startHz: sweeps.startHz,
        stopHz: sweeps.stopHz,
        preview: sweeps.preview,
      },
      project: {
        id: projects.id,
        publicId: projects.publicId,
        title: projects.title,
        demo: projects.demo,
        ituRegion: projects.ituRegion,
      },
      settings: analyses.settings,
    })
    .from(sweeps)
    .innerJoin(newest, eq(newest.id, sweeps.id))
    .innerJoin(projects, eq(projects.id, sweeps.projectId))
    .innerJoin(analyses, eq(analyses.id, sweeps.analysisId))
    .limit(1);
  return rows[0];
}
